import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { root } from './folders.mjs';
import { ask, run } from './run.mjs';
import { say, SetupProblem } from './say.mjs';

/** @throws SetupProblem when this Node.js cannot run the program */
export function requireNode() {
  const [major, minor] = process.versions.node.split('.').map(Number);
  if (major > 20 || (major === 20 && minor >= 9)) return;
  throw new SetupProblem(`Node.js ${process.versions.node} is too old: Cagewright needs 20.9 or later.`);
}

/** Installs the npm packages when there are none, or when the lock has changed since they were installed. */
export function ensurePackages() {
  const lock = createHash('sha256')
    .update(readFileSync(path.join(root, 'package-lock.json')))
    .digest('hex');
  const stamp = path.join(root, 'node_modules', '.installed-lock');
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === lock) return;
  say('Installing the npm packages …');
  run('npm', ['ci', '--no-audit', '--no-fund', '--loglevel=error']);
  writeFileSync(stamp, lock);
}

function aptInstall(packages, what) {
  if (ask('which', ['apt-get']) === null) {
    throw new SetupProblem(
      `${what} is not installed, and there is no apt-get here. Install ${packages.join(', ')}, then start again.`,
    );
  }
  const asRoot = process.getuid?.() === 0;
  if (!asRoot && ask('sudo', ['-n', 'true']) === null && !process.stdin.isTTY) {
    throw new SetupProblem(
      `${what} is not installed, and this user cannot use sudo. Install ${packages.join(', ')}, then start again.`,
    );
  }
  say(`Installing ${what} from Debian's packages …`);
  const apt = (args) => {
    const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
    const words = ['apt-get', '-qq', ...args];
    return asRoot
      ? run(words[0], words.slice(1), { env, stdio: ['ignore', 'ignore', 'inherit'] })
      : run('sudo', ['DEBIAN_FRONTEND=noninteractive', ...words]);
  };
  apt(['update']);
  apt(['install', '-y', '--no-install-recommends', ...packages]);
}

function postgresBinaries() {
  const base = '/usr/lib/postgresql';
  if (!existsSync(base)) return null;
  const versions = readdirSync(base)
    .filter((version) => existsSync(path.join(base, version, 'bin', 'initdb')))
    .sort((a, b) => Number(b) - Number(a));
  return versions[0] ? path.join(base, versions[0], 'bin') : null;
}

/** The folder of PostgreSQL's server programs, installed first when they are missing. */
export function ensurePostgres() {
  const found = postgresBinaries();
  if (found) return found;
  aptInstall(['postgresql'], 'PostgreSQL');
  const installed = postgresBinaries();
  if (!installed) throw new SetupProblem('PostgreSQL was installed, but its server programs were not found.');
  return installed;
}

/** The path of a Chromium for the tests, installed first when it is missing. */
export function ensureChromium() {
  const found = () => ['/usr/bin/chromium', '/usr/bin/chromium-browser'].find((file) => existsSync(file));
  if (!found()) aptInstall(['chromium', 'fonts-liberation'], 'Chromium');
  const installed = found();
  if (!installed) throw new SetupProblem('Chromium was installed, but not found.');
  return installed;
}

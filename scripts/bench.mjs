import { createHash } from 'node:crypto';
import { copyFileSync, existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { ensureBuild } from './setup/build.mjs';
import { dataFolder, root } from './setup/folders.mjs';
import { ensureChromium, ensurePackages, ensurePostgres, requireNode } from './setup/installed.mjs';
import { run } from './setup/run.mjs';
import { runMain, say } from './setup/say.mjs';

/**
 * The peer's packages, in a folder of their own: nobody who starts or tests the product needs them. Without them the
 * lines that speak of the peer say that they could not be measured.
 */
function ensurePeer() {
  const from = path.join(root, 'tests/bench/peer');
  const folder = path.join(dataFolder, 'bench-peer');
  const lock = createHash('sha256')
    .update(readFileSync(path.join(from, 'package-lock.json')))
    .digest('hex');
  const stamp = path.join(folder, 'installed-lock');
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === lock) return;
  say('Installing the packages of the peer that is measured against …');
  mkdirSync(folder, { recursive: true });
  for (const file of ['package.json', 'package-lock.json'])
    copyFileSync(path.join(from, file), path.join(folder, file));
  try {
    run('npm', ['ci', '--no-audit', '--no-fund', '--loglevel=error'], { cwd: folder });
    writeFileSync(stamp, lock);
  } catch (problem) {
    say(problem.message);
  }
}

/** `npm run bench [-- line …]`: ratios measured in one run, printed and never asserted. */
await runMain(async () => {
  requireNode();
  ensurePackages();
  ensurePostgres();
  ensureChromium();
  ensurePeer();
  ensureBuild();
  run(process.execPath, ['--import', 'tsx', 'tests/bench/run.ts', ...process.argv.slice(2)], {
    env: { ...process.env, NODE_ENV: 'production' },
  });
});

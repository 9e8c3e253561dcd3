import { createHash } from 'node:crypto';
import { existsSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { root } from './folders.mjs';
import { ask, run } from './run.mjs';
import { say } from './say.mjs';

const sources = [
  'app',
  'components',
  'lib',
  'db',
  'public',
  'service-worker',
  'scripts',
  'types',
  'proxy.ts',
  'next.config.ts',
  'postcss.config.mjs',
  'tailwind.config.ts',
  'tsconfig.json',
  'package.json',
  'package-lock.json',
];
const made = ['public/sw.js', 'public/vendor/'];

/** The digest of everything that the build is made of; git tells which files there are, tracked or not yet. */
function sourceDigest() {
  const listed = ask('git', ['ls-files', '-co', '--exclude-standard', '--', ...sources]);
  if (listed === null) return null;
  const hash = createHash('sha256');
  for (const file of [...new Set(listed.split('\n'))].sort()) {
    const full = path.join(root, file);
    if (
      !file ||
      made.some((prefix) => file.startsWith(prefix)) ||
      !existsSync(full) ||
      !statSync(full).isFile()
    )
      continue;
    hash.update(file).update('\0').update(readFileSync(full)).update('\0');
  }
  return hash.digest('hex');
}

/** Builds the application and its service worker, when their sources have changed since the last build. */
export function ensureBuild() {
  const stamp = path.join(root, '.next', 'built-from');
  const digest = sourceDigest();
  if (digest !== null && existsSync(stamp) && readFileSync(stamp, 'utf8') === digest) return;
  say('Building the application …');
  const env = { ...process.env, NEXT_TELEMETRY_DISABLED: '1', NODE_ENV: 'production' };
  run(process.execPath, ['scripts/copy-vendor.mjs'], { env });
  run(process.execPath, ['node_modules/next/dist/bin/next', 'build'], { env });
  run(process.execPath, ['scripts/build-service-worker.mjs'], { env });
  run(process.execPath, ['scripts/collect-csp-hashes.mjs'], { env });
  if (digest !== null) writeFileSync(stamp, digest);
}

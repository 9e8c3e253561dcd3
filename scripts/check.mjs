import { spawnSync } from 'node:child_process';
import { writeFileSync } from 'node:fs';
import { root } from './setup/folders.mjs';

/** Format, lint, types, import rules: each a step of its own. With a file name it also writes how many passed. */
const bin = (name) => `node_modules/.bin/${name}`;
const steps = [
  ['format', bin('prettier'), ['--check', '--log-level', 'warn', '.']],
  ['lint', bin('eslint'), ['--max-warnings', '0', '.']],
  ['route types', bin('next'), ['typegen']],
  ['types', bin('tsc'), ['--noEmit', '-p', '.']],
  ['types of the service worker', bin('tsc'), ['--noEmit', '-p', 'service-worker']],
  [
    'import rules and cycles',
    bin('depcruise'),
    [
      '--config',
      '.dependency-cruiser.mjs',
      '--output-type',
      'err',
      'app',
      'components',
      'lib',
      'db',
      'service-worker',
      'scripts',
      'tests',
    ],
  ],
];
let failed = 0;
for (const [name, command, args] of steps) {
  const result = spawnSync(command, args, {
    cwd: root,
    stdio: 'inherit',
    env: { ...process.env, NEXT_TELEMETRY_DISABLED: '1' },
  });
  const passed = result.status === 0;
  failed += passed ? 0 : 1;
  console.log(`${passed ? 'passed' : 'FAILED'}: ${name}`);
}
const report = process.argv[2];
if (report) writeFileSync(report, JSON.stringify({ passed: steps.length - failed, failed }));
process.exitCode = failed > 0 ? 1 : 0;

import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs';
import path from 'node:path';
import { ensureBuild } from './setup/build.mjs';
import { dataFolder, root } from './setup/folders.mjs';
import { ensureChromium, ensurePackages, ensurePostgres, requireNode } from './setup/installed.mjs';
import { runMain, say, SetupProblem } from './setup/say.mjs';

const known = ['check', 'reference', 'unit', 'integration', 'faults', 'e2e'];
const reports = path.join(dataFolder, 'reports');

/** Runs one kind and gives back how many tests passed and failed; a kind that ran nothing has failed. */
function runKind(kind) {
  const file = path.join(reports, `${kind}.json`);
  rmSync(file, { force: true });
  const [command, args, env] = commandOf(kind, file);
  say(`\n— ${kind} —`);
  const { status } = spawnSync(command, args, {
    cwd: root,
    stdio: 'inherit',
    env: { ...process.env, ...env },
  });
  const counts = existsSync(file)
    ? countsOf(kind, JSON.parse(readFileSync(file, 'utf8')))
    : { passed: 0, failed: 0 };
  const silent = counts.passed + counts.failed === 0 || (status !== 0 && counts.failed === 0);
  return silent ? { passed: counts.passed, failed: counts.failed + 1 } : counts;
}

function commandOf(kind, file) {
  if (kind === 'check') return [process.execPath, ['scripts/check.mjs', file], {}];
  if (kind === 'e2e')
    return ['node_modules/.bin/playwright', ['test'], { PLAYWRIGHT_JSON_OUTPUT_FILE: file }];
  const reporters = ['--reporter=default', '--reporter=json', `--outputFile.json=${file}`];
  if (kind === 'reference') reporters.push('--reporter=./tests/reference/summary-reporter.ts');
  return ['node_modules/.bin/vitest', ['run', '--project', kind, ...reporters], {}];
}

function countsOf(kind, report) {
  if (kind === 'check') return report;
  if (kind === 'e2e')
    return { passed: report.stats.expected + report.stats.flaky, failed: report.stats.unexpected };
  return { passed: report.numPassedTests, failed: report.numFailedTests };
}

await runMain(async () => {
  const asked = process.argv.slice(2);
  const unknown = asked.filter((kind) => !known.includes(kind));
  if (unknown.length > 0)
    throw new SetupProblem(`No such kind of test: ${unknown.join(', ')}. There are: ${known.join(', ')}.`);
  const kinds = asked.length > 0 ? asked : known;

  requireNode();
  ensurePackages();
  mkdirSync(reports, { recursive: true });
  if (kinds.some((kind) => ['integration', 'faults', 'e2e'].includes(kind))) ensurePostgres();
  if (kinds.includes('e2e')) ensureChromium();

  const total = { passed: 0, failed: 0 };
  try {
    for (const kind of kinds) {
      if (kind === 'e2e') ensureBuild();
      const counts = runKind(kind);
      total.passed += counts.passed;
      total.failed += counts.failed;
      say(`${kind}: ${counts.passed} passed, ${counts.failed} failed`);
    }
  } finally {
    if (existsSync(path.join(dataFolder, 'test-postgres'))) {
      const { startTestCluster } = await import('./setup/test-cluster.mjs');
      (await startTestCluster()).stop('immediate');
    }
  }
  say(`\n${total.passed} passed, ${total.failed} failed`);
  process.exitCode = total.failed > 0 ? 1 : 0;
});

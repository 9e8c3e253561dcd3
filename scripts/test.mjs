import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs';
import path from 'node:path';
import { ensureBuild } from './setup/build.mjs';
import { dataFolder, root } from './setup/folders.mjs';
import { ensureChromium, ensurePackages, ensurePostgres, requireNode } from './setup/installed.mjs';
import { runMain, say, SetupProblem } from './setup/say.mjs';

const usual = ['check', 'reference', 'unit', 'integration', 'faults', 'e2e'];
/** Tests of faults that belong to other kinds too: here without the rest of those, for `npm run test:faults`. */
const known = [...usual, 'faults-elsewhere', 'faults-browser'];
const elsewhere = ['tests/unit/device/', 'tests/integration/readers', 'tests/integration/photos'];
const inBrowser = (kind) => kind === 'e2e' || kind === 'faults-browser';
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
  if (inBrowser(kind)) {
    const which = kind === 'faults-browser' ? ['/faults-'] : [];
    return ['node_modules/.bin/playwright', ['test', ...which], { PLAYWRIGHT_JSON_OUTPUT_FILE: file }];
  }
  const reporters = ['--reporter=default', '--reporter=json', `--outputFile.json=${file}`];
  if (kind === 'reference') reporters.push('--reporter=./tests/reference/summary-reporter.ts');
  const which =
    kind === 'faults-elsewhere'
      ? ['--project', 'unit', '--project', 'integration', ...elsewhere]
      : ['--project', kind];
  return ['node_modules/.bin/vitest', ['run', ...which, ...reporters], {}];
}

function countsOf(kind, report) {
  if (kind === 'check') return report;
  if (inBrowser(kind))
    return { passed: report.stats.expected + report.stats.flaky, failed: report.stats.unexpected };
  return { passed: report.numPassedTests, failed: report.numFailedTests };
}

await runMain(async () => {
  const asked = process.argv.slice(2).filter((word) => word !== '--all');
  const all = process.argv.includes('--all');
  const unknown = asked.filter((kind) => !known.includes(kind));
  if (unknown.length > 0)
    throw new SetupProblem(`No such kind of test: ${unknown.join(', ')}. There are: ${known.join(', ')}.`);
  if (all && !asked.some((kind) => kind.startsWith('faults')))
    throw new SetupProblem('--all is for the faults: npm run test:faults -- --all');
  // Every seed, the browser killed twenty times, the whole month offline: see DEVELOPERS.md.
  if (all) process.env.FAULTS = 'all';
  const kinds = asked.length > 0 ? asked : usual;

  requireNode();
  ensurePackages();
  mkdirSync(reports, { recursive: true });
  if (kinds.some((kind) => ['integration', 'faults', 'faults-elsewhere'].includes(kind) || inBrowser(kind)))
    ensurePostgres();
  if (kinds.some(inBrowser)) ensureChromium();

  const total = { passed: 0, failed: 0 };
  try {
    for (const kind of kinds) {
      if (inBrowser(kind)) ensureBuild();
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

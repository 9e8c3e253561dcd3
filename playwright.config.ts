import { defineConfig } from '@playwright/test';

/** One worker: the tests of a role's day build on one seeded server, and the machine has two cores. */
export default defineConfig({
  testDir: 'tests/e2e',
  outputDir: '.data/e2e-results',
  globalSetup: './tests/e2e/global-setup.ts',
  workers: 1,
  fullyParallel: false,
  forbidOnly: true,
  retries: 0,
  timeout: 120_000,
  expect: { timeout: 15_000 },
  reporter: [
    ['list'],
    ['json', { outputFile: process.env.PLAYWRIGHT_JSON_OUTPUT_FILE ?? '.data/reports/e2e.json' }],
  ],
  use: {
    browserName: 'chromium',
    viewport: { width: 390, height: 844 },
    hasTouch: true,
    // A trace of every step takes its time: for looking into a failure, on request.
    trace: process.env.E2E_TRACE ? 'retain-on-failure' : 'off',
    launchOptions: {
      executablePath: '/usr/bin/chromium',
      chromiumSandbox: process.getuid?.() !== 0,
      args: [
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-sync',
        '--disable-quic',
        '--no-first-run',
      ],
    },
  },
});

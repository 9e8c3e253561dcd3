import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const root = fileURLToPath(new URL('.', import.meta.url));
const resolve = { alias: { '@': root.replace(/\/$/, '') } };

export default defineConfig({
  resolve,
  test: {
    projects: [
      { resolve, test: { name: 'reference', include: ['tests/reference/**/*.test.ts'] } },
      // The longest are stories of thousands of entries; a busy machine is no reason to fail.
      { resolve, test: { name: 'unit', include: ['tests/unit/**/*.test.ts'], testTimeout: 60_000 } },
      {
        resolve,
        test: {
          name: 'integration',
          include: ['tests/integration/**/*.test.ts'],
          globalSetup: ['tests/integration/global-setup.ts'],
          // They import folders by name, which Node alone does not resolve.
          server: { deps: { inline: ['mailparser', 'smtp-server'] } },
          testTimeout: 60_000,
          hookTimeout: 60_000,
          maxWorkers: 2,
          // Another number of workers than the unit tests: after them, where both are asked for.
          sequence: { groupOrder: 1 },
        },
      },
      {
        resolve,
        test: {
          name: 'faults',
          include: ['tests/faults/**/*.test.ts'],
          globalSetup: ['tests/integration/global-setup.ts'],
          testTimeout: 120_000,
          hookTimeout: 60_000,
          maxWorkers: 1,
        },
      },
    ],
  },
});

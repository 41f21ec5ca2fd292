import { defineConfig } from 'vitest/config';

/** Tests that open the built pages in a real browser. */
const BROWSER_TESTS = ['test/browser/**/*.test.ts'];

export default defineConfig({
  test: {
    projects: [
      {
        test: {
          name: 'unit',
          include: ['test/**/*.test.ts'],
          exclude: BROWSER_TESTS,
          testTimeout: 120_000,
          benchmark: { include: ['bench/**/*.bench.ts'] },
        },
      },
      {
        test: {
          name: 'browser',
          include: BROWSER_TESTS,
          globalSetup: ['test/browser/setup.ts'],
          testTimeout: 120_000,
          hookTimeout: 300_000,
          fileParallelism: false,
          benchmark: { include: [] },
        },
      },
    ],
  },
});

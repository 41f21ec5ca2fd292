import { defineConfig } from 'vitest/config';

/** Tests that open pages in a real browser; they need the pages built. */
const BROWSER_TESTS = ['test/excel/**/*.test.ts', 'test/workbench/**/*.test.ts', 'test/**/*.browser.test.ts'];

export default defineConfig({
  test: {
    projects: [
      {
        test: {
          name: 'unit',
          include: ['test/**/*.test.ts'],
          exclude: BROWSER_TESTS,
          testTimeout: 30_000,
          benchmark: { include: ['bench/**/*.bench.ts'] },
        },
      },
      {
        test: {
          name: 'browser',
          include: BROWSER_TESTS,
          globalSetup: ['test/helpers/buildPages.ts'],
          testTimeout: 120_000,
          hookTimeout: 120_000,
          benchmark: { include: [] },
        },
      },
    ],
    coverage: { provider: 'v8', include: ['src/**'] },
  },
});

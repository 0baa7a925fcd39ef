import { defineConfig } from 'vitest/config';

/** Three projects: pure code, code with a database or an HTTP server, and screens in a real browser. */
export default defineConfig({
  test: {
    projects: [
      {
        test: {
          name: 'unit',
          include: [
            'tests/*.test.ts',
            'tests/engine/**/*.test.ts',
            'tests/features/**/*.test.{ts,tsx}',
            'tests/contract/**/*.test.ts',
          ],
          testTimeout: 60_000,
        },
      },
      {
        test: {
          name: 'server',
          include: ['tests/server/**/*.test.ts', 'tests/api/**/*.test.ts', 'tests/cli/**/*.test.ts'],
          testTimeout: 60_000,
          hookTimeout: 300_000,
          fileParallelism: false,
        },
      },
      {
        test: {
          name: 'browser',
          include: ['tests/e2e/**/*.test.ts'],
          testTimeout: 90_000,
          hookTimeout: 300_000,
          fileParallelism: false,
        },
      },
    ],
  },
});

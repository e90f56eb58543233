import react from '@vitejs/plugin-react';
import { defineConfig } from 'vitest/config';

const needsPostgres = ['test/support/postgres-setup.ts'];

/** Models of features know no DOM; those that need one say so in their first line. */
const PURE_OF_PAGES = 'frontend/src/features/*/model/**/*.test.ts';

export default defineConfig({
  test: {
    maxWorkers: Number(process.env['TEST_WORKERS'] ?? 2),
    allowOnly: false,
    slowTestThreshold: 5000,
    reporters: [['default', { summary: false }], './test/support/count-reporter.ts'],
    coverage: { include: ['{backend,common,frontend}/src/**'], reportsDirectory: '.local/coverage' },
    projects: [
      {
        test: {
          name: 'unit',
          environment: 'node',
          include: ['{common,backend}/src/**/*.test.ts', PURE_OF_PAGES, 'test/lint/**/*.test.ts'],
          testTimeout: 60_000,
          // Pure functions share a worker: loading them once per file took longer than testing them.
          isolate: false,
        },
      },
      {
        plugins: [react()],
        test: {
          name: 'ui',
          environment: 'happy-dom',
          include: ['frontend/src/**/*.test.{ts,tsx}'],
          exclude: [PURE_OF_PAGES],
          setupFiles: ['test/support/ui-setup.ts'],
          isolate: false,
        },
      },
      {
        test: {
          name: 'truth',
          environment: 'node',
          include: ['test/truth/**/*.test.ts'],
          testTimeout: 60_000,
          isolate: false,
        },
      },
      {
        test: {
          name: 'api',
          environment: 'node',
          include: ['test/api/**/*.test.ts'],
          globalSetup: needsPostgres,
          // Each file has its own server and database; sharing the loaded modules saves a third of the time.
          isolate: false,
          testTimeout: 60_000,
          hookTimeout: 60_000,
        },
      },
      {
        test: {
          name: 'browser',
          environment: 'node',
          include: ['test/browser/**/*.test.ts'],
          globalSetup: [...needsPostgres, 'test/support/built-app-setup.ts'],
          isolate: false,
          testTimeout: 120_000,
          hookTimeout: 120_000,
        },
      },
    ],
  },
});

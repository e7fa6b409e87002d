import { defineConfig } from 'vitest/config';

const setupFiles = ['tests/support/fail-on-console.ts'];
/** The SQL builder still reads fields that the driver has renamed; a note on standard error for every process. */
const execArgv = ['--disable-warning=DeprecationWarning'];
/** Two files at once also on two cores, where vitest would keep one core for itself. */
const maxWorkers = 2;
/** The one test of the architecture that asks the running application. */
const routeRules = 'tests/architecture/route-rules.test.ts';
const api = ['tests/api/**/*.test.ts', routeRules];

/**
 * pure: shared/, schema/ and the architecture, no database. api: one database a file, copied from a migrated
 * template. web: the client's parts in jsdom. e2e: the whole registry in a real browser, one file after another.
 */
export default defineConfig({
  test: {
    // Stopping the database takes longer than the usual ten seconds on a busy machine.
    teardownTimeout: 60_000,
    projects: [
      { test: { name: 'pure', maxWorkers, include: ['tests/{shared,schema,architecture,reference,cli,studies}/**/*.test.ts'], exclude: [routeRules], environment: 'node', pool: 'forks', execArgv, setupFiles, testTimeout: 60_000 } },
      { test: { name: 'api', maxWorkers, include: api, environment: 'node', pool: 'forks', execArgv, globalSetup: ['tests/support/postgres-global.ts'], setupFiles, testTimeout: 120_000, hookTimeout: 120_000 } },
      { test: { name: 'web', maxWorkers, include: ['tests/web/**/*.test.{ts,tsx}'], environment: 'jsdom', setupFiles: [...setupFiles, 'tests/support/web-setup.ts'], testTimeout: 30_000 } },
      { test: { name: 'e2e', include: ['tests/e2e/**/*.test.ts'], environment: 'node', pool: 'forks', execArgv, fileParallelism: false, globalSetup: ['tests/support/postgres-global.ts'], testTimeout: 180_000, hookTimeout: 180_000 } },
    ],
  },
});

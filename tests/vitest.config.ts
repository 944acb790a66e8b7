import { defineConfig } from 'vitest/config';

/** Files that put something in the place of a module or of a global, or use a package that does: each in a world of its own. */
const ALONE = [
  'tests/unit/corpus/rowsA.test.ts',
  'tests/unit/app/loopback/lifetime.test.ts',
  'tests/reference/highThroughput.test.ts',
  'tests/unit/app/electron/{quitGuard,placeKeeper,main,bridge}.test.ts',
];

export default defineConfig({
  root: new URL('..', import.meta.url).pathname,
  oxc: { jsx: { runtime: 'automatic', importSource: 'preact' } },
  test: {
    environment: 'node',
    pool: 'threads',
    // All cores: the browser tests come after these and not beside them.
    maxWorkers: '100%',
    testTimeout: 40_000,
    projects: [
      {
        extends: true,
        test: {
          name: 'all',
          include: ['tests/unit/**/*.test.{ts,tsx}', 'tests/reference/**/*.test.ts'],
          exclude: ALONE,
          // Modules are read once for a thread and not once for a file: a fifth of the time of all tests.
          isolate: false,
        },
      },
      { extends: true, test: { name: 'alone', include: ALONE } },
    ],
  },
});

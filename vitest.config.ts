import { defineConfig } from 'vitest/config';

/** Where tests live, and how long one may take on a slow machine with two cores. */
const kinds = [
  { name: 'rooms', include: ['test/!(outside|packaging)/**/*.test.ts'], testTimeout: 60_000 },
  { name: 'outside', include: ['test/outside/**/*.test.ts'], testTimeout: 120_000 },
  { name: 'packaging', include: ['test/packaging/**/*.test.ts'], testTimeout: 120_000 },
];

export default defineConfig({
  test: {
    projects: kinds.map(({ name, include, testTimeout }) => ({
      extends: true as const,
      test: { name, include, testTimeout, hookTimeout: testTimeout },
    })),
    // Processes, since the independent reader of GeoTIFF does not load inside a worker thread.
    pool: 'forks',
    // One worker a core: the tests compute, they do not wait.
    maxWorkers: '100%',
    // A skipped or focused test is a hole that nobody sees.
    allowOnly: false,
    restoreMocks: true,
    unstubGlobals: true,
  },
});

import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: {
    include: ['tests/**/*.test.ts'],
    // Two processes: what a small machine has, and enough for tests that compile sketches.
    pool: 'forks',
    maxWorkers: 2,
    testTimeout: 60_000,
    hookTimeout: 60_000,
    teardownTimeout: 5_000,
    // An empty run is a fault of ours, never a success.
    passWithNoTests: false,
    allowOnly: false,
  },
});

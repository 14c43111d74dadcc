import { defineConfig } from 'vitest/config';

// The command line as a process, built first. One file at a time: the tests interrupt and kill by the clock.
export default defineConfig({
  test: {
    include: ['test/terminal/**/*.test.ts'],
    globalSetup: ['test/terminal/build-first.ts'],
    environment: 'node',
    fileParallelism: false,
    testTimeout: 60_000,
  },
});

import { defineConfig } from 'vitest/config';

// Measurements: `npm run bench`. Alone and in order, so that they do not disturb each other.
export default defineConfig({
  test: {
    include: ['test/bench/**/*.bench.ts'],
    globalSetup: ['test/terminal/build-first.ts'],
    environment: 'node',
    fileParallelism: false,
    testTimeout: 600_000,
    disableConsoleIntercept: true,
  },
});

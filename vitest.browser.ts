import { defineConfig } from 'vitest/config';

// Tests in Node that drive Chromium on the built page. One file at a time: the software renderer takes both cores.
export default defineConfig({
  test: {
    include: ['test/browser/**/*.test.ts'],
    globalSetup: ['test/terminal/build-first.ts'],
    environment: 'node',
    fileParallelism: false,
    testTimeout: 120_000,
    hookTimeout: 120_000,
  },
});

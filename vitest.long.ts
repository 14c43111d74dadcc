import { defineConfig } from 'vitest/config';

// Statistical tests that are too long for every run: `npm run test:long`.
export default defineConfig({
  test: {
    include: ['test/**/*.long.test.ts'],
    globalSetup: ['test/terminal/build-first.ts'],
    environment: 'node',
    testTimeout: 1_200_000,
  },
});

import { defineConfig } from 'vitest/config';

// Fast tests: everything that needs no browser and no built bundle. The browser, terminal and long tests
// have configurations of their own, which test/run.mjs calls after this one.
export default defineConfig({
  test: {
    include: ['test/**/*.test.ts'],
    exclude: ['test/browser/**', 'test/terminal/**', 'test/bench/**', '**/*.long.test.ts'],
    environment: 'node',
    testTimeout: 60_000,
  },
});

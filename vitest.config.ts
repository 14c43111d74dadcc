import { defineConfig } from 'vitest/config';

// Fast tests: what needs no browser, no built bundle and no samples. `npm run check` runs these alone; test/run.mjs
// goes on with the configurations for physics, command line and browser.
export default defineConfig({
  test: {
    include: ['test/**/*.test.ts'],
    exclude: [
      'test/reference/**',
      'test/laws/**',
      'test/engine/shower/coherent/**',
      'test/engine/probability/**',
      'test/engine/math/accuracy.test.ts',
      'test/browser/**',
      'test/terminal/**',
      'test/bench/**',
      '**/*.long.test.ts',
    ],
    environment: 'node',
    // modules are loaded once a worker, not once a file: a third of the time
    isolate: false,
    pool: 'threads',
    testTimeout: 120_000,
  },
});

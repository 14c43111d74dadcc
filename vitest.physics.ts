import { defineConfig } from 'vitest/config';

// Physics: outside values, independent calculations, laws over random settings, and the accuracy of functions, on samples of some seconds
// each.
export default defineConfig({
  test: {
    include: [
      'test/reference/**/*.test.ts',
      'test/laws/**/*.test.ts',
      'test/engine/shower/coherent/**/*.test.ts',
      'test/engine/probability/**/*.test.ts',
      'test/engine/math/accuracy.test.ts',
    ],
    exclude: ['**/*.long.test.ts'],
    environment: 'node',
    testTimeout: 240_000,
  },
});

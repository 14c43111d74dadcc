import { defineConfig } from 'vitest/config';

// Physics: outside values, independent calculations, and laws over random settings, on samples of some seconds each.
export default defineConfig({
  test: {
    include: ['test/reference/**/*.test.ts', 'test/laws/**/*.test.ts'],
    exclude: ['**/*.long.test.ts'],
    environment: 'node',
    testTimeout: 240_000,
  },
});

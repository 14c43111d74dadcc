import { describe, expect, it } from 'vitest';
import { compareMeans, SAMPLES } from './summary-means.ts';

// As summary-means.test.ts with enough events to see a difference of a few per mille.
describe('the sample means of large samples', () => {
  it.each(SAMPLES)(
    'agree with an independent shower: $name',
    ({ settings }) => {
      const events = settings.energy > 500 ? 30_000 : 150_000;
      for (const { key, pull } of compareMeans(settings, 602, events)) {
        if (!Number.isNaN(pull)) expect(Math.abs(pull), key).toBeLessThan(4);
      }
    },
    600_000,
  );
});

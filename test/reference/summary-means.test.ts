import { describe, expect, it } from 'vitest';
import { compareMeans, SAMPLES } from './summary-means.ts';

// Every mean of `summary`, engine against the independent shower, each within four combined standard errors. Some 40
// means in 7 samples: one of them beyond four by chance with probability 2 percent; the seeds are fixed.
describe('the sample means', () => {
  it.each(SAMPLES)('agree with an independent shower: $name', ({ settings }) => {
    const events = settings.energy > 500 ? 800 : 4000;
    let compared = 0;
    for (const { key, pull } of compareMeans(settings, 601, events)) {
      if (Number.isNaN(pull)) continue;
      compared++;
      expect(Math.abs(pull), key).toBeLessThan(4);
    }
    expect(compared).toBeGreaterThan(25);
  });
});

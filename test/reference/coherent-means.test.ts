import { describe, expect, it } from 'vitest';
import { COHERENT_SAMPLES, compareCoherent } from './coherent-means.ts';

// Every mean, engine against the plain shower, each within four combined standard errors: some 30 means in 14 samples,
// strongly correlated within a sample; one of them beyond four by chance with probability below 3 percent; the seed is
// fixed.
describe('the sample means of one-to-two branchings', () => {
  it.each(COHERENT_SAMPLES)('agree with an independent shower: $name', ({ settings }) => {
    let compared = 0;
    for (const { key, pull } of compareCoherent(settings, 711, settings.energy > 500 ? 300 : 1200)) {
      if (Number.isNaN(pull)) continue;
      compared++;
      expect(Math.abs(pull), key).toBeLessThan(4);
    }
    expect(compared).toBeGreaterThan(20);
  });

  it('would show a cascade that is not coherent', () => {
    const { settings } = COHERENT_SAMPLES[0];
    const other = compareCoherent(settings, 711, 1200, { coherent: false });
    expect(Math.abs(other.find(({ key }) => key === 'coherence.aboveBirth')!.pull)).toBeGreaterThan(10);
  });
});

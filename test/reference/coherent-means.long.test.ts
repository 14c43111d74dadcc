import { describe, expect, it } from 'vitest';
import { COHERENT_SAMPLES, compareCoherent } from './coherent-means.ts';

// As the short test, with thirty times the events: what differs by a third of a percent would show in the multiplicity.
describe('the sample means of one-to-two branchings, in many events', () => {
  it.each(COHERENT_SAMPLES)('agree with an independent shower: $name', ({ settings }) => {
    for (const { key, pull } of compareCoherent(settings, 702, settings.energy > 500 ? 10000 : 40000))
      if (!Number.isNaN(pull)) expect(Math.abs(pull), key).toBeLessThan(4);
  });
});

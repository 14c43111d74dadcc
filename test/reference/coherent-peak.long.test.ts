import { describe, expect, it } from 'vitest';
import { peakSlope } from './coherent-peak.ts';

// physics.md section 12: alpha_s fixed 0.1, pTmin 1 GeV, 1e4 to 1e6 GeV. The modified-leading-log slope with nf = 5 is
// 1/2 + a alpha_s/(8 pi g) = 0.60352 (references.md section 9, tolerance 0.02).
describe('the peak of the spectrum of ln 1/x, in many events', () => {
  it('moves with the slope of the modified leading logarithm where branching is coherent', () => {
    const slope = peakSlope(true, 43, [1e4, 200000], [1e6, 40000]);
    expect(slope.error).toBeLessThan(0.005);
    expect(Math.abs(slope.mean - 0.60352)).toBeLessThan(0.02);
  });

  it('moves with 0.88 in the incoherent cascade', () => {
    const slope = peakSlope(false, 44, [1e4, 200000], [1e6, 20000]);
    expect(slope.error).toBeLessThan(0.005);
    expect(Math.abs(slope.mean - 0.88)).toBeLessThan(0.02);
  });
});

import { describe, expect, it } from 'vitest';
import { peakSlope } from './coherent-peak.ts';

// physics.md section 12; the exact slopes are the long test's. Here the difference that coherence makes.
describe('the peak of the spectrum of ln 1/x', () => {
  it('moves slower with energy where branching is coherent', () => {
    const coherent = peakSlope(true, 41, [1e4, 20000], [1e5, 6000]);
    const incoherent = peakSlope(false, 42, [1e4, 12000], [1e5, 3000]);
    expect(Math.abs(coherent.mean - 0.61)).toBeLessThan(4 * coherent.error);
    expect(Math.abs(incoherent.mean - 0.86)).toBeLessThan(4 * incoherent.error);
    expect(coherent.error).toBeLessThan(0.03);
    expect(incoherent.error).toBeLessThan(0.03);
    expect(incoherent.mean - coherent.mean).toBeGreaterThan(0.15);
  });
});

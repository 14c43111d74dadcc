import { describe, expect, it } from 'vitest';
import { FractionSpectrumCollector, findHump, peakInWindow } from '../../../engine/measure/index.ts';
import { uniforms } from './random-numbers.ts';

const bins = (content: (x: number) => number) =>
  Float64Array.from({ length: 300 }, (_, bin) => content((bin + 0.5) / 10));

const peakOf = (counts: Float64Array): number => {
  const hump = findHump(counts, 10);
  return hump ? peakInWindow(counts, 10, hump) : NaN;
};

/** A skewed hump whose maximum is at `peak`, on a pile of leading partons at 0. */
const hump = (peak: number, pile: number) => (x: number) =>
  1000 * Math.exp(-0.3 * (x - peak) ** 2 - (x > peak - 2 ? 0.03 * (x - peak) ** 3 : -0.24)) +
  pile * Math.exp(-6 * x);

/** Normally distributed numbers (Box and Muller). */
function normals(seed: number): () => number {
  const u = uniforms(seed);
  return () => Math.sqrt(-2 * Math.log(u())) * Math.cos(2 * Math.PI * u());
}

describe('peak of a hump', () => {
  it('is where a skewed hump is highest, to 0.005, whatever piles up at 0', () => {
    for (const peak of [2.5, 3.03, 3.57, 6.1])
      for (const pile of [0, 3000, 30000]) expect(peakOf(bins(hump(peak, pile)))).toBeCloseTo(peak, 2);
  });

  it('does not take in the leading partons behind a shallow dip', () => {
    const content = (x: number) =>
      1000 * Math.exp(-0.7 * (x - 2) ** 2) +
      3000 * Math.exp(-3 * x) +
      250 * Math.exp(-((x - 0.8) ** 2) / 0.3);
    let [top, dip] = [2, 2];
    for (let x = 0.3; x < 3; x += 1e-4) {
      if (x > 1.5 && content(x) > content(top)) top = x;
      if (x < 2 && content(x) < content(dip)) dip = x;
    }
    expect(content(dip) / content(top)).toBeLessThan(0.95);
    expect(content(dip) / content(top)).toBeGreaterThan(0.72);
    expect(Math.abs(peakOf(bins(content)) - top)).toBeLessThan(0.04);
  });

  it('is missing where there is none', () => {
    expect(peakOf(bins((x) => 100 * Math.exp(-x)))).toBeNaN();
    expect(peakOf(bins(() => 0))).toBeNaN();
    expect(peakOf(bins((x) => (Math.abs(x - 3) < 0.1 ? 5 : 0)))).toBeNaN();
  });
});

describe('spectrum of ln(1/x)', () => {
  it('bins ln(sqrt(s)/2E) in tenths whatever the data, with the weight of the event', () => {
    const collector = new FractionSpectrumCollector();
    const energies = [
      50,
      50 * (1 + 1e-12),
      50 * Math.exp(-0.25),
      50 * Math.exp(-2.349),
      51,
      50 * Math.exp(-31),
    ];
    const momenta = Float64Array.from(energies.flatMap((e) => [0, 0, e, e]));
    collector.add(momenta, 100, 2);
    const { edges, counts } = collector.spectrum();
    expect(edges.length).toBe(301);
    expect(edges.slice(0, 4)).toEqual([0, 0.1, 0.2, 0.3]);
    expect(edges[300]).toBe(30);
    expect(counts.length).toBe(300);
    // x = 1 and x above 1 by rounding lie in the first bin, x = 1.02 and x = 1e-14 in none
    expect(counts[0]).toBe(4);
    expect(counts[2]).toBe(2);
    expect(counts[23]).toBe(2);
    expect(counts.reduce((a, b) => a + b)).toBe(8);
  });

  it('quotes an error of the peak that is the scatter of independent samples, partons of an event being alike', () => {
    const normal = normals(5);
    const peaks: number[] = [];
    const errors: number[] = [];
    for (let sample = 0; sample < 150; sample++) {
      const collector = new FractionSpectrumCollector();
      for (let event = 0; event < 400; event++) {
        const shift = 0.7 * normal();
        const momenta = new Float64Array(4 * 12);
        for (let k = 0; k < 12; k++) momenta[4 * k + 3] = 50 * Math.exp(-(5 + shift + 0.7 * normal()));
        collector.add(momenta, 100, 1);
      }
      const { peak } = collector.spectrum();
      peaks.push(peak.mean);
      errors.push(peak.error ** 2);
    }
    const mean = peaks.reduce((a, b) => a + b) / 150;
    const scatter = peaks.reduce((sum, x) => sum + (x - mean) ** 2, 0) / 149;
    const quoted = errors.reduce((a, b) => a + b) / 150;
    expect(Math.abs(mean - 5)).toBeLessThan(5 * Math.sqrt(scatter / 150));
    // 149 degrees of freedom scatter by 12 percent: this leaves 3 standard deviations
    expect(Math.abs(quoted / scatter - 1)).toBeLessThan(0.36);
  });

  it('has no error of the peak below 40 events', () => {
    const collector = new FractionSpectrumCollector();
    for (let event = 0; event < 39; event++) collector.add(Float64Array.from([0, 0, 1, 1]), 100, 1);
    expect(collector.spectrum().peak.error).toBeNaN();
  });
});

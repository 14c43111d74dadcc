import { describe, expect, it } from 'vitest';
import { RatioMean } from '../../../engine/measure/index.ts';
import { uniforms } from './random-numbers.ts';

const estimate = (pairs: readonly (readonly [number, number])[]) => {
  const mean = new RatioMean();
  for (const [a, b] of pairs) mean.add(a, b, 1);
  return mean.estimate();
};

/** The formula of the estimator in two passes. */
const twoPass = (pairs: readonly (readonly [number, number])[]) => {
  const n = pairs.length;
  const sumB = pairs.reduce((sum, [, b]) => sum + b, 0);
  const ratio = pairs.reduce((sum, [a]) => sum + a, 0) / sumB;
  const scatter = pairs.reduce((sum, [a, b]) => sum + (a - ratio * b) ** 2, 0);
  return { mean: ratio, error: Math.sqrt(((n / (n - 1)) * scatter) / sumB ** 2) };
};

describe('mean of a ratio', () => {
  it('is the textbook mean and its standard error where the denominator is 1', () => {
    const values = [3, 1, 4, 1, 5, 9, 2, 6];
    const found = estimate(values.map((x) => [x, 1]));
    const mean = values.reduce((a, b) => a + b) / 8;
    const variance = values.reduce((sum, x) => sum + (x - mean) ** 2, 0) / 7;
    expect(found.mean).toBeCloseTo(mean, 14);
    expect(found.error).toBeCloseTo(Math.sqrt(variance / 8), 14);
    expect(found.count).toBe(8);
  });

  it('agrees with two passes for weights and for steps per event', () => {
    const u = uniforms(1);
    const weighted = Array.from({ length: 500 }, () => {
      const weight = 0.1 + u();
      return [weight * (5 + u()), weight] as const;
    });
    const found = estimate(weighted);
    const expected = twoPass(weighted);
    expect(found.mean).toBeCloseTo(expected.mean, 12);
    expect(Math.abs(found.error / expected.error - 1)).toBeLessThan(1e-9);
  });

  it('does not change when all weights are multiplied by one number', () => {
    const u = uniforms(2);
    const pairs = Array.from({ length: 100 }, () => [u(), 0.5 + u()] as const);
    const scaled = estimate(pairs.map(([a, b]) => [1e6 * a, 1e6 * b]));
    expect(scaled.mean).toBeCloseTo(estimate(pairs).mean, 13);
    expect(Math.abs(scaled.error / estimate(pairs).error - 1)).toBeLessThan(1e-12);
  });

  it('loses no digits to a large common value', () => {
    const u = uniforms(3);
    const values = Array.from({ length: 10000 }, u);
    const near = estimate(values.map((x) => [x, 1]));
    const far = estimate(values.map((x) => [x + 1e8, 1]));
    // the sum of squares would be 1e20, far beyond 16 digits of the variance
    expect(Math.abs(far.error / near.error - 1)).toBeLessThan(1e-7);
  });

  it('quotes errors that cover: pulls of 2000 samples have unit width', () => {
    const u = uniforms(4);
    let squares = 0;
    for (let sample = 0; sample < 2000; sample++) {
      const mean = new RatioMean();
      for (let event = 0; event < 200; event++) {
        // steps of one event share a probability, so that they are not independent: <p> = 1/2
        const steps = Math.floor(6 * u());
        const probability = u();
        let hits = 0;
        for (let step = 0; step < steps; step++) if (u() < probability) hits++;
        mean.add(hits, steps, steps);
      }
      const found = mean.estimate();
      squares += ((found.mean - 0.5) / found.error) ** 2;
    }
    // chi-square with 2000 terms: outside of +-10 percent with a probability of 2e-3; binomial errors would give 1.7
    expect(Math.abs(squares / 2000 - 1)).toBeLessThan(0.1);
  });

  it('has no error for one event and no mean without a denominator', () => {
    expect(estimate([[3, 1]])).toEqual({ mean: 3, error: NaN, count: 1 });
    expect(estimate([[0, 0]]).mean).toBeNaN();
    expect(new RatioMean().estimate()).toEqual({ mean: NaN, error: NaN, count: 0 });
  });
});

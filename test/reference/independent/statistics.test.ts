import { describe, expect, it } from 'vitest';
import { chiSquareSurvival, Generator, kolmogorov, uniformPValue } from './index.ts';

describe('the statistics of the comparisons (references.md section 18)', () => {
  it('have the Kolmogorov limit', () => {
    expect(kolmogorov(0.5)).toBeCloseTo(0.963945243664875, 13);
    expect(kolmogorov(1)).toBeCloseTo(0.269999671677355, 13);
    expect(kolmogorov(3) / 3.04599594894253e-8).toBeCloseTo(1, 10);
    const sample = [0.02, 0.11, 0.35, 0.36, 0.48, 0.6, 0.61, 0.77, 0.89, 0.95];
    expect(uniformPValue(sample)).toBeCloseTo(0.965484740899, 10);
  });

  it('have the chi-square survival function', () => {
    const table = [
      [3.841458820694124, 1, 0.05],
      [10, 2, 0.00673794699908547],
      [10, 4, 0.0404276819945128],
      [100, 80, 0.064570368921133],
      [200, 100, 1.17845007209794e-8],
      [1, 3, 0.801251956901201],
      [0.1, 1, 0.751829634045849],
      [50, 10, 2.6690834249045e-7],
    ];
    for (const [x, k, q] of table) expect(chiSquareSurvival(x, k) / q).toBeCloseTo(1, 10);
  });

  it('see a generator that is uniform and reject one that is not', () => {
    const random = new Generator(11);
    const values = Array.from({ length: 20000 }, () => random.uniform());
    expect(uniformPValue(values)).toBeGreaterThan(1e-4);
    expect(uniformPValue(values.map((v) => v ** 1.05))).toBeLessThan(1e-6);
  });
});

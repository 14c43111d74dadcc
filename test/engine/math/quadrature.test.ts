import { describe, expect, it } from 'vitest';
import {
  applyRule,
  exp,
  gaussLegendre,
  integrate,
  log,
  QuadratureError,
  sin,
} from '../../../engine/math/index.ts';

describe('gaussLegendre', () => {
  it('integrates every monomial of degree below 2n exactly', () => {
    for (const n of [1, 2, 3, 7, 16, 41]) {
      const rule = gaussLegendre(n);
      for (let degree = 0; degree < 2 * n; degree++) {
        const found = applyRule(rule, (x) => x ** degree, -1, 1);
        expect(
          Math.abs(found - (degree % 2 ? 0 : 2 / (degree + 1))),
          `n ${n}, degree ${degree}`,
        ).toBeLessThan(4e-15);
      }
      const first = applyRule(rule, (x) => x ** (2 * n), -1, 1);
      if (n < 8) expect(Math.abs(first - 2 / (2 * n + 1))).toBeGreaterThan(1e-5);
    }
  });
  it('has the closed-form nodes of three points, ascending', () => {
    const { nodes, weights } = gaussLegendre(3);
    expect(nodes[2]).toBeCloseTo(Math.sqrt(0.6), 15);
    expect([...nodes]).toEqual([-nodes[2], 0, nodes[2]]);
    expect(weights[1]).toBeCloseTo(8 / 9, 15);
  });
  it('is good to one rounding a point at 1000 points, and refuses what is no rule', () => {
    const rule = gaussLegendre(1000);
    expect(Math.abs(applyRule(rule, exp, 0, 1) - (Math.E - 1))).toBeLessThan(1000 * 2.2e-16 * (Math.E - 1));
    for (const n of [0, -1, 2.5, NaN, 1001]) expect(() => gaussLegendre(n)).toThrow(QuadratureError);
  });
});

describe('integrate', () => {
  const cases: [string, (x: number) => number, number, number, number][] = [
    ['exp', exp, 0, 1, Math.E - 1],
    ['1/(1 + x^2)', (x) => 1 / (1 + x * x), -1, 1, Math.PI / 2],
    ['a peak of width 1e-3', (x) => 1e-3 / (x * x + 1e-6), -1, 2, Math.atan(1000) + Math.atan(2000)],
    ['ln x, singular at the end', log, 0, 1, -1],
    ['1/sqrt x, singular at the end', (x) => 1 / Math.sqrt(x), 0, 1, 2],
    ['a step', (x) => (x < 0.3 ? 1 : 0), 0, 1, 0.3],
    ['a range turned round', exp, 1, 0, 1 - Math.E],
    ['sin over 50 waves', (x) => sin(x) ** 2, 0, 50 * Math.PI, 25 * Math.PI],
  ];
  for (const [name, f, a, b, truth] of cases) {
    it(`meets its tolerance and its error bounds the truth: ${name}`, () => {
      for (const relative of [1e-4, 1e-8, 1e-11]) {
        const { value, error, converged } = integrate(f, a, b, { relative });
        expect(converged).toBe(true);
        expect(Math.abs(value - truth)).toBeLessThanOrEqual(relative * Math.abs(truth));
        expect(Math.abs(value - truth)).toBeLessThanOrEqual(error + 1e-15 * Math.abs(truth));
      }
    });
  }
  it('is exact at one stroke for polynomials of degree 22', () => {
    const { value, evaluations } = integrate((x) => 23 * x ** 22, 0, 1, { limit: 1 });
    expect(value).toBeCloseTo(1, 14);
    expect(evaluations).toBe(15);
  });
  it('says so when it does not get there', () => {
    const { converged, error } = integrate((x) => 1 / x, 0, 1, { limit: 20 });
    expect(converged).toBe(false);
    expect(error).toBeGreaterThan(0.1);
  });
  it('refuses an integrand that is not finite, and says where', () => {
    expect(() => integrate((x) => 1 / (x - 0.5), 0, 1)).toThrow(/at 0.5: found Infinity/);
    expect(() => integrate(exp, 0, Infinity)).toThrow(QuadratureError);
  });
});

import { describe, expect, it } from 'vitest';
import { cos, exp, findRoot, log, RootError } from '../../../engine/math/index.ts';

describe('findRoot', () => {
  const cases: [string, (x: number) => number, number, number, number][] = [
    ['x^2 = 2', (x) => x * x - 2, 0, 2, Math.SQRT2],
    ['the same from the other side', (x) => 2 - x * x, 5, 0, Math.SQRT2],
    ['cos x = x', (x) => cos(x) - x, 0, 1, 0.7390851332151607],
    ['ln x = -20', (x) => log(x) + 20, 1e-300, 1, Math.exp(-20)],
    ['a flat triple root', (x) => (x - 0.3) * (x - 0.3) * (x - 0.3), 0, 1, 0.3],
    ['a step', (x) => (x < 0.7 ? -1 : 1), 0, 1, 0.7],
    ['a steep wall', (x) => exp(200 * (x - 0.9)) - 1, 0, 1, 0.9],
  ];
  for (const [name, f, a, b, truth] of cases) {
    it(`finds ${name}`, () => {
      expect(Math.abs(findRoot(f, a, b) - truth)).toBeLessThan(1e-14);
      expect(Math.abs(findRoot(f, a, b, { tolerance: 1e-5 }) - truth)).toBeLessThan(1.001e-5);
    });
  }
  it('needs few evaluations on a smooth function', () => {
    let calls = 0;
    findRoot(
      (x) => {
        calls++;
        return x * x * x - 2;
      },
      0,
      2,
    );
    expect(calls).toBeLessThan(14);
  });
  it('takes an end that is a root', () => {
    expect(findRoot((x) => x, 0, 1)).toBe(0);
    expect(findRoot((x) => x - 1, 0, 1)).toBe(1);
  });
  it('refuses equal signs, NaN, and an exhausted limit', () => {
    expect(() => findRoot((x) => x * x + 1, -1, 1)).toThrow(RootError);
    expect(() => findRoot(() => NaN, -1, 1)).toThrow(RootError);
    expect(() => findRoot((x) => (x > 0.5 ? NaN : x - 0.6), 0, 0.4)).toThrow(RootError);
    expect(() => findRoot((x) => (x < 0.7 ? -1 : 1), 0, 1, { limit: 5 })).toThrow(/after 5 evaluations/);
  });
});

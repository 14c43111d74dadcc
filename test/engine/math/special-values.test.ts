import { describe, expect, it } from 'vitest';
import * as own from '../../../engine/math/index.ts';

const VALUES = [
  0,
  0.5,
  1,
  2,
  2.5,
  3,
  1e-20,
  1e-300,
  5e-324,
  1e16 + 2,
  9007199254740991,
  709.9,
  750,
  1e300,
  1.7976931348623157e308,
  Infinity,
]
  .flatMap((x) => [x, -x])
  .concat(NaN);

const ONE = [
  'log',
  'log1p',
  'exp',
  'expm1',
  'sin',
  'cos',
  'tan',
  'asin',
  'acos',
  'atan',
  'sinh',
  'cosh',
  'tanh',
  'atanh',
] as const;

/** Where the built-in gives 0, an infinity or NaN, or its argument back, ours must do exactly that. */
function agrees(found: number, built: number): boolean {
  if (built === 0 || !Number.isFinite(built)) return Object.is(found, built);
  return Math.abs(found - built) <= 4e-16 * Math.abs(built) || Math.abs(found - built) <= 5e-324;
}

describe('special values are those of the language', () => {
  for (const name of ONE) {
    it(name, () => {
      for (const x of VALUES) expect(agrees(own[name](x), Math[name](x)), `${name}(${x})`).toBe(true);
    });
  }
  for (const name of ['pow', 'atan2'] as const) {
    it(name, () => {
      for (const a of VALUES) {
        for (const b of VALUES) {
          expect(agrees(own[name](a, b), Math[name](a, b)), `${name}(${a}, ${b})`).toBe(true);
        }
      }
    });
  }
  it('sinCos', () => {
    const out = new Float64Array(2);
    for (const x of VALUES) {
      own.sinCos(out, x);
      expect(agrees(out[0], Math.sin(x)) && agrees(out[1], Math.cos(x)), `sinCos(${x})`).toBe(true);
    }
  });
});

describe('identities that hold to the last bit', () => {
  it('odd functions are odd, even ones even', () => {
    for (const x of VALUES) {
      for (const f of ['sin', 'tan', 'asin', 'atan', 'sinh', 'tanh', 'atanh'] as const) {
        expect(Object.is(own[f](-x), -own[f](x)), `${f}(${x})`).toBe(true);
      }
      for (const f of ['cos', 'cosh'] as const)
        expect(Object.is(own[f](-x), own[f](x)), `${f}(${x})`).toBe(true);
    }
  });
  it('exact results are exact', () => {
    expect(own.exp(0)).toBe(1);
    expect(own.log(1)).toBe(0);
    for (let k = -1074; k < 1024; k++) expect(own.pow(2, k)).toBe(2 ** k);
    for (let n = 1; n < 60; n++) expect(own.pow(n, 3)).toBe(n * n * n);
    expect(own.pow(1e4, 0.5)).toBe(100);
  });
});

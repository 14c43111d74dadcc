import { describe, expect, it } from 'vitest';
import * as own from '../../../engine/math/index.ts';
import * as exact from './high-precision.ts';
import { Samples } from './samples.ts';

// Bits after the point: enough that a subnormal result still has 200 digits of its own.
const P = 1280;
const ONE = 1n << BigInt(P);
const times = (a: bigint, b: bigint): bigint => (a * b) >> BigInt(P);
const over = (a: bigint, b: bigint): bigint => (a << BigInt(P)) / b;
const root = (a: bigint): bigint => exact.squareRoot(a << BigInt(P));

type Draw = (s: Samples) => number;
interface Claim {
  name:
    | 'log'
    | 'log1p'
    | 'exp'
    | 'expm1'
    | 'sin'
    | 'cos'
    | 'tan'
    | 'asin'
    | 'acos'
    | 'atan'
    | 'sinh'
    | 'cosh'
    | 'tanh'
    | 'atanh';
  truth: (X: bigint) => bigint;
  /** [ulp] claimed in the docstring for results that are normal numbers. */
  bound: number;
  draws: Record<string, Draw>;
}

const nearOne: Draw = (s) => 1 + s.sign() * s.scale(-52, -2);
const within: Draw = (s) => s.uniform(-1, 1);
const turns: Record<string, Draw> = {
  'one turn': (s) => s.uniform(0, 2 * Math.PI),
  'small ones': (s) => s.sign() * s.scale(-60, 0),
  'tiny ones': (s) => s.sign() * s.scale(-1074, -500),
  'up to a million': (s) => s.sign() * s.scale(1, 20),
  'any double': (s) => s.double(),
  'close to multiples of pi/64': (s) => (Math.floor(s.uniform(-2000, 2000)) * Math.PI) / 64,
  'not quite so close to multiples of pi/64': (s) =>
    (Math.floor(s.uniform(-2e6, 2e6)) * Math.PI) / 64 + s.sign() * s.scale(-29, -12),
  'close to large multiples of pi/2': (s) => (Math.floor(s.scale(10, 45)) * Math.PI) / 2,
};
const arcs: Record<string, Draw> = {
  'the whole range': within,
  'small ones': (s) => s.sign() * s.scale(-60, -1),
  'tiny ones': (s) => s.sign() * s.scale(-1074, -500),
  'close to the ends': (s) => s.sign() * (1 - s.scale(-53, -2)),
};
const wide: Record<string, Draw> = {
  'the middle': (s) => s.uniform(-2, 2),
  'up to 30': (s) => s.uniform(-32, 32),
  'small ones': (s) => s.sign() * s.scale(-60, -1),
  'tiny ones': (s) => s.sign() * s.scale(-1074, -500),
  'large ones': (s) => s.uniform(-709, 709),
};

const rise = (X: bigint): bigint => exact.exp(X, P);
const claims: Claim[] = [
  {
    name: 'log',
    truth: (X) => exact.log(X, P),
    bound: 0.52,
    draws: {
      'any double': (s) => Math.abs(s.double()),
      'near 1': nearOne,
      'between 1/2 and 2': (s) => s.uniform(0.5, 2),
      'subnormal ones': (s) => s.scale(-1074, -1023),
    },
  },
  {
    name: 'log1p',
    truth: (X) => exact.log(ONE + X, P),
    bound: 0.53,
    draws: {
      'any double': (s) => Math.abs(s.double()),
      'small ones': (s) => s.sign() * s.scale(-60, -2),
      'tiny ones': (s) => s.sign() * s.scale(-1074, -500),
      'around 1': (s) => s.uniform(-0.9, 3),
      'close to -1': (s) => -1 + s.scale(-53, -2),
    },
  },
  {
    name: 'exp',
    truth: rise,
    bound: 0.52,
    draws: { ...wide, 'subnormal results': (s) => s.uniform(-745, -708) },
  },
  { name: 'expm1', truth: (X) => rise(X) - ONE, bound: 0.7, draws: wide },
  { name: 'sin', truth: (X) => exact.sineCosine(X, P).sine, bound: 0.55, draws: turns },
  { name: 'cos', truth: (X) => exact.sineCosine(X, P).cosine, bound: 0.55, draws: turns },
  {
    name: 'tan',
    truth: (X) => {
      const { sine, cosine } = exact.sineCosine(X, P);
      return over(sine, cosine);
    },
    bound: 0.6,
    draws: turns,
  },
  { name: 'asin', truth: (X) => exact.arcTangent2(X, root(ONE - times(X, X)), P), bound: 0.65, draws: arcs },
  { name: 'acos', truth: (X) => exact.arcTangent2(root(ONE - times(X, X)), X, P), bound: 0.65, draws: arcs },
  {
    name: 'atan',
    truth: (X) => exact.arcTangent2(X, ONE, P),
    bound: 0.65,
    draws: { ...arcs, 'large ones': (s) => s.sign() * s.scale(0, 70), 'any double': (s) => s.double() },
  },
  { name: 'sinh', truth: (X) => (rise(X) - rise(-X)) / 2n, bound: 0.65, draws: wide },
  { name: 'cosh', truth: (X) => (rise(X) + rise(-X)) / 2n, bound: 0.55, draws: wide },
  { name: 'tanh', truth: (X) => over(rise(X) - rise(-X), rise(X) + rise(-X)), bound: 0.7, draws: wide },
  { name: 'atanh', truth: (X) => exact.log(over(ONE + X, ONE - X), P) / 2n, bound: 0.6, draws: arcs },
];

/** Results below this are subnormal: half an ulp more is lost when they are scaled. */
const SMALLEST_NORMAL = 2.2250738585072014e-308;

for (const { name, truth, bound, draws } of claims) {
  describe(name, () => {
    for (const [kind, draw] of Object.entries(draws)) {
      it(`is within ${bound} ulp of exact arithmetic: ${kind}`, () => {
        const samples = new Samples(name.length * 7919 + kind.length);
        let worst = 0;
        let at = NaN;
        for (let n = 0; n < 300; n++) {
          const x = draw(samples);
          const found = own[name](x);
          const off = exact.ulpsOff(found, truth(exact.fixed(x, P)), P);
          const allowed = Math.abs(found) < SMALLEST_NORMAL ? 0.76 / bound : 1;
          if (!(off / allowed <= worst)) {
            worst = off / allowed;
            at = x;
          }
        }
        expect(worst, `${name}(${at})`).toBeLessThanOrEqual(bound);
      });
    }
  });
}

describe('pow', () => {
  const pairs: Record<string, (s: Samples) => [number, number]> = {
    'moderate ones': (s) => [s.uniform(0, 5), s.uniform(-20, 20)],
    'large bases': (s) => [s.scale(-1074, 1023), s.uniform(-1, 1)],
    'bases near 1, large exponents': (s) => [1 + s.sign() * s.scale(-30, -3), s.sign() * s.scale(0, 33)],
    'whole exponents of negative bases': (s) => [-s.uniform(0, 4), Math.floor(s.uniform(-40, 40))],
    'results at the edges': (s) => [s.uniform(1.5, 8), s.sign() * s.uniform(330, 345)],
  };
  for (const [kind, draw] of Object.entries(pairs)) {
    it(`is within 0.6 ulp of exact arithmetic, 0.8 for subnormal results: ${kind}`, () => {
      const samples = new Samples(kind.length);
      for (let n = 0; n < 300; n++) {
        const [x, y] = draw(samples);
        const found = own.pow(x, y);
        if (!Number.isFinite(found) || found === 0) continue;
        const size = exact.exp(times(exact.fixed(y, P), exact.log(exact.fixed(Math.abs(x), P), P)), P);
        const off = exact.ulpsOff(Math.abs(found), size, P);
        expect(off, `pow(${x}, ${y})`).toBeLessThanOrEqual(Math.abs(found) < SMALLEST_NORMAL ? 0.8 : 0.6);
        expect(found < 0).toBe(x < 0 && Math.abs(y) % 2 === 1);
      }
    });
  }
});

describe('atan2', () => {
  const pairs: Record<string, (s: Samples) => [number, number]> = {
    'the unit square': (s) => [within(s), within(s)],
    'any two doubles': (s) => [s.double(), s.double()],
    'two subnormal ones': (s) => [s.sign() * s.scale(-1074, -1010), s.sign() * s.scale(-1074, -1010)],
    'two huge ones': (s) => [s.sign() * s.scale(990, 1023), s.sign() * s.scale(990, 1023)],
    'close to the axes': (s) => [s.sign() * s.scale(-70, -3), s.sign()],
    'close to the other axes': (s) => [s.sign(), s.sign() * s.scale(-70, -3)],
  };
  for (const [kind, draw] of Object.entries(pairs)) {
    it(`is within 0.65 ulp of exact arithmetic: ${kind}`, () => {
      const samples = new Samples(kind.length);
      for (let n = 0; n < 300; n++) {
        const [y, x] = draw(samples);
        const found = own.atan2(y, x);
        const truth = exact.arcTangent2(exact.fixed(y, P), exact.fixed(x, P), P);
        expect(exact.ulpsOff(found, truth, P), `atan2(${y}, ${x})`).toBeLessThanOrEqual(0.65);
      }
    });
  }
});

describe('sinCos', () => {
  it('gives the same bits as sin and cos', () => {
    const samples = new Samples(5);
    const out = new Float64Array(2);
    for (let n = 0; n < 20000; n++) {
      const x = n % 2 ? samples.uniform(0, 2 * Math.PI) : samples.double();
      own.sinCos(out, x);
      expect(out[0] === own.sin(x) && out[1] === own.cos(x), `at ${x}`).toBe(true);
    }
  });
});

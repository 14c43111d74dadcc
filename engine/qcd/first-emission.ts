import { CA } from '../constants.ts';
import { kernelGluon } from './kernels.ts';

/**
 * Ratio of the exact first-emission rate to that of the dipole kernels, by which f/g of a trial is multiplied.
 *
 * Everything massless, z and y of the emission as in kernels.ts.
 */
export interface FirstEmissionRatio {
  /** An upper limit of both ratios. */
  readonly largest: number;
  /** A gluon is emitted. */
  emission(z: number, y: number): number;
  /** A gluon splits into q qbar. */
  splitting(z: number, y: number): number;
}

const never = (): number => 1;

/**
 * e+e- -> q qbar g against the two ends of the dipole: at most 1.
 *
 * Source: Ellis, Gaillard, Ross, Nucl. Phys. B111 (1976) 253; method of Bengtsson & Sjostrand, Phys. Lett. B185 (1987) 435.
 */
export const vectorToQuarks: FirstEmissionRatio = {
  largest: 1,
  emission(z, y) {
    const a = (1 - z) * (1 - y);
    const exact = (1 - a) * (1 - a) + (1 - y) * (1 - y);
    return exact / (exact + excess(a, y));
  },
  splitting: never,
};

/** Scalar -> q qbar g, massless quarks, Yukawa vertex: 1 to 1.118433799204, at x1 = x2 = 0.6265. */
export const scalarToQuarks: FirstEmissionRatio = {
  largest: 1.1185,
  emission(z, y) {
    const a = (1 - z) * (1 - y);
    const vector = (1 - a) * (1 - a) + (1 - y) * (1 - y);
    return (vector + 2 * a * y) / (vector + excess(a, y));
  },
  splitting: never,
};

// sum of dipoles minus matrix element, times ab: a = 1-x1, b = 1-x2
function excess(a: number, b: number): number {
  return (a * a * b) / (1 - b) + (a * b * b) / (1 - a);
}

/** Scalar -> g g g and g q qbar through the effective vertex: 1 to 56/45 for g g g, (1-y)^2 for g q qbar. */
export const scalarToGluons: FirstEmissionRatio = {
  largest: 56 / 45,
  emission(z, y) {
    const c = y;
    const b = z * (1 - y);
    const a = (1 - z) * (1 - y);
    const exact = (CA * (1 + fourth(a) + fourth(b) + fourth(c))) / (2 * a * b * c);
    const dipoles =
      bothWays(b / (a + b), c) / c + bothWays(b / (b + c), a) / a + bothWays(a / (a + c), b) / b;
    return exact / dipoles;
  },
  splitting: (_z, y) => (1 - y) * (1 - y),
};

const fourth = (x: number): number => x * x * x * x;
const bothWays = (z: number, y: number): number => kernelGluon(z, y) + kernelGluon(1 - z, y);

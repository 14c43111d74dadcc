import { M_BOTTOM, M_CHARM, MZ } from './constants.ts';

export type CouplingKind = { kind: 'fixed'; value: number } | { kind: 'one-loop' } | { kind: 'two-loop' };

/** A coupling as a function of the scale squared, and the scales squared at which its derivative jumps. */
export interface Coupling {
  readonly alpha: (mu2: number) => number;
  /** [GeV^2], ascending. */
  readonly kinks: readonly number[];
}

/** b0 of d a/d ln mu^2 = -b0 a^2 - b1 a^3. */
export const b0 = (nf: number): number => (33 - 2 * nf) / (12 * Math.PI);
/** b1 of the same; zero where only one loop is asked for. */
export const b1 = (nf: number, loops: number): number =>
  loops === 2 ? (153 - 19 * nf) / (24 * Math.PI ** 2) : 0;

// F(a) = 1/a + c ln(c a/(1 + c a)), c = b1/b0, obeys dF/d ln mu^2 = b0 exactly.
function potential(a: number, c: number): number {
  return c === 0 ? 1 / a : 1 / a + c * Math.log((c * a) / (1 + c * a));
}

function solve(target: number, c: number): number {
  // F falls monotonically with a: bisection in ln a, 200 halvings of a range that holds every coupling in use.
  let low = Math.log(1e-6);
  let high = Math.log(1e6);
  for (let n = 0; n < 200; n++) {
    const middle = (low + high) / 2;
    if (potential(Math.exp(middle), c) > target) low = middle;
    else high = middle;
  }
  return Math.exp((low + high) / 2);
}

function implicitStep(a: number, from: number, to: number, nf: number, loops: number): number {
  const c = b1(nf, loops) / b0(nf);
  return solve(potential(a, c) + b0(nf) * Math.log(to / from), c);
}

/**
 * The running coupling by implicit solution of the truncated equation.
 *
 * @param loops 1 or 2.
 * @param atMz alpha_s(MZ).
 * Accuracy: 1e-13 relative. Slow: one bisection a call.
 */
export function implicitCoupling(loops: 1 | 2, atMz = 0.118, charm = M_CHARM, bottom = M_BOTTOM): Coupling {
  const mz2 = MZ * MZ;
  const [c2, b2] = [charm * charm, bottom * bottom];
  const atBottom = implicitStep(atMz, mz2, b2, 5, loops);
  const atCharm = implicitStep(atBottom, b2, c2, 4, loops);
  const alpha = (mu2: number): number =>
    mu2 >= b2
      ? implicitStep(atMz, mz2, mu2, 5, loops)
      : mu2 >= c2
        ? implicitStep(atBottom, b2, mu2, 4, loops)
        : implicitStep(atCharm, c2, mu2, 3, loops);
  return { alpha, kinks: [c2, b2] };
}

const STEPS_PER_UNIT = 400;

interface Piece {
  readonly start: number;
  readonly step: number;
  readonly values: Float64Array;
  readonly slopes: Float64Array;
}

function beta(a: number, nf: number, loops: number): number {
  return -b0(nf) * a * a - b1(nf, loops) * a ** 3;
}

// Fourth-order Runge-Kutta from ln mu^2 = `from`, where the coupling is `a`, to `to`.
function integrate(a: number, from: number, to: number, nf: number, loops: number): Piece {
  const count = Math.max(2, Math.ceil(Math.abs(to - from) * STEPS_PER_UNIT));
  const h = (to - from) / count;
  const values = new Float64Array(count + 1);
  const slopes = new Float64Array(count + 1);
  for (let n = 0; n <= count; n++) {
    values[n] = a;
    const k1 = beta(a, nf, loops);
    slopes[n] = k1;
    const k2 = beta(a + (h / 2) * k1, nf, loops);
    const k3 = beta(a + (h / 2) * k2, nf, loops);
    const k4 = beta(a + h * k3, nf, loops);
    a += (h / 6) * (k1 + 2 * k2 + 2 * k3 + k4);
  }
  return { start: from, step: h, values, slopes };
}

// Cubic interpolation on value and slope.
function lookUp(piece: Piece, x: number): number {
  const { start, step: h, values, slopes } = piece;
  const n = Math.min(values.length - 2, Math.max(0, Math.floor((x - start) / h)));
  const s = (x - start) / h - n;
  const [p, q] = [values[n], values[n + 1]];
  const [u, v] = [slopes[n] * h, slopes[n + 1] * h];
  return p + s * (u + s * (3 * (q - p) - 2 * u - v + s * (2 * (p - q) + u + v)));
}

/**
 * The running coupling by Runge-Kutta integration of its differential equation, tabulated: another method than
 * `implicitCoupling`, and fast.
 *
 * @param lowest Smallest scale squared that will be asked for [GeV^2].
 * @param highest Largest [GeV^2].
 * Accuracy: 1e-9 relative above 1 GeV.
 */
export function integratedCoupling(loops: 1 | 2, lowest: number, highest: number, atMz = 0.118): Coupling {
  const [c2, b2, mz2] = [M_CHARM ** 2, M_BOTTOM ** 2, MZ * MZ];
  const up = integrate(atMz, Math.log(mz2), Math.log(Math.max(highest, 1.01 * mz2)), 5, loops);
  const down = integrate(atMz, Math.log(mz2), Math.log(b2), 5, loops);
  const four = integrate(down.values.at(-1)!, Math.log(b2), Math.log(c2), 4, loops);
  const three = integrate(four.values.at(-1)!, Math.log(c2), Math.log(Math.min(lowest, 0.99 * c2)), 3, loops);
  const alpha = (mu2: number): number => {
    const x = Math.log(mu2);
    return lookUp(mu2 >= mz2 ? up : mu2 >= b2 ? down : mu2 >= c2 ? four : three, x);
  };
  return { alpha, kinks: [c2, b2] };
}

/** The coupling of a setting, for the shower: fixed, or tabulated down to `lowest` [GeV^2]. */
export function couplingFor(setting: CouplingKind, lowest: number, highest: number): Coupling {
  if (setting.kind === 'fixed') return { alpha: () => setting.value, kinks: [] };
  return integratedCoupling(setting.kind === 'one-loop' ? 1 : 2, lowest, highest);
}

import { type End, exponent, halfRapidity, highestT, lowestT, overLnT, rate } from './exponent.ts';

const GRID = 400;

/** The first step of q qbar (two equal ends) by quadrature. */
export interface FirstStep {
  /** Probability that nothing branches at all. */
  readonly noBranching: number;
  /** Probability of no branching above t. */
  gap(t: number): number;
  /** P(first t > t, given that there is a step): uniform on (0, 1) over first steps. */
  survival(t: number): number;
  /** P(first z < z, given that there is a step). */
  fractionBelow(z: number): number;
}

/**
 * Distribution of the first step of a pair of equal ends.
 *
 * The exponent is tabulated in ln t at 400 points, to the kinks of the coupling exactly, and continued between them by
 * its own derivative, the rate (cubic in ln t; error below 1e-6).
 */
export function firstStep(end: End): FirstStep {
  const [lnLow, lnHigh] = [Math.log(lowestT(end)), Math.log(highestT(end))];
  const h = (lnHigh - lnLow) / GRID;
  const sums = new Float64Array(GRID + 1);
  const rates = new Float64Array(GRID + 1);
  for (let n = GRID; n >= 0; n--) {
    const t = Math.exp(lnLow + n * h);
    rates[n] = 2 * rate(end, t);
    if (n < GRID) sums[n] = sums[n + 1] + 2 * exponent(end, t, Math.exp(lnLow + (n + 1) * h));
  }
  const expected = (t: number): number => {
    const x = (Math.log(t) - lnLow) / h;
    const n = Math.min(GRID - 1, Math.max(0, Math.floor(x)));
    const s = x - n;
    const [p, q, u, v] = [sums[n], sums[n + 1], -rates[n] * h, -rates[n + 1] * h];
    return p + s * (u + s * (3 * (q - p) - 2 * u - v + s * (2 * (p - q) + u + v)));
  };
  const noBranching = Math.exp(-sums[0]);
  const gap = (t: number): number => Math.exp(-expected(t));
  return {
    noBranching,
    gap,
    survival: (t) => (gap(t) - noBranching) / (1 - noBranching),
    fractionBelow: (z) => {
      const edge = halfRapidity(z);
      const weighted = (t: number): number => gap(t) * 2 * rate(end, t, -Infinity, edge);
      return overLnT(end, lowestT(end), highestT(end), weighted) / (1 - noBranching);
    },
  };
}

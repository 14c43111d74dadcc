/** A root was asked for where none is bracketed, or it was not reached. */
export class RootError extends Error {
  override readonly name = 'RootError';
  readonly found: string;
  readonly expected: string;
  constructor(found: string, expected: string) {
    super(`root: found ${found}, expected ${expected}`);
    this.found = found;
    this.expected = expected;
  }
}

/** How close `findRoot` goes. */
export interface RootOptions {
  /** Allowed distance from the root, in the unit of x. Default 0: as close as doubles go. */
  tolerance?: number;
  /** Most evaluations of f, default 200. */
  limit?: number;
}

/**
 * A zero of f between a and b, where f has opposite signs at the two ends.
 *
 * @returns x within the tolerance, plus 4 ulp, of a sign change.
 * Throws RootError for equal signs, for a value that is NaN, and past the limit.
 * Source: Brent, Algorithms for Minimization without Derivatives (1973), chapter 4.
 */
export function findRoot(
  f: (x: number) => number,
  a: number,
  b: number,
  { tolerance = 0, limit = 200 }: RootOptions = {},
): number {
  let previous = a;
  let best = b;
  let fPrevious = f(previous);
  let fBest = f(best);
  if (fPrevious === 0) return previous;
  if (fBest === 0) return best;
  if (!(fPrevious < 0 !== fBest < 0) || Number.isNaN(fPrevious) || Number.isNaN(fBest)) {
    throw new RootError(`f(${a}) = ${fPrevious}, f(${b}) = ${fBest}`, 'values of opposite sign');
  }
  // `other` always has the sign opposite to `best`.
  let other = previous;
  let fOther = fPrevious;
  let step = best - previous;
  let stepBefore = step;
  for (let calls = 2; ; calls++) {
    if (fBest > 0 === fOther > 0) {
      other = previous;
      fOther = fPrevious;
      step = best - previous;
      stepBefore = step;
    }
    if (Math.abs(fOther) < Math.abs(fBest)) {
      previous = best;
      best = other;
      other = previous;
      fPrevious = fBest;
      fBest = fOther;
      fOther = fPrevious;
    }
    const near = 2 * 2.220446049250313e-16 * Math.abs(best) + 0.5 * tolerance;
    const half = 0.5 * (other - best);
    if (Math.abs(half) <= near || fBest === 0) return best;
    if (calls >= limit) throw new RootError(`no root after ${calls} evaluations, at ${best}`, 'convergence');
    if (Math.abs(stepBefore) < near || Math.abs(fPrevious) <= Math.abs(fBest)) {
      step = half;
      stepBefore = half;
    } else {
      const trial = interpolatedStep(previous, best, other, fPrevious, fBest, fOther);
      if (
        Math.abs(trial) < Math.min(1.5 * Math.abs(half) - 0.5 * near, 0.5 * Math.abs(stepBefore)) &&
        trial * half > 0
      ) {
        stepBefore = step;
        step = trial;
      } else {
        step = half;
        stepBefore = half;
      }
    }
    previous = best;
    fPrevious = fBest;
    best += Math.abs(step) > near ? step : half > 0 ? near : -near;
    fBest = f(best);
    if (Number.isNaN(fBest)) throw new RootError(`f(${best}) = NaN`, 'a number');
  }
}

/** From `best` to where the secant, or with three different points the inverse parabola, crosses zero. */
function interpolatedStep(
  previous: number,
  best: number,
  other: number,
  fPrevious: number,
  fBest: number,
  fOther: number,
): number {
  const s = fBest / fPrevious;
  if (previous === other) return -((other - best) * s) / (1 - s);
  const q = fPrevious / fOther;
  const r = fBest / fOther;
  const p = s * ((other - best) * q * (q - r) - (best - previous) * (r - 1));
  return -p / ((q - 1) * (r - 1) * (s - 1));
}

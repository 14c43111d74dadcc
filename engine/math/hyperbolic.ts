import { POWERS_OF_TWO, ZEROTH_POWER } from './bits.ts';
import { divide } from './exact.ts';
import { EXP_PARTS, expParts } from './exp.ts';

/** Rests of the sums that halfSum and halfDifference return; scratch. */
const REST = new Float64Array(2);

/** (exp x - exp -x)/2 and, in REST[0], what its rounding left; 0.1 < x < 30. */
function halfDifference(x: number): number {
  const rise = POWERS_OF_TWO[ZEROTH_POWER - 1 + expParts(x, 0)];
  const up = EXP_PARTS[0] * rise;
  const upRest = EXP_PARTS[1] * rise;
  const fall = POWERS_OF_TWO[ZEROTH_POWER - 1 + expParts(-x, 0)];
  const down = EXP_PARTS[0] * fall;
  const first = up - down;
  const rest = up - first - down + (upRest - EXP_PARTS[1] * fall);
  const sum = first + rest;
  REST[0] = first - sum + rest;
  return sum;
}

/** (exp x + exp -x)/2 and, in REST[1], what its rounding left; 0 <= x < 30. */
function halfSum(x: number): number {
  const rise = POWERS_OF_TWO[ZEROTH_POWER - 1 + expParts(x, 0)];
  const up = EXP_PARTS[0] * rise;
  const upRest = EXP_PARTS[1] * rise;
  const fall = POWERS_OF_TWO[ZEROTH_POWER - 1 + expParts(-x, 0)];
  const down = EXP_PARTS[0] * fall;
  const first = up + down;
  const rest = up - first + down + (upRest + EXP_PARTS[1] * fall);
  const sum = first + rest;
  REST[1] = first - sum + rest;
  return sum;
}

/** exp(x)/2, where exp(-x) is lost beside it; 30 <= x. */
function halfExp(x: number): number {
  if (!(x < 711)) return Infinity;
  const scale = expParts(x, 0) - 1;
  const value = EXP_PARTS[0] + EXP_PARTS[1];
  return scale > 1023 ? Infinity : value * POWERS_OF_TWO[ZEROTH_POWER + scale];
}

/** sinh x - x for |x| <= 0.1. */
function sinhExcess(x: number): number {
  const x2 = x * x;
  return x * x2 * (1 / 6 + x2 * (1 / 120 + x2 * (1 / 5040 + x2 * (1 / 362880 + x2 * (1 / 39916800)))));
}

/**
 * Hyperbolic sine.
 *
 * Accuracy: 0.65 ulp.
 */
export function sinh(x: number): number {
  const size = Math.abs(x);
  if (size < 0.1) return size < 7e-9 ? x : x + sinhExcess(x);
  if (Number.isNaN(x)) return x;
  const value = size < 30 ? halfDifference(size) : halfExp(size);
  return x < 0 ? -value : value;
}

/**
 * Hyperbolic cosine.
 *
 * Accuracy: 0.55 ulp.
 */
export function cosh(x: number): number {
  if (Number.isNaN(x)) return x;
  const size = Math.abs(x);
  return size < 30 ? halfSum(size) : halfExp(size);
}

/**
 * Hyperbolic tangent.
 *
 * Accuracy: 0.7 ulp.
 */
export function tanh(x: number): number {
  const size = Math.abs(x);
  if (size < 7e-9) return x;
  if (Number.isNaN(x)) return x;
  if (size > 30) return x < 0 ? -1 : 1;
  const cosine = halfSum(size);
  let value: number;
  if (size < 0.1) value = divide(size, sinhExcess(size), cosine, REST[1]);
  else {
    const sine = halfDifference(size);
    value = divide(sine, REST[0], cosine, REST[1]);
  }
  return x < 0 ? -value : value;
}

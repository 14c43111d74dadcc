import { POWERS_OF_TWO, ROUNDER, ZEROTH_POWER } from './bits.ts';
import { EXP_TABLE } from './exp-table.ts';

// x = n ln 2/128 + r, |r| <= ln 2/256, exp x = 2^floor(n/128) 2^((n mod 128)/128) exp r. The step's high part has
// 34 bits, so that its multiples are exact. Method: Tang, ACM Trans. Math. Softw. 15 (1989) 144.
const STEP_HIGH = 0.005415212347998022;
const STEP_LOW = 1.2655086083325438e-13;
const STEPS_PER_UNIT = 184.6649652337873;

/**
 * Exponential function.
 *
 * @returns Infinity above 709.7827, 0 below -745.1332.
 * Accuracy: 0.52 ulp; 0.76 ulp of a subnormal result.
 */
export function exp(x: number): number {
  if (!(x > -708 && x < 709)) return expOfEdge(x);
  const n = x * STEPS_PER_UNIT + ROUNDER - ROUNDER;
  const r = x - n * STEP_HIGH - n * STEP_LOW;
  const r2 = r * r;
  const whole = n | 0;
  const row = 2 * (whole & 127);
  const power = EXP_TABLE[row];
  const series = r + r2 * (1 / 2 + r * (1 / 6) + r2 * (1 / 24 + r * (1 / 120)));
  return (power + power * (EXP_TABLE[row + 1] + series)) * POWERS_OF_TWO[ZEROTH_POWER + (whole >> 7)];
}

function expOfEdge(x: number): number {
  if (Number.isNaN(x)) return x;
  if (x < -746) return 0;
  if (x > 710) return Infinity;
  return expOfSum(x, 0);
}

/**
 * exp(x + low), for results at the edges of the range too.
 *
 * @param x Between -800 and 800.
 * @param low At most 2^-40.
 * Accuracy: 0.52 ulp for low = 0 or exact.
 */
export function expOfSum(x: number, low: number): number {
  const scale = expParts(x, low);
  const value = EXP_PARTS[0] + EXP_PARTS[1];
  // The scale in two steps: either alone may be out of range, and only the second one rounds.
  const half = scale >> 1;
  return value * POWERS_OF_TWO[ZEROTH_POWER + half] * POWERS_OF_TWO[ZEROTH_POWER + scale - half];
}

/** The two pieces that expParts leaves; scratch. */
export const EXP_PARTS = new Float64Array(2);

/**
 * exp(x + low) as 2^scale (EXP_PARTS[0] + EXP_PARTS[1]), the first in [1, 2), the second at most 0.006.
 *
 * @returns scale.
 */
export function expParts(x: number, low: number): number {
  const n = x * STEPS_PER_UNIT + ROUNDER - ROUNDER;
  const r = x - n * STEP_HIGH - n * STEP_LOW + low;
  const r2 = r * r;
  const whole = n | 0;
  const row = 2 * (whole & 127);
  const power = EXP_TABLE[row];
  const series = r + r2 * (1 / 2 + r * (1 / 6) + r2 * (1 / 24 + r * (1 / 120)));
  EXP_PARTS[0] = power;
  EXP_PARTS[1] = power * (EXP_TABLE[row + 1] + series);
  return whole >> 7;
}

/**
 * exp(x) - 1, keeping its digits where x is small.
 *
 * Accuracy: 0.7 ulp.
 */
export function expm1(x: number): number {
  if (x > -0.03125 && x < 0.03125) {
    if (x > -1.1102230246251565e-16 && x < 1.1102230246251565e-16) return x;
    const x2 = x * x;
    return (
      x +
      x2 *
        (1 / 2 +
          x * (1 / 6) +
          x2 *
            (1 / 24 + x * (1 / 120) + x2 * (1 / 720 + x * (1 / 5040) + x2 * (1 / 40320 + x * (1 / 362880)))))
    );
  }
  if (!(x > -40 && x < 700)) return x < 0 ? -1 : exp(x);
  const scale = POWERS_OF_TWO[ZEROTH_POWER + expParts(x, 0)];
  const high = EXP_PARTS[0] * scale;
  const sum = high - 1;
  const rest = high > 1 ? high - sum - 1 : high - (sum + 1);
  return sum + (rest + EXP_PARTS[1] * scale);
}

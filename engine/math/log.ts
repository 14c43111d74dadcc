import { DOUBLE, HIGH_WORD, POWERS_OF_TWO, ZEROTH_POWER } from './bits.ts';
import { productError } from './exact.ts';
import { LOG_TABLE } from './log-table.ts';

// x = 2^k z with z in [11/16, 11/8). The top bits of z select c near 1/z, a multiple of 1/256, so that
// r = z c - 1 is exact when z is first split; |r| <= 2^-7 and ln x = k ln 2 - ln c + ln(1 + r).
// k ln 2 - ln c is exact to a multiple of 2^-42. Method: Tang, ACM Trans. Math. Softw. 16 (1990) 378.
const LN2_HIGH = 0.6931471805598903;
const LN2_LOW = 5.497923018708371e-14;
/** High word of 11/16. */
const ORIGIN = 0x3fe60000;

/** (ln(1 + r) - r) / r^2 for |r| <= 2^-7, to 2^-56 of r. */
function logSeries(r: number, r2: number): number {
  return -1 / 2 + r * (1 / 3) + r2 * (-1 / 4 + r * (1 / 5) + r2 * (-1 / 6 + r * (1 / 7) - r2 * (1 / 8)));
}

/**
 * Natural logarithm.
 *
 * @returns NaN below zero, -Infinity at either zero.
 * Accuracy: 0.52 ulp.
 */
export function log(x: number): number {
  DOUBLE[0] = x;
  const high = HIGH_WORD[1];
  // One comparison finds zero, subnormal, negative, infinite and NaN.
  if ((high - 0x00100000) >>> 0 >= 0x7fe00000) return logOfSpecial(x);
  const offset = high - ORIGIN;
  const k = offset >> 20;
  const row = 3 * ((offset >> 13) & 127);
  const z = x * POWERS_OF_TWO[ZEROTH_POWER - k];
  const c = LOG_TABLE[row];
  const zHigh = Math.fround(z);
  const r = zHigh * c - 1 + (z - zHigh) * c;
  const whole = k * LN2_HIGH + LOG_TABLE[row + 1];
  const sum = whole + r;
  const rest = whole - sum + r + (k * LN2_LOW + LOG_TABLE[row + 2]);
  const r2 = r * r;
  return sum + (rest + r2 * logSeries(r, r2));
}

function logOfSpecial(x: number): number {
  if (x === 0) return -Infinity;
  if (!(x > 0)) return NaN;
  if (x === Infinity) return x;
  return logParts(x, 0);
}

/** What logParts leaves below its result; scratch. */
export const LOG_REST = new Float64Array(1);

/**
 * ln(x + low) as an unevaluated sum: the rounded value is returned, the rest left in LOG_REST.
 *
 * @param x Positive, finite; may be subnormal.
 * @param low At most an ulp of x.
 * Accuracy: 2^-66 relative.
 */
export function logParts(x: number, low: number): number {
  let shift = 0;
  if (x < 2.2250738585072014e-308) {
    x *= 18014398509481984;
    low *= 18014398509481984;
    shift = 54;
  }
  DOUBLE[0] = x;
  const offset = HIGH_WORD[1] - ORIGIN;
  const exponent = offset >> 20;
  const k = exponent - shift;
  const row = 3 * ((offset >> 13) & 127);
  const scale = POWERS_OF_TWO[ZEROTH_POWER - exponent];
  const z = x * scale;
  const c = LOG_TABLE[row];
  const zHigh = Math.fround(z);
  const r = zHigh * c - 1 + (z - zHigh) * c;
  const rLow = low * scale * c;
  const whole = k * LN2_HIGH + LOG_TABLE[row + 1];
  const first = whole + r;
  const firstRest = whole - first + r;
  // -r^2/2 in two pieces: 24 bits squared are exact.
  const rHigh = Math.fround(r);
  const square = -0.5 * rHigh * rHigh;
  const squareRest = -0.5 * (r - rHigh) * (r + rHigh);
  const second = first + square;
  const secondRest = first - second + square;
  const r2 = r * r;
  const tail =
    r * r2 * (1 / 3 - r * (1 / 4) + r2 * (1 / 5 - r * (1 / 6) + r2 * (1 / 7 - r * (1 / 8) + r2 * (1 / 9))));
  const small = k * LN2_LOW + LOG_TABLE[row + 2] + rLow / (1 + r);
  const rest = firstRest + secondRest + squareRest + tail + small;
  const sum = second + rest;
  LOG_REST[0] = second - sum + rest;
  return sum;
}

/**
 * ln(1 + x), keeping its digits where x is small.
 *
 * @returns NaN below -1, -Infinity at -1.
 * Accuracy: 0.53 ulp.
 */
export function log1p(x: number): number {
  if (x > -0.00390625 && x < 0.0078125) {
    if (x > -5.421010862427522e-20 && x < 5.421010862427522e-20) return x;
    const x2 = x * x;
    return x + x2 * logSeries(x, x2);
  }
  if (!(x > -1 && x < Infinity)) return x === -1 ? -Infinity : x === Infinity ? x : NaN;
  const sum = 1 + x;
  const low = x < 1 ? 1 - sum + x : x - sum + 1;
  return logParts(sum, low);
}

/**
 * Inverse hyperbolic tangent.
 *
 * @returns NaN outside [-1, 1], an infinity at either end.
 * Accuracy: 0.6 ulp.
 */
export function atanh(x: number): number {
  const size = Math.abs(x);
  if (size < 0.03125) {
    if (size < 7.450580596923828e-9) return x;
    const x2 = x * x;
    return x + x * x2 * (1 / 3 + x2 * (1 / 5 + x2 * (1 / 7 + x2 * (1 / 9 + x2 * (1 / 11 + x2 * (1 / 13))))));
  }
  if (!(size < 1)) return size === 1 ? x * Infinity : NaN;
  // ln((1 + x)/(1 - x))/2 with both sums and the quotient kept in two pieces.
  const above = 1 + size;
  const aboveLow = 1 - above + size;
  const below = 1 - size;
  const belowLow = 1 - below - size;
  const ratio = above / below;
  const back = ratio * below;
  const ratioLow = (above - back - productError(ratio, below, back) + aboveLow - ratio * belowLow) / below;
  const value = 0.5 * logParts(ratio, ratioLow);
  return x < 0 ? -value : value;
}

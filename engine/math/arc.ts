import { ARC_TABLE } from './arc-table.ts';
import { DOUBLE, HIGH_WORD, POWERS_OF_TWO, ZEROTH_POWER } from './bits.ts';
import { productError } from './exact.ts';

const PI = 3.141592653589793;
const PI_REST = 1.2246467991473532e-16;
const HALF_PI = 1.5707963267948966;
const HALF_PI_REST = 6.123233995736766e-17;

/**
 * base + turn * atan((a + aLow)/(b + bLow)).
 *
 * @param a, b With 0 <= a <= b, both between 2^-100 and 2^100; low parts at most an ulp of them.
 * @param base, baseRest 0, pi/2 or pi and the remainder of its rounding.
 * @param turn 1 or -1.
 *
 * Above a/b = 1/16: atan(a/b) = atan c + atan t, c the nearest multiple of 1/64, t = (a - c b)/(b + c a), the
 * numerator exact but for one rounding because b is split. Below, t = a/b with its remainder.
 */
function arc(
  a: number,
  aLow: number,
  b: number,
  bLow: number,
  base: number,
  baseRest: number,
  turn: number,
): number {
  const ratio = a / b;
  if (ratio < 0.0625) {
    const back = ratio * b;
    const low = (a - back - productError(ratio, b, back) + aLow - ratio * bLow) / b;
    const t2 = ratio * ratio;
    const series =
      ratio *
      t2 *
      (-1 / 3 + t2 * (1 / 5 + t2 * (-1 / 7 + t2 * (1 / 9 + t2 * (-1 / 11 + t2 * (1 / 13 - t2 * (1 / 15)))))));
    const step = turn * ratio;
    const sum = base + step;
    return sum + (base - sum + step + (baseRest + turn * (low + series)));
  }
  const k = (ratio * 64 + 0.5) | 0;
  const c = k * 0.015625;
  const bHigh = Math.fround(b);
  const t = (a - c * bHigh - c * (b - bHigh) + (aLow - c * bLow)) / (b + c * a);
  const t2 = t * t;
  const series = t * t2 * (-1 / 3 + t2 * (1 / 5 - t2 * (1 / 7)));
  const corner = turn * ARC_TABLE[2 * k];
  const first = base + corner;
  const firstRest = base - first + corner;
  const step = turn * t;
  const sum = first + step;
  return sum + (first - sum + step + (firstRest + baseRest + turn * (ARC_TABLE[2 * k + 1] + series)));
}

/**
 * Angle of the point (x, y), in [-pi, pi]; zeros and infinities as the language's own function has them.
 *
 * Accuracy: 0.65 ulp.
 */
export function atan2(y: number, x: number): number {
  let a = Math.abs(y);
  let b = Math.abs(x);
  if (!(a > 0 && a < Infinity && b > 0 && b < Infinity)) return angleOfSpecial(y, x);
  const steep = a > b;
  if (steep) {
    const swap = a;
    a = b;
    b = swap;
  }
  if (!(a > 7.888609052210118e-31 && b < 1.2676506002282294e30)) {
    if (a < b * 8.673617379884035e-19) {
      const value = steep ? HALF_PI : x > 0 ? Math.abs(y) / b : PI;
      return y < 0 ? -value : value;
    }
    // Bring b near 1. A subnormal b is raised first so that its exponent can be read.
    if (b < 1e-300) {
      a *= 1.3407807929942597e154;
      b *= 1.3407807929942597e154;
    }
    DOUBLE[0] = b;
    const scale = POWERS_OF_TWO[ZEROTH_POWER + 1023 - (HIGH_WORD[1] >> 20)];
    a *= scale;
    b *= scale;
  }
  const value = steep
    ? arc(a, 0, b, 0, HALF_PI, HALF_PI_REST, x > 0 ? -1 : 1)
    : x > 0
      ? arc(a, 0, b, 0, 0, 0, 1)
      : arc(a, 0, b, 0, PI, PI_REST, -1);
  return y < 0 ? -value : value;
}

function angleOfSpecial(y: number, x: number): number {
  if (Number.isNaN(x) || Number.isNaN(y)) return NaN;
  const behind = x < 0 || (x === 0 && 1 / x < 0);
  const below = y < 0 || (y === 0 && 1 / y < 0);
  const a = Math.abs(y);
  const b = Math.abs(x);
  let value: number;
  if (a === Infinity && b === Infinity) value = behind ? 2.356194490192345 : 0.7853981633974483;
  else if (a === 0 || b === Infinity) value = behind ? PI : 0;
  else value = HALF_PI;
  return below ? -value : value;
}

/**
 * Arc tangent, in [-pi/2, pi/2].
 *
 * Accuracy: 0.65 ulp.
 */
export function atan(x: number): number {
  const size = Math.abs(x);
  if (size < 7e-9) return x;
  if (!(size < 1e20)) return Number.isNaN(x) ? x : x < 0 ? -HALF_PI : HALF_PI;
  const value = size > 1 ? arc(1, 0, size, 0, HALF_PI, HALF_PI_REST, -1) : arc(size, 0, 1, 0, 0, 0, 1);
  return x < 0 ? -value : value;
}

/** sqrt(1 - x^2) and, in ROOT_REST, what its rounding left; |x| < 1. */
function complement(x: number): number {
  const square = x * x;
  const first = 1 - square;
  const rest = 1 - first - square - productError(x, x, square);
  const sum = first + rest;
  const root = Math.sqrt(sum);
  const back = root * root;
  ROOT_REST[0] = (sum - back - productError(root, root, back) + (first - sum + rest)) / (2 * root);
  return root;
}

const ROOT_REST = new Float64Array(1);

/**
 * Arc sine, in [-pi/2, pi/2]; NaN outside [-1, 1].
 *
 * Accuracy: 0.65 ulp.
 */
export function asin(x: number): number {
  const size = Math.abs(x);
  if (!(size < 1)) return size === 1 ? x * HALF_PI : NaN;
  if (size < 7e-9) return x;
  const root = complement(size);
  const value =
    size > root
      ? arc(root, ROOT_REST[0], size, 0, HALF_PI, HALF_PI_REST, -1)
      : arc(size, 0, root, ROOT_REST[0], 0, 0, 1);
  return x < 0 ? -value : value;
}

/**
 * Arc cosine, in [0, pi]; NaN outside [-1, 1].
 *
 * Accuracy: 0.65 ulp.
 */
export function acos(x: number): number {
  const size = Math.abs(x);
  if (!(size < 1)) return x === 1 ? 0 : x === -1 ? PI : NaN;
  if (size < 1e-20) return HALF_PI;
  const root = complement(size);
  const rest = ROOT_REST[0];
  if (size < root) return arc(size, 0, root, rest, HALF_PI, HALF_PI_REST, x < 0 ? 1 : -1);
  return x < 0 ? arc(root, rest, size, 0, PI, PI_REST, -1) : arc(root, rest, size, 0, 0, 0, 1);
}

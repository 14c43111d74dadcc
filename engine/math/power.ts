import { productError } from './exact.ts';
import { expOfSum } from './exp.ts';
import { LOG_REST, logParts } from './log.ts';

/**
 * x to the power y, with every special value of the language's own power: 1 at y = 0 even for NaN, NaN for
 * |x| = 1 and y infinite, NaN for x < 0 unless y is whole.
 *
 * Accuracy: 0.6 ulp; 0.8 ulp of a subnormal result.
 */
export function pow(x: number, y: number): number {
  if (y === 0) return 1;
  if (y === 1) return x;
  const size = Math.abs(x);
  if (!(size > 0 && size < Infinity && Math.abs(y) < Infinity)) return powOfSpecial(x, y);
  let sign = 1;
  if (x < 0) {
    if (!isWhole(y)) return NaN;
    if (isOdd(y)) sign = -1;
  }
  if (size === 1) return sign;
  const logHigh = logParts(size, 0);
  const product = y * logHigh;
  if (product > 710) return sign * Infinity;
  if (product < -746) return sign * 0;
  // exp(product) is 1 to all digits, and the split below would underflow.
  if (Math.abs(product) < 1e-20) return sign;
  const low = productError(y, logHigh, product) + y * LOG_REST[0];
  return sign * expOfSum(product, low);
}

function powOfSpecial(x: number, y: number): number {
  const size = Math.abs(x);
  if (Number.isNaN(x) || Number.isNaN(y)) return NaN;
  if (Math.abs(y) === Infinity) {
    if (size === 1) return NaN;
    return size > 1 === y > 0 ? Infinity : 0;
  }
  const value = (size === 0) === y > 0 ? 0 : Infinity;
  const negative = x < 0 || (x === 0 && 1 / x < 0);
  return negative && isWhole(y) && isOdd(y) ? -value : value;
}

const isWhole = (y: number): boolean => Math.floor(y) === y;

function isOdd(y: number): boolean {
  const half = y / 2;
  return Math.floor(half) !== half;
}

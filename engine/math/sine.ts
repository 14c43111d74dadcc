import { REDUCED, reduceAngle } from './circle.ts';
import { divide } from './exact.ts';
import { SINE_TABLE } from './sine-table.ts';

// With a = n pi/64 from the table: sin(a + r) = S + C r + S (cos r - 1) + C (sin r - r), and alike for the cosine.
// S and C have 24 bits and a remainder, r is split at 24 bits: the leading product C r is exact.

/** (sin r - r) / r^3 for |r| <= pi/128. */
const sineSeries = (r2: number): number => -1 / 6 + r2 * (1 / 120 - r2 * (1 / 5040));
/** (cos r - 1) / r^2 for |r| <= pi/128. */
const cosineSeries = (r2: number): number => -1 / 2 + r2 * (1 / 24 - r2 * (1 / 720));

/**
 * Sine and cosine of one angle, for little more than the price of one of them.
 *
 * @param out Float64Array(2 or more): out[0] = sin x, out[1] = cos x.
 * @param x Any angle [rad]; NaN and the infinities give NaN.
 * Accuracy: 0.55 ulp for every finite x.
 */
export function sinCos(out: Float64Array, x: number): void {
  if (!(x > -Infinity && x < Infinity)) {
    out[0] = NaN;
    out[1] = NaN;
    return;
  }
  if (x > -7e-9 && x < 7e-9) {
    out[0] = x;
    out[1] = 1;
    return;
  }
  const row = 4 * (reduceAngle(x) & 127);
  const r = REDUCED[0];
  const sine = SINE_TABLE[row];
  const sineRest = SINE_TABLE[row + 1];
  const cosine = SINE_TABLE[row + 2];
  const cosineRest = SINE_TABLE[row + 3];
  const r2 = r * r;
  const rHigh = Math.fround(r);
  const rLow = r - rHigh + REDUCED[1];
  const sinRest = r * r2 * sineSeries(r2);
  const cosRest = r2 * cosineSeries(r2);
  const cosineStep = cosine * rHigh;
  const sineSum = sine + cosineStep;
  const sineStep = -sine * rHigh;
  const cosineSum = cosine + sineStep;
  const sineFull = sine + sineRest;
  const cosineFull = cosine + cosineRest;
  out[0] =
    sineSum +
    (sine -
      sineSum +
      cosineStep +
      (sineRest + cosine * rLow + cosineRest * r + (sineFull * cosRest + cosineFull * sinRest)));
  out[1] =
    cosineSum +
    (cosine -
      cosineSum +
      sineStep +
      (cosineRest - sine * rLow - sineRest * r + (cosineFull * cosRest - sineFull * sinRest)));
}

/** What sineParts leaves below its result; scratch. */
const PART_REST = new Float64Array(1);

/** Sine of step n (cosine of step n + 96 is the same thing) plus the remainder in REDUCED, rounded part and rest. */
function sineParts(n: number): number {
  const row = 4 * (n & 127);
  const r = REDUCED[0];
  const sine = SINE_TABLE[row];
  const sineRest = SINE_TABLE[row + 1];
  const cosine = SINE_TABLE[row + 2];
  const cosineRest = SINE_TABLE[row + 3];
  const r2 = r * r;
  const rHigh = Math.fround(r);
  const rLow = r - rHigh + REDUCED[1];
  const step = cosine * rHigh;
  const sum = sine + step;
  const curved =
    (sine + sineRest) * (r2 * cosineSeries(r2)) + (cosine + cosineRest) * (r * r2 * sineSeries(r2));
  const rest = sine - sum + step + (sineRest + cosine * rLow + cosineRest * r + curved);
  const value = sum + rest;
  PART_REST[0] = sum - value + rest;
  return value;
}

/**
 * Sine.
 *
 * @param x Any angle [rad]; NaN and the infinities give NaN.
 * Accuracy: 0.55 ulp for every finite x.
 */
export function sin(x: number): number {
  if (!(x > -Infinity && x < Infinity)) return NaN;
  if (x > -7e-9 && x < 7e-9) return x;
  return sineParts(reduceAngle(x));
}

/**
 * Cosine.
 *
 * @param x Any angle [rad]; NaN and the infinities give NaN.
 * Accuracy: 0.55 ulp for every finite x.
 */
export function cos(x: number): number {
  if (!(x > -Infinity && x < Infinity)) return NaN;
  if (x > -7e-9 && x < 7e-9) return 1;
  return sineParts(reduceAngle(x) + 32);
}

/**
 * Tangent.
 *
 * @param x Any angle [rad]; NaN and the infinities give NaN.
 * Accuracy: 0.6 ulp for every finite x.
 */
export function tan(x: number): number {
  if (!(x > -Infinity && x < Infinity)) return NaN;
  if (x > -7e-9 && x < 7e-9) return x;
  const n = reduceAngle(x);
  const sine = sineParts(n);
  const sineRest = PART_REST[0];
  const cosine = sineParts(n + 32);
  return divide(sine, sineRest, cosine, PART_REST[0]);
}

import { PI } from '../../engine/index.ts';
import { atan2, cos, sin } from '../../engine/math/index.ts';

/** Three numbers in a row of an array: x, y, z at an offset. */
export type Numbers = ArrayLike<number>;
/** The same, to be written to. */
export type MutableNumbers = Float64Array | Float32Array | number[];

/**
 * Direction of a momentum.
 *
 * @param out Unit vector, written at `at`.
 * @returns false, `out` untouched, for a momentum without direction (zero or not finite).
 */
export function unitVector(
  out: MutableNumbers,
  at: number,
  momentum: readonly [number, number, number],
): boolean {
  const [x, y, z] = momentum;
  // Scaled by the largest component, so that no square over- or underflows.
  const largest = Math.max(Math.abs(x), Math.abs(y), Math.abs(z));
  if (!(largest > 0 && largest < Infinity)) return false;
  const a = x / largest;
  const b = y / largest;
  const c = z / largest;
  const length = Math.sqrt(a * a + b * b + c * c);
  out[at] = a / length;
  out[at + 1] = b / length;
  out[at + 2] = c / length;
  return true;
}

/** Scalar product of two three-vectors at offsets `i` and `j`. */
export function dot(a: Numbers, i: number, b: Numbers, j: number): number {
  return a[i] * b[j] + a[i + 1] * b[j + 1] + a[i + 2] * b[j + 2];
}

/** Angle [rad] between two unit vectors, exact to rounding for close and for opposite ones (from the cross product). */
export function angleBetween(a: Numbers, i: number, b: Numbers, j: number): number {
  const x = a[i + 1] * b[j + 2] - a[i + 2] * b[j + 1];
  const y = a[i + 2] * b[j] - a[i] * b[j + 2];
  const z = a[i] * b[j + 1] - a[i + 1] * b[j];
  return atan2(Math.sqrt(x * x + y * y + z * z), dot(a, i, b, j));
}

/** Any unit vector at right angles to a unit vector, the same one each time; written to `out` at `at`. */
export function anyNormal(out: MutableNumbers, at: number, a: Numbers, i: number): void {
  const [x, y, z] = [a[i], a[i + 1], a[i + 2]];
  const ax = Math.abs(x);
  const ay = Math.abs(y);
  const az = Math.abs(z);
  if (ax <= ay && ax <= az) unitVector(out, at, [0, z, -y]);
  else if (ay <= az) unitVector(out, at, [-z, 0, x]);
  else unitVector(out, at, [y, -x, 0]);
}

/**
 * Tangent at `a` of the great circle from `a` towards `b`, both unit vectors; any one where they are opposite or equal.
 *
 * @param out Unit vector, written at `at`; then `a cos s + out sin s` runs from a (s = 0) to b (s = the returned angle).
 * @returns The angle between them [rad], 0 to pi.
 */
export function greatCircle(
  out: MutableNumbers,
  at: number,
  a: Numbers,
  i: number,
  b: Numbers,
  j: number,
): number {
  const along = dot(a, i, b, j);
  const x = b[j] - along * a[i];
  const y = b[j + 1] - along * a[i + 1];
  const z = b[j + 2] - along * a[i + 2];
  const length = Math.sqrt(x * x + y * y + z * z);
  // Towards the opposite point every way is as short; single precision could not tell them apart anyway.
  if (length < (along > 0 ? 1e-12 : 1e-5)) {
    anyNormal(out, at, a, i);
    return along > 0 ? 0 : PI;
  }
  out[at] = x / length;
  out[at + 1] = y / length;
  out[at + 2] = z / length;
  return angleBetween(a, i, b, j);
}

/** Point at angle `s` [rad] of the great circle through `a` with tangent `tangent` there, written to `out` at `at`. */
export function onCircle(
  out: MutableNumbers,
  at: number,
  a: Numbers,
  i: number,
  tangent: Numbers,
  j: number,
  s: number,
): void {
  const c = cos(s);
  const d = sin(s);
  out[at] = a[i] * c + tangent[j] * d;
  out[at + 1] = a[i + 1] * c + tangent[j + 1] * d;
  out[at + 2] = a[i + 2] * c + tangent[j + 2] * d;
}

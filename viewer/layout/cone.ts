import { type History, PI } from '../../engine/index.ts';
import { cos, sin } from '../../engine/math/index.ts';
import { angleBetween, anyNormal, type Numbers, onCircle, unitVector } from './directions.ts';
import type { Strands } from './strands.ts';

/** A circle of constant angle on a shell: about `axis`, opening angle `angle` [rad]. */
export interface Ring {
  readonly kind: 'opening' | 'partner' | 'birth';
  readonly axis: Float64Array;
  readonly angle: number;
}

/**
 * What a selected step shows on its own shell: its rings, the directions of *i*, *j*, *k* right after it (three numbers
 * each, null where the row is missing), and the emitter's direction before it.
 *
 * The opening ring lies about the harder daughter and passes through the softer, the partner ring about the emitter through
 * the partner before the step, the birth ring about the emitter.
 */
export interface Cone {
  readonly step: number;
  readonly radius: number;
  readonly emitter: Float64Array;
  readonly i: Float64Array | null;
  readonly j: Float64Array | null;
  readonly k: Float64Array | null;
  readonly partner: Float64Array | null;
  readonly rings: readonly Ring[];
}

/** Build the cone of a step. @param birthAngle as measured [rad]; a ring of pi or more, or NaN, is left out. */
export function coneOf(history: History, strands: Strands, step: number, birthAngle: number): Cone {
  const { steps, entries } = history;
  const emitter = Float64Array.from(strands.stepDirection.subarray(3 * step, 3 * step + 3));
  const i = directionOf(history, steps.i[step]);
  const j = directionOf(history, steps.j[step]);
  const recoiled = steps.partner[step] === steps.recoiler[step];
  const partner = directionOf(history, steps.partner[step]);
  const k = (recoiled ? directionOf(history, steps.recoilerAfter[step]) : null) ?? partner;
  const rings: Ring[] = [];
  if (i && j) {
    const harder = entries.e[steps.i[step]] >= entries.e[steps.j[step]] ? i : j;
    rings.push({ kind: 'opening', axis: harder, angle: angleBetween(i, 0, j, 0) });
  }
  if (partner) rings.push({ kind: 'partner', axis: emitter, angle: angleBetween(emitter, 0, partner, 0) });
  if (birthAngle < 0.99999 * PI) rings.push({ kind: 'birth', axis: emitter, angle: birthAngle });
  return { step, radius: strands.stepRadius[step], emitter, i, j, k, partner, rings };
}

function directionOf(history: History, row: number): Float64Array | null {
  const { length, px, py, pz } = history.entries;
  const out = new Float64Array(3);
  if (!(row >= 0 && row < length) || !unitVector(out, 0, [px[row], py[row], pz[row]])) return null;
  return out;
}

/**
 * Points of a ring as unit vectors, closed (the last equals the first).
 *
 * @returns Three numbers a point, `pieces + 1` points.
 */
export function ringPoints(axis: Numbers, angle: number, pieces: number): Float64Array {
  const a = new Float64Array(3);
  const b = new Float64Array(3);
  anyNormal(a, 0, axis, 0);
  b[0] = axis[1] * a[2] - axis[2] * a[1];
  b[1] = axis[2] * a[0] - axis[0] * a[2];
  b[2] = axis[0] * a[1] - axis[1] * a[0];
  const points = new Float64Array(3 * (pieces + 1));
  const radial = new Float64Array(3);
  for (let k = 0; k <= pieces; k++) {
    onCircle(radial, 0, a, 0, b, 0, k === pieces ? 0 : (2 * PI * k) / pieces);
    onCircle(points, 3 * k, axis, 0, radial, 0, angle);
  }
  return points;
}

/**
 * Where the silhouette of a cone touches its ring, seen along the eye: the two points of the ring whose tangent plane
 * contains the eye; null where the eye looks into the cone.
 *
 * @param eye Unit vector towards the eye, same frame as the axis.
 * @returns Two unit vectors, six numbers.
 */
export function coneSilhouette(axis: Numbers, angle: number, eye: Numbers): Float64Array | null {
  // The cone's normal at a unit vector p of the ring is axis − cos(angle) p; it is at right angles to the eye where
  // cos(angle) p.eye = axis.eye.
  const c = axis[0] * eye[0] + axis[1] * eye[1] + axis[2] * eye[2];
  const s2 = 1 - c * c;
  if (s2 < 1e-12) return null;
  const cosA = cos(angle);
  const sinA = sin(angle);
  if (Math.abs(cosA) < 1e-9) return null;
  // p = alpha axis + beta eye' + gamma n, eye' the part of the eye across the axis, n = axis x eye'.
  const across = Math.sqrt(s2);
  const beta = (c / cosA - c * cosA) / across;
  const gamma2 = sinA * sinA - beta * beta;
  if (!(gamma2 > 0)) return null;
  const gamma = Math.sqrt(gamma2);
  const e = [0, 1, 2].map((k) => (eye[k] - c * axis[k]) / across);
  const n = [
    axis[1] * e[2] - axis[2] * e[1],
    axis[2] * e[0] - axis[0] * e[2],
    axis[0] * e[1] - axis[1] * e[0],
  ];
  const out = new Float64Array(6);
  for (let k = 0; k < 3; k++) {
    out[k] = cosA * axis[k] + beta * e[k] + gamma * n[k];
    out[k + 3] = cosA * axis[k] + beta * e[k] - gamma * n[k];
  }
  return out;
}

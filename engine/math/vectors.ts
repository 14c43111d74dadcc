import { atan2 } from './arc.ts';

// Four-vectors are px, py, pz, E [GeV] in four consecutive places of a Float64Array, from the index `at` on.

/** Length of the three-momentum [GeV]. */
export function momentum(p: Float64Array, at = 0): number {
  const x = p[at];
  const y = p[at + 1];
  const z = p[at + 2];
  return Math.sqrt(x * x + y * y + z * z);
}

/**
 * E^2 - |p|^2 [GeV^2], negative for a spacelike vector.
 *
 * Accuracy: 3e-16 E^2, so nothing is left of a mass below 2e-8 E: keep small masses, do not take them from here.
 */
export function massSquared(p: Float64Array, at = 0): number {
  const size = momentum(p, at);
  return (p[at + 3] - size) * (p[at + 3] + size);
}

/** Invariant mass [GeV]; minus the root of -E^2 + |p|^2 for a spacelike vector. Accuracy: as massSquared. */
export function mass(p: Float64Array, at = 0): number {
  const square = massSquared(p, at);
  return square < 0 ? -Math.sqrt(-square) : Math.sqrt(square);
}

/** E1 E2 - p1.p2 [GeV^2] of any two vectors, as it stands: a collinear pair loses its digits. */
export function product(p: Float64Array, q: Float64Array, pAt = 0, qAt = 0): number {
  return p[pAt + 3] * q[qAt + 3] - p[pAt] * q[qAt] - p[pAt + 1] * q[qAt + 1] - p[pAt + 2] * q[qAt + 2];
}

/**
 * E1 E2 - p1.p2 [GeV^2] of two vectors on their mass shells, as many digits for a collinear pair as its momenta have.
 *
 * @param pMass, qMass [GeV]; the energies must belong to them. (Six arguments: an object here would cost more than
 * the arithmetic.)
 * Accuracy: 1e-15 relative at wide angles, 4e-16/angle at small ones, which is what rounded momenta can tell.
 *
 * With c the cosine and c > 0: E1 E2 - |p||q| = (m1^2 E2^2 + m2^2 |p|^2)/(E1 E2 + |p||q|) and
 * |p||q| (1 - c) = |p x q|^2/(|p||q| + p.q).
 */
export function dot(p: Float64Array, q: Float64Array, pMass = 0, qMass = 0, pAt = 0, qAt = 0): number {
  const px = p[pAt];
  const py = p[pAt + 1];
  const pz = p[pAt + 2];
  const qx = q[qAt];
  const qy = q[qAt + 1];
  const qz = q[qAt + 2];
  const energies = p[pAt + 3] * q[qAt + 3];
  const along = px * qx + py * qy + pz * qz;
  if (along <= 0) return energies - along;
  const cx = py * qz - pz * qy;
  const cy = pz * qx - px * qz;
  const cz = px * qy - py * qx;
  const pSquare = px * px + py * py + pz * pz;
  const lengths = Math.sqrt(pSquare * (qx * qx + qy * qy + qz * qz));
  const opening = (cx * cx + cy * cy + cz * cz) / (lengths + along);
  if (pMass === 0 && qMass === 0) return opening;
  const qEnergy = q[qAt + 3];
  return (pMass * pMass * qEnergy * qEnergy + qMass * qMass * pSquare) / (energies + lengths) + opening;
}

/**
 * Angle between two three-momenta [rad], in [0, pi]; 0 if either is zero.
 *
 * Accuracy: 4e-16 absolute, from the cross product, at small and at straight angles too.
 */
export function angleBetween(p: Float64Array, q: Float64Array, pAt = 0, qAt = 0): number {
  const px = p[pAt];
  const py = p[pAt + 1];
  const pz = p[pAt + 2];
  const qx = q[qAt];
  const qy = q[qAt + 1];
  const qz = q[qAt + 2];
  const cx = py * qz - pz * qy;
  const cy = pz * qx - px * qz;
  const cz = px * qy - py * qx;
  return atan2(Math.sqrt(cx * cx + cy * cy + cz * cz), px * qx + py * qy + pz * qz);
}

/**
 * A vector as seen from the rest frame of another, by the pure boost.
 *
 * @param out Receives the four numbers at `at`; may be `p`.
 * @param p Vector to transform, at `at`.
 * @param frame Float64Array(4): timelike, in the frame that p is given in.
 * @param frameMass [GeV], positive; the invariant mass of `frame`.
 * Accuracy: 4e-16 times the gamma factor, relative to the energy.
 */
export function boostToRest(
  out: Float64Array,
  p: Float64Array,
  frame: Float64Array,
  frameMass: number,
  at = 0,
): void {
  boost(out, p, frame, frameMass, -1, at);
}

/** The inverse of boostToRest: from the rest frame of `frame` to the frame that `frame` is given in. */
export function boostFromRest(
  out: Float64Array,
  p: Float64Array,
  frame: Float64Array,
  frameMass: number,
  at = 0,
): void {
  boost(out, p, frame, frameMass, 1, at);
}

function boost(
  out: Float64Array,
  p: Float64Array,
  frame: Float64Array,
  frameMass: number,
  way: number,
  at: number,
): void {
  const x = way * frame[0];
  const y = way * frame[1];
  const z = way * frame[2];
  const energy = p[at + 3];
  const along = x * p[at] + y * p[at + 1] + z * p[at + 2];
  const boosted = (frame[3] * energy + along) / frameMass;
  const factor = (energy + boosted) / (frame[3] + frameMass);
  out[at] = p[at] + factor * x;
  out[at + 1] = p[at + 1] + factor * y;
  out[at + 2] = p[at + 2] + factor * z;
  out[at + 3] = boosted;
}

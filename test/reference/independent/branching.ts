import { add, boost, cross, type Four, scale, space, type Three, unit } from './vectors.ts';

/** Momenta after a step: emitter, emission, partner. */
export interface Branching {
  readonly i: Four;
  readonly j: Four;
  readonly k: Four;
}

/**
 * The massless local map, built in the dipole's rest frame and boosted back.
 *
 * @param phi Azimuth about the emitter's axis there; its origin is arbitrary.
 * Source: Catani & Seymour, Nucl. Phys. B485 (1997) 291, section 5.1.
 */
export function branch(emitter: Four, partner: Four, y: number, z: number, phi: number): Branching {
  const total = add(emitter, partner);
  const a = boost(emitter, total, -1);
  const b = boost(partner, total, -1);
  const mass = a[3] + b[3];
  const axis = unit(space(a));
  const helper: Three = Math.abs(axis[0]) < 0.6 ? [1, 0, 0] : [0, 1, 0];
  const e1 = unit(cross(axis, helper));
  const e2 = cross(axis, e1);
  const kT = Math.sqrt(z * (1 - z) * y) * mass;
  const c = kT * Math.cos(phi);
  const s = kT * Math.sin(phi);
  const k: Four = [c * e1[0] + s * e2[0], c * e1[1] + s * e2[1], c * e1[2] + s * e2[2], 0];
  const i = add(add(scale(z, a), scale((1 - z) * y, b)), k);
  const j = add(add(scale(1 - z, a), scale(z * y, b)), scale(-1, k));
  return { i: boost(i, total, 1), j: boost(j, total, 1), k: boost(scale(1 - y, b), total, 1) };
}

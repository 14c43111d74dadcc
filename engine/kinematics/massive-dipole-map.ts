import { sinCos } from '../math/index.ts';
import { transverseAxes } from './transverse-axes.ts';

// scratch, not reentrant: sine and cosine of the azimuth, two light-like momenta, two axes
const turn = new Float64Array(2);
const plane = new Float64Array(8);
const axes = new Float64Array(8);

/** lambda(a, b, c) = a^2 + b^2 + c^2 - 2ab - 2ac - 2bc, without its cancellation where a exceeds b and c. */
export function kallen(a: number, b: number, c: number): number {
  const rest = a - b - c;
  return rest * rest - 4 * b * c;
}

/**
 * 2 p.q of two momenta of given masses, keeping its digits when they are nearly parallel.
 *
 * @param p momenta px, py, pz, E [GeV], four to a parton. @param a, @param b offsets.
 * @param ma2, @param mb2 their squared masses [GeV^2].
 * @returns [GeV^2]
 */
export function twiceDotMassive(p: Float64Array, a: number, b: number, ma2: number, mb2: number): number {
  const ax = p[a];
  const ay = p[a + 1];
  const az = p[a + 2];
  const bx = p[b];
  const by = p[b + 1];
  const bz = p[b + 2];
  const dot = ax * bx + ay * by + az * bz;
  const ee = p[a + 3] * p[b + 3];
  if (dot <= 0) return 2 * (ee - dot);
  const cx = ay * bz - az * by;
  const cy = az * bx - ax * bz;
  const cz = ax * by - ay * bx;
  const a2 = ax * ax + ay * ay + az * az;
  const b2 = bx * bx + by * by + bz * bz;
  // E1^2 E2^2 - (p.q)^2 = m1^2 E2^2 + m2^2 |p1|^2 + |p x q|^2
  const top = ma2 * (b2 + mb2) + mb2 * a2 + cx * cx + cy * cy + cz * cz;
  return (2 * top) / (ee + dot);
}

/** What a massive branching is made from; see mapMassiveDipole. */
export interface MassiveBranching {
  /** Squared masses [GeV^2] of emitter and partner before, of i and j after. */
  mij2: number;
  mk2: number;
  mi2: number;
  mj2: number;
  /** 2 pt_ij.pt_k and (pi + pj)^2 [GeV^2]. */
  q2: number;
  sij: number;
  z: number;
  azimuth: number;
  /** Written by the map: transverse momentum of j to the plane of pt_ij and pt_k [GeV]. */
  kT: number;
}

/**
 * Momenta after a massive final-final dipole branches.
 *
 * pk = sqrt(lambda(Q^2,s_ij,m_k^2)/lambda(Q^2,m_ij^2,m_k^2)) (pt_k - (Q.pt_k/Q^2) Q) + (Q^2+m_k^2-s_ij)/(2Q^2) Q,
 * pi = a p + b pk + k with p = Q - pk; k is orthogonal to pt_ij and pt_k, its azimuth counted as in mapDipole from the
 * space axis whose part orthogonal to both is longest.
 *
 * @param out Float64Array(12): i, j, partner as px, py, pz, E [GeV].
 * @param p momenta, four to a parton. @param emitter, @param partner offsets.
 * @returns false, `out` untouched, where phase space forbids it.
 * Source: Catani, Dittmaier, Seymour, Trocsanyi, Nucl. Phys. B627 (2002) 189, section 5.
 */
export function mapMassiveDipole(
  out: Float64Array,
  p: Float64Array,
  emitter: number,
  partner: number,
  branching: MassiveBranching,
): boolean {
  const { mij2, mk2, mi2, mj2, q2, sij, z, azimuth } = branching;
  const px = p[emitter];
  const py = p[emitter + 1];
  const pz = p[emitter + 2];
  const qx = p[partner];
  const qy = p[partner + 1];
  const qz = p[partner + 2];
  const total2 = q2 + mij2 + mk2;
  const after = kallen(total2, sij, mk2);
  if (!(after > 0)) return false;
  const ratio = Math.sqrt(after / kallen(total2, mij2, mk2));
  // pk = u pt_ij + v pt_k, from the formula with Q = pt_ij + pt_k and Q.pt_k = (q2 + 2 mk2)/2
  const share = (q2 + 2 * mk2) / (2 * total2);
  const energyShare = (total2 + mk2 - sij) / (2 * total2);
  const u = energyShare - ratio * share;
  const v = ratio * (1 - share) + energyShare;

  const s = (total2 - sij - mk2) / 2;
  const half = (sij + mi2 - mj2) / 2;
  const d = s * s - sij * mk2;
  const a = (z * s * s - half * mk2) / d;
  const b = (s * (half - z * sij)) / d;
  // -k.k; without a partner mass in the form that keeps its digits
  const kT2 =
    mk2 === 0 ? z * (1 - z) * sij - (1 - z) * mi2 - z * mj2 : a * a * sij + b * b * mk2 + 2 * a * b * s - mi2;
  if (!(kT2 >= -1e-12 * total2)) return false;

  branching.kT = Math.sqrt(Math.max(kT2, 0));

  // light-like vectors of the plane: l = p - c q, m = q - d p
  const root = Math.sqrt(kallen(total2, mij2, mk2));
  const cl = (2 * mij2) / (q2 + root);
  const cm = (2 * mk2) / (q2 + root);
  for (let component = 0; component < 4; component++) {
    const ij = p[emitter + component];
    const k = p[partner + component];
    plane[component] = ij - cl * k;
    plane[4 + component] = k - cm * ij;
  }
  // 2 l.m
  const plane2 = q2 * (1 + cl * cm) - 2 * cl * mk2 - 2 * cm * mij2;
  transverseAxes(axes, plane, 0, 4, plane2);
  sinCos(turn, azimuth);
  const c = branching.kT * turn[1];
  const w = branching.kT * turn[0];
  const kx = c * axes[0] + w * axes[4];
  const ky = c * axes[1] + w * axes[5];
  const kz = c * axes[2] + w * axes[6];
  const partnerX = u * px + v * qx;
  const partnerY = u * py + v * qy;
  const partnerZ = u * pz + v * qz;
  // p = Q - pk = (1-u) pt_ij + (1-v) pt_k
  const virtualX = (1 - u) * px + (1 - v) * qx;
  const virtualY = (1 - u) * py + (1 - v) * qy;
  const virtualZ = (1 - u) * pz + (1 - v) * qz;
  place(
    out,
    0,
    a * virtualX + b * partnerX + kx,
    a * virtualY + b * partnerY + ky,
    a * virtualZ + b * partnerZ + kz,
    mi2,
  );
  const rest = 1 - a;
  place(
    out,
    4,
    rest * virtualX - b * partnerX - kx,
    rest * virtualY - b * partnerY - ky,
    rest * virtualZ - b * partnerZ - kz,
    mj2,
  );
  place(out, 8, partnerX, partnerY, partnerZ, mk2);
  return true;
}

/** A three-momentum with the energy of its mass shell. */
function place(out: Float64Array, at: number, x: number, y: number, z: number, m2: number): void {
  out[at] = x;
  out[at + 1] = y;
  out[at + 2] = z;
  out[at + 3] = Math.sqrt(x * x + y * y + z * z + m2);
}

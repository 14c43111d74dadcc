import { sinCos } from '../math/index.ts';

// scratch, not reentrant: sine and cosine of the azimuth
const turn = new Float64Array(2);

/**
 * 2 p.q of two massless momenta, keeping its digits when they are nearly parallel.
 *
 * @param p momenta px, py, pz, E [GeV], four to a parton.
 * @param a offset of the first. @param b offset of the second.
 * @returns [GeV^2], relative accuracy 1e-15 over the angle between them.
 */
export function twiceDot(p: Float64Array, a: number, b: number): number {
  const ax = p[a];
  const ay = p[a + 1];
  const az = p[a + 2];
  const bx = p[b];
  const by = p[b + 1];
  const bz = p[b + 2];
  const ee = p[a + 3] * p[b + 3];
  const dot = ax * bx + ay * by + az * bz;
  if (dot <= 0) return 2 * (ee - dot);
  // E1 E2 - p.q = |p x q|^2 / (E1 E2 + p.q)
  const cx = ay * bz - az * by;
  const cy = az * bx - ax * bz;
  const cz = ax * by - ay * bx;
  return (2 * (cx * cx + cy * cy + cz * cz)) / (ee + dot);
}

/**
 * Momenta after a massless final-final dipole branches: the inner loop of the shower.
 *
 * pi = z pt_ij + (1-z) y pt_k + k, pj = (1-z) pt_ij + z y pt_k - k, pk = (1-y) pt_k, where
 * k = kT (cos phi n1 + sin phi n2), and the origin of phi is the space axis r (z before y before x) for which
 * n = r - (r.pt_k/pt_ij.pt_k) pt_ij - (r.pt_ij/pt_ij.pt_k) pt_k has the largest |n.n|. Energies are set to the length
 * of the three-momenta, so that every row is exactly on its shell and a pair keeps its angle.
 *
 * @param out Float64Array(12): i, j, partner as px, py, pz, E [GeV].
 * @param p momenta px, py, pz, E [GeV], four to a parton.
 * @param emitter offset of pt_ij. @param partner offset of pt_k.
 * @param q2 2 pt_ij.pt_k [GeV^2]. @param z light-cone fraction of i. @param w 1 - z, given apart to keep its digits.
 * @param y recoil variable. @param azimuth [rad].
 * Accuracy: total momentum kept to 1e-15 of the energies.
 * Source: Catani & Seymour, Nucl. Phys. B485 (1997) 291, section 5.1.
 */
export function mapDipole(
  out: Float64Array,
  p: Float64Array,
  emitter: number,
  partner: number,
  q2: number,
  z: number,
  w: number,
  y: number,
  azimuth: number,
): void {
  const px = p[emitter];
  const py = p[emitter + 1];
  const pz = p[emitter + 2];
  const pe = p[emitter + 3];
  const qx = p[partner];
  const qy = p[partner + 1];
  const qz = p[partner + 2];
  const qe = p[partner + 3];
  const perQ2 = 2 / q2;

  // -n.n = 1 + 4 p_r q_r / Q^2 for each axis; n is spacelike, so the largest wins
  const lengthX = 1 + 2 * perQ2 * px * qx;
  const lengthY = 1 + 2 * perQ2 * py * qy;
  const lengthZ = 1 + 2 * perQ2 * pz * qz;
  // n = r + (2/Q^2) (q_r p + p_r q); n2 = (2/Q^2) ((E_q p - E_p q) x r) / |n| is right-handed with p in the rest frame
  const dx = qe * px - pe * qx;
  const dy = qe * py - pe * qy;
  const dz = qe * pz - pe * qz;
  let length: number;
  let pr: number;
  let qr: number;
  let nx = 0;
  let ny = 0;
  let nz = 0;
  let mx = 0;
  let my = 0;
  let mz = 0;
  if (lengthZ >= lengthY && lengthZ >= lengthX) {
    length = lengthZ;
    pr = pz;
    qr = qz;
    nz = 1;
    mx = dy;
    my = -dx;
  } else if (lengthY >= lengthX) {
    length = lengthY;
    pr = py;
    qr = qy;
    ny = 1;
    mx = -dz;
    mz = dx;
  } else {
    length = lengthX;
    pr = px;
    qr = qx;
    nx = 1;
    my = dz;
    mz = -dy;
  }
  const fp = perQ2 * qr;
  const fq = perQ2 * pr;
  nx += fp * px + fq * qx;
  ny += fp * py + fq * qy;
  nz += fp * pz + fq * qz;

  const kT = Math.sqrt(z * w * y * q2);
  sinCos(turn, azimuth);
  const scale = kT / Math.sqrt(length);
  const c = scale * turn[1];
  const s = scale * turn[0] * perQ2;
  const kx = c * nx + s * mx;
  const ky = c * ny + s * my;
  const kz = c * nz + s * mz;

  const wy = w * y;
  const ix = z * px + wy * qx + kx;
  const iy = z * py + wy * qy + ky;
  const iz = z * pz + wy * qz + kz;
  const zy = z * y;
  const jx = w * px + zy * qx - kx;
  const jy = w * py + zy * qy - ky;
  const jz = w * pz + zy * qz - kz;
  const rest = 1 - y;
  out[0] = ix;
  out[1] = iy;
  out[2] = iz;
  out[3] = Math.sqrt(ix * ix + iy * iy + iz * iz);
  out[4] = jx;
  out[5] = jy;
  out[6] = jz;
  out[7] = Math.sqrt(jx * jx + jy * jy + jz * jz);
  out[8] = rest * qx;
  out[9] = rest * qy;
  out[10] = rest * qz;
  out[11] = rest * qe;
}

/**
 * Momenta after a massless emitter and its colour partner branch, from the shower's own variables.
 *
 * @param out Float64Array(12): emitter, emission, partner as px, py, pz, E [GeV].
 * @param emitter px, py, pz, E [GeV]. @param partner likewise.
 * @param z light-cone fraction kept by the emitter, 0 < z < 1. @param y recoil variable, 0 < y < 1.
 * @param azimuth [rad], origin as in mapDipole.
 * @returns false, `out` untouched, where phase space forbids it.
 * Accuracy: total momentum kept to 1e-15 of the energies.
 * Source: Catani & Seymour, Nucl. Phys. B485 (1997) 291, section 5.1.
 */
export function branchDipole(
  out: Float64Array,
  emitter: ArrayLike<number>,
  partner: ArrayLike<number>,
  z: number,
  y: number,
  azimuth: number,
): boolean {
  if (!(z > 0 && z < 1 && y > 0 && y < 1)) return false;
  const pair = new Float64Array(8);
  pair.set(emitter, 0);
  pair.set(partner, 4);
  mapDipole(out, pair, 0, 4, twiceDot(pair, 0, 4), z, 1 - z, y, azimuth);
  return true;
}

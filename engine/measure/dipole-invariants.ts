import { PI } from '../constants.ts';
import { atan2, log, momentum } from '../math/index.ts';
import { energyGap, PACKED } from './packed-momenta.ts';

/** Offsets of the five packed momenta that describe a branching of a dipole. */
export const EMITTER = 0;
export const PARTNER = PACKED;
export const DAUGHTER = 2 * PACKED;
export const EMISSION = 3 * PACKED;
export const PARTNER_AFTER = 4 * PACKED;

/** What the five momenta of a dipole's branching say about it; NaN where a momentum is missing. */
export interface DipoleInvariants {
  /** pi.pj / (pi.pj + pi.pk + pj.pk). */
  y: number;
  /** pi.pk / (pi.pk + pj.pk), and 1 - z with its own digits. */
  z: number;
  oneMinusZ: number;
  /** (pt_ij + pt_k)^2 minus the squared masses of i, j and the partner after [GeV^2]. */
  qBar2: number;
  /** Squared masses of the emitter, i and j [GeV^2]. */
  emitterMass2: number;
  daughterMass2: number;
  emissionMass2: number;
  /** (pi + pj)^2 [GeV^2]. */
  pairMass2: number;
  /** Transverse momentum of j in the rest frame of the dipole, about its axis [GeV]. */
  kT: number;
  /** Azimuth of i about the dipole axis [rad], 0 <= azimuth < 2 pi. */
  azimuth: number;
  /** Rapidity of i and j in the rest frame of the dipole, positive towards the emitter. */
  daughterRapidity: number;
  emissionRapidity: number;
}

/** Invariants with every number NaN, to be filled by dipoleInvariants. */
export function makeDipoleInvariants(): DipoleInvariants {
  return {
    y: NaN,
    z: NaN,
    oneMinusZ: NaN,
    qBar2: NaN,
    emitterMass2: NaN,
    daughterMass2: NaN,
    emissionMass2: NaN,
    pairMass2: NaN,
    kT: NaN,
    azimuth: NaN,
    daughterRapidity: NaN,
    emissionRapidity: NaN,
  };
}

// Scratch, not reentrant. Every momentum is written as |p| (1, direction) + gap (1, 0, 0, 0), so that each product is
// a sum of terms without cancellation: p.q = |p||q| (1-cos) + |p| gap_q + |q| gap_p + gap_p gap_q.
const direction = new Float64Array(5 * 3);
const size = new Float64Array(5);
const gap = new Float64Array(5);
// light-like momenta in the plane of emitter and partner, as directions, and their difference
const axis = new Float64Array(6);
const span = new Float64Array(3);

/**
 * y, z, kT, azimuth and their kin of a dipole's branching, from the momenta alone.
 *
 * @param out filled.
 * @param p Float64Array(25): emitter and partner before, i, j, partner after, each as px, py, pz, E, m [GeV].
 *
 * The azimuth has the origin of the massless dipole map: n1 is the part of a space axis r that is orthogonal to emitter
 * and partner, r the one for which it is longest (ties: z before y before x), and (n1, n2, emitter direction) is
 * right-handed in the rest frame of the dipole. Massive emitters and partners are first replaced by the light-like
 * momenta in their plane, which span the same plane.
 * Accuracy: y, z, kT, azimuth relative to about 1e-15 over the smallest angle (rad) between two of the five directions
 * that is not zero by construction; that is the rounding of the rows themselves. At y = 1e-10 better than 1e-9.
 * Source: Catani & Seymour, Nucl. Phys. B485 (1997) 291, section 5.1; massive: Nucl. Phys. B627 (2002) 189, section 5.
 */
export function dipoleInvariants(out: DipoleInvariants, p: Float64Array): void {
  for (let n = 0; n < 5; n++) {
    const at = n * PACKED;
    const length = momentum(p, at);
    size[n] = length;
    gap[n] = energyGap(p, at, length);
    direction[3 * n] = p[at] / length;
    direction[3 * n + 1] = p[at + 1] / length;
    direction[3 * n + 2] = p[at + 2] / length;
  }
  const ij = product(2, 3);
  const ik = product(2, 4);
  const jk = product(3, 4);
  const before = product(0, 1);
  const emitterMass2 = mass2(0);
  const partnerMass2 = mass2(1);
  const daughterMass2 = mass2(2);
  const emissionMass2 = mass2(3);
  out.y = ij / (ij + ik + jk);
  out.z = ik / (ik + jk);
  out.oneMinusZ = jk / (ik + jk);
  out.emitterMass2 = emitterMass2;
  out.daughterMass2 = daughterMass2;
  out.emissionMass2 = emissionMass2;
  out.pairMass2 = 2 * ij + daughterMass2 + emissionMass2;
  out.qBar2 = 2 * before + emitterMass2 + partnerMass2 - daughterMass2 - emissionMass2 - mass2(4);
  const shift = lightLikeAxis(before, emitterMass2, partnerMass2);
  transverse(out, shift);
}

/** Scalar product of two of the momenta [GeV^2]. */
function product(a: number, b: number): number {
  const dx = direction[3 * a] - direction[3 * b];
  const dy = direction[3 * a + 1] - direction[3 * b + 1];
  const dz = direction[3 * a + 2] - direction[3 * b + 2];
  const versine = (dx * dx + dy * dy + dz * dz) / 2;
  return size[a] * size[b] * versine + size[a] * gap[b] + size[b] * gap[a] + gap[a] * gap[b];
}

function mass2(a: number): number {
  return gap[a] * (2 * size[a] + gap[a]);
}

/**
 * Fill `axis` and `span` with the light-like directions u and v in the plane of emitter and partner, and v - u.
 *
 * @returns the constant that takes 1/2 ln(p.v / p.u) to the rapidity in the dipole's rest frame, as a factor inside the
 * logarithm.
 */
function lightLikeAxis(before: number, emitterMass2: number, partnerMass2: number): number {
  let u0 = size[0];
  let v0 = size[1];
  let factor = 1;
  if (emitterMass2 === 0 && partnerMass2 === 0) for (let c = 0; c < 6; c++) axis[c] = direction[c];
  else {
    // a' = a - x b with a'.a' = 0, and b' = b - w a
    const root = before + Math.sqrt(before * before - emitterMass2 * partnerMass2);
    const x = emitterMass2 / root;
    const w = partnerMass2 / root;
    let u2 = 0;
    let v2 = 0;
    for (let c = 0; c < 3; c++) {
      const a = size[0] * direction[c];
      const b = size[1] * direction[3 + c];
      axis[c] = a - x * b;
      axis[3 + c] = b - w * a;
      u2 += axis[c] * axis[c];
      v2 += axis[3 + c] * axis[3 + c];
    }
    u0 = Math.sqrt(u2);
    v0 = Math.sqrt(v2);
    for (let c = 0; c < 3; c++) {
      axis[c] /= u0;
      axis[3 + c] /= v0;
    }
    factor = (1 + x) / (1 + w);
  }
  for (let c = 0; c < 3; c++) span[c] = axis[3 + c] - axis[c];
  return (factor * v0) / u0;
}

/** kT, azimuth and rapidities from the differences of directions, in which no digit is lost. */
function transverse(out: DipoleInvariants, rapidityFactor: number): void {
  const ux = axis[0];
  const uy = axis[1];
  const uz = axis[2];
  const xx = ux * axis[3];
  const yy = uy * axis[4];
  const zz = uz * axis[5];
  // -n.n = 1 + 2 u_r v_r / (1-cos): the largest product u_r v_r wins
  const r = zz >= yy && zz >= xx ? 2 : yy >= xx ? 1 : 0;
  const s = r === 2 ? 0 : r + 1;
  const t = s === 2 ? 0 : s + 1;
  const span2 = span[0] * span[0] + span[1] * span[1] + span[2] * span[2];
  const lengthTimesSpan2 = span2 * Math.sqrt(1 + (4 * axis[r] * axis[3 + r]) / span2);

  // i: kT cos(phi) and kT sin(phi), both times span2 |n|
  const ix = direction[6] - ux;
  const iy = direction[7] - uy;
  const iz = direction[8] - uz;
  const i2 = ix * ix + iy * iy + iz * iz;
  const iSpan = ix * span[0] + iy * span[1] + iz * span[2];
  let phi = atan2(sine(2, s, t), cosine(2, r, i2, iSpan, span2));
  if (phi < 0) phi += 2 * PI;
  out.azimuth = phi >= 2 * PI ? 0 : phi;

  const jx = direction[9] - ux;
  const jy = direction[10] - uy;
  const jz = direction[11] - uz;
  const j2 = jx * jx + jy * jy + jz * jz;
  const jv2 = square(3, 3);
  if (gap[3] === 0) out.kT = size[3] * Math.sqrt((j2 * jv2) / span2);
  else {
    const jSpan = jx * span[0] + jy * span[1] + jz * span[2];
    const c = cosine(3, r, j2, jSpan, span2);
    const d = sine(3, s, t);
    out.kT = Math.sqrt(c * c + d * d) / lengthTimesSpan2;
  }
  out.daughterRapidity = rapidity(2, i2, square(2, 3), rapidityFactor);
  out.emissionRapidity = rapidity(3, j2, jv2, rapidityFactor);
}

/** |direction - v|^2 or |direction - u|^2 of parton n; `at` is the offset in `axis`. */
function square(n: number, at: number): number {
  const dx = direction[3 * n] - axis[at];
  const dy = direction[3 * n + 1] - axis[at + 1];
  const dz = direction[3 * n + 2] - axis[at + 2];
  return dx * dx + dy * dy + dz * dz;
}

/** -p.n of parton n, times span2; d2 = |direction - u|^2 and dSpan its product with v - u. */
function cosine(n: number, r: number, d2: number, dSpan: number, span2: number): number {
  const d = direction[3 * n + r] - axis[r];
  const massless = d * span2 - axis[r] * (d2 - 2 * dSpan) - axis[3 + r] * d2;
  return size[n] * massless - 2 * gap[n] * (axis[r] + axis[3 + r]);
}

/** -p.n2 |n| of parton n, times span2; a determinant in the two axes beside r. */
function sine(n: number, s: number, t: number): number {
  const ds = direction[3 * n + s] - axis[s];
  const dt = direction[3 * n + t] - axis[t];
  const massless = dt * span[s] - ds * span[t];
  return 2 * (size[n] * massless + gap[n] * (axis[s] * span[t] - axis[t] * span[s]));
}

function rapidity(n: number, toEmitter2: number, toPartner2: number, factor: number): number {
  const minus = (size[n] * toEmitter2) / 2 + gap[n];
  const plus = (size[n] * toPartner2) / 2 + gap[n];
  return log((factor * plus) / minus) / 2;
}

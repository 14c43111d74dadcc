import { CA, CF, TR } from '../constants.ts';
import { kallen } from '../kinematics/index.ts';

/** Which velocity factors stand before the collinear parts of the massive kernels. */
export type VelocityFactors = 'unit' | 'published';

/** Codes into CHANNELS. */
const Q_QG = 0;
const G_GG = 1;

/**
 * A point of massive phase space, and what the shower needs there.
 *
 * Set the fields of the dipole end, then `find` fills in those of the point; one object serves all trials.
 */
export class MassivePoint {
  /** 2 pt_ij.pt_k [GeV^2]. */
  q2 = 0;
  /** Squared masses [GeV^2] of emitter and partner before, of i and j after. */
  mij2 = 0;
  mk2 = 0;
  mi2 = 0;
  mj2 = 0;
  y = 0;
  /** (pi + pj)^2 [GeV^2] */
  sij = 0;
  /** [GeV^2] */
  kT2 = 0;
  /** (1-y) K F Qb^2/sqrt(lambda(Q^2,m_ij^2,m_k^2)): the rate in dt/t dz dphi/2pi alpha_s/2pi. */
  rate = 0;

  private readonly virtuality: boolean;
  private readonly factors: VelocityFactors;

  /** @param virtuality whether t is s_ij - m_ij^2, else kT^2 [GeV^2]. */
  constructor(virtuality: boolean, factors: VelocityFactors) {
    this.virtuality = virtuality;
    this.factors = factors;
  }

  /**
   * Kinematics and rate of a massive branching at (t, z).
   *
   * @param channel code into CHANNELS. @param w 1 - z.
   * @returns false outside phase space.
   * Source: Catani, Dittmaier, Seymour, Trocsanyi, Nucl. Phys. B627 (2002) 189, section 5.
   */
  find(channel: number, t: number, z: number, w: number): boolean {
    const { q2, mij2, mk2, mi2, mj2, virtuality, factors } = this;
    const total2 = q2 + mij2 + mk2;
    const qb2 = total2 - mi2 - mj2 - mk2;
    if (!(qb2 > 0)) return false;
    const y = virtuality ? (t + mij2 - mi2 - mj2) / qb2 : (t + w * w * mi2 + z * z * mj2) / (z * w * qb2);
    if (!(y > 0 && y < 1)) return false;
    const sij = y * qb2 + mi2 + mj2;
    const mk = Math.sqrt(mk2);
    const room = Math.sqrt(total2) - mk;
    if (!(sij < room * room)) return false;
    const v = Math.sqrt(Math.max(0, kallen(total2, sij, mk2))) / ((1 - y) * qb2);
    const spread = v * Math.sqrt(Math.max(0, kallen(sij, mi2, mj2)));
    const middle = sij + mi2 - mj2;
    const lowest = (middle - spread) / (2 * sij);
    const highest = (middle + spread) / (2 * sij);
    if (!(z > lowest && z < highest)) return false;
    this.y = y;
    this.sij = sij;
    this.kT2 = virtuality ? z * w * sij - w * mi2 - z * mj2 : t;
    const flow = Math.sqrt(kallen(total2, mij2, mk2));
    const f = virtuality ? 1 : t / (z * w * (sij - mij2));
    // 1 - z(1-y) = w + z y without cancellation
    const pole = 1 / (w + z * y);
    let kernel: number;
    if (channel === Q_QG) {
      const r1 = factors === 'unit' ? 1 : flow / ((total2 - mij2 - mk2) * v);
      kernel = CF * (2 * pole - r1 * (1 + z + (2 * mi2) / (y * qb2)));
    } else {
      const r2 = factors === 'unit' ? 1 : 1 / v;
      const inner = z * w - highest * lowest;
      kernel = channel === G_GG ? CA * (pole - r2 * (1 - 0.5 * inner)) : (TR / 2) * r2 * (1 - 2 * inner);
    }
    // a negative kernel is no rate, by definition
    this.rate = Math.max(0, ((1 - y) * kernel * f * qb2) / flow);
    return true;
  }
}

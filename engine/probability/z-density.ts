import { CA, CF, TR } from '../constants.ts';
import { log } from '../math/index.ts';
import type { FirstEmissionRatio, VelocityFactors } from '../qcd/index.ts';
import type { EndMasses } from './end-phase-space.ts';
import type { Strength } from './strength.ts';

/** Codes into CHANNELS. */
export const Q_QG = 0;
export const G_GG = 1;
export const G_QQ = 2;

/** Keeps 1/v finite where rounding puts a point on the border of phase space. */
const LEAST_V2 = 1e-30;

/** Rates of the channels of a dipole end per unit of ln t and z, azimuth integrated over. */
export interface ZDensity {
  /** Codes into CHANNELS: which rate stands where. */
  readonly channels: readonly number[];
  /** Fix t and Q^2 [GeV^2]. */
  begin(t: number, q2: number): void;
  /**
   * Rates at z inside phase space, w = 1 - z with its own digits; g -> q qbar of one flavour. A negative number stands
   * for no rate.
   */
  at(out: Float64Array, z: number, w: number): void;
}

/** A density whose kernels may turn negative. */
export interface SignedDensity extends ZDensity {
  /** The kernels alone, which have the signs of the densities and no zeros of phase space; returns s_ij [GeV^2]. */
  kernels(out: Float64Array, z: number, w: number): number;
}

/**
 * All three channels of a massless end: (alpha_s/2pi) (1-y) K, with the first emission's ratio where there is one.
 *
 * Kernels as in engine/qcd, in a form that keeps the digits of small w and y. Source: see kernelQuark.
 */
export class MasslessDensity implements ZDensity {
  readonly channels = [Q_QG, G_GG, G_QQ];
  private readonly virtuality: boolean;
  private readonly strength: Strength;
  private readonly correction: FirstEmissionRatio | null;
  private t = 0;
  private x = 0;
  private plain = 0;
  private soft = 0;

  constructor(virtuality: boolean, strength: Strength, correction: FirstEmissionRatio | null) {
    this.virtuality = virtuality;
    this.strength = strength;
    this.correction = correction;
  }

  begin(t: number, q2: number): void {
    this.t = t;
    this.x = t / q2;
    if (!this.virtuality) this.couple(t);
  }

  at(out: Float64Array, z: number, w: number): void {
    const { virtuality, x, correction } = this;
    const y = virtuality ? x : x / (z * w);
    if (virtuality) this.couple(z * w * this.t);
    const { soft, plain } = this;
    const rest = Math.max(0, 1 - y);
    // 1 - z(1-y) = w + z y
    const pole = 1 / (w + z * y);
    out[0] = soft * rest * CF * (2 * pole - 1 - z);
    out[1] = soft * rest * CA * (pole - 1 + 0.5 * z * w);
    out[2] = plain * rest * (TR / 2) * (1 - 2 * z * w);
    if (correction === null || rest === 0) return;
    const ratio = correction.emission(z, y);
    out[0] *= ratio;
    out[1] *= ratio;
    out[2] *= correction.splitting(z, y);
  }

  private couple(kT2: number): void {
    const lnKT2 = log(kT2);
    this.plain = this.strength.plain(lnKT2);
    this.soft = this.strength.soft(lnKT2, this.plain);
  }
}

/**
 * The channels of an end whose emitter, partner or products have masses, as signed numbers.
 *
 * Where a kernel is negative the rate is zero, by definition; here it keeps its sign, so that the place where it
 * turns can be found. Source: Catani, Dittmaier, Seymour, Trocsanyi, Nucl. Phys. B627 (2002) 189, section 5.
 */
export class MassiveDensity implements SignedDensity {
  readonly channels: readonly number[];
  private readonly virtuality: boolean;
  private readonly published: boolean;
  private readonly strength: Strength;
  private readonly mij2: number;
  private readonly mi2: number;
  private readonly mj2: number;
  private readonly mk2: number;
  private t = 0;
  private lnT = 0;
  private q2 = 0;
  /** Q^2 of the paper less the squared masses after the branching, and the root of lambda(Q^2,m_ij^2,m_k^2). */
  private qBar2 = 0;
  private flow = 0;

  /** @param channels those whose branching has these masses. */
  constructor(
    virtuality: boolean,
    factors: VelocityFactors,
    strength: Strength,
    masses: EndMasses,
    channels: readonly number[],
  ) {
    this.channels = channels;
    this.virtuality = virtuality;
    this.published = factors === 'published';
    this.strength = strength;
    this.mij2 = masses.emitter * masses.emitter;
    this.mi2 = masses.i * masses.i;
    this.mj2 = masses.j * masses.j;
    this.mk2 = masses.partner * masses.partner;
  }

  begin(t: number, q2: number): void {
    this.t = t;
    this.lnT = log(t);
    this.q2 = q2;
    this.qBar2 = q2 + this.mij2 - this.mi2 - this.mj2;
    this.flow = Math.sqrt(q2 * q2 - 4 * this.mij2 * this.mk2);
  }

  at(out: Float64Array, z: number, w: number): void {
    const { channels, strength, virtuality, t, qBar2, flow, mij2, mi2, mj2 } = this;
    const s = this.kernels(out, z, w);
    const y = (s - mi2 - mj2) / qBar2;
    const lnKT2 = virtuality ? log(z * w * s - w * mi2 - z * mj2) : this.lnT;
    const plain = strength.plain(lnKT2);
    const soft = strength.soft(lnKT2, plain);
    // (1-y) F Qb^2/sqrt(lambda)
    const front = ((1 - y) * qBar2 * (virtuality ? 1 : t / (z * w * (s - mij2)))) / flow;
    for (let c = 0; c < channels.length; c++) out[c] *= front * (channels[c] === G_QQ ? plain : soft);
  }

  kernels(out: Float64Array, z: number, w: number): number {
    const { channels, virtuality, t, q2, qBar2, flow, mij2, mi2, mj2, mk2 } = this;
    const twicePiPj = virtuality ? t + mij2 - mi2 - mj2 : (t + w * w * mi2 + z * z * mj2) / (z * w);
    const y = twicePiPj / qBar2;
    const s = twicePiPj + mi2 + mj2;
    // v^2 = lambda(Q^2,s,mk^2)/(Q^2-s-mk^2)^2
    const apart = q2 + mij2 - s;
    const v2 = mk2 === 0 ? 1 : Math.max(1 - (4 * s * mk2) / (apart * apart), LEAST_V2);
    const perV = this.published ? 1 / Math.sqrt(v2) : 1;
    const pole = 1 / (w + z * y);
    for (let c = 0; c < channels.length; c++) {
      if (channels[c] === Q_QG) {
        const r1 = this.published ? (flow / q2) * perV : 1;
        out[c] = CF * (2 * pole - r1 * (1 + z + (2 * mi2) / twicePiPj));
        continue;
      }
      // m_i = m_j here: z_+ z_- = [1 - v^2 (1 - 4 m^2/s)]/4
      const inner = z * w - 0.25 * (1 - v2 * (1 - (4 * mi2) / s));
      if (channels[c] === G_GG) out[c] = CA * (pole - perV * (1 - 0.5 * inner));
      else out[c] = (TR / 2) * perV * (1 - 2 * inner);
    }
    return s;
  }
}

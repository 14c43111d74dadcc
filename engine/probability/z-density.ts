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
   * Rates at points inside phase space, of the first channel at all of them, then of the second and so on.
   *
   * Many at once, because every number that crosses a call becomes an object where the compiler does not inline it.
   *
   * @param zs, @param ws z and 1 - z with its own digits, `count` of each.
   * @param out g -> q qbar of one flavour; a negative number stands for no rate.
   */
  fill(out: Float64Array, zs: Float64Array, ws: Float64Array, count: number): void;
}

/** A density whose kernels may turn negative. */
export interface SignedDensity extends ZDensity {
  /** The kernels alone, which have the signs of the densities and no zeros of phase space; as `fill`. */
  kernels(out: Float64Array, zs: Float64Array, ws: Float64Array, count: number): void;
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

  fill(out: Float64Array, zs: Float64Array, ws: Float64Array, count: number): void {
    const { virtuality, x, t, correction } = this;
    for (let k = 0; k < count; k++) {
      const z = zs[k];
      const w = ws[k];
      const y = virtuality ? x : x / (z * w);
      if (virtuality) this.couple(z * w * t);
      const { soft, plain } = this;
      const rest = Math.max(0, 1 - y);
      // 1 - z(1-y) = w + z y
      const pole = 1 / (w + z * y);
      let ofGluon = 1;
      let ofPair = 1;
      if (correction !== null && rest > 0) {
        ofGluon = correction.emission(z, y);
        ofPair = correction.splitting(z, y);
      }
      out[k] = ofGluon * soft * rest * CF * (2 * pole - 1 - z);
      out[count + k] = ofGluon * soft * rest * CA * (pole - 1 + 0.5 * z * w);
      out[2 * count + k] = ofPair * plain * rest * (TR / 2) * (1 - 2 * z * w);
    }
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

  fill(out: Float64Array, zs: Float64Array, ws: Float64Array, count: number): void {
    const { channels, strength, virtuality, t, qBar2, flow, mij2, mi2, mj2 } = this;
    this.kernels(out, zs, ws, count);
    for (let k = 0; k < count; k++) {
      const z = zs[k];
      const w = ws[k];
      const twicePiPj = this.twicePiPj(z, w);
      const s = twicePiPj + mi2 + mj2;
      const lnKT2 = virtuality ? log(z * w * s - w * mi2 - z * mj2) : this.lnT;
      const plain = strength.plain(lnKT2);
      const soft = strength.soft(lnKT2, plain);
      // (1-y) F Qb^2/sqrt(lambda)
      const front = ((qBar2 - twicePiPj) * (virtuality ? 1 : t / (z * w * (s - mij2)))) / flow;
      for (let c = 0; c < channels.length; c++)
        out[c * count + k] *= front * (channels[c] === G_QQ ? plain : soft);
    }
  }

  kernels(out: Float64Array, zs: Float64Array, ws: Float64Array, count: number): void {
    const { channels, q2, qBar2, flow, mij2, mi2, mj2, mk2, published } = this;
    for (let k = 0; k < count; k++) {
      const z = zs[k];
      const w = ws[k];
      const twicePiPj = this.twicePiPj(z, w);
      const s = twicePiPj + mi2 + mj2;
      // v^2 = lambda(Q^2,s,mk^2)/(Q^2-s-mk^2)^2
      const apart = q2 + mij2 - s;
      const v2 = mk2 === 0 ? 1 : Math.max(1 - (4 * s * mk2) / (apart * apart), LEAST_V2);
      const perV = published ? 1 / Math.sqrt(v2) : 1;
      const pole = 1 / (w + (z * twicePiPj) / qBar2);
      for (let c = 0; c < channels.length; c++) {
        let kernel: number;
        if (channels[c] === Q_QG) {
          const r1 = published ? (flow / q2) * perV : 1;
          kernel = CF * (2 * pole - r1 * (1 + z + (2 * mi2) / twicePiPj));
        } else {
          // m_i = m_j here: z_+ z_- = [1 - v^2 (1 - 4 m^2/s)]/4
          const inner = z * w - 0.25 * (1 - v2 * (1 - (4 * mi2) / s));
          if (channels[c] === G_GG) kernel = CA * (pole - perV * (1 - 0.5 * inner));
          else kernel = (TR / 2) * perV * (1 - 2 * inner);
        }
        out[c * count + k] = kernel;
      }
    }
  }

  /** 2 pi.pj [GeV^2], which is y Qb^2. */
  private twicePiPj(z: number, w: number): number {
    const { virtuality, t, mij2, mi2, mj2 } = this;
    return virtuality ? t + mij2 - mi2 - mj2 : (t + w * w * mi2 + z * z * mj2) / (z * w);
  }
}

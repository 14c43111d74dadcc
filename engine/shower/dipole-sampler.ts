import { CA, CF, PI, TR } from '../constants.ts';
import { exp, log } from '../math/index.ts';
import type { RunningCoupling } from '../qcd/index.ts';
import { type Philox, uniform } from '../random/index.ts';
import type { DipoleState } from './dipole-state.ts';

const LN_2 = 0.6931471805599453;

/** Codes into CHANNELS. */
export const Q_QG = 0;
export const G_GG = 1;
export const G_QQ = 2;

/** Codes into REASONS, here those that a massless dipole shower knows. */
export const PHASE_SPACE = 0;
export const COUPLING = 1;
export const KERNEL = 2;
export const CUTOFF = 3;

/** Told of every rejected trial when trials are recorded. */
export interface TrialListener {
  reject(sampler: DipoleSampler, reason: number, ratio: number): void;
}

/**
 * The veto algorithm for massless dipoles: one competing process over all dipole ends.
 *
 * The overestimate is constant in ln t inside windows of ln 2 that lie at fixed places below the hard scale; within a
 * window it has the shape of the soft singularity, cut off where the resolution does. So a dipole costs one logarithm
 * per window, and its weight is a function of its q2 and the window alone, whatever happened before. With w = 1-z,
 * K <= C 2w/(w^2 + kappa), kappa = t/Q^2, in kt ordering and K <= C 2/(w + y) in virtuality ordering, C = CF for a
 * quark end and CA/2 for a gluon end.
 *
 * `next` leaves what it found in the public fields. Source: physics of Catani & Seymour, Nucl. Phys. B485 (1997) 291,
 * with the veto algorithm as in Ellis, Stirling, Webber, chapter 5.
 */
export class DipoleSampler {
  /** ln t [GeV^2] of the state of the evolution: of the last trial. */
  lnT = 0;
  t = 0;
  z = 0;
  /** 1 - z. */
  w = 0;
  y = 0;
  /** kT^2 [GeV^2]. */
  kT2 = 0;
  alphaS = 0;
  /** f/g of the accepted trial. */
  ratio = 0;
  dipole = 0;
  fromColourEnd = false;
  channel = Q_QG;
  /** PDG number of the quark in G_QQ. */
  flavour = 0;
  rejected = 0;

  private readonly virtuality: boolean;
  private readonly coupling: RunningCoupling;
  private readonly flavours: number;
  private readonly cutoff: number;
  private readonly lnHardScale: number;
  private readonly lnLowest: number;
  /** Window: number, its lower end, alpha_s maximum over it. */
  private window = -1;
  private lnWindowLow = 0;
  private tWindowLow = 0;
  private lowestW = 0;
  private largestAlphaS = 0;
  /** Dipole to the integral of the soft shape and to the weight of both its ends. */
  private shape = new Float64Array(64);
  private weight = new Float64Array(64);

  /**
   * @param cutoff kT^2 resolution [GeV^2]. @param hardScale, @param lowest ends of the evolution [GeV^2].
   */
  constructor(
    order: 'kt' | 'virtuality',
    coupling: RunningCoupling,
    flavours: number,
    cutoff: number,
    hardScale: number,
    lowest: number,
  ) {
    this.virtuality = order === 'virtuality';
    this.coupling = coupling;
    this.flavours = flavours;
    this.cutoff = cutoff;
    this.lnHardScale = log(hardScale);
    this.lnLowest = log(lowest);
  }

  /** Begin at ln t, with the dipoles of the state. */
  start(state: DipoleState, lnT: number): void {
    this.lnT = lnT;
    this.openWindow(state, Math.max(0, Math.floor((this.lnHardScale - lnT) / LN_2)));
  }

  /** Weigh again the dipoles that the last branching changed. */
  refresh(state: DipoleState): void {
    for (let n = 0; n < state.touchedCount; n++) this.weigh(state, state.touched[n]);
  }

  /**
   * Find the next branching below `lnT`.
   *
   * @param random at the start of this step's numbers.
   * @returns false where nothing branches any more down to the lowest t.
   */
  next(state: DipoleState, random: Philox, listener: TrialListener | null): boolean {
    this.rejected = 0;
    let total = this.totalWeight(state);
    for (;;) {
      random.block();
      // distance in units of the expected number of trials, used up window by window
      let distance = -log(uniform(random.x0));
      for (;;) {
        const rate = (this.largestAlphaS / (2 * PI)) * total;
        const lnT = this.lnT - distance / rate;
        if (lnT > this.lnWindowLow) {
          this.lnT = lnT;
          break;
        }
        distance -= (this.lnT - this.lnWindowLow) * rate;
        this.lnT = this.lnWindowLow;
        if (this.lnWindowLow === this.lnLowest) return false;
        this.openWindow(state, this.window + 1);
        total = this.totalWeight(state);
      }
      this.t = exp(this.lnT);
      const reason = this.virtuality
        ? this.tryVirtuality(state, random, total)
        : this.tryKt(state, random, total);
      if (reason < 0) return true;
      this.rejected++;
      if (listener !== null) listener.reject(this, reason, reason === PHASE_SPACE ? NaN : this.ratio);
    }
  }

  private openWindow(state: DipoleState, window: number): void {
    this.window = window;
    const low = this.lnHardScale - (window + 1) * LN_2;
    this.lnWindowLow = low > this.lnLowest ? low : this.lnLowest;
    this.tWindowLow = exp(this.lnWindowLow);
    if (this.virtuality) {
      // z(1-z) >= tc/t keeps 1-z above tc/t, which is least at the upper end of the window
      this.lowestW = this.cutoff / (2 * this.tWindowLow);
      this.largestAlphaS = this.coupling.atLog(log(this.cutoff));
    } else {
      this.largestAlphaS = this.coupling.atLog(this.lnWindowLow);
    }
    for (let dipole = 0; dipole < state.dipoles; dipole++) this.weigh(state, dipole);
  }

  private weigh(state: DipoleState, dipole: number): void {
    if (dipole >= this.weight.length) this.growWeights(dipole);
    const q2 = state.q2[dipole];
    const low = this.tWindowLow;
    if (this.virtuality ? low >= q2 : 4 * low >= q2) {
      this.weight[dipole] = 0;
      return;
    }
    const shape = this.virtuality ? log((q2 + low) / (this.lowestW * q2 + low)) : log((q2 + low) / low);
    this.shape[dipole] = shape;
    this.weight[dipole] =
      this.endWeight(state.id[state.colourEnd[dipole]], shape) +
      this.endWeight(state.id[state.anticolourEnd[dipole]], shape);
  }

  private endWeight(id: number, shape: number): number {
    if (id !== 21) return 2 * CF * (this.virtuality ? shape : 0.5 * shape);
    return CA * (this.virtuality ? shape : 0.5 * shape) + this.flavours * (TR / 2);
  }

  private growWeights(dipole: number): void {
    const length = 2 * dipole;
    const shape = new Float64Array(length);
    const weight = new Float64Array(length);
    shape.set(this.shape);
    weight.set(this.weight);
    this.shape = shape;
    this.weight = weight;
  }

  private totalWeight(state: DipoleState): number {
    const { weight } = this;
    const count = state.dipoles;
    let sum = 0;
    for (let dipole = 0; dipole < count; dipole++) sum += weight[dipole];
    return sum;
  }

  /** Which dipole, end, channel and flavour: one uniform number spread over the weights. */
  private choose(state: DipoleState, random: Philox, total: number): void {
    const { weight } = this;
    let share = uniform(random.x1) * total;
    const last = state.dipoles - 1;
    let dipole = 0;
    while (dipole < last && share >= weight[dipole]) share -= weight[dipole++];
    // rounding may lead past the end, onto a dipole that cannot branch
    while (weight[dipole] === 0 && dipole > 0) dipole--;
    this.dipole = dipole;
    const shape = this.shape[dipole];
    const colourId = state.id[state.colourEnd[dipole]];
    const colourWeight = this.endWeight(colourId, shape);
    this.fromColourEnd = share < colourWeight;
    if (!this.fromColourEnd) share -= colourWeight;
    const id = this.fromColourEnd ? colourId : state.id[state.anticolourEnd[dipole]];
    if (id !== 21) {
      this.channel = Q_QG;
      return;
    }
    share -= CA * (this.virtuality ? shape : 0.5 * shape);
    if (share < 0 || this.flavours === 0) {
      this.channel = G_GG;
      return;
    }
    this.channel = G_QQ;
    const flavour = 1 + Math.floor(share / (TR / 2));
    this.flavour = flavour < this.flavours ? flavour : this.flavours;
  }

  /** One trial in kt ordering. @returns the reason of its rejection, -1 where it is accepted. */
  private tryKt(state: DipoleState, random: Philox, total: number): number {
    this.choose(state, random, total);
    const q2 = state.q2[this.dipole];
    const share = uniform(random.x2);
    const kappaLow = this.tWindowLow / q2;
    let w: number;
    if (this.channel === G_QQ) w = share;
    else w = Math.sqrt(kappaLow * (exp(share * this.shape[this.dipole]) - 1));
    const z = 1 - w;
    const zw = z * w;
    const y = this.t / (zw * q2);
    this.z = z;
    this.w = w;
    this.y = y;
    this.kT2 = this.t;
    if (!(z > 0 && y < 1)) return PHASE_SPACE;
    const kernel = this.kernelRatio(w / (w * w + kappaLow));
    return this.decide(random, this.lnT, kernel);
  }

  /** One trial in virtuality ordering. See tryKt. */
  private tryVirtuality(state: DipoleState, random: Philox, total: number): number {
    this.choose(state, random, total);
    const q2 = state.q2[this.dipole];
    const share = uniform(random.x2);
    const yLow = this.tWindowLow / q2;
    let w: number;
    if (this.channel === G_QQ) w = share;
    else w = (this.lowestW + yLow) * exp(share * this.shape[this.dipole]) - yLow;
    const z = 1 - w;
    const y = this.t / q2;
    this.z = z;
    this.w = w;
    this.y = y;
    if (!(z > 0 && w > 0 && y < 1)) return PHASE_SPACE;
    const kT2 = z * w * this.t;
    this.kT2 = kT2;
    if (kT2 < this.cutoff) {
      this.ratio = NaN;
      return CUTOFF;
    }
    const kernel = this.kernelRatio(1 / (w + yLow));
    return this.decide(random, log(kT2), kernel);
  }

  /** (1-y) K over its overestimate, whose soft shape is C * 2 * `soft`. */
  private kernelRatio(soft: number): number {
    const { z, w, y } = this;
    // 1 - z(1-y) = w + z y without cancellation
    const pole = 1 / (w + z * y);
    if (this.channel === Q_QG) return ((1 - y) * (2 * pole - (1 + z))) / (2 * soft);
    if (this.channel === G_GG) return ((1 - y) * (pole - 1 + 0.5 * z * w)) / soft;
    return (1 - y) * (1 - 2 * z * w);
  }

  private decide(random: Philox, lnKT2: number, kernel: number): number {
    const alphaS = this.coupling.atLog(lnKT2);
    this.alphaS = alphaS;
    const coupling = alphaS / this.largestAlphaS;
    this.ratio = coupling * kernel;
    const u = uniform(random.x3);
    if (u < this.ratio) return -1;
    return u >= coupling ? COUPLING : KERNEL;
  }
}

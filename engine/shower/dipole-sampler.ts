import { CA, CF, PI, TR } from '../constants.ts';
import { exp, log } from '../math/index.ts';
import {
  type FirstEmissionRatio,
  MassivePoint,
  quarkMass,
  type RunningCoupling,
  softGluonK,
} from '../qcd/index.ts';
import { type Philox, uniform } from '../random/index.ts';
import type { DipoleState } from './dipole-state.ts';
import { EvolutionWindows } from './evolution-windows.ts';
import type { GrowSettings } from './settings.ts';

const GLUON = 21;

/** Codes into CHANNELS. */
export const Q_QG = 0;
export const G_GG = 1;
export const G_QQ = 2;

/** Codes into REASONS, here those that a massless dipole shower knows. */
const PHASE_SPACE = 0;
const COUPLING = 1;
const KERNEL = 2;
const CUTOFF = 3;
const MATRIX_ELEMENT = 4;

/** Headroom of the overestimate of g -> Q Qbar beside a heavy partner with published velocity factors, which have no limit. */
const PUBLISHED_HEADROOM = 4;

/** Told of every rejected trial when trials are recorded. */
export interface TrialListener {
  reject(sampler: DipoleSampler, reason: number, ratio: number): void;
}

/**
 * The veto algorithm for massless dipoles: one competing process over all dipole ends.
 *
 * The overestimate is constant in ln t inside windows of ln 2 at fixed places below the hard scale, and has the shape
 * of the soft singularity, cut off where the resolution is. With w = 1-z: K <= C 2w/(w^2 + kappa), kappa = t/Q^2, in kt
 * ordering, and K <= C 2/(w + y), y = t/Q^2, in virtuality ordering; C = CF for a quark end, CA/2 for a gluon end;
 * g -> q qbar is flat in z. A dipole's weight is a function of its Q^2 and the window alone, whatever happened before.
 *
 * `next` leaves what it found in the public fields.
 */
export class DipoleSampler {
  /** ln t [GeV^2] at which the evolution stands. */
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
  /** PDG number and mass [GeV] of the quark in G_QQ. */
  flavour = 0;
  quarkMass = 0;
  rejected = 0;

  private readonly virtuality: boolean;
  private readonly coupling: RunningCoupling;
  private readonly flavours: number;
  /** kT^2 resolution [GeV^2], and alpha_s there. */
  private readonly cutoff: number;
  private readonly alphaSCutoff: number;
  private readonly windows: EvolutionWindows;
  private readonly masses: boolean;
  private readonly point: MassivePoint;
  private readonly publishedFactors: boolean;
  /** K/(2 pi) of the physical scheme by number of flavours minus three, null where it is off. */
  private readonly rescaling: readonly number[] | null;
  private window = 0;
  /** Dipole to ln Q^2, 1/Q^2, Q^2/sqrt(lambda) (1 unless both ends are heavy), and the weights of both ends: that of the soft shape, and that which is flat in z. */
  private lnQ2 = new Float64Array(64);
  private perQ2 = new Float64Array(64);
  private flow = new Float64Array(64);
  private softWeight = new Float64Array(64);
  private flatWeight = new Float64Array(64);
  /** Dipole to the weight of one flavour of g -> q qbar at one end. */
  private splitting = new Float64Array(64);
  /** Dipole to the integral of the soft shape over w, and to the weight of both ends, in the present window. */
  private shape = new Float64Array(64);
  private weight = new Float64Array(64);

  /** @param cutoff kT^2 resolution [GeV^2]. @param hardScale, @param lowest ends of the evolution [GeV^2]. */
  constructor(
    settings: GrowSettings,
    coupling: RunningCoupling,
    cutoff: number,
    hardScale: number,
    lowest: number,
  ) {
    this.virtuality = settings.order === 'virtuality';
    this.coupling = coupling;
    this.flavours = settings.flavours;
    this.masses = settings.masses;
    this.publishedFactors = settings.velocityFactors === 'published';
    this.point = new MassivePoint(this.virtuality, settings.velocityFactors);
    this.rescaling = settings.cmw ? [3, 4, 5].map((flavours) => softGluonK(flavours) / (2 * PI)) : null;
    this.cutoff = cutoff;
    this.windows = new EvolutionWindows(hardScale, lowest, (lnT) => this.softAlphaS(lnT));
    this.alphaSCutoff = this.softAlphaS(log(cutoff));
  }

  /** Coupling of the channels with a soft gluon, which is the larger one. */
  private softAlphaS(lnKT2: number): number {
    const alphaS = this.coupling.atLog(lnKT2);
    const { rescaling } = this;
    if (rescaling === null) return alphaS;
    return alphaS * (1 + rescaling[this.coupling.flavoursAt(lnKT2) - 3] * alphaS);
  }

  /** Begin at ln t, with the dipoles of the state. */
  start(state: DipoleState, lnT: number): void {
    this.lnT = lnT;
    this.window = this.windows.at(lnT);
    for (let dipole = 0; dipole < state.dipoles; dipole++) this.enter(state, dipole);
    this.weighAll(state);
  }

  /** Weigh again the dipoles that the last branching changed. */
  refresh(state: DipoleState): void {
    for (let n = 0; n < state.touchedCount; n++) {
      const dipole = state.touched[n];
      this.enter(state, dipole);
      this.weigh(dipole);
    }
  }

  /**
   * Find the next branching below `lnT`.
   *
   * One long function: split into its parts it took twice as long, because every double that crosses a call which
   * the compiler does not inline becomes an object.
   *
   * @param correction of the first emission; null for every later one.
   * @param random at the start of this step's numbers; after an accepted trial it holds an unused block.
   * @returns false where nothing branches any more down to the lowest t.
   */
  next(
    state: DipoleState,
    random: Philox,
    listener: TrialListener | null,
    correction: FirstEmissionRatio | null,
  ): boolean {
    const headroom = correction === null ? 1 : correction.largest;
    const { virtuality, windows, coupling, weight, flavours, rescaling } = this;
    const lastWindow = windows.count - 1;
    const softCharge = virtuality ? 1 : 0.5;
    let window = this.window;
    let lnT = this.lnT;
    let lnLow = windows.lnLow[window];
    let low = windows.low[window];
    let largestAlphaS = virtuality ? this.alphaSCutoff : windows.alphaS[window];
    let total = this.totalWeight(state);
    let rejected = 0;
    random.block();
    for (;;) {
      const wordDistance = random.x0;
      const wordChoice = random.x1;
      const wordFraction = random.x2;
      const wordDecision = random.x3;
      // the next trial's numbers already now, so that the processor makes them beside this one's logarithms; after an
      // accepted trial they are the azimuth's
      random.block();
      // distance in units of the expected number of trials, used up window by window
      let distance = -log(uniform(wordDistance));
      for (;;) {
        const rate = ((headroom * largestAlphaS) / (2 * PI)) * total;
        const next = lnT - distance / rate;
        if (next > lnLow) {
          lnT = next;
          break;
        }
        distance -= (lnT - lnLow) * rate;
        lnT = lnLow;
        if (window === lastWindow) {
          this.lnT = lnT;
          this.rejected = rejected;
          return false;
        }
        this.window = ++window;
        this.weighAll(state);
        lnLow = windows.lnLow[window];
        low = windows.low[window];
        if (!virtuality) largestAlphaS = windows.alphaS[window];
        total = this.totalWeight(state);
      }
      const t = exp(lnT);

      // which dipole, end, channel and flavour: one uniform number spread over the weights
      let share = uniform(wordChoice) * total;
      const last = state.dipoles - 1;
      let dipole = 0;
      while (dipole < last && share >= weight[dipole]) share -= weight[dipole++];
      // rounding may lead past the end, onto a dipole that cannot branch
      while (weight[dipole] === 0 && dipole > 0) dipole--;
      const shape = this.shape[dipole];
      const softIntegral = softCharge * this.flow[dipole] * shape;
      const glueWeight = CA * softIntegral;
      const colourGluon = state.id[state.colourEnd[dipole]] === GLUON;
      const splitting = this.splitting[dipole];
      const colourWeight = colourGluon ? glueWeight + flavours * splitting : 2 * CF * softIntegral;
      const fromColourEnd = share < colourWeight;
      if (!fromColourEnd) share -= colourWeight;
      const gluon = fromColourEnd ? colourGluon : state.id[state.anticolourEnd[dipole]] === GLUON;
      const channel = gluon ? (share < glueWeight || flavours === 0 ? G_GG : G_QQ) : Q_QG;

      if (channel === G_QQ) {
        const flavour = 1 + Math.floor((share - glueWeight) / splitting);
        this.flavour = Math.min(flavour, flavours);
      }

      // w, y and the kernel over its overestimate
      const perQ2 = this.perQ2[dipole];
      const fraction = uniform(wordFraction);
      const relativeLow = low * perQ2;
      let w = fraction;
      let y = t * perQ2;
      let kT2 = t;
      let soft = 1;
      if (virtuality) {
        if (channel !== G_QQ) {
          w = (this.lowestW(low) + relativeLow) * exp(fraction * shape) - relativeLow;
          soft = 1 / (w + relativeLow);
        }
        kT2 = (1 - w) * w * t;
      } else {
        if (channel !== G_QQ) {
          const w2 = relativeLow * (exp(fraction * shape) - 1);
          w = Math.sqrt(w2);
          soft = w / (w2 + relativeLow);
        }
        y /= (1 - w) * w;
      }
      const z = 1 - w;
      let reason = -1;
      let ratio = NaN;
      let kernel = NaN;
      if (!(z > 0 && w > 0)) reason = PHASE_SPACE;
      else if (this.masses && this.setMasses(state, dipole, fromColourEnd, channel)) {
        const { point } = this;
        if (!point.find(channel, t, z, w)) reason = PHASE_SPACE;
        else {
          y = point.y;
          kT2 = point.kT2;
          // the weight of the dipole holds Q^2/sqrt(lambda) of its ends
          kernel = point.rate / (channel === Q_QG ? 2 * CF * soft : channel === G_GG ? CA * soft : splitting);
          kernel /= this.flow[dipole];
        }
      } else if (y < 1) {
        // 1 - z(1-y) = w + z y without cancellation
        const pole = 1 / (w + z * y);
        kernel = 1 - y;
        if (channel === Q_QG) kernel *= (2 * pole - (1 + z)) / (2 * soft);
        else if (channel === G_GG) kernel *= (pole - 1 + 0.5 * z * w) / soft;
        else kernel *= 1 - 2 * z * w;
      } else reason = PHASE_SPACE;
      if (reason < 0) {
        if (kT2 < this.cutoff) reason = CUTOFF;
        else {
          const lnKT2 = virtuality ? log(kT2) : lnT;
          const alphaS =
            rescaling === null || channel === G_QQ ? coupling.atLog(lnKT2) : this.softAlphaS(lnKT2);
          const slower = alphaS / largestAlphaS;
          const u = uniform(wordDecision);
          ratio = (slower * kernel) / headroom;
          const before = ratio;
          if (correction !== null)
            ratio *= channel === G_QQ ? correction.splitting(z, y) : correction.emission(z, y);
          if (u < ratio) this.alphaS = alphaS;
          else if (u >= slower) reason = COUPLING;
          else reason = u * headroom >= slower * kernel || before <= ratio ? KERNEL : MATRIX_ELEMENT;
        }
      }

      if (reason < 0 || listener !== null) {
        this.lnT = lnT;
        this.t = t;
        this.z = z;
        this.w = w;
        this.y = y;
        this.kT2 = kT2;
        this.ratio = ratio;
        this.dipole = dipole;
        this.fromColourEnd = fromColourEnd;
        this.channel = channel;
      }
      if (reason < 0) {
        this.rejected = rejected;
        return true;
      }
      rejected++;
      if (listener !== null) listener.reject(this, reason, ratio);
    }
  }

  /** z(1-z) >= tc/t keeps 1-z above tc/t, which is least at the upper end of the window, at most twice its lower end. */
  private lowestW(low: number): number {
    return this.cutoff / (2 * low);
  }

  private enter(state: DipoleState, dipole: number): void {
    if (dipole >= this.weight.length) this.growWeights(dipole);
    const q2 = state.q2[dipole];
    this.lnQ2[dipole] = log(q2);
    this.perQ2[dipole] = 1 / q2;
    const gluons =
      (state.id[state.colourEnd[dipole]] === GLUON ? 1 : 0) +
      (state.id[state.anticolourEnd[dipole]] === GLUON ? 1 : 0);
    const flow = this.masses ? relativeFlow(state, dipole) : 1;
    this.flow[dipole] = flow;
    this.softWeight[dipole] = flow * (this.virtuality ? 1 : 0.5) * (gluons * CA + (2 - gluons) * 2 * CF);
    const { colourEnd, anticolourEnd } = state;
    const heavy = state.mass[colourEnd[dipole]] > 0 || state.mass[anticolourEnd[dipole]] > 0;
    this.splitting[dipole] = (TR / 2) * (heavy && this.publishedFactors ? PUBLISHED_HEADROOM : 1);
    this.flatWeight[dipole] = gluons * this.flavours * this.splitting[dipole];
  }

  private weighAll(state: DipoleState): void {
    const { dipoles } = state;
    for (let dipole = 0; dipole < dipoles; dipole++) this.weigh(dipole);
  }

  private weigh(dipole: number): void {
    const low = this.windows.low[this.window];
    const relativeLow = low * this.perQ2[dipole];
    const { virtuality } = this;
    if (relativeLow >= (virtuality ? 1 : 0.25)) {
      this.weight[dipole] = 0;
      return;
    }
    // kt: the integral over 0 < w < 1 is ln(Q^2/low + 1); taking ln(Q^2/low) + low/Q^2 instead, w a little above 1 is
    // thrown too and refused, and no window costs a logarithm
    const shape = virtuality
      ? log((1 + relativeLow) / (this.lowestW(low) + relativeLow))
      : this.lnQ2[dipole] - this.windows.lnLow[this.window] + relativeLow;
    this.shape[dipole] = shape;
    this.weight[dipole] = this.softWeight[dipole] * shape + this.flatWeight[dipole];
  }

  private growWeights(dipole: number): void {
    const widen = (column: Float64Array) => {
      const wider = new Float64Array(2 * dipole);
      wider.set(column);
      return wider;
    };
    this.lnQ2 = widen(this.lnQ2);
    this.perQ2 = widen(this.perQ2);
    this.flow = widen(this.flow);
    this.softWeight = widen(this.softWeight);
    this.flatWeight = widen(this.flatWeight);
    this.splitting = widen(this.splitting);
    this.shape = widen(this.shape);
    this.weight = widen(this.weight);
  }

  private totalWeight(state: DipoleState): number {
    const { weight } = this;
    const count = state.dipoles;
    let sum = 0;
    for (let dipole = 0; dipole < count; dipole++) sum += weight[dipole];
    return sum;
  }

  /** Tell the point of massive phase space about a dipole end. @returns whether any mass enters. */
  private setMasses(state: DipoleState, dipole: number, fromColourEnd: boolean, channel: number): boolean {
    const emitter = fromColourEnd ? state.colourEnd[dipole] : state.anticolourEnd[dipole];
    const partner = fromColourEnd ? state.anticolourEnd[dipole] : state.colourEnd[dipole];
    const quark = channel === G_QQ ? quarkMass(this.flavour) : 0;
    this.quarkMass = quark;
    const mij = state.mass[emitter];
    const mk = state.mass[partner];
    if (mij === 0 && mk === 0 && quark === 0) return false;
    const { point } = this;
    point.q2 = state.q2[dipole];
    point.mij2 = mij * mij;
    point.mk2 = mk * mk;
    point.mi2 = channel === G_QQ ? quark * quark : mij * mij;
    point.mj2 = quark * quark;
    return true;
  }
}

/** 2 p.q / sqrt(lambda) of a dipole: the inverse of the relative velocity of its ends. */
function relativeFlow(state: DipoleState, dipole: number): number {
  const a = state.mass[state.colourEnd[dipole]];
  const b = state.mass[state.anticolourEnd[dipole]];
  if (a === 0 || b === 0) return 1;
  const q2 = state.q2[dipole];
  const both = (2 * a * b) / q2;
  return 1 / Math.sqrt((1 - both) * (1 + both));
}

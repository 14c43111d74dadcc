import { CA, CF, PI, TR } from '../../constants.ts';
import { CHANNELS, REASONS } from '../../history/index.ts';
import { exp, log } from '../../math/index.ts';
import { type RunningCoupling, softGluonK } from '../../qcd/index.ts';
import { type Philox, uniform } from '../../random/index.ts';
import type { BranchingTree } from './branching-tree.ts';
import { type Evolution, evolutionPlace, TrialWindows } from './trial-windows.ts';

const GLUON = 21;
const Q_QG = CHANNELS.indexOf('q_qg');
const G_GG = CHANNELS.indexOf('g_gg');
const G_QQ = CHANNELS.indexOf('g_qq');
const COUPLING = REASONS.indexOf('coupling');
const KERNEL = REASONS.indexOf('kernel');
const CUTOFF = REASONS.indexOf('cutoff');
const ANGULAR_VETO = REASONS.indexOf('angular veto');

/** Told of every rejected trial when trials are recorded. */
export interface LineListener {
  reject(node: number, t: number, z: number, channel: number, reason: number, ratio: number): void;
}

export interface LineSamplerOptions {
  readonly coupling: RunningCoupling;
  /** Whether the channels with a soft gluon use the physical scheme's coupling. */
  readonly cmw: boolean;
  readonly evolution: Evolution;
  /** Whether the rapidity is bounded by the fraction of the jet (with t = q^2). */
  readonly angularBound: boolean;
  readonly flavours: number;
  /** Mass of a quark by PDG number [GeV]. */
  readonly mass: (flavour: number) => number;
  /** pTmin [GeV]. */
  readonly cutoff: number;
  /** [GeV] */
  readonly sqrtS: number;
}

/** Kinds of partons by what they radiate: overestimates differ by the colour charge and by where they end. */
const KINDS = 7;

/**
 * The veto algorithm for one parton line: the next one-to-two branching below where the line stands.
 *
 * With tau = qt^2 in angular ordering and tau = q^2 - m^2 in virtuality ordering, kappa = z(1-z), the rate is
 * (dtau/tau) dz (alpha_s/2pi) P, alpha_s at kappa^2 tau and kappa tau in turn, and
 *
 *     P_qq = CF [(1+z^2)/(1-z) - 2 m^2/M^2]       P_gg = CA [z/(1-z) + (1-z)/z + kappa]      P_qg = TR [1 - 2 kappa + 2 m^2/M^2]
 *
 * M^2 = kappa qt^2 or q^2 - m^2 in turn (q^2 for a gluon). In the rapidity ln(z/(1-z)) the soft kernels are flat; both
 * signs are thrown together and told apart by a fresh number. See TrialWindows for the overestimate.
 *
 * Source: Marchesini & Webber, Nucl. Phys. B310 (1988) 461; Gieseke, Stephens, Webber, JHEP 12 (2003) 045.
 */
export class LineSampler {
  private readonly options: LineSamplerOptions;
  private readonly angle: boolean;
  private readonly lnCut2: number;
  private readonly cut2: number;
  /** Largest coupling of g -> q qbar, at pTmin. */
  private readonly largestAlphaS: number;
  /** K/(2 pi) of the physical scheme by number of flavours minus three, zeros where it is off. */
  private readonly rescaling: Float64Array;
  private readonly windows: TrialWindows;
  private readonly masses = new Float64Array(KINDS);
  private readonly softWeight = new Float64Array(KINDS);
  private readonly flatWeight = new Float64Array(KINDS);
  /** u at which a kind stops, and the integral of its overestimate from 0 to there. */
  private readonly lowest = new Float64Array(KINDS);
  private readonly lowestIntegral = new Float64Array(KINDS);

  constructor(options: LineSamplerOptions) {
    const { coupling, evolution, flavours, cutoff, sqrtS } = options;
    this.options = options;
    this.angle = evolution.shift === 2;
    this.lnCut2 = 2 * log(cutoff);
    this.cut2 = cutoff * cutoff;
    this.largestAlphaS = coupling.atLog(this.lnCut2);
    this.rescaling = Float64Array.from([3, 4, 5], (n) => (options.cmw ? softGluonK(n) / (2 * PI) : 0));
    this.windows = new TrialWindows(
      (lnMu2) => {
        const alphaS = coupling.atLog(lnMu2);
        return alphaS * (1 + this.rescaling[coupling.flavoursAt(lnMu2) - 3] * alphaS);
      },
      this.lnCut2,
      log(sqrtS / cutoff) + 0.01,
      evolution,
    );
    for (let kind = 0; kind < KINDS; kind++) {
      const gluon = kind === 0;
      this.masses[kind] = kind > 0 && kind < 6 ? options.mass(kind) : 0;
      this.softWeight[kind] = (evolution.stretch * 2 * (gluon ? CA : CF)) / PI;
      this.flatWeight[kind] = gluon ? (this.largestAlphaS * flavours * TR) / PI : 0;
      // z^2 (1-z)^2 qt^2 > (1-z)^2 m^2 needs qt > m
      const dead = this.angle && this.masses[kind] > cutoff ? log(this.masses[kind] / cutoff) : 0;
      this.lowest[kind] = Math.max(evolution.lowest, dead);
      this.lowestIntegral[kind] =
        this.softWeight[kind] * this.windows.secondAt(this.lowest[kind]) +
        this.flatWeight[kind] * this.lowest[kind];
    }
  }

  /** Put a new node at the upper end of its gap. */
  begin(tree: BranchingTree, node: number): void {
    const id = Math.abs(tree.id[node]);
    const kind = id === GLUON ? 0 : id;
    const mass = tree.mass[node];
    const tau = this.angle ? tree.start[node] : tree.start[node] - mass * mass;
    // most daughters cannot branch: no logarithm for them
    const least = this.angle ? 16 * this.cut2 : 4 * this.cut2;
    tree.position[node] = tau > least ? evolutionPlace(tau, this.lnCut2) : this.lowest[kind];
  }

  /**
   * Find the next branching of a node below its `position`, and leave it in the tree.
   *
   * One long function for the reason that DipoleSampler.next gives. Called again on a node, it refuses what it found
   * and evolves on from there.
   *
   * @returns false where the node branches no more down to the lowest t; `t` is then 0.
   */
  find(tree: BranchingTree, node: number, random: Philox, listener: LineListener | null): boolean {
    const { angle, windows, masses, lnCut2 } = this;
    const { coupling, cmw, angularBound, flavours } = this.options;
    const { edge, bound, first, second } = windows;
    const id = Math.abs(tree.id[node]);
    const gluon = id === GLUON;
    const kind = gluon ? 0 : id;
    let u = tree.position[node];
    tree.t[node] = 0;
    if (u <= this.lowest[kind]) return false;
    const mass2 = tree.mass[node] * tree.mass[node];
    const cS = this.softWeight[kind];
    const cF = this.flatWeight[kind];
    const least = this.lowestIntegral[kind];
    const largest = this.largestAlphaS;
    const stretch = angle ? 1 : 2;
    const lnRange = angularBound ? log((tree.fraction[node] * this.options.sqrtS) / this.options.cutoff) : 0;

    let k = 0;
    while (k + 1 < windows.count && edge[k + 1] <= u) k++;
    let x = u - edge[k];
    // Lambda(u) = cS T(u) + cF u, the integral of the overestimate; a trial takes -ln R from it
    let lambda = cS * (second[k] + x * (first[k] + 0.5 * bound[k] * x)) + cF * u;
    let rejected = tree.rejected[node];
    random.startAt(tree.word[node], tree.draw[node] + rejected);
    random.block();
    for (;;) {
      const wordDistance = random.x0;
      const wordChoice = random.x1;
      const wordFraction = random.x2;
      const wordDecision = random.x3;
      // the next trial's numbers beside this one's logarithms; after an accepted trial they are the azimuth's
      random.block();
      lambda += log(uniform(wordDistance));
      if (!(lambda > least)) {
        tree.rejected[node] = rejected;
        tree.position[node] = this.lowest[kind];
        return false;
      }
      // solve Lambda(u) = lambda in the window that holds it
      let below = cS * second[k] + cF * edge[k];
      while (below >= lambda && k > 0) {
        k--;
        below = cS * second[k] + cF * edge[k];
      }
      const slope = cS * first[k] + cF;
      const distance = lambda - below;
      const weight = Math.sqrt(slope * slope + 2 * cS * bound[k] * distance);
      x = (2 * distance) / (slope + weight);
      u = edge[k] + x;

      const share = uniform(wordChoice) * weight;
      const softShare = weight - cF;
      let reason = -1;
      let ratio = NaN;
      let channel = G_QQ;
      let z: number;
      let lnPt: number;
      let alphaS = 0;
      if (share < softShare) {
        // rate cS S(u): v where the first integral is share/cS
        const integral = share / cS;
        let n = k;
        while (n > 0 && first[n] > integral) n--;
        const v = edge[n] + (integral - first[n]) / bound[n];
        const wide = exp(stretch * (v - u));
        const larger = 1 / (1 + wide);
        const kappa = larger * larger * wide;
        const excess = log(1 + wide);
        lnPt = v - (angle ? 2 : 1) * excess;
        channel = gluon ? G_GG : Q_QG;
        const threshold = gluon ? 0.5 : (larger * (1 + larger * larger)) / (2 - 3 * kappa);
        // 1 - (1 - larger) is exact: z and 1 - z are known to each other
        z = uniform(wordFraction) < threshold ? larger : 1 - larger;
        if (lnPt < 0) reason = CUTOFF;
        else if (angularBound && 2 * u - v + excess >= lnRange) reason = ANGULAR_VETO;
        else {
          alphaS = coupling.atLog(lnCut2 + 2 * lnPt);
          if (cmw) alphaS *= 1 + this.rescaling[coupling.flavoursAt(lnCut2 + 2 * lnPt) - 3] * alphaS;
          const slower = alphaS / bound[n];
          const kernel = gluon ? (1 - kappa) * (1 - kappa) : 1 - 1.5 * kappa;
          ratio = slower * kernel;
          if (mass2 > 0) {
            // P/P(m = 0) = 1 - 2 m^2 (1-z)/(M^2 (1+z^2))
            const tau = exp(lnCut2 + 2 * u);
            const pairMass2 = angle ? z * (1 - z) * tau : tau;
            ratio *= Math.max(0, 1 - (2 * mass2 * (1 - z)) / (pairMass2 * (1 + z * z)));
          }
          const decision = uniform(wordDecision);
          if (decision >= ratio) reason = decision >= slower ? COUPLING : KERNEL;
        }
      } else {
        z = uniform(wordFraction);
        const kappa = z * (1 - z);
        const lnKappa = log(kappa);
        lnPt = u + (angle ? 1 : 0.5) * lnKappa;
        if (lnPt < 0) reason = CUTOFF;
        else if (angularBound && u - 0.5 * lnKappa >= lnRange) reason = ANGULAR_VETO;
        else {
          alphaS = coupling.atLog(lnCut2 + 2 * lnPt);
          const slower = alphaS / largest;
          ratio = slower * (1 - 2 * kappa);
          const quark = Math.min(flavours, 1 + Math.floor(((share - softShare) / cF) * flavours));
          const heavy2 = masses[quark] * masses[quark];
          if (heavy2 > 0) {
            const tau = exp(lnCut2 + 2 * u);
            const pairMass2 = angle ? kappa * tau : tau;
            const pT2 = kappa * pairMass2 - heavy2;
            if (pT2 < this.cut2) {
              reason = CUTOFF;
              ratio = NaN;
            } else ratio = slower * (1 - 2 * kappa + (2 * heavy2) / pairMass2);
          }
          const decision = uniform(wordDecision);
          if (reason < 0 && decision >= ratio) reason = decision >= slower ? COUPLING : KERNEL;
          tree.flavour[node] = quark;
          tree.flavourMass[node] = masses[quark];
        }
      }

      if (reason < 0) {
        // what is recorded is made from the recorded z and t, so that each follows from the others
        const tau = exp(lnCut2 + 2 * u);
        const w = 1 - z;
        const t = Math.min(angle ? tau : tau + mass2, tree.start[node]);
        const massive2 = channel === G_QQ ? tree.flavourMass[node] * tree.flavourMass[node] : w * w * mass2;
        const pT2 = (angle ? z * w * z * w * t : z * w * (t - mass2)) - massive2;
        if (pT2 < this.cut2) {
          reason = CUTOFF;
          ratio = NaN;
        } else {
          if (channel !== G_QQ) tree.flavour[node] = 0;
          tree.t[node] = t;
          tree.z[node] = z;
          tree.kT[node] = Math.sqrt(pT2);
          tree.azimuth[node] = 2 * PI * uniform(random.x0);
          tree.side[node] = gluon ? random.x1 & 1 : tree.id[node] > 0 ? 0 : 1;
          tree.newWord[node] = random.x2;
          tree.newDraw[node] = random.x3;
          tree.alphaS[node] = alphaS;
          tree.ratio[node] = ratio;
          tree.channel[node] = channel;
          tree.rejected[node] = rejected;
          tree.position[node] = u;
          return true;
        }
      }
      rejected++;
      if (listener !== null)
        listener.reject(node, exp(lnCut2 + 2 * u) + (angle ? 0 : mass2), z, channel, reason, ratio);
    }
  }

  /** Count what was found for a node as one more rejected trial: `find` then evolves on from there. */
  refuse(tree: BranchingTree, node: number): void {
    tree.rejected[node]++;
  }
}

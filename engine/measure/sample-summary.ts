import { type History, KINDS, ROLES } from '../history/index.ts';
import { durham, jetCount } from './durham.ts';
import { finalMomenta } from './final-momenta.ts';
import { type FractionSpectrum, FractionSpectrumCollector } from './fraction-spectrum.ts';
import { measureSteps } from './measure-steps.ts';
import { type Estimate, RatioMean } from './ratio-mean.ts';
import type { StepMeasures } from './step-measures.ts';
import { thrust } from './thrust.ts';

/** Jet resolutions of a summary unless others are asked for. */
export const DEFAULT_Y_CUTS: readonly number[] = [0.1, 0.03, 0.01, 0.003, 0.001];

const ONE_TO_TWO = KINDS.indexOf('one-to-two');
const EMITTER = ROLES.indexOf('emitter');
const EMISSION = ROLES.indexOf('emission');
const CHARM = 4;
const BOTTOM = 5;

/** Quantities of an event: their mean is over events. */
const EVENT_KEYS = [
  'partons',
  'steps',
  'steps.q_qg',
  'steps.g_gg',
  'steps.g_qq',
  'steps.g_cc',
  'steps.g_bb',
  'oneMinusThrust',
  'noBranching',
] as const;
/** Quantities of a step: their mean is over steps. */
const STEP_KEYS = ['rejectedPerStep', 'coherence.aboveBirth', 'coherence.abovePartner'] as const;
/** Jet rates, an object by y_cut each, in the order of the number of jets from 2 on. */
const JET_KEYS = ['durham.R2', 'durham.R3', 'durham.R4', 'durham.R5'] as const;

type EventKey = (typeof EVENT_KEYS)[number];
type StepKey = (typeof STEP_KEYS)[number];
type JetKey = (typeof JET_KEYS)[number];

/** Means of a sample under the names of the command line's `summary --json`; the dots are part of the names. */
export type SampleSummaryResult = { readonly [K in EventKey | StepKey]: Estimate } & {
  /** By y_cut, as JavaScript prints the number. */
  readonly [K in JetKey]: Readonly<Record<string, Estimate>>;
} & { readonly lnInverseX: FractionSpectrum };

/**
 * Means over a sample with their statistical errors, event by event, without keeping the events.
 *
 * `error` is the standard error of the mean. Events are the independent units and count with their weights; where a
 * value is a mean over steps (`rejectedPerStep` and the coherence fractions, whose `count` is steps) it is the ratio
 * of two sums over events, with the error of such a ratio. A step whose quantity is not recorded or cannot be measured
 * is left out; where all are, mean and error are NaN (null in JSON) and count is 0.
 * R_n is the fraction of events with exactly n jets. Every event counts, whatever its status.
 */
export class SampleSummary {
  private readonly yCuts: readonly number[];
  private readonly perEvent = meansOf(EVENT_KEYS);
  private readonly perStep = meansOf(STEP_KEYS);
  private readonly jets: Record<JetKey, RatioMean[]>;
  private readonly spectrum = new FractionSpectrumCollector();
  private measures: StepMeasures | undefined;
  private momenta: Float64Array = new Float64Array(0);

  /** @param yCuts resolutions of the jet rates, each above 0. @throws RangeError for one that is not. */
  constructor(yCuts: readonly number[] = DEFAULT_Y_CUTS) {
    for (const yCut of yCuts)
      if (!(yCut > 0)) throw new RangeError(`y_cut ${yCut}: expected a number above 0`);
    this.yCuts = yCuts;
    const perCut = () => yCuts.map(() => new RatioMean());
    this.jets = {
      'durham.R2': perCut(),
      'durham.R3': perCut(),
      'durham.R4': perCut(),
      'durham.R5': perCut(),
    };
  }

  /** Count one event. */
  add(history: History): void {
    const { weight, sqrtS } = history.head;
    const momenta = finalMomenta(history, this.momenta);
    if (momenta.length > this.momenta.length) this.momenta = momenta;
    this.addCounts(history, momenta.length / 4);
    this.count('oneMinusThrust', 1 - thrust(momenta).value, weight);
    this.addJets(momenta, sqrtS, weight);
    this.addFractions(history);
    this.spectrum.add(momenta, sqrtS, weight);
  }

  /** Means so far. */
  result(): SampleSummaryResult {
    const jets = JET_KEYS.map((key) => [
      key,
      Object.fromEntries(this.jets[key].map((mean, cut) => [String(this.yCuts[cut]), mean.estimate()])),
    ]);
    return {
      ...estimatesOf(this.perEvent),
      ...estimatesOf(this.perStep),
      ...(Object.fromEntries(jets) as Record<JetKey, Record<string, Estimate>>),
      lnInverseX: this.spectrum.spectrum(),
    };
  }

  /** A value that an event does not have (thrust of nothing) leaves the event out. */
  private count(key: EventKey, value: number, weight: number): void {
    if (Number.isFinite(value)) this.perEvent[key].add(weight * value, weight, 1);
  }

  private addCounts(history: History, partons: number): void {
    const { steps, entries, channels, head } = history;
    const { weight } = head;
    const gluonSplits = channels.indexOf('g_qq');
    const perChannel = new Int32Array(channels.length);
    let charm = 0;
    let bottom = 0;
    for (let step = 0; step < steps.length; step++) {
      const channel = steps.channel[step];
      perChannel[channel]++;
      if (channel !== gluonSplits) continue;
      const flavour = Math.abs(entries.id[steps.i[step]]);
      if (flavour === CHARM) charm++;
      if (flavour === BOTTOM) bottom++;
    }
    const named = (channel: string): number => perChannel[channels.indexOf(channel)] ?? 0;
    this.count('partons', partons, weight);
    this.count('steps', steps.length, weight);
    this.count('steps.q_qg', named('q_qg'), weight);
    this.count('steps.g_gg', named('g_gg'), weight);
    this.count('steps.g_qq', named('g_qq'), weight);
    this.count('steps.g_cc', charm, weight);
    this.count('steps.g_bb', bottom, weight);
    this.count('noBranching', steps.length === 0 ? 1 : 0, weight);
  }

  private addJets(momenta: Float64Array, sqrtS: number, weight: number): void {
    const transitions = durham(momenta, sqrtS);
    for (let cut = 0; cut < this.yCuts.length; cut++) {
      const jets = jetCount(transitions, this.yCuts[cut]);
      for (let n = 0; n < JET_KEYS.length; n++)
        this.jets[JET_KEYS[n]][cut].add(jets === n + 2 ? weight : 0, weight, 1);
    }
  }

  /** Means over steps. A hard parton's own birth angle is pi, so in coherent branching its steps say nothing. */
  private addFractions(history: History): void {
    const { steps, entries, head } = history;
    const measures = measureSteps(history, this.measures);
    this.measures = measures;
    const { openingAngle, birthAngle, partnerAngle } = measures;
    let rejected = 0;
    let recorded = 0;
    let aboveBirth = 0;
    let withBirth = 0;
    let abovePartner = 0;
    let withPartner = 0;
    for (let step = 0; step < steps.length; step++) {
      if (steps.rejected[step] >= 0) {
        rejected += steps.rejected[step];
        recorded++;
      }
      // coherent: the steps whose emitter came from a step, not from the hard process as a reconstructed jet root
      const role = entries.role[steps.emitter[step]];
      const assessable = steps.kind[step] !== ONE_TO_TWO || role === EMITTER || role === EMISSION;
      if (assessable && openingAngle[step] >= 0 && birthAngle[step] >= 0) {
        withBirth++;
        if (openingAngle[step] > birthAngle[step]) aboveBirth++;
      }
      if (openingAngle[step] >= 0 && partnerAngle[step] >= 0) {
        withPartner++;
        if (openingAngle[step] > partnerAngle[step]) abovePartner++;
      }
    }
    const { weight } = head;
    const { perStep } = this;
    perStep.rejectedPerStep.add(weight * rejected, weight * recorded, recorded);
    perStep['coherence.aboveBirth'].add(weight * aboveBirth, weight * withBirth, withBirth);
    perStep['coherence.abovePartner'].add(weight * abovePartner, weight * withPartner, withPartner);
  }
}

function meansOf<K extends string>(keys: readonly K[]): Record<K, RatioMean> {
  return Object.fromEntries(keys.map((key) => [key, new RatioMean()])) as Record<K, RatioMean>;
}

function estimatesOf<K extends string>(means: Record<K, RatioMean>): Record<K, Estimate> {
  const entries = Object.entries<RatioMean>(means);
  return Object.fromEntries(entries.map(([key, mean]) => [key, mean.estimate()])) as Record<K, Estimate>;
}

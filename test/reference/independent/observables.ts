import { durhamTransitions, jetCount } from './durham.ts';
import { thrustByPlanes } from './thrust.ts';
import { type Four, space } from './vectors.ts';

export interface Estimate {
  readonly mean: number;
  /** Standard error of the mean. */
  readonly error: number;
  readonly count: number;
}

/** Mean of one number an event. */
export class EventMean {
  private n = 0;
  private sum = 0;
  private squares = 0;

  add(value: number): void {
    this.n++;
    this.sum += value;
    this.squares += value * value;
  }

  estimate(): Estimate {
    const mean = this.sum / this.n;
    const variance = Math.max(0, this.squares / this.n - mean * mean);
    return { mean, error: Math.sqrt(variance / (this.n - 1)), count: this.n };
  }
}

/** Fraction of steps, with the error that follows from the fluctuation of both counts from event to event. */
export class StepFraction {
  private hits = 0;
  private steps = 0;
  private hh = 0;
  private hs = 0;
  private ss = 0;

  add(hits: number, steps: number): void {
    this.hits += hits;
    this.steps += steps;
    this.hh += hits * hits;
    this.hs += hits * steps;
    this.ss += steps * steps;
  }

  estimate(): Estimate {
    const r = this.hits / this.steps;
    const squares = Math.max(0, this.hh - 2 * r * this.hs + r * r * this.ss);
    return { mean: r, error: Math.sqrt(squares) / this.steps, count: this.steps };
  }
}

/** What the observables need of a step, whoever made it. */
export interface MeasuredStep {
  readonly channel: 'q_qg' | 'g_gg' | 'g_qq';
  /** PDG number of the quark of g -> q qbar, otherwise 0. */
  readonly pair: number;
  readonly openingAngle: number;
  readonly birthAngle: number;
  readonly partnerAngle: number;
}

/** The default y_cut values of `summary`. */
export const Y_CUTS = [0.1, 0.03, 0.01, 0.003, 0.001] as const;
/** Upper edges of unit-wide bins of ln(1/x), x = 2E/sqrt(s); the last is open. */
export const LN_INVERSE_X_BINS = 9;

/** Sample means of the keys of `summary`, from momenta and angles, with this folder's own thrust and clustering. */
export class Observables {
  private readonly means = new Map<string, EventMean>();
  private readonly fractions = new Map<string, StepFraction>();
  readonly sqrtS: number;

  constructor(sqrtS: number) {
    this.sqrtS = sqrtS;
  }

  private put(key: string, value: number): void {
    let mean = this.means.get(key);
    if (!mean) {
      mean = new EventMean();
      this.means.set(key, mean);
    }
    mean.add(value);
  }

  private putFraction(key: string, hits: number, steps: number): void {
    let fraction = this.fractions.get(key);
    if (!fraction) {
      fraction = new StepFraction();
      this.fractions.set(key, fraction);
    }
    fraction.add(hits, steps);
  }

  add(momenta: readonly Four[], steps: readonly MeasuredStep[]): void {
    const count = (test: (s: MeasuredStep) => boolean): number => steps.filter(test).length;
    this.put('partons', momenta.length);
    this.put('steps', steps.length);
    for (const channel of ['q_qg', 'g_gg', 'g_qq'] as const) {
      this.put(
        `steps.${channel}`,
        count((s) => s.channel === channel),
      );
    }
    this.put(
      'steps.g_cc',
      count((s) => s.pair === 4),
    );
    this.put(
      'steps.g_bb',
      count((s) => s.pair === 5),
    );
    this.put('noBranching', steps.length === 0 ? 1 : 0);
    this.put('oneMinusThrust', 1 - thrustByPlanes(momenta.map(space)));
    this.putFraction(
      'coherence.aboveBirth',
      count((s) => s.openingAngle > s.birthAngle),
      steps.length,
    );
    this.putFraction(
      'coherence.abovePartner',
      count((s) => s.openingAngle > s.partnerAngle),
      steps.length,
    );
    const transitions = durhamTransitions(momenta, this.sqrtS);
    for (const yCut of Y_CUTS) {
      const jets = jetCount(transitions, yCut);
      for (let n = 2; n <= 5; n++) this.put(`durham.R${n} ${yCut}`, jets === n ? 1 : 0);
    }
    const bins = new Array<number>(LN_INVERSE_X_BINS).fill(0);
    for (const p of momenta) {
      bins[Math.min(LN_INVERSE_X_BINS - 1, Math.max(0, Math.floor(Math.log(this.sqrtS / (2 * p[3])))))]++;
    }
    bins.forEach((n, bin) => {
      this.put(`lnInverseX ${bin}`, n);
    });
  }

  /** Every mean so far under its name in `summary` (jet rates and histogram bins after a blank). */
  estimates(): Map<string, Estimate> {
    const all = new Map<string, Estimate>();
    for (const [key, mean] of this.means) all.set(key, mean.estimate());
    for (const [key, fraction] of this.fractions) all.set(key, fraction.estimate());
    return all;
  }
}

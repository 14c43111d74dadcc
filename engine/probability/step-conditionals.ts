import { CHANNELS, type History } from '../history/index.ts';
import { log } from '../math/index.ts';
import type { Competitors } from './competitors.ts';
import type { DipoleEnd, DipoleKernels, EndFamily } from './dipole-kernels.ts';
import { demandDipoles } from './gap-probabilities.ts';
import type { LiveDipoles } from './live-dipoles.ts';
import { G_GG, G_QQ } from './z-density.ts';

// scratch, not reentrant
const whole = new Float64Array(3);
const part = new Float64Array(3);

/**
 * What is uniform of each step given its t, index = step; NaN where the step cannot be judged: its dipole is not among
 * those of the rows, or the author's z is none of our words.
 */
export interface StepConditionals {
  readonly assessable: true;
  /** Cumulative distribution of z at the step's t, dipole end and channel (flavour included): u_z; 0 or 1 outside phase space. */
  readonly fractionBelow: Float64Array;
  /** Probability, at this t, of the competitors that stand before the step's own: see Competitors. */
  readonly shareBelow: Float64Array;
  /** Probability of its own. u_channel = shareBelow + V shareOwn with V uniform. */
  readonly shareOwn: Float64Array;
  /** Sum of all rates per unit of ln t. */
  readonly totalRate: Float64Array;
}

/**
 * The conditional probabilities of every step.
 *
 * Accuracy: fractionBelow 1e-7, by quadrature at the step's own t; shares 1e-5, from the slopes of the tables.
 */
export function judgeConditionals(
  history: History,
  kernels: DipoleKernels,
  dipoles: LiveDipoles,
  competitors: Competitors,
): StepConditionals {
  const { steps } = history;
  const out: StepConditionals = {
    assessable: true,
    fractionBelow: new Float64Array(steps.length).fill(NaN),
    shareBelow: new Float64Array(steps.length).fill(NaN),
    shareOwn: new Float64Array(steps.length).fill(NaN),
    totalRate: new Float64Array(steps.length).fill(NaN),
  };
  dipoles.begin(history);
  for (let step = 0; step < steps.length; step++) {
    const first = step === 0 && kernels.first() !== null;
    if (steps.t[step] > 0 && demandDipoles(dipoles, history, kernels, first)) {
      competitors.fill(history.entries, dipoles, kernels, log(steps.t[step]), first);
      judgeStep(out, history, step, kernels, dipoles, competitors, first);
    }
    dipoles.advance(step);
  }
  return out;
}

function judgeStep(
  out: StepConditionals,
  history: History,
  step: number,
  kernels: DipoleKernels,
  dipoles: LiveDipoles,
  all: Competitors,
  first: boolean,
): void {
  const { entries, steps } = history;
  const channel = steps.channel[step];
  const emitter = steps.emitter[step];
  const partner = steps.partner[step];
  const flavour = channel === G_QQ ? Math.abs(entries.id[steps.i[step]]) : 0;
  out.totalRate[step] = all.total;
  let below = 0;
  let own = 0;
  let tag = 0;
  for (let n = 0; n < all.count; n++) {
    const mine =
      all.emitter[n] === emitter &&
      all.partner[n] === partner &&
      all.channel[n] === channel &&
      all.flavour[n] === flavour &&
      // two gluons that share both lines: the emission says through which, a splitting does not
      (channel !== G_GG || (all.throughColour[n] === 1) === radiatesThroughColour(history, step));
    if (mine) {
      own += all.rate[n];
      tag = all.throughColour[n] === 1 ? entries.colour[emitter] : entries.anticolour[emitter];
    } else if (own === 0) below += all.rate[n];
  }
  if (own === 0) return;
  out.shareBelow[step] = below / all.total;
  out.shareOwn[step] = own / all.total;
  const end: DipoleEnd = {
    channel: CHANNELS[channel],
    emitter: entries.id[emitter],
    partner: entries.id[partner],
    flavour,
    q2: dipoles.q2[dipoles.ofTag(tag)],
    first,
  };
  out.fractionBelow[step] = fractionBelow(history, step, kernels.familyOf(end), channel, end.q2);
}

/** Whether an emitted gluon j took over the emitter's colour: i (c', a), j (c, c'). */
function radiatesThroughColour({ entries, steps }: History, step: number): boolean {
  return entries.colour[steps.j[step]] === entries.colour[steps.emitter[step]];
}

function fractionBelow(
  { head, steps }: History,
  step: number,
  { rates }: EndFamily,
  channel: number,
  q2: number,
): number {
  const { meaning } = head;
  if (meaning.z !== 'emitter light-cone' && meaning.z !== 'emission light-cone') return NaN;
  const ours = meaning.z === 'emitter light-cone';
  const z = ours ? steps.z[step] : 1 - steps.z[step];
  const w = ours ? 1 - steps.z[step] : steps.z[step];
  if (!(z > 0 && w > 0)) return NaN;
  const place = rates.channels.indexOf(channel);
  rates.rates(whole, steps.t[step], q2);
  rates.ratesBelow(part, steps.t[step], q2, z, w);
  return whole[place] > 0 ? part[place] / whole[place] : NaN;
}

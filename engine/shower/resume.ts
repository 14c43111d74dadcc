import {
  CHANNELS,
  ENTRY_COLUMNS,
  type History,
  type HistoryBatch,
  ROLES,
  type SampleHead,
  STEP_COLUMNS,
} from '../history/index.ts';
import type { HardProcess } from '../processes/index.ts';
import type { Branching } from './dipole-record.ts';
import { G_QQ } from './dipole-sampler.ts';
import type { DipoleState } from './dipole-state.ts';

const HARD = ROLES.indexOf('hard');

/** A history that cannot be continued. */
export class RegrowError extends Error {
  readonly code = 'regrow';
  constructor(
    readonly found: string,
    readonly expected: string,
  ) {
    super(`regrow: found ${found}, expected ${expected}`);
  }
}

/** Refuse a history whose kept steps these settings could not have made. */
export function demandRegrowable(sample: SampleHead, original: History, keep: number): void {
  const { head, steps, channels } = original;
  const steady = steps.length - 1;
  if (!(Number.isInteger(keep) && keep >= -1 && keep <= steady))
    throw new RegrowError(`step ${keep}`, `a step from -1 to ${steady}, which is what the event has`);
  if (head.evolutionVariable !== sample.evolutionVariable)
    throw new RegrowError(
      `evolution in ${head.evolutionVariable}`,
      `${sample.evolutionVariable}, the evolution variable of the settings`,
    );
  if (head.process.name !== sample.process.name || head.sqrtS !== sample.sqrtS)
    throw new RegrowError(
      `${head.process.name} at ${head.sqrtS} GeV`,
      `${sample.process.name} at ${sample.sqrtS} GeV as the settings say`,
    );
  for (let step = 0; step <= keep; step++)
    if (steps.channel[step] >= CHANNELS.length)
      throw new RegrowError(
        `channel ${channels[steps.channel[step]]} in step ${step}`,
        `one of ${CHANNELS.join(', ')}`,
      );
  if (keep >= 0 && !(steps.t[keep] > sample.tLow))
    throw new RegrowError(
      `step ${keep} at t = ${steps.t[keep]} GeV^2`,
      `more than ${sample.tLow} GeV^2, where the settings end the evolution`,
    );
}

/** Take the partons of the hard process from the rows of a history. */
export function takeHardPartons(process: HardProcess, original: History): void {
  const { entries } = original;
  let parton = 0;
  for (let row = 0; row < entries.length && parton < 2; row++) {
    if (entries.role[row] !== HARD) continue;
    process.outgoing[parton] = entries.id[row];
    process.masses[parton] = entries.m[row];
    process.momenta[4 * parton] = entries.px[row];
    process.momenta[4 * parton + 1] = entries.py[row];
    process.momenta[4 * parton + 2] = entries.pz[row];
    process.momenta[4 * parton + 3] = entries.e[row];
    parton++;
  }
  if (parton < 2) throw new RegrowError(`${parton} partons of the hard process`, '2');
}

/** What the shower claimed of a recorded step, and the dipole of the present state that it belongs to. */
export function takeRecorded(
  branching: Branching,
  state: DipoleState,
  original: History,
  step: number,
): void {
  const { entries, steps } = original;
  const emitter = slotOf(state, steps.emitter[step], step);
  const partner = slotOf(state, steps.partner[step], step);
  const dipole = state.colourDipole[emitter];
  const j = steps.j[step];
  const splitting = steps.channel[step] === G_QQ;
  let fromColourEnd = dipole >= 0 && state.anticolourEnd[dipole] === partner;
  // between two gluons that share both lines the emission's tags tell which of them radiated
  const other = state.anticolourDipole[emitter];
  const both = fromColourEnd && other >= 0 && state.colourEnd[other] === partner;
  if (both && !splitting) fromColourEnd = entries.colour[j] === state.colour[emitter];
  branching.fromColourEnd = fromColourEnd;
  branching.dipole = fromColourEnd ? dipole : other;
  branching.channel = steps.channel[step];
  branching.flavour = splitting ? -entries.id[j] : 0;
  branching.quarkMass = splitting ? entries.m[j] : 0;
  branching.t = steps.t[step];
  branching.z = steps.z[step];
  branching.y = steps.y[step];
  branching.kT = steps.kT[step];
  branching.azimuth = steps.azimuth[step];
  branching.alphaS = steps.alphaS[step];
  branching.ratio = steps.ratio[step];
  branching.rejected = steps.rejected[step];
}

function slotOf(state: DipoleState, row: number, step: number): number {
  for (let slot = 0; slot < state.partons; slot++) if (state.row[slot] === row) return slot;
  throw new RegrowError(`entry ${row} in step ${step}, which does not live then`, 'a living parton');
}

/** Trials before the steps that are kept. */
export function copyTrials(batch: HistoryBatch, original: History, keep: number): void {
  const { trials } = batch;
  const from = original.trials;
  if (trials === null || from === null) return;
  for (let row = 0; row < from.length && from.before[row] <= keep; row++) {
    batch.reserve(0, 0, 1);
    const at = trials.length++;
    trials.before[at] = from.before[row];
    trials.t[at] = from.t[row];
    trials.z[at] = from.z[row];
    trials.channel[at] = from.channel[row];
    trials.emitter[at] = from.emitter[row];
    trials.partner[at] = from.partner[row];
    trials.reason[at] = from.reason[row];
    trials.ratio[at] = from.ratio[row];
  }
}

/** Refuse a history whose kept rows this engine does not make to the bit: it is another program's, or was changed. */
export function demandSameRows(
  batch: HistoryBatch,
  entryBase: number,
  stepBase: number,
  original: History,
  keep: number,
): void {
  for (const { name } of STEP_COLUMNS) {
    if (name === 'noEmission') continue;
    for (let step = 0; step <= keep; step++)
      demandSame(`${name} of step ${step}`, original.steps[name][step], batch.steps[name][stepBase + step]);
  }
  const rows = batch.entries.length - entryBase;
  for (const { name } of ENTRY_COLUMNS) {
    if (name === 'endedBy') continue;
    for (let row = 0; row < rows; row++)
      demandSame(
        `${name} of entry ${row}`,
        original.entries[name][row],
        batch.entries[name][entryBase + row],
      );
  }
}

function demandSame(place: string, found: number, made: number): void {
  if (!Object.is(found, made))
    throw new RegrowError(`${place}: ${found}`, `${made}, as this engine makes it`);
}

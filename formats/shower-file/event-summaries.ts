import {
  type HistoryBatch,
  measureSteps,
  ROLES,
  type SampleHead,
  StepMeasures,
  worstCoherence,
} from '../../engine/index.ts';
import { FileBatch } from './file-batch.ts';

/** Summary columns of events, one element an event. What is not known is NaN or, in whole numbers, -1. */
export interface EventSummaries {
  /** Number of the first event in the file. */
  readonly first: number;
  readonly count: number;
  /** Steps. */
  readonly branchings: Int32Array;
  /** Rows of the final state. */
  readonly finalPartons: Int32Array;
  /** Largest kT of a step as claimed [GeV]; NaN without steps. */
  readonly hardestKT: Float64Array;
  /**
   * Largest coherence ratio of a step: opening angle over partner angle in a dipole shower, over birth angle where t falls
   * along each line; NaN without steps.
   */
  readonly worstCoherence: Float64Array;
  readonly weight: Float64Array;
  /** Number of findings by severity; empty before an audit has written its counts. */
  readonly findings: Readonly<Record<string, Float64Array>>;
  /** Tail probability; all NaN before it was written. */
  readonly oddness: Float64Array;
  /** Columns that this version does not know. */
  readonly unknown: Readonly<Record<string, Float64Array>>;
}

/** The summary columns that follow from the events alone. */
export type ChunkSummaries = Pick<
  EventSummaries,
  'branchings' | 'finalPartons' | 'hardestKT' | 'worstCoherence' | 'weight'
> & {
  /** Columns that came with the events from another file, by their name in the index. */
  readonly carried: Readonly<Record<string, Float64Array>>;
};

const NOT_FINAL = new Set([ROLES.indexOf('incoming'), ROLES.indexOf('resonance')]);

// scratch, not reentrant
let measures = new StepMeasures(64);

/** Summaries of events `from` to `to` of a batch. */
export function summarise(sample: SampleHead, batch: HistoryBatch, from: number, to: number): ChunkSummaries {
  const count = to - from;
  const branchings = new Int32Array(count);
  const finalPartons = new Int32Array(count);
  const hardestKT = new Float64Array(count);
  const worst = new Float64Array(count);
  const has = (name: string) => sample.columns.entries.includes(name);
  const endsKnown = has('endedBy') && has('role');
  const byLine = sample.ordering === 'line';
  for (let k = 0; k < count; k++) {
    const n = from + k;
    const firstStep = batch.stepStart[n];
    const lastStep = batch.stepStart[n + 1];
    branchings[k] = lastStep - firstStep;
    finalPartons[k] = endsKnown ? countFinal(batch, n) : -1;
    hardestKT[k] = largest(batch.steps.kT, firstStep, lastStep);
    if (byLine) {
      measures = measureSteps(batch.view(n), measures);
      worst[k] = largest(measures.coherenceBirth, 0, measures.length);
    } else worst[k] = worstCoherence(batch, n);
  }
  const weight = Float64Array.from(batch.events.slice(from, to), (head) => head.weight);
  return {
    branchings,
    finalPartons,
    hardestKT,
    worstCoherence: worst,
    weight,
    carried: carriedBy(batch, from, to),
  };
}

function carriedBy(batch: HistoryBatch, from: number, to: number): Record<string, Float64Array> {
  const carried: Record<string, Float64Array> = {};
  if (!(batch instanceof FileBatch)) return carried;
  for (const [name, column] of Object.entries(batch.summaries)) carried[name] = column.slice(from, to);
  return carried;
}

function countFinal(batch: HistoryBatch, n: number): number {
  const { endedBy, role } = batch.entries;
  let count = 0;
  for (let row = batch.entryStart[n]; row < batch.entryStart[n + 1]; row++) {
    if (endedBy[row] === -1 && !NOT_FINAL.has(role[row])) count++;
  }
  return count;
}

/** The largest number of a stretch of a column, NaN where there is none. */
function largest(column: Float64Array, start: number, end: number): number {
  let most = NaN;
  for (let k = start; k < end; k++) {
    if (column[k] > most || (Number.isNaN(most) && !Number.isNaN(column[k]))) most = column[k];
  }
  return most;
}

import type { History, SampleHead } from '../../engine/index.ts';

/** Typed columns of the file's index for a range of events; NaN or −1 where the file holds none. */
export interface SummaryColumns {
  readonly branchings: ArrayLike<number>;
  readonly finalPartons: ArrayLike<number>;
  /** Largest kT of the event's steps [GeV]. */
  readonly hardestKT: ArrayLike<number>;
  /** Largest coherence ratio of the event's steps. */
  readonly worstCoherence: ArrayLike<number>;
}

/** What the store needs of an open file: random access to events and to the columns of its index. */
export interface EventFile {
  readonly sample: SampleHead;
  readonly eventCount: number;
  event(n: number): Promise<History>;
  /** Events `from` up to, not including, `to`. */
  summaries(from: number, to: number): Promise<SummaryColumns>;
  close?(): Promise<void> | void;
}

/** A file that was opened, with what a reader has to be told as long as it is open. */
export interface OpenedFile {
  readonly file: EventFile;
  /** What is missing of a damaged file, null for a whole one. */
  readonly warning: string | null;
}

import {
  growEntries,
  growSteps,
  growTrials,
  type MutableEntries,
  type MutableSteps,
  type MutableTrials,
  makeEntries,
  makeSteps,
  makeTrials,
  viewEntries,
  viewSteps,
  viewTrials,
} from './columns.ts';
import { type EventHead, joinHead, type SampleHead } from './head.ts';
import type { History } from './history.ts';
import { BOOST_COLUMN, CHANNELS } from './schema.ts';

/**
 * Events end to end in one set of columns: what the shower writes into and what a chunk of a file holds.
 *
 * Rows `entryStart[n]` to `entryStart[n + 1]` are the entries of event n, likewise steps and trials; row and step
 * numbers inside the columns count from the start of their own event. `entries.length` (and so on) is the number of
 * rows in use; the columns themselves may be longer.
 */
export class HistoryBatch {
  readonly sample: SampleHead;
  readonly channels: string[];
  readonly events: EventHead[] = [];
  readonly entryStart: number[] = [0];
  readonly stepStart: number[] = [0];
  readonly trialStart: number[] = [0];
  readonly entries: MutableEntries = makeEntries(1024);
  readonly steps: MutableSteps;
  readonly trials: MutableTrials | null;

  constructor(sample: SampleHead, channels: readonly string[] = CHANNELS) {
    this.sample = sample;
    this.channels = [...channels];
    this.steps = makeSteps(512, sample.columns.steps.includes(BOOST_COLUMN));
    this.trials = sample.columns.trials ? makeTrials(1024) : null;
  }

  /** Make room for this many more rows; columns may be replaced, so look them up again afterwards. */
  reserve(entries: number, steps: number, trials: number): void {
    const { entries: e, steps: s, trials: t } = this;
    if (e.px.length < e.length + entries) growEntries(e, 2 * (e.length + entries));
    if (s.t.length < s.length + steps) growSteps(s, 2 * (s.length + steps));
    if (t && t.t.length < t.length + trials) growTrials(t, 2 * (t.length + trials));
  }

  /** Close the event whose rows were written behind those of the last one. */
  endEvent(head: EventHead): void {
    this.events.push(head);
    this.entryStart.push(this.entries.length);
    this.stepStart.push(this.steps.length);
    this.trialStart.push(this.trials?.length ?? 0);
  }

  /** Forget all events and keep the memory. */
  clear(): void {
    this.events.length = 0;
    this.entryStart.length = 1;
    this.stepStart.length = 1;
    this.trialStart.length = 1;
    this.entries.length = 0;
    this.steps.length = 0;
    if (this.trials) this.trials.length = 0;
  }

  /**
   * Event number `n` of the batch, sharing the batch's memory: valid until `reserve` or `clear`.
   *
   * @throws RangeError where the batch has no such event.
   */
  view(n: number): History {
    const head = this.events[n];
    if (!head) throw new RangeError(`event ${n} of a batch of ${this.events.length}`);
    return {
      head: joinHead(this.sample, head),
      entries: viewEntries(this.entries, this.entryStart[n], this.entryStart[n + 1]),
      steps: viewSteps(this.steps, this.stepStart[n], this.stepStart[n + 1]),
      trials: this.trials ? viewTrials(this.trials, this.trialStart[n], this.trialStart[n + 1]) : null,
      channels: this.channels,
    };
  }
}

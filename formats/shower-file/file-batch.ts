import { type EventHead, type History, HistoryBatch } from '../../engine/index.ts';
import type { UnknownKeys } from './fields.ts';

/** A column of the author's own: `each` numbers a row, one behind the other. */
export interface OwnColumn {
  readonly values: Float64Array | Int32Array;
  readonly each: number;
}

export const OWN_TABLES = ['entries', 'steps', 'trials'] as const;
export type OwnTable = (typeof OWN_TABLES)[number];
/** Columns of the author's own, per table and name. */
export type OwnColumns = Readonly<Record<OwnTable, Readonly<Record<string, OwnColumn>>>>;

/** An event with the columns that its author added. */
export interface FileHistory extends History {
  readonly own: OwnColumns;
}

/**
 * Events of a native file: a batch that also carries what this version does not know, so that it can be written again.
 */
export class FileBatch extends HistoryBatch {
  readonly own: Record<OwnTable, Record<string, OwnColumn>> = { entries: {}, steps: {}, trials: {} };
  /** Number that the chunk gave to its first event; another one than the event's where events before it were lost. */
  storedFirst = 0;
  /** Keys of the chunk. */
  unknown: UnknownKeys = {};
  /** Summary columns that stand in the index alone, one value an event. */
  summaries: Record<string, Float64Array> = {};

  override view(n: number): FileHistory {
    const history = super.view(n);
    const own: Record<OwnTable, Record<string, OwnColumn>> = { entries: {}, steps: {}, trials: {} };
    for (const table of OWN_TABLES) {
      const starts = rowStarts(this, table);
      for (const [name, { values, each }] of Object.entries(this.own[table])) {
        own[table][name] = { values: values.subarray(starts[n] * each, starts[n + 1] * each), each };
      }
    }
    return { ...history, own };
  }

  override clear(): void {
    super.clear();
    for (const table of OWN_TABLES) this.own[table] = {};
    this.unknown = {};
    this.summaries = {};
  }
}

/** First row of each event of a batch, and the number of rows behind the last. */
export function rowStarts(batch: HistoryBatch, table: OwnTable): readonly number[] {
  return table === 'entries' ? batch.entryStart : table === 'steps' ? batch.stepStart : batch.trialStart;
}

/** The head of an event under another number. */
export function renumbered(head: EventHead, event: number): EventHead {
  return head.event === event ? head : { ...head, event };
}

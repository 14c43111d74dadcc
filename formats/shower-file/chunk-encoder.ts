import {
  BOOST_COLUMN,
  BOOST_NUMBERS,
  type ColumnSpec,
  ENTRY_COLUMNS,
  type EventHead,
  type HistoryBatch,
  type SampleHead,
  STEP_COLUMNS,
  TRIAL_COLUMNS,
} from '../../engine/index.ts';
import { encodeMessagePack, type Packable } from '../message-pack/index.ts';
import { frameBlock } from './block.ts';
import { ChannelWords } from './channel-words.ts';
import { type ChunkSummaries, summarise } from './event-summaries.ts';
import { FileBatch, OWN_TABLES, type OwnTable, rowStarts } from './file-batch.ts';
import { GroupWriter } from './group-writer.ts';
import { MOST_CONSTANT, MOST_OWN_CONSTANT, mostInflated, mostRows, TAG_EVENTS } from './layout.ts';

/** A chunk ready for the file; a plain object, so that another thread can make it. */
export interface EncodedChunk {
  /** Number of its first event in the file. */
  readonly first: number;
  readonly events: number;
  readonly block: Uint8Array;
  readonly summaries: ChunkSummaries;
}

/** Turns events into chunks of a file. The bytes depend on the events, their numbers, and the heads of sample and file. */
export class ChunkEncoder {
  private readonly sample: SampleHead;
  private readonly channels: readonly string[];
  private readonly writer = new GroupWriter();
  private readonly present: Record<OwnTable, readonly ColumnSpec[]>;

  /** @param channels Words of the channel codes that stand in the file's head. */
  constructor(sample: SampleHead, channels: readonly string[]) {
    this.sample = sample;
    this.channels = [...channels];
    const { entries, steps, trials } = sample.columns;
    this.present = {
      entries: ENTRY_COLUMNS.filter(({ name }) => entries.includes(name)),
      steps: STEP_COLUMNS.filter(({ name }) => steps.includes(name)),
      trials: TRIAL_COLUMNS.filter(({ name }) => trials?.includes(name)),
    };
  }

  /**
   * Events `from` to `to` of a batch as the chunk that begins with event `first` of the file.
   *
   * @throws RangeError for more than 255 channels or more rows than a chunk can hold (2^24 a table).
   */
  encode(batch: HistoryBatch, from: number, to: number, first: number): EncodedChunk {
    const channels = new ChannelWords(this.channels, batch, from, to);
    const { writer } = this;
    writer.restart();
    this.addEvents(batch, from, to);
    const rows: Record<string, number> = { events: to - from };
    for (const table of OWN_TABLES) {
      if (table === 'trials' && !batch.trials) continue;
      const starts = rowStarts(batch, table);
      rows[table] = starts[to] - starts[from];
      if (rows[table] > mostRows(Infinity)) {
        throw new RangeError(`${rows[table]} rows of ${table} in ${to - from} events; 2^24 at the most`);
      }
      this.addTable(batch, table, starts[from], starts[to], channels);
    }
    let { columns, inflated } = writer.finish();
    // Rows that deflate to nearly nothing would look like a trap to a reader.
    const bytes = columns.stored.length + columns.deflated.length;
    const tooFew =
      inflated > mostInflated(bytes) || Object.values(rows).some((count) => count > mostRows(bytes));
    if (tooFew) ({ columns, inflated } = writer.finish(true));
    const unknown = batch instanceof FileBatch ? batch.unknown : {};
    const payload = encodeMessagePack({
      first,
      events: to - from,
      ...(channels.own && { channels: channels.own }),
      heads: batch.events.slice(from, to).map(packHead),
      rows,
      ...columns,
      ...(unknown as Record<string, Packable>),
    });
    return {
      first,
      events: to - from,
      block: frameBlock(TAG_EVENTS, payload),
      summaries: summarise(this.sample, batch, from, to),
    };
  }

  private addEvents(batch: HistoryBatch, from: number, to: number): void {
    const count = to - from;
    const add = (name: string, values: Float64Array | Int32Array) =>
      this.writer.add({
        table: 'events',
        name,
        values,
        start: 0,
        end: count,
        each: 1,
        mostConstant: MOST_CONSTANT,
      });
    for (const table of OWN_TABLES) {
      if (table === 'trials' && !batch.trials) continue;
      const starts = rowStarts(batch, table);
      add(
        table,
        Int32Array.from({ length: count }, (_, k) => starts[from + k + 1] - starts[from + k]),
      );
    }
    const heads = batch.events.slice(from, to);
    add(
      'stream',
      Float64Array.from(heads, ({ stream }) => stream ?? NaN),
    );
    add(
      'weight',
      Float64Array.from(heads, ({ weight }) => weight),
    );
  }

  private addTable(
    batch: HistoryBatch,
    table: OwnTable,
    start: number,
    end: number,
    channels: ChannelWords,
  ): void {
    const columns = batch[table] as unknown as Readonly<
      Record<string, Float64Array | Int32Array | Uint8Array>
    >;
    for (const { name } of this.present[table]) {
      const part = { table, name, values: columns[name], start, end, each: 1, mostConstant: MOST_CONSTANT };
      this.writer.add(name === 'channel' ? channels.translated(part) : part);
    }
    if (table === 'steps' && batch.steps.boost !== null && this.sample.columns.steps.includes(BOOST_COLUMN)) {
      const part = { table, name: BOOST_COLUMN, values: batch.steps.boost, each: BOOST_NUMBERS };
      this.writer.add({
        ...part,
        start: start * BOOST_NUMBERS,
        end: end * BOOST_NUMBERS,
        mostConstant: MOST_OWN_CONSTANT,
      });
    }
    if (!(batch instanceof FileBatch)) return;
    for (const [name, { values, each }] of Object.entries(batch.own[table])) {
      const part = { table, name, values, start: start * each, end: end * each, each };
      this.writer.add({ ...part, mostConstant: MOST_OWN_CONSTANT });
    }
  }
}

const COLUMNS = new Set(['event', 'stream', 'weight']);

/** What of an event's head is no column, and not what a missing key says. */
function packHead(head: EventHead): Packable {
  const packed: Record<string, Packable> = {};
  for (const key in head) {
    const value = head[key as keyof EventHead] as Packable | undefined;
    const isDefault = value === null || value === undefined || (key === 'status' && value === 'complete');
    if (!isDefault && !COLUMNS.has(key)) packed[key] = value;
  }
  return packed;
}

import type { SampleHead } from '../../engine/index.ts';
import { ShowerFileError } from '../shower-file-error.ts';
import type { ByteSource } from '../sources/index.ts';
import { ChunkDecoder } from './chunk-decoder.ts';
import { type EventSummaries, summarise } from './event-summaries.ts';
import type { FileBatch, FileHistory } from './file-batch.ts';
import type { ChunkPlace, FileIndex } from './file-index.ts';
import type { FileHead } from './head-block.ts';
import { MADE_HERE, toSummaries } from './index-columns.ts';
import { TAG_EVENTS } from './layout.ts';
import { readFileEnds } from './open-file.ts';
import { PagedIndex } from './paged-index.ts';
import { readBlockAt } from './read-block.ts';
import { Recent } from './recent.ts';
import { walkBlocks } from './walk.ts';
import type { UnknownFileKeys } from './writer.ts';

/** Reads a native file one event at a time, or from front to back. */
export class ShowerFileReader {
  /** What all events have in common. */
  readonly sample: SampleHead;
  readonly eventCount: number;
  /** Words of the channel codes in the file's head. */
  readonly channels: readonly string[];
  /** What this version does not know, for a writer to keep. */
  readonly unknown: UnknownFileKeys;
  private readonly source: ByteSource;
  private readonly size: number;
  private readonly index: FileIndex;
  private readonly decoder: ChunkDecoder;
  private readonly chunks = new Recent<FileBatch>(4);

  /** For `open` and `recover`, which have read what it needs. */
  constructor(source: ByteSource, size: number, head: FileHead, index: FileIndex, unknown: UnknownFileKeys) {
    this.source = source;
    this.size = size;
    this.sample = head.sample;
    this.channels = head.channels;
    this.unknown = unknown;
    this.index = index;
    this.eventCount = index.eventCount;
    this.decoder = new ChunkDecoder(source, head);
  }

  /**
   * Open a file: its two ends are read and verified, in the same time whatever its size.
   *
   * @throws ShowerFileError for a file that is foreign, of a newer major version, cut off or damaged at its ends.
   */
  static async open(source: ByteSource): Promise<ShowerFileReader> {
    const { size, head, index } = await readFileEnds(source);
    const unknown = { head: head.unknown, index: index.unknown };
    return new ShowerFileReader(source, size, head, new PagedIndex(source, size, index), unknown);
  }

  /**
   * One event. Its chunk is read in one piece and verified; what is returned shares memory with the other events of it, and
   * must not be changed.
   *
   * @throws RangeError where the file has no such event, ShowerFileError where its chunk or index page is damaged.
   */
  async event(n: number): Promise<FileHistory> {
    if (!Number.isInteger(n) || n < 0 || n >= this.eventCount) {
      throw new RangeError(`event ${n} of a file with ${this.eventCount} events`);
    }
    const place = await this.index.chunkOf(n);
    const batch = await this.chunks.get(place.first, () => this.readChunk(place));
    return batch.view(n - place.first);
  }

  /**
   * Summary columns of events `from` to `to`, `to` excluded, from the index alone where it is there.
   *
   * @throws RangeError where the file has no such events, ShowerFileError where the index is damaged.
   */
  async summaries(from: number, to: number): Promise<EventSummaries> {
    const whole = Number.isInteger(from) && Number.isInteger(to);
    if (!whole || from < 0 || to > this.eventCount || from > to) {
      throw new RangeError(`events ${from} to ${to} of a file with ${this.eventCount} events`);
    }
    const columns: Record<string, Float64Array> = {};
    for (let n = from; n < to; ) {
      const place = await this.index.chunkOf(n);
      const part = await this.chunkColumns(place);
      const skipped = n - place.first;
      const taken = Math.min(place.events - skipped, to - n);
      for (const [name, column] of Object.entries(part)) {
        columns[name] ??= new Float64Array(to - from).fill(NaN);
        columns[name].set(column.subarray(skipped, skipped + taken), n - from);
      }
      n += taken;
    }
    return toSummaries(columns, from, to - from);
  }

  /**
   * All events from front to back, a chunk at a time; every byte of the file is read and verified.
   *
   * A batch is the caller's: nothing else holds it.
   *
   * @throws ShowerFileError at the first damage.
   */
  async *batches(): AsyncGenerator<FileBatch> {
    if (!(this.index instanceof PagedIndex)) {
      for (let n = 0; n < this.eventCount; ) {
        const place = await this.index.chunkOf(n);
        yield await this.withIndexColumns(await this.readChunk(place), place);
        n += place.events;
      }
      return;
    }
    let n = 0;
    for await (const block of walkBlocks(this.source)) {
      if (block.tag !== TAG_EVENTS) continue;
      const batch = this.decoder.decode(block, n);
      const first = batch.storedFirst;
      const events = batch.events.length;
      if (first !== n || n + events > this.eventCount) {
        const found = `events ${first} to ${first + events - 1}`;
        throw this.malformed(block.start, found, `event ${n} first, of ${this.eventCount} in all`);
      }
      const place = await this.index.chunkOf(n);
      if (place.start !== block.start || place.events !== events) {
        const found = `${events} events at byte ${block.start}`;
        throw this.malformed(block.start, found, `${place.events} at byte ${place.start}, as the index says`);
      }
      yield await this.withIndexColumns(batch, place);
      n += events;
    }
    if (n !== this.eventCount)
      throw this.malformed(this.size, `${n} events`, `${this.eventCount}, as the index says`);
  }

  private async readChunk(place: ChunkPlace): Promise<FileBatch> {
    const block = await readBlockAt(this.source, this.size, place, TAG_EVENTS);
    const batch = this.decoder.decode(block, place.first);
    if (batch.storedFirst !== place.storedFirst || batch.events.length !== place.events) {
      const found = `${batch.events.length} events from ${batch.storedFirst} on`;
      throw this.malformed(place.start, found, `${place.events} events from ${place.storedFirst} on`);
    }
    return batch;
  }

  /** Summary columns of a chunk's events: those of the index, or without one what follows from the events. */
  private async chunkColumns(place: ChunkPlace): Promise<Record<string, Float64Array>> {
    const page = await this.index.pageOf(place);
    if (page) {
      const from = place.storedFirst - page.first;
      const slice = ([name, column]: [string, Float64Array]) => [
        name,
        column.subarray(from, from + place.events),
      ];
      return Object.fromEntries(Object.entries(page.columns).map(slice));
    }
    const batch = await this.chunks.get(place.first, () => this.readChunk(place));
    const { carried: _carried, ...made } = summarise(this.sample, batch, 0, place.events);
    return Object.fromEntries(
      Object.entries(made).map(([name, column]) => [name, Float64Array.from(column)]),
    );
  }

  /** Add what the index alone knows of a chunk's events, so that it is not lost when they are written again. */
  private async withIndexColumns(batch: FileBatch, place: ChunkPlace): Promise<FileBatch> {
    const page = await this.index.pageOf(place);
    if (page && Object.keys(page.columns).some((name) => !MADE_HERE.has(name))) {
      const columns = Object.entries(await this.chunkColumns(place));
      batch.summaries = Object.fromEntries(columns.filter(([name]) => !MADE_HERE.has(name)));
    }
    return batch;
  }

  private malformed(byte: number, found: string, expected: string): ShowerFileError {
    return new ShowerFileError('malformed-file', this.source.name, byte, found, expected);
  }
}

import { CHANNELS, type HistoryBatch, type SampleHead } from '../../engine/index.ts';
import { ShowerFileError } from '../shower-file-error.ts';
import type { ByteSink } from '../sources/index.ts';
import { frameBlock } from './block.ts';
import { ChunkEncoder, type EncodedChunk } from './chunk-encoder.ts';
import { encodeDirectory, encodeFoot, encodeIndexHead } from './directory.ts';
import type { UnknownKeys } from './fields.ts';
import { FileBatch } from './file-batch.ts';
import { encodeFileHead } from './file-head.ts';
import { encodeHead } from './head-block.ts';
import { encodePage, type WrittenChunk } from './index-page.ts';
import {
  EVENTS_PER_CHUNK,
  EVENTS_PER_PAGE,
  FILE_HEAD_BYTES,
  PAGES_PER_DIRECTORY,
  TAG_DIRECTORY,
  TAG_FOOT,
  TAG_HEAD,
  TAG_INDEX,
  TAG_PAGE,
} from './layout.ts';
import type { BlockPlace } from './read-block.ts';
import { appendEvents } from './recut.ts';

/** Keys of another file that this version does not know, to be written again. */
export interface UnknownFileKeys {
  readonly head: UnknownKeys;
  readonly index: UnknownKeys;
}

/**
 * Writes a native file from front to back.
 *
 * The bytes depend on head and events alone, not on the sizes of the batches; events are numbered in the order of writing. A
 * chunk is written as soon as its events are there, so a writer that is killed loses the events of the last chunk at most,
 * and its file is read up to there by `recover`. What is kept in memory grows by a few words for every 1024 events.
 *
 * Calls must not overlap: await each before the next. After an error the writer is of no use any more.
 */
export class ShowerFileWriter {
  private readonly sink: ByteSink;
  private readonly sample: SampleHead;
  private readonly channels: readonly string[];
  private readonly unknown: UnknownFileKeys;
  private readonly encoder: ChunkEncoder;
  private readonly pending: FileBatch;
  private position = 0;
  private written = 0;
  private pageChunks: WrittenChunk[] = [];
  private readonly pages: BlockPlace[] = [];
  private finished = false;

  /**
   * @param channels Words of the channel codes for the head; chunks add what they use besides.
   * @param unknown What a reader of another file found besides, to be kept.
   */
  constructor(
    sink: ByteSink,
    sample: SampleHead,
    channels: readonly string[] = CHANNELS,
    unknown: UnknownFileKeys = { head: {}, index: {} },
  ) {
    this.sink = sink;
    this.sample = sample;
    this.channels = channels;
    this.unknown = unknown;
    this.encoder = new ChunkEncoder(sample, channels);
    this.pending = new FileBatch(sample, channels);
  }

  /** Events written or waiting for their chunk to be full. */
  get eventCount(): number {
    return this.written + this.pending.events.length;
  }

  /**
   * Add the events of a batch, any number of them; the batch may be used again when the promise is fulfilled.
   *
   * @throws ShowerFileError `beyond-format` for more than 256 channels or 2^24 rows of a table in a chunk.
   */
  async append(batch: HistoryBatch): Promise<void> {
    await this.begin();
    const total = batch.events.length;
    for (let at = 0; at < total; ) {
      if (this.pending.events.length === 0 && total - at >= EVENTS_PER_CHUNK) {
        await this.writeChunk(this.encode(batch, at, at + EVENTS_PER_CHUNK));
        at += EVENTS_PER_CHUNK;
        continue;
      }
      const end = Math.min(total, at + EVENTS_PER_CHUNK - this.pending.events.length);
      this.guarded(() => appendEvents(this.pending, batch, at, end));
      at = end;
      if (this.pending.events.length === EVENTS_PER_CHUNK) await this.flush();
    }
  }

  /**
   * Add a chunk that a ChunkEncoder made, perhaps in another thread.
   *
   * @throws RangeError where it is not the next one, or other events wait for their chunk to be full.
   */
  async appendChunk(chunk: EncodedChunk): Promise<void> {
    if (
      this.pending.events.length > 0 ||
      chunk.first !== this.written ||
      this.written % EVENTS_PER_CHUNK !== 0
    ) {
      throw new RangeError(`a chunk from event ${chunk.first} on; the next event is ${this.eventCount}`);
    }
    await this.begin();
    await this.writeChunk(chunk);
  }

  /** Write the last chunk, the index and the foot. The sink stays open. */
  async finish(): Promise<void> {
    if (this.finished) return;
    this.finished = true;
    if (this.pending.events.length > 0) await this.flush();
    await this.begin();
    if (this.pageChunks.length > 0) await this.writePage();
    const directoryStart = this.position;
    let directoryBytes = 0;
    for (let k = 0; k < this.pages.length; k += PAGES_PER_DIRECTORY) {
      const place = await this.block(
        TAG_DIRECTORY,
        encodeDirectory(this.pages.slice(k, k + PAGES_PER_DIRECTORY)),
      );
      directoryBytes = place.bytes;
    }
    // Again, so that damage to the one at the front does not cost the file.
    await this.block(TAG_HEAD, this.head());
    const index = await this.block(
      TAG_INDEX,
      encodeIndexHead({
        events: this.written,
        eventsPerChunk: EVENTS_PER_CHUNK,
        eventsPerPage: EVENTS_PER_PAGE,
        pages: this.pages.length,
        directoryStart,
        directoryBytes,
        pagesPerDirectory: PAGES_PER_DIRECTORY,
        unknown: this.unknown.index,
      }),
    );
    await this.block(TAG_FOOT, encodeFoot(index));
  }

  private head(): Uint8Array {
    return encodeHead(this.sample, this.channels, this.unknown.head);
  }

  private encode(batch: HistoryBatch, from: number, to: number): EncodedChunk {
    return this.guarded(() => this.encoder.encode(batch, from, to, this.written));
  }

  private guarded<T>(work: () => T): T {
    try {
      return work();
    } catch (error) {
      if (!(error instanceof RangeError)) throw error;
      const expected = 'events that the format can hold';
      throw new ShowerFileError(
        'beyond-format',
        'the file being written',
        this.position,
        error.message,
        expected,
      );
    }
  }

  private async flush(): Promise<void> {
    const chunk = this.encode(this.pending, 0, this.pending.events.length);
    this.pending.clear();
    this.pending.channels.length = this.channels.length;
    await this.writeChunk(chunk);
  }

  private async writeChunk(chunk: EncodedChunk): Promise<void> {
    const place = await this.write(chunk.block);
    this.pageChunks.push({ place, summaries: chunk.summaries });
    this.written += chunk.events;
    if (this.pageChunks.length * EVENTS_PER_CHUNK === EVENTS_PER_PAGE) await this.writePage();
  }

  private async writePage(): Promise<void> {
    const first = this.pages.length * EVENTS_PER_PAGE;
    this.pages.push(await this.block(TAG_PAGE, encodePage(first, this.pageChunks)));
    this.pageChunks = [];
  }

  /** File head and head block, before anything else. */
  private async begin(): Promise<void> {
    if (this.position > 0) return;
    const head = frameBlock(TAG_HEAD, this.head());
    const bytes = new Uint8Array(FILE_HEAD_BYTES + head.length);
    bytes.set(encodeFileHead());
    bytes.set(head, FILE_HEAD_BYTES);
    await this.write(bytes);
  }

  private block(tag: string, payload: Uint8Array): Promise<BlockPlace> {
    return this.write(frameBlock(tag, payload));
  }

  private async write(bytes: Uint8Array): Promise<BlockPlace> {
    const start = this.position;
    await this.sink.write(bytes);
    this.position += bytes.length;
    return { start, bytes: bytes.length };
  }
}

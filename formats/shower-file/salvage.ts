import { ShowerFileError } from '../shower-file-error.ts';
import type { ByteSource } from '../sources/index.ts';
import { readChunkRange } from './chunk-decoder.ts';
import { decodeIndexHead } from './directory.ts';
import type { UnknownKeys } from './fields.ts';
import type { ChunkPlace } from './file-index.ts';
import { decodeHead, type FileHead } from './head-block.ts';
import { decodePage } from './index-page.ts';
import { TAG_EVENTS, TAG_FOOT, TAG_HEAD, TAG_INDEX, TAG_PAGE } from './layout.ts';
import type { Block } from './read-block.ts';
import type { Gap } from './walk.ts';
import type { PagePlace } from './walked-index.ts';

/** Bytes of a damaged file that could not be used. */
export interface Loss {
  readonly fromByte: number;
  /** The first byte behind. */
  readonly toByte: number;
  /**
   * Events that are missing there, by their numbers in the damaged file; `last` is null where the file does not say how many
   * there were, perhaps none. Null where no event was lost.
   */
  readonly events: { readonly first: number; readonly last: number | null } | null;
  readonly reason: ShowerFileError;
}

/** Collects what a walk through a damaged file finds, from front to back. */
export class Salvage {
  head: FileHead | null = null;
  readonly chunks: ChunkPlace[] = [];
  readonly pages: PagePlace[] = [];
  readonly losses: Loss[] = [];
  unknownIndexKeys: UnknownKeys = {};
  private readonly source: ByteSource;
  /** Number that the file gives to the next event. */
  private next = 0;
  /** Damage since the last chunk; the next one tells whether it cost events. */
  private open: Gap[] = [];
  private total: number | null = null;
  private end = 0;
  private ended = false;

  constructor(source: ByteSource) {
    this.source = source;
  }

  /** @param part A whole block, or what lies between two. */
  add(part: Block | Gap): void {
    this.end = part.end;
    this.ended = 'tag' in part && part.tag === TAG_FOOT;
    if ('reason' in part) {
      this.open.push(part);
      return;
    }
    try {
      this.take(part);
    } catch (error) {
      if (!(error instanceof ShowerFileError)) throw error;
      this.open.push({ start: part.start, end: part.end, reason: error });
    }
  }

  /** The file is at its end. */
  finish(): void {
    const missing = this.total === null ? null : Math.max(0, this.total - this.next);
    if (!this.ended && this.open.at(-1)?.end !== this.end) {
      const reason = this.fault(
        'truncated-file',
        this.end,
        'the end of the file',
        'more blocks, a foot the last',
      );
      this.open.push({ start: this.end, end: this.end, reason });
    }
    if (missing === 0) this.close(null);
    else if (missing === null) this.close({ first: this.next, last: null });
    else this.close({ first: this.next, last: this.next + missing - 1 });
  }

  private take(block: Block): void {
    if (block.tag === TAG_HEAD) this.head ??= decodeHead(this.source, block);
    else if (block.tag === TAG_INDEX) {
      const index = decodeIndexHead(this.source, block);
      this.total = index.events;
      this.unknownIndexKeys = index.unknown;
    } else if (block.tag === TAG_PAGE) {
      const { first, events } = decodePage(this.source, block);
      this.pages.push({ first, events, start: block.start, bytes: block.end - block.start });
    } else if (block.tag === TAG_EVENTS) this.takeChunk(block);
  }

  private takeChunk(block: Block): void {
    const { first, events } = readChunkRange(this.source, block);
    if (first < this.next) {
      throw this.fault('malformed-file', block.start, `event ${first} again`, `event ${this.next} first`);
    }
    if (first > this.next) {
      if (this.open.length === 0) {
        const reason = this.fault(
          'malformed-file',
          block.start,
          `event ${first} first`,
          `event ${this.next}`,
        );
        this.open.push({ start: block.start, end: block.start, reason });
      }
      this.close({ first: this.next, last: first - 1 });
    } else this.close(null);
    const last = this.chunks.at(-1);
    const number = last ? last.first + last.events : 0;
    const bytes = block.end - block.start;
    this.chunks.push({ start: block.start, bytes, first: number, storedFirst: first, events });
    this.next = first + events;
  }

  /** Settle the damage so far; the events are put down to the first of it. */
  private close(events: Loss['events']): void {
    this.open.forEach(({ start, end, reason }, k) => {
      this.losses.push({ fromByte: start, toByte: end, events: k === 0 ? events : null, reason });
    });
    this.open = [];
  }

  private fault(code: 'truncated-file' | 'malformed-file', byte: number, found: string, expected: string) {
    return new ShowerFileError(code, this.source.name, byte, found, expected);
  }
}

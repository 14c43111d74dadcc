import type { ByteSource } from '../sources/index.ts';
import type { ChunkPlace, FileIndex } from './file-index.ts';
import { decodePage, type IndexPage } from './index-page.ts';
import { TAG_PAGE } from './layout.ts';
import { type BlockPlace, readBlockAt } from './read-block.ts';
import { Recent } from './recent.ts';

/** An index page that a walk found. */
export interface PagePlace extends BlockPlace {
  readonly first: number;
  readonly events: number;
}

/** The chunks that a walk through a file found. */
export class WalkedIndex implements FileIndex {
  readonly eventCount: number;
  private readonly source: ByteSource;
  private readonly size: number;
  private readonly chunks: readonly ChunkPlace[];
  private readonly pages: readonly PagePlace[];
  private readonly decoded = new Recent<IndexPage>(8);

  /** @param chunks In the order of their events, numbered without a gap. */
  constructor(source: ByteSource, size: number, chunks: readonly ChunkPlace[], pages: readonly PagePlace[]) {
    this.source = source;
    this.size = size;
    this.chunks = chunks;
    this.pages = pages;
    const last = chunks.at(-1);
    this.eventCount = last ? last.first + last.events : 0;
  }

  async chunkOf(n: number): Promise<ChunkPlace> {
    let low = 0;
    let high = this.chunks.length - 1;
    while (low < high) {
      const middle = (low + high + 1) >> 1;
      if (this.chunks[middle].first <= n) low = middle;
      else high = middle - 1;
    }
    return this.chunks[low];
  }

  /** The last page about a chunk: a later index replaces an earlier one. */
  async pageOf({ storedFirst, events }: ChunkPlace): Promise<IndexPage | null> {
    const covers = (page: PagePlace) =>
      page.first <= storedFirst && storedFirst + events <= page.first + page.events;
    const place = this.pages.findLast(covers);
    if (!place) return null;
    return this.decoded.get(place.start, async () =>
      decodePage(this.source, await readBlockAt(this.source, this.size, place, TAG_PAGE)),
    );
  }
}

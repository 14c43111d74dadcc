import { ShowerFileError } from '../shower-file-error.ts';
import type { ByteSource } from '../sources/index.ts';
import { decodeDirectory, type IndexHead } from './directory.ts';
import type { ChunkPlace, FileIndex } from './file-index.ts';
import { decodePage, type IndexPage } from './index-page.ts';
import { TAG_DIRECTORY, TAG_PAGE } from './layout.ts';
import { type BlockPlace, readBlockAt } from './read-block.ts';
import { Recent } from './recent.ts';

/** The index of a whole file; its pages are read when they are needed. */
export class PagedIndex implements FileIndex {
  readonly eventCount: number;
  private readonly source: ByteSource;
  private readonly size: number;
  private readonly head: IndexHead;
  private readonly directories = new Recent<BlockPlace[]>(8);
  private readonly pages = new Recent<IndexPage>(8);

  constructor(source: ByteSource, size: number, head: IndexHead) {
    this.source = source;
    this.size = size;
    this.head = head;
    this.eventCount = head.events;
  }

  /** @throws ShowerFileError where directory or page are damaged. */
  async chunkOf(n: number): Promise<ChunkPlace> {
    const { eventsPerChunk, eventsPerPage, events } = this.head;
    const page = await this.page(Math.floor(n / eventsPerPage));
    const inPage = Math.floor((n % eventsPerPage) / eventsPerChunk);
    const first = Math.floor(n / eventsPerChunk) * eventsPerChunk;
    const place = page.chunks[inPage];
    return { ...place, first, storedFirst: first, events: Math.min(eventsPerChunk, events - first) };
  }

  pageOf(chunk: ChunkPlace): Promise<IndexPage> {
    return this.page(Math.floor(chunk.first / this.head.eventsPerPage));
  }

  private page(k: number): Promise<IndexPage> {
    return this.pages.get(k, async () => {
      const place = await this.pagePlace(k);
      const page = decodePage(this.source, await readBlockAt(this.source, this.size, place, TAG_PAGE));
      const { eventsPerChunk, eventsPerPage } = this.head;
      const first = k * eventsPerPage;
      const events = Math.min(eventsPerPage, this.eventCount - first);
      const chunks = Math.ceil(events / eventsPerChunk);
      if (page.first !== first || page.events !== events || page.chunks.length !== chunks) {
        const found = `${page.events} events from ${page.first} on in ${page.chunks.length} chunks`;
        throw this.malformed(place.start, found, `${events} events from ${first} on in ${chunks} chunks`);
      }
      return page;
    });
  }

  private async pagePlace(k: number): Promise<BlockPlace> {
    const { pagesPerDirectory, directoryStart, directoryBytes } = this.head;
    const d = Math.floor(k / pagesPerDirectory);
    const place = { start: directoryStart + d * directoryBytes, bytes: directoryBytes };
    const places = await this.directories.get(d, async () =>
      decodeDirectory(this.source, await readBlockAt(this.source, this.size, place, TAG_DIRECTORY)),
    );
    if (places.length !== pagesPerDirectory) {
      throw this.malformed(
        place.start,
        `${places.length} pages`,
        `a directory of ${pagesPerDirectory} pages`,
      );
    }
    return places[k % pagesPerDirectory];
  }

  private malformed(byte: number, found: string, expected: string): ShowerFileError {
    return new ShowerFileError('malformed-file', this.source.name, byte, found, expected);
  }
}

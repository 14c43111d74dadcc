import type { IndexPage } from './index-page.ts';
import type { BlockPlace } from './read-block.ts';

/** A chunk of a file and the numbers of its events. */
export interface ChunkPlace extends BlockPlace {
  /** Number of its first event in the file. */
  readonly first: number;
  /** Number that the chunk itself gives to it; another one where events before it were lost. */
  readonly storedFirst: number;
  readonly events: number;
}

/** Where the chunks of a file are: as its index says, or as a walk through a damaged file found. */
export interface FileIndex {
  readonly eventCount: number;
  /** The chunk that holds event `n`, 0 <= n < eventCount. */
  chunkOf(n: number): Promise<ChunkPlace>;
  /** The index page that tells of the events of a chunk; null where there is none. */
  pageOf(chunk: ChunkPlace): Promise<IndexPage | null>;
}

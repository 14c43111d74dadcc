import { ShowerFileError } from '../shower-file-error.ts';
import { type ByteSource, WindowSource } from '../sources/index.ts';
import { looksLikeBlock, parseBlockHead } from './block.ts';
import { BLOCK_HEAD_BYTES, FILE_HEAD_BYTES } from './layout.ts';
import { type Block, readBlock } from './read-block.ts';

/** Bytes of a file that are no whole block. */
export interface Gap {
  readonly start: number;
  readonly end: number;
  readonly reason: ShowerFileError;
}

/**
 * Every block of a file from front to back, each with its checksums verified.
 *
 * @throws ShowerFileError at the first byte that is no whole block.
 */
export async function* walkBlocks(source: ByteSource): AsyncGenerator<Block> {
  const size = await source.size();
  const window = new WindowSource(source);
  for (let at = FILE_HEAD_BYTES; at < size; ) {
    const block = await readBlock(window, size, at);
    yield block;
    at = block.end;
  }
}

/**
 * Every whole block of a damaged file, and the gaps between them.
 *
 * Behind damage the walk goes on at the next whole block: one with a right checksum of its head and of its payload, so that
 * chance finds none.
 *
 * @throws only what the source throws.
 */
export async function* walkWhatIsWhole(source: ByteSource): AsyncGenerator<Block | Gap> {
  const size = await source.size();
  const window = new WindowSource(source);
  for (let at = FILE_HEAD_BYTES; at < size; ) {
    const found = await tryBlock(window, size, at);
    if (!(found instanceof ShowerFileError)) {
      yield found;
      at = found.end;
      continue;
    }
    const next = await nextBlock(window, size, at + 1);
    yield { start: at, end: next?.start ?? size, reason: found };
    if (!next) return;
    yield next;
    at = next.end;
  }
}

async function tryBlock(source: ByteSource, size: number, at: number): Promise<Block | ShowerFileError> {
  try {
    return await readBlock(source, size, at);
  } catch (error) {
    if (error instanceof ShowerFileError && error.code !== 'cannot-read') return error;
    throw error;
  }
}

const PIECE = 1 << 16;

/** The first whole block that begins at `from` or behind. */
async function nextBlock(source: ByteSource, size: number, from: number): Promise<Block | null> {
  for (let at = from; at + BLOCK_HEAD_BYTES <= size; at += PIECE) {
    // Pieces overlap, so that no head is cut.
    const bytes = await source.read(at, PIECE + BLOCK_HEAD_BYTES);
    const last = Math.min(PIECE, bytes.length - BLOCK_HEAD_BYTES + 1);
    for (let k = 0; k < last; k++) {
      if (!looksLikeBlock(bytes, k) || !parseBlockHead(bytes, k)) continue;
      const block = await tryBlock(source, size, at + k);
      if (!(block instanceof ShowerFileError)) return block;
    }
  }
  return null;
}

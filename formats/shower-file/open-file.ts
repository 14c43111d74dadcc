import { ShowerFileError } from '../shower-file-error.ts';
import type { ByteSource } from '../sources/index.ts';
import { parseBlockHead } from './block.ts';
import { BufferedEnds } from './buffered-ends.ts';
import { decodeFoot, decodeIndexHead, type IndexHead } from './directory.ts';
import { checkFileHead } from './file-head.ts';
import { decodeHead, type FileHead } from './head-block.ts';
import { BLOCK_HEAD_BYTES, FILE_HEAD_BYTES, FOOT_BYTES, TAG_FOOT, TAG_HEAD, TAG_INDEX } from './layout.ts';
import { readBlock, readBlockAt } from './read-block.ts';

/** What the two ends of a file say. */
export interface FileEnds {
  readonly size: number;
  readonly head: FileHead;
  readonly index: IndexHead;
}

/**
 * Read and verify the two ends of a file: mark, head, foot and index head. Takes the same few reads whatever its size.
 *
 * @throws ShowerFileError for anything that is not a whole native file of our major version.
 */
export async function readFileEnds(file: ByteSource): Promise<FileEnds> {
  const size = await file.size();
  const source = new BufferedEnds(file, size);
  checkFileHead(await source.read(0, FILE_HEAD_BYTES), file.name);
  const block = await readBlock(source, size, FILE_HEAD_BYTES);
  if (block.tag !== TAG_HEAD) {
    throw new ShowerFileError('malformed-file', file.name, block.start, `a block "${block.tag}"`, 'the head');
  }
  const head = decodeHead(file, block);
  return { size, head, index: await readIndexHead(source, size, block.end) };
}

/** @param bodyStart Where the first block behind the head begins. */
async function readIndexHead(source: ByteSource, size: number, bodyStart: number): Promise<IndexHead> {
  const start = size - FOOT_BYTES;
  const bytes = start >= bodyStart ? await source.read(start, FOOT_BYTES) : new Uint8Array(0);
  const head = parseBlockHead(bytes);
  if (!isFoot(bytes)) {
    const found = 'none: the file was cut off, or its writer was stopped';
    throw new ShowerFileError(
      'truncated-file',
      source.name,
      size,
      found,
      `a foot in the ${FOOT_BYTES} bytes before`,
    );
  }
  if (head && head.length !== FOOT_BYTES - BLOCK_HEAD_BYTES) {
    throw new ShowerFileError(
      'malformed-file',
      source.name,
      start,
      `${head.length} bytes`,
      'a foot of 15 bytes',
    );
  }
  const foot = await readBlockAt(source, size, { start, bytes: FOOT_BYTES }, TAG_FOOT);
  const index = await readBlockAt(source, size, decodeFoot(source, foot), TAG_INDEX);
  return decodeIndexHead(source, index);
}

function isFoot(bytes: Uint8Array): boolean {
  return [...TAG_FOOT].every((letter, k) => bytes[2 + k] === letter.charCodeAt(0));
}

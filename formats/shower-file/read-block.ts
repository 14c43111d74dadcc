import { crc32 } from '../checksum/index.ts';
import { ShowerFileError } from '../shower-file-error.ts';
import type { ByteSource } from '../sources/index.ts';
import { type BlockHead, parseBlockHead } from './block.ts';
import { BLOCK_HEAD_BYTES } from './layout.ts';

/** A block of a file whose checksums are right. */
export interface Block {
  readonly tag: string;
  /** Where it begins in the file. */
  readonly start: number;
  /** Where it ends. */
  readonly end: number;
  readonly payload: Uint8Array;
}

/** Where a block stands, as an index says. */
export interface BlockPlace {
  readonly start: number;
  /** Length of the whole block [bytes]. */
  readonly bytes: number;
}

/**
 * Bytes of a source, all of them.
 *
 * @throws ShowerFileError `truncated-file` where it gives fewer.
 */
export async function readBytes(source: ByteSource, start: number, length: number): Promise<Uint8Array> {
  const bytes = await source.read(start, length);
  if (bytes.length === length) return bytes;
  throw new ShowerFileError(
    'truncated-file',
    source.name,
    start + bytes.length,
    'the end of the file',
    `${length - bytes.length} more bytes`,
  );
}

/**
 * The block that begins at `start`, whatever it is, in one or two reads.
 *
 * @param size Bytes of the file: no length is believed beyond it.
 * @throws ShowerFileError `truncated-file`, `wrong-checksum`.
 */
export async function readBlock(source: ByteSource, size: number, start: number): Promise<Block> {
  const left = size - start;
  if (left < BLOCK_HEAD_BYTES) {
    const found = `the end of the file after ${Math.max(left, 0)} bytes`;
    throw new ShowerFileError(
      'truncated-file',
      source.name,
      start,
      found,
      `a block head of ${BLOCK_HEAD_BYTES} bytes`,
    );
  }
  const head = checkedHead(source, await readBytes(source, start, BLOCK_HEAD_BYTES), start);
  if (head.length > left - BLOCK_HEAD_BYTES) {
    const found = `the end of the file after ${left} bytes`;
    const expected = `a block "${head.tag}" of ${BLOCK_HEAD_BYTES + head.length} bytes`;
    throw new ShowerFileError('truncated-file', source.name, start, found, expected);
  }
  const payload = await readBytes(source, start + BLOCK_HEAD_BYTES, head.length);
  return checkedBlock(source, head, start, payload);
}

/**
 * A block whose place is known, in one read.
 *
 * @throws ShowerFileError also where another block stands there (`malformed-file`).
 */
export async function readBlockAt(
  source: ByteSource,
  size: number,
  place: BlockPlace,
  tag: string,
): Promise<Block> {
  const { start, bytes } = place;
  if (bytes < BLOCK_HEAD_BYTES || start + bytes > size) {
    const expected = `a place for a block "${tag}" inside a file of ${size} bytes`;
    throw new ShowerFileError(
      'malformed-file',
      source.name,
      start,
      `bytes ${start} to ${start + bytes}`,
      expected,
    );
  }
  const whole = await readBytes(source, start, bytes);
  const head = checkedHead(source, whole, start);
  if (head.tag !== tag || head.length !== bytes - BLOCK_HEAD_BYTES) {
    const found = `a block "${head.tag}" of ${BLOCK_HEAD_BYTES + head.length} bytes`;
    throw new ShowerFileError(
      'malformed-file',
      source.name,
      start,
      found,
      `a block "${tag}" of ${bytes} bytes`,
    );
  }
  return checkedBlock(source, head, start, whole.subarray(BLOCK_HEAD_BYTES));
}

function checkedHead(source: ByteSource, bytes: Uint8Array, start: number): BlockHead {
  const head = parseBlockHead(bytes);
  if (head) return head;
  const found = `bytes ${hex(bytes.subarray(0, BLOCK_HEAD_BYTES))}`;
  throw new ShowerFileError('wrong-checksum', source.name, start, found, 'a block head with its checksum');
}

function checkedBlock(source: ByteSource, head: BlockHead, start: number, payload: Uint8Array): Block {
  const sum = crc32(payload);
  if (sum !== head.checksum) {
    const expected = `checksum ${hex32(head.checksum)} of the ${payload.length} bytes of a block "${head.tag}"`;
    throw new ShowerFileError('wrong-checksum', source.name, start + BLOCK_HEAD_BYTES, hex32(sum), expected);
  }
  return { tag: head.tag, start, end: start + BLOCK_HEAD_BYTES + payload.length, payload };
}

function hex(bytes: Uint8Array): string {
  return [...bytes].map((byte) => byte.toString(16).padStart(2, '0')).join(' ');
}

function hex32(value: number): string {
  return `0x${value.toString(16).padStart(8, '0')}`;
}

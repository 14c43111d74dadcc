import { crc32 } from '../checksum/index.ts';
import { BLOCK_HEAD_BYTES, LONGEST_PAYLOAD } from './layout.ts';

// A block is a MessagePack array of five: tag, length, checksum of the payload, checksum of these sixteen bytes,
// payload. All numbers are written at full width, so that every field has its place.
const ARRAY_OF_5 = 0x95;
const STRING_OF_4 = 0xa4;
const UINT_32 = 0xce;
const BINARY_32 = 0xc6;
const CHECKED_BYTES = 16;

/** The fixed part of a block. */
export interface BlockHead {
  /** Four letters that say what the payload is. */
  readonly tag: string;
  /** Length of the payload [bytes]. */
  readonly length: number;
  /** CRC-32 of the payload. */
  readonly checksum: number;
}

/**
 * A payload in its frame, ready for the file.
 *
 * @throws RangeError for a payload above LONGEST_PAYLOAD.
 */
export function frameBlock(tag: string, payload: Uint8Array): Uint8Array {
  const { length } = payload;
  if (length > LONGEST_PAYLOAD)
    throw new RangeError(`a block of ${length} bytes; ${LONGEST_PAYLOAD} at the most`);
  const block = new Uint8Array(BLOCK_HEAD_BYTES + length);
  const view = new DataView(block.buffer);
  block[0] = ARRAY_OF_5;
  block[1] = STRING_OF_4;
  for (let k = 0; k < 4; k++) block[2 + k] = tag.charCodeAt(k);
  block[6] = UINT_32;
  view.setUint32(7, length);
  block[11] = UINT_32;
  view.setUint32(12, crc32(payload));
  block[16] = UINT_32;
  view.setUint32(17, crc32(block, 0, CHECKED_BYTES));
  block[21] = BINARY_32;
  view.setUint32(22, length);
  block.set(payload, BLOCK_HEAD_BYTES);
  return block;
}

/** The block head at `at`, or null where there is none with a right checksum. */
export function parseBlockHead(bytes: Uint8Array, at = 0): BlockHead | null {
  if (at + BLOCK_HEAD_BYTES > bytes.length || !looksLikeBlock(bytes, at)) return null;
  const view = new DataView(bytes.buffer, bytes.byteOffset + at, BLOCK_HEAD_BYTES);
  const length = view.getUint32(7);
  if (view.getUint32(17) !== crc32(bytes, at, at + CHECKED_BYTES)) return null;
  if (view.getUint32(22) !== length || length > LONGEST_PAYLOAD) return null;
  const tag = String.fromCharCode(bytes[at + 2], bytes[at + 3], bytes[at + 4], bytes[at + 5]);
  return { tag, length, checksum: view.getUint32(12) };
}

/** Whether the marks that stand in every block head stand at `at`. */
export function looksLikeBlock(bytes: Uint8Array, at: number): boolean {
  return (
    bytes[at] === ARRAY_OF_5 &&
    bytes[at + 1] === STRING_OF_4 &&
    bytes[at + 6] === UINT_32 &&
    bytes[at + 11] === UINT_32 &&
    bytes[at + 16] === UINT_32 &&
    bytes[at + 21] === BINARY_32
  );
}

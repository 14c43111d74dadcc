/** A MessagePack string of seven characters; 0xa7 begins no text, the newline shows a file that was copied as text. */
export const MAGIC = Uint8Array.of(0xa7, 0x73, 0x68, 0x6f, 0x77, 0x65, 0x72, 0x0a);
/** Version that is written. Files of the same major version are read for ever. */
export const MAJOR = 1;
export const MINOR = 0;
/** Bytes before the first block: magic, versions, checksum. */
export const FILE_HEAD_BYTES = 19;
/** Bytes of a block before its payload. */
export const BLOCK_HEAD_BYTES = 26;
/** Longest payload of a block [bytes]. */
export const LONGEST_PAYLOAD = 1 << 30;

export const TAG_HEAD = 'head';
export const TAG_EVENTS = 'evnt';
export const TAG_PAGE = 'page';
export const TAG_DIRECTORY = 'dire';
export const TAG_INDEX = 'indx';
export const TAG_FOOT = 'foot';

/** Events of every chunk but the last. */
export const EVENTS_PER_CHUNK = 64;
/** Events of every index page but the last. */
export const EVENTS_PER_PAGE = 1024;
/** Index pages of every directory page; the last is filled up with zeros, so that all are equally long. */
export const PAGES_PER_DIRECTORY = 128;

/** Payload of the foot: an array of an unsigned 64-bit and an unsigned 32-bit integer. */
export const FOOT_PAYLOAD_BYTES = 15;
export const FOOT_BYTES = BLOCK_HEAD_BYTES + FOOT_PAYLOAD_BYTES;

/** Most events of a chunk. */
export const MOST_EVENTS = 65536;

/**
 * Most rows of one table in a chunk whose payload has `bytes` bytes.
 *
 * Constant columns and long runs take next to no bytes, so without a bound a few bytes could ask for any amount of memory.
 */
export function mostRows(bytes: number): number {
  return Math.min(65536 + 64 * bytes, 1 << 24);
}

/** Most bytes that the deflated columns of a chunk whose payload has `bytes` bytes may inflate to. */
export function mostInflated(bytes: number): number {
  return (1 << 20) + 64 * bytes;
}

/** Most elements of all constant columns of the author's own in a chunk whose payload has `bytes` bytes. */
export function mostOwnConstants(bytes: number): number {
  return 4 * mostRows(bytes);
}

/**
 * Above so many elements a column is written out even if constant, so that readers find rows in proportion to bytes: with 12 bytes or
 * more that each column's name and element take, the bounds above hold.
 */
export const MOST_CONSTANT = 65536;
export const MOST_OWN_CONSTANT = 2048;

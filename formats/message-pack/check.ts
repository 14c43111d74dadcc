import { MessagePackError } from './message-pack-error.ts';

const DEEPEST = 64;

/**
 * Hold a message against MessagePack's standard types before anything is built from it.
 *
 * The decoder that comes after believes lengths and knows extension types of its own; this walk lets neither through.
 *
 * @throws MessagePackError where the message ends early or late, has an extension type, a key that is no string or more
 * than 64 levels.
 */
export function checkMessagePack(bytes: Uint8Array): void {
  const end = walkValue(bytes, 0, 0);
  if (end !== bytes.length) {
    throw new MessagePackError(end, `${bytes.length - end} more bytes`, 'the end of the message');
  }
}

// Bytes behind the form byte, for 0xc0 to 0xdf: of a plain value, or of the length that follows. Extension types and 0xc1: -1.
const BEHIND = [
  0, -1, 0, 0, 1, 2, 4, -1, -1, -1, 4, 8, 1, 2, 4, 8, 1, 2, 4, 8, -1, -1, -1, -1, -1, 1, 2, 4, 2, 4, 2, 4,
];
const EXTENSION_OR_UNUSED = -1;

function walkValue(bytes: Uint8Array, at: number, depth: number): number {
  if (depth > DEEPEST) throw new MessagePackError(at, 'one more', `at most ${DEEPEST} levels`);
  need(bytes, at, 1, 'byte');
  const form = bytes[at];
  if (form < 0x80 || form >= 0xe0) return at + 1;
  if (form < 0x90) return walkMap(bytes, at + 1, form & 15, depth);
  if (form < 0xa0) return walkItems(bytes, at + 1, form & 15, depth);
  if (form < 0xc0) return skip(bytes, at + 1, form & 31);
  const behind = BEHIND[form - 0xc0];
  if (behind === EXTENSION_OR_UNUSED) {
    throw new MessagePackError(at, `0x${form.toString(16)}, an extension or unused type`, 'a standard type');
  }
  const isBinary = form >= 0xc4 && form <= 0xc6;
  if (form < 0xd9 && !isBinary) return skip(bytes, at + 1, behind);
  need(bytes, at + 1, behind, 'bytes of a length');
  let length = 0;
  for (let k = 1; k <= behind; k++) length = length * 256 + bytes[at + k];
  const start = at + 1 + behind;
  if (form >= 0xde) return walkMap(bytes, start, length, depth);
  return form >= 0xdc ? walkItems(bytes, start, length, depth) : skip(bytes, start, length);
}

function walkItems(bytes: Uint8Array, at: number, length: number, depth: number): number {
  need(bytes, at, length, 'elements');
  for (let k = 0; k < length; k++) at = walkValue(bytes, at, depth + 1);
  return at;
}

function walkMap(bytes: Uint8Array, at: number, length: number, depth: number): number {
  need(bytes, at, 2 * length, 'keys and values');
  for (let k = 0; k < length; k++) {
    need(bytes, at, 1, 'key');
    const form = bytes[at];
    const isString = (form >= 0xa0 && form < 0xc0) || (form >= 0xd9 && form <= 0xdb);
    if (!isString) throw new MessagePackError(at, `a key of type 0x${form.toString(16)}`, 'a string as key');
    at = walkValue(bytes, walkValue(bytes, at, depth + 1), depth + 1);
  }
  return at;
}

function skip(bytes: Uint8Array, at: number, length: number): number {
  need(bytes, at, length, 'bytes');
  return at + length;
}

function need(bytes: Uint8Array, at: number, count: number, what: string): void {
  const left = bytes.length - at;
  if (count > left) throw new MessagePackError(at, `${left} bytes to the end`, `${count} ${what}`);
}

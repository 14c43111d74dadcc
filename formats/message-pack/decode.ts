/** A value read from MessagePack; integers beyond 2^53 are bigints. */
export type Unpacked =
  | null
  | boolean
  | number
  | bigint
  | string
  | Uint8Array
  | Unpacked[]
  | { [key: string]: Unpacked };

/** Bytes that are no MessagePack of standard types: where, and what stands there. */
export class MessagePackError extends Error {
  override readonly name = 'MessagePackError';
  /** Byte in the message. */
  readonly at: number;
  readonly found: string;
  readonly expected: string;

  constructor(at: number, found: string, expected: string) {
    super(`byte ${at}: expected ${expected}, found ${found}`);
    this.at = at;
    this.found = found;
    this.expected = expected;
  }
}

const DEEPEST = 64;
const utf8 = new TextDecoder('utf-8', { fatal: true, ignoreBOM: true });

/**
 * The value that a MessagePack message holds.
 *
 * Binaries are views of `bytes` at any alignment. No length is believed before it is held against the bytes that are left.
 *
 * @throws MessagePackError where the message ends early or late, has an extension type, a key that is no string, broken
 * UTF-8 or more than 64 levels.
 */
export function decodeMessagePack(bytes: Uint8Array): Unpacked {
  const decoder = new Decoder(bytes);
  const value = decoder.value(0);
  if (decoder.at !== bytes.length) {
    throw new MessagePackError(
      decoder.at,
      `${bytes.length - decoder.at} more bytes`,
      'the end of the message',
    );
  }
  return value;
}

class Decoder {
  at = 0;
  private readonly bytes: Uint8Array;
  private readonly view: DataView;

  constructor(bytes: Uint8Array) {
    this.bytes = bytes;
    this.view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  }

  value(depth: number): Unpacked {
    if (depth > DEEPEST) throw new MessagePackError(this.at, 'one more', `at most ${DEEPEST} levels`);
    const form = this.bytes[this.take(1)];
    if (form < 0x80) return form;
    if (form < 0x90) return this.map(form & 15, depth);
    if (form < 0xa0) return this.array(form & 15, depth);
    if (form < 0xc0) return this.string(form & 31);
    if (form >= 0xe0) return form - 0x100;
    const { view } = this;
    switch (form) {
      case 0xc0:
        return null;
      case 0xc2:
      case 0xc3:
        return form === 0xc3;
      case 0xc4:
      case 0xc5:
      case 0xc6:
        return this.binary(this.length(form - 0xc4));
      case 0xca:
        return view.getFloat32(this.take(4));
      case 0xcb:
        return view.getFloat64(this.take(8));
      case 0xcc:
        return view.getUint8(this.take(1));
      case 0xcd:
        return view.getUint16(this.take(2));
      case 0xce:
        return view.getUint32(this.take(4));
      case 0xcf:
        return narrowed(view.getBigUint64(this.take(8)));
      case 0xd0:
        return view.getInt8(this.take(1));
      case 0xd1:
        return view.getInt16(this.take(2));
      case 0xd2:
        return view.getInt32(this.take(4));
      case 0xd3:
        return narrowed(view.getBigInt64(this.take(8)));
      case 0xd9:
      case 0xda:
      case 0xdb:
        return this.string(this.length(form - 0xd9));
      case 0xdc:
      case 0xdd:
        return this.array(this.length(form - 0xdb), depth);
      case 0xde:
      case 0xdf:
        return this.map(this.length(form - 0xdd), depth);
      default: {
        const name = `0x${form.toString(16)}, ${form === 0xc1 ? 'which is never used' : 'an extension type'}`;
        throw new MessagePackError(this.at - 1, name, 'a standard type');
      }
    }
  }

  /** A length of 1, 2 or 4 bytes for 0, 1, 2. */
  private length(power: number): number {
    if (power === 0) return this.view.getUint8(this.take(1));
    return power === 1 ? this.view.getUint16(this.take(2)) : this.view.getUint32(this.take(4));
  }

  private take(count: number): number {
    const at = this.at;
    this.claim(count, 'bytes');
    this.at += count;
    return at;
  }

  private claim(count: number, what: string): void {
    const left = this.bytes.length - this.at;
    if (count > left) throw new MessagePackError(this.at, `${left} bytes`, `${count} ${what}`);
  }

  private binary(length: number): Uint8Array {
    const at = this.take(length);
    return this.bytes.subarray(at, at + length);
  }

  private string(length: number): string {
    const at = this.take(length);
    try {
      return utf8.decode(this.bytes.subarray(at, at + length));
    } catch {
      throw new MessagePackError(at, 'broken UTF-8', `a string of ${length} bytes`);
    }
  }

  private array(length: number, depth: number): Unpacked[] {
    this.claim(length, 'elements');
    const array: Unpacked[] = [];
    for (let k = 0; k < length; k++) array.push(this.value(depth + 1));
    return array;
  }

  private map(length: number, depth: number): { [key: string]: Unpacked } {
    this.claim(2 * length, 'keys and values');
    const map: { [key: string]: Unpacked } = {};
    for (let k = 0; k < length; k++) {
      const at = this.at;
      const key = this.value(depth + 1);
      if (typeof key !== 'string') throw new MessagePackError(at, `a key of type ${typeof key}`, 'a string');
      const value = this.value(depth + 1);
      // A plain assignment would set the prototype.
      if (key === '__proto__') {
        Object.defineProperty(map, key, { value, enumerable: true, configurable: true, writable: true });
      } else map[key] = value;
    }
    return map;
  }
}

function narrowed(value: bigint): number | bigint {
  const number = Number(value);
  return Number.isSafeInteger(number) ? number : value;
}

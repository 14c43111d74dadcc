// Not from 'msgpackr': that entry looks for a native addition on Node.
import { Packr } from 'msgpackr/pack';
import { Unpackr } from 'msgpackr/unpack';
import { checkMessagePack } from './check.ts';
import { MessagePackError } from './message-pack-error.ts';

/** What MessagePack's standard types can hold, as JavaScript values. */
export type Packable =
  | null
  | boolean
  | number
  | bigint
  | string
  | Uint8Array
  | readonly Packable[]
  | { readonly [key: string]: Packable };

/** The same with keys whose value is undefined. */
export type PackableOrUndefined =
  | Packable
  | undefined
  | readonly PackableOrUndefined[]
  | { readonly [key: string]: PackableOrUndefined };

/** A value read from MessagePack; integers beyond 2^53 are bigints, binaries views of the message at any alignment. */
export type Unpacked =
  | null
  | boolean
  | number
  | bigint
  | string
  | Uint8Array
  | Unpacked[]
  | { [key: string]: Unpacked };

const packr = new Packr({ useRecords: false, variableMapSize: true });
const unpackr = new Unpackr({
  useRecords: false,
  mapsAsObjects: true,
  // Known to the library, missing in its types.
  int64AsType: 'auto' as 'number',
});

/**
 * MessagePack of a value, standard types alone. Keys keep their order, so equal values built alike give equal bytes.
 *
 * Integers of 2^32 and more become float 64, which holds them exactly up to 2^53; -0 becomes 0.
 *
 * @returns view of memory that is not used again.
 * @throws TypeError for a value with no standard MessagePack form, undefined included.
 */
export function encodeMessagePack(value: Packable): Uint8Array {
  try {
    const bytes = packr.pack(value);
    checkMessagePack(bytes);
    return bytes;
  } catch (error) {
    throw new TypeError(`a value without a standard MessagePack form: ${(error as Error).message}`);
  }
}

/**
 * The value of a MessagePack message.
 *
 * @throws MessagePackError where the message is not whole, goes on behind its end or holds more than standard types.
 */
export function decodeMessagePack(bytes: Uint8Array): Unpacked {
  checkMessagePack(bytes);
  try {
    // Not as the Buffer that it may be: binaries come out as what the message is.
    return unpackr.unpack(new Uint8Array(bytes.buffer, bytes.byteOffset, bytes.length)) as Unpacked;
  } catch (error) {
    const found = error instanceof Error ? error.message : String(error);
    throw new MessagePackError(0, found, 'a message that can be decoded');
  }
}

/** A copy of a plain value without the keys whose value is undefined. */
export function withoutUndefined(value: PackableOrUndefined): Packable {
  if (Array.isArray(value)) return value.map((item) => withoutUndefined(item));
  const prototype = typeof value === 'object' && value !== null ? Object.getPrototypeOf(value) : null;
  if (prototype !== Object.prototype) return value as Packable;
  const kept: Record<string, Packable> = {};
  for (const [key, item] of Object.entries(value as Record<string, PackableOrUndefined>)) {
    if (item !== undefined) kept[key] = withoutUndefined(item);
  }
  return kept;
}

// Not from 'msgpackr': that entry looks for a native addition on Node.
import { Packr } from 'msgpackr/pack';
import { Unpackr } from 'msgpackr/unpack';
import { checkMessagePack } from './check.ts';
import { MessagePackError } from './message-pack-error.ts';

/** What MessagePack's standard types can hold, as JavaScript values. A key whose value is undefined is left out. */
export type Packable =
  | null
  | boolean
  | number
  | bigint
  | string
  | Uint8Array
  | readonly Packable[]
  | { readonly [key: string]: Packable | undefined };

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
 * @throws TypeError for a value with no standard MessagePack form.
 */
export function encodeMessagePack(value: Packable): Uint8Array {
  try {
    // A copy, since the library writes one message behind the other into memory of its own.
    const bytes = new Uint8Array(packr.pack(withoutUndefined(value)));
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

function withoutUndefined(value: Packable | undefined): Packable | undefined {
  if (typeof value !== 'object' || value === null || value instanceof Uint8Array) return value;
  if (Array.isArray(value)) return value.map((item) => withoutUndefined(item) as Packable);
  if (Object.getPrototypeOf(value) !== Object.prototype && Object.getPrototypeOf(value) !== null)
    return value;
  const kept: Record<string, Packable> = {};
  for (const [key, item] of Object.entries(value)) {
    if (item !== undefined) kept[key] = withoutUndefined(item) as Packable;
  }
  return kept;
}

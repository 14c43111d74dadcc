import { decodeMessagePack, MessagePackError, type Unpacked } from '../message-pack/index.ts';
import { ShowerFileError } from '../shower-file-error.ts';
import { BLOCK_HEAD_BYTES } from './layout.ts';
import type { Block } from './read-block.ts';

/** Keys and values that this version does not know; they are written again as they were. */
export type UnknownKeys = Readonly<Record<string, Unpacked>>;

/** A decoded value is not what its place asks for. */
export class FieldError extends Error {
  readonly found: string;
  readonly expected: string;

  constructor(place: string, found: string, expected: string) {
    super(`${place}: expected ${expected}, found ${found}`);
    this.found = `${place}: ${found}`;
    this.expected = expected;
  }
}

/** A decoded map whose values are asked for by key and type. */
export class Fields {
  readonly place: string;
  private readonly map: Readonly<Record<string, Unpacked>>;
  private readonly asked = new Set<string>();

  /** @throws FieldError where `value` is no map. */
  constructor(value: Unpacked, place: string) {
    if (!isMap(value)) throw new FieldError(place, describe(value), 'a map');
    this.map = value;
    this.place = place;
  }

  /** The value under `key`; undefined where there is none. */
  optional(key: string): Unpacked | undefined {
    this.asked.add(key);
    return Object.hasOwn(this.map, key) ? this.map[key] : undefined;
  }

  /** @throws FieldError where the key is missing. */
  value(key: string): Unpacked {
    const value = this.optional(key);
    if (value === undefined) throw new FieldError(this.at(key), 'nothing', 'a value');
    return value;
  }

  /** A number; `absent` where there is none or nil, NaN unless given. */
  number(key: string, absent = NaN): number {
    const value = this.optional(key) ?? absent;
    return typeof value === 'number' ? value : this.fail(key, value, 'a number');
  }

  /** A safe integer of at least `least`. */
  integer(key: string, least = 0): number {
    const value = this.value(key);
    const fits = typeof value === 'number' && Number.isSafeInteger(value) && value >= least;
    return fits ? value : this.fail(key, value, `an integer of at least ${least}`);
  }

  integerOrNull(key: string): number | null {
    const value = this.optional(key) ?? null;
    const fits = value === null || (typeof value === 'number' && Number.isSafeInteger(value));
    return fits ? value : this.fail(key, value, 'an integer below 2^53 or nil');
  }

  text(key: string, absent?: string): string {
    const value = this.optional(key) ?? absent;
    return typeof value === 'string' ? value : this.fail(key, value, 'a string');
  }

  textOrNull(key: string): string | null {
    const value = this.optional(key) ?? null;
    return value === null || typeof value === 'string' ? value : this.fail(key, value, 'a string or nil');
  }

  flag(key: string): boolean {
    const value = this.optional(key) ?? false;
    return typeof value === 'boolean' ? value : this.fail(key, value, 'true or false');
  }

  /** One of some words; `absent` where there is none or nil. */
  word<W extends string, A extends W | null>(key: string, words: readonly W[], absent: A): W | A {
    const value = this.optional(key) ?? absent;
    if (value === absent || words.includes(value as W)) return value as W | A;
    return this.fail(key, value, words.join(' or '));
  }

  binary(key: string): Uint8Array {
    const value = this.value(key);
    return value instanceof Uint8Array ? value : this.fail(key, value, 'a binary');
  }

  /** The elements of an array, none where there is no array. */
  list<T>(key: string, item: (value: Unpacked, place: string) => T): T[] {
    const value = this.optional(key) ?? [];
    if (!Array.isArray(value)) return this.fail(key, value, 'an array');
    return value.map((element, k) => item(element, `${this.at(key)}[${k}]`));
  }

  /** The map under `key`, an empty one where there is none. */
  fields(key: string): Fields {
    return new Fields(this.optional(key) ?? {}, this.at(key));
  }

  /** Every key, in the order of the map. */
  keys(): string[] {
    return Object.keys(this.map);
  }

  /** What was never asked for. */
  unknown(): UnknownKeys {
    return Object.fromEntries(Object.entries(this.map).filter(([key]) => !this.asked.has(key)));
  }

  private at(key: string): string {
    return this.place === '' ? key : `${this.place}.${key}`;
  }

  private fail(key: string, value: Unpacked | undefined, expected: string): never {
    throw new FieldError(this.at(key), describe(value), expected);
  }
}

/** @throws FieldError for anything but a string. */
export function asText(value: Unpacked, place: string): string {
  if (typeof value === 'string') return value;
  throw new FieldError(place, describe(value), 'a string');
}

/** @throws FieldError for anything but a number. */
export function asNumber(value: Unpacked, place: string): number {
  if (typeof value === 'number') return value;
  throw new FieldError(place, describe(value), 'a number');
}

/**
 * What `decode` makes of the map that a block holds.
 *
 * @throws ShowerFileError `malformed-file` where the map or a value in it is not as `decode` asks.
 */
export function decodeBlock<T>(file: string, block: Block, decode: (fields: Fields) => T): T {
  const start = block.start + BLOCK_HEAD_BYTES;
  try {
    return decode(new Fields(decodeMessagePack(block.payload), ''));
  } catch (error) {
    if (error instanceof FieldError) {
      throw new ShowerFileError('malformed-file', file, start, error.found, error.expected);
    }
    if (error instanceof MessagePackError) {
      throw new ShowerFileError('malformed-file', file, start + error.at, error.found, error.expected);
    }
    throw error;
  }
}

function isMap(value: Unpacked): value is { [key: string]: Unpacked } {
  return (
    typeof value === 'object' && value !== null && !Array.isArray(value) && !(value instanceof Uint8Array)
  );
}

function describe(value: Unpacked | undefined): string {
  if (value === undefined) return 'nothing';
  if (value === null) return 'nil';
  if (value instanceof Uint8Array) return `a binary of ${value.length} bytes`;
  if (Array.isArray(value)) return `an array of ${value.length}`;
  if (typeof value === 'object') return 'a map';
  return typeof value === 'string' ? JSON.stringify(value.slice(0, 40)) : String(value);
}

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

const utf8 = new TextEncoder();

/**
 * MessagePack of a value, standard types alone, each number in its shortest form.
 *
 * Safe integers become integers, every other number (-0, NaN and infinities included) a float 64, a Uint8Array a binary. Keys
 * keep their order, so equal values built alike give equal bytes.
 *
 * @throws TypeError for a value that is none of Packable, with its place in the value.
 * Source: the MessagePack specification, 2013 form (with str 8 and bin).
 */
export function encodeMessagePack(value: Packable): Uint8Array {
  const out = new Encoder();
  out.value(value, 'value');
  return out.bytes.slice(0, out.length);
}

class Encoder {
  bytes = new Uint8Array(1024);
  private view = new DataView(this.bytes.buffer);
  length = 0;

  value(value: unknown, place: string): void {
    if (typeof value === 'number') this.number(value);
    else if (typeof value === 'string') this.string(value);
    else if (value === null) this.byte(0xc0);
    else if (typeof value === 'boolean') this.byte(value ? 0xc3 : 0xc2);
    else if (value instanceof Uint8Array) this.binary(value);
    else if (Array.isArray(value)) this.array(value, place);
    else if (typeof value === 'bigint') this.bigint(value, place);
    else if (typeof value === 'object' && isPlain(value)) this.map(value as Record<string, unknown>, place);
    else throw new TypeError(`${place}: ${describe(value)} has no MessagePack form`);
  }

  private number(value: number): void {
    if (!Number.isSafeInteger(value) || Object.is(value, -0))
      this.wide(0xcb, 8, (v, at) => v.setFloat64(at, value));
    else if (value >= 0) this.natural(value);
    else if (value >= -32) this.byte(value & 0xff);
    else if (value >= -0x80) this.wide(0xd0, 1, (v, at) => v.setInt8(at, value));
    else if (value >= -0x8000) this.wide(0xd1, 2, (v, at) => v.setInt16(at, value));
    else if (value >= -0x80000000) this.wide(0xd2, 4, (v, at) => v.setInt32(at, value));
    else this.wide(0xd3, 8, (v, at) => v.setBigInt64(at, BigInt(value)));
  }

  private natural(value: number): void {
    if (value < 0x80) this.byte(value);
    else if (value < 0x100) this.wide(0xcc, 1, (v, at) => v.setUint8(at, value));
    else if (value < 0x10000) this.wide(0xcd, 2, (v, at) => v.setUint16(at, value));
    else if (value < 0x100000000) this.wide(0xce, 4, (v, at) => v.setUint32(at, value));
    else this.wide(0xcf, 8, (v, at) => v.setBigUint64(at, BigInt(value)));
  }

  private bigint(value: bigint, place: string): void {
    if (value >= 0n && value < 1n << 64n) this.wide(0xcf, 8, (v, at) => v.setBigUint64(at, value));
    else if (value < 0n && value >= -(1n << 63n)) this.wide(0xd3, 8, (v, at) => v.setBigInt64(at, value));
    else throw new TypeError(`${place}: an integer beyond 64 bits has no MessagePack form`);
  }

  private string(value: string): void {
    const bytes = utf8.encode(value);
    const length = bytes.length;
    if (length < 32) this.byte(0xa0 | length);
    else this.lengthAfter(length, 0xd9, 0xda, 0xdb);
    this.copy(bytes);
  }

  private binary(bytes: Uint8Array): void {
    this.lengthAfter(bytes.length, 0xc4, 0xc5, 0xc6);
    this.copy(bytes);
  }

  private array(value: readonly unknown[], place: string): void {
    if (value.length < 16) this.byte(0x90 | value.length);
    else this.lengthAfter(value.length, null, 0xdc, 0xdd);
    for (let k = 0; k < value.length; k++) this.value(value[k], `${place}[${k}]`);
  }

  private map(value: Record<string, unknown>, place: string): void {
    const keys = Object.keys(value).filter((key) => value[key] !== undefined);
    if (keys.length < 16) this.byte(0x80 | keys.length);
    else this.lengthAfter(keys.length, null, 0xde, 0xdf);
    for (const key of keys) {
      this.string(key);
      this.value(value[key], `${place}.${key}`);
    }
  }

  private lengthAfter(length: number, form8: number | null, form16: number, form32: number): void {
    if (form8 !== null && length < 0x100) this.wide(form8, 1, (v, at) => v.setUint8(at, length));
    else if (length < 0x10000) this.wide(form16, 2, (v, at) => v.setUint16(at, length));
    else this.wide(form32, 4, (v, at) => v.setUint32(at, length));
  }

  private wide(form: number, width: number, set: (view: DataView, at: number) => void): void {
    this.byte(form);
    this.room(width);
    set(this.view, this.length);
    this.length += width;
  }

  private byte(byte: number): void {
    this.room(1);
    this.bytes[this.length++] = byte;
  }

  private copy(bytes: Uint8Array): void {
    this.room(bytes.length);
    this.bytes.set(bytes, this.length);
    this.length += bytes.length;
  }

  private room(more: number): void {
    if (this.length + more <= this.bytes.length) return;
    const wider = new Uint8Array(2 * (this.length + more));
    wider.set(this.bytes.subarray(0, this.length));
    this.bytes = wider;
    this.view = new DataView(wider.buffer);
  }
}

function isPlain(value: object): boolean {
  const prototype = Object.getPrototypeOf(value);
  return prototype === Object.prototype || prototype === null;
}

function describe(value: unknown): string {
  return typeof value === 'object'
    ? `a ${(value as object).constructor.name}`
    : `a value of type ${typeof value}`;
}

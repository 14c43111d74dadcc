import type { Packable, Unpacked } from '../message-pack/index.ts';
import { FieldError } from './fields.ts';

const TYPES = { u4: 4, u8: 8, i4: 4, f8: 8 } as const;
export type PlainType = keyof typeof TYPES;

/** Numbers as an array of type name and little-endian elements, neither shuffled nor deflated. */
export function writePlainColumn(values: Float64Array, type: PlainType, length = values.length): Packable {
  const width = TYPES[type];
  const bytes = new Uint8Array(width * length);
  const view = new DataView(bytes.buffer);
  values.forEach((value, k) => {
    const at = k * width;
    if (type === 'u4') view.setUint32(at, value, true);
    else if (type === 'i4') view.setInt32(at, value, true);
    else if (type === 'u8') view.setBigUint64(at, BigInt(value), true);
    // Written anew, so that every NaN has the same bits.
    else view.setFloat64(at, Number.isNaN(value) ? NaN : value, true);
  });
  return [type, bytes];
}

/**
 * The numbers of a plain column.
 *
 * @param length Elements that it must have, null where any number will do.
 * @throws FieldError where it is no plain column or of another length.
 */
export function readPlainColumn(value: Unpacked, place: string, length: number | null): Float64Array {
  if (!Array.isArray(value))
    throw new FieldError(place, 'something else', 'an array of type name and binary');
  const [type, bytes] = value;
  if (typeof type !== 'string' || !Object.hasOwn(TYPES, type) || !(bytes instanceof Uint8Array)) {
    throw new FieldError(place, `type ${String(type)}`, `${Object.keys(TYPES).join(' or ')}, and a binary`);
  }
  const width = TYPES[type as PlainType];
  const count = bytes.length / width;
  if (!Number.isInteger(count) || (length !== null && count !== length)) {
    throw new FieldError(place, `${bytes.length} bytes of ${type}`, `${length ?? 'whole'} elements`);
  }
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  const read = (at: number): number => {
    if (type === 'u4') return view.getUint32(at, true);
    if (type === 'i4') return view.getInt32(at, true);
    return type === 'u8' ? Number(view.getBigUint64(at, true)) : view.getFloat64(at, true);
  };
  return Float64Array.from({ length: count }, (_, k) => read(k * width));
}

// Byte p of element n of a group stands at p * (elements of the group) + n: like bytes side by side deflate well.

// Which half of a double comes first in memory; the file is little-endian on every machine.
const LOW = new Uint8Array(Uint16Array.of(1).buffer)[0] === 1 ? 0 : 1;
const HIGH = 1 - LOW;
const NAN_HIGH = 0x7ff80000;

/** The two halves of each double. */
export function halves(values: Float64Array, start: number, end: number): Uint32Array {
  return new Uint32Array(values.buffer, values.byteOffset + 8 * start, 2 * (end - start));
}

/**
 * Spread doubles over eight planes.
 *
 * @param planes Planes of `elements` bytes each; written from byte `at` of each.
 * Every NaN becomes the one with the bits 0x7ff8000000000000: the others differ between machines.
 */
export function shuffleDoubles(
  planes: Uint8Array,
  elements: number,
  at: number,
  values: Float64Array,
  start: number,
  end: number,
): void {
  const words = halves(values, start, end);
  const p1 = elements;
  const p2 = 2 * elements;
  const p3 = 3 * elements;
  const p4 = 4 * elements;
  const p5 = 5 * elements;
  const p6 = 6 * elements;
  const p7 = 7 * elements;
  for (let k = 0; k < words.length; k += 2, at++) {
    let low = words[k + LOW];
    let high = words[k + HIGH];
    if ((high & 0x7ff00000) === 0x7ff00000 && ((high & 0xfffff) | low) !== 0) {
      low = 0;
      high = NAN_HIGH;
    }
    planes[at] = low;
    planes[at + p1] = low >>> 8;
    planes[at + p2] = low >>> 16;
    planes[at + p3] = low >>> 24;
    planes[at + p4] = high;
    planes[at + p5] = high >>> 8;
    planes[at + p6] = high >>> 16;
    planes[at + p7] = high >>> 24;
  }
}

/** Spread integers over `width` planes, 1, 2 or 4; as `shuffleDoubles`. */
export function shuffleIntegers(
  planes: Uint8Array,
  elements: number,
  at: number,
  width: number,
  values: ArrayLike<number>,
  start: number,
  end: number,
): void {
  for (let p = 0; p < width; p++) {
    const shift = 8 * p;
    const offset = p * elements + at - start;
    for (let k = start; k < end; k++) planes[offset + k] = values[k] >> shift;
  }
}

/**
 * Gather doubles from eight planes.
 *
 * @param planes One array a byte of the element; read from byte `at` of each.
 */
export function gatherDoubles(values: Float64Array, planes: readonly Uint8Array[], at: number): void {
  const words = halves(values, 0, values.length);
  const [p0, p1, p2, p3, p4, p5, p6, p7] = planes;
  for (let k = 0; k < words.length; k += 2, at++) {
    words[k + LOW] = p0[at] | (p1[at] << 8) | (p2[at] << 16) | (p3[at] << 24);
    words[k + HIGH] = p4[at] | (p5[at] << 8) | (p6[at] << 16) | (p7[at] << 24);
  }
}

/** Gather signed integers of one, two or four planes; as `gatherDoubles`. */
export function gatherIntegers(
  values: Int32Array | Float64Array | Uint8Array,
  planes: readonly Uint8Array[],
  at: number,
): void {
  const count = values.length;
  const [p0, p1, p2, p3] = planes;
  if (planes.length === 1) for (let k = 0; k < count; k++) values[k] = (p0[at + k] << 24) >> 24;
  else if (planes.length === 2) {
    for (let k = 0; k < count; k++) values[k] = ((p0[at + k] | (p1[at + k] << 8)) << 16) >> 16;
  } else {
    for (let k = 0; k < count; k++) {
      values[k] = p0[at + k] | (p1[at + k] << 8) | (p2[at + k] << 16) | (p3[at + k] << 24);
    }
  }
}

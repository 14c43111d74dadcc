/** Element types of columns in a file, little-endian: i signed, u unsigned, f IEEE 754, and the bytes of each. */
export const ELEMENT_TYPES = ['i1', 'i2', 'i4', 'u1', 'u2', 'u4', 'f4', 'f8'] as const;
export type ElementType = (typeof ELEMENT_TYPES)[number];

/** Bytes of an element. */
export function widthOf(type: ElementType): number {
  return Number(type[1]);
}

/** The narrowest signed type that holds integers from `lowest` to `highest`. */
export function narrowest(lowest: number, highest: number): ElementType {
  if (lowest >= -0x80 && highest < 0x80) return 'i1';
  return lowest >= -0x8000 && highest < 0x8000 ? 'i2' : 'i4';
}

/** Bytes `start` to `end` inclusive. */
export interface ByteRange {
  readonly start: number;
  readonly end: number;
}

/**
 * The part of `size` bytes that an HTTP Range header asks for.
 *
 * @returns null for the whole (no header, several ranges, or a header that is none: RFC 9110 has those ignored),
 * `unsatisfiable` where nothing of the range exists.
 */
export function readRange(header: string | undefined, size: number): ByteRange | null | 'unsatisfiable' {
  const match = header?.match(/^bytes=(\d*)-(\d*)$/);
  if (!match) return null;
  const [, first, last] = match;
  if (first === '' && last === '') return null;
  if (first === '') {
    const length = Number(last);
    if (length === 0 || size === 0) return 'unsatisfiable';
    return { start: Math.max(0, size - length), end: size - 1 };
  }
  const start = Number(first);
  if (last !== '' && Number(last) < start) return null;
  if (start >= size) return 'unsatisfiable';
  return { start, end: last === '' ? size - 1 : Math.min(Number(last), size - 1) };
}

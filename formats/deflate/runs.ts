import type { BitWriter } from './bit-writer.ts';

// Lengths 3 to 258 of RFC 1951, section 3.2.5: symbol, extra bits and first length of each class.
const LENGTH_SYMBOL = new Uint16Array(259);
const LENGTH_EXTRA = new Uint8Array(259);
const LENGTH_FIRST = new Uint16Array(259);
{
  let length = 3;
  for (let symbol = 257; symbol < 285; symbol++) {
    const extra = symbol < 265 ? 0 : (symbol - 261) >> 2;
    const first = length;
    for (let k = 0; k < 1 << extra && length < 258; k++, length++) {
      LENGTH_SYMBOL[length] = symbol;
      LENGTH_EXTRA[length] = extra;
      LENGTH_FIRST[length] = first;
    }
  }
  LENGTH_SYMBOL[258] = 285;
  LENGTH_FIRST[258] = 258;
}

const LONGEST = 258;
/** Shorter runs are spelled out: a common byte takes a bit or two, a run's length about fourteen. */
const SHORTEST = 12;

/** End of the run of equal bytes that starts at `at`. */
function runEnd(source: Uint8Array, at: number, end: number): number {
  const byte = source[at++];
  while (at < end && source[at] === byte) at++;
  return at;
}

/**
 * Count the symbols of bytes `start` to `end` when long runs are written as "repeat the last byte".
 *
 * @param counts Int32Array, overwritten: how often each literal and length symbol occurs.
 * @returns number of extra bits that the lengths need.
 */
export function countRuns(counts: Int32Array, source: Uint8Array, start: number, end: number): number {
  counts.fill(0);
  let extraBits = 0;
  for (let at = start; at < end; ) {
    const next = runEnd(source, at, end);
    counts[source[at]]++;
    let left = next - at - 1;
    for (; left >= SHORTEST; left -= Math.min(left, LONGEST)) {
      const length = Math.min(left, LONGEST);
      counts[LENGTH_SYMBOL[length]]++;
      extraBits += LENGTH_EXTRA[length] + 1;
    }
    counts[source[at]] += left;
    at = next;
  }
  return extraBits;
}

/** Write what `countRuns` counted; the one distance code is a single zero bit. */
export function writeRuns(
  bits: BitWriter,
  codes: Int32Array,
  source: Uint8Array,
  start: number,
  end: number,
): void {
  for (let at = start; at < end; ) {
    const next = runEnd(source, at, end);
    const literal = codes[source[at]];
    bits.write(literal & 0xffff, literal >>> 16);
    let left = next - at - 1;
    for (; left >= SHORTEST; left -= Math.min(left, LONGEST)) {
      const length = Math.min(left, LONGEST);
      const code = codes[LENGTH_SYMBOL[length]];
      bits.write(code & 0xffff, code >>> 16);
      bits.write(length - LENGTH_FIRST[length], LENGTH_EXTRA[length]);
      bits.write(0, 1);
    }
    for (; left > 0; left--) bits.write(literal & 0xffff, literal >>> 16);
    at = next;
  }
}

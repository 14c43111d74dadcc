/** Bytes looked at to see whether a segment is worth coding. */
const SAMPLE = 128;
/**
 * Sum of squared counts above which it is. Bytes without structure give 128 + 128^2 / 256 = 192, with a standard deviation of
 * 11; a code that gains an eighth gives 256 and does not pay for its table and the time to read it.
 */
const STRUCTURE = 288;
const BITS_PER_CHI_SQUARE = 1 / (2 * Math.LN2);

const TABLE_BITS = 200;

const sampled = new Int32Array(256);

/**
 * Whether bytes `start` to `end` are distributed unevenly enough for a Huffman code to be worth its while.
 *
 * Judged by 128 of them, evenly spread; where there are fewer, yes.
 */
export function hasStructure(source: Uint8Array, start: number, end: number): boolean {
  const stride = (end - start) / SAMPLE;
  if (stride < 1) return true;
  sampled.fill(0);
  for (let k = 0; k < SAMPLE; k++) sampled[source[start + Math.floor(k * stride)]]++;
  let squares = 0;
  for (let s = 0; s < 256; s++) squares += sampled[s] * sampled[s];
  return squares > STRUCTURE;
}

/**
 * Whether two segments are better coded with one code than with one each.
 *
 * Two codes gain about chi-square / (2 ln 2) bits and cost a second table of code lengths, about 100 bits and 4 a symbol.
 *
 * @param a @param b Int32Array(256): how often each byte occurs, `inA` and `inB` times in all.
 */
export function shareCode(a: Int32Array, inA: number, b: Int32Array, inB: number): boolean {
  let chiSquare = 0;
  let symbols = 0;
  for (let s = 0; s < 256; s++) {
    if (b[s] === 0 && a[s] === 0) continue;
    if (b[s] > 0) symbols++;
    const difference = a[s] * inB - b[s] * inA;
    chiSquare += (difference * difference) / (a[s] + b[s]);
  }
  return (chiSquare / (inA * inB)) * BITS_PER_CHI_SQUARE < TABLE_BITS + 4 * symbols;
}

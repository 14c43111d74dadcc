/** Bytes looked at to judge a plane. */
const SAMPLE = 256;
/**
 * Sum of squared counts above which a plane is worth deflating. Bytes without structure give 512 on average, with a standard
 * deviation of 23; bytes of seven bits give 768 and would gain an eighth at most.
 */
const STRUCTURE = 900;

// scratch, not reentrant
const counts = new Int32Array(256);

/**
 * Whether bytes `start` to `end` are uneven enough to be worth deflating.
 *
 * Judged by 256 of them, evenly spread; where there are fewer, yes. The lower bytes of doubles hold nothing that a compressor
 * could find, and leaving them out makes it four times as fast for one percent of the size (measured, Node 20).
 */
export function hasStructure(bytes: Uint8Array, start: number, end: number): boolean {
  const stride = (end - start) / SAMPLE;
  if (stride < 1) return true;
  counts.fill(0);
  for (let k = 0; k < SAMPLE; k++) counts[bytes[start + Math.floor(k * stride)]]++;
  let squares = 0;
  for (let byte = 0; byte < 256; byte++) squares += counts[byte] * counts[byte];
  return squares > STRUCTURE;
}

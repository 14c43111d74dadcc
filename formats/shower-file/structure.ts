/** Bytes looked at to judge a plane. */
const SAMPLE = 256;
/**
 * Bits per byte, estimated from the sample, below which a plane is worth deflating. Bytes without structure give 7.2: a sample of
 * 256 cannot show all of their eight bits.
 */
const WORTHWHILE = 4.5;

// n log2 n, with straight lines between the powers of two: close enough, and the same on every machine.
const N_LOG_N = Float64Array.from({ length: SAMPLE + 1 }, (_, n) => {
  const power = n > 0 ? 31 - Math.clz32(n) : 0;
  return n * (power + n / (1 << power) - 1);
});

// scratch, not reentrant
const counts = new Int32Array(256);

/**
 * Whether bytes `start` to `end` are uneven enough to be worth deflating.
 *
 * Judged by 256 of them, evenly spread; where there are fewer, yes. The lower bytes of doubles hold next to nothing that a
 * compressor could find, and most of its time would go into looking.
 */
export function hasStructure(bytes: Uint8Array, start: number, end: number): boolean {
  const stride = (end - start) / SAMPLE;
  if (stride < 1) return true;
  counts.fill(0);
  for (let k = 0; k < SAMPLE; k++) counts[bytes[start + Math.floor(k * stride)]]++;
  let sum = 0;
  for (let byte = 0; byte < 256; byte++) sum += N_LOG_N[counts[byte]];
  return 8 - sum / SAMPLE < WORTHWHILE;
}

const floats = new Float64Array(256);
const integers = new Int32Array(256);

/**
 * Time of one turn of a fixed loop of integer and floating-point arithmetic [ns]: what other times are divided by.
 *
 * A turn mixes what the engine does: 32-bit products, table reads and writes, one square root, one division.
 */
export function calibrationTurn(): number {
  const turns = 1_000_000;
  floats.fill(1.5);
  let hash = 1;
  const start = process.hrtime.bigint();
  for (let n = 0; n < turns; n++) {
    hash = (Math.imul(hash ^ (hash >>> 13), 0x5bd1e995) + n) | 0;
    const at = hash & 255;
    integers[at] = hash;
    floats[at] = 0.5 * Math.sqrt(floats[(at + 7) & 255] + (hash >>> 0) * 2.3e-10) + 1 / (1 + floats[at]);
  }
  return Number(process.hrtime.bigint() - start) / turns;
}

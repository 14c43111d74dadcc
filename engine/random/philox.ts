const MULTIPLIER_0 = 0xd2511f53;
const MULTIPLIER_1 = 0xcd9e8d57;
const KEY_STEP_0 = 0x9e3779b9;
const KEY_STEP_1 = 0xbb67ae85;
const TWO_32 = 4294967296;
const PER_TWO_32 = 1 / TWO_32;

/** High 32 bits of a times the constant (high << 16 | low), in 16-bit halves: a fifth faster than through doubles. */
function highWord(a: number, high: number, low: number): number {
  const aLow = a & 0xffff;
  const aHigh = a >>> 16;
  const lower = (Math.imul(high, aLow) + (Math.imul(low, aLow) >>> 16)) | 0;
  const upper = Math.imul(low, aHigh);
  const middle = (lower & 0xffff) + (upper & 0xffff);
  return (Math.imul(high, aHigh) + (lower >>> 16) + (upper >>> 16) + (middle >>> 16)) | 0;
}

/**
 * Counter-based random numbers: Philox4x32-10, keyed by (seed, event, step, draw).
 *
 * A block is four 32-bit words, made from the counter (draw, step, low and high word of the event number) and the key
 * (low and high word of the seed), so that any number can be made without those before it. `block()` moves on to the
 * next draw and leaves the words in `x0` to `x3`.
 *
 * Source: Salmon, Moraes, Dror, Shaw, SC11 (2011).
 */
export class Philox {
  x0 = 0;
  x1 = 0;
  x2 = 0;
  x3 = 0;
  private key0 = 0;
  private key1 = 0;
  private draw = 0;
  private step = 0;
  private event0 = 0;
  private event1 = 0;

  /**
   * Start the numbers of an event.
   *
   * @param seed integer, 0 to 2^53 - 1.
   * @param event integer, 0 to 2^53 - 1.
   */
  startEvent(seed: number, event: number): void {
    this.key0 = seed | 0;
    this.key1 = Math.floor(seed / TWO_32) | 0;
    // `| 0` takes a number modulo 2^32, also above 2^32
    this.event0 = event | 0;
    this.event1 = Math.floor(event / TWO_32) | 0;
    this.startStep(0);
  }

  /** Start the numbers of a step: 0 for the hard process, k + 1 for step k. */
  startStep(step: number): void {
    this.step = step | 0;
    this.draw = 0;
  }

  /** Make the next block. */
  block(): void {
    let c0 = this.draw;
    let c1 = this.step;
    let c2 = this.event0;
    let c3 = this.event1;
    let k0 = this.key0;
    let k1 = this.key1;
    this.draw = (this.draw + 1) | 0;
    for (let round = 0; round < 10; round++) {
      const lo0 = Math.imul(MULTIPLIER_0, c0);
      const lo1 = Math.imul(MULTIPLIER_1, c2);
      const hi0 = highWord(c0, 0xd251, 0x1f53);
      const hi1 = highWord(c2, 0xcd9e, 0x8d57);
      c0 = hi1 ^ c1 ^ k0;
      c1 = lo1;
      c2 = hi0 ^ c3 ^ k1;
      c3 = lo0;
      k0 = (k0 + KEY_STEP_0) | 0;
      k1 = (k1 + KEY_STEP_1) | 0;
    }
    this.x0 = c0;
    this.x1 = c1;
    this.x2 = c2;
    this.x3 = c3;
  }

  /**
   * One block from a counter and a key given word by word, for known-answer tests.
   *
   * @param counter four 32-bit words.
   * @param key two 32-bit words.
   * @returns four words, 0 to 2^32 - 1.
   */
  static words(counter: readonly number[], key: readonly number[]): number[] {
    const generator = new Philox();
    generator.draw = counter[0] | 0;
    generator.step = counter[1] | 0;
    generator.event0 = counter[2] | 0;
    generator.event1 = counter[3] | 0;
    generator.key0 = key[0] | 0;
    generator.key1 = key[1] | 0;
    generator.block();
    return [generator.x0 >>> 0, generator.x1 >>> 0, generator.x2 >>> 0, generator.x3 >>> 0];
  }
}

/** A 32-bit word as a uniform number strictly between 0 and 1, at the middle of its cell of 2^-32. */
export function uniform(word: number): number {
  return ((word >>> 0) + 0.5) * PER_TWO_32;
}

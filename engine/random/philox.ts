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
  /** Both words of the key of each of the ten rounds. */
  private readonly roundKeys = new Int32Array(20);
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
    // `| 0` takes a number modulo 2^32, also above 2^32
    this.setKey(seed | 0, Math.floor(seed / TWO_32) | 0);
    this.event0 = event | 0;
    this.event1 = Math.floor(event / TWO_32) | 0;
    this.startStep(0);
  }

  /** Start the numbers of a step: 0 for the hard process, k + 1 for step k. */
  startStep(step: number): void {
    this.step = step | 0;
    this.draw = 0;
  }

  /** Start anywhere in the event's numbers. @param step, @param draw any 32-bit words. */
  startAt(step: number, draw: number): void {
    this.step = step | 0;
    this.draw = draw | 0;
  }

  /** Make the next block. Two rounds to a turn, on keys made once an event: a quarter faster than round by round. */
  block(): void {
    const keys = this.roundKeys;
    let c0 = this.draw;
    let c1 = this.step;
    let c2 = this.event0;
    let c3 = this.event1;
    this.draw = (c0 + 1) | 0;
    for (let key = 0; key < 20; key += 4) {
      const d0 = highWord(c2, 0xcd9e, 0x8d57) ^ c1 ^ keys[key];
      const d1 = Math.imul(MULTIPLIER_1, c2);
      const d2 = highWord(c0, 0xd251, 0x1f53) ^ c3 ^ keys[key + 1];
      const d3 = Math.imul(MULTIPLIER_0, c0);
      c0 = highWord(d2, 0xcd9e, 0x8d57) ^ d1 ^ keys[key + 2];
      c1 = Math.imul(MULTIPLIER_1, d2);
      c2 = highWord(d0, 0xd251, 0x1f53) ^ d3 ^ keys[key + 3];
      c3 = Math.imul(MULTIPLIER_0, d0);
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
    generator.setKey(key[0] | 0, key[1] | 0);
    generator.block();
    return [generator.x0 >>> 0, generator.x1 >>> 0, generator.x2 >>> 0, generator.x3 >>> 0];
  }

  private setKey(key0: number, key1: number): void {
    const keys = this.roundKeys;
    for (let round = 0; round < 10; round++) {
      keys[2 * round] = key0;
      keys[2 * round + 1] = key1;
      key0 = (key0 + KEY_STEP_0) | 0;
      key1 = (key1 + KEY_STEP_1) | 0;
    }
  }
}

/** A 32-bit word as a uniform number strictly between 0 and 1, at the middle of its cell of 2^-32. */
export function uniform(word: number): number {
  return ((word >>> 0) + 0.5) * PER_TWO_32;
}

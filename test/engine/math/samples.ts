const DOUBLE = new Float64Array(1);
const WORDS = new Uint32Array(DOUBLE.buffer);

/** A stream of numbers for tests: the same for the same seed. Method: Marsaglia, J. Stat. Softw. 8 (2003) 14. */
export class Samples {
  #state: number;
  constructor(seed: number) {
    this.#state = seed | 1;
  }
  word(): number {
    let s = this.#state;
    s ^= s << 13;
    s ^= s >>> 17;
    s ^= s << 5;
    this.#state = s;
    return Math.imul(s, 0x9e3779b1) >>> 0;
  }
  /** Uniform on [low, high), 53 bits. */
  uniform(low = 0, high = 1): number {
    const fraction = ((this.word() >>> 6) * 134217728 + (this.word() >>> 5)) / 9007199254740992;
    return low + (high - low) * fraction;
  }
  sign(): number {
    return this.word() & 0x10000 ? 1 : -1;
  }
  /** m 2^k with k uniform on [low, high] and m uniform on [1, 2). Subnormal below k = -1022. */
  scale(low: number, high: number): number {
    const k = Math.floor(this.uniform(low, high + 1));
    // In two steps: 2^k alone may not be a double.
    return this.uniform(1, 2) * 2 ** Math.trunc(k / 2) * 2 ** (k - Math.trunc(k / 2));
  }
  /** Any finite double, every bit pattern alike. */
  double(): number {
    do {
      WORDS[0] = this.word();
      WORDS[1] = this.word();
    } while (!Number.isFinite(DOUBLE[0]));
    return DOUBLE[0];
  }
}

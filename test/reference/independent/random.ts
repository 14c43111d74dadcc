/**
 * A small seeded generator of the test's own: Marsaglia's xorshift with 128 bits of state and Weyl sequence ("xorwow",
 * J. Stat. Soft. 8 (2003) 14), two 32-bit words per double.
 */
export class Generator {
  private x: number;
  private y = 362436069;
  private z = 521288629;
  private w = 88675123;
  private v = 5783321;
  private d = 6615241;

  constructor(seed: number) {
    this.x = (seed * 2654435761 + 123456789) | 0;
    for (let n = 0; n < 64; n++) this.word();
  }

  private word(): number {
    const t = this.x ^ (this.x >>> 2);
    this.x = this.y;
    this.y = this.z;
    this.z = this.w;
    this.w = this.v;
    this.v = this.v ^ (this.v << 4) ^ (t ^ (t << 1));
    this.d = (this.d + 362437) | 0;
    return (this.d + this.v) >>> 0;
  }

  /** Uniform in the open interval (0, 1), 53 bits. */
  uniform(): number {
    const high = this.word() >>> 5;
    const low = this.word() >>> 6;
    return (high * 67108864 + low + 0.5) / 9007199254740992;
  }
}

import { describe, expect, it } from 'vitest';
import { ARC_TABLE } from '../../../engine/math/arc-table.ts';
import { POWERS_OF_TWO, ZEROTH_POWER } from '../../../engine/math/bits.ts';
import { EXP_TABLE } from '../../../engine/math/exp-table.ts';
import { LOG_TABLE } from '../../../engine/math/log-table.ts';
import { SINE_TABLE } from '../../../engine/math/sine-table.ts';
import * as exact from './high-precision.ts';

const P = 1280;
const ONE = 1n << BigInt(P);
const fixed = (x: number): bigint => exact.fixed(x, P);
const size = (n: bigint): bigint => (n < 0n ? -n : n);
/** The nearest double of what is left is right to half of its own last bit. */
const expectRest = (truth: bigint, head: number, rest: number, where: string): void => {
  const off = size(truth - fixed(head) - fixed(rest));
  expect(2n * off <= exact.ulp(rest, P) + 2n, where).toBe(true);
};

describe('the tables against whole-number arithmetic', () => {
  it('logarithms: every reciprocal serves its interval and every logarithm is the nearest pair', () => {
    for (let row = 0; row < 128; row++) {
      const low = row < 80 ? 11 / 16 + row / 256 : 1 + (row - 80) / 128;
      const high = row < 80 ? 11 / 16 + (row + 1) / 256 : 1 + (row - 79) / 128;
      const [c, head, rest] = LOG_TABLE.subarray(3 * row, 3 * row + 3);
      expect(c * 256).toBe(Math.round(c * 256));
      expect(Math.max(Math.abs(low * c - 1), Math.abs(high * c - 1))).toBeLessThanOrEqual(2 ** -7);
      expect(head * 2 ** 42).toBe(Math.round(head * 2 ** 42));
      if (c === 1) expect([head, rest]).toEqual([0, 0]);
      else expectRest(-exact.log(fixed(c), P), head, rest, `row ${row}`);
    }
  });
  it('powers of two', () => {
    for (let k = 0; k < 2098; k++) expect(POWERS_OF_TWO[k]).toBe(2 ** (k - ZEROTH_POWER));
  });
  it('fractional powers of two and the relative rest', () => {
    for (let j = 0; j < 128; j++) {
      const truth = exact.exp((exact.ln2(P) * BigInt(j)) / 128n, P);
      const head = fixed(EXP_TABLE[2 * j]);
      expect(exact.ulpsOff(EXP_TABLE[2 * j], truth, P)).toBeLessThanOrEqual(0.5);
      if (j > 0) expectRest(((truth - head) << BigInt(P)) / head, 0, EXP_TABLE[2 * j + 1], `2^(${j}/128)`);
    }
  });
  it('sines and cosines', () => {
    for (let k = 0; k < 128; k++) {
      const { sine, cosine } = exact.sineCosine((exact.pi(P) * BigInt(k)) / 64n, P);
      const [s, sRest, c, cRest] = SINE_TABLE.subarray(4 * k, 4 * k + 4);
      expect(s).toBe(Math.fround(s));
      expect(c).toBe(Math.fround(c));
      if (k % 64 === 0) expect([s, sRest]).toEqual([0, 0]);
      else expectRest(sine, s, sRest, `sine ${k}`);
      if (k % 64 === 32) expect([c, cRest]).toEqual([0, 0]);
      else expectRest(cosine, c, cRest, `cosine ${k}`);
    }
  });
  it('arc tangents', () => {
    for (let k = 1; k <= 64; k++) {
      const truth = exact.arcTangent2(BigInt(k), 64n, P);
      expect(exact.ulpsOff(ARC_TABLE[2 * k], truth, P)).toBeLessThanOrEqual(0.5);
      expectRest(truth, ARC_TABLE[2 * k], ARC_TABLE[2 * k + 1], `atan ${k}/64`);
    }
    expect([...ARC_TABLE.subarray(0, 2)]).toEqual([0, 0]);
  });
  it('the reference itself: exp and ln, sine and arc tangent undo each other, pi has its known digits', () => {
    const x = (3n * ONE) / 7n;
    expect(size(exact.log(exact.exp(x, P), P) - x) < 1n << 60n).toBe(true);
    const { sine, cosine } = exact.sineCosine(x, P);
    expect(size(exact.arcTangent2(sine, cosine, P) - x) < 1n << 60n).toBe(true);
    expect(((exact.pi(P) * 10n ** 50n) >> BigInt(P)).toString()).toBe(
      '314159265358979323846264338327950288419716939937510',
    );
  });
});

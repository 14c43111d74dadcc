import { POWERS_OF_TWO, ROUNDER, ZEROTH_POWER } from './bits.ts';

// Angles are brought to x = n pi/64 + r with |r| <= pi/128. pi/64 stands in three pieces; multiples of the first
// two (32 and 30 bits) are exact for n < 2^21. Method: Cody & Waite, Software Manual for the Elementary
// Functions (1980).
const STEP_HIGH = 0.049087385210441425;
const STEP_MIDDLE = 1.8990939056788905e-12;
const STEP_LOW = 2.6042946620377746e-21;
const STEPS_PER_RADIAN = 20.371832715762604;

/** r and what its rounding left, from reduceAngle; scratch. */
export const REDUCED = new Float64Array(2);

/**
 * The step n mod 128 of the circle nearest to an angle; the remainder goes to REDUCED.
 *
 * @param x Any finite angle [rad].
 * @returns n as an integer of which the last seven bits count.
 * Accuracy: the remainder is good to 2^-66 relative for every double.
 */
export function reduceAngle(x: number): number {
  if (!(x > -100000 && x < 100000)) return reduceExactly(x);
  const n = x * STEPS_PER_RADIAN + ROUNDER - ROUNDER;
  const first = x - n * STEP_HIGH;
  const middle = n * STEP_MIDDLE;
  const high = first - middle;
  // Three pieces do not reach as far as a remainder this close to zero needs.
  if (high > -1e-9 && high < 1e-9 && n !== 0) return reduceExactly(x);
  const back = high - first;
  const low = first - (high - back) - (middle + back) - n * STEP_LOW;
  const r = high + low;
  REDUCED[0] = r;
  REDUCED[1] = high - r + low;
  return n | 0;
}

/** floor(2^1200 * 64/pi). */
const STEPS_2_1200 =
  0x145f306dc9c882a53f84eafa3ea69bb81b6c52b3278872083fca2c757bd778ac36e48dc74849ba5c00c925dd413a32439fc3bd63962534e7dd1046bea5d768909d338e04d68befc827323ac7306a673e93908bf177bf250763ff12fffbc0b301fde5e2316b414da3eda6cfd9e4f96136e9e8c7ecd3cbfd45aea4f758fd7cbe2f67a0e73ef14a525d4d7f6bf623f1aba10ac06608df8f6dn;
/** 2^192 * pi/64 to the nearest integer. */
const STEP_2_192 = 0xc90fdaa22168c234c4c6628b80dc1cd129024e088a67cc7n;

const WORDS = new DataView(new ArrayBuffer(8));

/** The same in whole-number arithmetic, for the rare angle: sin takes 13 times as long there (measured). */
function reduceExactly(x: number): number {
  WORDS.setFloat64(0, x);
  const bits = WORDS.getBigUint64(0);
  const exponent = Number((bits >> 52n) & 0x7ffn);
  const fraction = (bits & 0xfffffffffffffn) | 0x10000000000000n;
  // |x| = fraction * 2^(exponent - 1075); x in steps, times 2^192.
  const magnitude = (fraction * STEPS_2_1200) >> BigInt(1200 - 192 + 1075 - exponent);
  const steps = x < 0 ? -magnitude : magnitude;
  const n = (steps + (1n << 191n)) >> 192n;
  const remainder = (steps - (n << 192n)) * STEP_2_192;
  const r = Number(remainder);
  const scale = POWERS_OF_TWO[ZEROTH_POWER - 384];
  REDUCED[0] = r * scale;
  REDUCED[1] = Number(remainder - BigInt(r)) * scale;
  return Number(n & 127n);
}

/**
 * One number seen as its bit pattern; write DOUBLE[0], read HIGH_WORD[1] (sign, exponent, 20 bits of the fraction).
 * Scratch, overwritten by every function of this folder. Word 1 is the high one because typed arrays are
 * little-endian on every platform that Node and the browsers run on.
 */
export const DOUBLE = new Float64Array(1);
/** The two 32-bit words of DOUBLE[0]. */
export const HIGH_WORD = new Int32Array(DOUBLE.buffer);

/** Index in POWERS_OF_TWO of 2^0. */
export const ZEROTH_POWER = 1074;
/** 2^(k - 1074) for k = 0 .. 2097, all exact: a product with one of these costs less than editing an exponent. */
export const POWERS_OF_TWO = new Float64Array(2098);
for (let k = 0, power = 5e-324; k < 2098; k++, power *= 2) POWERS_OF_TWO[k] = power;

/** Adding and taking away 1.5 * 2^52 rounds a number below 2^51 to the nearest whole one (ties to even). */
export const ROUNDER = 6755399441055744;

/**
 * What rounding took from a product: a*b - fl(a*b), exactly.
 *
 * @param a, b Finite, magnitudes below 2^990, the product above 2^-960.
 * @param product fl(a*b).
 * Source: Dekker, Numer. Math. 18 (1971) 224.
 */
export function productError(a: number, b: number, product: number): number {
  const aSplit = 134217729 * a;
  const aHigh = aSplit - (aSplit - a);
  const aLow = a - aHigh;
  const bSplit = 134217729 * b;
  const bHigh = bSplit - (bSplit - b);
  const bLow = b - bHigh;
  return aLow * bLow - (product - aHigh * bHigh - aLow * bHigh - aHigh * bLow);
}

/**
 * (a + aLow) / (b + bLow), to 0.51 ulp if the low parts are below an ulp of the high ones.
 *
 * @param a, b Magnitudes between 2^-450 and 2^450, b not zero.
 */
export function divide(a: number, aLow: number, b: number, bLow: number): number {
  const quotient = a / b;
  const back = quotient * b;
  const remainder = a - back - productError(quotient, b, back);
  return quotient + (remainder + aLow - quotient * bLow) / b;
}

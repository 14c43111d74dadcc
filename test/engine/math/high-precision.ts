// Elementary functions in whole-number arithmetic, slow and to any number of bits: what the fast ones are held
// against. A fixed-point number X with P bits after the point stands for X / 2^P.

const DOUBLE = new Float64Array(1);
const BITS = new BigUint64Array(DOUBLE.buffer);

/** A double as mantissa * 2^exponent, exactly. */
export function parts(x: number): { mantissa: bigint; exponent: number } {
  DOUBLE[0] = Math.abs(x);
  const field = Number(BITS[0] >> 52n);
  const fraction = BITS[0] & 0xfffffffffffffn;
  const mantissa = field === 0 ? fraction : fraction | 0x10000000000000n;
  return { mantissa: x < 0 ? -mantissa : mantissa, exponent: Math.max(field, 1) - 1075 };
}

const shift = (n: bigint, by: number): bigint => (by >= 0 ? n << BigInt(by) : n >> BigInt(-by));

/** A double with P bits after the point; exact for P >= 1074. */
export function fixed(x: number, P: number): bigint {
  const { mantissa, exponent } = parts(x);
  return shift(mantissa, exponent + P);
}

/** The distance of the neighbours of x, with P bits after the point. */
export function ulp(x: number, P: number): bigint {
  return shift(1n, parts(x).exponent + P);
}

/** |found - exact| in ulps of found. */
export function ulpsOff(found: number, exact: bigint, P: number): number {
  const off = fixed(found, P) - exact;
  return Number(((off < 0n ? -off : off) * 1_000_000n) / ulp(found, P)) / 1e6;
}

/** Whole square root, rounded down. */
export function squareRoot(n: bigint): bigint {
  if (n < 2n) return n;
  let root = 1n << BigInt((n.toString(2).length + 1) >> 1);
  for (;;) {
    const next = (root + n / root) >> 1n;
    if (next >= root) return root;
    root = next;
  }
}

function arcTangentOfInverse(n: bigint, P: number): bigint {
  let power = (1n << BigInt(P)) / n;
  let sum = power;
  for (let k = 3n; power !== 0n; k += 2n) {
    power /= -n * n;
    sum += power / k;
  }
  return sum;
}

const remembered = new Map<string, bigint>();
function remember(name: string, P: number, make: (bits: number) => bigint): bigint {
  const key = name + P;
  let value = remembered.get(key);
  if (value === undefined) {
    value = make(P + 32) >> 32n;
    remembered.set(key, value);
  }
  return value;
}

/** pi by Machin's formula. */
export const pi = (P: number): bigint =>
  remember('pi', P, (bits) => 16n * arcTangentOfInverse(5n, bits) - 4n * arcTangentOfInverse(239n, bits));

/** ln 2 = 2 artanh(1/3). */
export const ln2 = (P: number): bigint =>
  remember('ln2', P, (bits) => {
    let power = (1n << BigInt(bits)) / 3n;
    let sum = power;
    for (let k = 3n; power !== 0n; k += 2n) {
      power /= 9n;
      sum += power / k;
    }
    return 2n * sum;
  });

const round = (n: bigint, bits: number): bigint => (n + (1n << BigInt(bits - 1))) >> BigInt(bits);

/** exp X. */
export function exp(X: bigint, P: number): bigint {
  const halvings = 24;
  const W = P + 96;
  const x = X << 96n;
  // ln 2 with spare bits for the multiple that is taken away.
  const k = Number(round((x * (1n << BigInt(W))) / ln2(W), W));
  const r = (x - ((BigInt(k) * ln2(W + 32)) >> 32n)) >> BigInt(halvings);
  const one = 1n << BigInt(W);
  let term = one;
  let sum = one;
  for (let n = 1n; term !== 0n && term !== -1n; n++) {
    term = ((term * r) >> BigInt(W)) / n;
    sum += term;
  }
  for (let n = 0; n < halvings; n++) sum = (sum * sum) >> BigInt(W);
  return shift(sum, k - 96);
}

/** ln X for X > 0, by Halley's steps on exp. */
export function log(X: bigint, P: number): bigint {
  // X = 2^k z with z near 1, so that exp of the logarithm stays near 1.
  const k = X.toString(2).length - P;
  const W = P + 64;
  const z = shift(X, 64 - k);
  const start = Number(z >> BigInt(W - 60)) / 2 ** 60;
  let y = fixed(Math.log(start), W);
  for (let bits = 40; bits < W; bits *= 3) {
    const e = exp(y, W);
    y += ((2n * (z - e)) << BigInt(W)) / (z + e);
  }
  return (y + BigInt(k) * ln2(W)) >> 64n;
}

/** Sine and cosine of X. */
export function sineCosine(X: bigint, P: number): { sine: bigint; cosine: bigint } {
  const W = P + 64;
  const spare = Math.max(0, X.toString(2).length - P) + 8;
  const half = pi(W + spare) >> 1n;
  const x = X << BigInt(64 + spare);
  const n = (2n * x + half) / (2n * half) - (2n * x + half < 0n ? 1n : 0n);
  const r = (x - n * half) >> BigInt(spare);
  const r2 = (r * r) >> BigInt(W);
  const series = (first: bigint, from: bigint): bigint => {
    let term = first;
    let sum = first;
    for (let k = from; term !== 0n && term !== -1n; k += 2n) {
      term = -((term * r2) >> BigInt(W)) / (k * (k + 1n));
      sum += term;
    }
    return sum >> 64n;
  };
  const s = series(r, 2n);
  const c = series(1n << BigInt(W), 1n);
  const quarter = ((n % 4n) + 4n) % 4n;
  if (quarter === 0n) return { sine: s, cosine: c };
  if (quarter === 1n) return { sine: c, cosine: -s };
  if (quarter === 2n) return { sine: -s, cosine: -c };
  return { sine: -c, cosine: s };
}

/** Angle of the point (X, Y), not both zero; the two in any common unit. */
export function arcTangent2(Y: bigint, X: bigint, P: number): bigint {
  const W = P + 64;
  const length = (n: bigint): number => (n < 0n ? -n : n).toString(2).length;
  const bits = Math.max(length(X), length(Y));
  const scale = (n: bigint): number => Number(shift(n, 1000 - bits)) / 2 ** 1000;
  let angle = fixed(Math.atan2(scale(Y), scale(X)), W);
  for (let good = 40; good < W; good *= 5) {
    const { sine, cosine } = sineCosine(angle, W);
    const d = ((Y * cosine - X * sine) << BigInt(W)) / (X * cosine + Y * sine);
    const d2 = (d * d) >> BigInt(W);
    angle += d - ((d * d2) >> BigInt(W)) / 3n;
  }
  return angle >> 64n;
}

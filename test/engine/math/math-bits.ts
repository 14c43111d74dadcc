import * as own from '../../../engine/math/index.ts';
import { Samples } from './samples.ts';

const ONE = [
  ...(['log', 'log1p', 'exp', 'expm1', 'sin', 'cos', 'tan', 'asin', 'acos', 'atan'] as const),
  ...(['sinh', 'cosh', 'tanh', 'atanh'] as const),
];
const TWO = ['pow', 'atan2'] as const;

const VALUE = new Float64Array(1);
const WORDS = new Uint32Array(VALUE.buffer);

/** Hash of the bits of a sequence of numbers; every NaN counts as the same. Method: FNV-1a over 32-bit words, twice. */
class BitHash {
  #one = 0x811c9dc5;
  #two = 0x9747b28c;
  add(x: number): void {
    VALUE[0] = x;
    const low = Number.isNaN(x) ? 0 : WORDS[0];
    const high = Number.isNaN(x) ? 0x7ff80000 : WORDS[1];
    this.#one = Math.imul(Math.imul(this.#one ^ low, 0x01000193) ^ high, 0x01000193);
    this.#two = Math.imul(Math.imul(this.#two ^ high, 0x5bd1e995) ^ (low >>> 7), 0x01000193);
  }
  toString(): string {
    return [this.#one, this.#two].map((word) => (word >>> 0).toString(16).padStart(8, '0')).join('');
  }
}

/**
 * Hashes of what every function of engine/math gives on the same 20 000 arguments: bit patterns of every kind,
 * one turn, the neighbourhood of 0 and 1. Uses nothing that may differ between JavaScript engines, so that a page
 * and Node must agree.
 */
export function mathBits(): Record<string, string> {
  const samples = new Samples(20);
  const xs = new Float64Array(20000);
  const ys = new Float64Array(20000);
  for (let n = 0; n < xs.length; n++) {
    const kind = n % 5;
    xs[n] =
      kind === 0
        ? samples.double()
        : kind === 1
          ? samples.uniform(0, 6.283185307179586)
          : kind === 2
            ? samples.uniform(-1, 1)
            : kind === 3
              ? 1 + samples.uniform(-1, 1) / 1048576
              : samples.uniform(-700, 700);
    ys[n] = n % 3 === 0 ? samples.double() : samples.uniform(-9, 9);
  }
  const hashes: Record<string, string> = {};
  for (const name of ONE) {
    const hash = new BitHash();
    for (const x of xs) hash.add(own[name](x));
    hashes[name] = `${hash}`;
  }
  for (const name of TWO) {
    const hash = new BitHash();
    for (let n = 0; n < xs.length; n++) hash.add(own[name](xs[n], ys[n]));
    hashes[name] = `${hash}`;
  }
  const both = new BitHash();
  const out = new Float64Array(2);
  for (const x of xs) {
    own.sinCos(out, x);
    both.add(out[0]);
    both.add(out[1]);
  }
  hashes.sinCos = `${both}`;
  return hashes;
}

/** Recorded, not proven: what mathBits gave when they were written. Accuracy is proven in accuracy.test.ts. */
export const RECORDED_BITS: Record<string, string> = {
  log: '11e2de38701cc452',
  log1p: '9a9c3b53284bdae0',
  exp: 'bfc47608bb01387a',
  expm1: 'c61d202dfb1fa0cc',
  sin: '44f25c01e5392d16',
  cos: 'bd1e29973966a0bb',
  tan: '2e8c586911c1568b',
  asin: '4a290a0ea1417d40',
  acos: '1b6b3f17dc35d95b',
  atan: '43f82b52a3227621',
  sinh: 'c468af1512418d33',
  cosh: 'b3cc0a94e6d7bf65',
  tanh: '74ad00a27c510578',
  atanh: 'db571a76600815fc',
  pow: '72eeb7597dc5e1a2',
  atan2: '334da0a471b50104',
  sinCos: 'd0ea4edfccdf41a5',
};

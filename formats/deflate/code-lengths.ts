import type { BitWriter } from './bit-writer.ts';
import { canonicalCodes, huffmanLengths, LITERAL_SYMBOLS } from './huffman.ts';

const ORDER = [16, 17, 18, 0, 8, 7, 9, 6, 10, 5, 11, 4, 12, 3, 13, 2, 14, 1, 15];
const SYMBOLS = 19;
const LONGEST = 7;

/** The head of a deflate block with codes of its own: the code lengths, themselves run-length and Huffman coded. */
export class CodeLengths {
  private readonly symbols = new Uint8Array(LITERAL_SYMBOLS + 1);
  private readonly repeats = new Uint8Array(LITERAL_SYMBOLS + 1);
  private used = 0;
  private literals = 0;
  private sent = 0;
  private readonly counts = new Int32Array(SYMBOLS);
  private readonly lengths = new Uint8Array(SYMBOLS);
  private readonly codes = new Int32Array(SYMBOLS);

  /**
   * Prepare the head for these literal and length codes and one distance code of one bit.
   *
   * @param lengths Uint8Array of LITERAL_SYMBOLS + 1, the last of them room for the distance code.
   * @returns size of the head in bits.
   */
  prepare(lengths: Uint8Array): number {
    this.literals = LITERAL_SYMBOLS;
    while (lengths[this.literals - 1] === 0) this.literals--;
    // The distance code follows directly: a single code of one bit, which every inflater takes.
    lengths[this.literals] = 1;
    this.collect(lengths, this.literals + 1);
    lengths[this.literals] = 0;
    const bits = huffmanLengths(this.lengths, this.counts, SYMBOLS, LONGEST);
    this.sent = SYMBOLS;
    while (this.lengths[ORDER[this.sent - 1]] === 0) this.sent--;
    return 17 + 3 * this.sent + bits + 2 * this.counts[16] + 3 * this.counts[17] + 7 * this.counts[18];
  }

  private collect(lengths: Uint8Array, total: number): void {
    this.counts.fill(0);
    this.used = 0;
    for (let at = 0; at < total; ) {
      const length = lengths[at];
      let next = at + 1;
      while (next < total && lengths[next] === length) next++;
      let left = next - at;
      at = next;
      if (length !== 0) {
        this.add(length, 0);
        left--;
      }
      while (left >= 3) {
        const take = Math.min(left, length !== 0 ? 6 : 138);
        if (length !== 0) this.add(16, take - 3);
        else if (take < 11) this.add(17, take - 3);
        else this.add(18, take - 11);
        left -= take;
      }
      for (; left > 0; left--) this.add(length, 0);
    }
  }

  private add(symbol: number, repeat: number): void {
    this.symbols[this.used] = symbol;
    this.repeats[this.used++] = repeat;
    this.counts[symbol]++;
  }

  /** Write what was prepared, block type included; the block is not the last one. */
  write(bits: BitWriter): void {
    canonicalCodes(this.codes, this.lengths, SYMBOLS);
    bits.write(4, 3);
    bits.write(this.literals - 257, 5);
    bits.write(0, 5);
    bits.write(this.sent - 4, 4);
    for (let k = 0; k < this.sent; k++) bits.write(this.lengths[ORDER[k]], 3);
    for (let k = 0; k < this.used; k++) {
      const symbol = this.symbols[k];
      bits.write(this.codes[symbol] & 0xffff, this.codes[symbol] >>> 16);
      if (symbol > 15) bits.write(this.repeats[k], symbol === 16 ? 2 : symbol === 17 ? 3 : 7);
    }
  }
}

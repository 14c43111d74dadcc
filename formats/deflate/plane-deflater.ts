import { BitWriter } from './bit-writer.ts';
import { CodeLengths } from './code-lengths.ts';
import { canonicalCodes, huffmanLengths, LITERAL_SYMBOLS } from './huffman.ts';
import { countRuns, writeRuns } from './runs.ts';
import { hasStructure, shareCode } from './structure.ts';

const END_OF_BLOCK = 256;
const LONGEST_STORED = 65535;
/** A coded block must be this much smaller than a stored one, since it takes ten times as long to read. */
const WORTHWHILE = 0.92;

/**
 * Deflate for byte-shuffled columns: byte planes without structure are stored, the others Huffman coded.
 *
 * A general compressor spends most of its time in looking for repeats among bytes that have none, the lower bytes of doubles. Here
 * the caller says where planes begin and end, each is judged by a sample, and no repeats are looked for but runs of one
 * byte. Any inflater reads the result, and the same bytes give the same stream on every machine.
 * Source: RFC 1951.
 */
export class PlaneDeflater {
  private readonly bits = new BitWriter(1 << 16);
  private readonly counts = new Int32Array(LITERAL_SYMBOLS);
  private readonly added = new Int32Array(256);
  private readonly lengths = new Uint8Array(LITERAL_SYMBOLS + 1);
  private readonly codes = new Int32Array(LITERAL_SYMBOLS);
  private readonly head = new CodeLengths();
  private source: Uint8Array = new Uint8Array(0);
  // Bytes from storedStart to codedStart wait to be stored, those behind to be coded, with `counts`.
  private storedStart = 0;
  private codedStart = 0;

  /**
   * A whole deflate stream.
   *
   * @param source Bytes to compress, `ends[segments - 1]` of them.
   * @param ends Where each segment ends; rising.
   * @returns view of memory that the next call overwrites.
   */
  deflate(source: Uint8Array, ends: ArrayLike<number>, segments: number): Uint8Array {
    const total = segments > 0 ? ends[segments - 1] : 0;
    this.bits.restart(total + 5 * (segments + Math.ceil(total / LONGEST_STORED)) + 64);
    this.source = source;
    this.storedStart = 0;
    this.codedStart = 0;
    let start = 0;
    for (let k = 0; k < segments; k++) {
      if (ends[k] > start) this.add(start, ends[k]);
      start = ends[k];
    }
    this.closeCoded(total);
    this.writeStored();
    // An empty last block with the fixed code: 1, 01, 0000000.
    this.bits.write(3, 10);
    this.bits.align();
    return this.bits.bytes.subarray(0, this.bits.length);
  }

  private add(start: number, end: number): void {
    const { added, counts, source } = this;
    if (!hasStructure(source, start, end)) {
      this.closeCoded(start);
      this.codedStart = end;
      return;
    }
    added.fill(0);
    for (let k = start; k < end; k++) added[source[k]]++;
    if (this.codedStart < start && !shareCode(counts, start - this.codedStart, added, end - start)) {
      this.closeCoded(start);
    }
    if (this.codedStart === start) counts.fill(0);
    for (let s = 0; s < 256; s++) counts[s] += added[s];
  }

  /** Write the bytes that wait to be coded, up to `end`, or leave them to be stored where that is hardly larger. */
  private closeCoded(end: number): void {
    const start = this.codedStart;
    if (start === end) return;
    this.codedStart = end;
    const { counts, lengths, codes, source, bits } = this;
    const size = end - start;
    let extraBits = 0;
    // With one byte in 7 of 8 places a bit for each is far too much.
    const runs = commonest(counts) > 0.875 * size;
    if (runs) extraBits = countRuns(counts, source, start, end);
    counts[END_OF_BLOCK] = 1;
    const coded = huffmanLengths(lengths, counts, LITERAL_SYMBOLS, 15);
    const total = this.head.prepare(lengths) + coded + extraBits;
    if (total > 8 * WORTHWHILE * size) return;
    this.codedStart = start;
    this.writeStored();
    this.head.write(bits);
    canonicalCodes(codes, lengths, LITERAL_SYMBOLS);
    if (runs) writeRuns(bits, codes, source, start, end);
    else bits.writeCodes(codes, source, start, end);
    bits.write(codes[END_OF_BLOCK] & 0xffff, codes[END_OF_BLOCK] >>> 16);
    this.storedStart = end;
    this.codedStart = end;
  }

  private writeStored(): void {
    const { bits, source, codedStart } = this;
    for (let start = this.storedStart; start < codedStart; start += LONGEST_STORED) {
      const end = Math.min(start + LONGEST_STORED, codedStart);
      bits.write(0, 3);
      bits.align();
      bits.write(end - start, 16);
      bits.write(~(end - start) & 0xffff, 16);
      bits.copy(source, start, end);
    }
    this.storedStart = codedStart;
  }
}

function commonest(counts: Int32Array): number {
  let most = 0;
  for (let s = 0; s < 256; s++) most = Math.max(most, counts[s]);
  return most;
}

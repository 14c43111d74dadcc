/** Symbols of the literal and length alphabet that deflate knows. */
export const LITERAL_SYMBOLS = 286;

// Scratch of this module, non-reentrant by contract: leaves and inner nodes of one tree.
const keys = new Int32Array(LITERAL_SYMBOLS);
const weight = new Int32Array(2 * LITERAL_SYMBOLS);
const parent = new Uint16Array(2 * LITERAL_SYMBOLS);
const depth = new Uint8Array(2 * LITERAL_SYMBOLS);

/**
 * Code lengths of a Huffman code for symbols of known counts.
 *
 * @param lengths Uint8Array, `symbols` elements written: bits of each symbol, 0 for one that does not occur.
 * @param counts How often each symbol occurs; 2^31 in all at the most.
 * @param longest Most bits that a code may have.
 * @returns number of bits that all occurrences take.
 * Ties are broken by symbol number, so that equal counts give equal codes everywhere. Where the code would be too long the counts
 * are halved until it is not, which costs little: deep codes belong to rare symbols.
 * Source: Huffman, Proc. IRE 40 (1952) 1098, with two queues instead of a heap.
 */
export function huffmanLengths(
  lengths: Uint8Array,
  counts: Int32Array,
  symbols: number,
  longest: number,
): number {
  lengths.fill(0, 0, symbols);
  let total = 0;
  for (let s = 0; s < symbols; s++) total += counts[s];
  // A key holds a count in 22 bits and a symbol in 9.
  let shift = 0;
  while (total >>> shift >= 1 << 22) shift++;
  while (!lengthsAtShift(lengths, counts, symbols, longest, shift)) shift++;
  let bits = 0;
  for (let s = 0; s < symbols; s++) bits += counts[s] * lengths[s];
  return bits;
}

function lengthsAtShift(
  lengths: Uint8Array,
  counts: Int32Array,
  symbols: number,
  longest: number,
  shift: number,
): boolean {
  let leaves = 0;
  for (let s = 0; s < symbols; s++) {
    if (counts[s] > 0) keys[leaves++] = (Math.max(1, counts[s] >>> shift) << 9) | s;
  }
  if (leaves < 3) {
    for (let k = 0; k < leaves; k++) lengths[keys[k] & 511] = 1;
    return true;
  }
  sortKeys(leaves);
  for (let k = 0; k < leaves; k++) weight[k] = keys[k] >>> 9;
  const root = 2 * leaves - 2;
  let leaf = 0;
  let inner = leaves;
  for (let node = leaves; node <= root; node++) {
    const a = leaf < leaves && (inner >= node || weight[leaf] <= weight[inner]) ? leaf++ : inner++;
    const b = leaf < leaves && (inner >= node || weight[leaf] <= weight[inner]) ? leaf++ : inner++;
    weight[node] = weight[a] + weight[b];
    parent[a] = node;
    parent[b] = node;
  }
  depth[root] = 0;
  for (let node = root - 1; node >= leaves; node--) depth[node] = depth[parent[node]] + 1;
  // The rarest symbol is the deepest.
  if (depth[parent[0]] + 1 > longest) return false;
  for (let k = 0; k < leaves; k++) lengths[keys[k] & 511] = depth[parent[k]] + 1;
  return true;
}

/** Shell sort: a call of the built-in sort costs more than the sorting of so few (measured, Node 20). */
function sortKeys(count: number): void {
  for (let gap = count > 60 ? 40 : count > 20 ? 13 : 4; gap > 0; gap = Math.floor(gap / 3)) {
    for (let k = gap; k < count; k++) {
      const key = keys[k];
      let hole = k;
      for (; hole >= gap && keys[hole - gap] > key; hole -= gap) keys[hole] = keys[hole - gap];
      keys[hole] = key;
    }
  }
}

const nextCode = new Int32Array(16);

/**
 * Canonical codes of given lengths, bit-reversed as deflate packs them, with the length in the upper half.
 *
 * @param codes Int32Array, `symbols` elements written: code | length << 16.
 * Source: RFC 1951, section 3.2.2.
 */
export function canonicalCodes(codes: Int32Array, lengths: Uint8Array, symbols: number): void {
  nextCode.fill(0);
  for (let s = 0; s < symbols; s++) nextCode[lengths[s]]++;
  let code = 0;
  let before = 0;
  for (let bits = 1; bits < 16; bits++) {
    code = (code + before) << 1;
    before = nextCode[bits];
    nextCode[bits] = code;
  }
  for (let s = 0; s < symbols; s++) {
    const length = lengths[s];
    codes[s] = length === 0 ? 0 : reversed(nextCode[length]++, length) | (length << 16);
  }
}

function reversed(code: number, bits: number): number {
  let r = ((code & 0x5555) << 1) | ((code >> 1) & 0x5555);
  r = ((r & 0x3333) << 2) | ((r >> 2) & 0x3333);
  r = ((r & 0x0f0f) << 4) | ((r >> 4) & 0x0f0f);
  r = ((r & 0x00ff) << 8) | ((r >> 8) & 0x00ff);
  return r >> (16 - bits);
}

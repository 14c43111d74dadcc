import { deflateSync } from 'fflate';
import type { Packable } from '../message-pack/index.ts';
import { type ElementType, narrowest, widthOf } from './element-types.ts';
import { halves, shuffleDoubles, shuffleIntegers } from './shuffle.ts';
import { hasStructure } from './structure.ts';

/** Part of a column, elements `start` to `end`. */
export interface ColumnPart {
  readonly table: string;
  readonly name: string;
  readonly values: Float64Array | Int32Array | Uint8Array;
  readonly start: number;
  readonly end: number;
  /** Elements to a row. */
  readonly each: number;
  /** Most elements that may be written as one where all are the same. */
  readonly mostConstant: number;
}

interface Group {
  readonly table: string;
  readonly type: ElementType;
  readonly constant: boolean;
  readonly each: number;
  readonly columns: ColumnPart[];
  elements: number;
}

/** Puts the columns of a chunk into groups of like elements, shuffles them, and deflates what shrinks. */
export class GroupWriter {
  private readonly groups = new Map<string, Group>();
  // Kept from chunk to chunk.
  private planes = new Uint8Array(1 << 16);
  private readonly stored = new Pile();
  private readonly loose = new Pile();

  /** Forget the columns of the last chunk. */
  restart(): void {
    this.groups.clear();
  }

  add(column: ColumnPart): void {
    const { table, values, start, end, each } = column;
    const form =
      values instanceof Float64Array ? ofDoubles(values, start, end) : ofIntegers(values, start, end);
    const constant = form.constant && end - start <= column.mostConstant;
    const { type } = form;
    const key = `${table} ${type} ${constant} ${each}`;
    let group = this.groups.get(key);
    if (!group) {
      group = { table, type, constant, each, columns: [], elements: 0 };
      this.groups.set(key, group);
    }
    group.columns.push(column);
    group.elements += constant ? 1 : end - start;
  }

  /**
   * The map entries that hold all columns: groups, stored and deflated bytes; and how many bytes the latter inflate to.
   *
   * @param storeAll Deflate nothing.
   */
  finish(storeAll = false): {
    columns: { groups: Packable; stored: Uint8Array; deflated: Uint8Array };
    inflated: number;
  } {
    const groups: Packable[] = [];
    this.stored.length = 0;
    this.loose.length = 0;
    for (const group of this.groups.values()) groups.push(this.write(group, storeAll));
    // A hash table of fixed size, as small as it goes: the library would take the size from Math.log, whose last digit
    // varies, and a larger one costs time and finds no more (measured, Node 20).
    const deflated = deflateSync(this.loose.bytes.subarray(0, this.loose.length), { level: 1, mem: 0 });
    const stored = this.stored.bytes.subarray(0, this.stored.length);
    return { columns: { groups, stored, deflated }, inflated: this.loose.length };
  }

  private write(group: Group, storeAll: boolean): Packable {
    const { elements } = group;
    const width = widthOf(group.type);
    if (this.planes.length < width * elements) this.planes = new Uint8Array(2 * width * elements);
    let at = 0;
    for (const { values, start, end } of group.columns) {
      const stop = group.constant ? start + 1 : end;
      if (values instanceof Float64Array) shuffleDoubles(this.planes, elements, at, values, start, stop);
      else shuffleIntegers(this.planes, elements, at, width, values, start, stop);
      at += stop - start;
    }
    let deflated = 0;
    for (let p = 0; p < width; p++) {
      const from = p * elements;
      const shrinks = !storeAll && hasStructure(this.planes, from, from + elements);
      if (shrinks) deflated |= 1 << p;
      (shrinks ? this.loose : this.stored).put(this.planes, from, from + elements);
    }
    return {
      table: group.table,
      type: group.type,
      columns: group.columns.map(({ name }) => name),
      ...(group.constant && { constant: true }),
      ...(group.each !== 1 && { each: group.each }),
      deflated,
    };
  }
}

/** Bytes put one behind the other in memory that is used again. */
class Pile {
  bytes = new Uint8Array(1 << 16);
  length = 0;

  put(source: Uint8Array, start: number, end: number): void {
    const length = this.length + end - start;
    if (length > this.bytes.length) {
      const wider = new Uint8Array(2 * length);
      wider.set(this.bytes.subarray(0, this.length));
      this.bytes = wider;
    }
    this.bytes.set(source.subarray(start, end), this.length);
    this.length = length;
  }
}

interface Form {
  readonly type: ElementType;
  readonly constant: boolean;
}

function ofDoubles(values: Float64Array, start: number, end: number): Form {
  return { type: 'f8', constant: end > start && sameBits(values, start, end) };
}

/** Whether all elements are the same double, 0 and -0 told apart, all NaN alike. */
function sameBits(values: Float64Array, start: number, end: number): boolean {
  const first = values[start];
  let k = start + 1;
  if (Number.isNaN(first)) {
    while (k < end && Number.isNaN(values[k])) k++;
    return k === end;
  }
  if (first !== 0) {
    while (k < end && values[k] === first) k++;
    return k === end;
  }
  const words = halves(values, start, end);
  let w = 2;
  while (w < words.length && words[w] === words[w - 2] && words[w + 1] === words[w - 1]) w += 2;
  return w >= words.length;
}

function ofIntegers(values: Int32Array | Uint8Array, start: number, end: number): Form {
  let lowest = end > start ? values[start] : 0;
  let highest = lowest;
  for (let k = start + 1; k < end; k++) {
    const value = values[k];
    if (value < lowest) lowest = value;
    else if (value > highest) highest = value;
  }
  return { type: narrowest(lowest, highest), constant: end > start && lowest === highest };
}

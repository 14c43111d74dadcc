import { inflateSync } from 'fflate';
import { ELEMENT_TYPES, type ElementType, widthOf } from './element-types.ts';
import { asText, FieldError, Fields } from './fields.ts';
import { mostInflated } from './layout.ts';
import { gatherDoubles, gatherIntegers } from './shuffle.ts';

const MOST_EACH = 4096;

/** A column as it stands in a chunk. */
export interface ReadColumn {
  readonly table: string;
  readonly name: string;
  readonly type: ElementType;
  /** Elements to a row. */
  readonly each: number;
  /** Elements in all. */
  readonly elements: number;
  /** One element stands for all. */
  readonly constant: boolean;
  /** The bytes of its group's elements, lowest first. */
  readonly planes: readonly Uint8Array[];
  /** Number of its first element in the group. */
  readonly at: number;
}

interface Group {
  readonly table: string;
  readonly type: ElementType;
  readonly names: readonly string[];
  readonly constant: boolean;
  readonly each: number;
  readonly deflated: number;
  /** Elements of one column as they stand there. */
  readonly length: number;
}

/**
 * The columns of a chunk, from its groups and bytes.
 *
 * @param rows Rows of each table.
 * @param bytes Length of the chunk's payload.
 * @throws FieldError where the groups and the bytes do not fit each other; nothing is inflated before that is known.
 */
export function readGroups(chunk: Fields, rows: ReadonlyMap<string, number>, bytes: number): ReadColumn[] {
  const groups = chunk.list('groups', (value, place) => readGroup(new Fields(value, place), rows));
  const stored = chunk.binary('stored');
  const deflated = chunk.binary('deflated');
  let storedBytes = 0;
  let looseBytes = 0;
  for (const group of groups) {
    const size = group.length * group.names.length;
    for (let p = 0; p < widthOf(group.type); p++) {
      if ((group.deflated >> p) & 1) looseBytes += size;
      else storedBytes += size;
    }
  }
  if (storedBytes !== stored.length) {
    throw new FieldError('stored', `${stored.length} bytes`, `${storedBytes} bytes, as the groups say`);
  }
  if (looseBytes > mostInflated(bytes)) {
    const found = `${looseBytes} bytes to inflate, as the groups say`;
    throw new FieldError(
      'deflated',
      found,
      `${mostInflated(bytes)} at the most in a chunk of ${bytes} bytes`,
    );
  }
  const loose = inflate(deflated, looseBytes);
  const columns: ReadColumn[] = [];
  let storedAt = 0;
  let looseAt = 0;
  for (const group of groups) {
    const size = group.length * group.names.length;
    const planes: Uint8Array[] = [];
    for (let p = 0; p < widthOf(group.type); p++) {
      if ((group.deflated >> p) & 1) {
        planes.push(loose.subarray(looseAt, looseAt + size));
        looseAt += size;
      } else {
        planes.push(stored.subarray(storedAt, storedAt + size));
        storedAt += size;
      }
    }
    const { table, type, each, constant, length } = group;
    const elements = (rows.get(table) as number) * each;
    group.names.forEach((name, k) => {
      columns.push({ table, name, type, each, elements, constant, planes, at: k * length });
    });
  }
  return columns;
}

function readGroup(fields: Fields, rows: ReadonlyMap<string, number>): Group {
  const table = fields.text('table');
  const tableRows = rows.get(table);
  if (tableRows === undefined)
    throw new FieldError(`${fields.place}.table`, table, 'a table that rows names');
  const type = fields.word('type', ELEMENT_TYPES, null);
  if (type === null) throw new FieldError(`${fields.place}.type`, 'nothing', ELEMENT_TYPES.join(' or '));
  const constant = fields.flag('constant');
  const each = fields.number('each', 1);
  if (!Number.isInteger(each) || each < 1 || each > MOST_EACH) {
    throw new FieldError(`${fields.place}.each`, String(each), `an integer, 1 to ${MOST_EACH}`);
  }
  const deflated = fields.number('deflated', 0);
  if (!Number.isInteger(deflated) || deflated < 0 || deflated >= 2 ** widthOf(type)) {
    throw new FieldError(
      `${fields.place}.deflated`,
      String(deflated),
      `a bit for each of ${widthOf(type)} planes`,
    );
  }
  const names = fields.list('columns', asText);
  return { table, type, names, constant, each, deflated, length: constant ? 1 : tableRows * each };
}

function inflate(stream: Uint8Array, length: number): Uint8Array {
  const expected = `a deflate stream of ${length} bytes, as the groups say`;
  let inflated: Uint8Array;
  try {
    // One byte more than expected shows a stream that goes on.
    inflated = inflateSync(stream, { out: new Uint8Array(length + 1) });
  } catch (error) {
    throw new FieldError('deflated', error instanceof Error ? error.message : String(error), expected);
  }
  if (inflated.length === length) return inflated;
  throw new FieldError('deflated', inflated.length > length ? 'more' : `${inflated.length} bytes`, expected);
}

/**
 * Elements of a column as doubles, integers or codes.
 *
 * @param values As long as the column has elements; overwritten.
 * @throws FieldError where the column has doubles and `values` takes integers, or an integer does not fit.
 */
export function fillColumn(values: Float64Array | Int32Array | Uint8Array, column: ReadColumn): void {
  if (column.elements === 0) return;
  if (!column.constant) {
    gather(values, column);
    return;
  }
  const one = values.slice(0, 1);
  gather(one, column);
  values.fill(one[0]);
}

function gather(values: Float64Array | Int32Array | Uint8Array, column: ReadColumn): void {
  const { type, planes, at } = column;
  if (type === 'f8' && values instanceof Float64Array) {
    gatherDoubles(values, planes, at);
    return;
  }
  if (type[0] === 'i' && !(values instanceof Uint8Array)) {
    gatherIntegers(values, planes, at);
    return;
  }
  const place = `${column.table}.${column.name}`;
  if (type === 'i1' && values instanceof Uint8Array) {
    gatherIntegers(values, planes, at);
    const negative = values.find((value) => value > 127);
    if (negative !== undefined) throw new FieldError(place, String(negative - 256), 'a code');
    return;
  }
  if (type[0] === 'f' && !(values instanceof Float64Array)) {
    throw new FieldError(place, `type ${type}`, 'an integer type');
  }
  const element = new DataView(new ArrayBuffer(8));
  for (let k = 0; k < values.length; k++) {
    planes.forEach((plane, p) => {
      element.setUint8(p, plane[at + k]);
    });
    const value = readElement(element, type);
    values[k] = value;
    if (values[k] !== value && !Number.isNaN(value))
      throw new FieldError(place, String(value), 'an integer that fits');
  }
}

function readElement(view: DataView, type: ElementType): number {
  switch (type) {
    case 'i1':
      return view.getInt8(0);
    case 'i2':
      return view.getInt16(0, true);
    case 'i4':
      return view.getInt32(0, true);
    case 'u1':
      return view.getUint8(0);
    case 'u2':
      return view.getUint16(0, true);
    case 'u4':
      return view.getUint32(0, true);
    case 'f4':
      return view.getFloat32(0, true);
    default:
      return view.getFloat64(0, true);
  }
}

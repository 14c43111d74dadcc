import {
  BOOST_COLUMN,
  BOOST_NUMBERS,
  type Column,
  type ColumnSpec,
  ENTRY_COLUMNS,
  type EventHead,
  KINDS,
  makeColumn,
  missingValue,
  REASONS,
  ROLES,
  type SampleHead,
  STEP_COLUMNS,
  TRIAL_COLUMNS,
} from '../../engine/index.ts';
import type { Unpacked } from '../message-pack/index.ts';
import type { ByteSource } from '../sources/index.ts';
import { asNumber, asText, decodeBlock, FieldError, Fields } from './fields.ts';
import { FileBatch, OWN_TABLES, type OwnTable } from './file-batch.ts';
import { fillColumn, type ReadColumn, readGroups } from './group-reader.ts';
import type { FileHead } from './head-block.ts';
import { MOST_EVENTS, mostOwnConstants, mostRows } from './layout.ts';
import type { Block } from './read-block.ts';

const SPECS: Readonly<Record<OwnTable, readonly ColumnSpec[]>> = {
  entries: ENTRY_COLUMNS,
  steps: STEP_COLUMNS,
  trials: TRIAL_COLUMNS,
};

/** Turns chunks of one file into batches. */
export class ChunkDecoder {
  private readonly source: ByteSource;
  private readonly sample: SampleHead;
  private readonly channels: readonly string[];
  /** Our code for each of the file's, where they differ; by column name. */
  private readonly codes: Readonly<Record<string, Int16Array>>;

  constructor(source: ByteSource, head: FileHead) {
    this.source = source;
    this.sample = head.sample;
    this.channels = head.channels;
    this.codes = {
      role: translation(head.roles, ROLES),
      kind: translation(head.kinds, KINDS),
      reason: translation(head.reasons, REASONS),
    };
  }

  /**
   * The events of a chunk.
   *
   * @param number Number that its first event gets; the one that the chunk gives to it is `storedFirst` of the batch.
   * @throws ShowerFileError `malformed-file` for whatever cannot be decoded: types, unequal lengths, codes without a word.
   */
  decode(block: Block, number: number): FileBatch {
    return decodeBlock(this.source.name, block, (fields) => {
      const events = readEventCount(fields);
      const rows = readRows(fields, events, block.payload.length);
      const channels = fields.list('channels', asText);
      const batch = new FileBatch(this.sample, channels.length > 0 ? channels : this.channels);
      batch.storedFirst = fields.integer('first');
      const columns = new Map<string, ReadColumn>();
      for (const column of readGroups(fields, rows, block.payload.length))
        columns.set(`${column.table}.${column.name}`, column);
      readHeads(batch, fields, columns, events, number);
      const limit = { cells: mostOwnConstants(block.payload.length) };
      for (const table of OWN_TABLES) {
        readStarts(batch, table, columns, events, rows.get(table) ?? 0);
        this.readTable(batch, table, columns, rows.get(table) ?? 0, limit);
      }
      batch.unknown = fields.unknown();
      return batch;
    });
  }

  private readTable(
    batch: FileBatch,
    table: OwnTable,
    columns: ReadonlyMap<string, ReadColumn>,
    rows: number,
    limit: { cells: number },
  ): void {
    const target = batch[table] as unknown as (Record<string, Column> & { length: number }) | null;
    if (!target) return;
    target.length = rows;
    for (const spec of SPECS[table]) {
      const column = columns.get(`${table}.${spec.name}`);
      const values = makeColumn(spec, rows);
      if (column) {
        if (column.each !== 1)
          throw new FieldError(`${table}.${spec.name}`, `${column.each} numbers a row`, 'one');
        fillColumn(values, column);
      } else if (missingValue(spec) !== 0) values.fill(missingValue(spec));
      if (spec.kind === 'word' && column)
        this.translate(values as Uint8Array, table, spec.name, batch.channels);
      target[spec.name] = values;
    }
    const known = new Set<string>(SPECS[table].map(({ name }) => name));
    if (table === 'steps' && batch.steps.boost !== null) {
      known.add(BOOST_COLUMN);
      batch.steps.boost = readBoost(columns.get(`steps.${BOOST_COLUMN}`), rows);
    }
    for (const column of columns.values()) {
      if (column.table !== table || known.has(column.name)) continue;
      limit.cells -= column.constant ? column.elements : 0;
      if (limit.cells < 0)
        throw new FieldError(`${table}.${column.name}`, 'one more', 'fewer constant columns');
      const isFloat = column.type[0] === 'f' || column.type === 'u4';
      const values = isFloat ? new Float64Array(column.elements) : new Int32Array(column.elements);
      fillColumn(values, column);
      batch.own[table][column.name] = { values, each: column.each };
    }
  }

  private translate(values: Uint8Array, table: string, name: string, channels: readonly string[]): void {
    const codes = name === 'channel' ? null : this.codes[name];
    const words = codes ? codes.length : channels.length;
    for (let row = 0; row < values.length; row++) {
      const code = values[row];
      if (code >= words || (codes && codes[code] < 0)) {
        throw new FieldError(`${table}.${name}[${row}]`, `code ${code}`, 'a code whose word is known');
      }
      if (codes) values[row] = codes[code];
    }
  }
}

/** Number of the first event of a chunk and how many it has, without its columns. */
export function readChunkRange(source: ByteSource, block: Block): { first: number; events: number } {
  return decodeBlock(source.name, block, (fields) => ({
    first: fields.integer('first'),
    events: readEventCount(fields),
  }));
}

function readBoost(column: ReadColumn | undefined, rows: number): Float64Array {
  const values = new Float64Array(BOOST_NUMBERS * rows);
  if (!column) return values.fill(NaN);
  if (column.each !== BOOST_NUMBERS) {
    throw new FieldError(`steps.${BOOST_COLUMN}`, `${column.each} numbers a row`, String(BOOST_NUMBERS));
  }
  fillColumn(values, column);
  return values;
}

function readEventCount(fields: Fields): number {
  const events = fields.integer('events', 1);
  if (events > MOST_EVENTS) throw new FieldError('events', String(events), `${MOST_EVENTS} at the most`);
  return events;
}

function readRows(fields: Fields, events: number, bytes: number): Map<string, number> {
  const map = fields.fields('rows');
  const rows = new Map<string, number>();
  for (const table of map.keys()) {
    const count = map.integer(table);
    if (count > mostRows(bytes)) {
      throw new FieldError(
        `rows.${table}`,
        String(count),
        `${mostRows(bytes)} at the most in a chunk of ${bytes} bytes`,
      );
    }
    rows.set(table, count);
  }
  if (rows.get('events') !== events) {
    throw new FieldError('rows.events', String(rows.get('events')), `${events}, as "events" says`);
  }
  return rows;
}

function translation(theirs: readonly string[], ours: readonly string[]): Int16Array {
  return Int16Array.from(theirs, (word) => ours.indexOf(word));
}

/** Rows of each event, summed up to where each begins. */
function readStarts(
  batch: FileBatch,
  table: OwnTable,
  columns: ReadonlyMap<string, ReadColumn>,
  events: number,
  rows: number,
): void {
  const starts =
    table === 'entries' ? batch.entryStart : table === 'steps' ? batch.stepStart : batch.trialStart;
  starts.length = 1;
  const column = columns.get(`events.${table}`);
  const counts = new Int32Array(events);
  if (column) fillColumn(counts, column);
  else if (rows > 0) throw new FieldError(`events.${table}`, 'nothing', 'the number of rows of each event');
  for (let n = 0; n < events; n++) {
    if (counts[n] < 0) throw new FieldError(`events.${table}[${n}]`, String(counts[n]), 'a number of rows');
    starts.push(starts[n] + counts[n]);
  }
  if (starts[events] !== rows) {
    throw new FieldError(`events.${table}`, `${starts[events]} rows in all`, `${rows}, as "rows" says`);
  }
}

function readHeads(
  batch: FileBatch,
  fields: Fields,
  columns: ReadonlyMap<string, ReadColumn>,
  events: number,
  number: number,
): void {
  const numbers = (name: string, absent: number) => {
    const values = new Float64Array(events).fill(absent);
    const column = columns.get(`events.${name}`);
    if (column) fillColumn(values, column);
    return values;
  };
  const streams = numbers('stream', NaN);
  const weights = numbers('weight', 1);
  const heads = fields.list('heads', (value, place) => [value, place] as const);
  if (heads.length !== events && heads.length !== 0) {
    throw new FieldError('heads', `${heads.length} elements`, `${events}, one an event`);
  }
  for (let n = 0; n < events; n++) {
    const [value, place] = heads[n] ?? [{}, `heads[${n}]`];
    const stream = Number.isNaN(streams[n]) ? null : streams[n];
    batch.events.push(readHead(value, place, number + n, stream, weights[n]));
  }
}

function readHead(
  value: Unpacked,
  place: string,
  event: number,
  stream: number | null,
  weight: number,
): EventHead {
  const fields = new Fields(value, place);
  const known: EventHead = {
    event,
    label: fields.textOrNull('label'),
    stream,
    rerun: fields.textOrNull('rerun'),
    status: fields.word('status', ['complete', 'aborted', 'vetoed'], 'complete'),
    statusReason: fields.textOrNull('statusReason'),
    outgoing: fields.list('outgoing', asNumber),
    weight,
  };
  return { ...known, ...fields.unknown() };
}

import {
  BOOST_NUMBERS,
  ENTRY_COLUMNS,
  type HistoryBatch,
  STEP_COLUMNS,
  TRIAL_COLUMNS,
} from '../../engine/index.ts';
import { wordCode } from './channel-words.ts';
import { FileBatch, OWN_TABLES, rowStarts } from './file-batch.ts';

type Table = Record<string, Float64Array | Int32Array | Uint8Array> & { length: number };
const SPECS = { entries: ENTRY_COLUMNS, steps: STEP_COLUMNS, trials: TRIAL_COLUMNS };

/**
 * Add events `from` to `to` of a batch to another, with the columns of their author and the keys of their chunk.
 *
 * @throws RangeError for more than 256 channels.
 */
export function appendEvents(out: FileBatch, batch: HistoryBatch, from: number, to: number): void {
  const eventsBefore = out.events.length;
  const span = (table: 'entries' | 'steps' | 'trials') => {
    const starts = rowStarts(batch, table);
    return { start: starts[from], end: starts[to], rows: starts[to] - starts[from] };
  };
  out.reserve(span('entries').rows, span('steps').rows, span('trials').rows);
  const before = OWN_TABLES.map((table) => out[table]?.length ?? 0);
  for (const table of OWN_TABLES) {
    const target = out[table] as unknown as Table | null;
    const source = batch[table] as unknown as Table | null;
    if (!target || !source) continue;
    const { start, end, rows } = span(table);
    for (const { name } of SPECS[table]) target[name].set(source[name].subarray(start, end), target.length);
    if (table === 'steps') copyBoost(out, batch, start, end);
    if (table !== 'entries') {
      const codes = target.channel.subarray(target.length, target.length + rows);
      translateChannels(out, batch, codes as Uint8Array);
    }
  }
  for (let n = from; n < to; n++) {
    OWN_TABLES.forEach((table, k) => {
      const starts = rowStarts(batch, table);
      const target = out[table];
      if (target) target.length = before[k] + starts[n + 1] - starts[from];
    });
    out.endEvent(batch.events[n]);
  }
  const other = batch instanceof FileBatch ? batch : NOTHING_OWN;
  appendOwn(out, other, from, to);
  appendSummaries(out, other, from, eventsBefore);
  if (from === 0) out.unknown = { ...out.unknown, ...other.unknown };
}

function copyBoost(out: FileBatch, batch: HistoryBatch, start: number, end: number): void {
  const target = out.steps.boost;
  if (target === null) return;
  const at = BOOST_NUMBERS * out.steps.length;
  const part = batch.steps.boost?.subarray(BOOST_NUMBERS * start, BOOST_NUMBERS * end);
  if (part) target.set(part, at);
  else target.fill(NaN, at, at + BOOST_NUMBERS * (end - start));
}

const NOTHING_OWN: Pick<FileBatch, 'own' | 'summaries' | 'unknown'> = {
  own: { entries: {}, steps: {}, trials: {} },
  summaries: {},
  unknown: {},
};

function translateChannels(out: FileBatch, batch: HistoryBatch, codes: Uint8Array): void {
  if (batch.channels.every((word, k) => word === out.channels[k])) return;
  for (let row = 0; row < codes.length; row++) {
    const word = batch.channels[codes[row]];
    if (word === undefined) throw new RangeError(`channel code ${codes[row]} has no word`);
    codes[row] = wordCode(out.channels, word);
  }
}

/** Columns that only one side has are filled with NaN, or -1 in whole numbers. */
function appendOwn(out: FileBatch, batch: Pick<FileBatch, 'own'>, from: number, to: number): void {
  for (const table of OWN_TABLES) {
    const total = out[table]?.length ?? 0;
    for (const name of names(out.own[table], batch.own[table])) {
      const mine = out.own[table][name];
      const theirs = batch.own[table][name];
      const { each } = mine ?? theirs;
      if (mine && theirs && mine.each !== theirs.each) {
        throw new RangeError(`column ${name} of ${table}: ${mine.each} numbers a row, then ${theirs.each}`);
      }
      const isFloat = [mine, theirs].some((column) => column?.values instanceof Float64Array);
      const joined = isFloat
        ? new Float64Array(total * each).fill(NaN)
        : new Int32Array(total * each).fill(-1);
      if (mine) joined.set(mine.values);
      if (theirs) {
        const starts = rowStarts(batch as FileBatch, table);
        const part = theirs.values.subarray(starts[from] * each, starts[to] * each);
        joined.set(part, joined.length - part.length);
      }
      out.own[table][name] = { values: joined, each };
    }
  }
}

function appendSummaries(
  out: FileBatch,
  batch: Pick<FileBatch, 'summaries'>,
  from: number,
  eventsBefore: number,
): void {
  const added = out.events.length - eventsBefore;
  for (const name of names(out.summaries, batch.summaries)) {
    const joined = new Float64Array(out.events.length).fill(NaN);
    if (out.summaries[name]) joined.set(out.summaries[name]);
    if (batch.summaries[name]) joined.set(batch.summaries[name].subarray(from, from + added), eventsBefore);
    out.summaries[name] = joined;
  }
}

function names(a: object, b: object): Set<string> {
  return new Set([...Object.keys(a), ...Object.keys(b)]);
}

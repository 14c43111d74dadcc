import {
  BOOST_COLUMN,
  BOOST_NUMBERS,
  type Column,
  type ColumnSpec,
  ENTRY_COLUMNS,
  type Head,
  type History,
  KINDS,
  REASONS,
  ROLES,
  STEP_COLUMNS,
  TRIAL_COLUMNS,
} from '../../engine/index.ts';
import type { OwnColumn, OwnColumns } from '../shower-file/index.ts';

/** An element of a column: a number, a word, or null where a number is missing; several numbers in a column of `boost`'s kind. */
export type JsonElement = number | string | null | (number | null)[];
export type JsonTable = Record<string, JsonElement[]>;

/** One event as an object: see "One event as JSON" in formats/FORMATS.md. */
export interface JsonHistory {
  head: Head;
  entries: JsonTable;
  steps: JsonTable;
  trials?: JsonTable;
}

/**
 * One event as a plain object of arrays under the columns' names.
 *
 * Enumerations are words, a missing number is null, row and step numbers are always numbers, a column or table that is not
 * recorded has no key. `jsonText` prints it without losing a bit; JSON.stringify loses the sign of -0 and infinities.
 */
export function historyToJson(history: History): JsonHistory {
  const { head, entries, steps, trials } = history;
  const own = 'own' in history ? (history.own as OwnColumns) : { entries: {}, steps: {}, trials: {} };
  const words = {
    role: ROLES,
    kind: KINDS,
    reason: REASONS,
    channel: history.channels,
  };
  const json: JsonHistory = {
    head: withNulls(head) as Head,
    entries: table(entries, ENTRY_COLUMNS, head.columns.entries, words, own.entries),
    steps: table(steps, STEP_COLUMNS, head.columns.steps, words, own.steps),
  };
  if (steps.boost && head.columns.steps.includes(BOOST_COLUMN)) {
    json.steps[BOOST_COLUMN] = rowsOf({ values: steps.boost, each: BOOST_NUMBERS });
  }
  if (trials && head.columns.trials) {
    json.trials = table(trials, TRIAL_COLUMNS, head.columns.trials, words, own.trials);
  }
  return json;
}

function table(
  columns: object,
  specs: readonly ColumnSpec[],
  present: readonly string[],
  words: Readonly<Record<string, readonly string[]>>,
  own: Readonly<Record<string, OwnColumn>>,
): JsonTable {
  const json: JsonTable = {};
  for (const { name, kind } of specs) {
    if (!present.includes(name)) continue;
    const column = (columns as Readonly<Record<string, Column>>)[name];
    if (kind === 'word') json[name] = Array.from(column, (code) => words[name][code] ?? null);
    else json[name] = Array.from(column, numberOrNull);
  }
  for (const [name, column] of Object.entries(own)) json[name] = rowsOf(column);
  return json;
}

function rowsOf({ values, each }: OwnColumn): JsonElement[] {
  if (each === 1) return Array.from(values, numberOrNull);
  const rows: JsonElement[] = [];
  for (let at = 0; at < values.length; at += each) {
    const row = Array.from(values.subarray(at, at + each), numberOrNull);
    rows.push(row.every((value) => value === null) ? null : row);
  }
  return rows;
}

function numberOrNull(value: number): number | null {
  return Number.isNaN(value) ? null : value;
}

/** A copy of a plain value with null for every NaN. */
function withNulls(value: unknown): unknown {
  if (typeof value === 'number') return numberOrNull(value);
  if (Array.isArray(value)) return value.map(withNulls);
  if (typeof value !== 'object' || value === null || ArrayBuffer.isView(value)) return value;
  return Object.fromEntries(Object.entries(value).map(([key, item]) => [key, withNulls(item)]));
}

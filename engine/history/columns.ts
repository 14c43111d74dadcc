import type { EntryTable, StepTable, TrialTable } from './history.ts';
import { type ColumnSpec, ENTRY_COLUMNS, STEP_COLUMNS, TRIAL_COLUMNS } from './schema.ts';

export type Column = Float64Array | Int32Array | Uint8Array;

type Mutable<T> = { -readonly [K in keyof T]: T[K] };
export type MutableEntries = Mutable<EntryTable>;
export type MutableSteps = Mutable<StepTable>;
export type MutableTrials = Mutable<TrialTable>;
type AnyTable = { length: number };

/** A column of the element type that its kind asks for, zero filled. */
export function makeColumn(spec: ColumnSpec, length: number): Column {
  switch (spec.kind) {
    case 'float':
      return new Float64Array(length);
    case 'word':
      return new Uint8Array(length);
    default:
      return new Int32Array(length);
  }
}

/** The value that says "not recorded" in a column of this kind. Words have none. */
export function missingValue(spec: ColumnSpec): number {
  return spec.kind === 'float' ? NaN : spec.kind === 'row' ? -1 : 0;
}

function makeTable<T extends AnyTable>(specs: readonly ColumnSpec[], capacity: number): T {
  const table: Record<string, unknown> = { length: 0 };
  for (const spec of specs) table[spec.name] = makeColumn(spec, capacity);
  return table as T;
}

function growTable<T extends AnyTable>(table: T, specs: readonly ColumnSpec[], capacity: number): void {
  const columns = table as unknown as Record<string, Column>;
  for (const spec of specs) {
    const old = columns[spec.name];
    if (old.length >= capacity) return;
    const wider = makeColumn(spec, capacity);
    wider.set(old);
    columns[spec.name] = wider;
  }
}

function viewTable<T extends AnyTable>(
  table: T,
  specs: readonly ColumnSpec[],
  start: number,
  end: number,
): T {
  const columns = table as unknown as Record<string, Column>;
  const view: Record<string, unknown> = { length: end - start };
  for (const spec of specs) view[spec.name] = columns[spec.name].subarray(start, end);
  return view as T;
}

/** Empty tables whose columns have room for `capacity` rows. */
export const makeEntries = (capacity: number): MutableEntries => makeTable(ENTRY_COLUMNS, capacity);
export const makeSteps = (capacity: number): MutableSteps => makeTable(STEP_COLUMNS, capacity);
export const makeTrials = (capacity: number): MutableTrials => makeTable(TRIAL_COLUMNS, capacity);

/** Widen the columns to at least `capacity` rows, keeping what they hold. */
export const growEntries = (table: MutableEntries, capacity: number): void =>
  growTable(table, ENTRY_COLUMNS, capacity);
export const growSteps = (table: MutableSteps, capacity: number): void =>
  growTable(table, STEP_COLUMNS, capacity);
export const growTrials = (table: MutableTrials, capacity: number): void =>
  growTable(table, TRIAL_COLUMNS, capacity);

/** Rows start to end as a table that shares the memory. */
export const viewEntries = (table: MutableEntries, start: number, end: number): EntryTable =>
  viewTable(table, ENTRY_COLUMNS, start, end);
export const viewSteps = (table: MutableSteps, start: number, end: number): StepTable =>
  viewTable(table, STEP_COLUMNS, start, end);
export const viewTrials = (table: MutableTrials, start: number, end: number): TrialTable =>
  viewTable(table, TRIAL_COLUMNS, start, end);

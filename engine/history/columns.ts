import type { EntryTable, StepTable, TrialTable } from './history.ts';
import { BOOST_NUMBERS, type ColumnSpec, ENTRY_COLUMNS, STEP_COLUMNS, TRIAL_COLUMNS } from './schema.ts';

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

// Classes with every column declared, because an object that is filled name by name ends as a hash table in V8: the
// shower wrote its rows at half the speed.
const NO_FLOATS = new Float64Array(0);
const NO_INTEGERS = new Int32Array(0);
const NO_WORDS = new Uint8Array(0);

class EntryColumns implements MutableEntries {
  length = 0;
  id = NO_INTEGERS;
  px = NO_FLOATS;
  py = NO_FLOATS;
  pz = NO_FLOATS;
  e = NO_FLOATS;
  m = NO_FLOATS;
  colour = NO_INTEGERS;
  anticolour = NO_INTEGERS;
  from = NO_INTEGERS;
  madeBy = NO_INTEGERS;
  endedBy = NO_INTEGERS;
  role = NO_WORDS;
  line = NO_INTEGERS;
}

class StepColumns implements MutableSteps {
  length = 0;
  kind = NO_WORDS;
  channel = NO_WORDS;
  t = NO_FLOATS;
  tStart = NO_FLOATS;
  z = NO_FLOATS;
  azimuth = NO_FLOATS;
  y = NO_FLOATS;
  kT = NO_FLOATS;
  openingAngle = NO_FLOATS;
  alphaS = NO_FLOATS;
  emitter = NO_INTEGERS;
  partner = NO_INTEGERS;
  recoiler = NO_INTEGERS;
  i = NO_INTEGERS;
  j = NO_INTEGERS;
  recoilerAfter = NO_INTEGERS;
  ratio = NO_FLOATS;
  rejected = NO_INTEGERS;
  previous = NO_INTEGERS;
  noEmission = NO_FLOATS;
  generation = NO_INTEGERS;
  boost: Float64Array | null = null;
}

class TrialColumns implements MutableTrials {
  length = 0;
  before = NO_INTEGERS;
  t = NO_FLOATS;
  z = NO_FLOATS;
  channel = NO_WORDS;
  emitter = NO_INTEGERS;
  partner = NO_INTEGERS;
  reason = NO_WORDS;
  ratio = NO_FLOATS;
}

function fillTable<T extends AnyTable>(table: T, specs: readonly ColumnSpec[], capacity: number): T {
  const columns = table as unknown as Record<string, Column>;
  for (const spec of specs) columns[spec.name] = makeColumn(spec, capacity);
  return table;
}

function growTable<T extends AnyTable>(table: T, specs: readonly ColumnSpec[], capacity: number): void {
  const columns = table as unknown as Record<string, Column>;
  for (const spec of specs) {
    const old = columns[spec.name];
    if (old.length >= capacity) continue;
    const wider = makeColumn(spec, capacity);
    wider.set(old);
    columns[spec.name] = wider;
  }
}

function viewTable<T extends AnyTable>(
  view: T,
  table: T,
  specs: readonly ColumnSpec[],
  start: number,
  end: number,
): T {
  const columns = table as unknown as Record<string, Column>;
  const target = view as unknown as Record<string, Column>;
  for (const spec of specs) target[spec.name] = columns[spec.name].subarray(start, end);
  view.length = end - start;
  return view;
}

/** Empty tables whose columns have room for `capacity` rows. */
export const makeEntries = (capacity: number): MutableEntries =>
  fillTable(new EntryColumns(), ENTRY_COLUMNS, capacity);
export function makeSteps(capacity: number, withBoost = false): MutableSteps {
  const steps: MutableSteps = fillTable(new StepColumns(), STEP_COLUMNS, capacity);
  if (withBoost) steps.boost = new Float64Array(BOOST_NUMBERS * capacity);
  return steps;
}
export const makeTrials = (capacity: number): MutableTrials =>
  fillTable(new TrialColumns(), TRIAL_COLUMNS, capacity);

/** Widen the columns to at least `capacity` rows, keeping what they hold. */
export const growEntries = (table: MutableEntries, capacity: number): void =>
  growTable(table, ENTRY_COLUMNS, capacity);
export function growSteps(table: MutableSteps, capacity: number): void {
  growTable(table, STEP_COLUMNS, capacity);
  if (table.boost === null || table.boost.length >= BOOST_NUMBERS * capacity) return;
  const wider = new Float64Array(BOOST_NUMBERS * capacity);
  wider.set(table.boost);
  table.boost = wider;
}
export const growTrials = (table: MutableTrials, capacity: number): void =>
  growTable(table, TRIAL_COLUMNS, capacity);

/** Rows start to end as a table that shares the memory. */
export const viewEntries = (table: MutableEntries, start: number, end: number): EntryTable =>
  viewTable(new EntryColumns() as MutableEntries, table, ENTRY_COLUMNS, start, end);
export function viewSteps(table: MutableSteps, start: number, end: number): StepTable {
  const view = viewTable(new StepColumns() as MutableSteps, table, STEP_COLUMNS, start, end);
  view.boost = table.boost?.subarray(BOOST_NUMBERS * start, BOOST_NUMBERS * end) ?? null;
  return view;
}
export const viewTrials = (table: MutableTrials, start: number, end: number): TrialTable =>
  viewTable(new TrialColumns() as MutableTrials, table, TRIAL_COLUMNS, start, end);

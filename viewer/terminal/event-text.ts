import {
  aliveEntries,
  ENTRY_COLUMNS,
  entriesAtEnd,
  type History,
  KINDS,
  REASONS,
  ROLES,
  type SampleHead,
  STEP_COLUMNS,
  TRIAL_COLUMNS,
} from '../../engine/index.ts';
import { numberText, type TextColumn, typeset } from './columns.ts';
import { partonName } from './parton-name.ts';
import { wrap } from './wrap.ts';

type Spec = { readonly name: string; readonly kind: string; readonly unit: string };
type Table = { readonly length: number };

/** Decimals of momenta: 1e-5 GeV, whatever the energy, so that sums can be made by eye. */
const DECIMALS = 5;
const MOMENTA = ['px', 'py', 'pz', 'e', 'm'];
/** The numbers of a step stand in a table of their own, below the one of what happened: both fit a screen. */
const HAPPENED = [
  ...['kind', 'channel', 'emitter', 'partner', 'recoiler', 'i', 'j', 'recoilerAfter', 'previous'],
  ...['generation', 'rejected'],
];

interface Words {
  readonly [column: string]: readonly string[];
}

/** The columns of a table that its author recorded, as text. */
function tableText(
  label: string,
  table: Table,
  specs: readonly Spec[],
  present: readonly string[],
  words: Words,
  tUnit: string,
): string {
  const rows = Array.from({ length: table.length }, (_, row) => String(row));
  const columns: TextColumn[] = [{ name: label, unit: '', cells: rows, align: 'number' }];
  for (const { name, kind, unit } of specs) {
    if (!present.includes(name)) continue;
    const values = Array.from((table as unknown as Record<string, ArrayLike<number>>)[name]);
    const shown = unit === 'unit of t' ? tUnit : unit;
    if (words[name]) {
      columns.push({ name, unit: '', cells: values.map((code) => words[name][code] ?? '?'), align: 'word' });
    } else if (kind === 'float') {
      const text = MOMENTA.includes(name) ? momentumText : numberText;
      columns.push({ name, unit: shown, cells: values.map(text), align: 'number' });
    } else {
      columns.push({ name, unit: shown, cells: values.map(String), align: 'number' });
    }
    if (name === 'id')
      columns.push({ name: 'particle', unit: '', cells: values.map(partonName), align: 'word' });
  }
  return typeset(columns);
}

function momentumText(value: number): string {
  if (Number.isNaN(value)) return '-';
  // a rounded minus nothing reads like a finding
  const text = value.toFixed(DECIMALS);
  return Number(text) === 0 ? text.replace('-', '') : text;
}

/** A number in at most six digits, without the zeros that a column would need. */
const shortNumber = (value: number): string => String(Number(value.toPrecision(6)));

const counted = (count: number, one: string, many: string): string => `${count} ${count === 1 ? one : many}`;

/** The head of a file as aligned lines. */
export function headText(head: SampleHead): string {
  const unit = head.meaning.tUnit ?? '';
  const shower = Object.entries(head.shower).map(([name, value]) => `${name} ${value ?? '-'}`);
  const rows: [string, string][] = [
    ['producer', `${head.producer.name} ${head.producer.version}`],
    ['beams', head.beams.map(({ id, e }) => `${partonName(id)} ${shortNumber(e)} GeV`).join(', ')],
    ['sqrtS', `${shortNumber(head.sqrtS)} GeV`],
    ['evolution', `${head.evolutionVariable}, ordering ${head.ordering}`],
    ['hardScale', `${shortNumber(head.hardScale)} ${unit}`],
    ['cutoff', `${shortNumber(head.cutoff)} GeV^2`],
    ['tLow', `${shortNumber(head.tLow)} ${unit}`],
    ['shower', shower.join(', ')],
    ['seed', String(head.seed ?? '-')],
  ];
  return rows.map(([name, text]) => `  ${name.padEnd(12)}${wrap(text, 14)}`).join('\n');
}

function titleOf({ head, entries, steps }: History): string {
  const { incoming, outgoing } = head.process;
  const process = `${incoming.map(partonName).join(' ')} -> ${outgoing.map(partonName).join(' ')}`;
  const status =
    head.status === 'complete' ? '' : `, ${head.status}: ${head.statusReason ?? 'no reason given'}`;
  const label = head.label === null ? '' : ` "${head.label}"`;
  const weight = head.weight === 1 ? '' : `, weight ${shortNumber(head.weight)}`;
  const size = `${counted(steps.length, 'step', 'steps')}, ${counted(entries.length, 'entry', 'entries')}`;
  return `event ${head.event}${label}: ${process}, ${size}${weight}${status}`;
}

/** Final partons: where recoil is global, a row's momentum is not that of the end. */
function finalText(history: History): string {
  const end = entriesAtEnd(history);
  const rows = Array.from(aliveEntries(history, history.steps.length - 1));
  const column = (name: string, values: ArrayLike<number>, text: (value: number) => string): TextColumn => {
    const unit = MOMENTA.includes(name) ? 'GeV' : '';
    return { name, unit, cells: rows.map((row) => text(values[row])), align: 'number' };
  };
  return typeset([
    { name: 'final', unit: '', cells: rows.map(String), align: 'number' },
    column('id', end.id, String),
    ...(['px', 'py', 'pz', 'e', 'm'] as const).map((name) => column(name, end[name], momentumText)),
  ]);
}

/** One event for people: title, entries, steps (what happened, then its numbers) and trials, names and units as in JSON. */
export function eventText(history: History): string {
  const { head, entries, steps, trials, channels } = history;
  const unit = head.meaning.tUnit ?? '';
  const stepSpecs = (happened: boolean): Spec[] =>
    STEP_COLUMNS.filter(({ name }) => HAPPENED.includes(name) === happened);
  const words = { role: ROLES, kind: KINDS, channel: channels, reason: REASONS };
  const parts = [
    titleOf(history),
    tableText('entry', entries, ENTRY_COLUMNS, head.columns.entries, words, unit),
  ];
  if (steps.length > 0) {
    parts.push(tableText('step', steps, stepSpecs(true), head.columns.steps, words, unit));
    parts.push(tableText('step', steps, stepSpecs(false), head.columns.steps, words, unit));
  }
  if (steps.boost !== null) parts.push(finalText(history));
  if (trials && trials.length > 0) {
    parts.push(tableText('trial', trials, TRIAL_COLUMNS, head.columns.trials ?? [], words, unit));
  }
  if (head.rerun) parts.push(`  again with: ${head.rerun}`);
  return `${parts.join('\n\n')}\n`;
}

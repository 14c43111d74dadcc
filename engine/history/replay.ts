import { log } from '../math/index.ts';
import type { EntryTable, History } from './history.ts';
import { ROLES } from './schema.ts';

const INCOMING = ROLES.indexOf('incoming');
const RESONANCE = ROLES.indexOf('resonance');

/** Ends of the colour lines of an event at one moment, in the order of their tags. All arrays have one length. */
export interface ColourLines {
  readonly tag: Int32Array;
  /** Row whose colour is the tag, -1 where no row has it. */
  readonly colourEnd: Int32Array;
  /** Row whose anticolour is the tag, -1 where no row has it. */
  readonly anticolourEnd: Int32Array;
}

/** A tag that does not join exactly one colour end to exactly one anticolour end. */
export interface ColourFault {
  readonly tag: number;
  readonly colourEnds: number;
  readonly anticolourEnds: number;
}

/**
 * Whether a row is a parton of the event right after a step.
 *
 * @param step step number, -1: right after the hard process; the number of steps or more: at the end.
 * @returns false for incoming and resonance rows, and for a row that the table lacks.
 */
export function isAlive(entries: EntryTable, row: number, step: number): boolean {
  const role = entries.role[row];
  if (!(entries.madeBy[row] <= step) || role === INCOMING || role === RESONANCE) return false;
  const ended = entries.endedBy[row];
  return ended < 0 || ended > step;
}

/**
 * Rows that are partons of the event right after a step, in row order.
 *
 * @param step step number, -1: right after the hard process; the number of steps or more: the final state.
 * @returns rows, incoming and resonance rows left out.
 */
export function aliveEntries(history: History, step: number): Int32Array {
  const { entries } = history;
  const rows = new Int32Array(entries.length);
  let count = 0;
  for (let row = 0; row < entries.length; row++) if (isAlive(entries, row, step)) rows[count++] = row;
  return rows.slice(0, count);
}

/**
 * Colour dipoles of the event right after a step: which row is at which end of every colour tag.
 *
 * Where two rows share an end, against the rules of the history, the later row is given; `colourFaults` names the tag.
 *
 * @param step as in aliveEntries.
 */
export function coloursAlive(history: History, step: number): ColourLines {
  const { colour, anticolour } = history.entries;
  const colourOf = new Map<number, number>();
  const anticolourOf = new Map<number, number>();
  for (const row of aliveEntries(history, step)) {
    if (colour[row] !== 0) colourOf.set(colour[row], row);
    if (anticolour[row] !== 0) anticolourOf.set(anticolour[row], row);
  }
  const tag = Int32Array.from(new Set([...colourOf.keys(), ...anticolourOf.keys()])).sort();
  return {
    tag,
    colourEnd: tag.map((n) => colourOf.get(n) ?? -1),
    anticolourEnd: tag.map((n) => anticolourOf.get(n) ?? -1),
  };
}

/**
 * Colour tags of the event right after a step that break the rule of one colour end and one anticolour end.
 *
 * Meant for events without coloured beams, whose partons carry every end.
 *
 * @param step as in aliveEntries.
 * @returns one fault per tag, in the order of the tags; empty where every colour line closes.
 */
export function colourFaults(history: History, step: number): ColourFault[] {
  const { colour, anticolour } = history.entries;
  const ends = new Map<number, { tag: number; colourEnds: number; anticolourEnds: number }>();
  const endsOf = (tag: number) => {
    const known = ends.get(tag) ?? { tag, colourEnds: 0, anticolourEnds: 0 };
    ends.set(tag, known);
    return known;
  };
  for (const row of aliveEntries(history, step)) {
    if (colour[row] !== 0) endsOf(colour[row]).colourEnds++;
    if (anticolour[row] !== 0) endsOf(anticolour[row]).anticolourEnds++;
  }
  return [...ends.values()]
    .filter((found) => found.colourEnds !== 1 || found.anticolourEnds !== 1)
    .sort((a, b) => a.tag - b.tag);
}

/**
 * The last step at or before an evolution time.
 *
 * @param time L = ln(t0/t), t0 the head's hardScale; 0 is the beginning.
 * @returns step number, -1 where no step has happened yet.
 *
 * The steps must fall in t from row to row, as they do in every history sorted by evolution. A step's own
 * `evolutionTime` finds that step.
 */
export function stepAtTime(history: History, time: number): number {
  const { t, length } = history.steps;
  const { hardScale } = history.head;
  let below = -1;
  let above = length;
  while (above - below > 1) {
    const middle = (below + above) >> 1;
    if (log(hardScale / t[middle]) <= time) below = middle;
    else above = middle;
  }
  return below;
}

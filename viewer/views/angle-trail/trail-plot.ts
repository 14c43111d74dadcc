import type { History, StepMeasures } from '../../../engine/index.ts';
import { log } from '../../../engine/math/index.ts';
import { partonSymbol, shortNumber } from '../type/index.ts';

/** A logarithmic angle axis from `low` to `high` [rad], `high` at the top. */
export interface AngleAxis {
  readonly low: number;
  readonly high: number;
  readonly ticks: readonly { readonly angle: number; readonly label: string }[];
}

/** The largest angle there is, with room for its mark [rad]. */
const HIGH = 3.9;

/**
 * Angle axis on which every positive angle of the step has its place; at least from 0.2 rad to pi, ticks at 1, 2, 5 times
 * powers of ten and at pi.
 *
 * @param angles Lists of angles [rad]; what is not above 0 has no place on a logarithmic axis and is passed over.
 */
export function angleAxis(angles: readonly ArrayLike<number>[], height: number): AngleAxis {
  let low = 0.2;
  for (const list of angles) {
    for (let k = 0; k < list.length; k++) if (list[k] > 0 && list[k] < low) low = list[k];
  }
  low *= 0.8;
  const axis = { low, high: HIGH };
  const candidates = [{ angle: Math.PI, label: 'π', rank: 0 }];
  for (let power = 0; power > -40 && 2 * Number(`1e${power}`) > low; power--) {
    // Powers of ten first; where there is no room for all, twos give way before fives.
    for (const [digit, rank] of [
      [2, 2],
      [1, 0],
      [0.5, 1],
    ]) {
      const angle = Number((digit * Number(`1e${power}`)).toPrecision(1));
      if (angle > low) candidates.push({ angle, label: angleLabel(angle), rank });
    }
  }
  const ticks: { angle: number; label: string }[] = [];
  for (const { angle, label } of candidates.sort((p, q) => p.rank - q.rank)) {
    const at = angleHeight(axis, angle, height);
    const free = ticks.every((tick) => Math.abs(angleHeight(axis, tick.angle, height) - at) >= LINE);
    if (free) ticks.push({ angle, label });
  }
  return { ...axis, ticks: ticks.sort((p, q) => q.angle - p.angle) };
}

/** Least distance between two labels of the axis [px]. */
const LINE = 13;

const angleLabel = (angle: number): string =>
  angle >= 1e-3 ? String(angle) : shortNumber(Number(angle.toPrecision(1)));

/** Place of an angle on an axis of so many pixels, from the top; angles off the axis lie at its end. */
export function angleHeight(axis: { low: number; high: number }, angle: number, height: number): number {
  const share = log(axis.high / angle) / log(axis.high / axis.low);
  return Math.min(Math.max(share, 0), 1) * height;
}

/** A parton line that branched. */
export interface TrailLine {
  readonly line: number;
  /** Notation of the parton that the line began as. */
  readonly symbol: string;
  /** Steps in which it was the emitter, in order. */
  readonly steps: readonly number[];
}

/** The parton lines of an event that branched, the busiest first. */
export function trailLines({ entries, steps }: History): TrailLine[] {
  const found = new Map<number, number[]>();
  for (let step = 0; step < steps.length; step++) {
    const emitter = steps.emitter[step];
    const line = emitter >= 0 ? entries.line[emitter] : -1;
    if (line < 0) continue;
    const known = found.get(line);
    if (known) known.push(step);
    else found.set(line, [step]);
  }
  const lines = [...found].map(([line, own]) => ({
    line,
    symbol: partonSymbol(entries.id[steps.emitter[own[0]]]),
    steps: own,
  }));
  return lines.sort((a, b) => b.steps.length - a.steps.length || a.line - b.line);
}

/** How many steps open wider than a ceiling, of those for which the ratio is known. */
export interface AboveCount {
  readonly above: number;
  readonly known: number;
}

/** Steps whose ratio of opening angle to a ceiling exceeds 1. A count of this event, and no verdict. */
export function countAbove(ratios: ArrayLike<number>, steps: number): AboveCount {
  let above = 0;
  let known = 0;
  for (let step = 0; step < steps; step++) {
    if (Number.isNaN(ratios[step])) continue;
    known++;
    if (ratios[step] > 1) above++;
  }
  return { above, known };
}

/** `10 of 24 steps (42 %)`, or that nothing is known. */
export function aboveText({ above, known }: AboveCount): string {
  if (known === 0) return 'not known';
  return `${above} of ${known} (${Math.round((100 * above) / known)} %)`;
}

/** Places of the steps across the plot, each the middle of its column or on its own time [px]. */
export function trailPositions(
  count: number,
  width: number,
  along: 'step' | 'time',
  timeShare: (step: number) => number,
): Float64Array {
  const positions = new Float64Array(count);
  for (let step = 0; step < count; step++) {
    positions[step] = along === 'step' ? ((step + 0.5) / count) * width : timeShare(step) * width;
  }
  return positions;
}

/**
 * Place of the clock across a plot whose columns are steps [px]: on the mark of a step at the step's own time, between two
 * marks in proportion to L.
 */
export function playheadPlace(
  positions: ArrayLike<number>,
  width: number,
  timeOf: (step: number) => number,
  end: number,
  passed: number,
  time: number,
): number {
  const from = passed < 0 ? 0 : positions[passed];
  const to = passed + 1 < positions.length ? positions[passed + 1] : width;
  const t0 = passed < 0 ? 0 : timeOf(passed);
  const t1 = passed + 1 < positions.length ? timeOf(passed + 1) : end;
  return t1 > t0 ? from + ((time - t0) / (t1 - t0)) * (to - from) : from;
}

/** Every how many steps a number fits below the axis. */
export function numberStride(count: number, width: number, room = 26): number {
  const wanted = count > 0 ? (room * count) / Math.max(width, 1) : 1;
  for (let power = 1; ; power *= 10) {
    for (const digit of [1, 2, 5]) if (digit * power >= wanted) return digit * power;
  }
}

/** Opening, partner and birth angles that a plot of these measures shows. */
export const trailAngles = (measures: StepMeasures): Float64Array[] => [
  measures.openingAngle.subarray(0, measures.length),
  measures.partnerAngle.subarray(0, measures.length),
  measures.birthAngle.subarray(0, measures.length),
];

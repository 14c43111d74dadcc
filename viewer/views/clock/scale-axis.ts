import { exp, log } from '../../../engine/math/index.ts';
import { shortNumber } from '../type/index.ts';

/** How the evolution variable is printed: as its root in GeV, or as it is. */
export interface ScaleWords {
  /** Notation of what the axis shows, with its unit in brackets. */
  readonly axis: string;
  /** Notation of the same without unit: `√*t*`. */
  readonly symbol: string;
  /** Unit, empty for none. */
  readonly unit: string;
  /** Whether the axis shows the root of t. */
  readonly root: boolean;
}

/** Words for a scale axis from the unit of t that a history declares. */
export function scaleWords(tUnit: 'GeV^2' | 'GeV' | '1' | null): ScaleWords {
  if (tUnit === 'GeV^2') return { axis: '√*t* [GeV]', symbol: '√*t*', unit: 'GeV', root: true };
  if (tUnit === 'GeV') return { axis: '*t* [GeV]', symbol: '*t*', unit: 'GeV', root: false };
  if (tUnit === '1') return { axis: '√*t*', symbol: '√*t*', unit: '', root: true };
  return { axis: '*t* [unit not declared]', symbol: '*t*', unit: '', root: false };
}

/** Printed scale at an evolution time: √t or t. */
export function scaleAt(hardScale: number, time: number, root: boolean): number {
  const t = hardScale * exp(-time);
  return root ? Math.sqrt(t) : t;
}

/** A mark on the axis; `label` is empty where there is no room or need for one. */
export interface AxisTick {
  /** Evolution time L. */
  readonly time: number;
  readonly label: string;
  readonly major: boolean;
}

export interface AxisOptions {
  readonly hardScale: number;
  /** L at the right end. */
  readonly end: number;
  readonly root: boolean;
  /** Length of the axis [px]. */
  readonly width: number;
  /** Font size of the labels [px]. */
  readonly size: number;
}

const LABELLED = [1, 5, 2, 3];
const GAP = 10;

/** Half the width of a label in tabular figures, each half an em wide. */
const halfWidth = (label: string, size: number): number => label.length * size * 0.25;

/**
 * Ticks of a logarithmic scale axis that falls to the right: both ends labelled with their own values, decades first
 * among the rest, no label within 10 px of another.
 */
export function axisTicks(options: AxisOptions): AxisTick[] {
  const { hardScale, end, root, width, size } = options;
  if (!(end > 0) || !(hardScale > 0) || !(width > 0)) return [];
  const first = scaleAt(hardScale, 0, root);
  const last = scaleAt(hardScale, end, root);
  const x = (time: number): number => (time / end) * width;
  const taken: [number, number][] = [];
  const place = (from: number, to: number): boolean => {
    if (taken.some(([a, b]) => from < b + GAP && to > a - GAP)) return false;
    taken.push([from, to]);
    return true;
  };
  const ends = [shortNumber(roundTo(first, 3)), shortNumber(roundTo(last, 3))];
  place(0, 2 * halfWidth(ends[0], size));
  const both = place(width - 2 * halfWidth(ends[1], size), width);
  const ticks: AxisTick[] = [
    { time: 0, label: ends[0], major: true },
    { time: end, label: both ? ends[1] : '', major: true },
  ];
  const inside = mantissas(first, last).map(({ value, mantissa }) => ({
    time: (root ? 2 : 1) * log(first / value),
    value,
    rank: LABELLED.indexOf(mantissa),
  }));
  const byRank = [...inside].sort((a, b) => rankOf(a.rank) - rankOf(b.rank) || a.time - b.time);
  for (const { time, value, rank } of byRank) {
    const label = shortNumber(value);
    const half = halfWidth(label, size);
    const fits = rank >= 0 && place(x(time) - half, x(time) + half);
    ticks.push({ time, label: fits ? label : '', major: rank >= 0 });
  }
  return ticks.sort((a, b) => a.time - b.time);
}

const rankOf = (rank: number): number => (rank < 0 ? LABELLED.length : rank);
const roundTo = (value: number, digits: number): number => Number(value.toPrecision(digits));

// One to nine times every power of ten strictly between two values, from the larger down.
function mantissas(first: number, last: number): { value: number; mantissa: number }[] {
  const found: { value: number; mantissa: number }[] = [];
  const top = Number(first.toExponential().split('e')[1]);
  const bottom = Number(last.toExponential().split('e')[1]);
  // Beyond forty decades nothing could be told apart.
  for (let power = top; power >= Math.max(bottom, top - 40); power--) {
    for (let mantissa = 9; mantissa >= 1; mantissa--) {
      const value = Number(`${mantissa}e${power}`);
      if (value < first * (1 - 1e-9) && value > last * (1 + 1e-9)) found.push({ value, mantissa });
    }
  }
  return found;
}

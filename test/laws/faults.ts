import type { EntryTable, History, StepTable, TrialTable } from '../../engine/index.ts';

/** A history whose numbers may be changed. */
interface Copy {
  readonly head: History['head'];
  readonly entries: EntryTable;
  readonly steps: StepTable;
  readonly trials: TrialTable | null;
}

/** Damages a copy; false where this event has nothing that could be damaged so. */
type Fault = (copy: Copy) => boolean;

function copyTable<T extends { length: number }>(table: T): T {
  const columns = table as unknown as Record<string, number | null | Int32Array | Float64Array | Uint8Array>;
  const copies = Object.entries(columns).map(([name, column]) => [
    name,
    typeof column === 'number' || column === null ? column : column.slice(),
  ]);
  return Object.fromEntries(copies) as T;
}

/** The event with a fault, null where it has no place for it. */
export function withFault(history: History, fault: Fault): History | null {
  const copy = {
    ...history,
    entries: copyTable(history.entries),
    steps: copyTable(history.steps),
    trials: history.trials === null ? null : copyTable(history.trials),
  };
  return fault(copy) ? copy : null;
}

/** Step in the middle, -1 for none; the one at which the faults are placed. */
const middle = ({ steps }: Copy): number => (steps.length - 1) >> 1;

const onStep =
  (damage: (copy: Copy, step: number) => boolean | undefined): Fault =>
  (copy) =>
    middle(copy) >= 0 && damage(copy, middle(copy)) !== false;

const onGluon =
  (damage: (copy: Copy, row: number) => void): Fault =>
  (copy) => {
    const row = copy.entries.id.indexOf(21);
    if (row >= 0) damage(copy, row);
    return row >= 0;
  };

const claim = (name: 'y' | 'z' | 'kT' | 'openingAngle'): Fault =>
  onStep(({ steps }, step) => {
    steps[name][step] += 1e-5 * Math.max(1e-2, steps[name][step]);
    if (name === 'z') steps.z[step] += 1e-5;
    return undefined;
  });

const exchange = (column: Int32Array | Uint8Array | Float64Array, a: number, b: number): void => {
  [column[a], column[b]] = [column[b], column[a]];
};

export const FAULTS = {
  'a momentum shifted by 1e-12 of sqrt(s)': onStep(({ entries, steps, head }, step) => {
    entries.py[steps.j[step]] += 1e-12 * head.sqrtS;
    return undefined;
  }),
  'an energy shifted by 1e-12 of sqrt(s)': onStep(({ entries, steps, head }, step) => {
    entries.e[steps.recoilerAfter[step]] += 1e-12 * head.sqrtS;
    return undefined;
  }),
  'a missing number': onStep(({ entries, steps }, step) => {
    entries.pz[steps.i[step]] = NaN;
    return undefined;
  }),
  'a mass of its own': onStep(({ entries, steps }, step) => {
    entries.m[steps.i[step]] = 0.01 * entries.e[steps.i[step]];
    return undefined;
  }),
  'a row that never ends': onStep(({ entries, steps }, step) => {
    entries.endedBy[steps.emitter[step]] = -1;
    return undefined;
  }),
  'a row that ends too early': onStep(({ entries, steps }, step) => {
    const row = steps.j[step];
    if (step + 1 >= steps.length || entries.endedBy[row] === step + 1) return false;
    entries.endedBy[row] = step + 1;
    return undefined;
  }),
  'a row that comes from another': onStep(({ entries, steps }, step) => {
    entries.from[steps.j[step]] = steps.partner[step];
    return undefined;
  }),
  'a row made by another step': onStep(({ entries, steps }, step) => {
    if (step < 1) return false;
    entries.madeBy[steps.j[step]] = step - 1;
    return undefined;
  }),
  'an emission on the line of its emitter': onStep(({ entries, steps }, step) => {
    entries.line[steps.j[step]] = entries.line[steps.emitter[step]];
    return undefined;
  }),
  'a recoiler on another line': onStep(({ entries, steps }, step) => {
    entries.line[steps.recoilerAfter[step]] = 10000;
    return undefined;
  }),
  'roles of i and j exchanged': onStep(({ entries, steps }, step) => {
    exchange(entries.role, steps.i[step], steps.j[step]);
    return undefined;
  }),
  'a generation too many': onStep(({ steps }, step) => {
    steps.generation[step]++;
    return undefined;
  }),
  'a colour tag of its own': onGluon(({ entries }, row) => {
    entries.colour[row] += 10000;
  }),
  'a gluon without anticolour': onGluon(({ entries }, row) => {
    entries.anticolour[row] = 0;
  }),
  'a gluon connected to itself': onGluon(({ entries }, row) => {
    entries.anticolour[row] = entries.colour[row];
  }),
  'an antiquark for a quark': onStep(({ entries, steps }, step) => {
    const row = steps.i[step];
    if (entries.id[row] === 21) return false;
    entries.id[row] = -entries.id[row];
    return undefined;
  }),
  'tags of i and j exchanged': onStep(({ entries, steps }, step) => {
    // two gluons that share both lines may radiate through either: exchanged tags are the other way to do it
    const { colour, anticolour } = entries;
    const { [step]: emitter } = steps.emitter;
    const { [step]: partner } = steps.partner;
    if (
      colour[emitter] !== 0 &&
      colour[emitter] === anticolour[partner] &&
      anticolour[emitter] !== 0 &&
      anticolour[emitter] === colour[partner]
    )
      return false;
    exchange(entries.colour, steps.i[step], steps.j[step]);
    exchange(entries.anticolour, steps.i[step], steps.j[step]);
    return undefined;
  }),
  'a partner that is not connected': onStep(({ entries, steps }, step) => {
    const { length } = entries;
    const { [step]: emitter } = steps.emitter;
    const { colour, anticolour } = entries;
    for (let row = 3; row < length; row++) {
      const joined =
        (colour[row] !== 0 && colour[row] === anticolour[emitter]) ||
        (anticolour[row] !== 0 && anticolour[row] === colour[emitter]);
      if (joined) continue;
      steps.partner[step] = row;
      return undefined;
    }
    return false;
  }),
  'steps in the wrong order': onStep(({ steps }, step) => {
    if (step + 1 >= steps.length || steps.length < 6) return false;
    // the whole history backwards in t: no clock can find its way
    steps.t.subarray(0, steps.length).reverse();
    return undefined;
  }),
  'a step below the cutoff': onStep(({ steps, head }, step) => {
    steps.kT[step] = 0.999999 * Math.sqrt(head.cutoff);
    return undefined;
  }),
  'a ratio above 1': onStep(({ steps }, step) => {
    steps.ratio[step] = 1 + 2 ** -52;
    return undefined;
  }),
  'a t above its gap': onStep(({ steps }, step) => {
    steps.t[step] = steps.tStart[step] * (1 + 1e-5);
    return undefined;
  }),
  'a y off by 1e-5': claim('y'),
  'a z off by 1e-5': claim('z'),
  'a kT off by 1e-5': claim('kT'),
  'an opening angle off by 1e-5': claim('openingAngle'),
  'an azimuth off by 1e-5': onStep(({ steps }, step) => {
    steps.azimuth[step] += 1e-5;
    return undefined;
  }),
  'a pair turned about its axis': onStep(({ entries, steps }, step) => {
    // i and j exchange a transverse momentum: balanced, and yet not what was claimed
    const { [step]: i } = steps.i;
    const { [step]: j } = steps.j;
    const kick = 1e-3 * Math.min(entries.e[i], entries.e[j]);
    entries.px[i] += kick;
    entries.px[j] -= kick;
    return undefined;
  }),
  'a trial uncounted': (copy) => {
    const step = copy.steps.rejected.findIndex((count) => count > 0);
    if (copy.trials === null || step < 0) return false;
    copy.steps.rejected[step]--;
    return true;
  },
  'a trial above its gap': ({ trials, head }) => {
    if (trials === null || trials.length < 1) return false;
    trials.t[trials.length >> 1] = head.hardScale * (1 + 1e-9);
    return true;
  },
  'a trial of a row that is gone': ({ trials, steps }) => {
    const late =
      trials === null ? -1 : trials.before.subarray(0, trials.length).findIndex((step) => step > 0);
    if (trials === null || late < 0) return false;
    trials.emitter[late] = steps.emitter[trials.before[late] - 1];
    return true;
  },
  'a trial above 1': ({ trials }) => {
    const row =
      trials === null ? -1 : trials.ratio.subarray(0, trials.length).findIndex((ratio) => ratio >= 0);
    if (trials === null || row < 0) return false;
    trials.ratio[row] = 1.0001;
    return true;
  },
} satisfies Record<string, Fault>;

export type FaultName = keyof typeof FAULTS;

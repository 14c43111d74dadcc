import fc from 'fast-check';
import {
  CHANNELS,
  type ColumnSpec,
  ENTRY_COLUMNS,
  type EventHead,
  HistoryBatch,
  KINDS,
  REASONS,
  ROLES,
  type SampleHead,
  STEP_COLUMNS,
  TRIAL_COLUMNS,
} from '../../engine/index.ts';

/** Head of a sample with all columns, or with the given ones. */
export function sampleHead(columns: Partial<SampleHead['columns']> = {}): SampleHead {
  return {
    seed: 2 ** 53 - 1,
    process: { name: 'ee', incoming: [11, -11] },
    beams: [
      { id: 11, px: 0, py: 0, pz: 45.6, e: 45.6 },
      { id: -11, px: 0, py: 0, pz: -45.6, e: 45.6 },
    ],
    sqrtS: 91.2,
    hardScale: 2079.36,
    cutoff: 1,
    tLow: 1,
    evolutionVariable: 'kt',
    ordering: 'global',
    meaning: {
      t: 'kT^2',
      tUnit: 'GeV^2',
      z: 'emitter light-cone',
      kT: 'dipole frame',
      azimuth: null,
      openingAngle: 'own',
      angleFrame: 'event',
    },
    shower: { order: 'kt', cmw: false, cutoff: 1, quark: null },
    producer: { name: 'a program of the tests', version: '0' },
    columns: {
      entries: ENTRY_COLUMNS.map(({ name }) => name),
      steps: [...STEP_COLUMNS.map(({ name }) => name), 'boost'],
      trials: TRIAL_COLUMNS.map(({ name }) => name),
      ...columns,
    },
  };
}

const SPECIAL = [0, -0, Infinity, -Infinity, NaN, 5e-324, -2.5e-310, Number.MAX_VALUE, 1, -1, Math.PI];
const WORDS: Readonly<Record<string, number>> = {
  role: ROLES.length,
  kind: KINDS.length,
  reason: REASONS.length,
  channel: CHANNELS.length,
};

/** A small generator for columns: fast-check makes the shape, this the many numbers in it. Source: Marsaglia, xorshift. */
export function randomBits(seed: number): () => number {
  let state = seed | 0 || 1;
  return () => {
    state ^= state << 13;
    state ^= state >>> 17;
    state ^= state << 5;
    return state >>> 0;
  };
}

/** How the numbers of a history's columns are drawn: any bits, small rows as a shower makes them, or all the same. */
export type Flavour = 'any' | 'plausible' | 'constant';

const bits = new DataView(new ArrayBuffer(8));

function randomDouble(next: () => number, flavour: Flavour): number {
  if (flavour === 'constant') return -0;
  if (flavour === 'plausible') return (next() / 2 ** 32) * 100 - 20;
  if (next() % 4 === 0) return SPECIAL[next() % SPECIAL.length];
  bits.setUint32(0, next());
  bits.setUint32(4, next());
  return bits.getFloat64(0);
}

function fill(
  table: object,
  specs: readonly ColumnSpec[],
  present: readonly string[],
  start: number,
  end: number,
  next: () => number,
  flavour: Flavour,
): void {
  const columns = table as Record<string, Float64Array | Int32Array | Uint8Array>;
  for (const { name, kind } of specs) {
    if (!present.includes(name)) {
      if (kind !== 'integer' && kind !== 'word') columns[name].fill(kind === 'row' ? -1 : NaN, start, end);
      continue;
    }
    for (let row = start; row < end; row++) {
      if (kind === 'float') columns[name][row] = randomDouble(next, flavour);
      else if (kind === 'word') columns[name][row] = flavour === 'constant' ? 0 : next() % WORDS[name];
      else if (flavour === 'any') columns[name][row] = next() | 0;
      else columns[name][row] = flavour === 'plausible' ? (next() % 300) - 1 : 7;
    }
  }
}

/** Shape of an event to be filled with random numbers. */
export interface EventShape {
  readonly entries: number;
  readonly steps: number;
  readonly trials: number;
  readonly seed: number;
  readonly flavour: Flavour;
  readonly label: string | null;
  readonly stream: number | null;
  readonly status: EventHead['status'];
  readonly weight: number;
}

/** Events of such shapes, end to end. */
export function buildBatch(
  sample: SampleHead,
  shapes: readonly EventShape[],
  channels?: readonly string[],
): HistoryBatch {
  const batch = new HistoryBatch(sample, channels);
  for (const shape of shapes) addEvent(batch, shape);
  return batch;
}

/** Add an event of a shape. */
export function addEvent(batch: HistoryBatch, shape: EventShape): void {
  const { sample } = batch;
  const next = randomBits(shape.seed);
  batch.reserve(shape.entries, shape.steps, shape.trials);
  const { entries, steps, trials } = batch;
  const end = { entries: entries.length + shape.entries, steps: steps.length + shape.steps };
  fill(entries, ENTRY_COLUMNS, sample.columns.entries, entries.length, end.entries, next, shape.flavour);
  fill(steps, STEP_COLUMNS, sample.columns.steps, steps.length, end.steps, next, shape.flavour);
  if (steps.boost) {
    for (let k = 16 * steps.length; k < 16 * end.steps; k++)
      steps.boost[k] = randomDouble(next, shape.flavour);
  }
  entries.length = end.entries;
  steps.length = end.steps;
  if (trials) {
    const last = trials.length + shape.trials;
    fill(trials, TRIAL_COLUMNS, sample.columns.trials ?? [], trials.length, last, next, shape.flavour);
    trials.length = last;
  }
  batch.endEvent({
    event: batch.events.length,
    label: shape.label,
    stream: shape.stream,
    rerun: shape.label && `make ${shape.label}`,
    status: shape.status,
    statusReason: shape.status === 'complete' ? null : 'no reason',
    outgoing: shape.entries > 4 ? [1 + (shape.seed & 3), -1] : [],
    weight: shape.weight,
  });
}

/** Any event that a history can be. */
export const anyEvent: fc.Arbitrary<EventShape> = fc.record({
  entries: fc.nat(12),
  steps: fc.nat(5),
  trials: fc.nat(7),
  seed: fc.integer(),
  flavour: fc.constantFrom<Flavour[]>('any', 'plausible', 'constant'),
  label: fc.option(fc.string({ maxLength: 5 })),
  stream: fc.option(fc.maxSafeNat()),
  status: fc.constantFrom('complete', 'complete', 'aborted', 'vetoed'),
  weight: fc.oneof(fc.constant(1), fc.double()),
});

/** A plain event for files whose content does not matter. */
export function plainEvent(seed: number, size = 3): EventShape {
  const trials = 2 * size;
  const rest = { label: null, stream: seed, status: 'complete', weight: 1 } as const;
  return { entries: 3 * size + 5, steps: size, trials, seed: seed * 7919 + 1, flavour: 'plausible', ...rest };
}

import {
  createGrower,
  ENTRY_COLUMNS,
  type Grower,
  type GrowSettings,
  type History,
  HistoryBatch,
  resolveSettings,
  STEP_COLUMNS,
} from '../../../../engine/index.ts';

/** Settings of this engine, and whether the cascade is coherent. */
export interface Sample extends Partial<GrowSettings> {
  readonly coherent: boolean;
}

export const makeShower = ({ coherent, ...settings }: Sample): Grower =>
  createGrower(resolveSettings({ ...settings, shower: 'coherent', coherence: coherent }));

/** One event with memory of its own. */
export function coherentEvent(sample: Sample, stream: number): History {
  const shower = makeShower(sample);
  const batch = new HistoryBatch(shower.sample);
  shower.grow(batch, stream);
  return batch.view(0);
}

/** Events 0 to `count` of a sample in one batch. */
export function coherentBatch(sample: Sample, count: number): HistoryBatch {
  const shower = makeShower(sample);
  const batch = new HistoryBatch(shower.sample);
  for (let stream = 0; stream < count; stream++) shower.grow(batch, stream);
  return batch;
}

/** Every process, with and without masses, low and high energies, both cascades. */
export const SAMPLES: readonly Sample[] = [true, false].flatMap((coherent): Sample[] => [
  { coherent, energy: 91.1876 },
  { coherent, energy: 1000, masses: true },
  { coherent, energy: 1000, quark: 5, masses: true, coupling: { kind: 'two-loop' } },
  { coherent, energy: 20, cutoff: 0.5, masses: true },
  { coherent, energy: 300, coupling: { kind: 'fixed', value: 0.2 }, flavours: 3, quark: 2 },
  { coherent, energy: 91.1876, cmw: true },
  { coherent, process: 'scalar-gg', energy: 125 },
  { coherent, process: 'scalar-gg', energy: 500, masses: true },
  { coherent, process: 'scalar-bb', energy: 125, masses: true },
]);

/** The first place in which the tables of two histories differ in any bit, '' for none. */
export function firstDifference(a: History, b: History): string {
  const tables = [
    ['entries', ENTRY_COLUMNS],
    ['steps', STEP_COLUMNS],
  ] as const;
  for (const [table, columns] of tables) {
    for (const { name } of columns) {
      const [x, y] = [a[table], b[table]].map((t) => (t as never as Record<string, Float64Array>)[name]);
      if (x.length !== y.length) return `${table}.${name}: ${x.length} rows against ${y.length}`;
      for (let n = 0; n < x.length; n++)
        if (!Object.is(x[n], y[n])) return `${table}.${name}[${n}]: ${x[n]} against ${y[n]}`;
    }
  }
  return '';
}

import {
  createGrower,
  type Grower,
  type History,
  HistoryBatch,
  resolveSettings,
} from '../../engine/index.ts';
import type { PlainSettings } from './coherent-plain.ts';

export type CoherentSettings = Partial<PlainSettings>;

function showerOf(some: CoherentSettings, seed: number): Grower {
  const { coherent = true, ...settings } = some;
  return createGrower(resolveSettings({ ...settings, seed, shower: 'coherent', coherence: coherent }));
}

/** How many of the events 0 to `count` have no step. */
export function countEmpty(some: CoherentSettings, seed: number, count: number): number {
  const shower = showerOf(some, seed);
  const batch = new HistoryBatch(shower.sample);
  let empty = 0;
  for (let stream = 0; stream < count; stream++) {
    batch.clear();
    shower.grow(batch, stream);
    if (batch.steps.length === 0) empty++;
  }
  return empty;
}

/** Events 0 to `count` of a seed, one after another; each is valid until the next is asked for. */
export function* coherentEvents(some: CoherentSettings, seed: number, count: number): Generator<History> {
  const shower = showerOf(some, seed);
  const batch = new HistoryBatch(shower.sample);
  for (let stream = 0; stream < count; stream++) {
    batch.clear();
    shower.grow(batch, stream);
    yield batch.view(0);
  }
}

import { type History, HistoryBatch, resolveSettings } from '../../engine/index.ts';
import { CoherentShower } from '../../engine/shower/coherent/index.ts';
import type { PlainSettings } from './coherent-plain.ts';

export type CoherentSettings = Partial<PlainSettings>;

/** Events 0 to `count` of a seed, one after another; each is valid until the next is asked for. */
export function* coherentEvents(some: CoherentSettings, seed: number, count: number): Generator<History> {
  const { coherent = true, ...settings } = some;
  const shower = new CoherentShower(resolveSettings({ ...settings, seed }), coherent);
  const batch = new HistoryBatch(shower.sample);
  for (let stream = 0; stream < count; stream++) {
    batch.clear();
    shower.grow(batch, stream);
    yield batch.view(0);
  }
}

import { type History, HistoryBatch } from '../history/index.ts';
import { CoherentShower } from './coherent/index.ts';
import { DipoleShower, type Grower } from './dipole-shower.ts';
import type { GrowSettings } from './settings.ts';

/** A grower for these settings, which `resolveSettings` has completed. */
export function createGrower(settings: GrowSettings): Grower {
  return settings.shower === 'coherent' ? new CoherentShower(settings) : new DipoleShower(settings);
}

/** One event with memory of its own. @param stream see Grower.grow. */
export function growEvent(settings: GrowSettings, stream: number): History {
  const grower = createGrower(settings);
  const batch = new HistoryBatch(grower.sample);
  grower.grow(batch, stream);
  return batch.view(0);
}

import { ElectronPositron, type HardProcess } from '../processes/index.ts';
import { quarkMass } from '../qcd/index.ts';
import type { GrowSettings } from './settings.ts';

/** The hard process that these settings ask for. */
export function makeProcess(settings: GrowSettings): HardProcess {
  const mass = (id: number): number => (settings.masses ? quarkMass(id) : 0);
  const flavours: number[] = [];
  for (let flavour = 1; flavour <= settings.flavours; flavour++) flavours.push(flavour);
  return new ElectronPositron(settings.energy, settings.quark === null ? flavours : [settings.quark], mass);
}

import { ElectronPositron, type HardProcess, ScalarDecay } from '../processes/index.ts';
import {
  type FirstEmissionRatio,
  quarkMass,
  scalarToGluons,
  scalarToQuarks,
  vectorToQuarks,
} from '../qcd/index.ts';
import { type GrowSettings, hardFlavours } from './settings.ts';

/** The hard process that these settings ask for. */
export function makeProcess(settings: GrowSettings): HardProcess {
  const mass = (id: number): number => (settings.masses ? quarkMass(id) : 0);
  const flavours = hardFlavours(settings);
  if (settings.process === 'ee') return new ElectronPositron(settings.energy, flavours, mass);
  return new ScalarDecay(settings.energy, flavours[0], mass(flavours[0]));
}

/** Correction of the first emission, null where the kernels stand. */
export function makeFirstEmission(settings: GrowSettings): FirstEmissionRatio | null {
  if (settings.firstEmission === 'kernel') return null;
  if (settings.process === 'ee') return vectorToQuarks;
  return settings.process === 'scalar-gg' ? scalarToGluons : scalarToQuarks;
}

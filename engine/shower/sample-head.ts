import {
  BOOST_COLUMN,
  ENTRY_COLUMNS,
  type SampleHead,
  STEP_COLUMNS,
  TRIAL_COLUMNS,
} from '../history/index.ts';
import type { HardProcess } from '../processes/index.ts';
import { VERSION } from '../version.ts';
import { describeSettings, type GrowSettings } from './settings.ts';

/** What all events of a sample have in common: scales, conventions, settings, columns. */
export function sampleHead(settings: GrowSettings, process: HardProcess): SampleHead {
  const s = settings.energy * settings.energy;
  const cutoff = settings.cutoff * settings.cutoff;
  const virtuality = settings.order === 'virtuality';
  return {
    seed: settings.seed,
    process: { name: settings.process, incoming: process.incoming },
    beams: process.beams,
    sqrtS: settings.energy,
    // z(1-z) y Q^2 is at most Q^2/4, y Q^2 at most Q^2; below 4 tc no z resolves kT^2 = z(1-z) t >= tc
    hardScale: virtuality ? s : s / 4,
    cutoff,
    tLow: virtuality ? 4 * cutoff : cutoff,
    evolutionVariable: settings.order,
    ordering: 'global',
    meaning: {
      t: virtuality ? 'virtuality^2' : 'kT^2',
      tUnit: 'GeV^2',
      z: 'emitter light-cone',
      kT: 'dipole frame',
      azimuth: 'dipole axis',
      openingAngle: 'daughters after the step',
      angleFrame: 'event',
    },
    shower: describeSettings(settings),
    producer: { name: 'branchlight', version: VERSION },
    columns: {
      entries: ENTRY_COLUMNS.map(({ name }) => name),
      // the probability of a gap takes a quadrature over the kernels, which the sampler does not do
      steps: [
        ...STEP_COLUMNS.map(({ name }) => name).filter((name) => name !== 'noEmission'),
        ...(settings.recoil === 'global' ? [BOOST_COLUMN] : []),
      ],
      trials: settings.trials ? TRIAL_COLUMNS.map(({ name }) => name) : null,
    },
  };
}

import { ENTRY_COLUMNS, type SampleHead, STEP_COLUMNS, TRIAL_COLUMNS } from '../../history/index.ts';
import type { HardProcess } from '../../processes/index.ts';
import { VERSION } from '../../version.ts';
import { describeSettings, type GrowSettings } from '../settings.ts';

/** Columns that one-to-two branchings do not have: nobody recoils, and a trial has not chosen its colour line. */
const ABSENT = new Set(['y', 'recoiler', 'recoilerAfter', 'noEmission']);
const ABSENT_OF_TRIALS = new Set(['partner']);

/**
 * What all events of a sample of one-to-two branchings have in common.
 *
 * `own` stands for: z and azimuth are those of the jet's Sudakov basis (z the light-cone fraction of i with respect to
 * the jet's axis; the azimuth's origin is the dipole shower's rule with the jet's basis vectors, see JetMomenta), kT and
 * openingAngle are generated, before the jets are reconstructed.
 *
 * The incoherent cascade has t = q^2 in the place of t = qt^2.
 */
export function coherentHead(settings: GrowSettings, process: HardProcess): SampleHead {
  const coherent = settings.coherence;
  const cutoff = settings.cutoff * settings.cutoff;
  return {
    seed: settings.seed,
    process: { name: settings.process, incoming: process.incoming },
    beams: process.beams,
    sqrtS: settings.energy,
    hardScale: settings.energy * settings.energy,
    cutoff,
    // z(1-z) qt >= pTmin needs qt >= 4 pTmin; z(1-z) q^2 >= pTmin^2 needs q >= 2 pTmin
    tLow: (coherent ? 16 : 4) * cutoff,
    evolutionVariable: coherent ? 'angle' : 'virtuality',
    ordering: 'line',
    meaning: {
      t: coherent ? 'angle^2' : 'virtuality^2',
      tUnit: 'GeV^2',
      z: 'own',
      kT: 'own',
      azimuth: 'own',
      openingAngle: 'own',
      angleFrame: 'event',
    },
    shower: describeSettings(settings),
    producer: { name: 'branchlight', version: VERSION },
    columns: {
      entries: ENTRY_COLUMNS.map(({ name }) => name),
      steps: STEP_COLUMNS.map(({ name }) => name).filter((name) => !ABSENT.has(name)),
      trials: settings.trials
        ? TRIAL_COLUMNS.map(({ name }) => name).filter((name) => !ABSENT_OF_TRIALS.has(name))
        : null,
    },
  };
}

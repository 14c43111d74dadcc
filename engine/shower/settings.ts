import { ALPHA_S_MZ } from '../constants.ts';
import type { SettingValue } from '../history/index.ts';
import { type CouplingChoice, LandauPoleError, RunningCoupling } from '../qcd/index.ts';

/** Everything that shapes a sample. Energies in GeV. */
export interface GrowSettings {
  readonly process: 'ee';
  /** Centre-of-mass energy [GeV]. */
  readonly energy: number;
  /** Integer, 0 to 2^53 - 1. */
  readonly seed: number;
  readonly shower: 'dipole';
  readonly order: 'kt' | 'virtuality';
  readonly recoil: 'local';
  readonly coupling: CouplingChoice;
  /** alpha_s at the Z mass; unused by a fixed coupling. */
  readonly alphasMz: number;
  readonly cmw: boolean;
  /** Resolution in kT [GeV]. */
  readonly cutoff: number;
  /** Quark flavours that a gluon splits into, and that the hard process may make: 0 to 5. */
  readonly flavours: number;
  /** PDG number of the quark of the hard process, null: the electroweak mix. */
  readonly quark: number | null;
  readonly masses: boolean;
  readonly velocityFactors: 'unit';
  readonly firstEmission: 'kernel';
  /** Whether rejected trials are recorded. */
  readonly trials: boolean;
}

/** The defaults of the command line; they never change. */
export const DEFAULT_SETTINGS: GrowSettings = {
  process: 'ee',
  energy: 91.1876,
  seed: 1,
  shower: 'dipole',
  order: 'kt',
  recoil: 'local',
  coupling: { kind: 'one-loop' },
  alphasMz: ALPHA_S_MZ,
  cmw: false,
  cutoff: 1,
  flavours: 5,
  quark: null,
  masses: false,
  velocityFactors: 'unit',
  firstEmission: 'kernel',
  trials: false,
};

/** A setting that makes no sense, alone or beside the others. */
export class SettingError extends Error {
  readonly code = 'setting';
  constructor(
    /** Command-line name of the setting. */
    readonly option: string,
    readonly found: string,
    readonly expected: string,
  ) {
    super(`--${option} ${found}: expected ${expected}`);
  }
}

function demand(holds: boolean, option: string, found: unknown, expected: string): void {
  if (!holds) throw new SettingError(option, String(found), expected);
}

/**
 * Complete settings from some of them, with the defaults of the command line.
 *
 * @throws SettingError for a value out of range, one that is not there yet, or ones that make no sense together.
 */
export function resolveSettings(some: Partial<GrowSettings> = {}): GrowSettings {
  const all: GrowSettings = { ...DEFAULT_SETTINGS, ...some };
  demand(all.process === 'ee', 'process', all.process, 'ee');
  demand(all.shower === 'dipole', 'shower', all.shower, 'dipole');
  demand(all.order === 'kt' || all.order === 'virtuality', 'order', all.order, 'kt or virtuality');
  demand(all.recoil === 'local', 'recoil', all.recoil, 'local');
  demand(all.masses === false, 'masses', all.masses ? 'on' : all.masses, 'off');
  demand(all.velocityFactors === 'unit', 'velocity-factors', all.velocityFactors, 'unit');
  demand(all.firstEmission === 'kernel', 'first-emission', all.firstEmission, 'kernel');
  demand(all.cmw === false, 'cmw', all.cmw ? 'on' : all.cmw, 'off');
  demand(typeof all.trials === 'boolean', 'trials', all.trials, 'true or false');
  demand(
    Number.isSafeInteger(all.seed) && all.seed >= 0,
    'seed',
    all.seed,
    'an integer from 0 to 9007199254740991',
  );
  demand(
    Number.isFinite(all.energy) && all.energy > 0 && all.energy <= 1e9,
    'energy',
    all.energy,
    'a number of GeV above 0, up to 1e9',
  );
  demand(Number.isFinite(all.cutoff) && all.cutoff > 0, 'cutoff', all.cutoff, 'a number of GeV above 0');
  demand(
    Number.isInteger(all.flavours) && all.flavours >= 0 && all.flavours <= 5,
    'flavours',
    all.flavours,
    'an integer from 0 to 5',
  );
  demand(
    all.quark === null || (Number.isInteger(all.quark) && all.quark >= 1 && all.quark <= 5),
    'quark',
    all.quark,
    'd, u, s, c or b',
  );
  demand(
    all.flavours > 0 || all.quark !== null,
    'flavours',
    all.flavours,
    'at least 1 where --quark leaves the hard process to the electroweak mix',
  );
  demand(
    all.alphasMz > 0 && all.alphasMz < 1,
    'alphas-mz',
    all.alphasMz,
    'a number between 0 and 1 (both excluded)',
  );
  demandCoupling(all);
  demand(
    2 * all.cutoff < all.energy,
    'cutoff',
    all.cutoff,
    `less than half of the energy, ${all.energy / 2} GeV: the largest kT of the first branching`,
  );
  return all;
}

function demandCoupling(all: GrowSettings): void {
  const { coupling } = all;
  if (coupling.kind === 'fixed') {
    const sane = Number.isFinite(coupling.value) && coupling.value > 0 && coupling.value <= 2;
    demand(sane, 'coupling', `fixed:${coupling.value}`, 'a fixed value above 0, up to 2');
    return;
  }
  demand(
    coupling.kind === 'one-loop' || coupling.kind === 'two-loop',
    'coupling',
    (coupling as { kind: unknown }).kind,
    'fixed:VALUE, one-loop or two-loop',
  );
  try {
    makeCoupling(all);
  } catch (error) {
    if (!(error instanceof LandauPoleError)) throw error;
    throw new SettingError(
      'cutoff',
      String(all.cutoff),
      `more than ${error.pole.toPrecision(4)} GeV, the Landau pole of this coupling`,
    );
  }
}

/**
 * The coupling that these settings ask for.
 *
 * @throws LandauPoleError where the cutoff is not above the pole.
 */
export function makeCoupling(settings: GrowSettings): RunningCoupling {
  return new RunningCoupling(settings.coupling, settings.cutoff, {
    reference: settings.alphasMz,
    highest: settings.energy,
  });
}

const QUARK_LETTERS = ['d', 'u', 's', 'c', 'b'] as const;

/** Settings under their command-line names, as a history's head keeps them. Seed and sample size stand elsewhere. */
export function describeSettings(settings: GrowSettings): Record<string, SettingValue> {
  const { coupling } = settings;
  return {
    process: settings.process,
    energy: settings.energy,
    shower: settings.shower,
    order: settings.order,
    recoil: settings.recoil,
    coupling: coupling.kind === 'fixed' ? `fixed:${coupling.value}` : coupling.kind,
    'alphas-mz': settings.alphasMz,
    cmw: settings.cmw ? 'on' : 'off',
    cutoff: settings.cutoff,
    flavours: settings.flavours,
    quark: settings.quark === null ? null : QUARK_LETTERS[settings.quark - 1],
    masses: settings.masses ? 'on' : 'off',
    'velocity-factors': settings.velocityFactors,
    'first-emission': settings.firstEmission,
    trials: settings.trials,
  };
}

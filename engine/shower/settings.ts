import { ALPHA_S_MZ } from '../constants.ts';
import type { SettingValue } from '../history/index.ts';
import {
  type CouplingChoice,
  LandauPoleError,
  quarkMass,
  RunningCoupling,
  type VelocityFactors,
} from '../qcd/index.ts';

/** Everything that shapes a sample. Energies in GeV. */
export interface GrowSettings {
  readonly process: 'ee' | 'scalar-gg' | 'scalar-bb';
  /** Centre-of-mass energy [GeV]. */
  readonly energy: number;
  /** Integer, 0 to 2^53 - 1. */
  readonly seed: number;
  readonly shower: 'dipole' | 'coherent';
  /** Of the coherent shower: false for the incoherent cascade. */
  readonly coherence: boolean;
  /** Of the dipole shower, as recoil and velocityFactors. */
  readonly order: 'kt' | 'virtuality';
  readonly recoil: 'local' | 'global';
  readonly coupling: CouplingChoice;
  /** alpha_s at the Z mass; unused by a fixed coupling. */
  readonly alphasMz: number;
  /** Whether soft-gluon channels use the physical scheme's coupling. */
  readonly cmw: boolean;
  /** Resolution in kT [GeV]. */
  readonly cutoff: number;
  /** Quark flavours that a gluon splits into, and that the hard process may make: 0 to 5. */
  readonly flavours: number;
  /** PDG number of the quark of the hard process, null: the electroweak mix. */
  readonly quark: number | null;
  /** Whether charm and bottom are heavy. */
  readonly masses: boolean;
  /** Before the collinear parts of massive kernels. */
  readonly velocityFactors: VelocityFactors;
  /** Whether the first emission follows the matrix element of the hard process. */
  readonly firstEmission: 'kernel' | 'matched';
  /** Whether rejected trials are recorded. */
  readonly trials: boolean;
}

const QUARK_LETTERS = ['d', 'u', 's', 'c', 'b'] as const;

/** The defaults of the command line; they never change. */
export const DEFAULT_SETTINGS: GrowSettings = {
  process: 'ee',
  energy: 91.1876,
  seed: 1,
  shower: 'dipole',
  coherence: true,
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
  demand(PROCESSES.includes(all.process), 'process', all.process, 'ee, scalar-gg or scalar-bb');
  demand(all.shower === 'dipole' || all.shower === 'coherent', 'shower', all.shower, 'dipole or coherent');
  demand(all.order === 'kt' || all.order === 'virtuality', 'order', all.order, 'kt or virtuality');
  demand(all.recoil === 'local' || all.recoil === 'global', 'recoil', all.recoil, 'local or global');
  demand(
    all.recoil === 'local' || !all.masses,
    'recoil',
    all.recoil,
    'local where masses are on: the global map is massless',
  );
  demand(typeof all.masses === 'boolean', 'masses', all.masses, 'on or off');
  demand(
    all.velocityFactors === 'unit' || all.velocityFactors === 'published',
    'velocity-factors',
    all.velocityFactors,
    'unit or published',
  );
  demand(
    all.firstEmission === 'kernel' || all.firstEmission === 'matched',
    'first-emission',
    all.firstEmission,
    'matched or kernel',
  );
  demand(typeof all.cmw === 'boolean', 'cmw', all.cmw, 'on or off');
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
    all.quark === null || all.process === 'ee',
    'quark',
    all.quark === null ? null : QUARK_LETTERS[all.quark - 1],
    `no quark: ${all.process} makes its own partons`,
  );
  demand(
    all.flavours > 0 || all.quark !== null || all.process !== 'ee',
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
  demandThreshold(all);
  demandMasslessFirstEmission(all);
  demandOfShower(all);
  return all;
}

/** What one of the showers has and the other has not. */
function demandOfShower(all: GrowSettings): void {
  demand(typeof all.coherence === 'boolean', 'coherence', all.coherence, 'on or off');
  if (all.shower === 'dipole') {
    demand(all.coherence, 'coherence', 'off', 'on with --shower dipole: it is of --shower coherent');
    return;
  }
  const ofDipole = (option: string, found: string, usual: string): void =>
    demand(found === usual, option, found, `${usual} with --shower coherent: it is of --shower dipole`);
  ofDipole('order', all.order, DEFAULT_SETTINGS.order);
  ofDipole('recoil', all.recoil, DEFAULT_SETTINGS.recoil);
  ofDipole('velocity-factors', all.velocityFactors, DEFAULT_SETTINGS.velocityFactors);
  demand(
    all.firstEmission === 'kernel',
    'first-emission',
    all.firstEmission,
    'kernel with --shower coherent',
  );
  demand(
    4 * all.cutoff < all.energy,
    'cutoff',
    all.cutoff,
    `less than a quarter of the energy, ${all.energy / 4} GeV: the largest pT of the first branching`,
  );
}

const PROCESSES: readonly string[] = ['ee', 'scalar-gg', 'scalar-bb'];

/** PDG numbers of the partons that the hard process may make. */
export function hardFlavours(settings: GrowSettings): number[] {
  if (settings.process === 'scalar-gg') return [21];
  if (settings.process === 'scalar-bb') return [5];
  if (settings.quark !== null) return [settings.quark];
  const open: number[] = [];
  for (let flavour = 1; flavour <= settings.flavours; flavour++)
    if (!settings.masses || 2 * quarkMass(flavour) < settings.energy) open.push(flavour);
  return open;
}

function demandThreshold(all: GrowSettings): void {
  const least = Math.min(...hardFlavours(all).map((id) => (all.masses ? 2 * quarkMass(id) : 0)));
  demand(
    all.energy > least,
    'energy',
    all.energy,
    `more than ${least} GeV, the threshold of the hard process`,
  );
}

/** The matrix elements are those of massless partons. */
function demandMasslessFirstEmission(all: GrowSettings): void {
  if (all.firstEmission !== 'matched' || !all.masses) return;
  const heavy = hardFlavours(all).some((id) => quarkMass(id) > 0);
  const splitsHeavy = all.process === 'scalar-gg' && all.flavours > 3;
  demand(
    !heavy && !splitsHeavy,
    'first-emission',
    'matched',
    'kernel where a heavy quark may take part in the first emission (--masses on): the matrix element is massless',
  );
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

/** Settings under their command-line names, as a history's head keeps them. Seed and sample size stand elsewhere. */
export function describeSettings(settings: GrowSettings): Record<string, SettingValue> {
  const { coupling } = settings;
  const dipole = settings.shower === 'dipole';
  return {
    process: settings.process,
    energy: settings.energy,
    shower: settings.shower,
    ...(dipole
      ? { order: settings.order, recoil: settings.recoil }
      : { coherence: settings.coherence ? 'on' : 'off' }),
    coupling: coupling.kind === 'fixed' ? `fixed:${coupling.value}` : coupling.kind,
    'alphas-mz': settings.alphasMz,
    cmw: settings.cmw ? 'on' : 'off',
    cutoff: settings.cutoff,
    flavours: settings.flavours,
    quark: settings.quark === null ? null : QUARK_LETTERS[settings.quark - 1],
    masses: settings.masses ? 'on' : 'off',
    ...(dipole ? { 'velocity-factors': settings.velocityFactors } : {}),
    'first-emission': settings.firstEmission,
    trials: settings.trials,
  };
}

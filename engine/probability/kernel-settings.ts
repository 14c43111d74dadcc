import type { SampleHead, SettingValue } from '../history/index.ts';
import {
  type CouplingChoice,
  type FirstEmissionRatio,
  scalarToGluons,
  scalarToQuarks,
  type VelocityFactors,
  vectorToQuarks,
} from '../qcd/index.ts';

/** What fixes the branching rates of a dipole shower. Energies in GeV. */
export interface KernelSettings {
  readonly order: 'kt' | 'virtuality';
  /** Centre-of-mass energy: its square is the largest 2 p.q of a dipole. */
  readonly energy: number;
  /** Resolution in kT. */
  readonly cutoff: number;
  readonly coupling: CouplingChoice;
  readonly alphasMz: number;
  readonly cmw: boolean;
  /** Quark flavours that a gluon splits into, 0 to 5. */
  readonly flavours: number;
  /** Whether charm and bottom are heavy. */
  readonly masses: boolean;
  readonly velocityFactors: VelocityFactors;
  /** Correction of the first gap's rates, null where the kernels stand. */
  readonly firstEmission: FirstEmissionRatio | null;
}

/** A history whose probabilities cannot be computed, and why. */
export interface NotAssessable {
  readonly assessable: false;
  /** What is missing or unknown, as a sentence without a full stop. */
  readonly reason: string;
}

/** Answer of a history whose rates are not known. */
export const notAssessable = (reason: string): NotAssessable => ({ assessable: false, reason });

/** Found where a setting is missing or has a value that no kernel of ours belongs to; caught by readKernelSettings. */
class Unknown extends Error {}

/**
 * The kernels that a head names: every setting that shapes a rate must be recorded, with a value that is known here.
 *
 * @returns what is missing or unknown instead, never a default.
 */
export function readKernelSettings(head: SampleHead): KernelSettings | NotAssessable {
  try {
    const settings = readShower(head.shower);
    demandConsistent(head, settings);
    return settings;
  } catch (error) {
    if (error instanceof Unknown) return notAssessable(error.message);
    throw error;
  }
}

type Shower = SampleHead['shower'];

function readShower(shower: Shower): KernelSettings {
  word(shower, 'shower', ['dipole']);
  // rates know nothing of who recoils; momenta do
  word(shower, 'recoil', ['local', 'global']);
  const energy = positive(shower, 'energy');
  const cutoff = positive(shower, 'cutoff');
  const flavours = recorded(shower, 'flavours');
  if (!(Number.isInteger(flavours) && (flavours as number) >= 0 && (flavours as number) <= 5))
    throw unknown('flavours', flavours, 'an integer from 0 to 5');
  const matched = word(shower, 'first-emission', ['matched', 'kernel']) === 'matched';
  return {
    order: word(shower, 'order', ['kt', 'virtuality']),
    energy,
    cutoff,
    coupling: readCoupling(recorded(shower, 'coupling')),
    alphasMz: positive(shower, 'alphas-mz'),
    cmw: word(shower, 'cmw', ['on', 'off']) === 'on',
    flavours: flavours as number,
    masses: word(shower, 'masses', ['on', 'off']) === 'on',
    velocityFactors: word(shower, 'velocity-factors', ['unit', 'published']),
    firstEmission: matched ? FIRST_EMISSIONS[word(shower, 'process', PROCESSES)] : null,
  };
}

const PROCESSES = ['ee', 'scalar-gg', 'scalar-bb'] as const;
const FIRST_EMISSIONS: Readonly<Record<(typeof PROCESSES)[number], FirstEmissionRatio>> = {
  ee: vectorToQuarks,
  'scalar-gg': scalarToGluons,
  'scalar-bb': scalarToQuarks,
};

function readCoupling(value: SettingValue): CouplingChoice {
  if (value === 'one-loop' || value === 'two-loop') return { kind: value };
  const fixed = typeof value === 'string' && value.startsWith('fixed:') ? Number(value.slice(6)) : NaN;
  if (!(fixed > 0 && fixed < Infinity)) throw unknown('coupling', value, 'fixed:VALUE, one-loop or two-loop');
  return { kind: 'fixed', value: fixed };
}

/** The head's scales and words must be those that the settings mean. */
function demandConsistent(head: SampleHead, settings: KernelSettings): void {
  const { order, energy, cutoff } = settings;
  const kt = order === 'kt';
  demand(head.evolutionVariable === order, `evolution in ${head.evolutionVariable}`, order);
  demand(head.ordering === 'global', `ordering ${head.ordering}`, 'global');
  demand(
    head.meaning.t === (kt ? 'kT^2' : 'virtuality^2'),
    `t meaning ${head.meaning.t}`,
    `that of ${order}`,
  );
  demand(head.meaning.tUnit === 'GeV^2', `t in ${head.meaning.tUnit}`, 'GeV^2');
  const hard = (energy * energy) / (kt ? 4 : 1);
  const low = cutoff * cutoff * (kt ? 1 : 4);
  demand(close(head.hardScale, hard), `the hard scale ${head.hardScale} GeV^2`, `${hard} GeV^2`);
  demand(close(head.tLow, low), `the lowest t ${head.tLow} GeV^2`, `${low} GeV^2`);
}

const close = (a: number, b: number): boolean => Math.abs(a - b) <= 1e-12 * b;

function demand(holds: boolean, found: string, expected: string): void {
  if (!holds) throw new Unknown(`${found}: expected ${expected}, as the recorded settings mean`);
}

function unknown(name: string, found: SettingValue, expected: string): Unknown {
  return new Unknown(`setting ${name} ${found}: expected ${expected}`);
}

function recorded(shower: Shower, name: string): SettingValue {
  const value = shower[name];
  if (value === undefined) throw new Unknown(`setting ${name} is not recorded`);
  return value;
}

function word<W extends string>(shower: Shower, name: string, words: readonly W[]): W {
  const value = recorded(shower, name);
  const known = words.find((w) => w === value);
  if (known === undefined) throw unknown(name, value, words.join(' or '));
  return known;
}

function positive(shower: Shower, name: string): number {
  const value = recorded(shower, name);
  if (!(typeof value === 'number' && value > 0 && value < Infinity))
    throw unknown(name, value, 'a number above 0');
  return value;
}

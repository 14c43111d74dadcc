import { PlainCoherent, type PlainSettings } from './coherent-plain.ts';
import { coherentEvents } from './coherent-sample.ts';
import { measuredSteps, momentaAfter } from './engine-sample.ts';
import { type Estimate, Observables } from './independent/index.ts';

/** One sample mean from both sides. */
export interface CoherentComparison {
  readonly key: string;
  readonly engine: Estimate;
  readonly independent: Estimate;
  /** (engine - independent) in combined standard errors; NaN where fewer than 25 events contribute. */
  readonly pull: number;
}

const FEWEST = 25;

/**
 * Sample means of the engine and of the plain shower, `events` each, key by key. Colour partners are left out.
 *
 * @param fault settings in which the engine is made to differ, to prove that it is noticed.
 */
export function compareCoherent(
  settings: PlainSettings,
  seed: number,
  events: number,
  fault: Partial<PlainSettings> = {},
): CoherentComparison[] {
  const engine = new Observables(settings.energy);
  for (const history of coherentEvents({ ...settings, ...fault }, seed, events)) {
    const steps = measuredSteps(history).map((step) => ({ ...step, partnerAngle: NaN }));
    engine.add(momentaAfter(history, history.steps.length - 1), steps);
  }
  const plain = new Observables(settings.energy);
  const shower = new PlainCoherent(settings, seed);
  for (let n = 0; n < events; n++) {
    const { momenta, steps } = shower.event();
    plain.add(momenta, steps);
  }
  const others = plain.estimates();
  return [...engine.estimates()].map(([key, estimate]) => {
    const independent = others.get(key)!;
    const seen = estimate.mean * estimate.count + independent.mean * independent.count;
    const error = Math.hypot(estimate.error, independent.error);
    const usable = seen >= FEWEST || key === 'oneMinusThrust';
    return {
      key,
      engine: estimate,
      independent,
      pull: usable ? (estimate.mean - independent.mean) / error : NaN,
    };
  });
}

const ONE_LOOP = { coupling: { kind: 'one-loop' } } as const;
const FIXED = { coupling: { kind: 'fixed', value: 0.118 } } as const;
const AT_Z = { process: 'ee', energy: 91.1876, cutoff: 1, flavours: 5, quark: 1, masses: false } as const;
const HEAVY = { ...AT_Z, quark: 5, masses: true } as const;

/** The settings whose means are compared. */
export const COHERENT_SAMPLES: readonly { readonly name: string; readonly settings: PlainSettings }[] = [
  { name: 'one loop', settings: { ...AT_Z, ...ONE_LOOP, coherent: true } },
  { name: 'fixed', settings: { ...AT_Z, ...FIXED, coherent: true } },
  { name: 'massive b, one loop', settings: { ...HEAVY, ...ONE_LOOP, coherent: true } },
  { name: 'massive b, fixed', settings: { ...HEAVY, ...FIXED, coherent: true } },
  { name: '1000 GeV, one loop', settings: { ...AT_Z, ...ONE_LOOP, energy: 1000, coherent: true } },
  { name: '1000 GeV, fixed', settings: { ...AT_Z, ...FIXED, energy: 1000, coherent: true } },
  {
    name: '1000 GeV, massive b, one loop',
    settings: { ...HEAVY, ...ONE_LOOP, energy: 1000, coherent: true },
  },
  { name: '1000 GeV, massive b, fixed', settings: { ...HEAVY, ...FIXED, energy: 1000, coherent: true } },
  {
    name: 'scalar to gluons, masses on',
    settings: {
      ...AT_Z,
      ...ONE_LOOP,
      process: 'scalar-gg',
      energy: 125,
      quark: null,
      masses: true,
      coherent: true,
    },
  },
  {
    name: '30 GeV, heavy mix, two loops',
    settings: {
      ...AT_Z,
      coupling: { kind: 'two-loop' },
      energy: 30,
      quark: null,
      masses: true,
      cutoff: 0.7,
      coherent: true,
    },
  },
  { name: 'incoherent, one loop', settings: { ...AT_Z, ...ONE_LOOP, coherent: false } },
  { name: 'incoherent, fixed, 1000 GeV', settings: { ...AT_Z, ...FIXED, energy: 1000, coherent: false } },
  { name: 'incoherent, massive b, one loop', settings: { ...HEAVY, ...ONE_LOOP, coherent: false } },
  {
    name: 'incoherent, scalar to b bbar, masses on',
    settings: {
      ...AT_Z,
      ...ONE_LOOP,
      process: 'scalar-bb',
      energy: 125,
      quark: null,
      masses: true,
      coherent: false,
    },
  },
];

import { engineEvents, engineSettings, measuredSteps, momentaAfter } from './engine-sample.ts';
import { type Estimate, Observables, PlainShower, type Settings } from './independent/index.ts';

/** One key of `summary` from both sides. */
export interface Comparison {
  readonly key: string;
  readonly engine: Estimate;
  readonly independent: Estimate;
  /** (engine - independent) in combined standard errors; NaN where fewer than 25 events contribute. */
  readonly pull: number;
}

// A rate seen in a handful of events has no usable standard error of its own.
const FEWEST = 25;

function compare(key: string, engine: Estimate, independent: Estimate): Comparison {
  const seen = engine.mean * engine.count + independent.mean * independent.count;
  const error = Math.hypot(engine.error, independent.error);
  const pull = seen < FEWEST && key !== 'oneMinusThrust' ? NaN : (engine.mean - independent.mean) / error;
  return { key, engine, independent, pull };
}

/** Sample means of the engine and of the independent shower, `events` each, key by key. */
export function compareMeans(settings: Settings, seed: number, events: number): Comparison[] {
  const engine = new Observables(settings.energy);
  for (const history of engineEvents(engineSettings(settings, seed), events)) {
    engine.add(momentaAfter(history, history.steps.length - 1), measuredSteps(history));
  }
  const independent = new Observables(settings.energy);
  const shower = new PlainShower(settings, seed);
  for (let n = 0; n < events; n++) {
    const { partons, steps } = shower.event();
    independent.add(
      partons.map((parton) => parton.p),
      steps,
    );
  }
  const other = independent.estimates();
  return [...engine.estimates()].map(([key, estimate]) => compare(key, estimate, other.get(key)!));
}

const AT_Z = { energy: 91.1876, cutoff: 1, flavours: 5, quark: 1 } as const;

/** The settings whose means are compared. */
export const SAMPLES: readonly { readonly name: string; readonly settings: Settings }[] = [
  { name: 'kt, one loop', settings: { ...AT_Z, order: 'kt', coupling: { kind: 'one-loop' } } },
  {
    name: 'virtuality, one loop',
    settings: { ...AT_Z, order: 'virtuality', coupling: { kind: 'one-loop' } },
  },
  { name: 'kt, fixed 0.118', settings: { ...AT_Z, order: 'kt', coupling: { kind: 'fixed', value: 0.118 } } },
  { name: 'kt, two loops', settings: { ...AT_Z, order: 'kt', coupling: { kind: 'two-loop' } } },
  {
    name: 'virtuality, two loops',
    settings: { ...AT_Z, order: 'virtuality', coupling: { kind: 'two-loop' } },
  },
  {
    name: 'kt, one loop, 1000 GeV, electroweak mix',
    settings: { ...AT_Z, energy: 1000, quark: null, order: 'kt', coupling: { kind: 'one-loop' } },
  },
  {
    name: 'kt, one loop, 30 GeV, electroweak mix',
    settings: { ...AT_Z, energy: 30, quark: null, order: 'kt', coupling: { kind: 'one-loop' } },
  },
];

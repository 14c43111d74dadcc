import { engineEvents } from './engine-sample.ts';
import {
  couplingFor,
  type End,
  firstStep,
  halfRapidity,
  quarkKernel,
  rate,
  type Settings,
  uniformPValue,
} from './independent/index.ts';

/** How a sample's first steps compare with quadrature. */
export interface FirstStepVerdict {
  /** (empty events - expected) in binomial standard errors. */
  readonly emptyPull: number;
  /** (first steps at the quark's end - half of them) likewise. */
  readonly endPull: number;
  /** Kolmogorov-Smirnov p-values of t, of z given t, and of the azimuth. */
  readonly time: number;
  readonly fraction: number;
  readonly azimuth: number;
}

/** The dipole end of the hard quark or antiquark under these settings. */
export function hardEnd({ energy, coupling, cutoff, order }: Settings): End {
  const [q2, cut2] = [energy ** 2, cutoff ** 2];
  return { q2, kernel: quarkKernel, coupling: couplingFor(coupling, cut2, q2), order, cut2 };
}

/**
 * Grow `events` with the engine and hold their first steps against quadrature of physics.md section 4.
 *
 * @param fault settings in which the engine is made to differ from what is judged, to prove that it is noticed.
 */
export function judgeFirstStep(
  settings: Settings,
  seed: number,
  events: number,
  fault: Partial<Settings> = {},
): FirstStepVerdict {
  const end = hardEnd(settings);
  const expected = firstStep(end);
  let empty = 0;
  let quarkEnd = 0;
  const times: number[] = [];
  const fractions: number[] = [];
  const azimuths: number[] = [];
  for (const { steps, entries } of engineEvents({ ...settings, ...fault, seed }, events)) {
    if (steps.length === 0) {
      empty++;
      continue;
    }
    const [t, z] = [steps.t[0], steps.z[0]];
    times.push(expected.survival(t));
    azimuths.push(steps.azimuth[0] / (2 * Math.PI));
    if (entries.id[steps.emitter[0]] > 0) quarkEnd++;
    if (times.length % 5 === 0) fractions.push(rate(end, t, -Infinity, halfRapidity(z)) / rate(end, t));
  }
  const p = expected.noBranching;
  const steps = events - empty;
  return {
    emptyPull: (empty - events * p) / Math.sqrt(events * p * (1 - p)),
    endPull: (quarkEnd - steps / 2) / (Math.sqrt(steps) / 2),
    time: uniformPValue(times),
    fraction: uniformPValue(fractions),
    azimuth: uniformPValue(azimuths),
  };
}

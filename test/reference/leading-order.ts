import { engineEvents, momentaAfter } from './engine-sample.ts';
import { hardEnd } from './first-step.ts';
import {
  CF,
  countsPValue,
  durhamTransitions,
  EventMean,
  firstStep,
  integrate,
  type Settings,
  space,
  thrustByPlanes,
} from './independent/index.ts';

// The first emission at small fixed coupling against leading order, references.md section 6, column "kernels" (no
// matrix-element ratio). An event whose first step is at t counts 1/Delta(t0, t): that removes the only effect beyond
// leading order exactly, so that the comparison has statistical errors alone. The cutoff of 0.05 GeV lies below every
// region that is compared; of the means it takes O(kTmin/sqrt(s)) = 5e-4.
const ALPHA = 0.01;
/** alpha_s/2pi of these samples: leading-order coefficients are in its units. */
export const UNIT = ALPHA / (2 * Math.PI);
const ENERGY = 91.1876;

/** tau, coefficient of the fraction with 1-T > tau. */
export const ABOVE_TAU = [
  [0.2, 1.1291525525],
  [0.1, 5.24333957425],
  [0.05, 12.0119108075],
  [0.02, 25.0075418511],
  [0.01, 37.8814491796],
];
/** y_cut, coefficient of the Durham three-jet rate over CF. */
export const THREE_JETS = [
  [0.1, 1.7326054472],
  [0.03, 6.0407955585],
  [0.01, 12.167227023],
  [0.003, 21.42087957],
  [0.001, 32.267363889],
  [1e-4, 62.63621965],
];

/** (1/sigma) dsigma/dT of the kernels per alpha_s/2pi: de Rujula et al., Nucl. Phys. B138 (1978) 387, plus CF 3(3T-2). */
export function thrustDensity(t: number): number {
  const log = Math.log((2 * t - 1) / (1 - t));
  const exact = ((2 * (3 * t * t - 3 * t + 2)) / (t * (1 - t))) * log - (3 * (3 * t - 2) * (2 - t)) / (1 - t);
  return CF * (exact + 3 * (3 * t - 2));
}

/** First emission of one event that had one. */
export interface FirstEmission {
  /** 1-T of the three partons. */
  readonly tau: number;
  /** Durham y23 of the three partons. */
  readonly y23: number;
  readonly weight: number;
}

/** First emissions of `events` events. */
export function firstEmissions(order: 'kt' | 'virtuality', seed: number, events: number): FirstEmission[] {
  const settings: Settings = {
    energy: ENERGY,
    order,
    coupling: { kind: 'fixed', value: ALPHA },
    cutoff: 0.05,
    flavours: 5,
    quark: 1,
  };
  const expected = firstStep(hardEnd(settings));
  const out: FirstEmission[] = [];
  for (const history of engineEvents({ ...settings, seed }, events, 1)) {
    const momenta = momentaAfter(history, 0);
    out.push({
      tau: 1 - thrustByPlanes(momenta.map(space)),
      y23: durhamTransitions(momenta, ENERGY)[1],
      weight: 1 / expected.gap(history.steps.t[0]),
    });
  }
  return out;
}

/** (sample mean of the weighted value - wanted) in standard errors; events without an emission count zero. */
export function leadingOrderPull(
  emissions: readonly FirstEmission[],
  events: number,
  value: (emission: FirstEmission) => number,
  wanted: number,
): number {
  const mean = new EventMean();
  for (const e of emissions) mean.add(e.weight * value(e));
  for (let n = emissions.length; n < events; n++) mean.add(0);
  const estimate = mean.estimate();
  return (estimate.mean - wanted) / estimate.error;
}

/** Chi-square p-value of the thrust distribution above 1-T = 0.01 in twelve bins. */
export function thrustPValue(emissions: readonly FirstEmission[], events: number): number {
  const edges = [0.01, 0.013, 0.017, 0.022, 0.03, 0.04, 0.055, 0.075, 0.1, 0.14, 0.19, 0.25, 1 / 3];
  const sums = new Array<number>(edges.length - 1).fill(0);
  const squares = [...sums];
  for (const e of emissions) {
    const bin = edges.findIndex((edge) => edge > e.tau) - 1;
    if (bin < 0) continue;
    sums[bin] += e.weight;
    squares[bin] += e.weight ** 2;
  }
  // In units of one mean weight, weighted counts fluctuate like counts.
  const unit = sums.map((sum, n) => squares[n] / sum);
  const wanted = sums.map(
    (_, n) => events * UNIT * integrate(thrustDensity, 1 - edges[n + 1], 1 - edges[n], 0.01),
  );
  return countsPValue(
    sums.map((sum, n) => sum / unit[n]),
    wanted.map((w, n) => w / unit[n]),
    0,
  );
}

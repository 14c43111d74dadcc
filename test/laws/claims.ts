import { type History, measureSteps } from '../../engine/index.ts';

/** The largest differences between what was claimed and what the rows show. */
export interface WorstClaims {
  y: number;
  z: number;
  azimuth: number;
  kT: number;
  openingAngle: number;
  t: number;
  /** The smallest y that was among them. */
  smallestY: number;
  steps: number;
}

export const noClaims = (): WorstClaims => ({
  y: 0,
  z: 0,
  azimuth: 0,
  kT: 0,
  openingAngle: 0,
  t: 0,
  smallestY: 1,
  steps: 0,
});

const worse = (a: number, b: number): number => (Number.isNaN(a) || b <= a ? a : b);

/** Hold an event's claims against its rows: relative differences (z: absolute; azimuth: on the circle), NaN is kept. */
export function compareClaims(worst: WorstClaims, history: History): void {
  const { steps } = history;
  const measured = measureSteps(history);
  for (let step = 0; step < steps.length; step++) {
    for (const name of ['y', 'kT', 'openingAngle', 't'] as const)
      worst[name] = worse(worst[name], Math.abs(measured[name][step] / steps[name][step] - 1));
    worst.z = worse(worst.z, Math.abs(measured.zLightCone[step] - steps.z[step]));
    const apart = Math.abs(measured.azimuth[step] - steps.azimuth[step]);
    worst.azimuth = worse(worst.azimuth, Math.min(apart, 2 * Math.PI - apart));
    worst.smallestY = Math.min(worst.smallestY, steps.y[step]);
    worst.steps++;
  }
}

/** Claims that differ from the rows by more than `allowed`. */
export function falseClaims(history: History, allowed: number): string[] {
  const worst = noClaims();
  compareClaims(worst, history);
  return (['y', 'z', 'azimuth', 'kT', 'openingAngle', 't'] as const)
    .filter((name) => !(worst[name] <= allowed))
    .map((name) => `${name} differs by ${worst[name]}`);
}

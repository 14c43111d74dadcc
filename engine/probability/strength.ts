import { BOTTOM_MASS, CHARM_MASS, PI } from '../constants.ts';
import { RunningCoupling, softGluonK } from '../qcd/index.ts';
import type { KernelSettings } from './kernel-settings.ts';

/** alpha_s/2pi as the kernels use it, with and without the rescaling of channels that have a soft gluon. */
export class Strength {
  /** kT^2 [GeV^2] at which it bends or jumps, ascending, the first being the cutoff. */
  readonly bends: readonly number[];
  /** kT^2 [GeV^2] of its pole, 0 where there is none. */
  readonly pole2: number;
  private readonly coupling: RunningCoupling;
  /** K of the physical scheme by number of flavours minus three, null where it is off. */
  private readonly rescaling: readonly number[] | null;

  /** @throws LandauPoleError where the cutoff is not above the pole of the coupling. */
  constructor({ coupling, cutoff, alphasMz, energy, cmw }: KernelSettings) {
    this.coupling = new RunningCoupling(coupling, cutoff, { reference: alphasMz, highest: energy });
    this.rescaling = cmw ? [3, 4, 5].map(softGluonK) : null;
    this.pole2 = this.coupling.pole * this.coupling.pole;
    const steady = coupling.kind === 'fixed' && !cmw;
    const thresholds = steady ? [] : [CHARM_MASS * CHARM_MASS, BOTTOM_MASS * BOTTOM_MASS];
    const cutoff2 = cutoff * cutoff;
    this.bends = [cutoff2, ...thresholds.filter((kT2) => kT2 > cutoff2)];
  }

  /** For g -> q qbar, at ln kT^2. */
  plain(lnKT2: number): number {
    return this.coupling.atLog(lnKT2) / (2 * PI);
  }

  /** For channels with a soft gluon, from the plain one at the same ln kT^2. */
  soft(lnKT2: number, plain: number): number {
    const { rescaling } = this;
    // alpha (1 + K alpha/2pi)
    return rescaling === null ? plain : plain * (1 + rescaling[this.coupling.flavoursAt(lnKT2) - 3] * plain);
  }
}

import { PI } from '../constants.ts';
import type { Beam } from '../history/index.ts';
import { type Philox, uniform } from '../random/index.ts';
import { placeBackToBack } from './back-to-back.ts';
import type { HardProcess } from './hard-process.ts';

/** Decay at rest of a colour-singlet scalar into two gluons or into b bbar, uniform over the sphere. */
export class ScalarDecay implements HardProcess {
  readonly incoming = [25];
  readonly beams: readonly Beam[];
  readonly resonance = 25;
  readonly ring: boolean;
  readonly sqrtS: number;
  readonly outgoing: Int32Array;
  readonly momenta = new Float64Array(8);
  readonly masses: Float64Array;
  weight = 1;
  maximum = 1;
  throws = 1;

  /** @param sqrtS mass of the scalar [GeV]. @param product PDG number: 21 or a quark. @param mass of a product [GeV]. */
  constructor(sqrtS: number, product: number, mass: number) {
    this.sqrtS = sqrtS;
    this.beams = [{ id: 25, px: 0, py: 0, pz: 0, e: sqrtS }];
    this.ring = product === 21;
    this.outgoing = Int32Array.of(product, this.ring ? product : -product);
    this.masses = Float64Array.of(mass, mass);
  }

  generate(random: Philox): void {
    random.block();
    const cosine = 2 * uniform(random.x0) - 1;
    placeBackToBack(this.momenta, this.sqrtS, this.masses[0], cosine, 2 * PI * uniform(random.x1));
  }
}

import { PI } from '../constants.ts';
import type { Beam } from '../history/index.ts';
import { type Philox, uniform } from '../random/index.ts';
import { placeBackToBack } from './back-to-back.ts';
import { type AngularCoefficients, angularCoefficients } from './electroweak.ts';
import type { HardProcess } from './hard-process.ts';

/**
 * The hard process e+e- -> Z/gamma* -> q qbar: flavour by the electroweak mix, unweighted polar angle.
 *
 * Flavour and angle follow the massless couplings; a mass enters the momenta and the threshold alone.
 */
export class ElectronPositron implements HardProcess {
  readonly incoming = [11, -11];
  readonly beams: readonly Beam[];
  readonly resonance = 23;
  readonly ring = false;
  readonly sqrtS: number;
  readonly outgoing = new Int32Array(2);
  readonly momenta = new Float64Array(8);
  readonly masses = new Float64Array(2);
  weight = 0;
  maximum = 0;
  throws = 0;
  private readonly flavours: readonly number[];
  private readonly flavourMasses: readonly number[];
  private readonly coefficients: readonly AngularCoefficients[];
  private readonly cumulative: readonly number[];

  /** @param flavours PDG numbers of the quarks to choose from, at least one. @param mass of each [GeV]. */
  constructor(sqrtS: number, flavours: readonly number[], mass: (flavour: number) => number) {
    const half = sqrtS / 2;
    this.sqrtS = sqrtS;
    this.beams = [
      { id: 11, px: 0, py: 0, pz: half, e: half },
      { id: -11, px: 0, py: 0, pz: -half, e: half },
    ];
    this.flavours = flavours;
    this.flavourMasses = flavours.map(mass);
    this.coefficients = flavours.map((flavour) => angularCoefficients(flavour, sqrtS));
    let sum = 0;
    this.cumulative = this.coefficients.map(({ even }) => {
      sum += even;
      return sum;
    });
  }

  generate(random: Philox): void {
    random.block();
    const total = this.cumulative[this.cumulative.length - 1];
    const share = uniform(random.x0) * total;
    let choice = 0;
    while (choice < this.flavours.length - 1 && share > this.cumulative[choice]) choice++;
    const azimuth = 2 * PI * uniform(random.x1);

    // acceptance-rejection on even (1 + cos^2) + odd cos, whose maximum is at an end
    const { even, odd } = this.coefficients[choice];
    const most = 2 * even + Math.abs(odd);
    let cosine: number;
    let weight: number;
    let throws = 0;
    do {
      random.block();
      throws++;
      cosine = 2 * uniform(random.x0) - 1;
      weight = even * (1 + cosine * cosine) + odd * cosine;
    } while (uniform(random.x1) * most > weight);
    this.weight = weight;
    this.maximum = most;
    this.throws = throws;

    const quark = this.flavours[choice];
    const mass = this.flavourMasses[choice];
    this.outgoing[0] = quark;
    this.outgoing[1] = -quark;
    this.masses[0] = mass;
    this.masses[1] = mass;
    placeBackToBack(this.momenta, this.sqrtS, mass, cosine, azimuth);
  }
}

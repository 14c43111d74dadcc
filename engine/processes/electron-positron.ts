import { PI } from '../constants.ts';
import { sinCos } from '../math/index.ts';
import { type Philox, uniform } from '../random/index.ts';
import { type AngularCoefficients, angularCoefficients } from './electroweak.ts';

const turn = new Float64Array(2);

/** The hard process e+e- -> Z/gamma* -> q qbar: flavour by the electroweak mix, unweighted polar angle. */
export class ElectronPositron {
  /** [GeV] */
  readonly sqrtS: number;
  /** Chosen by the last `generate`: PDG number of the quark. */
  quark = 0;
  /** Chosen by the last `generate`: three-momentum of the quark [GeV]; the antiquark's is its opposite. */
  readonly momentum = new Float64Array(3);
  private readonly flavours: readonly number[];
  private readonly coefficients: readonly AngularCoefficients[];
  private readonly cumulative: readonly number[];

  /** @param flavours PDG numbers of the quarks to choose from, at least one. */
  constructor(sqrtS: number, flavours: readonly number[]) {
    this.sqrtS = sqrtS;
    this.flavours = flavours;
    this.coefficients = flavours.map((flavour) => angularCoefficients(flavour, sqrtS));
    let sum = 0;
    this.cumulative = this.coefficients.map(({ even }) => {
      sum += even;
      return sum;
    });
  }

  /** Throw flavour and direction. */
  generate(random: Philox): void {
    random.block();
    const total = this.cumulative[this.cumulative.length - 1];
    const share = uniform(random.x0) * total;
    let choice = 0;
    while (choice < this.flavours.length - 1 && share > this.cumulative[choice]) choice++;
    this.quark = this.flavours[choice];
    const azimuth = 2 * PI * uniform(random.x1);

    // acceptance-rejection on even (1 + cos^2) + odd cos, whose maximum is at an end
    const { even, odd } = this.coefficients[choice];
    const most = 2 * even + Math.abs(odd);
    let cosine: number;
    do {
      random.block();
      cosine = 2 * uniform(random.x0) - 1;
    } while (uniform(random.x1) * most > even * (1 + cosine * cosine) + odd * cosine);

    const half = this.sqrtS / 2;
    const sine = Math.sqrt((1 - cosine) * (1 + cosine));
    sinCos(turn, azimuth);
    this.momentum[0] = half * sine * turn[1];
    this.momentum[1] = half * sine * turn[0];
    this.momentum[2] = half * cosine;
  }
}

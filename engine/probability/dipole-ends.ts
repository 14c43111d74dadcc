import { CHANNELS, type SampleHead } from '../history/index.ts';
import { exp, log } from '../math/index.ts';
import { LandauPoleError } from '../qcd/index.ts';
import { type DipoleEnd, DipoleKernels } from './dipole-kernels.ts';
import { type NotAssessable, notAssessable, readKernelSettings } from './kernel-settings.ts';

// scratch, not reentrant
const numbers = new Float64Array(CHANNELS.length);
const place = new Float64Array(1);
const rest = new Float64Array(1);

/** The kernels that a head names, ready to be integrated, or why there are none. */
export function openKernels(head: SampleHead): DipoleKernels | NotAssessable {
  const settings = readKernelSettings(head);
  if ('assessable' in settings) return settings;
  try {
    return new DipoleKernels(settings);
  } catch (error) {
    if (error instanceof LandauPoleError) return notAssessable(error.message);
    throw error;
  }
}

/** Rates of single dipole ends by the kernels of one set of settings, azimuth integrated over. t and Q^2 in GeV^2. */
export class DipoleEnds {
  readonly assessable = true;
  private readonly kernels: DipoleKernels;

  /** @param kernels GapJudge.endsOf has them. */
  constructor(kernels: DipoleKernels) {
    this.kernels = kernels;
  }

  /**
   * Expected number of branchings between two t, of g -> q qbar those of one flavour.
   *
   * Accuracy: 1e-7 absolute, from tables.
   * @throws RangeError where Q^2 is above the square of the event's energy.
   */
  exponent(end: DipoleEnd, tLow: number, tHigh: number): number {
    const { table } = this.kernels.familyOf(end);
    const channel = placeOf(table.channels, end);
    if (!table.enter(end.q2)) return 0;
    table.upTo(numbers, log(tHigh));
    const high = numbers[channel];
    table.upTo(numbers, log(tLow));
    return high - numbers[channel];
  }

  /** Rate per unit of ln t. Accuracy: 1e-8, by quadrature. */
  rate(end: DipoleEnd, t: number): number {
    const { rates } = this.kernels.familyOf(end);
    rates.rates(numbers, t, end.q2);
    return numbers[placeOf(rates.channels, end)];
  }

  /** The part of `rate` at light-cone fractions below z of i. */
  rateBelow(end: DipoleEnd, t: number, z: number): number {
    const { rates } = this.kernels.familyOf(end);
    rates.ratesBelow(numbers, t, end.q2, z, 1 - z);
    return numbers[placeOf(rates.channels, end)];
  }

  /** Rate per unit of ln t and of z; zero outside phase space. */
  density(end: DipoleEnd, t: number, z: number): number {
    const { density } = this.kernels.familyOf(end);
    const range = this.range(end, t);
    if (range === null || !(z > range[0] && z < range[1])) return 0;
    density.begin(t, end.q2);
    place[0] = z;
    rest[0] = 1 - z;
    density.fill(numbers, place, rest, 1);
    // a negative kernel is no rate
    return Math.max(0, numbers[placeOf(density.channels, end)]);
  }

  /** Least and largest z of phase space above the cutoff, null where there is none. */
  range(end: DipoleEnd, t: number): [number, number] | null {
    const { space } = this.kernels.familyOf(end);
    if (!space.open(t, end.q2, this.kernels.settings.cutoff * this.kernels.settings.cutoff)) return null;
    return [1 / (1 + exp(-2 * space.low)), 1 / (1 + exp(-2 * space.high))];
  }
}

function placeOf(channels: readonly number[], { channel }: DipoleEnd): number {
  return channels.indexOf(CHANNELS.indexOf(channel));
}

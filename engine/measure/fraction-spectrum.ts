import { log } from '../math/index.ts';
import { peakOfHump } from './hump.ts';

/** Histogram of ln(1/x) of the final partons, x = 2E/sqrt(s). */
export interface FractionSpectrum {
  /** Bin edges, one more than counts. */
  readonly edges: number[];
  /** Partons per bin, each with the weight of its event. */
  readonly counts: number[];
  readonly peak: { readonly mean: number; readonly error: number };
}

const BINS_PER_UNIT = 10;
/** x down to 1e-13. */
const LARGEST = 30;
const BINS = LARGEST * BINS_PER_UNIT;
const GROUPS = 40;
/** A parton with all of the beam's energy may lie above it by rounding. */
const ROUNDING = 1e-9;

/**
 * Collects the spectrum of ln(1/x), x = 2E/sqrt(s), and estimates the position of its hump.
 *
 * Bins are 0.1 wide from 0 to 30 whatever the data; a parton outside of them (x > 1, or x < 1e-13) is in none.
 */
export class FractionSpectrumCollector {
  private readonly groups = Array.from({ length: GROUPS }, () => new Float64Array(BINS));
  private events = 0;

  /** The partons of one event. @param momenta px, py, pz, E [GeV], four to a parton. @param sqrtS [GeV]. */
  add(momenta: Float64Array, sqrtS: number, weight: number): void {
    const bins = this.groups[this.events++ % GROUPS];
    for (let at = 3; at < momenta.length; at += 4) {
      const value = log(sqrtS / (2 * momenta[at]));
      if (value >= 0 && value < LARGEST) bins[Math.floor(BINS_PER_UNIT * value)] += weight;
      else if (value < 0 && value > -ROUNDING) bins[0] += weight;
    }
  }

  /**
   * Histogram and peak so far.
   *
   * The error of the peak is the jackknife's over 40 groups of events (event n in group n mod 40), so that partons of
   * one event may be correlated; it is itself uncertain by about 11 percent. NaN where there are fewer events than
   * groups, or where the hump of some group's complement cannot be found.
   */
  spectrum(): FractionSpectrum {
    const counts = new Float64Array(BINS);
    for (const group of this.groups) for (let bin = 0; bin < BINS; bin++) counts[bin] += group[bin];
    const position = (bins: Float64Array) => peakOfHump(bins, BINS_PER_UNIT);
    let scatter = NaN;
    if (this.events >= GROUPS) {
      const without = this.groups.map((group) => position(counts.map((count, bin) => count - group[bin])));
      const mean = without.reduce((sum, value) => sum + value, 0) / GROUPS;
      scatter = without.reduce((sum, value) => sum + (value - mean) * (value - mean), 0);
    }
    return {
      edges: Array.from({ length: BINS + 1 }, (_, edge) => edge / BINS_PER_UNIT),
      counts: Array.from(counts),
      peak: { mean: position(counts), error: Math.sqrt((scatter * (GROUPS - 1)) / GROUPS) },
    };
  }
}

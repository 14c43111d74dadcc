import { log } from '../math/index.ts';
import { findHump, peakInWindow } from './hump.ts';

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
   * Histogram and peak so far; the peak is NaN where there is no hump.
   *
   * The error of the peak is the jackknife's over 40 groups of events (event n in group n mod 40), so that partons of
   * one event may be correlated; the window of the fit is that of the whole sample. The error is itself uncertain by
   * about 11 percent. NaN below 40 events.
   */
  spectrum(): FractionSpectrum {
    const counts = new Float64Array(BINS);
    for (const group of this.groups) for (let bin = 0; bin < BINS; bin++) counts[bin] += group[bin];
    return {
      edges: Array.from({ length: BINS + 1 }, (_, edge) => edge / BINS_PER_UNIT),
      counts: Array.from(counts),
      peak: this.peak(counts),
    };
  }

  private peak(counts: Float64Array): FractionSpectrum['peak'] {
    const hump = findHump(counts, BINS_PER_UNIT);
    if (hump === null) return { mean: NaN, error: NaN };
    const mean = peakInWindow(counts, BINS_PER_UNIT, hump);
    if (this.events < GROUPS) return { mean, error: NaN };
    const without = this.groups.map((group) => {
      const rest = counts.map((count, bin) => count - group[bin]);
      return peakInWindow(rest, BINS_PER_UNIT, hump);
    });
    const centre = without.reduce((sum, value) => sum + value, 0) / GROUPS;
    const scatter = without.reduce((sum, value) => sum + (value - centre) * (value - centre), 0);
    return { mean, error: Math.sqrt((scatter * (GROUPS - 1)) / GROUPS) };
  }
}

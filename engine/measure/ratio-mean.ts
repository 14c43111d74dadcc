/** A mean with the statistical error of the mean, and what it was counted over. */
export interface Estimate {
  readonly mean: number;
  /** Standard error of the mean. NaN for fewer than two events. */
  readonly error: number;
  readonly count: number;
}

/**
 * Ratio of two sums over independent events, with its standard error.
 *
 * A weighted mean over events is Sum w x / Sum w; a mean over steps is Sum (of x over the steps) / Sum (steps), the
 * events being the independent units, since the steps of one event are not. The error is the usual one of a ratio,
 * err^2 = n/(n-1) Sum (a - R b)^2 / (Sum b)^2, which for b = 1 is the textbook error of a mean.
 * Sums are kept as means and centred products (Welford, Technometrics 4 (1962) 419), so that long samples lose no digits.
 */
export class RatioMean {
  private events = 0;
  private meanA = 0;
  private meanB = 0;
  private aa = 0;
  private ab = 0;
  private bb = 0;
  private units = 0;

  /** One event. @param a its part of the numerator. @param b of the denominator. @param units to be added to `count`. */
  add(a: number, b: number, units: number): void {
    const n = ++this.events;
    const da = a - this.meanA;
    const db = b - this.meanB;
    this.meanA += da / n;
    this.meanB += db / n;
    this.aa += da * (a - this.meanA);
    this.ab += da * (b - this.meanB);
    this.bb += db * (b - this.meanB);
    this.units += units;
  }

  /** The ratio so far; mean and error NaN where the denominator is zero. */
  estimate(): Estimate {
    const { events: n, meanA, meanB, aa, ab, bb } = this;
    if (meanB === 0) return { mean: NaN, error: NaN, count: this.units };
    const mean = meanA / meanB;
    const scatter = Math.max(0, aa - 2 * mean * ab + mean * mean * bb);
    const error = n > 1 ? Math.sqrt(scatter / (n * (n - 1))) / Math.abs(meanB) : NaN;
    return { mean, error, count: this.units };
  }
}

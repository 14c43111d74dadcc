import { log } from '../math/index.ts';

/** Half width over which bins are averaged to find the hump, and half width in which it must be the highest. */
const SMOOTHING = 0.2;
const NEIGHBOURHOOD = 0.5;
/** The fit takes the bins around the hump that hold more than this share of its height. */
const SHARE = 0.7;
const TERMS = 4;

/** The bins around the hump of a histogram that a fit takes: low to high, both included, and the highest. */
export interface HumpWindow {
  readonly low: number;
  readonly top: number;
  readonly high: number;
}

/**
 * Find the hump of a histogram.
 *
 * @param counts bins of equal width from 0 on.
 * @returns null where there is no hump: no place that is higher than all within half a unit on both sides, once averaged
 * over five bins of 0.1.
 *
 * The highest such place is taken, which leaves out the edge at 0 where the leading partons pile up. The window covers
 * the bins around it with more than 0.7 of its averaged height, on the side of 0 no further than the dip before it.
 */
export function findHump(counts: Float64Array, binsPerUnit: number): HumpWindow | null {
  const smooth = smoothed(counts, Math.round(SMOOTHING * binsPerUnit));
  const top = highestMaximum(smooth, Math.round(NEIGHBOURHOOD * binsPerUnit));
  if (top < 0) return null;
  let low = top;
  let dip = top;
  while (low > 0 && smooth[low - 1] >= SHARE * smooth[top]) {
    low--;
    if (smooth[low] < smooth[dip]) dip = low;
  }
  // what lies beyond the lowest bin on the way belongs to the leading partons
  if (smooth[low] > smooth[dip]) low = dip;
  let high = top;
  while (high + 1 < counts.length && smooth[high + 1] >= SHARE * smooth[top]) high++;
  return { low, top, high };
}

/**
 * Position of the hump in a window: the maximum of a cubic fitted to the logarithm of the counts, weighted by them.
 *
 * @returns in units of the axis, NaN where the fit has no maximum in the window.
 *
 * A cubic because the spectrum is skewed: a parabola misses the maximum by up to 0.2 at 91 GeV, the cubic by less
 * than 0.02.
 */
export function peakInWindow(
  counts: Float64Array,
  binsPerUnit: number,
  { low, top, high }: HumpWindow,
): number {
  const half = Math.max(top - low, high - top);
  const fit = fitLogCubic(counts, low, high, top, half);
  const at = fit ? maximumOfCubic(fit) : NaN;
  return Math.abs(at) <= 1 ? (top + 0.5 + at * half) / binsPerUnit : NaN;
}

/** The highest bin that is a maximum of its neighbourhood, -1 for none. */
function highestMaximum(smooth: Float64Array, reach: number): number {
  let top = -1;
  for (let bin = reach; bin + reach < smooth.length; bin++) {
    if (top >= 0 && smooth[bin] <= smooth[top]) continue;
    let highest = smooth[bin] > smooth[bin - reach] && smooth[bin] > smooth[bin + reach];
    for (let other = bin - reach; highest && other <= bin + reach; other++)
      highest = smooth[other] <= smooth[bin];
    if (highest) top = bin;
  }
  return top;
}

/** Averages over `reach` bins to either side; bins beyond the ends count as empty. */
function smoothed(counts: Float64Array, reach: number): Float64Array {
  return counts.map((_, bin) => {
    let sum = 0;
    for (let other = Math.max(0, bin - reach); other <= Math.min(counts.length - 1, bin + reach); other++)
      sum += counts[other];
    return sum / (2 * reach + 1);
  });
}

/**
 * Coefficients c0..c3 of ln(counts) = c0 + c1 u + c2 u^2 + c3 u^3, u = (bin - centre)/half, by weighted least squares.
 *
 * @returns null where fewer than six bins are filled.
 */
function fitLogCubic(
  counts: Float64Array,
  low: number,
  high: number,
  centre: number,
  half: number,
): Float64Array | null {
  const rows = Array.from({ length: TERMS }, () => new Float64Array(TERMS + 1));
  let filled = 0;
  for (let bin = low; bin <= high; bin++) {
    const weight = counts[bin];
    if (!(weight > 0)) continue;
    filled++;
    const u = (bin - centre) / half;
    const powers = [1, u, u * u, u * u * u];
    for (let r = 0; r < TERMS; r++) {
      for (let c = 0; c < TERMS; c++) rows[r][c] += weight * powers[r] * powers[c];
      rows[r][TERMS] += weight * powers[r] * log(weight);
    }
  }
  return filled > TERMS + 1 ? solve(rows) : null;
}

/** Solve the symmetric positive equations whose right side is the last column, by elimination. */
function solve(rows: Float64Array[]): Float64Array {
  for (let r = 0; r < TERMS; r++)
    for (let below = r + 1; below < TERMS; below++) {
      const factor = rows[below][r] / rows[r][r];
      for (let c = r; c <= TERMS; c++) rows[below][c] -= factor * rows[r][c];
    }
  const solution = new Float64Array(TERMS);
  for (let r = TERMS - 1; r >= 0; r--) {
    let sum = rows[r][TERMS];
    for (let c = r + 1; c < TERMS; c++) sum -= rows[r][c] * solution[c];
    solution[r] = sum / rows[r][r];
  }
  return solution;
}

/** Where a cubic has its maximum, NaN where it has none. */
function maximumOfCubic([, b, c, d]: Float64Array): number {
  // b + 2 c u + 3 d u^2 = 0 with falling slope, written so that d may vanish
  const root = c * c - 3 * b * d;
  return root > 0 && c < Math.sqrt(root) ? b / (Math.sqrt(root) - c) : NaN;
}

import { finalMomenta } from '../../engine/index.ts';
import { type CoherentSettings, coherentEvents } from './coherent-sample.ts';

const WIDTH = 0.1;
const BINS = 200;
const GROUPS = 20;

/** Solve a small linear system by elimination with pivots. */
function solve(rows: number[][]): number[] {
  const n = rows.length;
  for (let c = 0; c < n; c++) {
    const pivot = rows
      .slice(c)
      .reduce((best, row, k) => (Math.abs(row[c]) > Math.abs(rows[best][c]) ? k + c : best), c);
    [rows[c], rows[pivot]] = [rows[pivot], rows[c]];
    for (let r = 0; r < n; r++) {
      if (r === c) continue;
      const f = rows[r][c] / rows[c][c];
      rows[r] = rows[r].map((x, k) => x - f * rows[c][k]);
    }
  }
  return rows.map((row, c) => row[n] / row[c]);
}

/** Maximum of a cubic fitted to the logarithm of the counts between two bins, each bin with the weight of its count. */
function maximum(counts: readonly number[], low: number, high: number): number {
  const [middle, half] = [(low + high) / 2, (high - low) / 2];
  const sums = Array.from({ length: 4 }, () => new Array<number>(5).fill(0));
  for (let bin = low; bin <= high; bin++) {
    if (counts[bin] === 0) continue;
    const x = (bin - middle) / half;
    for (let a = 0; a < 4; a++) {
      for (let b = 0; b < 4; b++) sums[a][b] += counts[bin] * x ** (a + b);
      sums[a][4] += counts[bin] * Math.log(counts[bin]) * x ** a;
    }
  }
  const [, b, c, d] = solve(sums);
  // b + 2 c x + 3 d x^2 = 0, the root that stays when d is small
  const x = -b / (c - Math.sqrt(c * c - 3 * b * d));
  return WIDTH * (middle + 0.5 + half * x);
}

/**
 * Peak of the spectrum of xi = ln(1/x), x = 2E/sqrt(s), of all final partons.
 *
 * @returns position and jackknife error over groups of events.
 */
export function spectrumPeak(
  settings: CoherentSettings,
  seed: number,
  events: number,
): { mean: number; error: number } {
  const groups = Array.from({ length: GROUPS }, () => new Array<number>(BINS).fill(0));
  let event = 0;
  for (const history of coherentEvents(settings, seed, events)) {
    const momenta = finalMomenta(history);
    const bins = groups[event++ % GROUPS];
    for (let at = 3; at < momenta.length; at += 4) {
      const xi = Math.log(history.head.sqrtS / (2 * momenta[at]));
      bins[Math.min(BINS - 1, Math.max(0, Math.floor(xi / WIDTH)))]++;
    }
  }
  const all = groups[0].map((_, bin) => groups.reduce((sum, group) => sum + group[bin], 0));
  // the highest of bins averaged over five, away from the leading partons at 0; then down to 0.7 on either side
  const smooth = all.map((_, bin) => all.slice(Math.max(0, bin - 2), bin + 3).reduce((a, b) => a + b, 0));
  let top = 20;
  for (let bin = 20; bin < BINS; bin++) if (smooth[bin] > smooth[top]) top = bin;
  let [low, high] = [top, top];
  while (low > 10 && smooth[low - 1] > 0.7 * smooth[top]) low--;
  while (smooth[high + 1] > 0.7 * smooth[top]) high++;
  const without = groups.map((group) =>
    maximum(
      all.map((count, bin) => count - group[bin]),
      low,
      high,
    ),
  );
  const centre = without.reduce((a, b) => a + b, 0) / GROUPS;
  const scatter = without.reduce((sum, value) => sum + (value - centre) ** 2, 0);
  return { mean: maximum(all, low, high), error: Math.sqrt((scatter * (GROUPS - 1)) / GROUPS) };
}

/** Slope of the peak against ln E between two energies [GeV], fixed alpha_s = 0.1, pTmin = 1 GeV. */
export function peakSlope(
  coherent: boolean,
  seed: number,
  [lower, lowerEvents]: readonly [number, number],
  [upper, upperEvents]: readonly [number, number],
): { mean: number; error: number } {
  const at = (energy: number, events: number) =>
    spectrumPeak(
      { coherent, energy, cutoff: 1, quark: 1, coupling: { kind: 'fixed', value: 0.1 } },
      seed,
      events,
    );
  const [a, b] = [at(lower, lowerEvents), at(upper, upperEvents)];
  const distance = Math.log(upper / lower);
  return { mean: (b.mean - a.mean) / distance, error: Math.hypot(a.error, b.error) / distance };
}

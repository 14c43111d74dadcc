import { coloursAlive, type History } from '../../engine/index.ts';
import { gaussLegendre } from '../../engine/math/index.ts';
import { momentumOf } from './engine-sample.ts';
import {
  angle,
  couplingFor,
  type End,
  type Four,
  gluonKernel,
  highestT,
  lowestT,
  openRange,
  pairKernel,
  quarkKernel,
  rate,
  type Settings,
  space,
} from './independent/index.ts';

/** Borders of bins: kT of the emission in GeV, its rapidity with respect to the dipole, towards the emitter. */
export interface Bins {
  readonly kT: readonly number[];
  readonly rapidity: readonly number[];
}

export type Channel = 'q_qg' | 'g_gg' | 'g_qq';

/** A dipole end with its channel. */
export interface Competitor {
  readonly channel: Channel;
  readonly end: End;
}

const halfProduct = (p: Four, q: Four): number => p[3] * q[3] * Math.sin(angle(space(p), space(q)) / 2) ** 2;

/** Number of the bin that holds a value, -1 outside all. */
function binOf(edges: readonly number[], x: number): number {
  for (let n = 0; n + 1 < edges.length; n++) if (x >= edges[n] && x < edges[n + 1]) return n;
  return -1;
}

/**
 * Bin of a step's emission, from the momenta of its rows: kT^2 = 2 (j.p)(j.q)/(p.q) and rapidity ln(j.q/j.p)/2, p and q
 * emitter and partner before the step.
 *
 * @returns kT bin times the number of rapidity bins, plus rapidity bin; -1 outside.
 */
export function binOfStep(history: History, step: number, bins: Bins): number {
  const { emitter, partner, j } = history.steps;
  const [p, q, k] = [emitter, partner, j].map((rows) => momentumOf(history, rows[step]));
  const [jp, jq, pq] = [halfProduct(k, p), halfProduct(k, q), halfProduct(p, q)];
  const kT = binOf(bins.kT, Math.sqrt((4 * jp * jq) / pq));
  const rapidity = binOf(bins.rapidity, Math.log(jq / jp) / 2);
  return kT < 0 || rapidity < 0 ? -1 : kT * (bins.rapidity.length - 1) + rapidity;
}

/** Everything that competes after `step`, massless. */
export function competitorsAfter(history: History, step: number, settings: Settings): Competitor[] {
  const { colourEnd, anticolourEnd } = coloursAlive(history, step);
  const cut2 = settings.cutoff ** 2;
  const coupling = couplingOf(settings);
  const out: Competitor[] = [];
  for (let dipole = 0; dipole < colourEnd.length; dipole++) {
    const rows = [colourEnd[dipole], anticolourEnd[dipole]];
    const q2 = 4 * halfProduct(momentumOf(history, rows[0]), momentumOf(history, rows[1]));
    const shared = { q2, coupling, order: settings.order, cut2 };
    for (const row of rows) {
      if (history.entries.id[row] !== 21) {
        out.push({ channel: 'q_qg', end: { ...shared, kernel: quarkKernel } });
        continue;
      }
      out.push({ channel: 'g_gg', end: { ...shared, kernel: gluonKernel } });
      const pairs = (z: number): number => settings.flavours * pairKernel(z, 0);
      out.push({ channel: 'g_qq', end: { ...shared, kernel: pairs } });
    }
  }
  return out;
}

const couplings = new Map<string, ReturnType<typeof couplingFor>>();
function couplingOf({ coupling, cutoff, energy }: Settings): ReturnType<typeof couplingFor> {
  const key = JSON.stringify([coupling, cutoff, energy]);
  const known = couplings.get(key) ?? couplingFor(coupling, cutoff ** 2, energy ** 2);
  couplings.set(key, known);
  return known;
}

/** Half rapidities at which an end at t passes from one bin to the next. */
function cutsOf(end: End, t: number, bins: Bins): number[] {
  const cuts: number[] = [];
  if (end.order === 'kt') {
    // 1 - z = kT e^rapidity / Q
    for (const rapidity of bins.rapidity) {
      const w = Math.sqrt(t / end.q2) * Math.exp(rapidity);
      if (w < 1) cuts.push(Math.log((1 - w) / w) / 2);
    }
    return cuts;
  }
  for (const rapidity of bins.rapidity) cuts.push(Math.log(end.q2 / t) / 2 - rapidity);
  for (const kT of bins.kT) {
    const cosh2 = t / (4 * kT * kT);
    if (cosh2 > 1) cuts.push(Math.acosh(Math.sqrt(cosh2)), -Math.acosh(Math.sqrt(cosh2)));
  }
  return cuts;
}

function binAt(end: End, t: number, b: number, bins: Bins): number {
  const kT = end.order === 'kt' ? Math.sqrt(t) : Math.sqrt(t) / (2 * Math.cosh(b));
  const w = 1 / (1 + Math.exp(2 * b));
  const row = binOf(bins.kT, kT);
  const column = binOf(bins.rapidity, Math.log((w * Math.sqrt(end.q2)) / kT));
  return row < 0 || column < 0 ? -1 : row * (bins.rapidity.length - 1) + column;
}

// Gauss-Legendre points of [-1, 1], and the integrals from each of them to 1 by the interpolating polynomial.
const POINTS = 6;
const { nodes: NODES, weights: WEIGHTS } = gaussLegendre(POINTS);
const legendre = (n: number, x: number): number =>
  n === 0 ? 1 : n === 1 ? x : ((2 * n - 1) * x * legendre(n - 1, x) - (n - 1) * legendre(n - 2, x)) / n;
const TO_END = Array.from(NODES, (x) =>
  Array.from(NODES, (node, k) => {
    let sum = 1 - x;
    for (let n = 1; n < POINTS; n++) sum += legendre(n, node) * (legendre(n - 1, x) - legendre(n + 1, x));
    return (WEIGHTS[k] / 2) * sum;
  }),
);

/**
 * Probability, by channel and bin, that the next step from t = `from` down to the cutoff falls there, by quadrature.
 *
 * Accuracy: 1e-4 of the whole. The rest of 1 is no step at all and steps outside all bins.
 */
export function stepProbabilities(
  competitors: readonly Competitor[],
  from: number,
  bins: Bins,
): Map<Channel, Float64Array> {
  const count = (bins.kT.length - 1) * (bins.rapidity.length - 1);
  const out = new Map<Channel, Float64Array>();
  for (const { channel } of competitors) out.set(channel, new Float64Array(count));
  const low = lowestT(competitors[0].end);
  const scale = competitors[0].end.order === 'kt' ? 1 : 4;
  const breaks = [
    ...competitors.map(({ end }) => highestT(end)),
    ...[...bins.kT.map((kT) => kT * kT), ...competitors[0].end.coupling.kinks].map((kT2) => scale * kT2),
  ];
  const inside = [...new Set(breaks)].filter((t) => t > low && t < from).sort((a, b) => b - a);
  let exponent = 0;
  let top = from;
  for (const bottom of [...inside, low]) {
    const pieces = Math.max(1, Math.ceil(Math.log(top / bottom)));
    const width = Math.log(top / bottom) / pieces;
    for (let piece = 0; piece < pieces; piece++) {
      const middle = Math.log(top) - (piece + 0.5) * width;
      const ts = Array.from(NODES, (x) => Math.exp(middle + (width / 2) * x));
      const parts = ts.map((t) => competitors.map(({ end }) => partition(end, t, bins)));
      const totals = parts.map((ends) => ends.reduce((sum, { whole }) => sum + whole, 0));
      ts.forEach((_, i) => {
        const above = TO_END[i].reduce((sum, s, k) => sum + (width / 2) * s * totals[k], 0);
        const weight = (width / 2) * WEIGHTS[i] * Math.exp(-exponent - above);
        competitors.forEach(({ channel }, c) => {
          const column = out.get(channel);
          for (const [bin, share] of parts[i][c].shares)
            if (column && bin >= 0) column[bin] += weight * share;
        });
      });
      exponent += totals.reduce((sum, total, k) => sum + (width / 2) * WEIGHTS[k] * total, 0);
    }
    top = bottom;
  }
  return out;
}

/** Rate of an end at t, whole and by bin. */
function partition(end: End, t: number, bins: Bins): { whole: number; shares: [number, number][] } {
  const range = openRange(end, t);
  if (range === 0) return { whole: 0, shares: [] };
  const cuts = cutsOf(end, t, bins).filter((b) => Math.abs(b) < range);
  const edges = [-range, ...cuts.sort((a, b) => a - b), range];
  let whole = 0;
  const shares: [number, number][] = [];
  for (let n = 0; n + 1 < edges.length; n++) {
    const value = rate(end, t, edges[n], edges[n + 1]);
    whole += value;
    shares.push([binAt(end, t, (edges[n] + edges[n + 1]) / 2, bins), value]);
  }
  return { whole, shares };
}

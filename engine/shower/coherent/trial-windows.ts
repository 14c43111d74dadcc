import { exp, log, log1p } from '../../math/index.ts';

/** How the two evolution variables differ in the sampler's coordinates; see TrialWindows. */
export interface Evolution {
  /** Rapidity per unit of u - v. */
  readonly stretch: 1 | 2;
  /** What ln pT loses in units of ln(1 + exp(-rapidity)). */
  readonly shift: 1 | 2;
  /** u below which no z resolves the branching. */
  readonly lowest: number;
}

/** t = qt^2, pT = z(1-z) qt: u - v is the rapidity, ln(pT/pTmin) = v - 2 ln(1 + exp(-rapidity)). */
export const ANGLE: Evolution = { stretch: 1, shift: 2, lowest: 2 * Math.LN2 };
/** t = q^2, pT^2 = z(1-z) q^2: u - v is half the rapidity, ln(pT/pTmin) = v - ln(1 + exp(-rapidity)). */
export const VIRTUALITY: Evolution = { stretch: 2, shift: 1, lowest: Math.LN2 };

/** Largest factor by which the coupling falls across a window: more windows cost a search, fewer cost trials. */
const FALL = 0.85;
const SCAN = 0.01;
const RAPIDITY_CELL = 0.05;
const RAPIDITY_CELLS = 240;

/**
 * An overestimate of coupling times soft kernel, constant in windows of ln pT, with its first and second integrals.
 *
 * Coordinates: u = ln(sqrt(t)/pTmin), the evolution, and v = u - rapidity/stretch, rapidity = ln of the larger over the
 * smaller of z and 1-z. The region pT >= pTmin lies in 0 < v < u, and at fixed rapidity the rate is flat but for the
 * coupling and a factor that tends to 1 at large rapidity and is at most 1 - (3/2) z(1-z) everywhere (folded kernels
 * q -> q g: 2 - 3 z(1-z); g -> g g: 2 (1 - z(1-z))^2, over 2).
 *
 * `bound[k]` holds from `edge[k]` to `edge[k + 1]` in v; `first[k]` and `second[k]` are its integrals from 0 to edge[k],
 * so that both the evolution and the choice of v are solved in closed form.
 */
export class TrialWindows {
  readonly count: number;
  readonly edge: Float64Array;
  readonly bound: Float64Array;
  readonly first: Float64Array;
  readonly second: Float64Array;

  /** @param alphaS at ln(mu^2/GeV^2), falling. @param lnCut2 ln pTmin^2. @param highest largest u. */
  constructor(
    alphaS: (lnMu2: number) => number,
    lnCut2: number,
    highest: number,
    { shift }: Pick<Evolution, 'shift'>,
  ) {
    const at = (v: number): number => alphaS(lnCut2 + 2 * Math.max(v, 0));
    const edges = [0];
    const bounds: number[] = [];
    for (let v = 0; v < highest; ) {
      bounds.push(largest(at, v, shift));
      const least = FALL * at(v);
      do v += SCAN;
      while (v < highest && at(v) >= least);
      edges.push(v);
    }
    // rounding may lead a little above the highest u: the last window has no end
    this.count = bounds.length;
    this.edge = Float64Array.from(edges);
    this.bound = Float64Array.from(bounds);
    this.first = new Float64Array(this.count + 1);
    this.second = new Float64Array(this.count + 1);
    for (let k = 0; k < this.count; k++) {
      const width = edges[k + 1] - edges[k];
      this.first[k + 1] = this.first[k] + bounds[k] * width;
      this.second[k + 1] = this.second[k] + width * (this.first[k] + 0.5 * bounds[k] * width);
    }
  }

  /** Second integral at u. */
  secondAt(u: number): number {
    let k = 0;
    while (k + 1 < this.count && this.edge[k + 1] <= u) k++;
    const x = u - this.edge[k];
    return this.second[k] + x * (this.first[k] + 0.5 * this.bound[k] * x);
  }
}

/**
 * Largest of alpha_s(pT) (1 - (3/2) z(1-z)) over all rapidities at v or above.
 *
 * Cell by cell with the coupling at the cell's lower end and the kernel at its upper one: alpha_s falls with pT, hence
 * with rapidity, and the kernel rises.
 */
function largest(at: (v: number) => number, v: number, shift: number): number {
  const excess = (rapidity: number): number => shift * log1p(exp(-rapidity));
  let most = at(v - excess(RAPIDITY_CELLS * RAPIDITY_CELL));
  for (let cell = 0; cell < RAPIDITY_CELLS; cell++) {
    const wide = exp(-(cell + 1) * RAPIDITY_CELL);
    const kernel = 1 - (1.5 * wide) / ((1 + wide) * (1 + wide));
    most = Math.max(most, at(v - excess(cell * RAPIDITY_CELL)) * kernel);
  }
  return most;
}

/** u of a value of t [GeV^2]. */
export const evolutionPlace = (t: number, lnCut2: number): number => 0.5 * (log(t) - lnCut2);

import type { ChebyshevRule } from './chebyshev.ts';

const LEAF = 0;
const ALONG_U = 1;
const ALONG_V = 2;
/** A base carries the errors of the cells below, which no cutting removes: it is judged more mildly. */
const BASE_SHARE = 0.1;
/** Halvings of one cell in a row, after which it is taken as it is. */
const DEEPEST = 26;

/** What a piece of a table is built from; u and v run from 0 to 1. */
export interface CellSource {
  readonly components: number;
  /** Integrand in u of every component at (u, v). */
  integrand(out: Float64Array, u: number, v: number): void;
  /** Integral of every component from its beginning to u = 0. */
  base(out: Float64Array, v: number): void;
}

const NO_LEAF = new Float64Array(0);

// scratch, not reentrant
const between = new Float64Array(12 * 12);
const found = new Float64Array(3);
const bases = new Float64Array(3);

/**
 * Integral in u of a function of (u, v) on the unit square, by polynomials on cells that are halved where they must be.
 *
 * Every cell holds, for each component, powers of u and v, one more of u than of v, of the integral from u = 0 plus
 * the base. A cell is kept when the last coefficients of its Chebyshev series are below the tolerance.
 */
export class ExponentCells {
  private readonly source: CellSource;
  private readonly alongU: ChebyshevRule;
  private readonly alongV: ChebyshevRule;
  private readonly tolerance: number;
  /** Tree of cells: which way a cell is cut, where, and into which; a leaf has coefficients. */
  private readonly cut: number[] = [];
  private readonly at: number[] = [];
  private readonly lower: number[] = [];
  private readonly upper: number[] = [];
  private readonly leaves: Float64Array[] = [];
  private readonly values: Float64Array;
  private readonly baseValues: Float64Array;
  private readonly series: Float64Array;

  /** @param tolerance absolute, of the integral over one cell. */
  constructor(source: CellSource, alongU: ChebyshevRule, alongV: ChebyshevRule, tolerance: number) {
    this.source = source;
    this.alongU = alongU;
    this.alongV = alongV;
    this.tolerance = tolerance;
    this.values = new Float64Array(source.components * alongU.n * alongV.n);
    this.baseValues = new Float64Array(source.components * alongV.n);
    this.series = new Float64Array(alongU.n * alongV.n);
    this.build(0, 1, 0, 1, 0);
  }

  /** Number of cells. */
  get size(): number {
    return (this.cut.length + 1) / 2;
  }

  /** Integral of every component at (u, v). */
  integral(out: Float64Array, u: number, v: number): void {
    const { n: nv } = this.alongV;
    const nu = this.alongU.n + 1;
    const leaf = this.leaves[this.find(u, v)];
    const x = (u - leaf[0]) * leaf[1];
    const y = (v - leaf[2]) * leaf[3];
    let place = 4;
    for (let c = 0; c < this.source.components; c++) {
      let sum = 0;
      for (let m = 0; m < nu; m++) {
        let row = 0;
        for (let k = 0; k < nv; k++) row = row * y + leaf[place++];
        sum = sum * x + row;
      }
      out[c] = sum;
    }
  }

  /** Derivative of the integral in u: the integrand. */
  slope(out: Float64Array, u: number, v: number): void {
    const { n: nv } = this.alongV;
    const nu = this.alongU.n + 1;
    const leaf = this.leaves[this.find(u, v)];
    const x = (u - leaf[0]) * leaf[1];
    const y = (v - leaf[2]) * leaf[3];
    let place = 4;
    for (let c = 0; c < this.source.components; c++) {
      let sum = 0;
      for (let m = nu - 1; m >= 0; m--) {
        let row = 0;
        for (let k = 0; k < nv; k++) row = row * y + leaf[place++];
        if (m > 0) sum = sum * x + m * row;
      }
      out[c] = sum * leaf[1];
    }
  }

  private find(u: number, v: number): number {
    const { cut, at, lower, upper } = this;
    let cell = 0;
    while (cut[cell] !== LEAF) cell = (cut[cell] === ALONG_U ? u : v) <= at[cell] ? lower[cell] : upper[cell];
    return cell;
  }

  /** Cells are made in the order of u at every v, so that the base of a cell is there before it. */
  private build(u0: number, u1: number, v0: number, v1: number, depth: number): number {
    const cell = this.cut.length;
    this.cut.push(LEAF);
    this.at.push(0);
    this.lower.push(-1);
    this.upper.push(-1);
    this.leaves.push(NO_LEAF);
    this.sample(u0, u1, v0, v1);
    const [worseU, worseV] = this.tails(u1 - u0);
    if (Math.max(worseU, worseV) <= this.tolerance || depth === DEEPEST) {
      this.leaves[cell] = this.settle(u0, u1, v0, v1);
      return cell;
    }
    const alongU = worseU >= worseV;
    const middle = alongU ? 0.5 * (u0 + u1) : 0.5 * (v0 + v1);
    this.cut[cell] = alongU ? ALONG_U : ALONG_V;
    this.at[cell] = middle;
    // numbers are given before the cells are built, since their bases are looked up in the tree as it stands
    this.lower[cell] = this.cut.length;
    if (alongU) this.build(u0, middle, v0, v1, depth + 1);
    else this.build(u0, u1, v0, middle, depth + 1);
    this.upper[cell] = this.cut.length;
    if (alongU) this.build(middle, u1, v0, v1, depth + 1);
    else this.build(u0, u1, middle, v1, depth + 1);
    return cell;
  }

  /** Integrand and base at the nodes of a cell, into values and baseValues. */
  private sample(u0: number, u1: number, v0: number, v1: number): void {
    const { source, alongU, alongV, values, baseValues } = this;
    const { components } = source;
    for (let k = 0; k < alongV.n; k++) {
      const v = 0.5 * (v0 + v1 + (v1 - v0) * alongV.nodes[k]);
      if (u0 === 0) source.base(bases, v);
      else this.integral(bases, u0, v);
      for (let c = 0; c < components; c++) baseValues[c * alongV.n + k] = bases[c];
      for (let i = 0; i < alongU.n; i++) {
        source.integrand(found, 0.5 * (u0 + u1 + (u1 - u0) * alongU.nodes[i]), v);
        for (let c = 0; c < components; c++) values[(c * alongU.n + i) * alongV.n + k] = found[c];
      }
    }
  }

  /** What the last Chebyshev coefficients along u, and along v, are worth in the integral over the cell. */
  private tails(width: number): [number, number] {
    const { source, alongU, alongV, values, baseValues, series } = this;
    const nu = alongU.n;
    const nv = alongV.n;
    let tailU = 0;
    let tailV = 0;
    for (let c = 0; c < source.components; c++) {
      transform(series, values, c * nu * nv, alongU.toChebyshev, alongV.toChebyshev, nu, nv);
      for (const i of [nu - 1, nu - 2]) {
        let sum = 0;
        for (let k = 0; k < nv; k++) sum += Math.abs(series[i * nv + k]);
        tailU = Math.max(tailU, 0.5 * width * sum);
      }
      if (nv === 1) continue;
      for (const k of [nv - 1, nv - 2]) {
        let base = 0;
        for (let n = 0; n < nv; n++) base += alongV.toChebyshev[k * nv + n] * baseValues[c * nv + n];
        let sum = 0;
        for (let i = 0; i < nu; i++) sum += Math.abs(series[i * nv + k]);
        tailV = Math.max(tailV, width * sum, BASE_SHARE * Math.abs(base));
      }
    }
    return [tailU, tailV];
  }

  /** Coefficients of the cell that was sampled last: its middle and the inverse of half its width, both ways, first. */
  private settle(u0: number, u1: number, v0: number, v1: number): Float64Array {
    const { source, alongU, alongV, values, baseValues, series } = this;
    const nu = alongU.n;
    const nv = alongV.n;
    const leaf = new Float64Array(4 + source.components * (nu + 1) * nv);
    leaf.set([0.5 * (u0 + u1), 2 / (u1 - u0), 0.5 * (v0 + v1), 2 / (v1 - v0)]);
    const half = 0.5 * (u1 - u0);
    for (let c = 0; c < source.components; c++) {
      transform(series, values, c * nu * nv, alongU.toPowers, alongV.toPowers, nu, nv);
      const start = 4 + c * (nu + 1) * nv;
      for (let k = 0; k < nv; k++) {
        let constant = 0;
        for (let n = 0; n < nv; n++) constant += alongV.toPowers[k * nv + n] * baseValues[c * nv + n];
        for (let m = 1; m <= nu; m++) {
          const g = (half * series[(m - 1) * nv + k]) / m;
          leaf[start + (nu - m) * nv + (nv - 1 - k)] = g;
          constant += m % 2 === 0 ? -g : g;
        }
        leaf[start + nu * nv + (nv - 1 - k)] = constant;
      }
    }
    return leaf;
  }
}

/** out = A f B^T for f at an offset; nu by nv, rows along v. */
function transform(
  out: Float64Array,
  f: Float64Array,
  offset: number,
  a: Float64Array,
  b: Float64Array,
  nu: number,
  nv: number,
): void {
  for (let i = 0; i < nu; i++)
    for (let k = 0; k < nv; k++) {
      let sum = 0;
      for (let n = 0; n < nv; n++) sum += b[k * nv + n] * f[offset + i * nv + n];
      between[i * nv + k] = sum;
    }
  for (let i = 0; i < nu; i++)
    for (let k = 0; k < nv; k++) {
      let sum = 0;
      for (let n = 0; n < nu; n++) sum += a[i * nu + n] * between[n * nv + k];
      out[i * nv + k] = sum;
    }
}

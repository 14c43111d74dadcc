import { atan2, exp, log, sin } from '../math/index.ts';
import { chebyshevRule } from './chebyshev.ts';
import type { Edge, EndPhaseSpace } from './end-phase-space.ts';
import type { EndRates } from './end-rates.ts';
import { type CellSource, ExponentCells } from './exponent-cells.ts';

/** Absolute, of the integral over one cell. */
const TOLERANCE = 3e-8;
const RULE = chebyshevRule(10);
const ONE = chebyshevRule(1);

/** A range of ln Q^2 with its edges along ln t, and the cells between each and the next. */
interface Column {
  readonly start: number;
  readonly end: number;
  readonly edges: readonly Edge[];
  readonly pieces: ExponentCells[];
}

// x = sin^2(pi u/2): a square root at either end of x is smooth in u
const stretch = (u: number): number => {
  const s = sin(0.5 * Math.PI * u);
  return s * s;
};
const unstretch = (x: number): number =>
  x <= 0 ? 0 : x >= 1 ? 1 : (2 / Math.PI) * atan2(Math.sqrt(x), Math.sqrt(1 - x));

/**
 * Exponents of a dipole end's no-emission probability, tabulated in (ln t, ln Q^2).
 *
 * Rates bend where the coupling does and end, like square roots, at the borders of phase space. So the plane is cut
 * along all of these, each patch is stretched at its ends, and polynomials on cells hold the integral in it.
 */
export class ExponentTable {
  /** Codes into CHANNELS: which exponent stands where. */
  readonly channels: readonly number[];
  private readonly rates: EndRates;
  private readonly space: EndPhaseSpace;
  private readonly columns: Column[] = [];
  private readonly highest: number;
  private readonly only: boolean;
  /** Left by `enter`: the column, its v, Q^2 and ln t of its edges. */
  private column: Column | null = null;
  private v = 0;
  private q2 = 0;
  private readonly places = new Float64Array(8);

  /**
   * @param bends kT^2 [GeV^2] at which the coupling bends, ascending from the cutoff.
   * @param highest largest Q^2 [GeV^2]. @param only whether it is the only one.
   */
  constructor(
    rates: EndRates,
    space: EndPhaseSpace,
    bends: readonly number[],
    highest: number,
    only: boolean,
  ) {
    this.channels = rates.channels;
    this.rates = rates;
    this.space = space;
    this.highest = highest;
    this.only = only;
    let breaks = space.columns(bends, highest);
    if (only && breaks.length > 0) breaks = [highest, highest];
    for (let n = 0; n + 1 < breaks.length; n++)
      this.addColumn(log(breaks[n]), log(breaks[n + 1]), bends, only);
  }

  private addColumn(start: number, end: number, bends: readonly number[], only: boolean): void {
    if (!only && !(end - start > 1e-12)) return;
    const column: Column = {
      start,
      end,
      edges: this.space.edges(exp(0.5 * (start + end)), bends),
      pieces: [],
    };
    this.columns.push(column);
    for (let piece = 0; piece + 1 < column.edges.length; piece++)
      column.pieces.push(new ExponentCells(this.sourceOf(column, piece), RULE, only ? ONE : RULE, TOLERANCE));
  }

  /** Number of cells. */
  get size(): number {
    let sum = 0;
    for (const { pieces } of this.columns) for (const cells of pieces) sum += cells.size;
    return sum;
  }

  /**
   * Take a Q^2 [GeV^2].
   *
   * @returns false where a dipole of this Q^2 cannot branch.
   * @throws RangeError above the highest Q^2.
   */
  enter(q2: number): boolean {
    if (!(q2 <= this.highest * (1 + 1e-9)))
      throw new RangeError(`dipole of Q^2 = ${q2} GeV^2: expected at most ${this.highest} GeV^2`);
    const { columns } = this;
    const lnQ2 = log(this.only ? this.highest : q2);
    let n = columns.length - 1;
    while (n >= 0 && lnQ2 < columns[n].start) n--;
    if (n < 0) {
      this.column = null;
      return false;
    }
    const column = columns[n];
    this.place(column, q2);
    const width = column.end - column.start;
    this.v = width > 0 ? unstretch((lnQ2 - column.start) / width) : 0.5;
    this.column = column;
    return true;
  }

  /** Integral of each channel's rate over ln t from where it begins up to lnT, at the Q^2 that was entered. */
  upTo(out: Float64Array, lnT: number): void {
    const { column, places, channels } = this;
    if (column === null || !(lnT > places[0])) {
      for (let c = 0; c < channels.length; c++) out[c] = 0;
      return;
    }
    let piece = column.pieces.length - 1;
    while (piece > 0 && lnT < places[piece]) piece--;
    const from = places[piece];
    column.pieces[piece].integral(out, unstretch((lnT - from) / (places[piece + 1] - from)), this.v);
  }

  /** Rate of each channel per unit of ln t, at the Q^2 that was entered; the derivative of upTo. */
  rate(out: Float64Array, lnT: number): void {
    const { column, places, channels } = this;
    const pieces = column === null ? 0 : column.pieces.length;
    if (column === null || !(lnT > places[0] && lnT < places[pieces])) {
      for (let c = 0; c < channels.length; c++) out[c] = 0;
      return;
    }
    let piece = pieces - 1;
    while (piece > 0 && lnT < places[piece]) piece--;
    const width = places[piece + 1] - places[piece];
    const u = unstretch((lnT - places[piece]) / width);
    const perU = 0.5 * Math.PI * width * sin(Math.PI * u);
    // at the ends of a piece u stands still
    if (!(u > 1e-3 && u < 1 - 1e-3)) {
      this.rates.rates(out, exp(lnT), this.q2);
      return;
    }
    column.pieces[piece].slope(out, u, this.v);
    for (let c = 0; c < channels.length; c++) out[c] /= perU;
  }

  private place(column: Column, q2: number): void {
    const { space, places } = this;
    const { edges } = column;
    this.q2 = q2;
    for (let n = 0; n < edges.length; n++) places[n] = space.placeOf(edges[n], q2);
    // rounding at the ends of a column must not turn an edge round
    for (let n = 1; n < edges.length; n++) if (places[n] < places[n - 1]) places[n] = places[n - 1];
  }

  private sourceOf(column: Column, piece: number): CellSource {
    const { rates, places } = this;
    const { start, end } = column;
    let entered = NaN;
    const enter = (v: number): void => {
      if (v === entered) return;
      entered = v;
      const lnQ2 = start + (end - start) * stretch(v);
      this.place(column, exp(lnQ2));
    };
    return {
      components: rates.channels.length,
      integrand: (out, u, v) => {
        enter(v);
        const from = places[piece];
        const width = places[piece + 1] - from;
        rates.rates(out, exp(from + width * stretch(u)), this.q2);
        const perU = 0.5 * Math.PI * width * sin(Math.PI * u);
        for (let c = 0; c < rates.channels.length; c++) out[c] *= perU;
      },
      base: (out, v) => {
        if (piece === 0) for (let c = 0; c < rates.channels.length; c++) out[c] = 0;
        else column.pieces[piece - 1].integral(out, 1, v);
      },
    };
  }
}

import { ALPHA_S_MZ, BOTTOM_MASS, CA, CHARM_MASS, PI, Z_MASS } from '../constants.ts';
import { exp, log } from '../math/index.ts';

/** One-loop coefficient of d alpha_s/d ln mu^2 = -b0 alpha_s^2 - b1 alpha_s^3. Source: Review of Particle Physics, QCD. */
export const b0 = (flavours: number): number => (33 - 2 * flavours) / (12 * PI);
/** Two-loop coefficient, see b0. */
export const b1 = (flavours: number): number => (153 - 19 * flavours) / (24 * PI * PI);

/** K of the physical scheme for soft gluons. Source: Catani, Marchesini, Webber, Nucl. Phys. B349 (1991) 635. */
export const softGluonK = (flavours: number): number => CA * (67 / 18 - (PI * PI) / 6) - (5 * flavours) / 9;

export type CouplingChoice =
  | { readonly kind: 'fixed'; readonly value: number }
  | { readonly kind: 'one-loop' }
  | { readonly kind: 'two-loop' };

export interface CouplingOptions {
  /** alpha_s at `referenceScale`. */
  readonly reference?: number;
  /** [GeV] */
  readonly referenceScale?: number;
  /** Flavour thresholds [GeV], charm below bottom. */
  readonly thresholds?: readonly [number, number];
  /** Highest scale [GeV] that the table of two-loop running covers, 1e4 unless given; above it each value is solved. */
  readonly highest?: number;
}

/** A scale at which the coupling does not exist. */
export class LandauPoleError extends Error {
  readonly code = 'landau-pole';
  constructor(
    readonly scale: number,
    readonly pole: number,
  ) {
    super(`alpha_s at ${scale} GeV: the Landau pole is at ${pole} GeV, expected a scale above it`);
  }
}

/** Running with a fixed number of flavours: inverse coupling against ln mu^2, up from `start`. */
interface Segment {
  readonly start: number;
  readonly b0: number;
  /** b1/b0, 0 at one loop. */
  readonly c: number;
  /** G(1/alpha) - b0 ln mu^2, constant within the segment. */
  readonly constant: number;
}

// G(x) = x + c ln(c/(c + x)), x = 1/alpha: dG/d ln mu^2 = b0 exactly for the truncated equation.
const implicit = (x: number, c: number): number => (c === 0 ? x : x + c * log(c / (c + x)));

function inverseCoupling(segment: Segment, lnMu2: number): number {
  const target = segment.constant + segment.b0 * lnMu2;
  const c = segment.c;
  if (c === 0) return target;
  // Newton on a convex, rising function from above: quadratic and monotonic
  let x = target + c * log(1 + Math.max(target, 0) / c) + c;
  for (let turn = 0; turn < 60; turn++) {
    const change = ((implicit(x, c) - target) * (x + c)) / x;
    x -= change;
    if (!(x > 0)) x = 1e-300;
    if (Math.abs(change) <= 4e-16 * x) break;
  }
  return x;
}

const TABLE_PER_UNIT = 256;
/** Below this 1/alpha the coupling bends too fast for the table. */
const TABLE_LEAST_INVERSE = 1;

/**
 * The strong coupling, fixed or running exactly at one or two loops with continuous flavour thresholds.
 *
 * Accuracy: 1e-12 relative through `at`; `atLog`, for the sampler, reads a table at two loops and agrees with `at` to
 * 1e-11 relative. Source: Review of Particle Physics, QCD; exact solution of the truncated equation.
 */
export class RunningCoupling {
  readonly choice: CouplingChoice;
  /** Scale [GeV] of the Landau pole, 0 where there is none. */
  readonly pole: number;
  private readonly fixed: number;
  private readonly segments: readonly Segment[];
  private readonly lnThresholds: readonly [number, number];
  private table: Float64Array | null = null;
  private tableStart = 0;

  /**
   * @param lowest lowest scale [GeV] that will be asked for through `atLog`.
   * @throws LandauPoleError where `lowest` is not above the pole.
   */
  constructor(choice: CouplingChoice, lowest: number, options: CouplingOptions = {}) {
    this.choice = choice;
    this.fixed = choice.kind === 'fixed' ? choice.value : 0;
    const [charm, bottom] = options.thresholds ?? [CHARM_MASS, BOTTOM_MASS];
    this.lnThresholds = [2 * log(charm), 2 * log(bottom)];
    this.segments =
      choice.kind === 'fixed'
        ? []
        : buildSegments(
            choice.kind === 'one-loop' ? 1 : 2,
            options.reference ?? ALPHA_S_MZ,
            2 * log(options.referenceScale ?? Z_MASS),
            this.lnThresholds,
          );
    this.pole = choice.kind === 'fixed' ? 0 : poleScale(this.segments[0]);
    if (!(lowest > this.pole)) throw new LandauPoleError(lowest, this.pole);
    if (choice.kind === 'two-loop')
      this.tabulate(2 * log(lowest), 2 * log(Math.max(options.highest ?? 1e4, lowest)));
  }

  /**
   * alpha_s at mu [GeV].
   *
   * @throws LandauPoleError at or below the pole.
   */
  at(mu: number): number {
    if (this.fixed > 0) return this.fixed;
    if (!(mu > this.pole)) throw new LandauPoleError(mu, this.pole);
    return 1 / this.inverseAt(2 * log(mu));
  }

  /** Flavours of the coupling at ln mu^2. */
  flavoursAt(lnMu2: number): number {
    return lnMu2 >= this.lnThresholds[1] ? 5 : lnMu2 >= this.lnThresholds[0] ? 4 : 3;
  }

  /** alpha_s at ln(mu^2/GeV^2), which must not be below the `lowest` of the constructor. */
  atLog(lnMu2: number): number {
    if (this.fixed > 0) return this.fixed;
    const table = this.table;
    if (table === null) {
      const segment = this.segments[this.flavoursAt(lnMu2) - 3];
      return 1 / (segment.constant + segment.b0 * lnMu2);
    }
    const place = (lnMu2 - this.tableStart) * TABLE_PER_UNIT;
    const cell = Math.floor(place);
    // cells that hold a threshold or lie close to the pole, and scales outside the table, are solved exactly
    if (!(cell >= 0 && 4 * cell < table.length) || Number.isNaN(table[4 * cell + 3]))
      return 1 / this.inverseAt(lnMu2);
    const f = place - cell;
    const at = 4 * cell;
    return 1 / (table[at] + f * (table[at + 1] + f * (table[at + 2] + f * table[at + 3])));
  }

  private inverseAt(lnMu2: number): number {
    return inverseCoupling(this.segments[this.flavoursAt(lnMu2) - 3], lnMu2);
  }

  /** Cubic Hermite cells of 1/alpha, whose slope b0 + b1 alpha is known exactly. */
  private tabulate(start: number, end: number): void {
    this.tableStart = start;
    const cells = Math.ceil((end - start) * TABLE_PER_UNIT);
    const table = new Float64Array(4 * cells);
    const width = 1 / TABLE_PER_UNIT;
    for (let cell = 0; cell < cells; cell++) {
      const lower = start + cell * width;
      const upper = start + (cell + 1) * width;
      const segment = this.segments[this.flavoursAt(lower) - 3];
      if (this.flavoursAt(upper) !== this.flavoursAt(lower)) {
        table[4 * cell + 3] = NaN;
        continue;
      }
      const x0 = inverseCoupling(segment, lower);
      if (x0 < TABLE_LEAST_INVERSE) {
        table[4 * cell + 3] = NaN;
        continue;
      }
      const x1 = inverseCoupling(segment, upper);
      const slope0 = width * segment.b0 * (1 + segment.c / x0);
      const slope1 = width * segment.b0 * (1 + segment.c / x1);
      table[4 * cell] = x0;
      table[4 * cell + 1] = slope0;
      table[4 * cell + 2] = 3 * (x1 - x0) - 2 * slope0 - slope1;
      table[4 * cell + 3] = 2 * (x0 - x1) + slope0 + slope1;
    }
    this.table = table;
  }
}

function buildSegments(
  loops: 1 | 2,
  reference: number,
  lnReference: number,
  lnThresholds: readonly [number, number],
): Segment[] {
  const segment = (flavours: number, start: number, x: number, lnMu2: number): Segment => {
    const slope = b0(flavours);
    const c = loops === 1 ? 0 : b1(flavours) / slope;
    return { start, b0: slope, c, constant: implicit(x, c) - slope * lnMu2 };
  };
  const [lnCharm, lnBottom] = lnThresholds;
  // walk from the reference scale to both sides, continuous at each threshold
  const starts = [-Infinity, lnCharm, lnBottom];
  const segments: Segment[] = [];
  const home = lnReference >= lnBottom ? 2 : lnReference >= lnCharm ? 1 : 0;
  segments[home] = segment(home + 3, starts[home], 1 / reference, lnReference);
  for (let lower = home - 1; lower >= 0; lower--) {
    const edge = starts[lower + 1];
    segments[lower] = segment(lower + 3, starts[lower], inverseCoupling(segments[lower + 1], edge), edge);
  }
  for (let upper = home + 1; upper < 3; upper++) {
    const edge = starts[upper];
    segments[upper] = segment(upper + 3, edge, inverseCoupling(segments[upper - 1], edge), edge);
  }
  return segments;
}

// 1/alpha = 0 where G = 0
function poleScale(lowest: Segment): number {
  return exp(-lowest.constant / lowest.b0 / 2);
}

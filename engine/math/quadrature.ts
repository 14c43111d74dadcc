import { cos } from './sine.ts';

/** A quadrature was asked for something that it cannot give. */
export class QuadratureError extends Error {
  override readonly name = 'QuadratureError';
  /** Where on the axis. */
  readonly at: number;
  readonly found: string;
  readonly expected: string;
  constructor(at: number, found: string, expected: string) {
    super(`quadrature at ${at}: found ${found}, expected ${expected}`);
    this.at = at;
    this.found = found;
    this.expected = expected;
  }
}

/** Nodes, ascending, and weights on [-1, 1]. */
export interface QuadratureRule {
  readonly nodes: Float64Array;
  readonly weights: Float64Array;
}

/**
 * Gauss-Legendre rule of n points: exact for polynomials of degree 2n - 1.
 *
 * @param n 1 .. 1000.
 * Accuracy: integrals to n 2.2e-16 relative: one rounding for each step of the polynomials' recurrence.
 */
export function gaussLegendre(n: number): QuadratureRule {
  if (!(Number.isInteger(n) && n >= 1 && n <= 1000)) {
    throw new QuadratureError(0, `${n} points`, 'a whole number from 1 to 1000');
  }
  const nodes = new Float64Array(n);
  const weights = new Float64Array(n);
  for (let k = 0; k < n / 2; k++) {
    let x = k === (n - 1) / 2 ? 0 : cos((Math.PI * (k + 0.75)) / (n + 0.5));
    let slope = 0;
    let settled = false;
    for (let step = 0; step < 8; step++) {
      let previous = 0;
      let value = 1;
      for (let degree = 1; degree <= n; degree++) {
        const older = previous;
        previous = value;
        value = ((2 * degree - 1) * x * previous - (degree - 1) * older) / degree;
      }
      slope = (n * (previous - x * value)) / ((1 - x) * (1 + x));
      // The last slope is taken where the node ends up: the weight is stationary only there.
      if (settled) break;
      const move = x === 0 ? 0 : value / slope;
      x -= move;
      settled = Math.abs(move) < 1e-9;
    }
    nodes[n - 1 - k] = x;
    nodes[k] = -x;
    weights[k] = 2 / ((1 - x) * (1 + x) * slope * slope);
    weights[n - 1 - k] = weights[k];
  }
  if (n % 2 === 1) nodes[(n - 1) / 2] = 0;
  return { nodes, weights };
}

/** Integral of f from a to b by one rule. */
export function applyRule(rule: QuadratureRule, f: (x: number) => number, a: number, b: number): number {
  const middle = 0.5 * (a + b);
  const half = 0.5 * (b - a);
  let sum = 0;
  for (let k = 0; k < rule.nodes.length; k++) sum += rule.weights[k] * f(middle + half * rule.nodes[k]);
  return half * sum;
}

/** What `integrate` found. */
export interface Integral {
  readonly value: number;
  /** Estimate of what the value is off by, absolute; on smooth integrands far above the truth. */
  readonly error: number;
  readonly evaluations: number;
  /** Whether the tolerance was met within the interval limit. */
  readonly converged: boolean;
}

/** When to stop: either tolerance met, or the limit of intervals reached. */
export interface IntegrateOptions {
  /** Default 1e-10. */
  relative?: number;
  /** Default 0. */
  absolute?: number;
  /** Most intervals that the range is cut into, default 500. */
  limit?: number;
}

// Positive nodes of the 15-point Kronrod extension of the 7-point Gauss rule, the two sets of weights.
const NODES = [
  0.20778495500789848, 0.4058451513773972, 0.5860872354676911, 0.7415311855993945, 0.8648644233597691,
  0.9491079123427585, 0.9914553711208126,
];
const KRONROD = [
  0.20443294007529889, 0.19035057806478542, 0.1690047266392679, 0.14065325971552592, 0.10479001032225019,
  0.06309209262997856, 0.022935322010529224,
];
const GAUSS = [0, 0.3818300505051189, 0, 0.27970539148927664, 0, 0.1294849661688697, 0];
const KRONROD_MIDDLE = 0.20948214108472782;
const GAUSS_MIDDLE = 0.4179591836734694;

interface Piece {
  readonly a: number;
  readonly b: number;
  readonly value: number;
  readonly error: number;
}

const VALUES = new Float64Array(15);

/** One interval: both rules and the error estimate of Piessens et al., QUADPACK (1983), section 2.2.1. */
function measure(f: (x: number) => number, a: number, b: number): Piece {
  const middle = 0.5 * (a + b);
  const half = 0.5 * (b - a);
  const at = (x: number): number => {
    const value = f(x);
    if (!Number.isFinite(value)) throw new QuadratureError(x, `${value}`, 'a finite integrand');
    return value;
  };
  const centre = at(middle);
  let kronrod = KRONROD_MIDDLE * centre;
  let gauss = GAUSS_MIDDLE * centre;
  for (let k = 0; k < 7; k++) {
    const below = at(middle - half * NODES[k]);
    const above = at(middle + half * NODES[k]);
    VALUES[2 * k] = below;
    VALUES[2 * k + 1] = above;
    kronrod += KRONROD[k] * (below + above);
    gauss += GAUSS[k] * (below + above);
  }
  const mean = kronrod / 2;
  let spread = KRONROD_MIDDLE * Math.abs(centre - mean);
  for (let k = 0; k < 7; k++) {
    spread += KRONROD[k] * (Math.abs(VALUES[2 * k] - mean) + Math.abs(VALUES[2 * k + 1] - mean));
  }
  spread *= Math.abs(half);
  const difference = Math.abs((kronrod - gauss) * half);
  let error = difference;
  if (spread !== 0 && difference !== 0) {
    const ratio = (200 * difference) / spread;
    error = spread * Math.min(1, ratio * Math.sqrt(ratio));
  }
  const value = kronrod * half;
  return { a, b, value, error: Math.max(error, 1e-16 * Math.abs(value)) };
}

/**
 * Integral of f from a to b, the interval with the largest error estimate halved until the tolerance is met.
 *
 * @param f Finite inside the range; it is never called at the ends, where it may have an integrable singularity.
 * @param a, b Finite; b < a gives the negative.
 * Throws QuadratureError where f is not finite.
 * Source: 7-15 point Gauss-Kronrod pair, Kronrod (1965); strategy of Piessens et al., QUADPACK (1983).
 */
export function integrate(
  f: (x: number) => number,
  a: number,
  b: number,
  { relative = 1e-10, absolute = 0, limit = 500 }: IntegrateOptions = {},
): Integral {
  if (!(Number.isFinite(a) && Number.isFinite(b))) {
    throw new QuadratureError(Number.isFinite(a) ? b : a, `range ${a} to ${b}`, 'finite ends');
  }
  const pieces = [measure(f, a, b)];
  for (;;) {
    let value = 0;
    let error = 0;
    let worst = 0;
    for (let k = 0; k < pieces.length; k++) {
      value += pieces[k].value;
      error += pieces[k].error;
      if (pieces[k].error > pieces[worst].error) worst = k;
    }
    const converged = error <= Math.max(absolute, relative * Math.abs(value));
    const { a: low, b: high } = pieces[worst];
    const middle = 0.5 * (low + high);
    if (converged || pieces.length >= limit || middle === low || middle === high) {
      return { value, error, evaluations: 15 * (2 * pieces.length - 1), converged };
    }
    pieces[worst] = measure(f, low, middle);
    pieces.push(measure(f, middle, high));
  }
}

import { exp, findRoot, gaussLegendre, log } from '../math/index.ts';
import type { EndPhaseSpace } from './end-phase-space.ts';
import { integratedKernels, integratedKernelsBelow } from './massless-kt.ts';
import type { Strength } from './strength.ts';
import type { SignedDensity, ZDensity } from './z-density.ts';

/** Widest panel in half rapidity: the integrands bend on the scale of one unit. */
const PANEL = 1;
/** Narrowest beside a singularity. */
const NARROWEST = 0.002;
const RULE = gaussLegendre(10);
/** Steps in half rapidity in which a kernel's change of sign is looked for. */
const STRIDE = 0.25;
/** Most of them, which 90 units of half rapidity take; beyond, they are wider. */
const MOST_STRIDES = 360;

// scratch, not reentrant
const zs = new Float64Array(3 * (MOST_STRIDES + 1));
const ws = new Float64Array(3 * (MOST_STRIDES + 1));
const values = new Float64Array(3 * RULE.nodes.length);
const kernels = new Float64Array(9 * (MOST_STRIDES + 1));
const single = new Float64Array(3);

/** Rates of a dipole end per unit of ln t, integrated over z, by quadrature of its kernels. */
export interface EndRates {
  /** Codes into CHANNELS: which rate stands where in `out`. g -> q qbar is one flavour's. */
  readonly channels: readonly number[];
  /** Rates at t and Q^2 [GeV^2]; zero outside phase space. */
  rates(out: Float64Array, t: number, q2: number): void;
  /** The part of them at fractions below z; w = 1 - z. */
  ratesBelow(out: Float64Array, t: number, q2: number, z: number, w: number): void;
}

/**
 * By Gauss-Legendre panels in half rapidity, z = 1/(1 + exp(-2b)), cut where the coupling bends and where a kernel
 * turns negative.
 *
 * Accuracy: 1e-10 as a rule, 1e-8 beside the pole of the coupling.
 */
export class QuadratureRates implements EndRates {
  readonly channels: readonly number[];
  private readonly density: ZDensity;
  private readonly space: EndPhaseSpace;
  private readonly strength: Strength;
  private readonly virtuality: boolean;
  private readonly signed: SignedDensity | null;
  private readonly cuts: number[] = [];

  /** @param signed the density again where it may be negative, which is no rate; else null. */
  constructor(
    virtuality: boolean,
    density: ZDensity,
    signed: SignedDensity | null,
    space: EndPhaseSpace,
    strength: Strength,
  ) {
    this.signed = signed;
    this.channels = density.channels;
    this.virtuality = virtuality;
    this.density = density;
    this.space = space;
    this.strength = strength;
  }

  rates(out: Float64Array, t: number, q2: number): void {
    this.integrate(out, t, q2, Infinity);
  }

  ratesBelow(out: Float64Array, t: number, q2: number, z: number, w: number): void {
    this.integrate(out, t, q2, 0.5 * log(z / w));
  }

  private integrate(out: Float64Array, t: number, q2: number, upTo: number): void {
    const { space, strength, virtuality } = this;
    const count = this.channels.length;
    for (let c = 0; c < count; c++) out[c] = 0;
    if (!space.open(t, q2, strength.bends[0])) return;
    const s = space.limitS;
    const least = space.limitKT2;
    const { low, high } = space;
    const last = Math.min(high, upTo);
    if (!(last > low)) return;
    // how far beyond either end the integrand is singular: at the pole of the coupling, or at the largest s_ij
    let lowMargin = PANEL;
    let highMargin = PANEL;
    const closes = !virtuality && space.masses.partner > 0;
    const singular = virtuality
      ? strength.pole2 > 0 && space.setRange(s, strength.pole2)
      : closes && space.setRange(space.highestPairMass2(q2), t);
    if (singular) {
      lowMargin = low - space.low;
      highMargin = space.high - high;
    }
    const { cuts } = this;
    cuts.length = 0;
    cuts.push(low, high);
    if (virtuality)
      for (let n = 1; n < strength.bends.length; n++)
        if (strength.bends[n] > least && space.setRange(s, strength.bends[n]))
          cuts.push(space.low, space.high);
    this.density.begin(t, q2);
    const { signed } = this;
    if (signed !== null) this.cutAtZeros(signed, count, low, high);
    cuts.sort(ascending);
    for (let n = 0; n + 1 < cuts.length && cuts[n] < last; n++) {
      let from = cuts[n];
      const to = Math.min(cuts[n + 1], last);
      while (from < to) {
        // no wider than the way to a singularity on either side, from the panel's nearer end
        const reach = Math.min(PANEL, from - low + lowMargin, 0.5 * (high + highMargin - from));
        const width = Math.max(reach, NARROWEST);
        const left = to - from;
        const next = left <= width ? to : from + Math.min(width, left < 2 * width ? 0.5 * left : width);
        this.panel(out, count, from, next);
        from = next;
      }
    }
  }

  /** Cut where a kernel changes its sign, between points a stride apart or twice between two of them. */
  private cutAtZeros(density: SignedDensity, count: number, low: number, high: number): void {
    const strides = Math.min(Math.ceil((high - low) / STRIDE), MOST_STRIDES);
    // the very ends may lie outside by rounding
    const inset = 1e-9 * (high - low);
    const width = (high - low - 2 * inset) / strides;
    const near = 1e-5 * width;
    // each point, and one close to it on either side for the slope
    const points = 3 * (strides + 1);
    const place = (n: number): number => low + inset + n * width;
    for (let n = 0; n <= strides; n++)
      for (let side = -1; side <= 1; side++) {
        const inward = n === 0 && side < 0 ? 0 : n === strides && side > 0 ? 0 : side;
        setPoint(3 * n + 1 + side, place(n) + inward * near);
      }
    density.kernels(kernels, zs, ws, points);
    for (let c = 0; c < count; c++) {
      const at = (b: number): number => {
        setPoint(0, b);
        density.kernels(single, zs, ws, 1);
        return single[c];
      };
      for (let n = 0; n < strides; n++) {
        const first = c * points + 3 * n;
        const a = place(n);
        const b = place(n + 1);
        const fa = kernels[first + 1];
        const fb = kernels[first + 4];
        if (fa < 0 !== fb < 0) {
          this.cuts.push(findRoot(at, a, b, ROOT));
          continue;
        }
        const sign = fa < 0 ? -1 : 1;
        // where both ends lean towards zero: where their tangents meet, a convex function lies no lower
        const falls = (sign * (fa - kernels[first + 2])) / near;
        const rises = (sign * (fb - kernels[first + 3])) / near;
        if (!(falls > 0 && rises > 0)) continue;
        const least = sign * (fa * rises + fb * falls) - width * falls * rises;
        const x = least < 0 ? otherSign(at, a, b, sign) : null;
        if (x !== null) this.cuts.push(findRoot(at, a, x, ROOT), findRoot(at, x, b, ROOT));
      }
    }
  }

  /** Add one panel, in which no rate changes its sign. */
  private panel(out: Float64Array, count: number, from: number, to: number): void {
    const { nodes, weights } = RULE;
    const points = nodes.length;
    const middle = 0.5 * (from + to);
    const half = 0.5 * (to - from);
    for (let k = 0; k < points; k++) setPoint(k, middle + half * nodes[k]);
    this.density.fill(values, zs, ws, points);
    for (let c = 0; c < count; c++) {
      let sum = 0;
      // dz = 2 z(1-z) db
      for (let k = 0; k < points; k++) sum += weights[k] * zs[k] * ws[k] * values[c * points + k];
      // a negative kernel is no rate
      if (sum > 0) out[c] += 2 * half * sum;
    }
  }
}

const ascending = (a: number, b: number): number => a - b;

/** z and 1 - z of half rapidity b, the smaller of the two from the exponential. */
function setPoint(k: number, b: number): void {
  const e = exp(b < 0 ? 2 * b : -2 * b);
  const large = 1 / (1 + e);
  const small = e * large;
  zs[k] = b < 0 ? small : large;
  ws[k] = b < 0 ? large : small;
}

/**
 * Where between a and b a function of one extremum has the other sign than at both ends; null where not.
 *
 * Golden-section search for the extremum, ended at a width whose share in an integral is beyond the digits.
 */
function otherSign(f: (x: number) => number, a: number, b: number, sign: number): number | null {
  let left = a + GOLDEN * (b - a);
  let right = b - GOLDEN * (b - a);
  let fLeft = sign * f(left);
  let fRight = sign * f(right);
  while (b - a > 1e-3 * STRIDE) {
    if (fLeft < 0) return left;
    if (fRight < 0) return right;
    if (fLeft < fRight) {
      b = right;
      right = left;
      fRight = fLeft;
      left = a + GOLDEN * (b - a);
      fLeft = sign * f(left);
    } else {
      a = left;
      left = right;
      fLeft = fRight;
      right = b - GOLDEN * (b - a);
      fRight = sign * f(right);
    }
  }
  return null;
}

const GOLDEN = 0.3819660112501051;
const ROOT = { tolerance: 1e-12 };

/** Massless ends in kt ordering, in closed form. Accuracy: 1e-12 of the largest rate. */
export class MasslessKtRates implements EndRates {
  readonly channels = [0, 1, 2];
  private readonly strength: Strength;

  constructor(strength: Strength) {
    this.strength = strength;
  }

  rates(out: Float64Array, t: number, q2: number): void {
    integratedKernels(out, t / q2);
    this.couple(out, t);
  }

  ratesBelow(out: Float64Array, t: number, q2: number, z: number, w: number): void {
    const x = t / q2;
    if (!(z * w > x)) {
      integratedKernels(out, x);
      if (z < w) out[0] = out[1] = out[2] = 0;
    } else integratedKernelsBelow(out, x, z, w);
    this.couple(out, t);
  }

  private couple(out: Float64Array, t: number): void {
    if (!(t >= this.strength.bends[0])) {
      out[0] = out[1] = out[2] = 0;
      return;
    }
    const lnT = log(t);
    const plain = this.strength.plain(lnT);
    const soft = this.strength.soft(lnT, plain);
    out[0] *= soft;
    out[1] *= soft;
    out[2] *= plain;
  }
}

import type { Coupling } from '../coupling.ts';
import type { Kernel } from '../kernels.ts';
import { integrate, integratePieces } from './rules.ts';

/** One dipole end: what the rate depends on. */
export interface End {
  /** Dipole mass squared [GeV^2]. */
  readonly q2: number;
  readonly kernel: Kernel;
  readonly coupling: Coupling;
  readonly order: 'kt' | 'virtuality';
  /** kT^2 resolution [GeV^2]. */
  readonly cut2: number;
}

// Everything is integrated in half the rapidity B, z = (1 + tanh B)/2, where z(1-z) = 1/(4 cosh^2 B) and the kernels
// are smooth on the scale of one unit.
const fraction = (b: number): number => 1 / (1 + Math.exp(-2 * b));
const jacobian = (b: number): number => 1 / (2 * Math.cosh(b) ** 2);

/** Largest t of the end [GeV^2]. */
export const highestT = (end: End): number => (end.order === 'kt' ? end.q2 / 4 : end.q2);
/** Smallest t at which the end can branch [GeV^2]. */
export const lowestT = (end: End): number => (end.order === 'kt' ? end.cut2 : 4 * end.cut2);

/** Half the rapidity range open at t: |B| below this. NaN-free: 0 where nothing is open. */
export function openRange(end: End, t: number): number {
  const ratio = end.order === 'kt' ? end.q2 / (4 * t) : t / (4 * end.cut2);
  return ratio > 1 ? Math.acosh(Math.sqrt(ratio)) : 0;
}

/** Rate at t per unit of B and of ln t. */
export function density(end: End, t: number, b: number): number {
  const c2 = Math.cosh(b) ** 2;
  const y = end.order === 'kt' ? (4 * c2 * t) / end.q2 : t / end.q2;
  if (y > 1) return 0;
  const kT2 = end.order === 'kt' ? t : t / (4 * c2);
  const alpha = end.coupling.alpha(kT2);
  return (alpha / (2 * Math.PI)) * (1 - y) * end.kernel(fraction(b), y) * jacobian(b);
}

// B at which kT^2 crosses a threshold of the coupling, at this t, both signs, ascending.
function crossings(end: End, t: number): number[] {
  if (end.order === 'kt') return [];
  const out: number[] = [];
  for (const kink of end.coupling.kinks) {
    const ratio = t / (4 * kink);
    if (ratio > 1 && kink > end.cut2) out.push(Math.acosh(Math.sqrt(ratio)));
  }
  return [...out.map((x) => -x), ...out].sort((p, q) => p - q);
}

/** Rate per unit of ln t at t, integrated over B from -range (or `from`) to `to`: over z below a given value. */
export function rate(end: End, t: number, from = -Infinity, to = Infinity): number {
  const range = openRange(end, t);
  const [a, b] = [Math.max(from, -range), Math.min(to, range)];
  if (b <= a) return 0;
  return integratePieces((x) => density(end, t, x), a, b, crossings(end, t));
}

/** B of a given z. */
export const halfRapidity = (z: number): number => Math.log(z / (1 - z)) / 2;

// The outer variable: kt ordering t = q2/(4 cosh^2 A), virtuality t = 4 cut2 cosh^2 A; dt/t = 2 tanh A dA either way.
// At A = 0 the region closes linearly, and where a threshold enters it opens like a square root: with
// A = A0 + w^2 above such a point everything is smooth in w.
function starts(end: End): number[] {
  const out = [0];
  for (const kink of end.coupling.kinks) {
    const ratio = end.order === 'kt' ? end.q2 / (4 * kink) : kink / end.cut2;
    if (ratio > 1) out.push(Math.acosh(Math.sqrt(ratio)));
  }
  return out.sort((p, q) => p - q);
}

/** Integral over ln t from tLow to tHigh of g(t), g smooth but for the thresholds of the coupling. */
export function overLnT(end: End, tLow: number, tHigh: number, g: (t: number) => number): number {
  const low = Math.max(tLow, lowestT(end));
  const high = Math.min(tHigh, highestT(end));
  if (high <= low) return 0;
  const kt = end.order === 'kt';
  const scaleT = (a: number): number =>
    kt ? end.q2 / (4 * Math.cosh(a) ** 2) : 4 * end.cut2 * Math.cosh(a) ** 2;
  const [from, to] = kt
    ? [openRange(end, high), openRange(end, low)]
    : [openRange(end, low), openRange(end, high)];
  const edges = starts(end);
  let sum = 0;
  edges.forEach((start, n) => {
    const [a, b] = [Math.max(start, from), Math.min(edges[n + 1] ?? Infinity, to)];
    if (b <= a) return;
    const f = (w: number): number => {
      const outer = start + w * w;
      return 2 * w * 2 * Math.tanh(outer) * g(scaleT(outer));
    };
    sum += integrate(f, Math.sqrt(a - start), Math.sqrt(b - start), 0.5);
  });
  return sum;
}

/**
 * Expected number of branchings of one end between tLow and tHigh (the exponent of its no-emission probability).
 *
 * Accuracy: 1e-10 absolute for the settings in use.
 */
export function exponent(end: End, tLow: number, tHigh: number): number {
  return overLnT(end, tLow, tHigh, (t) => rate(end, t));
}

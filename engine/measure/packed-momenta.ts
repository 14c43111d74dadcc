import type { EntryTable } from '../history/index.ts';

/** Numbers to a parton in packed momenta: px, py, pz, E, m [GeV]. */
export const PACKED = 5;

/**
 * Copy a row into packed momenta.
 *
 * @param out Float64Array, px, py, pz, E, m [GeV] at `at`; all NaN for a row that the table lacks.
 */
export function packRow(out: Float64Array, at: number, entries: EntryTable, row: number): void {
  if (row >= 0 && row < entries.length) {
    out[at] = entries.px[row];
    out[at + 1] = entries.py[row];
    out[at + 2] = entries.pz[row];
    out[at + 3] = entries.e[row];
    out[at + 4] = entries.m[row];
  } else out.fill(NaN, at, at + PACKED);
}

/** Length of the cross product of two packed three-momenta [GeV^2]; keeps its digits when they are nearly parallel. */
export function crossLength(p: Float64Array, a: number, b: number): number {
  const x = p[a + 1] * p[b + 2] - p[a + 2] * p[b + 1];
  const y = p[a + 2] * p[b] - p[a] * p[b + 2];
  const z = p[a] * p[b + 1] - p[a + 1] * p[b];
  return Math.sqrt(x * x + y * y + z * z);
}

/** Scalar product of two packed three-momenta [GeV^2]. */
export function dot3(p: Float64Array, a: number, b: number): number {
  return p[a] * p[b] + p[a + 1] * p[b + 1] + p[a + 2] * p[b + 2];
}

/**
 * E - |p| of a packed momentum [GeV], from the recorded mass so that nothing cancels.
 *
 * @param length |p| [GeV].
 *
 * The mass column is believed to 1e-6 of the energy, which covers momenta printed with few digits. Where it is missing
 * or off by more the energy itself is used, a gap within its rounding being none.
 */
export function energyGap(p: Float64Array, a: number, length: number): number {
  const energy = p[a + 3];
  const mass = p[a + 4];
  const fromMass = mass === 0 ? 0 : (mass * Math.abs(mass)) / (energy + length);
  const fromEnergy = energy - length;
  if (Math.abs(fromEnergy - fromMass) <= 1e-6 * energy) return fromMass;
  return Math.abs(fromEnergy) <= 1e-15 * energy ? 0 : fromEnergy;
}

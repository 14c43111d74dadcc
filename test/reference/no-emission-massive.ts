import { integrate } from '../../engine/math/index.ts';
import { integratedCoupling } from './independent/index.ts';

/** Masses [GeV] before and after the branching. */
interface Masses {
  readonly ij: number;
  readonly k: number;
  readonly i: number;
  readonly j: number;
}

const [CF, CA, TR] = [4 / 3, 3, 1 / 2];
const lambda = (a: number, b: number, c: number): number =>
  a * a + b * b + c * c - 2 * (a * b + a * c + b * c);

/**
 * Expected number of branchings of one massive dipole end above kT = 1 GeV, one-loop coupling, written down from
 * physics.md section 5 and integrated over s_ij and z, which are common to both orderings.
 *
 * Accuracy: 1e-7.
 */
export function massiveExponent(
  channel: 'q_qg' | 'g_gg' | 'g_qq',
  q2: number,
  { ij, k, i, j }: Masses,
  published: boolean,
): number {
  const coupling = integratedCoupling(1, 1, 1.01 * q2 + 100);
  const [mij2, mk2, mi2, mj2] = [ij * ij, k * k, i * i, j * j];
  const total = q2 + mij2 + mk2;
  const bar = total - mi2 - mj2 - mk2;
  const root = Math.sqrt(lambda(total, mij2, mk2));
  const vt = root / (total - mij2 - mk2);

  const density = (s: number, z: number): number => {
    const y = (s - mi2 - mj2) / bar;
    const v = Math.sqrt(lambda(total, s, mk2)) / ((1 - y) * bar);
    const spread = v * Math.sqrt(lambda(s, mi2, mj2));
    const [zPlus, zMinus] = [1, -1].map((sign) => (s + mi2 - mj2 + sign * spread) / (2 * s));
    const kT2 = z * (1 - z) * s - (1 - z) * mi2 - z * mj2;
    if (!(z > zMinus && z < zPlus && kT2 >= 1)) return 0;
    const soft = 1 / (1 - z * (1 - y));
    const [r1, r2] = published ? [vt / v, 1 / v] : [1, 1];
    const kernel =
      channel === 'q_qg'
        ? CF * (2 * soft - r1 * (1 + z + mi2 / ((y * bar) / 2)))
        : channel === 'g_gg'
          ? CA * (soft - r2 * (1 - (z * (1 - z) - zPlus * zMinus) / 2))
          : (TR / 2) * r2 * (1 - 2 * (z * (1 - z) - zPlus * zMinus));
    return ((coupling.alpha(kT2) / (2 * Math.PI)) * (1 - y) * Math.max(0, kernel) * bar) / root / (s - mij2);
  };

  const highest = (Math.sqrt(total) - k) ** 2;
  // where the largest kT^2 over z reaches a value, and between which z it is above it
  const opens = (kT2: number): number => (Math.sqrt(kT2 + mi2) + Math.sqrt(kT2 + mj2)) ** 2;
  const zBetween = (s: number, kT2: number): number[] => {
    const d = lambda(s, mi2, mj2) - 4 * s * kT2;
    return d > 0 ? [-1, 1].map((sign) => (s + mi2 - mj2 + sign * Math.sqrt(d)) / (2 * s)) : [];
  };
  const overZ = (s: number): number => {
    const cuts = [1, ...coupling.kinks].flatMap((kT2) => zBetween(s, kT2));
    const y = (s - mi2 - mj2) / bar;
    const v = Math.sqrt(Math.max(0, lambda(total, s, mk2))) / ((1 - y) * bar);
    const spread = v * Math.sqrt(lambda(s, mi2, mj2));
    for (const sign of [-1, 1]) cuts.push((s + mi2 - mj2 + sign * spread) / (2 * s));
    const [low, high] = zBetween(s, 1);
    const inside = cuts.filter((z) => z >= low && z <= high).sort((p, q) => p - q);
    let sum = 0;
    for (let n = 0; n + 1 < inside.length; n++) {
      const [a, b] = [inside[n], inside[n + 1]].map((z) => Math.log(z / (1 - z)));
      const f = (x: number): number => {
        const z = 1 / (1 + Math.exp(-x));
        return density(s, z) * z * (1 - z);
      };
      sum += integrate(f, a, b, { relative: 1e-8, absolute: 1e-10 / s }).value;
    }
    return sum;
  };
  const cuts = [1, ...coupling.kinks].map(opens).filter((s) => s < highest);
  if (cuts.length === 0) return 0;
  cuts.push(highest);
  let sum = 0;
  for (let n = 0; n + 1 < cuts.length; n++) {
    // square roots at both ends
    const width = cuts[n + 1] - cuts[n];
    const f = (angle: number): number =>
      overZ(cuts[n] + width * Math.sin(angle) ** 2) * width * Math.sin(2 * angle);
    sum += integrate(f, 0, Math.PI / 2, { relative: 1e-8, absolute: 1e-9 }).value;
  }
  return sum;
}

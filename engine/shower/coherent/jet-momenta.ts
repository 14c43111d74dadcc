import type { BranchingTree } from './branching-tree.ts';

/**
 * Squared virtualities from the leaves to the roots: q_a^2 = pT^2/(z(1-z)) + q_b^2/z + q_c^2/(1-z), leaves on shell.
 *
 * Source: Gieseke, Stephens, Webber, JHEP 12 (2003) 045, section 3.
 */
export function buildVirtualities(tree: BranchingTree): void {
  const { mass, daughter, z, kT, q2 } = tree;
  for (let node = tree.nodes - 1; node >= 0; node--) {
    const i = daughter[node];
    if (i < 0) q2[node] = mass[node] * mass[node];
    else {
      const w = 1 - z[node];
      const pT = kT[node];
      q2[node] = (pT * pT) / (z[node] * w) + q2[i] / z[node] + q2[i + 1] / w;
    }
  }
}

/** Squared virtualities as they were generated: t, and the mass shell for leaves. */
export function keepVirtualities(tree: BranchingTree): void {
  const { mass, daughter, t, q2 } = tree;
  for (let node = 0; node < tree.nodes; node++)
    q2[node] = daughter[node] < 0 ? mass[node] * mass[node] : t[node];
}

/**
 * The two jets in the event frame: an axis each, two transverse directions, and the energy after the common boost.
 *
 * Momenta are Sudakov decompositions with respect to the jet's axis a: q = alpha p + beta n + k, alpha the light-cone
 * fraction, k transverse. A boost along the axis leaves alpha and k as they are and scales the jet's total E + p_a, so
 * that q has q+ = alpha P+ and q- = (q^2 + k^2)/q+, with P+ = sqrt(q_J^2 + p^2) + p and p = k |p_parent| common to both
 * jets: sqrt(q_1^2 + p^2) + sqrt(q_2^2 + p^2) = sqrt(s).
 *
 * Azimuths start at n1, the part transverse to a of the space axis r (x, y or z) for which it is longest (ties: z
 * before y before x), which is the rule of the dipole shower with the jet's light-like basis vectors p and n in the
 * place of emitter and partner; n2 = a x n1.
 */
export class JetMomenta {
  /** Energy of the hard partons as born [GeV], by jet. */
  readonly hardEnergy = new Float64Array(2);
  /** a, n1, n2 of the first jet, then of the second. */
  private readonly basis = new Float64Array(18);
  private readonly plus = new Float64Array(2);
  /** px, py, pz, E of the node that `place` was last asked for [GeV]. */
  readonly out = new Float64Array(4);

  /** Take the axes from the hard partons. @param momenta px, py, pz, E [GeV] of both. */
  start(momenta: Float64Array): void {
    for (let jet = 0; jet < 2; jet++) {
      this.hardEnergy[jet] = momenta[4 * jet + 3];
      this.makeBasis(9 * jet, momenta[4 * jet], momenta[4 * jet + 1], momenta[4 * jet + 2]);
    }
  }

  /**
   * The common momentum that restores the energy.
   *
   * @param square1, @param square2 squared masses of the jets [GeV^2].
   * @returns false where the masses add up to sqrt(s) or more.
   */
  balance(sqrtS: number, square1: number, square2: number): boolean {
    const mass1 = Math.sqrt(square1);
    const mass2 = Math.sqrt(square2);
    if (!(mass1 + mass2 < sqrtS)) return false;
    // lambda(s, m1^2, m2^2) = (s - (m1+m2)^2) (s - (m1-m2)^2)
    const sum = mass1 + mass2;
    const difference = mass1 - mass2;
    const p =
      Math.sqrt((sqrtS - sum) * (sqrtS + sum) * (sqrtS - difference) * (sqrtS + difference)) / (2 * sqrtS);
    this.plus[0] = Math.sqrt(square1 + p * p) + p;
    this.plus[1] = Math.sqrt(square2 + p * p) + p;
    return true;
  }

  /** Momentum of a node into `out`; the energy is that of its virtuality. */
  place(tree: BranchingTree, node: number): void {
    const { basis, out } = this;
    const jet = tree.jet[node];
    const at = 9 * jet;
    const kx = tree.kx[node];
    const ky = tree.ky[node];
    const q2 = tree.q2[node];
    const plus = tree.fraction[node] * this.plus[jet];
    const along = 0.5 * (plus - (q2 + kx * kx + ky * ky) / plus);
    const x = along * basis[at] + kx * basis[at + 3] + ky * basis[at + 6];
    const y = along * basis[at + 1] + kx * basis[at + 4] + ky * basis[at + 7];
    const z = along * basis[at + 2] + kx * basis[at + 5] + ky * basis[at + 8];
    out[0] = x;
    out[1] = y;
    out[2] = z;
    out[3] = Math.sqrt(x * x + y * y + z * z + q2);
  }

  private makeBasis(at: number, px: number, py: number, pz: number): void {
    const { basis } = this;
    const size = Math.sqrt(px * px + py * py + pz * pz);
    const ax = px / size;
    const ay = py / size;
    const az = pz / size;
    basis[at] = ax;
    basis[at + 1] = ay;
    basis[at + 2] = az;
    // |r transverse|^2 = 1 - a_r^2
    const sx = Math.abs(ax);
    const sy = Math.abs(ay);
    const sz = Math.abs(az);
    const r = sz <= sy && sz <= sx ? 2 : sy <= sx ? 1 : 0;
    const ar = basis[at + r];
    for (let c = 0; c < 3; c++) basis[at + 3 + c] = (c === r ? 1 : 0) - ar * basis[at + c];
    const nx = basis[at + 3];
    const ny = basis[at + 4];
    const nz = basis[at + 5];
    const length = Math.sqrt(nx * nx + ny * ny + nz * nz);
    basis[at + 3] = nx / length;
    basis[at + 4] = ny / length;
    basis[at + 5] = nz / length;
    basis[at + 6] = (ay * nz - az * ny) / length;
    basis[at + 7] = (az * nx - ax * nz) / length;
    basis[at + 8] = (ax * ny - ay * nx) / length;
  }
}

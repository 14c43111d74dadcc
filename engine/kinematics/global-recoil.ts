import { sinCos } from '../math/index.ts';
import { transverseAxes } from './transverse-axes.ts';

// scratch, not reentrant
const turn = new Float64Array(2);
const axes = new Float64Array(8);
const kick = new Float64Array(4);
const total = new Float64Array(4);

/**
 * Momenta after a massless dipole branches and the whole event recoils.
 *
 * The dipole's own (y, z) are kept exactly: pi = rho z pt_ij, pk = rho (1-b) pt_k, pj = rho (a pt_ij + b pt_k - k'),
 * a = 1-z, b = y/(z + a y), |k'|^2 = a b Q^2; then every final momentum is transformed by B(K -> Q_tot), K = rho A + R,
 * A = pt_ij + pt_k - k', R the sum of the rest.
 *
 * @param out Float64Array(12): i, j, partner as px, py, pz, E [GeV], B applied.
 * @param boost Float64Array(16), written: B, row by row in the order px py pz e, for all other momenta.
 * @param p momenta, four to a parton. @param emitter, @param partner offsets. @param q2 2 pt_ij.pt_k [GeV^2].
 * @param w 1 - z. @param mass of the event, which is at rest [GeV].
 * @returns rho.
 * Source: Dasgupta, Dreyer, Hamilton, Monni, Salam, Soyez, Phys. Rev. Lett. 125 (2020) 052002, with (y, z) kept.
 */
export function mapGlobalDipole(
  out: Float64Array,
  boost: Float64Array,
  p: Float64Array,
  emitter: number,
  partner: number,
  q2: number,
  z: number,
  w: number,
  y: number,
  azimuth: number,
  mass: number,
): number {
  const b = y / (z + w * y);
  transverseAxes(axes, p, emitter, partner, q2);
  sinCos(turn, azimuth);
  const length = Math.sqrt(w * b * q2);
  for (let c = 0; c < 4; c++) kick[c] = length * (turn[1] * axes[c] + turn[0] * axes[4 + c]);

  const energy = p[emitter + 3] + p[partner + 3];
  const a2 = q2 * (1 - w * b);
  // R = Q_tot - P with Q_tot at rest: A.R and R^2 from energies alone
  const ar = mass * (energy - kick[3]) - q2;
  const open2 = 2 * mass * energy - q2;
  // the root of A^2 rho^2 + 2 A.R rho = M^2 - R^2 in the form that does not cancel where the dipole is light
  const rho = open2 / (ar + Math.sqrt(ar * ar + a2 * open2));
  for (let c = 0; c < 4; c++) {
    const ij = p[emitter + c];
    const k = p[partner + c];
    total[c] = rho * (ij + k - kick[c]) - (ij + k) + (c === 3 ? mass : 0);
    out[c] = rho * z * ij;
    out[4 + c] = rho * (w * ij + b * k - kick[c]);
    out[8 + c] = rho * (1 - b) * k;
  }
  restBoost(boost, total, mass);
  for (let parton = 0; parton < 3; parton++) applyBoost(out, 4 * parton, boost);
  return rho;
}

/** B(K -> T) for T at rest, K^2 = T^2 = mass^2: B p = p - 2 p.(K+T)/(K+T)^2 (K+T) + 2 p.K/K^2 T. */
function restBoost(boost: Float64Array, k: Float64Array, mass: number): void {
  const sum3 = k[3] + mass;
  const sum2 = 2 * mass * sum3;
  for (let row = 0; row < 4; row++) {
    const sumRow = row === 3 ? sum3 : k[row];
    for (let column = 0; column < 4; column++) {
      // lowered components: the metric is (+,-,-,-), energy last
      const sign = column === 3 ? 1 : -1;
      const sumColumn = sign * (column === 3 ? sum3 : k[column]);
      const toRest = row === 3 ? (2 * sign * k[column]) / mass : 0;
      boost[4 * row + column] = (row === column ? 1 : 0) - (2 * sumRow * sumColumn) / sum2 + toRest;
    }
  }
}

/** Transform one massless momentum in place; its energy is set to its length. */
export function applyBoost(p: Float64Array, at: number, boost: Float64Array): void {
  const x = p[at];
  const y = p[at + 1];
  const z = p[at + 2];
  const e = p[at + 3];
  const bx = boost[0] * x + boost[1] * y + boost[2] * z + boost[3] * e;
  const by = boost[4] * x + boost[5] * y + boost[6] * z + boost[7] * e;
  const bz = boost[8] * x + boost[9] * y + boost[10] * z + boost[11] * e;
  p[at] = bx;
  p[at + 1] = by;
  p[at + 2] = bz;
  p[at + 3] = Math.sqrt(bx * bx + by * by + bz * bz);
}

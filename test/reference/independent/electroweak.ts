import { GAMMA_Z, MZ, SIN2 } from './constants.ts';

const charge = (id: number): number => (id % 2 === 0 ? 2 / 3 : -1 / 3);
const isospin = (charge3: number): number => (charge3 > 0 ? 0.5 : -0.5);

/**
 * Coefficients of dsigma/dcos = A (1 + cos^2) + B cos for e+e- to f fbar through photon and Z, cos between e- and f, common
 * factors dropped.
 *
 * @param qf Charge of f in units of the proton's.
 * @param s [GeV^2].
 * Source: tree-level electroweak theory, massless fermions; references in Phys. Rept. 427 (2006) 257.
 */
export function angularCoefficients(qf: number, s: number, sin2 = SIN2): { A: number; B: number } {
  const ae = -0.5;
  const ve = ae + 2 * sin2;
  const af = isospin(qf);
  const vf = af - 2 * qf * sin2;
  const qe = -1;
  const [dr, di] = [s - MZ * MZ, MZ * GAMMA_Z];
  const norm = s / (4 * sin2 * (1 - sin2));
  const reChi = (norm * dr) / (dr * dr + di * di);
  const chi2 = (norm * norm) / (dr * dr + di * di);
  return {
    A: qe * qe * qf * qf + 2 * qe * qf * ve * vf * reChi + (ve * ve + ae * ae) * (vf * vf + af * af) * chi2,
    B: 4 * qe * qf * ae * af * reChi + 8 * ve * ae * vf * af * chi2,
  };
}

/** Probability of each quark flavour 1 to `flavours` (index 0: d). */
export function flavourFractions(sqrtS: number, flavours: number): number[] {
  const weights: number[] = [];
  for (let id = 1; id <= flavours; id++) weights.push(angularCoefficients(charge(id), sqrtS * sqrtS).A);
  const sum = weights.reduce((a, b) => a + b, 0);
  return weights.map((w) => w / sum);
}

/** Forward-backward asymmetry of quark `id`. */
export function asymmetry(id: number, sqrtS: number): number {
  const { A, B } = angularCoefficients(charge(id), sqrtS * sqrtS);
  return (3 * B) / (8 * A);
}

/** cos of the quark's polar angle by plain rejection. */
export function drawCosine(id: number, sqrtS: number, uniform: () => number): number {
  const { A, B } = angularCoefficients(charge(id), sqrtS * sqrtS);
  for (;;) {
    const c = 2 * uniform() - 1;
    if (uniform() * (2 * A + Math.abs(B)) < A * (1 + c * c) + B * c) return c;
  }
}

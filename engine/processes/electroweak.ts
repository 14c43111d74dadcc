import { SIN2_THETA_W, Z_MASS, Z_WIDTH } from '../constants.ts';

export interface AngularCoefficients {
  /** Coefficient of 1 + cos^2. */
  readonly even: number;
  /** Coefficient of cos. */
  readonly odd: number;
}

/**
 * e+e- -> Z/gamma* -> f fbar at tree level: dsigma/dcos ~ even (1 + cos^2) + odd cos, cos between e- and f.
 *
 * Massless fermions, full interference, units in which a unit-charge fermion through the photon alone has even = 1.
 *
 * @param flavour PDG number, 1 to 5 or 13 (muon). @param sqrtS [GeV]. @param sin2 effective mixing angle.
 * @throws RangeError for another flavour.
 * Source: Ellis, Stirling, Webber, chapter 8; values in test/reference.
 */
export function angularCoefficients(
  flavour: number,
  sqrtS: number,
  sin2: number = SIN2_THETA_W,
): AngularCoefficients {
  const known = flavour === 13 || (Number.isInteger(flavour) && flavour >= 1 && flavour <= 5);
  if (!known) throw new RangeError(`flavour ${flavour}: expected a quark, 1 to 5, or 13`);
  const up = flavour === 2 || flavour === 4;
  const charge = flavour === 13 ? -1 : up ? 2 / 3 : -1 / 3;
  const isospin = up ? 0.5 : -0.5;
  const vf = isospin - 2 * charge * sin2;
  const af = isospin;
  const ve = -0.5 + 2 * sin2;
  const ae = -0.5;
  const s = sqrtS * sqrtS;
  // chi = s / (4 s2 (1 - s2) (s - MZ^2 + i MZ GammaZ))
  const distance = s - Z_MASS * Z_MASS;
  const width = Z_MASS * Z_WIDTH;
  const norm = s / (4 * sin2 * (1 - sin2) * (distance * distance + width * width));
  const reChi = norm * distance;
  const absChi2 = norm * norm * (distance * distance + width * width);
  return {
    even:
      charge * charge - 2 * charge * ve * vf * reChi + (ve * ve + ae * ae) * (vf * vf + af * af) * absChi2,
    odd: -4 * charge * ae * af * reChi + 8 * ve * ae * vf * af * absChi2,
  };
}

import { CA, CF, TR } from '../constants.ts';

/**
 * Dipole kernels of massless final-final dipoles, one dipole end each.
 *
 * The rate is (dy/y) dz (dphi/2pi) (alpha_s/2pi) (1-y) K(z,y), 0 < z < 1, 0 < y < 1, z the light-cone fraction of i.
 * Source: Catani & Seymour, Nucl. Phys. B485 (1997) 291, section 5.1.
 */
export const kernelQuark = (z: number, y: number): number => CF * (2 / (1 - z * (1 - y)) - (1 + z));

/** g -> g g, folded with z <-> 1-z so that only j is soft-enhanced; a gluon has two such ends. See kernelQuark. */
export const kernelGluon = (z: number, y: number): number =>
  CA * (1 / (1 - z * (1 - y)) - 1 + (z * (1 - z)) / 2);

/** g -> q qbar for one flavour: half to each of the gluon's two ends. See kernelQuark. */
export const kernelGluonToQuarks = (z: number, _y: number): number => (TR / 2) * (1 - 2 * z * (1 - z));

import { CA, CF, TR } from './constants.ts';

/**
 * Splitting kernels of the massless dipole shower per dipole end, for the rate
 * (dt/t) dz (dphi/2pi) (alpha_s/2pi) (1-y) K(z, y).
 *
 * Source: Catani & Seymour, Nucl. Phys. B485 (1997) 291, section 5.1; g -> g g folded on z <-> 1-z.
 */
export type Kernel = (z: number, y: number) => number;

export const quarkKernel: Kernel = (z, y) => CF * (2 / (1 - z * (1 - y)) - (1 + z));
export const gluonKernel: Kernel = (z, y) => CA * (1 / (1 - z * (1 - y)) - 1 + (z * (1 - z)) / 2);
/** One flavour. */
export const pairKernel: Kernel = (z) => (TR / 2) * (1 - 2 * z * (1 - z));

/**
 * Upper bounds of z(1-z) (1-y) K over 0 < z < 1, 0 < y < 1.
 *
 * q -> q g: z(1-z)(1-y) 2/(1-z(1-y)) <= 2 z(1-z)/(1-z) <= 2. g -> g g: at y = 0 it is z^2 + z^2(1-z)^2/2, which has its
 * maximum 1 at z = 1, and it falls with y. g -> q qbar: z(1-z) <= 1/4 and 1 - 2z(1-z) <= 1.
 */
export const QUARK_BOUND = 2 * CF;
export const GLUON_BOUND = CA;
export const PAIR_BOUND = TR / 8;

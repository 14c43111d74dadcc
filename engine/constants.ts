/** Colour factor of a quark. Source: SU(3), exact. */
export const CF = 4 / 3;
/** Colour factor of a gluon. Source: SU(3), exact. */
export const CA = 3;
/** Normalisation of the generators. Source: convention, exact. */
export const TR = 1 / 2;
/** pi to the nearest double. */
export const PI = 3.141592653589793;
/** hbar c [GeV fm]. Source: exact SI values (CODATA 2018 prints 197.3269804 MeV fm). */
export const HBAR_C = 0.1973269804;
/** Mass of the Z [GeV]. Source: Review of Particle Physics (2023). */
export const Z_MASS = 91.1876;
/** Width of the Z [GeV]. Source: Review of Particle Physics (2023). */
export const Z_WIDTH = 2.4952;
/** Effective leptonic weak mixing angle, sin^2. Source: Phys. Rept. 427 (2006) 257. */
export const SIN2_THETA_W = 0.23153;
/** Strong coupling at the Z mass: the default input. Source: Review of Particle Physics. */
export const ALPHA_S_MZ = 0.118;
/** Charm threshold and mass [GeV]: project default, pole-like. */
export const CHARM_MASS = 1.5;
/** Bottom threshold and mass [GeV]: project default, pole-like. */
export const BOTTOM_MASS = 4.8;

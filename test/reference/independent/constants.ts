/**
 * Numbers of the independent calculation, typed anew from their sources and not imported from the engine, so that a
 * wrong digit on either side shows.
 */
export const CF = 4 / 3;
export const CA = 3;
export const TR = 0.5;
/** [GeV] Review of Particle Physics. */
export const MZ = 91.1876;
/** [GeV] Review of Particle Physics. */
export const GAMMA_Z = 2.4952;
/** Effective leptonic angle, Phys. Rept. 427 (2006) 257. */
export const SIN2 = 0.23153;
/** Flavour thresholds of the coupling [GeV], project default. */
export const M_CHARM = 1.5;
export const M_BOTTOM = 4.8;

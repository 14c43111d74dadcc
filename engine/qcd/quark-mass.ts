import { BOTTOM_MASS, CHARM_MASS } from '../constants.ts';

/** Mass [GeV] that a parton carries when masses are on: charm and bottom, by PDG number of either sign; 0 for others. */
export function quarkMass(id: number): number {
  const flavour = Math.abs(id);
  return flavour === 4 ? CHARM_MASS : flavour === 5 ? BOTTOM_MASS : 0;
}

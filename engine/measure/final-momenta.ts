import { entriesAtEnd, type History, isAlive } from '../history/index.ts';

/**
 * Momenta of the final partons in row order, with the transformations of global recoil applied.
 *
 * @param out memory to use again; its beginning is filled and returned where it is large enough.
 * @returns px, py, pz, E [GeV], four to a parton; incoming and resonance rows left out.
 */
export function finalMomenta(history: History, out?: Float64Array): Float64Array {
  const { steps } = history;
  const entries = entriesAtEnd(history);
  const { px, py, pz, e, length } = entries;
  let partons = 0;
  for (let row = 0; row < length; row++) if (isAlive(entries, row, steps.length)) partons++;
  const momenta =
    out && out.length >= 4 * partons ? out.subarray(0, 4 * partons) : new Float64Array(4 * partons);
  let at = 0;
  for (let row = 0; row < length; row++) {
    if (!isAlive(entries, row, steps.length)) continue;
    momenta[at] = px[row];
    momenta[at + 1] = py[row];
    momenta[at + 2] = pz[row];
    momenta[at + 3] = e[row];
    at += 4;
  }
  return momenta;
}

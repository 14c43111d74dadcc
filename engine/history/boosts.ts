import type { EntryTable, History } from './history.ts';
import { BOOST_NUMBERS } from './schema.ts';

/**
 * The entries with the momenta that they have at their end: right before the step that ends them, or after the shower.
 *
 * A row holds the momentum right after its own step; with global recoil each later step transforms every other row.
 *
 * @returns the entries themselves where the history has no such transformations; else a table whose momenta are copies.
 */
export function entriesAtEnd(history: History): EntryTable {
  const { entries, steps } = history;
  const { boost } = steps;
  if (boost === null || steps.length === 0) return entries;
  const px = entries.px.slice();
  const py = entries.py.slice();
  const pz = entries.pz.slice();
  const e = entries.e.slice();
  const p = new Float64Array(4);
  for (let row = 0; row < entries.length; row++) {
    const made = entries.madeBy[row];
    const ended = entries.endedBy[row];
    const last = ended < 0 ? steps.length - 1 : ended - 1;
    // what was there before the hard partons is on no line and does not recoil
    if (!(made >= -1 && last > made && last < steps.length) || entries.line[row] < 0) continue;
    p[0] = px[row];
    p[1] = py[row];
    p[2] = pz[row];
    p[3] = e[row];
    // one step after the other: products of them all, and their inverses, would lose the digits of large boosts
    for (let step = made + 1; step <= last; step++) transform(p, boost, BOOST_NUMBERS * step);
    px[row] = p[0];
    py[row] = p[1];
    pz[row] = p[2];
    e[row] = p[3];
  }
  return { ...entries, length: entries.length, px, py, pz, e };
}

/** Transform a momentum in place; NaN stands for no transformation. */
function transform(p: Float64Array, boost: Float64Array, at: number): void {
  if (Number.isNaN(boost[at])) return;
  const [x, y, z, e] = p;
  for (let c = 0; c < 4; c++) {
    const row = at + 4 * c;
    p[c] = boost[row] * x + boost[row + 1] * y + boost[row + 2] * z + boost[row + 3] * e;
  }
}

import { PI } from '../constants.ts';
import { type EntryTable, type History, ROLES } from '../history/index.ts';
import { angleBetween } from '../math/index.ts';
import { PACKED, packRow } from './packed-momenta.ts';

const INCOMING = ROLES.indexOf('incoming');
const HARD = ROLES.indexOf('hard');
const RECOILED = ROLES.indexOf('recoiled');
const RECONSTRUCTED = ROLES.indexOf('reconstructed');

/**
 * Fill, for every row, the row in which its parton was born: a hard row, or an i or j.
 *
 * Taking recoil is not a birth, nor is being put on its reconstructed momentum.
 *
 * @param out Int32Array of at least `entries.length`; -1 where the chain of `from` is broken.
 * @returns false, everything -1, where the history does not record from, madeBy and role.
 */
export function fillBirthRows(out: Int32Array, history: History): boolean {
  const { entries, head } = history;
  const { from, role, length } = entries;
  const present = head.columns.entries;
  if (!(present.includes('from') && present.includes('madeBy') && present.includes('role'))) {
    out.fill(-1, 0, length);
    return false;
  }
  for (let row = 0; row < length; row++) {
    const how = role[row];
    if (how !== RECOILED && how !== RECONSTRUCTED) out[row] = row;
    else out[row] = from[row] >= 0 && from[row] < row ? out[from[row]] : -1;
  }
  return true;
}

/**
 * Birth angle of the partons of the hard process [rad].
 *
 * @returns pi for every row where the hard partons come from a decay or an annihilation at rest, null then; otherwise
 * by row the angle to the colour partner in the hard process, of a gluon's two the wider one, NaN for other rows.
 */
export function hardBirthAngles(history: History): Float64Array | null {
  const { entries } = history;
  return isDecayAtRest(entries) ? null : anglesToHardPartners(entries);
}

/** Birth angle of a hard parton at rest: nothing that it radiates is wider [rad]. */
export const WIDEST = PI;

function isDecayAtRest(entries: EntryTable): boolean {
  const { px, py, pz, e, madeBy, role, colour, anticolour } = entries;
  let x = 0;
  let y = 0;
  let z = 0;
  let energy = 0;
  for (let row = 0; row < entries.length; row++) {
    if (madeBy[row] >= 0) continue;
    if (role[row] === INCOMING && (colour[row] !== 0 || anticolour[row] !== 0)) return false;
    if (role[row] !== HARD) continue;
    x += px[row];
    y += py[row];
    z += pz[row];
    energy += e[row];
  }
  return Math.sqrt(x * x + y * y + z * z) <= 1e-9 * energy;
}

function anglesToHardPartners(entries: EntryTable): Float64Array {
  const { madeBy, role, colour, anticolour, length } = entries;
  const angles = new Float64Array(length).fill(NaN);
  const pair = new Float64Array(2 * PACKED);
  const hard: number[] = [];
  for (let row = 0; row < length; row++)
    if (madeBy[row] < 0 && (role[row] === HARD || role[row] === INCOMING)) hard.push(row);
  for (const a of hard) {
    packRow(pair, 0, entries, a);
    for (const b of hard) {
      // two outgoing ends share a tag as colour and anticolour; an incoming end has it reversed
      const sameSide = (role[a] === INCOMING) === (role[b] === INCOMING);
      const joined = sameSide
        ? (colour[a] !== 0 && colour[a] === anticolour[b]) ||
          (anticolour[a] !== 0 && anticolour[a] === colour[b])
        : (colour[a] !== 0 && colour[a] === colour[b]) ||
          (anticolour[a] !== 0 && anticolour[a] === anticolour[b]);
      if (a === b || !joined) continue;
      packRow(pair, PACKED, entries, b);
      const angle = angleBetween(pair, pair, 0, PACKED);
      if (!(angle <= angles[a])) angles[a] = angle;
    }
  }
  return angles;
}

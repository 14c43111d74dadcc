import { BOOST_NUMBERS, type EntryTable, type History, ROLES } from '../history/index.ts';
import { dot } from '../math/index.ts';

const INCOMING = ROLES.indexOf('incoming');
const RESONANCE = ROLES.indexOf('resonance');
/** Numbers that whoever follows the dipoles may keep with each: see `kept`. */
export const KEPT = 3;

/**
 * The colour dipoles of an event, followed from step to step by the colour tags of its rows.
 *
 * Arrays by number of the dipole, 0 to `count` - 1; numbers change when a dipole ends. One object serves all events.
 */
export class LiveDipoles {
  count = 0;
  /** Tags that lack an end at the moment, or whose ends are no momenta: their dipoles have q2 NaN. */
  broken = 0;
  /** Rows alive, ascending, `rowCount` of them. */
  rows = new Int32Array(64);
  rowCount = 0;
  colourRow = new Int32Array(64);
  anticolourRow = new Int32Array(64);
  /** 2 p.q of the two ends [GeV^2]. */
  q2 = new Float64Array(64);
  /** Whether the dipole changed at the last step. */
  fresh = new Uint8Array(64);
  /** Numbers of the follower's own, KEPT to a dipole, which move with it. */
  kept = new Float64Array(KEPT * 64);
  private tags = new Int32Array(64);
  private readonly slots = new Map<number, number>();
  private entries: EntryTable | null = null;
  /** Transformations of the rows that a step leaves alone, null where recoil is local. */
  private boost: Float64Array | null = null;
  /** Row to its present momentum, px, py, pz, E [GeV]. */
  private momenta = new Float64Array(4 * 64);
  private readonly massOf: (id: number) => number;
  /** Rows in the order of the step that made them: those of step s from startMade[s + 1]. */
  private made = new Int32Array(256);
  private startMade = new Int32Array(64);

  /** @param massOf mass [GeV] by PDG number, as the kernels have it. */
  constructor(massOf: (id: number) => number) {
    this.massOf = massOf;
  }

  /** Take an event, as it is right after the hard process. */
  begin(history: History): void {
    this.count = 0;
    this.broken = 0;
    this.rowCount = 0;
    this.slots.clear();
    this.entries = history.entries;
    this.boost = history.steps.boost;
    this.order(history);
    this.advance(-1);
  }

  /** Go on to right after this step, the next one in order. */
  advance(step: number): void {
    const { entries, made, startMade } = this;
    if (entries === null) return;
    for (let n = 0; n < this.count; n++) this.fresh[n] = 0;
    let kept = 0;
    for (let n = 0; n < this.rowCount; n++) {
      const row = this.rows[n];
      if (entries.endedBy[row] === step) this.endRow(entries, row);
      else this.rows[kept++] = row;
    }
    this.rowCount = kept;
    if (this.boost !== null && step >= 0) this.transform(this.boost, BOOST_NUMBERS * step);
    for (let n = startMade[step + 1]; n < startMade[step + 2]; n++) this.beginRow(entries, made[n]);
    for (let slot = this.count - 1; slot >= 0; slot--)
      if (this.colourRow[slot] < 0 && this.anticolourRow[slot] < 0) this.remove(slot);
    this.broken = 0;
    for (let slot = 0; slot < this.count; slot++) {
      if (this.fresh[slot] === 1) this.measure(entries, slot);
      if (Number.isNaN(this.q2[slot])) this.broken++;
    }
  }

  /** Dipole of a colour tag, -1 for none. */
  ofTag(tag: number): number {
    return tag === 0 ? -1 : (this.slots.get(tag) ?? -1);
  }

  private order(history: History): void {
    const { entries, steps } = history;
    const bins = steps.length + 2;
    if (this.startMade.length < bins + 1) this.startMade = new Int32Array(2 * bins);
    if (this.made.length < entries.length) this.made = new Int32Array(2 * entries.length);
    if (this.rows.length < entries.length) {
      this.rows = new Int32Array(2 * entries.length);
      this.momenta = new Float64Array(8 * entries.length);
    }
    const { made, startMade } = this;
    startMade.fill(0, 0, bins + 1);
    const binOf = (row: number): number => {
      const step = entries.madeBy[row];
      return step >= -1 && step < steps.length ? step + 1 : bins - 1;
    };
    for (let row = 0; row < entries.length; row++) startMade[binOf(row) + 1]++;
    for (let bin = 0; bin < bins; bin++) startMade[bin + 1] += startMade[bin];
    for (let row = entries.length - 1; row >= 0; row--) made[--startMade[binOf(row) + 1]] = row;
    // now startMade[b + 1] is the start of bin b: shift down
    for (let bin = 0; bin < bins; bin++) startMade[bin] = startMade[bin + 1];
    startMade[bins] = entries.length;
  }

  private beginRow(entries: EntryTable, row: number): void {
    const role = entries.role[row];
    if (role === INCOMING || role === RESONANCE) return;
    let at = this.rowCount++;
    // rows of a later step mostly stand last
    for (; at > 0 && this.rows[at - 1] > row; at--) this.rows[at] = this.rows[at - 1];
    this.rows[at] = row;
    this.momenta[4 * row] = entries.px[row];
    this.momenta[4 * row + 1] = entries.py[row];
    this.momenta[4 * row + 2] = entries.pz[row];
    this.momenta[4 * row + 3] = entries.e[row];
    const { colour, anticolour } = entries;
    if (colour[row] !== 0) this.colourRow[this.slotOf(colour[row])] = row;
    if (anticolour[row] !== 0) this.anticolourRow[this.slotOf(anticolour[row])] = row;
  }

  private endRow(entries: EntryTable, row: number): void {
    const colour = this.ofTag(entries.colour[row]);
    if (colour >= 0 && this.colourRow[colour] === row) {
      this.colourRow[colour] = -1;
      this.fresh[colour] = 1;
    }
    const anticolour = this.ofTag(entries.anticolour[row]);
    if (anticolour >= 0 && this.anticolourRow[anticolour] === row) {
      this.anticolourRow[anticolour] = -1;
      this.fresh[anticolour] = 1;
    }
  }

  private slotOf(tag: number): number {
    let slot = this.slots.get(tag);
    if (slot === undefined) {
      slot = this.count++;
      if (slot === this.q2.length) this.widen();
      this.slots.set(tag, slot);
      this.tags[slot] = tag;
      this.colourRow[slot] = -1;
      this.anticolourRow[slot] = -1;
    }
    this.fresh[slot] = 1;
    return slot;
  }

  private remove(slot: number): void {
    this.slots.delete(this.tags[slot]);
    const last = --this.count;
    if (slot === last) return;
    this.slots.set(this.tags[last], slot);
    this.tags[slot] = this.tags[last];
    this.colourRow[slot] = this.colourRow[last];
    this.anticolourRow[slot] = this.anticolourRow[last];
    this.q2[slot] = this.q2[last];
    this.fresh[slot] = this.fresh[last];
    for (let k = 0; k < KEPT; k++) this.kept[KEPT * slot + k] = this.kept[KEPT * last + k];
  }

  private measure(entries: EntryTable, slot: number): void {
    const a = this.colourRow[slot];
    const b = this.anticolourRow[slot];
    if (a < 0 || b < 0) {
      this.q2[slot] = NaN;
      return;
    }
    const { massOf, momenta } = this;
    this.q2[slot] = 2 * dot(momenta, momenta, massOf(entries.id[a]), massOf(entries.id[b]), 4 * a, 4 * b);
  }

  /** Move the momenta of all living rows; NaN stands for no transformation. */
  private transform(boost: Float64Array, at: number): void {
    if (Number.isNaN(boost[at])) return;
    const { momenta } = this;
    for (let n = 0; n < this.rowCount; n++) {
      const place = 4 * this.rows[n];
      const x = momenta[place];
      const y = momenta[place + 1];
      const z = momenta[place + 2];
      const e = momenta[place + 3];
      for (let c = 0; c < 4; c++) {
        const row = at + 4 * c;
        momenta[place + c] = boost[row] * x + boost[row + 1] * y + boost[row + 2] * z + boost[row + 3] * e;
      }
    }
  }

  private widen(): void {
    this.colourRow = doubled(this.colourRow);
    this.anticolourRow = doubled(this.anticolourRow);
    this.q2 = doubled(this.q2);
    this.fresh = doubled(this.fresh);
    this.kept = doubled(this.kept);
    this.tags = doubled(this.tags);
  }
}

function doubled<T extends Float64Array | Int32Array | Uint8Array>(column: T): T {
  const wider = new (column.constructor as new (length: number) => T)(2 * column.length);
  wider.set(column);
  return wider;
}

import type { History } from '../../engine/index.ts';
import type { Strands } from './strands.ts';

/**
 * The colour dipoles of an event through time: record k joins the strand with the colour end to the strand with the
 * anticolour end while `from` <= radius < `to`, in units of the rim's radius (a record that holds to the end has `to` = Infinity).
 */
export interface Chains {
  readonly colour: Int32Array;
  readonly anticolour: Int32Array;
  readonly from: Float64Array;
  readonly to: Float64Array;
}

interface Ends {
  colour: number;
  anticolour: number;
  /** Record in which the pair now stands, −1 for none. */
  record: number;
}

/** Follow every colour tag through the event; a tag without two ends (a broken line, an incoming end) joins nothing. */
export function traceChains(history: History, strands: Strands): Chains {
  const { length, madeBy, colour, anticolour } = history.entries;
  const pairs: number[][] = [];
  const tags = new Map<number, Ends>();
  const touched = new Set<number>();
  const close = (radius: number): void => {
    for (const tag of touched) settle(pairs, tags.get(tag)!, radius);
    touched.clear();
  };
  let step = -1;
  for (let row = 0; row < length; row++) {
    const strand = strands.ofRow[row];
    if (madeBy[row] !== step) {
      close(radiusOf(strands, step));
      step = madeBy[row];
    }
    if (strand < 0) continue;
    for (const [tag, end] of [
      [colour[row], 'colour'],
      [anticolour[row], 'anticolour'],
    ] as const) {
      if (tag === 0) continue;
      if (!tags.has(tag)) tags.set(tag, { colour: -1, anticolour: -1, record: -1 });
      tags.get(tag)![end] = strand;
      touched.add(tag);
    }
  }
  close(radiusOf(strands, step));
  return {
    colour: Int32Array.from(pairs, (pair) => pair[0]),
    anticolour: Int32Array.from(pairs, (pair) => pair[1]),
    from: Float64Array.from(pairs, (pair) => pair[2]),
    to: Float64Array.from(pairs, (pair) => pair[3]),
  };
}

const radiusOf = (strands: Strands, step: number): number => (step < 0 ? 0 : strands.stepRadius[step]);

function settle(pairs: number[][], ends: Ends, radius: number): void {
  const old = ends.record < 0 ? null : pairs[ends.record];
  if (old && old[0] === ends.colour && old[1] === ends.anticolour) return;
  if (old) old[3] = radius;
  if (ends.colour < 0 || ends.anticolour < 0) return;
  ends.record = pairs.length;
  pairs.push([ends.colour, ends.anticolour, radius, Infinity]);
}

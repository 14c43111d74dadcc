import { angleBetween, type BallEvent, strandDirection } from '../../layout/index.ts';
import { type Quads, quadIndex } from './quads.ts';

/** A dipole while both of its ends keep to one turn each. */
interface ChainSpan {
  /** Numbers of the turns of its two ends. */
  readonly a: number;
  readonly b: number;
  readonly from: number;
  readonly until: number;
  readonly pieces: number;
}

const MOST_PIECES = 32;

/** The dipoles of an event, cut where an end begins another turn. */
export function chainSpans(event: BallEvent): ChainSpan[] {
  const { chains } = event;
  const spans: ChainSpan[] = [];
  for (let k = 0; k < chains.from.length; k++) {
    const a = turnsBetween(event, chains.colour[k], chains.from[k], chains.to[k]);
    const b = turnsBetween(event, chains.anticolour[k], chains.from[k], chains.to[k]);
    const cuts = [...new Set([...a.map((turn) => turn.from), ...b.map((turn) => turn.from)])].sort(
      (x, y) => x - y,
    );
    cuts.forEach((from, n) => {
      const until = n + 1 < cuts.length ? cuts[n + 1] : chains.to[k];
      if (!(from < until)) return;
      const holds = (turn: { from: number; until: number }): boolean =>
        turn.from <= from && from < turn.until;
      const turnA = a.find(holds);
      const turnB = b.find(holds);
      if (!turnA || !turnB) return;
      const angle = widest(event, chains.colour[k], chains.anticolour[k], from, Math.min(until, 1));
      const pieces = Math.max(2, Math.min(MOST_PIECES, Math.ceil(angle / 0.1)));
      spans.push({ a: turnA.turn, b: turnB.turn, from, until, pieces });
    });
  }
  return spans;
}

function turnsBetween(
  event: BallEvent,
  strand: number,
  from: number,
  until: number,
): { turn: number; from: number; until: number }[] {
  const { turns, turnStart } = event.strands;
  const found: { turn: number; from: number; until: number }[] = [];
  for (let turn = turnStart[strand]; turn < turnStart[strand + 1]; turn++) {
    const begin = turn === turnStart[strand] ? from : Math.max(from, turns.radius[turn]);
    const end = turn + 1 < turnStart[strand + 1] ? Math.min(until, turns.radius[turn + 1]) : until;
    if (begin < end) found.push({ turn, from: begin, until: end });
  }
  return found;
}

// The ends slide along the shell while they turn: enough pieces for the widest moment.
function widest(event: BallEvent, a: number, b: number, from: number, until: number): number {
  const u = new Float64Array(3);
  const v = new Float64Array(3);
  let most = 0;
  for (const share of [0, 0.05, 0.5, 1]) {
    const radius = from + (until - from) * share;
    strandDirection(u, 0, event.strands, a, radius);
    strandDirection(v, 0, event.strands, b, radius);
    most = Math.max(most, angleBetween(u, 0, v, 0));
  }
  return most;
}

/**
 * Colour chains as quads of dotted lines on the current shell. Columns: `aFrom0` `aTangent0` `aTurn0` (angle, begun, height) for
 * one end, the same with 1 for the other, `aSpan` (from, until, piece, pieces).
 */
export function chainQuads(event: BallEvent): Quads {
  const spans = chainSpans(event);
  const { direction, tangent, angle, radius, height } = event.strands.turns;
  const count = spans.reduce((sum, span) => sum + span.pieces, 0);
  const make = (size: number) => ({ size, values: new Float32Array(4 * count * size) });
  const columns = {
    aFrom0: make(3),
    aTangent0: make(3),
    aTurn0: make(3),
    aFrom1: make(3),
    aTangent1: make(3),
    aTurn1: make(3),
    aSpan: make(4),
  };
  let vertex = 0;
  for (const span of spans) {
    for (let piece = 0; piece < span.pieces; piece++) {
      for (let corner = 0; corner < 4; corner++, vertex++) {
        for (const [n, turn] of [
          [0, span.a],
          [1, span.b],
        ] as const) {
          const ends =
            n === 0
              ? [columns.aFrom0, columns.aTangent0, columns.aTurn0]
              : [columns.aFrom1, columns.aTangent1, columns.aTurn1];
          ends[0].values.set(direction.subarray(3 * turn, 3 * turn + 3), 3 * vertex);
          ends[1].values.set(tangent.subarray(3 * turn, 3 * turn + 3), 3 * vertex);
          ends[2].values.set([angle[turn], radius[turn], height[turn]], 3 * vertex);
        }
        const at = corner < 2 ? piece : piece + 1;
        columns.aSpan.values.set([span.from, Math.min(span.until, 1e6), at, span.pieces], 4 * vertex);
      }
    }
  }
  return { columns, index: quadIndex(count) };
}

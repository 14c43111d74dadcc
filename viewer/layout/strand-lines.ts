import { onCircle } from './directions.ts';
import type { Strands } from './strands.ts';
import { turnedBy, turnPoints } from './turn.ts';

/** The strands as polylines. Point k of all: position in units of the rim, radius, and the row that runs on from it. */
export interface StrandLines {
  /** Points of strand s: `start[s]` up to `start[s + 1]`. */
  readonly start: Int32Array;
  /** Three numbers a point. */
  readonly position: Float64Array;
  readonly radius: Float64Array;
  readonly row: Int32Array;
}

/**
 * Trace all strands: turns as chords of a quarter ellipse, rays as one segment, a point wherever a new row begins.
 *
 * @param fineness As in turnPoints.
 * Points lie on their exact curve, so that a segment's ends have the strand's true direction at their radius.
 */
export function traceStrands(strands: Strands, fineness = 1): StrandLines {
  const count = strands.from.length;
  const start = new Int32Array(count + 1);
  const position: number[] = [];
  const radius: number[] = [];
  const row: number[] = [];
  const at = new Float64Array(3);
  for (let strand = 0; strand < count; strand++) {
    for (const [turn, r, turned] of strandPoints(strands, strand, fineness)) {
      onCircle(at, 0, strands.turns.direction, 3 * turn, strands.turns.tangent, 3 * turn, turned);
      position.push(r * at[0], r * at[1], r * at[2]);
      radius.push(r);
      row.push(rowFrom(strands, strand, r));
    }
    start[strand + 1] = radius.length;
  }
  return {
    start,
    position: Float64Array.from(position),
    radius: Float64Array.from(radius),
    row: Int32Array.from(row),
  };
}

type Point = readonly [turn: number, radius: number, turned: number];

function strandPoints(strands: Strands, strand: number, fineness: number): Point[] {
  const { turnStart, turns } = strands;
  const points: Point[] = [];
  for (let turn = turnStart[strand]; turn < turnStart[strand + 1]; turn++) {
    const begin = turns.radius[turn];
    const end = turn + 1 < turnStart[strand + 1] ? turns.radius[turn + 1] : strands.to[strand];
    const angle = turns.angle[turn];
    const height = turns.height[turn];
    const curve = turnPoints(angle, height, begin, fineness);
    const own: Point[] = [];
    for (let k = 0; k < curve.length && (height <= 0 || begin + curve[k] < end); k += 2) {
      own.push([turn, begin + curve[k], curve[k + 1]]);
    }
    own.push([turn, end, turnedBy(angle, end - begin, height)]);
    insertRows(own, strands, strand, begin, end);
    // The first point of a later turn is the last one of the turn before.
    points.push(...(points.length > 0 ? own.slice(1) : own));
  }
  return points;
}

function insertRows(points: Point[], strands: Strands, strand: number, begin: number, end: number): void {
  const { rowStart, rows, turns } = strands;
  const turn = points[0][0];
  for (let k = rowStart[strand]; k < rowStart[strand + 1]; k++) {
    const r = strands.rowFrom[rows[k]];
    if (!(r > begin && r < end)) continue;
    const place = points.findIndex((point) => point[1] >= r);
    if (points[place][1] === r) continue;
    points.splice(place, 0, [turn, r, turnedBy(turns.angle[turn], r - begin, turns.height[turn])]);
  }
}

// The last row that has begun at this radius.
function rowFrom(strands: Strands, strand: number, radius: number): number {
  let k = strands.rowStart[strand];
  while (k + 1 < strands.rowStart[strand + 1] && strands.rowFrom[strands.rows[k + 1]] <= radius) k++;
  return strands.rows[k];
}

import { type History, ROLES } from '../../engine/index.ts';
import { greatCircle, type MutableNumbers, onCircle, unitVector } from './directions.ts';
import { type RadiusScale, radiusAt, radiusScale, stepTimes } from './radius-scale.ts';
import { TURN_FRACTION, turnedBy } from './turn.ts';

/**
 * Where every parton of an event runs in the ball.
 *
 * A strand is the path of one parton from its birth to its branching, or to the rim: the row with which it was born and the
 * rows that recoils made of it. It starts where its parent's strand ended, turns into its own direction, and is a ray from
 * there. Directions are unit vectors in the event frame, radii fractions of the rim's. Arrays are by row, strand, turn or step.
 */
export interface Strands {
  readonly scale: RadiusScale;
  /** Strand of a row of the entries, −1 for incoming and resonance rows. */
  readonly ofRow: Int32Array;
  /** Rows of strand s: `rows[rowStart[s]]` up to `rows[rowStart[s + 1]]`, in the order of evolution. */
  readonly rowStart: Int32Array;
  readonly rows: Int32Array;
  /** Radius at which a row of the entries begins and ends; NaN for rows that are not drawn. */
  readonly rowFrom: Float64Array;
  readonly rowTo: Float64Array;
  /** Radii at which the strands begin and end. */
  readonly from: Float64Array;
  readonly to: Float64Array;
  /** Radius at which the parton is no more: `to`, or Infinity where it survives to the end. */
  readonly until: Float64Array;
  /** Turns of strand s: `turnStart[s]` up to `turnStart[s + 1]`, at least one; a turn holds until the next begins. */
  readonly turnStart: Int32Array;
  readonly turns: Turns;
  /** Evolution time of every step, its radius, and its direction (three numbers a step). */
  readonly stepTime: Float64Array;
  readonly stepRadius: Float64Array;
  readonly stepDirection: Float64Array;
}

/** Changes of direction of the strands, end to end; one number a turn but for the vectors. */
export interface Turns {
  /** Direction before the turn, three numbers a turn. */
  readonly direction: Float64Array;
  /** Tangent there towards the direction after it, three numbers a turn. */
  readonly tangent: Float64Array;
  /** Angle turned through [rad]. */
  readonly angle: Float64Array;
  /** Radius at which the turn begins, and how far it rises. */
  readonly radius: Float64Array;
  readonly height: Float64Array;
}

// Below this a recoil is a change of energy alone [rad]; rounding in the momenta is far below, the eye far above.
const STRAIGHT = 1e-6;

/** Lay out the strands of an event; any history can be laid out, momenta without direction go along their parent's. */
export function layStrands(history: History): Strands {
  const scale = radiusScale(history);
  const stepTime = stepTimes(history);
  const stepRadius = stepTime.map((time) => radiusAt(scale, time));
  const spans = rowSpans(history, stepRadius);
  const directions = rowDirections(history);
  const grouped = groupRows(history);
  const count = grouped.rows.length;
  const from = new Float64Array(count);
  const to = new Float64Array(count);
  const until = new Float64Array(count);
  const turns: number[][] = [];
  const turnStart = new Int32Array(count + 1);
  const start = new Float64Array(3);
  for (let strand = 0; strand < count; strand++) {
    const rows = grouped.rows[strand];
    const first = rows[0];
    const parent = history.entries.from[first];
    from[strand] = spans.from[first];
    const last = rows[rows.length - 1];
    to[strand] = spans.to[last];
    until[strand] = history.entries.endedBy[last] < 0 ? Infinity : to[strand];
    const born = parent >= 0 && grouped.ofRow[parent] >= 0 ? parent : first;
    start.set(directions.subarray(3 * born, 3 * born + 3));
    turns.push(...layTurns(start, rows, directions, spans.from, to[strand]));
    turnStart[strand + 1] = turns.length;
  }
  return {
    scale,
    ofRow: grouped.ofRow,
    ...flattenRows(grouped.rows),
    rowFrom: spans.from,
    rowTo: spans.to,
    from,
    to,
    until,
    turnStart,
    turns: packTurns(turns),
    stepTime,
    stepRadius,
    stepDirection: stepDirections(history, directions),
  };
}

/** Direction of a strand at a radius on it, written to `out` at `at`. */
export function strandDirection(
  out: MutableNumbers,
  at: number,
  strands: Strands,
  strand: number,
  radius: number,
): void {
  const { turnStart, turns } = strands;
  let turn = turnStart[strand];
  while (turn + 1 < turnStart[strand + 1] && turns.radius[turn + 1] <= radius) turn++;
  const turned = turnedBy(turns.angle[turn], radius - turns.radius[turn], turns.height[turn]);
  onCircle(out, at, turns.direction, 3 * turn, turns.tangent, 3 * turn, turned);
}

function rowSpans(history: History, stepRadius: Float64Array): { from: Float64Array; to: Float64Array } {
  const { length, madeBy, endedBy, role } = history.entries;
  const from = new Float64Array(length).fill(NaN);
  const to = new Float64Array(length).fill(NaN);
  for (let row = 0; row < length; row++) {
    if (!isDrawn(role[row])) continue;
    from[row] = madeBy[row] < 0 ? 0 : stepRadius[madeBy[row]];
    to[row] = endedBy[row] < 0 ? 1 : stepRadius[endedBy[row]];
  }
  return { from, to };
}

const isDrawn = (role: number): boolean => ROLES[role] !== 'incoming' && ROLES[role] !== 'resonance';

function rowDirections(history: History): Float64Array {
  const { length, px, py, pz, from } = history.entries;
  const directions = new Float64Array(3 * length);
  for (let row = 0; row < length; row++) {
    if (unitVector(directions, 3 * row, [px[row], py[row], pz[row]])) continue;
    const parent = from[row];
    if (parent >= 0 && parent < row) directions.copyWithin(3 * row, 3 * parent, 3 * parent + 3);
    else directions[3 * row + 2] = 1;
  }
  return directions;
}

// A row continues its parent's strand unless the parent branched into it or was itself not drawn.
function groupRows(history: History): { ofRow: Int32Array; rows: number[][] } {
  const { length, from, madeBy, role } = history.entries;
  const { emitter } = history.steps;
  const ofRow = new Int32Array(length).fill(-1);
  const continued = new Uint8Array(length);
  const rows: number[][] = [];
  for (let row = 0; row < length; row++) {
    if (!isDrawn(role[row])) continue;
    const parent = from[row];
    const step = madeBy[row];
    const recoiled = parent >= 0 && ofRow[parent] >= 0 && !(step >= 0 && emitter[step] === parent);
    if (recoiled && !continued[parent]) {
      continued[parent] = 1;
      ofRow[row] = ofRow[parent];
      rows[ofRow[row]].push(row);
    } else {
      ofRow[row] = rows.length;
      rows.push([row]);
    }
  }
  return { ofRow, rows };
}

function flattenRows(grouped: readonly number[][]): { rowStart: Int32Array; rows: Int32Array } {
  const rowStart = new Int32Array(grouped.length + 1);
  grouped.forEach((rows, strand) => {
    rowStart[strand + 1] = rowStart[strand] + rows.length;
  });
  return { rowStart, rows: Int32Array.from(grouped.flat()) };
}

// One turn: direction, tangent, angle, radius, height.
function layTurns(
  start: Float64Array,
  rows: readonly number[],
  directions: Float64Array,
  rowFrom: Float64Array,
  end: number,
): number[][] {
  const found: number[][] = [];
  const current = new Float64Array(start);
  const tangent = new Float64Array(3);
  let target = -1;
  for (const row of rows) {
    const radius = rowFrom[row];
    if (found.length > 0) {
      const bent = greatCircle(tangent, 0, directions, 3 * target, directions, 3 * row);
      if (bent < STRAIGHT) continue;
      const [dx, dy, dz, tx, ty, tz, angle, begun, height] = found[found.length - 1];
      onCircle(current, 0, [dx, dy, dz], 0, [tx, ty, tz], 0, turnedBy(angle, radius - begun, height));
    }
    const angle = greatCircle(tangent, 0, current, 0, directions, 3 * row);
    found.push([...current, ...tangent, angle, radius, TURN_FRACTION * (end - radius)]);
    target = row;
  }
  return found;
}

function packTurns(turns: readonly number[][]): Turns {
  const count = turns.length;
  const packed = {
    direction: new Float64Array(3 * count),
    tangent: new Float64Array(3 * count),
    angle: new Float64Array(count),
    radius: new Float64Array(count),
    height: new Float64Array(count),
  };
  turns.forEach((turn, k) => {
    packed.direction.set(turn.slice(0, 3), 3 * k);
    packed.tangent.set(turn.slice(3, 6), 3 * k);
    [packed.angle[k], packed.radius[k], packed.height[k]] = turn.slice(6);
  });
  return packed;
}

// A step stands in the direction of the parton that branches.
function stepDirections(history: History, directions: Float64Array): Float64Array {
  const { length, emitter } = history.steps;
  const out = new Float64Array(3 * length);
  for (let step = 0; step < length; step++) {
    const row = emitter[step];
    if (row >= 0) out.set(directions.subarray(3 * row, 3 * row + 3), 3 * step);
    else out[3 * step + 2] = 1;
  }
  return out;
}

import type { BallEvent } from '../../layout/index.ts';
import { lineWidth, styleOf } from '../../marks/index.ts';
import { type Quads, quadIndex } from './quads.ts';

/** Codes by which the line shader knows how to draw. */
export const LINE_STYLES = {
  quark: 0,
  antiquark: 1,
  gluon: 2,
  other: 3,
  opening: 4,
  partner: 5,
  birth: 6,
  silhouette: 7,
  turn: 8,
  net: 9,
  outline: 10,
  rim: 11,
  dotted: 12,
} as const;

/**
 * Quads of lines in the ball, one per segment. Columns: `aPoint`, and `aBefore` and `aAfter` for its neighbours along the line
 * (the point itself at an end); `aLine` width [px at size 1, before depth] and style; `aRadius` at which the point is
 * uncovered; `aAlong` path length on the paper up to the point [px], zero until it is measured.
 */
export interface LineQuads extends Quads {
  /** Lines as runs of points for `measureAlong`: a line's first quad, and how many it has. */
  readonly runs: readonly { readonly quad: number; readonly count: number }[];
}

/** One line to be drawn: points three numbers each, and per segment its width and style. */
export interface LineSpec {
  readonly points: ArrayLike<number>;
  /** Radius at which each point is uncovered; null: always there. */
  readonly radius: ArrayLike<number> | null;
  readonly width: (segment: number) => number;
  readonly style: number;
}

/** Quads of all strands of an event. */
export function strandQuads(event: BallEvent): LineQuads {
  const { start, position, radius, row } = event.lines;
  const { entries } = event.history;
  const lines: LineSpec[] = [];
  for (let strand = 0; strand + 1 < start.length; strand++) {
    const first = start[strand];
    const last = start[strand + 1];
    const style = styleOf(entries.id[row[first]]);
    lines.push({
      points: position.subarray(3 * first, 3 * last),
      radius: radius.subarray(first, last),
      width: (k) => lineWidth(style, entries.e[row[first + k]], 1),
      style: LINE_STYLES[style],
    });
  }
  return lineQuads(lines);
}

/** Quads of lines. */
export function lineQuads(lines: readonly LineSpec[]): LineQuads {
  const count = lines.reduce((sum, line) => sum + Math.max(0, line.points.length / 3 - 1), 0);
  const column = (size: number) => ({ size, values: new Float32Array(4 * count * size) });
  const columns = {
    aPoint: column(3),
    aBefore: column(3),
    aAfter: column(3),
    aLine: column(2),
    aRadius: column(1),
    aAlong: column(1),
  };
  const runs: { quad: number; count: number }[] = [];
  let quad = 0;
  for (const line of lines) {
    const segments = Math.max(0, line.points.length / 3 - 1);
    runs.push({ quad, count: segments });
    for (let k = 0; k < segments; k++, quad++) writeSegment(columns, quad, line, k, segments);
  }
  return { columns, index: quadIndex(count), runs };
}

interface Columns {
  readonly aPoint: { values: Float32Array };
  readonly aBefore: { values: Float32Array };
  readonly aAfter: { values: Float32Array };
  readonly aLine: { values: Float32Array };
  readonly aRadius: { values: Float32Array };
}

function writeSegment(columns: Columns, quad: number, line: LineSpec, k: number, segments: number): void {
  const { points } = line;
  const copy = (target: Float32Array, vertex: number, point: number): void => {
    for (let x = 0; x < 3; x++) target[3 * vertex + x] = points[3 * point + x];
  };
  for (let corner = 0; corner < 4; corner++) {
    const vertex = 4 * quad + corner;
    const point = corner < 2 ? k : k + 1;
    copy(columns.aPoint.values, vertex, point);
    copy(columns.aBefore.values, vertex, Math.max(0, point - 1));
    copy(columns.aAfter.values, vertex, Math.min(segments, point + 1));
    columns.aLine.values[2 * vertex] = line.width(k);
    columns.aLine.values[2 * vertex + 1] = line.style;
    columns.aRadius.values[vertex] = line.radius ? line.radius[point] : -1;
  }
}

/**
 * Measure the path length on the paper along every line of a style that has gaps, so that they keep their size in pixels from
 * any side.
 *
 * @param rotation Nine numbers of the view. @param scale Pixels per rim radius.
 * @returns Whether anything was measured; `aAlong` then has to be sent again.
 */
export function measureAlong(quads: LineQuads, rotation: ArrayLike<number>, scale: number): boolean {
  const points = quads.columns.aPoint.values;
  const look = quads.columns.aLine.values;
  const along = quads.columns.aAlong.values;
  const r = rotation;
  let measured = false;
  for (const { quad, count } of quads.runs) {
    if (count === 0 || !hasGaps(look[8 * quad + 1])) continue;
    measured = true;
    let sum = 0;
    for (let k = quad; k < quad + count; k++) {
      const a = 12 * k;
      const x = points[a + 6] - points[a];
      const y = points[a + 7] - points[a + 1];
      const z = points[a + 8] - points[a + 2];
      const right = r[0] * x + r[1] * y + r[2] * z;
      const up = r[3] * x + r[4] * y + r[5] * z;
      along[4 * k] = sum;
      along[4 * k + 1] = sum;
      sum += scale * Math.sqrt(right * right + up * up);
      along[4 * k + 2] = sum;
      along[4 * k + 3] = sum;
    }
  }
  return measured;
}

const hasGaps = (style: number): boolean =>
  style === LINE_STYLES.antiquark ||
  style === LINE_STYLES.partner ||
  style === LINE_STYLES.birth ||
  style === LINE_STYLES.silhouette ||
  style === LINE_STYLES.dotted;

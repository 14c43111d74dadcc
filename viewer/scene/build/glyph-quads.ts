import { type BallEvent, strandDirection } from '../../layout/index.ts';
import {
  arrowRadii,
  END_SHARE,
  lineWidth,
  rayStart,
  ringRadius,
  rowAt,
  styleOf,
  tickReach,
} from '../../marks/index.ts';
import { type Quads, quadIndex } from './quads.ts';

/** Codes by which the glyph shader knows how to draw. */
export const GLYPHS = {
  ring: 0,
  filled: 1,
  hollow: 2,
  gluonEnd: 3,
  dot: 4,
  tick: 5,
  centre: 6,
  tip: 7,
} as const;
/** Codes of tints in the glyph shader. */
export const GLYPH_TINTS = { quark: 0, antiquark: 1, gluon: 2, other: 3 } as const;

/**
 * A mark that stands at a place of the ball and keeps its size on the paper.
 *
 * It stands at `radius` on a turn (see Turns: direction, tangent, angle, begun, height), or moves along it with the current
 * shell where `radius` is −1, and is there while `from` <= shell < `until`; `ahead` says that it is drawn faintly before that.
 */
export interface Glyph {
  readonly glyph: number;
  readonly tint: number;
  readonly direction: ArrayLike<number>;
  readonly tangent: ArrayLike<number>;
  readonly angle: number;
  readonly begun: number;
  readonly height: number;
  readonly radius: number;
  readonly from: number;
  readonly until: number;
  readonly ahead: boolean;
  /** Radius and line width of a ring, length and half-breadth of a tip, reach of a tick [px at size 1]; arrowheads follow `line`. */
  readonly length: number;
  readonly breadth: number;
  /** Width of the line on which it stands [px at size 1]. */
  readonly line: number;
  /** Length of ray that must be visible for it to be drawn, in units of the rim's radius; 0: always drawn. */
  readonly ray: number;
}

const NOWHERE = [0, 0, 0];

/** A glyph that stands still at a direction and radius. */
export function still(direction: ArrayLike<number>, radius: number, own: Partial<Glyph>): Glyph {
  return {
    glyph: GLYPHS.ring,
    tint: GLYPH_TINTS.other,
    direction,
    tangent: NOWHERE,
    angle: 0,
    begun: 0,
    height: 0,
    radius,
    from: radius,
    until: Infinity,
    ahead: false,
    length: 0,
    breadth: 0,
    line: 0,
    ray: 0,
    ...own,
  };
}

/** All glyphs of an event: rings of branchings, arrowheads, ticks, moving ends, the dot of the hard process. */
export function eventGlyphs(event: BallEvent): Glyph[] {
  const glyphs: Glyph[] = [];
  const { strands } = event;
  for (let strand = 0; strand < strands.from.length; strand++) {
    glyphs.push(...arrowGlyphs(event, strand), ...endGlyphs(event, strand));
  }
  glyphs.push(...tickGlyphs(event));
  const radius = ringRadius(strands.stepRadius.length);
  for (let step = 0; step < strands.stepRadius.length; step++) {
    const direction = strands.stepDirection.slice(3 * step, 3 * step + 3);
    glyphs.push(
      still(direction, strands.stepRadius[step], {
        glyph: GLYPHS.ring,
        ahead: true,
        length: radius,
        breadth: 1.45,
      }),
    );
  }
  glyphs.push(still([0, 0, 1], 0, { glyph: GLYPHS.centre, from: -1, length: 4.4 }));
  return glyphs;
}

function arrowGlyphs(event: BallEvent, strand: number): Glyph[] {
  const { strands, history } = event;
  const { entries } = history;
  const style = styleOf(entries.id[strands.rows[strands.rowStart[strand]]]);
  if (style === 'gluon') return [];
  const begin = rayStart({ event }, strand);
  return arrowRadii(begin, strands.to[strand], style === 'other').map((radius) => {
    const direction = new Float64Array(3);
    strandDirection(direction, 0, strands, strand, radius);
    const width = lineWidth(style, entries.e[rowAt({ event }, strand, radius)], 1);
    if (style === 'other')
      return still(direction, radius, { glyph: GLYPHS.dot, ahead: true, length: 2, line: width });
    return still(direction, radius, {
      glyph: style === 'antiquark' ? GLYPHS.hollow : GLYPHS.filled,
      tint: GLYPH_TINTS[style],
      ahead: true,
      line: width,
      ray: strands.to[strand] - begin,
    });
  });
}

// An end moves along every turn of its strand; the row, and with it the width, changes with the recoils.
function endGlyphs(event: BallEvent, strand: number): Glyph[] {
  const { strands, history } = event;
  const { turns, turnStart, rowStart, rows, rowFrom } = strands;
  const glyphs: Glyph[] = [];
  for (let turn = turnStart[strand]; turn < turnStart[strand + 1]; turn++) {
    const turnEnd = turn + 1 < turnStart[strand + 1] ? turns.radius[turn + 1] : strands.until[strand];
    for (let k = rowStart[strand]; k < rowStart[strand + 1]; k++) {
      const row = rows[k];
      const from = Math.max(rowFrom[row], turns.radius[turn]);
      const until = Math.min(k + 1 < rowStart[strand + 1] ? rowFrom[rows[k + 1]] : Infinity, turnEnd);
      if (!(from < until)) continue;
      glyphs.push({
        ...still(
          turns.direction.slice(3 * turn, 3 * turn + 3),
          -1,
          endLook(history.entries.id[row], history.entries.e[row]),
        ),
        tangent: turns.tangent.slice(3 * turn, 3 * turn + 3),
        angle: turns.angle[turn],
        begun: turns.radius[turn],
        height: turns.height[turn],
        from,
        until,
      });
    }
  }
  return glyphs;
}

/** How the end of a parton's line is drawn. */
export function endLook(id: number, energy: number): Partial<Glyph> {
  const style = styleOf(id);
  const width = lineWidth(style, energy, 1);
  if (style === 'gluon') {
    return {
      glyph: GLYPHS.gluonEnd,
      tint: GLYPH_TINTS.gluon,
      length: 2.4 + 0.16 * width,
      breadth: 1.3,
      line: width,
    };
  }
  if (style === 'other') return { glyph: GLYPHS.dot, length: 2.2, line: width };
  return {
    glyph: style === 'antiquark' ? GLYPHS.hollow : GLYPHS.filled,
    tint: GLYPH_TINTS[style],
    line: END_SHARE * width,
  };
}

function tickGlyphs(event: BallEvent): Glyph[] {
  const { strands, history } = event;
  const { steps, entries } = history;
  const glyphs: Glyph[] = [];
  for (let step = 0; step < steps.length; step++) {
    const after = steps.recoilerAfter[step];
    const before = steps.recoiler[step];
    if (after < 0 || before < 0 || strands.ofRow[after] < 0) continue;
    const reach = tickReach(1 - entries.e[after] / entries.e[before], 1);
    if (!(reach > 0)) continue;
    const radius = strands.stepRadius[step];
    const direction = new Float64Array(3);
    strandDirection(direction, 0, strands, strands.ofRow[after], radius);
    const line = lineWidth(styleOf(entries.id[before]), entries.e[before], 1);
    glyphs.push(still(direction, radius, { glyph: GLYPHS.tick, length: reach, breadth: 1.25, line }));
  }
  return glyphs;
}

/**
 * Glyphs as quads. Columns: `aDirection`, `aTangent`, `aTurn` (angle, begun, height, radius), `aGlyph` (code, tint, length,
 * breadth), `aWhen` (from, until, ahead), `aLine` (line width, ray).
 */
export function glyphQuads(glyphs: readonly Glyph[]): Quads {
  const count = glyphs.length;
  const column = (size: number, values: (glyph: Glyph) => ArrayLike<number>) => {
    const out = new Float32Array(4 * count * size);
    glyphs.forEach((glyph, k) => {
      const own = values(glyph);
      for (let corner = 0; corner < 4; corner++) out.set(own, (4 * k + corner) * size);
    });
    return { size, values: out };
  };
  const finite = (value: number): number => Math.min(value, 1e6);
  return {
    columns: {
      aDirection: column(3, (g) => g.direction),
      aTangent: column(3, (g) => g.tangent),
      aTurn: column(4, (g) => [g.angle, g.begun, g.height, g.radius]),
      aGlyph: column(4, (g) => [g.glyph, g.tint, g.length, g.breadth]),
      aWhen: column(3, (g) => [g.from, finite(g.until), g.ahead ? 1 : 0]),
      aLine: column(2, (g) => [g.line, g.ray]),
    },
    index: quadIndex(count),
  };
}

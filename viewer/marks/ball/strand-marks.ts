import type { Mark, Polyline } from '../display-list.ts';
import {
  ANTIQUARK_DASH,
  depthFade,
  depthWidth,
  FUTURE,
  GLUON_LEAST,
  gluonRail,
  LIT_EDGE,
  lineWidth,
  type PartonStyle,
  styleOf,
  tintOf,
} from '../parton-style.ts';
import { mix } from '../tint.ts';
import type { Layer, Plate } from './plate.ts';

/** Longest piece of a line that is sorted by one depth, in units of the rim's radius. */
const PIECE = 0.12;

/** A piece of a strand on the paper, all of it on one side of the current shell. */
interface Piece {
  readonly row: number;
  readonly past: boolean;
  readonly points: number[];
  /** Path length on the paper from the strand's birth to the piece [px]. */
  readonly along: number;
  /** Depth of the first point, and the mean of first and last. */
  readonly first: number;
  depth: number;
}

/** The parton lines: what is to come (to be drawn first), and what has happened, both in pieces to be sorted by depth. */
export function strandLayers(plate: Plate): { future: Layer[]; past: Layer[] } {
  const future: Layer[] = [];
  const past: Layer[] = [];
  const { start } = plate.event.lines;
  for (let strand = 0; strand + 1 < start.length; strand++) {
    for (const piece of cutStrand(plate, strand)) {
      (piece.past ? past : future).push({ depth: piece.depth, marks: lineMarks(plate, piece) });
    }
  }
  return { future, past };
}

function cutStrand(plate: Plate, strand: number): Piece[] {
  const { event, points, shell } = plate;
  const { start, radius, row, position } = event.lines;
  const pieces: Piece[] = [];
  let along = 0;
  let open: Piece | null = null;
  let length = 0;
  for (let k = start[strand]; k + 1 < start[strand + 1]; k++) {
    for (const [a, b] of cutSegment(radius[k], radius[k + 1], shell, distance(position, 3 * k))) {
      const past = radius[k] + (radius[k + 1] - radius[k]) * ((a + b) / 2) <= shell;
      const from = between(points, 3 * k, a);
      const to = between(points, 3 * k, b);
      const pixels = span(to[0] - from[0], to[1] - from[1]);
      if (!open || open.row !== row[k] || open.past !== past || length > PIECE) {
        open = { row: row[k], past, points: [from[0], from[1]], along, first: from[2], depth: from[2] };
        pieces.push(open);
        length = 0;
      }
      open.points.push(to[0], to[1]);
      open.depth = (open.first + to[2]) / 2;
      length += distance(position, 3 * k) * (b - a);
      along += pixels;
    }
  }
  return pieces;
}

// Shares of a segment between cuts at the current shell and at most PIECE long.
function cutSegment(r0: number, r1: number, shell: number, length: number): [number, number][] {
  const cuts = [0, 1];
  if ((r0 - shell) * (r1 - shell) < 0) cuts.push((shell - r0) / (r1 - r0));
  const parts = Math.ceil(length / PIECE);
  for (let k = 1; k < parts; k++) cuts.push(k / parts);
  cuts.sort((a, b) => a - b);
  return cuts.slice(1).map((cut, k) => [cuts[k], cut]);
}

const span = (x: number, y: number): number => Math.sqrt(x * x + y * y);

function distance(position: Float64Array, at: number): number {
  const x = position[at + 3] - position[at];
  const y = position[at + 4] - position[at + 1];
  const z = position[at + 5] - position[at + 2];
  return Math.sqrt(x * x + y * y + z * z);
}

function between(points: Float64Array, at: number, share: number): [number, number, number] {
  const mixed = (k: number): number => points[at + k] + (points[at + k + 3] - points[at + k]) * share;
  return [mixed(0), mixed(1), mixed(2)];
}

function lineMarks(plate: Plate, piece: Piece): Mark[] {
  const { entries } = plate.event.history;
  const { palette } = plate;
  const { size } = plate.stage;
  const style = styleOf(entries.id[piece.row]);
  const paper = piece.past ? palette.lit : palette.shade;
  let width = lineWidth(style, entries.e[piece.row], size) * depthWidth(piece.depth);
  let tint = mix(tintOf(palette, style), paper, depthFade(piece.depth));
  if (!piece.past) {
    width = Math.max(width * FUTURE.width, style === 'gluon' ? GLUON_LEAST : 0.9);
    tint = mix(tintOf(palette, style), paper, FUTURE.fade);
  }
  return strokeLine(style, piece.points, {
    width,
    tint,
    paper,
    edge: LIT_EDGE * size,
    along: piece.along,
    size,
  });
}

/** How a parton's line looks on the paper [px]. */
export interface LineLook {
  readonly width: number;
  readonly tint: string;
  readonly paper: string;
  /** Width of the paper's edge on either side [px], 0 for none. */
  readonly edge: number;
  /** Path length before the first point [px], for the gaps of an antiquark. */
  readonly along: number;
  readonly size: number;
}

/** A line in a parton's style, on its edge of paper. */
export function strokeLine(style: PartonStyle, points: readonly number[], look: LineLook): Polyline[] {
  const { width, tint, paper, edge, along, size } = look;
  const line = (w: number, t: string): Polyline => ({
    kind: 'polyline',
    points,
    stroke: { tint: t, width: w },
  });
  const marks = edge > 0 ? [line(width + 2 * edge, paper)] : [];
  if (style === 'antiquark') {
    const dash = ANTIQUARK_DASH.map((length) => length * size);
    marks.push({
      kind: 'polyline',
      points,
      stroke: { tint, width, dash, offset: along % (dash[0] + dash[1]) },
    });
  } else {
    marks.push(line(width, tint));
    if (style === 'gluon') marks.push(line(Math.max(0.9, width - 2 * gluonRail(width)), paper));
  }
  return marks;
}

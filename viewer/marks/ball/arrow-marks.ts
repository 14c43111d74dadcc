import { strandDirection } from '../../layout/index.ts';
import type { Mark } from '../display-list.ts';
import {
  arrowhead,
  depthFade,
  depthWidth,
  END_SHARE,
  FUTURE,
  LIT_EDGE,
  lineWidth,
  styleOf,
  tickReach,
  tintOf,
} from '../parton-style.ts';
import { mix } from '../tint.ts';
import { type Layer, type Plate, place, SAME_RADIUS } from './plate.ts';

/** Length of ray that gets one arrowhead, in units of the rim's radius. */
const ARROW_EVERY = 0.42;

/** Radii of the arrowheads (a parton of no known style: of the dots) of a strand; none where its ray is too short. */
export function arrowRadii(rayFrom: number, rayTo: number, other: boolean): number[] {
  const length = rayTo - rayFrom;
  if (other) return [0.25, 0.5, 0.75].map((share) => rayFrom + share * length);
  const count = Math.max(1, Math.min(3, Math.round(length / ARROW_EVERY)));
  return Array.from({ length: count }, (_, k) => rayFrom + (length * (k + 0.5)) / count);
}

/** Where the last turn of a strand is complete and its ray begins. */
export function rayStart(plate: { event: Plate['event'] }, strand: number): number {
  const { turns, turnStart } = plate.event.strands;
  const turn = turnStart[strand + 1] - 1;
  return turns.radius[turn] + turns.height[turn];
}

/** Row of a strand that holds at a radius. */
export function rowAt(plate: { event: Plate['event'] }, strand: number, radius: number): number {
  const { rowStart, rows, rowFrom } = plate.event.strands;
  let k = rowStart[strand];
  while (k + 1 < rowStart[strand + 1] && rowFrom[rows[k + 1]] <= radius) k++;
  return rows[k];
}

/** Arrowheads along the lines of quarks, dots along those of other partons. */
export function arrowLayers(plate: Plate): { future: Layer[]; past: Layer[] } {
  const future: Layer[] = [];
  const past: Layer[] = [];
  const { strands, history } = plate.event;
  for (let strand = 0; strand < strands.from.length; strand++) {
    const style = styleOf(history.entries.id[strands.rows[strands.rowStart[strand]]]);
    if (style === 'gluon') continue;
    const from = rayStart(plate, strand);
    for (const radius of arrowRadii(from, strands.to[strand], style === 'other')) {
      const happened = radius <= plate.shell;
      const layer = arrowAt(plate, strand, radius, from, happened);
      if (layer) (happened ? past : future).push(layer);
    }
  }
  return { future, past };
}

function arrowAt(
  plate: Plate,
  strand: number,
  radius: number,
  from: number,
  happened: boolean,
): Layer | null {
  const { event, palette, projection } = plate;
  const { size } = plate.stage;
  const { entries } = event.history;
  const direction = new Float64Array(3);
  strandDirection(direction, 0, event.strands, strand, radius);
  const [x, y, depth] = place(plate, direction, radius);
  const row = rowAt(plate, strand, radius);
  const style = styleOf(entries.id[row]);
  const paper = happened ? palette.lit : palette.shade;
  const width = lineWidth(style, entries.e[row], size) * depthWidth(depth) * (happened ? 1 : FUTURE.width);
  const tint = mix(tintOf(palette, style), paper, happened ? depthFade(depth) : FUTURE.fade);
  if (style === 'other') {
    return { depth: depth + 0.075, marks: [{ kind: 'circle', x, y, radius: 2 * size, fill: { tint } }] };
  }
  const slope = radialSlope(plate, direction);
  const head = arrowhead(width, size);
  // Seen along the line an arrowhead says nothing, and a ray shorter than three of them has no room.
  if (slope.length * projection.scale * (event.strands.to[strand] - from) < 2.2 * head.length) return null;
  const sign = style === 'antiquark' ? -1 : 1;
  return {
    depth: depth + 0.075,
    marks: triangle(x, y, sign * slope.x, sign * slope.y, head, style === 'antiquark', {
      tint,
      paper,
      edge: happened ? LIT_EDGE * size : 0,
      width: 1.25 * size,
    }),
  };
}

/** Direction outward on the paper along a direction of the ball, and how much of it lies in the paper. */
export function radialSlope(
  plate: Plate,
  direction: ArrayLike<number>,
): { x: number; y: number; length: number } {
  const r = plate.projection.rotation;
  const x = r[0] * direction[0] + r[1] * direction[1] + r[2] * direction[2];
  const y = -(r[3] * direction[0] + r[4] * direction[1] + r[5] * direction[2]);
  const length = Math.sqrt(x * x + y * y);
  return length > 1e-6 ? { x: x / length, y: y / length, length } : { x: 0, y: -1, length: 0 };
}

interface TriangleLook {
  readonly tint: string;
  readonly paper: string;
  readonly edge: number;
  readonly width: number;
}

/** A triangle centred at (x, y) that points along (ux, uy): filled, or hollow on paper. */
export function triangle(
  x: number,
  y: number,
  ux: number,
  uy: number,
  head: { length: number; half: number },
  hollow: boolean,
  look: TriangleLook,
): Mark[] {
  const { length, half } = head;
  const points = [
    x + 0.5 * length * ux,
    y + 0.5 * length * uy,
    x - 0.5 * length * ux - half * uy,
    y - 0.5 * length * uy + half * ux,
    x - 0.5 * length * ux + half * uy,
    y - 0.5 * length * uy - half * ux,
  ];
  const marks: Mark[] = [];
  if (look.edge > 0) {
    const width = 2 * look.edge + (hollow ? look.width : 0);
    marks.push({ kind: 'polyline', points, closed: true, stroke: { tint: look.paper, width } });
  }
  marks.push(
    hollow
      ? {
          kind: 'polyline',
          points,
          closed: true,
          fill: { tint: look.paper },
          stroke: { tint: look.tint, width: look.width },
        }
      : { kind: 'polyline', points, closed: true, fill: { tint: look.tint } },
  );
  return marks;
}

/** Cross ticks on partners that paid energy, where the payment has been made. */
export function tickLayers(plate: Plate): Layer[] {
  const { event, palette, shell } = plate;
  const { strands, history } = event;
  const { entries, steps } = history;
  const { size } = plate.stage;
  const layers: Layer[] = [];
  for (let step = 0; step < steps.length; step++) {
    const radius = strands.stepRadius[step];
    const after = steps.recoilerAfter[step];
    const before = steps.recoiler[step];
    if (radius > shell + SAME_RADIUS || after < 0 || before < 0 || strands.ofRow[after] < 0) continue;
    const reach = tickReach(1 - entries.e[after] / entries.e[before], size);
    if (!(reach > 0)) continue;
    const direction = new Float64Array(3);
    strandDirection(direction, 0, strands, strands.ofRow[after], radius);
    const [x, y, depth] = place(plate, direction, radius);
    const slope = radialSlope(plate, direction);
    const half =
      reach + (lineWidth(styleOf(entries.id[before]), entries.e[before], size) * depthWidth(depth)) / 2;
    const points = [x - half * slope.y, y + half * slope.x, x + half * slope.y, y - half * slope.x];
    const tint = mix(palette.ink, palette.lit, depthFade(depth));
    layers.push({
      depth: depth + 0.08,
      marks: [
        { kind: 'polyline', points, stroke: { tint: palette.lit, width: (1.25 + 2 * 1) * size } },
        { kind: 'polyline', points, stroke: { tint, width: 1.25 * size } },
      ],
    });
  }
  return layers;
}

/** Marks of the partons alive at the ends of their lines on the current shell: triangles, rings, dots. */
export function endLayers(plate: Plate): Layer[] {
  const { strands } = plate.event;
  const layers: Layer[] = [];
  const direction = new Float64Array(3);
  for (let strand = 0; strand < strands.from.length; strand++) {
    if (
      strands.from[strand] > plate.shell + SAME_RADIUS ||
      plate.shell + SAME_RADIUS >= strands.until[strand]
    )
      continue;
    strandDirection(direction, 0, strands, strand, plate.shell);
    layers.push(endMark(plate, rowAt(plate, strand, plate.shell + SAME_RADIUS), direction, plate.shell));
  }
  return layers;
}

/** The mark at the end of a parton's line: its row, and where on which shell. */
export function endMark(plate: Plate, row: number, direction: ArrayLike<number>, radius: number): Layer {
  const { palette, event } = plate;
  const { size } = plate.stage;
  const { id, e } = event.history.entries;
  const style = styleOf(id[row]);
  const [x, y, depth] = place(plate, direction, radius);
  const tint = mix(tintOf(palette, style), palette.lit, depthFade(depth));
  const width = lineWidth(style, e[row], size) * depthWidth(depth);
  if (style === 'gluon') {
    const ring = { tint, width: 1.3 * size };
    const edge = { tint: palette.lit, width: 3.2 * size };
    const r = (2.4 + 0.16 * width) * size;
    return {
      depth: depth + 0.085,
      marks: [
        { kind: 'circle', x, y, radius: r, stroke: edge },
        { kind: 'circle', x, y, radius: r, fill: { tint: palette.lit }, stroke: ring },
      ],
    };
  }
  if (style === 'other') {
    return { depth: depth + 0.085, marks: [{ kind: 'circle', x, y, radius: 2.2 * size, fill: { tint } }] };
  }
  const slope = radialSlope(plate, direction);
  const anti = style === 'antiquark';
  const sign = anti ? -1 : 1;
  return {
    depth: depth + 0.085,
    marks: triangle(x, y, sign * slope.x, sign * slope.y, arrowhead(END_SHARE * width, size), anti, {
      tint,
      paper: palette.lit,
      edge: LIT_EDGE * size,
      width: 1.25 * size,
    }),
  };
}

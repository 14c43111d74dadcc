import { PI } from '../../../engine/index.ts';
import { atan2, cos, sin } from '../../../engine/math/index.ts';
import {
  type Cone,
  coneSilhouette,
  greatCircle,
  onCircle,
  projectPoints,
  type Ring,
  ringPoints,
} from '../../layout/index.ts';
import type { Mark, Stroke } from '../display-list.ts';
import { luminous, type Palette } from '../palette.ts';
import { LIT_EDGE } from '../parton-style.ts';
import { mix } from '../tint.ts';
import { endMark } from './arrow-marks.ts';
import { splitFront } from './ground.ts';
import { type Layer, type Plate, place } from './plate.ts';

/** Points of a drawn ring, less one. */
export const RING_PIECES = 96;

/** Dashes of the three rings [px at size 1]: solid, dashed, dash-dotted. */
export const RING_DASH: Readonly<Record<Ring['kind'], readonly number[]>> = {
  opening: [],
  partner: [7, 4],
  birth: [8, 3.2, 1.4, 3.2],
};

/** Length of the arrowhead of the emitter's turn [px at size 1]. */
export const TIP_LENGTH = 8;

/** Width of a ring's line [px at size 1], and how far its far half is blended towards the paper. */
export const RING = { opening: 1.7, partner: 1.4, birth: 1.3, behindFade: 0.58 } as const;

/**
 * How strongly the wash lies on a cap: less in the dark, where it is a light, and less the more of the ball the cap covers, down to
 * nothing at a right angle, from where on only the ring stays. The partner's lies over the opening's, so that both show.
 */
export function washShare(palette: Palette, ring: Ring): number {
  if (ring.kind === 'birth') return 0;
  const full = luminous(palette) ? 0.17 : 0.09;
  return full * Math.max(0, Math.min(1, (PI / 2 - ring.angle) / (PI / 2 - 0.9)));
}

/** The wash of a selection: inside the opening ring, once more inside the partner ring; none where a ring opens past pi/2. */
export function washMarks(plate: Plate): Mark[] {
  const { cone, palette } = plate;
  if (!cone) return [];
  return cone.rings.flatMap((ring): Mark[] => {
    const opacity = washShare(palette, ring);
    if (opacity === 0) return [];
    return [
      {
        kind: 'region',
        loops: [capOutline(plate, ring, cone.radius)],
        fill: { tint: palette.wash, opacity },
      },
    ];
  });
}

// What a cap covers on the paper: its ring where it faces as its axis does, closed along the limb where it crosses that.
function capOutline(plate: Plate, ring: Ring, radius: number): number[] {
  const points = ringPoints(ring.axis, ring.angle, RING_PIECES).map((value) => value * radius);
  projectPoints(points, plate.projection, points);
  const axis = place(plate, ring.axis, radius);
  const crosses = points.some((value, k) => k % 3 === 2 && value * axis[2] < 0);
  if (!crosses) {
    const outline: number[] = [];
    for (let k = 0; k + 3 < points.length; k += 3) outline.push(points[k], points[k + 1]);
    return outline;
  }
  const arcs = splitFront(points, axis[2] < 0 ? -1 : 1);
  // The stretch may begin in the middle of the list of points: then its two parts are one.
  const [first, ...rest] = arcs;
  const arc = rest.length > 0 ? [...rest[0], ...first] : first;
  return closeAlongLimb(plate, arc ?? [], axis, radius);
}

function closeAlongLimb(plate: Plate, arc: number[], axis: readonly number[], radius: number): number[] {
  const { x, y, scale } = plate.projection;
  const angleOf = (px: number, py: number): number => atan2(py - y, px - x);
  const from = angleOf(arc[arc.length - 2], arc[arc.length - 1]);
  const to = angleOf(arc[0], arc[1]);
  const middle = angleOf(axis[0], axis[1]);
  const turn = (angle: number): number => angle - 2 * PI * Math.floor(angle / (2 * PI));
  // Along the limb on the side on which the axis lies.
  const forward = turn(middle - from) <= turn(to - from);
  const sweep = forward ? turn(to - from) : -turn(from - to);
  const pieces = Math.max(2, Math.ceil(Math.abs(sweep) / 0.05));
  const outline = [...arc];
  for (let k = 1; k < pieces; k++) {
    const angle = from + (sweep * k) / pieces;
    outline.push(x + radius * scale * cos(angle), y + radius * scale * sin(angle));
  }
  return outline;
}

/** Rings, the cone's silhouette, the emitter's turn and the three ends of the selected step, in pieces sorted by depth. */
export function coneLayers(plate: Plate): Layer[] {
  const { cone } = plate;
  if (!cone) return [];
  return [
    ...cone.rings.flatMap((ring) => ringLayers(plate, ring, cone.radius)),
    ...silhouetteLayers(plate, cone),
    ...turnLayers(plate, cone),
    ...endsOf(plate, cone).map(({ row, direction }) => endMark(plate, row, direction, cone.radius)),
  ];
}

/** Rows and directions of i, j and k of the selected step, as far as they are there. */
export function endsOf(
  plate: Pick<Plate, 'event'>,
  cone: Cone,
): { name: 'i' | 'j' | 'k'; row: number; direction: Float64Array }[] {
  const { steps } = plate.event.history;
  const { step } = cone;
  const k = steps.recoilerAfter[step] >= 0 ? steps.recoilerAfter[step] : steps.partner[step];
  return [
    { name: 'i' as const, row: steps.i[step], direction: cone.i },
    { name: 'j' as const, row: steps.j[step], direction: cone.j },
    { name: 'k' as const, row: k, direction: cone.k },
  ].flatMap(({ name, row, direction }) => (direction && row >= 0 ? [{ name, row, direction }] : []));
}

function ringLayers(plate: Plate, ring: Ring, radius: number): Layer[] {
  const { palette, projection } = plate;
  const { size } = plate.stage;
  const points = ringPoints(ring.axis, ring.angle, RING_PIECES).map((value) => value * radius);
  projectPoints(points, projection, points);
  const dash = RING_DASH[ring.kind].map((length) => length * size);
  const pattern = dash.reduce((sum, length) => sum + length, 0);
  const layers: Layer[] = [];
  let along = 0;
  const EACH = 4;
  for (let k = 0; k < RING_PIECES; k += EACH) {
    const line: number[] = [];
    let depth = -1;
    let length = 0;
    for (let n = k; n <= k + EACH; n++) {
      line.push(points[3 * n], points[3 * n + 1]);
      depth = Math.max(depth, points[3 * n + 2]);
      if (n === k) continue;
      const dx = points[3 * n] - points[3 * n - 3];
      const dy = points[3 * n + 1] - points[3 * n - 2];
      length += Math.sqrt(dx * dx + dy * dy);
    }
    const behind = points[3 * (k + EACH / 2) + 2] < 0;
    const stroke: Stroke = {
      tint: behind ? mix(palette.ink, palette.lit, RING.behindFade) : palette.ink,
      width: RING[ring.kind] * size * (behind ? 0.85 : 1),
      ...(dash.length > 0 ? { dash, offset: along % pattern } : {}),
    };
    along += length;
    layers.push({ depth: depth - 0.002, marks: [{ kind: 'polyline', points: line, stroke }] });
  }
  return layers;
}

function silhouetteLayers(plate: Plate, cone: Cone): Layer[] {
  const ring = cone.rings.find(({ kind }) => kind === 'opening');
  if (!ring) return [];
  const { palette, projection } = plate;
  const ends = coneSilhouette(ring.axis, ring.angle, projection.rotation.subarray(6, 9));
  if (!ends) return [];
  const stroke = {
    tint: mix(palette.ink, palette.lit, 0.45),
    width: 0.9 * plate.stage.size,
    dash: [6 * plate.stage.size, 4 * plate.stage.size],
  };
  return [0, 3].map((k) => {
    const [x, y, depth] = place(plate, ends.subarray(k, k + 3), cone.radius);
    return {
      depth: depth / 2,
      marks: [{ kind: 'polyline' as const, points: [projection.x, projection.y, x, y], stroke }],
    };
  });
}

// An arrow along the shell from the branching to i.
function turnLayers(plate: Plate, cone: Cone): Layer[] {
  if (!cone.i) return [];
  const { palette } = plate;
  const { size } = plate.stage;
  const points = turnPath(cone, plate.projection.scale, size);
  projectPoints(points, plate.projection, points);
  const count = points.length / 3;
  if (count < 2) return [];
  const line: number[] = [];
  let depth = -1;
  for (let k = 0; k < count; k++) {
    line.push(points[3 * k], points[3 * k + 1]);
    depth = Math.max(depth, points[3 * k + 2]);
  }
  const end = line.slice(-4);
  const dx = end[2] - end[0];
  const dy = end[3] - end[1];
  const length = Math.sqrt(dx * dx + dy * dy) || 1;
  const head = TIP_LENGTH * size;
  const [ux, uy] = [dx / length, dy / length];
  const tip = [end[2], end[3]];
  const width = 1.9 * size;
  return [
    {
      depth: depth + 0.0035,
      marks: [
        {
          kind: 'polyline',
          points: line,
          stroke: { tint: palette.lit, width: width + 2.4 * LIT_EDGE * size },
        },
        { kind: 'polyline', points: line.slice(0, -2), stroke: { tint: palette.ink, width } },
        {
          kind: 'polyline',
          closed: true,
          fill: { tint: palette.ink },
          points: [
            tip[0],
            tip[1],
            tip[0] - head * ux - 0.42 * head * uy,
            tip[1] - head * uy + 0.42 * head * ux,
            tip[0] - head * ux + 0.42 * head * uy,
            tip[1] - head * uy - 0.42 * head * ux,
          ],
        },
      ],
    },
  ];
}

/**
 * Points of the arrow for the emitter's turn, in units of the rim's radius: along the great circle from the edge of the
 * selected branching's mark to just short of i's own; empty where there is no room between the two.
 *
 * @param scale Pixels per rim radius.
 */
export function turnPath(cone: Cone, scale: number, size: number): Float64Array {
  if (!cone.i) return new Float64Array(0);
  const tangent = new Float64Array(3);
  const angle = greatCircle(tangent, 0, cone.emitter, 0, cone.i, 0);
  const pixels = cone.radius * scale;
  if (angle * pixels < 26 * size) return new Float64Array(0);
  const from = (9.5 * size) / pixels;
  const tip = angle - (5.5 * size) / pixels;
  // The last piece is the middle of the head, which the line need not reach through.
  const to = tip - (TIP_LENGTH * 0.6 * size) / pixels;
  const pieces = Math.max(6, Math.ceil((to - from) / 0.03));
  const points = new Float64Array(3 * (pieces + 2));
  for (let k = 0; k <= pieces + 1; k++) {
    const at = k > pieces ? tip : from + ((to - from) * k) / pieces;
    onCircle(points, 3 * k, cone.emitter, 0, tangent, 0, at);
    for (let n = 0; n < 3; n++) points[3 * k + n] *= cone.radius;
  }
  return points;
}

import { PI } from '../../../engine/index.ts';
import { cos, sin } from '../../../engine/math/index.ts';
import {
  projectPoints,
  ringPoints,
  rootScaleAt,
  scaleText,
  shells,
  threeDigits,
} from '../../layout/index.ts';
import type { ArcText, Halo, Mark, Text } from '../display-list.ts';
import { plain, type Run, runs } from '../lettering.ts';
import { widthOf } from '../text-width.ts';
import { endsOf } from './cone-marks.ts';
import { cornerMarks, type KeyFold, keyMarks, stepName } from './corners.ts';
import { SHELL_GAP } from './ground.ts';
import { CAPITAL, letterSize } from './letter-size.ts';
import { type Box, boxAt, LabelGrid, type LabelWish, placeLabels } from './place-labels.ts';
import { type Plate, place, SAME_RADIUS } from './plate.ts';
import { ringRadius } from './step-marks.ts';

/** What labels need besides the plate. */
export interface LabelOptions {
  /** Whether the keys in the lower corners are open; null where they are left out. */
  readonly keys: KeyFold | null;
  /** Corner texts that name the ball and say where the clock stands. */
  readonly corners: boolean;
  /** Places in the last picture, by key, to be kept where they are still good. */
  readonly before?: ReadonlyMap<string, number>;
  /** Places to be used as they are: nothing but the clock has changed. */
  readonly fixed?: ReadonlyMap<string, number>;
  /** Room left under the keys [px]. */
  readonly foot?: number;
  /** Most steps that are numbered, all where absent: fewer while the ball is turned, so that it turns smoothly. */
  readonly most?: number;
}

/** The lettering of a plate: what changes with the clock alone, apart from the rest. */
export interface Lettering {
  readonly still: Mark[];
  readonly clock: Mark[];
  readonly places: ReadonlyMap<string, number>;
}

/** All lettering of the ball, no label over another. */
export function letter(plate: Plate, options: LabelOptions): Lettering {
  const { width, height } = plate.stage;
  const corners = options.corners ? cornerMarks(plate) : { still: [], clock: [] };
  const keys = options.keys ? keyMarks(plate, options.keys, options.foot ?? 0) : [];
  const labels = [
    ...letterWishes(plate),
    ...angleWishes(plate),
    ...stepWishes(plate, options.most ?? Infinity),
  ];
  let places = options.fixed;
  let shellLabels = shellLabelsOf(plate, places?.get(RAY) ?? 0);
  if (!places) {
    const grid = new LabelGrid(width, height);
    spreadInk(grid, plate);
    for (const mark of [...corners.still, ...corners.clock, ...keys]) {
      for (const box of boxesOf(mark)) grid.take(box);
    }
    for (const box of [...arcBoxes(rimName(plate)), ...arcBoxes(shellName(plate))]) grid.take(box);
    const ray = freestRay(plate, grid, options.before?.get(RAY));
    shellLabels = shellLabelsOf(plate, ray);
    const found = placeLabels(
      grid,
      [...shellLabels, ...labels].map(({ wish }) => wish),
      options.before,
    );
    places = found.set(RAY, ray);
  }
  return {
    still: [
      ...corners.still,
      ...keys,
      rimName(plate),
      ...drawLabels(plate, [...shellLabels, ...labels], places),
    ],
    clock: [...corners.clock, shellName(plate)],
    places,
  };
}

function drawLabels(plate: Plate, labels: readonly Label[], places: ReadonlyMap<string, number>): Mark[] {
  return labels.flatMap((label) => {
    const at = places.get(label.wish.key);
    return at === undefined || label.unseen ? [] : drawLabel(plate, label, at);
  });
}

/** The lettering that follows the clock while nothing else changes. */
export function letterClock(plate: Plate, corners: boolean): Mark[] {
  return [...(corners ? cornerMarks(plate).clock : []), shellName(plate)];
}

interface Label {
  readonly wish: LabelWish;
  readonly runs: readonly Run[];
  readonly size: number;
  readonly tint: string;
  readonly paper: string;
  /** Whether a line leads from the mark to the label. */
  readonly leader?: boolean;
  /** Keeps its place free without being drawn. */
  readonly unseen?: boolean;
}

function drawLabel(plate: Plate, label: Label, at: number): Mark[] {
  const box = boxAt(label.wish, at);
  const halo: Halo = { tint: label.paper, width: 2.2 };
  const text: Text = {
    kind: 'text',
    x: box.x,
    y: box.y + box.height / 2 + (CAPITAL * label.size) / 2,
    runs: label.runs,
    size: label.size,
    tint: label.tint,
    anchor: 'start',
    halo,
  };
  if (!label.leader) return [text];
  const { x, y } = label.wish;
  const toX = Math.max(box.x, Math.min(box.x + box.width, x));
  const toY = Math.max(box.y, Math.min(box.y + box.height, y));
  const stroke = { tint: plate.palette.ink, width: 1.1 * plate.stage.size };
  return [{ kind: 'polyline', points: [x, y, toX, toY], stroke }, text];
}

function spreadInk(grid: LabelGrid, plate: Plate): void {
  const { points, steps, shell } = plate;
  const { start, radius } = plate.event.lines;
  for (let strand = 0; strand + 1 < start.length; strand++) {
    for (let k = start[strand]; k + 1 < start[strand + 1]; k++) {
      const p = 3 * k;
      grid.inkLine(points[p], points[p + 1], points[p + 3], points[p + 4], radius[k] <= shell ? 1 : 0.4);
    }
  }
  const r = ringRadius(steps.length / 3) * plate.stage.size;
  for (let k = 0; k < steps.length; k += 3) {
    for (const dy of [-0.7 * r, 0, 0.7 * r]) {
      grid.inkLine(steps[k] - r, steps[k + 1] + dy, steps[k] + r, steps[k + 1] + dy, 6);
    }
  }
  for (const ring of plate.cone?.rings ?? []) {
    const line = ringPoints(ring.axis, ring.angle, 48).map((value) => value * plate.cone!.radius);
    projectPoints(line, plate.projection, line);
    for (let k = 0; k + 3 < line.length; k += 3) {
      if (line[k + 2] > -0.1) grid.inkLine(line[k], line[k + 1], line[k + 3], line[k + 4], 1.5);
    }
  }
  const { x, y, scale } = plate.projection;
  for (let k = 0; k + 3 < CIRCLE.length; k += 3) {
    const s = shell * scale;
    grid.inkLine(x + s * CIRCLE[k], y + s * CIRCLE[k + 1], x + s * CIRCLE[k + 3], y + s * CIRCLE[k + 4], 2);
  }
}

const CIRCLE = ringPoints([0, 0, 1], PI / 2, 120);

// Boxes along a text on a curve, one every 12 px.
function arcBoxes(mark: ArcText): Box[] {
  const length = widthOf(mark.runs, mark.size);
  const count = Math.ceil(length / 12);
  const side = 1.2 * mark.size;
  const middle = mark.radius + CAPITAL * 0.5 * mark.size;
  return Array.from({ length: count }, (_, k) => {
    const angle = mark.angle + (((k + 0.5) / count - 0.5) * length) / mark.radius;
    return {
      x: mark.x + middle * cos(angle) - side / 2,
      y: mark.y + middle * sin(angle) - side / 2,
      width: side,
      height: side,
    };
  });
}

/** Boxes that a mark of lettering covers; shapes cover nothing. */
export function boxesOf(mark: Mark): Box[] {
  if (mark.kind === 'group') return mark.marks.flatMap(boxesOf);
  if (mark.kind !== 'text') return [];
  const width = widthOf(mark.runs, mark.size);
  const x = mark.x - (mark.anchor === 'start' ? 0 : mark.anchor === 'end' ? width : width / 2);
  return [{ x: x - 2, y: mark.y - 0.85 * mark.size, width: width + 4, height: 1.1 * mark.size }];
}

/** Key under which the places hold the ray that carries the shells' labels. */
const RAY = 'ray';
// Angles of the rays from upright [rad], rightward positive, in order of preference.
const RAYS = [0, 0.2, -0.2, 0.4, -0.4, 0.62, -0.62, 0.85, -0.85, 1.1, -1.1].map((angle) => ({
  x: sin(angle),
  y: cos(angle),
}));

// Labels of all shells stand on one ray; on the one where they cover least.
function freestRay(plate: Plate, grid: LabelGrid, before: number | undefined): number {
  let best = 0;
  let least = Infinity;
  RAYS.forEach((_, ray) => {
    let cost = ray === before ? -12 : 2.5 * ray;
    for (const { wish } of shellLabelsOf(plate, ray)) cost += Math.min(60, grid.cost(boxAt(wish, 0)));
    if (cost >= least) return;
    least = cost;
    best = ray;
  });
  return best;
}

function shellLabelsOf(plate: Plate, ray: number): Label[] {
  const { palette, projection, shell } = plate;
  const { x, y, scale } = projection;
  const size = letterSize(plate.stage.size);
  return shells(plate.event.strands.scale, SHELL_GAP / scale).map(({ value, radius }) => {
    const line = plain(`${scaleText(value)} GeV`);
    const inside = radius <= shell;
    return {
      wish: {
        key: `shell ${value}`,
        x: x + radius * scale * RAYS[ray].x,
        y: y - radius * scale * RAYS[ray].y,
        clearance: 0,
        width: widthOf(line, size),
        height: CAPITAL * size + 2,
        must: true,
        centred: true,
      },
      runs: line,
      size,
      // The line of the current shell would strike its label through, and that shell is named along its curve.
      unseen: Math.abs(radius - shell) * scale < 0.6 * size,
      tint: inside ? palette.second : palette.faint,
      paper: inside ? palette.lit : palette.shade,
    };
  });
}

// Names stand on the left, the rim's below the middle and the shell's above it, so that they cannot meet.
const SHELL_NAME_ANGLE = PI + 0.42;
const RIM_NAME_ANGLE = PI - 0.14;

function rimName(plate: Plate): ArcText {
  const { palette, projection } = plate;
  const { head } = plate.event.history;
  const { scale } = plate.event.strands;
  const value = scaleText(rootScaleAt(scale, scale.end));
  // In kT ordering the clock ends at the cutoff itself, in other orderings where the cutoff lets nothing through any more.
  const reached = Math.abs(rootScaleAt(scale, scale.end) / Math.sqrt(head.cutoff) - 1) < 1e-9;
  const size = letterSize(plate.stage.size);
  return {
    kind: 'arcText',
    x: projection.x,
    y: projection.y,
    radius: projection.scale + 0.42 * size,
    angle: RIM_NAME_ANGLE,
    runs: runs(`rim  √*t* = ${value} GeV${reached ? ', cutoff' : ''}`),
    size,
    tint: palette.second,
    halo: { tint: palette.ground, width: 2 },
  };
}

function shellName(plate: Plate): ArcText {
  const { palette, projection, shell } = plate;
  const { scale } = plate.event.strands;
  const size = letterSize(plate.stage.size);
  const outside = shell * projection.scale + 0.42 * size;
  const radius = Math.max(outside, 34);
  return {
    kind: 'arcText',
    x: projection.x,
    y: projection.y,
    radius,
    // Half a turn at most: on a small shell the name stands at the top.
    angle: SHELL_NAME_ANGLE + Math.max(0, Math.min(PI / 2 - 0.42, 26 / radius)),
    runs: runs(`now  √*t* = ${threeDigits(rootScaleAt(scale, plate.time))} GeV`, true),
    size,
    tint: palette.ink,
    halo: { tint: palette.shade, width: 2.2 },
  };
}

function letterWishes(plate: Plate): Label[] {
  const { cone, palette } = plate;
  if (!cone) return [];
  const size = 1.36 * letterSize(plate.stage.size);
  return endsOf(plate, cone).map(({ name, direction }) => {
    const [x, y] = place(plate, direction, cone.radius);
    const line: Run[] = [{ text: name, face: 'symbolBold' }];
    return {
      wish: {
        key: `end ${name}`,
        x,
        y,
        clearance: 6.5 * plate.stage.size,
        width: widthOf(line, size),
        height: 0.85 * size,
        must: true,
      },
      runs: line,
      size,
      tint: palette.ink,
      paper: palette.lit,
    };
  });
}

const RING_NAMES = { opening: '*θ*', partner: '*θ*_{partner}', birth: '*θ*_{birth}' } as const;

function angleWishes(plate: Plate): Label[] {
  const { cone, palette } = plate;
  if (!cone) return [];
  const size = 1.12 * letterSize(plate.stage.size);
  return cone.rings.flatMap((ring) => {
    const at = labelPoint(plate, ring.axis, ring.angle, cone.radius);
    if (!at) return [];
    const line = runs(`${RING_NAMES[ring.kind]} = ${threeDigits(ring.angle)} rad`, ring.kind !== 'birth');
    return [
      {
        wish: {
          key: `angle ${ring.kind}`,
          ...at,
          clearance: 13 * plate.stage.size,
          width: widthOf(line, size),
          height: 0.95 * size,
          must: ring.kind === 'opening',
        },
        runs: line,
        size,
        tint: palette.ink,
        paper: palette.lit,
        leader: true,
      },
    ];
  });
}

// The point of the ring that is farthest up on the paper, on its near half where it has one.
function labelPoint(
  plate: Plate,
  axis: Float64Array,
  angle: number,
  radius: number,
): { x: number; y: number } | null {
  const points = ringPoints(axis, angle, 48).map((value) => value * radius);
  projectPoints(points, plate.projection, points);
  const { width, height } = plate.stage;
  let best: { x: number; y: number } | null = null;
  let most = -Infinity;
  for (let k = 0; k < points.length; k += 3) {
    const [x, y, depth] = points.subarray(k, k + 3);
    if (x < 0 || y < 0 || x > width || y > height) continue;
    const worth = -y / height + (depth > -0.02 ? 1 : 0);
    if (worth <= most) continue;
    most = worth;
    best = { x, y };
  }
  return best;
}

// In events with more steps those to come have a place but no number yet: nobody looks for one among hundreds.
const MOST_AHEAD = 60;

function stepWishes(plate: Plate, most: number): Label[] {
  const { palette, steps, cone, hover, shell } = plate;
  const { stepRadius } = plate.event.strands;
  const count = stepRadius.length;
  const first = [cone?.step ?? -1, hover].filter(
    (step, k, all) => step >= 0 && step < count && all.indexOf(step) === k,
  );
  const order = [...first];
  for (let step = 0; step < count; step++) if (!first.includes(step)) order.push(step);
  return order.slice(0, most).map((step) => {
    const chosen = step === cone?.step;
    const past = stepRadius[step] <= shell + SAME_RADIUS;
    const line = plain(stepName(step), chosen || step === hover);
    const size = letterSize(plate.stage.size) * (chosen ? 1.1 : 1);
    return {
      wish: {
        key: `step ${step}`,
        x: steps[3 * step],
        y: steps[3 * step + 1],
        clearance: (chosen ? 11 : ringRadius(count) + 3.6) * plate.stage.size,
        width: widthOf(line, size),
        height: CAPITAL * size + 2,
        must: first.includes(step),
      },
      runs: line,
      size,
      unseen: !past && count > MOST_AHEAD && !first.includes(step),
      tint: past || chosen ? palette.ink : palette.faint,
      paper: past ? palette.lit : palette.shade,
    };
  });
}

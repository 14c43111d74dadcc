import { PI } from '../../../engine/index.ts';
import { projectPoints, ringPoints, rootScaleAt, scaleText, shells } from '../../layout/index.ts';
import type { ArcText, Halo, Mark, Text } from '../display-list.ts';
import { plain, type Run, runs } from '../lettering.ts';
import { widthOf } from '../text-width.ts';
import { endsOf } from './cone-marks.ts';
import { cornerMarks, type KeyFold, keyMarks } from './corners.ts';
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
  /** Places in the last picture, by key. */
  readonly before?: ReadonlyMap<string, number>;
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
  const grid = new LabelGrid(width, height);
  spreadInk(grid, plate);
  const still: Mark[] = [];
  const corners = options.corners ? cornerMarks(plate) : { still: [], clock: [] };
  still.push(...corners.still);
  if (options.keys) still.push(...keyMarks(plate, options.keys));
  for (const mark of [...still, ...corners.clock]) {
    for (const box of boxesOf(mark)) grid.take(box);
  }
  still.push(...shellLabels(plate, grid), rimName(plate));
  const wishes = [...letterWishes(plate), ...angleWishes(plate), ...stepWishes(plate)];
  const places = placeLabels(
    grid,
    wishes.map(({ wish }) => wish),
    options.before,
  );
  for (const label of wishes) {
    const at = places.get(label.wish.key);
    if (at !== undefined) still.push(...drawLabel(plate, label, at));
  }
  return { still, clock: [...corners.clock, shellName(plate)], places };
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
  /** From where a leader is drawn to the label. */
  readonly leader?: boolean;
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

/** Boxes that a mark of lettering covers; shapes cover nothing. */
export function boxesOf(mark: Mark): Box[] {
  if (mark.kind === 'group') return mark.marks.flatMap(boxesOf);
  if (mark.kind !== 'text') return [];
  const width = widthOf(mark.runs, mark.size);
  const x = mark.x - (mark.anchor === 'start' ? 0 : mark.anchor === 'end' ? width : width / 2);
  return [{ x: x - 2, y: mark.y - 0.85 * mark.size, width: width + 4, height: 1.1 * mark.size }];
}

function shellLabels(plate: Plate, grid: LabelGrid): Mark[] {
  const { palette, projection, shell } = plate;
  const { x, y, scale } = projection;
  const size = letterSize(plate.stage.size);
  const found: Mark[] = [];
  for (const { value, radius } of shells(plate.event.strands.scale, SHELL_GAP / scale)) {
    const line = plain(`${scaleText(value)} GeV`);
    const width = widthOf(line, size);
    const baseline = y - radius * scale + (CAPITAL * size) / 2;
    const box = {
      x: x - width / 2 - 3,
      y: baseline - CAPITAL * size - 3,
      width: width + 6,
      height: CAPITAL * size + 6,
    };
    // The current shell is named along its curve, and its line would strike the label through.
    if (Math.abs(radius - shell) * scale < 0.55 * size || grid.cost(box) === Infinity) continue;
    grid.take(box);
    const inside = radius <= shell;
    found.push({
      kind: 'text',
      x,
      y: baseline,
      runs: line,
      size,
      tint: inside ? palette.second : palette.faint,
      anchor: 'middle',
      halo: { tint: inside ? palette.lit : palette.shade, width: 2.4 },
    });
  }
  return found;
}

// Names stand on the left, the rim's below the middle and the shell's above it, so that they cannot meet.
const SHELL_NAME_ANGLE = PI + 0.34;
const RIM_NAME_ANGLE = PI - 0.3;

function rimName(plate: Plate): ArcText {
  const { palette, projection } = plate;
  const { head } = plate.event.history;
  const { scale } = plate.event.strands;
  const value = scaleText(rootScaleAt(scale, scale.end));
  const reached = Math.abs(rootScaleAt(scale, scale.end) / Math.sqrt(head.tLow) - 1) < 1e-9;
  const size = letterSize(plate.stage.size);
  return {
    kind: 'arcText',
    x: projection.x,
    y: projection.y,
    radius: projection.scale + 0.42 * size,
    angle: RIM_NAME_ANGLE,
    runs: runs(`rim  √*t* = ${value} GeV${reached ? ', end of the clock' : ''}`),
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
    angle: SHELL_NAME_ANGLE + Math.max(0, Math.min(PI / 2 - 0.34, 26 / radius)),
    runs: runs(`now  √*t* = ${scaleText(rootScaleAt(scale, plate.time))} GeV`, true),
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
    const line = runs(`${RING_NAMES[ring.kind]} = ${angleText(ring.angle)} rad`, ring.kind !== 'birth');
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

/** An angle as a label prints it: three significant digits [rad]. */
export const angleText = (angle: number): string =>
  angle >= 0.001
    ? String(Number(angle.toPrecision(3)))
    : angle.toExponential(1).replace('e-', '·10^{−') + '}';

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

function stepWishes(plate: Plate): Label[] {
  const { palette, steps, cone, hover, shell } = plate;
  const { stepRadius } = plate.event.strands;
  const count = stepRadius.length;
  const first = [cone?.step ?? -1, hover].filter(
    (step, k, all) => step >= 0 && step < count && all.indexOf(step) === k,
  );
  const order = [...first];
  for (let step = 0; step < count; step++) if (!first.includes(step)) order.push(step);
  return order.map((step) => {
    const chosen = step === cone?.step;
    const past = stepRadius[step] <= shell + SAME_RADIUS;
    const line = plain(String(step + 1), chosen || step === hover);
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
      tint: past || chosen ? palette.ink : palette.faint,
      paper: past ? palette.lit : palette.shade,
    };
  });
}

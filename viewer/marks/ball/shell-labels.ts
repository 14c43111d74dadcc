import { PI } from '../../../engine/index.ts';
import { cos, sin } from '../../../engine/math/index.ts';
import { rootScaleAt, scaleText, shells, threeDigits } from '../../layout/index.ts';
import type { ArcText } from '../display-list.ts';
import { plain, runs } from '../lettering.ts';
import { widthOf } from '../text-width.ts';
import { SHELL_GAP } from './ground.ts';
import { arcBoxes, type Label } from './label.ts';
import { CAPITAL, letterSize } from './letter-size.ts';
import { boxAt, type LabelGrid } from './place-labels.ts';
import type { Plate } from './plate.ts';

/** Key under which the places hold the ray that carries the shells' labels. */
export const RAY = 'ray';
// Angles of the rays from upright [rad], rightward positive, in order of preference.
const RAYS = [0, 0.2, -0.2, 0.4, -0.4, 0.62, -0.62, 0.85, -0.85, 1.1, -1.1].map((angle) => ({
  x: sin(angle),
  y: cos(angle),
}));

/** Labels of all shells stand on one ray: the one on which they cover least. @param before The ray of the last picture. */
export function freestRay(plate: Plate, grid: LabelGrid, before: number | undefined): number {
  let best = 0;
  let least = Infinity;
  RAYS.forEach((_, ray) => {
    let cost = ray === before ? -12 : 2.5 * ray;
    for (const { wish } of shellLabels(plate, ray)) cost += Math.min(60, grid.cost(boxAt(wish, 0)));
    if (cost >= least) return;
    least = cost;
    best = ray;
  });
  return best;
}

/** Labels of the round shells on a ray. */
export function shellLabels(plate: Plate, ray: number): Label[] {
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

// The rim's name stands below the middle on the left, out of the way of the current shell's.
const RIM_NAME_ANGLE = PI - 0.14;

/** Key under which the places hold where on its curve the current shell's name stands. */
export const NAME = 'name';
// Middles of the name, counted from the left clockwise [rad], in order of preference: left and above, then right.
const NAME_ANGLES = [0.42, 0.72, 1.0, 2.72, 2.42, 2.14];

/** Where on its curve the name of the current shell covers least. @param before The place of the last picture. */
export function freestName(plate: Plate, grid: LabelGrid, before: number | undefined): number {
  let best = 0;
  let least = Infinity;
  NAME_ANGLES.forEach((_, name) => {
    let cost = name === before ? -14 : 5 * name;
    for (const box of arcBoxes(shellName(plate, name))) cost += Math.min(40, grid.cost(box));
    if (cost >= least) return;
    least = cost;
    best = name;
  });
  return best;
}

/** Name of the rim along its curve. */
export function rimName(plate: Plate): ArcText {
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

/** Name of the current shell along its curve, at one of its places. */
export function shellName(plate: Plate, name: number): ArcText {
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
    // On a small shell the name would run below the middle: there it stands higher.
    angle: PI + Math.max(NAME_ANGLES[name], Math.min(PI / 2, 60 / radius)),
    runs: runs(`now  √*t* = ${threeDigits(rootScaleAt(scale, plate.time))} GeV`, true),
    size,
    tint: palette.ink,
    halo: { tint: palette.shade, width: 2.2 },
  };
}

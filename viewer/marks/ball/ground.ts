import { PI } from '../../../engine/index.ts';
import { cos, sin } from '../../../engine/math/index.ts';
import { projectPoints, ringPoints, shells } from '../../layout/index.ts';
import type { Mark } from '../display-list.ts';
import { litEdgeOf } from '../palette.ts';
import type { Plate } from './plate.ts';

/** Least distance between two labelled shells [px]. */
export const SHELL_GAP = 25;

/** The paper of the ball: what is to come shaded, what has happened lit, round shells in fine dots, the net, the rim. */
export function groundMarks(plate: Plate): Mark[] {
  const { palette, projection, stage, shell } = plate;
  const { x, y, scale } = projection;
  const { size } = stage;
  const marks: Mark[] = [
    { kind: 'circle', x, y, radius: scale, fill: { tint: palette.shade } },
    { kind: 'circle', x, y, radius: shell * scale, fill: { tint: palette.lit }, limb: litEdgeOf(palette) },
  ];
  const dots = {
    tint: palette.hairline,
    width: 0.95 * size,
    dash: [0, 4.2 * size],
    cap: 'round',
    opacity: 0.55,
  } as const;
  const { scale: radii } = plate.event.strands;
  for (const { radius } of shells(radii, SHELL_GAP / scale)) {
    marks.push({ kind: 'circle', x, y, radius: radius * scale, stroke: dots });
  }
  marks.push({ kind: 'circle', x, y, radius: radii.inner * scale, stroke: dots });
  marks.push(...netMarks(plate));
  marks.push({ kind: 'circle', x, y, radius: scale, stroke: { tint: palette.hairline, width: 0.9 * size } });
  return marks;
}

/** Net of 30 degrees about the beam, unit vectors: seven meridian circles and parallels, each as one closed line. */
export function netLines(): Float64Array[] {
  const lines: Float64Array[] = [];
  for (let k = 0; k < 6; k++) {
    const azimuth = (k * PI) / 6;
    lines.push(ringPoints([cos(azimuth), sin(azimuth), 0], PI / 2, 72));
  }
  for (let k = 1; k < 6; k++) lines.push(ringPoints([0, 0, 1], (k * PI) / 6, 72));
  return lines;
}

function netMarks(plate: Plate): Mark[] {
  const { palette, projection, shell, stage } = plate;
  const stroke = { tint: palette.rule, width: 0.75 * stage.size, opacity: 0.8 };
  const marks: Mark[] = [];
  for (const line of netLines()) {
    const points = line.map((value) => value * shell);
    projectPoints(points, projection, points);
    for (const front of splitFront(points)) marks.push({ kind: 'polyline', points: front, stroke });
  }
  return marks;
}

/** The stretches of a projected line (x, y, depth a point) that lie in front of the middle plane, as x, y, x, y …. */
export function splitFront(points: ArrayLike<number>, sign: 1 | -1 = 1): number[][] {
  const found: number[][] = [];
  let run: number[] = [];
  for (let k = 0; k < points.length; k += 3) {
    const depth = sign * points[k + 2];
    const before = k > 0 ? sign * points[k - 1] : depth;
    if (k > 0 && depth >= 0 !== before >= 0) {
      const share = before / (before - depth);
      const x = points[k - 3] + (points[k] - points[k - 3]) * share;
      const y = points[k - 2] + (points[k + 1] - points[k - 2]) * share;
      run.push(x, y);
      if (depth < 0) {
        found.push(run);
        run = [];
      }
    }
    if (depth >= 0) run.push(points[k], points[k + 1]);
  }
  if (run.length > 2) found.push(run);
  return found;
}

import { PI } from '../../../engine/index.ts';
import { projectPoints, ringPoints } from '../../layout/index.ts';
import type { Box, LabelGrid } from './place-labels.ts';
import type { Plate } from './plate.ts';
import { ringRadius } from './step-marks.ts';

/** Tell a grid what the plate draws: labels rather stand on empty paper. */
export function spreadInk(grid: LabelGrid, plate: Plate): void {
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

/** The mark of the selected branching, which no label may cover. */
export function selectedBox({ cone, steps, stage }: Plate): Box[] {
  if (!cone) return [];
  const side = 2 * 8.4 * stage.size;
  return [
    { x: steps[3 * cone.step] - side / 2, y: steps[3 * cone.step + 1] - side / 2, width: side, height: side },
  ];
}

import { projectPoints, ringPoints, threeDigits } from '../../layout/index.ts';
import { type Run, runs } from '../lettering.ts';
import { widthOf } from '../text-width.ts';
import { endsOf } from './cone-marks.ts';
import type { Label } from './label.ts';
import { letterSize } from './letter-size.ts';
import { type Plate, place } from './plate.ts';

/** The letters i, j, k at the three ends of the selected step. */
export function endLabels(plate: Plate): Label[] {
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
        far: true,
      },
      leader: 'far' as const,
      runs: line,
      size,
      tint: palette.ink,
      paper: palette.lit,
    };
  });
}

const RING_NAMES = { opening: '*θ*', partner: '*θ*_{partner}', birth: '*θ*_{birth}' } as const;

/** The angles of the rings of the selected step. */
export function angleLabels(plate: Plate): Label[] {
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
          far: true,
        },
        runs: line,
        size,
        tint: palette.ink,
        paper: palette.lit,
        leader: 'always' as const,
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

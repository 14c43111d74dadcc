import type { Numbers } from './directions.ts';

/**
 * Nearest of projected points to a place on the paper.
 *
 * @param points Three numbers a point: x, y [px], depth; of points within a pixel of each other the one nearer to the eye wins.
 * @param count Points that may be picked: the first `count`.
 * @param reach Largest distance [px].
 * @returns Number of the point, −1 where none is in reach.
 */
export function pickPoint(points: Numbers, count: number, x: number, y: number, reach: number): number {
  let best = -1;
  let least = reach;
  let depth = -Infinity;
  for (let k = 0; k < count; k++) {
    const dx = points[3 * k] - x;
    const dy = points[3 * k + 1] - y;
    const distance = Math.sqrt(dx * dx + dy * dy);
    if (distance > reach || distance > least + 1) continue;
    if (best >= 0 && distance > least - 1 && points[3 * k + 2] < depth) continue;
    best = k;
    least = Math.min(least, distance);
    depth = points[3 * k + 2];
  }
  return best;
}

import { type Cone, coneSilhouette, type Projection, ringPoints } from '../../layout/index.ts';
import { RING, RING_PIECES, turnPath } from '../../marks/index.ts';
import { LINE_STYLES, type LineQuads, type LineSpec, lineQuads } from './strand-quads.ts';

/** Lines of a selected step's cone as seen by a camera: its rings, the silhouette of the opening cone, the emitter's turn. */
export function coneQuads(cone: Cone | null, projection: Projection, size: number): LineQuads {
  if (!cone) return lineQuads([]);
  const lines: LineSpec[] = cone.rings.map((ring) => ({
    points: ringPoints(ring.axis, ring.angle, RING_PIECES).map((value) => value * cone.radius),
    radius: null,
    width: () => RING[ring.kind],
    style: LINE_STYLES[ring.kind],
  }));
  const opening = cone.rings.find(({ kind }) => kind === 'opening');
  const ends = opening && coneSilhouette(opening.axis, opening.angle, projection.rotation.subarray(6, 9));
  if (ends) {
    for (const at of [0, 3]) {
      const points = [0, 0, 0, ...ends.subarray(at, at + 3)].map((value) => value * cone.radius);
      lines.push({ points, radius: null, width: () => 0.9, style: LINE_STYLES.silhouette });
    }
  }
  const path = turnPath(cone, projection.scale, size);
  if (path.length >= 6) {
    lines.push({
      points: path.subarray(0, path.length - 3),
      radius: null,
      width: () => 1.9,
      style: LINE_STYLES.turn,
    });
  }
  return lineQuads(lines);
}

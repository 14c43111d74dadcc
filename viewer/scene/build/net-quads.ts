import { PI } from '../../../engine/index.ts';
import { ringPoints } from '../../layout/index.ts';
import { netLines } from '../../marks/index.ts';
import { type LineQuads, LINE_STYLES, lineQuads } from './strand-quads.ts';

/** The net of 30 degrees about the beam on a shell of radius 1. */
export const netQuads = (): LineQuads =>
  lineQuads(
    netLines().map((points) => ({ points, radius: null, width: () => 0.75, style: LINE_STYLES.net })),
  );

/** The outline of a shell of radius 1: a circle in the plane of the paper. */
export const shellQuads = (): LineQuads =>
  lineQuads([
    { points: ringPoints([0, 0, 1], PI / 2, 144), radius: null, width: () => 1.7, style: LINE_STYLES.shell },
  ]);

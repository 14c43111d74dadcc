import { PI } from '../../../engine/index.ts';
import { ringPoints } from '../../layout/index.ts';
import { netLines } from '../../marks/index.ts';
import { LINE_STYLES, type LineQuads, type LineSpec, lineQuads } from './strand-quads.ts';

const circle = (radius: number, pieces: number): Float64Array =>
  ringPoints([0, 0, 1], PI / 2, pieces).map((value) => value * radius);

const line = (points: Float64Array, width: number, style: number): LineSpec => ({
  points,
  radius: null,
  width: () => width,
  style,
});

/** The net of 30 degrees about the beam on a shell of radius 1. */
export const netQuads = (): LineQuads =>
  lineQuads(netLines().map((points) => line(points, 0.75, LINE_STYLES.net)));

/** The outline of a shell of radius 1 in the plane of the paper. */
export const outlineQuads = (): LineQuads => lineQuads([line(circle(1, 288), 1.7, LINE_STYLES.outline)]);

/** The rim, and dotted shells at the radii given, in the plane of the paper. */
export const shellQuads = (radii: readonly number[]): LineQuads =>
  lineQuads([
    ...radii.map((radius) => line(circle(radius, 96), 0.95, LINE_STYLES.dotted)),
    line(circle(1, 288), 0.9, LINE_STYLES.rim),
  ]);

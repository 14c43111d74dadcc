import {
  type BallEvent,
  type Camera,
  type Cone,
  type Moment,
  momentOf,
  type Projection,
  projectionOf,
  projectPoints,
  radiusAt,
  type Stage,
} from '../../layout/index.ts';
import type { Mark } from '../display-list.ts';
import type { Palette } from '../palette.ts';

/** The ball as it stands: an event, from where it is seen, at which time, and what is selected. */
export interface BallView {
  readonly event: BallEvent;
  readonly camera: Camera;
  readonly stage: Stage;
  /** Evolution time L. */
  readonly time: number;
  readonly palette: Palette;
  /** Cone of the selected step, null where none is selected. */
  readonly cone: Cone | null;
  /** Step under the pointer, −1 for none. */
  readonly hover: number;
}

/** A view with what all of its parts need: everything projected once. */
export interface Plate extends BallView {
  readonly projection: Projection;
  readonly moment: Moment;
  /** Radius of the current shell in units of the rim's. */
  readonly shell: number;
  /** x, y [px] and depth of every point of the event's lines, and of every step. */
  readonly points: Float64Array;
  readonly steps: Float64Array;
}

/** Radii within which a birth counts as having happened: the same for the screen's single precision. */
export const SAME_RADIUS = 1e-6;

/** Project a view. */
export function plateOf(view: BallView): Plate {
  const { event, camera, stage, time } = view;
  const projection = projectionOf(camera, stage);
  const points = new Float64Array(event.lines.position.length);
  projectPoints(points, projection, event.lines.position);
  return {
    ...view,
    projection,
    moment: momentOf(event, time),
    shell: radiusAt(event.strands.scale, time),
    points,
    steps: projectSteps(event, projection),
  };
}

/** Places of the steps on the paper: x, y [px], depth. */
export function projectSteps(event: BallEvent, projection: Projection): Float64Array {
  const { stepRadius, stepDirection } = event.strands;
  const out = new Float64Array(stepDirection.length);
  for (let k = 0; k < out.length; k++) out[k] = stepDirection[k] * stepRadius[Math.floor(k / 3)];
  projectPoints(out, projection, out);
  return out;
}

/** A place of the ball given as direction and radius: x, y [px], depth. */
export function place(plate: Plate, direction: ArrayLike<number>, radius: number): [number, number, number] {
  const out = [direction[0] * radius, direction[1] * radius, direction[2] * radius];
  projectPoints(out, plate.projection, out);
  return [out[0], out[1], out[2]];
}

/** Marks with the depth by which they are sorted, −1 far to 1 near. */
export interface Layer {
  readonly depth: number;
  readonly marks: readonly Mark[];
}

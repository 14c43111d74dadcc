import { PI } from '../../engine/index.ts';
import { cos, sin } from '../../engine/math/index.ts';
import type { MutableNumbers, Numbers } from './directions.ts';

/**
 * From where the ball is seen, in parallel projection, the beam axis always upright on the screen.
 *
 * Azimuth and elevation [rad] give the direction of the eye about the beam (z); `zoom` multiplies the size; `panX`, `panY`
 * shift the picture right and down, in units of the rim's radius on the screen before zoom.
 */
export interface Camera {
  readonly azimuth: number;
  readonly elevation: number;
  readonly zoom: number;
  readonly panX: number;
  readonly panY: number;
}

/** Where the ball stands on its paper [px]: centre and radius of the rim before zoom, and the size of the paper. */
export interface Stage {
  readonly width: number;
  readonly height: number;
  readonly x: number;
  readonly y: number;
  readonly radius: number;
  /** Factor on line widths and marks: 1 at a rim of 254 px, 1.3 at 404 px. */
  readonly size: number;
}

const TURN = 2 * PI;
/** Just below a right angle, so that the beam keeps its upright [rad]. */
export const MAX_ELEVATION = 1.5707;
/** Least and greatest zoom. */
export const ZOOM_RANGE = [0.5, 60] as const;

/** The camera with its angles, zoom and pan brought into their ranges; the ball cannot be pushed off its paper. */
export function clampCamera(camera: Camera): Camera {
  const between = (value: number, low: number, high: number): number => Math.max(low, Math.min(high, value));
  const zoom = between(camera.zoom, ...ZOOM_RANGE);
  const reach = 0.5 + zoom;
  return {
    azimuth: camera.azimuth - TURN * Math.floor(camera.azimuth / TURN + 0.5),
    elevation: between(camera.elevation, -MAX_ELEVATION, MAX_ELEVATION),
    zoom,
    panX: between(camera.panX, -reach, reach),
    panY: between(camera.panY, -reach, reach),
  };
}

/** Place the ball in the middle of a paper of this size [px], room for the rim's name beside it. */
export function stageOf(width: number, height: number): Stage {
  const radius = Math.max(20, Math.min((height - 12) / 2, (width - 52) / 2));
  return {
    width,
    height,
    x: width / 2,
    y: height / 2,
    radius,
    size: Math.max(0.85, Math.min(1.4, 1 + (0.3 * (radius - 254)) / 150)),
  };
}

/**
 * Rotation from the event frame to the screen.
 *
 * @param out Nine numbers: rows are the directions that lie rightward, upward and towards the eye on the screen.
 */
export function viewRotation(out: MutableNumbers, camera: Camera): void {
  const ca = cos(camera.azimuth);
  const sa = sin(camera.azimuth);
  const ce = cos(camera.elevation);
  const se = sin(camera.elevation);
  out[0] = -sa;
  out[1] = ca;
  out[2] = 0;
  out[3] = -se * ca;
  out[4] = -se * sa;
  out[5] = ce;
  out[6] = ce * ca;
  out[7] = ce * sa;
  out[8] = se;
}

/** Map of ball coordinates (rim at 1) to paper pixels: screen x = x + scale · right, y = y − scale · up. */
export interface Projection {
  /** Nine numbers of `viewRotation`. */
  readonly rotation: Float64Array;
  readonly x: number;
  readonly y: number;
  /** Pixels per rim radius. */
  readonly scale: number;
}

/** The projection of a camera onto a stage. */
export function projectionOf(camera: Camera, stage: Stage): Projection {
  const rotation = new Float64Array(9);
  viewRotation(rotation, camera);
  return {
    rotation,
    x: stage.x + camera.panX * stage.radius,
    y: stage.y + camera.panY * stage.radius,
    scale: stage.radius * camera.zoom,
  };
}

/**
 * Project points: x and y in paper pixels, depth towards the eye in units of the rim's radius (−1 to 1 inside the ball).
 *
 * @param out Three numbers a point, as many as `points` holds.
 */
export function projectPoints(out: MutableNumbers, projection: Projection, points: Numbers): void {
  const { rotation: r, x, y, scale } = projection;
  for (let k = 0; k + 2 < points.length; k += 3) {
    const a = points[k];
    const b = points[k + 1];
    const c = points[k + 2];
    out[k] = x + scale * (r[0] * a + r[1] * b + r[2] * c);
    out[k + 1] = y - scale * (r[3] * a + r[4] * b + r[5] * c);
    out[k + 2] = r[6] * a + r[7] * b + r[8] * c;
  }
}

/** The camera after zooming by `factor` so that the point of the paper under (x, y) [px] stays where it is. */
export function zoomAbout(camera: Camera, stage: Stage, x: number, y: number, factor: number): Camera {
  const zoom = Math.max(ZOOM_RANGE[0], Math.min(ZOOM_RANGE[1], camera.zoom * factor));
  const real = zoom / camera.zoom;
  const px = (x - stage.x) / stage.radius;
  const py = (y - stage.y) / stage.radius;
  return clampCamera({
    ...camera,
    zoom,
    panX: px + (camera.panX - px) * real,
    panY: py + (camera.panY - py) * real,
  });
}

/** The camera after a drag by (dx, dy) [px]: a point on the near side of the rim follows the pointer. */
export function orbit(camera: Camera, stage: Stage, dx: number, dy: number): Camera {
  const scale = stage.radius * camera.zoom;
  return clampCamera({
    ...camera,
    azimuth: camera.azimuth - dx / scale,
    elevation: camera.elevation + dy / scale,
  });
}

/** The camera after shifting the paper by (dx, dy) [px]. */
export function pan(camera: Camera, stage: Stage, dx: number, dy: number): Camera {
  return clampCamera({
    ...camera,
    panX: camera.panX + dx / stage.radius,
    panY: camera.panY + dy / stage.radius,
  });
}

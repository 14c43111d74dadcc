import type { Camera } from '../../layout/index.ts';

/** How long a change of view takes that is not the hand's own [ms]. */
export const TURN_MS = 300;

/** A camera on its way from one view to another, easing in and out, the short way round. */
export interface CameraTurn {
  readonly from: Camera;
  readonly to: Camera;
  readonly begunMs: number;
}

/** The camera at a time of the turn; `to` itself from its end on. */
export function cameraAt({ from, to, begunMs }: CameraTurn, nowMs: number): Camera {
  const share = Math.max(0, (nowMs - begunMs) / TURN_MS);
  if (share >= 1) return to;
  const eased = share * share * (3 - 2 * share);
  const between = (a: number, b: number): number => a + (b - a) * eased;
  const whole = 2 * Math.PI;
  const arc = to.azimuth - from.azimuth;
  return {
    azimuth: from.azimuth + (arc - whole * Math.round(arc / whole)) * eased,
    elevation: between(from.elevation, to.elevation),
    zoom: from.zoom * (to.zoom / from.zoom) ** eased,
    panX: between(from.panX, to.panX),
    panY: between(from.panY, to.panY),
  };
}

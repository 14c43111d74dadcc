import type { History } from '../../engine/index.ts';
import { exp, log } from '../../engine/math/index.ts';

/** How evolution time L is laid along the radius; the rim is at 1. */
export interface RadiusScale {
  /** Radius of L = 0, the hard scale: room at the centre, so that hard first steps do not crowd. */
  readonly inner: number;
  /** L at the rim. */
  readonly end: number;
  /** t at L = 0 [unit of t]. */
  readonly hardScale: number;
}

/** Radius of the hard scale as a fraction of the rim's. */
export const INNER_RADIUS = 0.08;

/**
 * The radius scale of an event: L = 0 at the inner radius, L = ln(t0/tLow) at the rim, or the last step where that is later.
 *
 * A head without usable scales gets a scale of its steps alone, so that any history can be drawn.
 */
export function radiusScale(history: History): RadiusScale {
  const { hardScale, tLow } = history.head;
  let end = log(hardScale / tLow);
  if (!(end > 0 && end < Infinity)) end = 0;
  for (const t of history.steps.t) {
    const time = log(hardScale / t);
    if (time > end && time < Infinity) end = time;
  }
  return { inner: INNER_RADIUS, end: end > 0 ? end : 1, hardScale };
}

/** Radius of evolution time L, between the inner radius and 1 for 0 <= L <= end. */
export const radiusAt = (scale: RadiusScale, time: number): number =>
  scale.inner + (1 - scale.inner) * (time / scale.end);

/** Evolution time at a radius, negative inside the inner one. */
export const timeAtRadius = (scale: RadiusScale, radius: number): number =>
  ((radius - scale.inner) / (1 - scale.inner)) * scale.end;

/** sqrt(t) at evolution time L [root of the unit of t]. */
export const rootScaleAt = (scale: RadiusScale, time: number): number =>
  Math.sqrt(scale.hardScale) * exp(-time / 2);

/**
 * Evolution time of every step; a time that is missing, or before the hard scale, becomes that of the step before (0 for
 * the first), so that every step has a place.
 */
export function stepTimes(history: History): Float64Array {
  const { t } = history.steps;
  const times = new Float64Array(history.steps.length);
  let last = 0;
  for (let step = 0; step < times.length; step++) {
    const time = log(history.head.hardScale / t[step]);
    if (time >= 0 && time < Infinity) last = time;
    times[step] = last;
  }
  return times;
}

import type { History } from '../../engine/index.ts';
import { type Chains, traceChains } from './chains.ts';
import { type StrandLines, traceStrands } from './strand-lines.ts';
import { layStrands, type Strands } from './strands.ts';

/** Everything of an event that the ball draws and that neither camera nor clock change. */
export interface BallEvent {
  readonly history: History;
  readonly strands: Strands;
  readonly lines: StrandLines;
  readonly chains: Chains;
}

/** Lay out an event for the ball. */
export function ballEvent(history: History): BallEvent {
  const strands = layStrands(history);
  return { history, strands, lines: traceStrands(strands), chains: traceChains(history, strands) };
}

/** How finely an event's turns are traced at a zoom: in doublings, so that a wheel does not trace them anew at every notch. */
export function finenessAt(zoom: number): number {
  let fineness = 1;
  while (fineness < zoom && fineness < 32) fineness *= 2;
  return fineness;
}

/** The same event with its lines traced for an enlargement. */
export const retrace = (event: BallEvent, fineness: number): BallEvent => ({
  ...event,
  lines: traceStrands(event.strands, fineness),
});

/** What the clock says about an event at evolution time L. */
export interface Moment {
  /** Last step that has happened, −1 for none. */
  readonly step: number;
  readonly steps: number;
  /** Partons alive. */
  readonly partons: number;
}

/** Steps and partons of an event at evolution time L. */
export function momentOf(event: BallEvent, time: number): Moment {
  const { from, until } = event.strands;
  const step = lastStep(event.strands.stepTime, time);
  const radius = step < 0 ? 0 : event.strands.stepRadius[step];
  let partons = 0;
  for (let strand = 0; strand < from.length; strand++) {
    if (from[strand] <= radius && radius < until[strand]) partons++;
  }
  return { step, steps: event.history.steps.length, partons };
}

function lastStep(times: Float64Array, time: number): number {
  let below = -1;
  let above = times.length;
  while (above - below > 1) {
    const middle = (below + above) >> 1;
    if (times[middle] <= time) below = middle;
    else above = middle;
  }
  return below;
}

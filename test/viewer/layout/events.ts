import * as fc from 'fast-check';
import { type GrowSettings, growEvent, type History, resolveSettings } from '../../../engine/index.ts';

const grow = (settings: Partial<GrowSettings>, stream: number): History =>
  growEvent(resolveSettings({ seed: 11, ...settings }), stream);

/** Events of 1 TeV, about a dozen steps each. */
export const teraEvent = (stream: number): History => grow({ energy: 1000 }, stream);

/** An event of more than 300 branchings. */
export function denseEvent(): History {
  for (let stream = 0; ; stream++) {
    const history = grow({ energy: 100_000, cutoff: 0.6, coupling: { kind: 'fixed', value: 0.35 } }, stream);
    if (history.steps.length > 300) return history;
  }
}

/** An event in which nothing branched. */
export function silentEvent(): History {
  for (let stream = 0; ; stream++) {
    const history = grow({ energy: 20, cutoff: 4 }, stream);
    if (history.steps.length === 0) return history;
  }
}

/** Events of all kinds, some without a step, in both orderings. */
export const anyEvent: fc.Arbitrary<History> = fc
  .record({
    energy: fc.constantFrom(20, 91.1876, 1000, 14_000),
    cutoff: fc.constantFrom(0.7, 1, 3),
    order: fc.constantFrom('kt' as const, 'virtuality' as const),
    stream: fc.nat(5000),
  })
  .map(({ stream, ...settings }) => grow(settings, stream));

/** A direction of an entry's momentum. */
export function directionOf({ entries }: History, row: number): [number, number, number] {
  const { px, py, pz } = entries;
  const length = Math.hypot(px[row], py[row], pz[row]);
  return [px[row] / length, py[row] / length, pz[row] / length];
}

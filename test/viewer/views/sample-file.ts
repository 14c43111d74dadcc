import { growEvent, type History, resolveSettings } from '../../../engine/index.ts';
import type { EventFile } from '../../../viewer/state/index.ts';

const settings = resolveSettings({ energy: 1000, quark: 1, seed: 7 });

/** The first events of one sample, numbered as in a file. */
export function sampleHistories(count: number): History[] {
  return Array.from({ length: count }, (_, event) => growEvent(settings, event));
}

/** An open file that holds these events. */
export function fileOf(histories: readonly History[]): EventFile {
  const column = (value: (history: History) => number) => (from: number, to: number) =>
    histories.slice(from, to).map(value);
  const branchings = column(({ steps }) => steps.length);
  const finalPartons = column(({ steps }) => steps.length + 2);
  const hardestKT = column(({ steps }) => Math.max(...steps.kT));
  const worstCoherence = column(() => Number.NaN);
  return {
    sample: histories[0].head,
    eventCount: histories.length,
    event: async (n) => histories[n],
    summaries: async (from, to) => ({
      branchings: branchings(from, to),
      finalPartons: finalPartons(from, to),
      hardestKT: hardestKT(from, to),
      worstCoherence: worstCoherence(from, to),
    }),
  };
}

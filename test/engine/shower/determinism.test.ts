import { describe, expect, it } from 'vitest';
import {
  createGrower,
  ENTRY_COLUMNS,
  growEvent,
  type History,
  HistoryBatch,
  resolveSettings,
  STEP_COLUMNS,
} from '../../../engine/index.ts';
import { BIT_SAMPLES, eventBits } from './event-bits.ts';

function expectSameTables(a: History, b: History): void {
  for (const { name } of ENTRY_COLUMNS) expect(a.entries[name], name).toEqual(b.entries[name]);
  for (const { name } of STEP_COLUMNS) expect(a.steps[name], name).toEqual(b.steps[name]);
}

describe('random numbers keyed by seed, event, step and draw', () => {
  it('give event 17 the same bits alone, after other events and in reverse order', () => {
    const settings = resolveSettings({ seed: 5, energy: 300 });
    const alone = growEvent(settings, 17);
    const grower = createGrower(settings);
    const forward = new HistoryBatch(grower.sample);
    for (let event = 0; event < 30; event++) grower.grow(forward, event);
    expectSameTables(forward.view(17), alone);
    const backward = new HistoryBatch(grower.sample);
    for (let event = 29; event >= 0; event--) grower.grow(backward, event);
    expectSameTables(backward.view(12), alone);
  });

  it('tell apart seeds and events that differ in their high words only', () => {
    const history = (seed: number, event: number) => growEvent(resolveSettings({ seed, energy: 300 }), event);
    const two32 = 4294967296;
    const direction = (h: History) => h.entries.px[3];
    const all = [
      history(1, 1),
      history(1 + two32, 1),
      history(1, 1 + two32),
      history(Number.MAX_SAFE_INTEGER, Number.MAX_SAFE_INTEGER),
    ].map(direction);
    expect(new Set(all).size).toBe(4);
  });

  it('record the same history with and without trials, and trials that add up', () => {
    for (const order of ['kt', 'virtuality'] as const) {
      const plain = resolveSettings({ order, energy: 500, seed: 3 });
      const traced = resolveSettings({ order, energy: 500, seed: 3, trials: true });
      for (let event = 0; event < 50; event++) {
        const a = growEvent(plain, event);
        const b = growEvent(traced, event);
        expect(a.trials).toBeNull();
        expectSameTables(a, b);
        const trials = b.trials!;
        const counts = new Int32Array(b.steps.length + 1);
        for (let n = 0; n < trials.length; n++) counts[trials.before[n]]++;
        expect(counts.subarray(0, b.steps.length)).toEqual(b.steps.rejected);
        for (let n = 0; n < trials.length; n++) {
          const before = trials.before[n];
          const above = before === 0 ? b.head.hardScale : b.steps.t[before - 1];
          expect(trials.t[n]).toBeLessThan(above * (1 + 1e-12));
          if (before < b.steps.length) expect(trials.t[n]).toBeGreaterThan(b.steps.t[before] * (1 - 1e-12));
          if (n > 0 && trials.before[n - 1] === before) expect(trials.t[n]).toBeLessThan(trials.t[n - 1]);
          expect(
            b.entries.endedBy[trials.emitter[n]] >= before || b.entries.endedBy[trials.emitter[n]] === -1,
          ).toBe(true);
        }
      }
    }
  });

  it('make the recorded bits of 1000 events (recorded here, not proven)', () => {
    expect(BIT_SAMPLES.map((sample) => eventBits(sample, 1000))).toEqual([
      'd8571fcdaad7c217',
      '5c138ab44db518b5',
      '8d8fb0799dde473f',
      'c61943086f0e2420',
    ]);
  });
});

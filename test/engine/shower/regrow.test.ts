import { describe, expect, it } from 'vitest';
import {
  createGrower,
  ENTRY_COLUMNS,
  type GrowSettings,
  growEvent,
  type History,
  HistoryBatch,
  RegrowError,
  resolveSettings,
  STEP_COLUMNS,
} from '../../../engine/index.ts';

const SAMPLES: Partial<GrowSettings>[] = [
  { energy: 500 },
  { energy: 500, order: 'virtuality', coupling: { kind: 'two-loop' } },
  { process: 'scalar-gg', energy: 200 },
  { process: 'scalar-gg', energy: 200, masses: true, firstEmission: 'kernel' },
  { quark: 5, energy: 300, masses: true, order: 'virtuality' },
  { energy: 91.1876, firstEmission: 'matched', cmw: true },
  { energy: 300, recoil: 'global', process: 'scalar-gg' },
];

function regrown(some: Partial<GrowSettings>, original: History, keep: number, stream: number): History {
  const grower = createGrower(resolveSettings(some));
  const batch = new HistoryBatch(grower.sample);
  grower.regrow(batch, original, keep, stream, 0);
  return batch.view(0);
}

function expectSame(a: History, b: History): void {
  for (const { name } of ENTRY_COLUMNS) expect(a.entries[name], name).toEqual(b.entries[name]);
  for (const { name } of STEP_COLUMNS) expect(a.steps[name], name).toEqual(b.steps[name]);
}

describe('regrowing', () => {
  it('with the numbers of the original gives the original back bit for bit, from every step', () => {
    for (const some of SAMPLES) {
      const grower = createGrower(resolveSettings(some));
      const batch = new HistoryBatch(grower.sample);
      for (let event = 0; event < 20; event++) {
        batch.clear();
        grower.grow(batch, event);
        const steps = batch.steps.length;
        for (let keep = -1; keep < steps; keep++) grower.regrow(batch, batch.view(0), keep, event, 0);
        const original = batch.view(0);
        for (let n = 1; n < batch.events.length; n++) expectSame(batch.view(n), original);
      }
    }
  });

  it('with other numbers keeps the first steps and changes the rest', () => {
    for (const some of SAMPLES) {
      const original = growEvent(resolveSettings(some), 7);
      const keep = Math.min(1, original.steps.length - 1);
      const other = regrown({ ...some, seed: 99 }, original, keep, 3);
      for (const { name } of STEP_COLUMNS)
        expect(other.steps[name].subarray(0, keep + 1), name).toEqual(
          original.steps[name].subarray(0, keep + 1),
        );
      expect(other.steps.t[keep + 1]).not.toBe(original.steps.t[keep + 1]);
    }
  });

  it('refuses what it cannot continue, with what it found', () => {
    const original = growEvent(resolveSettings({ energy: 500 }), 7);
    const refusal = (some: Partial<GrowSettings>, keep: number, history = original) =>
      expect(() => regrown(some, history, keep, 0));
    refusal({ energy: 500 }, original.steps.length).toThrow(RegrowError);
    refusal({ energy: 500 }, -2).toThrow(/step -2/);
    refusal({ energy: 400 }, 0).toThrow(/500 GeV/);
    refusal({ energy: 500, order: 'virtuality' }, 0).toThrow(/evolution in kt/);
    const changed = growEvent(resolveSettings({ energy: 500 }), 7);
    changed.entries.px[5] *= 1 + 1e-15;
    refusal({ energy: 500 }, 0, changed).toThrow(/px of entry 5/);
  });
});

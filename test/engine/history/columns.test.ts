import { describe, expect, it } from 'vitest';
import {
  CHANNELS,
  createGrower,
  ENTRY_COLUMNS,
  HistoryBatch,
  makeEntries,
  makeSteps,
  makeTrials,
  resolveSettings,
  STEP_COLUMNS,
  TRIAL_COLUMNS,
} from '../../../engine/index.ts';

describe('tables of columns', () => {
  it('hold exactly the columns of the schema, with the element type of their kind', () => {
    const tables = [
      [makeEntries(3), ENTRY_COLUMNS],
      [makeSteps(3), STEP_COLUMNS],
      [makeTrials(3), TRIAL_COLUMNS],
    ] as const;
    for (const [table, specs] of tables) {
      const others = specs === STEP_COLUMNS ? ['length', 'boost'] : ['length'];
      expect(Object.keys(table).sort()).toEqual([...others, ...specs.map(({ name }) => name)].sort());
      for (const { name, kind } of specs) {
        const column = (table as unknown as Record<string, Float64Array>)[name];
        const type = kind === 'float' ? Float64Array : kind === 'word' ? Uint8Array : Int32Array;
        expect(column, name).toBeInstanceOf(type);
        expect(column.length).toBe(3);
      }
    }
  });

  it('keep what a batch holds when it grows, and give its memory back empty when cleared', () => {
    const grower = createGrower(
      resolveSettings({ energy: 2000, cutoff: 0.8, trials: true, recoil: 'global' }),
    );
    const large = new HistoryBatch(grower.sample);
    for (let event = 0; event < 200; event++) grower.grow(large, event);
    expect(large.steps.length).toBeGreaterThan(1024);
    const small = new HistoryBatch(grower.sample);
    for (const event of [0, 3, 199]) {
      small.clear();
      expect(small.steps.length + small.entries.length + small.trials!.length).toBe(0);
      grower.grow(small, event);
      expect(small.view(0)).toEqual(large.view(event));
    }
    expect(() => small.view(1)).toThrow(RangeError);
    expect(small.view(0).channels).toEqual(CHANNELS);
  });
});

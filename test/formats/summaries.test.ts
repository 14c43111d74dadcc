import { describe, expect, it } from 'vitest';
import { createGrower, HistoryBatch, measureSteps, ROLES, resolveSettings } from '../../engine/index.ts';
import { bytesSource, ShowerFileReader } from '../../formats/index.ts';
import { CountingSource, writeFile } from './memory-file.ts';
import { buildBatch, plainEvent, sampleHead } from './random-histories.ts';

const most = (values: ArrayLike<number>) => {
  const numbers = Array.from(values).filter((value) => !Number.isNaN(value));
  return numbers.length > 0 ? Math.max(...numbers) : NaN;
};

describe('summary columns', () => {
  it('say what the events say', async () => {
    const grower = createGrower(resolveSettings({ energy: 150 }));
    const batch = new HistoryBatch(grower.sample);
    for (let n = 0; n < 1100; n++) grower.grow(batch, n);
    const source = new CountingSource(await writeFile(grower.sample, [batch]));
    const reader = await ShowerFileReader.open(source);
    const summaries = await reader.summaries(1000, 1100);
    expect([summaries.first, summaries.count]).toEqual([1000, 100]);
    // two index pages and a directory page, no chunk
    expect(source.reads).toBe(2 + 3);
    for (let n = 1000; n < 1100; n++) {
      const { steps, entries } = batch.view(n);
      const k = n - 1000;
      const final = Array.from(entries.endedBy).filter((step, row) => {
        const role = ROLES[entries.role[row]];
        return step === -1 && role !== 'incoming' && role !== 'resonance';
      });
      const { coherencePartner, length } = measureSteps(batch.view(n));
      expect(summaries.branchings[k]).toBe(steps.length);
      expect(summaries.finalPartons[k]).toBe(final.length);
      expect(summaries.hardestKT[k]).toBe(most(steps.kT));
      expect(summaries.worstCoherence[k]).toBe(most(coherencePartner.subarray(0, length)));
      expect(summaries.weight[k]).toBe(1);
      expect(summaries.oddness[k]).toBeNaN();
    }
    expect(summaries.findings).toEqual({});
  });

  it('are absent where their columns are', async () => {
    const sample = sampleHead({ entries: ['id', 'px'], steps: ['t'] });
    const bytes = await writeFile(sample, [buildBatch(sample, [plainEvent(1), plainEvent(2, 0)])]);
    const summaries = await (await ShowerFileReader.open(bytesSource(bytes, 'few'))).summaries(0, 2);
    expect([...summaries.branchings]).toEqual([3, 0]);
    expect([...summaries.finalPartons]).toEqual([-1, -1]);
    expect([...summaries.hardestKT]).toEqual([NaN, NaN]);
    expect([...summaries.worstCoherence]).toEqual([NaN, NaN]);
  });
});

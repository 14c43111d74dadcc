import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createGrower, HistoryBatch, resolveSettings, type SampleHead } from '../../engine/index.ts';
import { bytesSource, ShowerFileReader, ShowerFileWriter } from '../../formats/index.ts';
import { MemorySink, readAll, writeFile } from './memory-file.ts';
import { anyEvent, buildBatch, plainEvent, sampleHead } from './random-histories.ts';
import { firstDifference } from './same-bits.ts';

async function expectSame(sample: SampleHead, batch: HistoryBatch): Promise<void> {
  const read = await readAll(await writeFile(sample, [batch]));
  expect(read.length).toBe(batch.events.length);
  read.forEach((history, n) => {
    const written = batch.view(n);
    expect(firstDifference(history, written)).toBe(null);
    expect(history.head).toEqual(written.head);
    expect(Object.is(history.head.weight, written.head.weight)).toBe(true);
  });
}

describe('a file gives back', () => {
  it('random histories bit for bit: any doubles, empty events, events without steps', async () => {
    await fc.assert(
      fc.asyncProperty(fc.array(anyEvent, { maxLength: 150 }), fc.boolean(), async (shapes, trials) => {
        const sample = sampleHead(trials ? {} : { trials: null });
        await expectSame(sample, buildBatch(sample, shapes));
      }),
      { numRuns: 40, seed: 1 },
    );
  });

  it('histories of which an author recorded some columns only, the others as missing', async () => {
    await fc.assert(
      fc.asyncProperty(
        fc.array(anyEvent, { minLength: 1, maxLength: 70 }),
        fc.subarray(sampleHead().columns.entries as string[]),
        fc.subarray(sampleHead().columns.steps as string[]),
        async (shapes, entries, steps) => {
          const sample = sampleHead({ entries, steps });
          await expectSame(sample, buildBatch(sample, shapes));
        },
      ),
      { numRuns: 25, seed: 2 },
    );
  });

  it('an event of thousands of steps, of any bits, of plausible and of constant columns', async () => {
    const sample = sampleHead();
    for (const flavour of ['any', 'plausible', 'constant'] as const) {
      // Above 65536 rows even a constant column is written out.
      const entries = flavour === 'constant' ? 70_000 : 15_000;
      const shape = { ...plainEvent(5), entries, steps: 5000, trials: 3000, flavour };
      await expectSame(sample, buildBatch(sample, [plainEvent(1), shape, plainEvent(2)]));
    }
  });

  it('events of the engine, with and without trials', async () => {
    for (const trials of [false, true]) {
      const grower = createGrower(resolveSettings({ energy: 500, trials }));
      const batch = new HistoryBatch(grower.sample);
      for (let n = 0; n < 200; n++) grower.grow(batch, n);
      await expectSame(grower.sample, batch);
    }
  });

  it('no events', async () => {
    const sample = sampleHead();
    const bytes = await writeFile(sample, []);
    const reader = await ShowerFileReader.open(bytesSource(bytes, 'none'));
    expect(reader.eventCount).toBe(0);
    expect(reader.sample).toEqual(sample);
    expect(await readAll(bytes)).toEqual([]);
    expect((await reader.summaries(0, 0)).count).toBe(0);
  });

  it('seeds and event numbers up to 2^53 - 1 as numbers', async () => {
    const numbers = [0, 1, 2 ** 31, 2 ** 32 - 1, 2 ** 32, 2 ** 40 + 1, 2 ** 53 - 1];
    for (const seed of numbers) {
      const sample = { ...sampleHead(), seed };
      const [history] = await readAll(
        await writeFile(sample, [buildBatch(sample, [{ ...plainEvent(1), stream: seed }])]),
      );
      expect(history.head.seed).toBe(seed);
      expect(history.head.stream).toBe(seed);
    }
  });
});

describe('channels', () => {
  const sample = sampleHead();
  const words = (batch: HistoryBatch, n: number) => {
    const history = batch.view(n);
    return [...history.steps.channel].map((code) => history.channels[code]);
  };

  it('keep their words when batches name them in different orders', async () => {
    const orders = [
      ['q_qg', 'g_gg', 'g_qq'],
      ['g_qq', 'mine', 'g_gg'],
      ['yours', 'q_qg', 'mine'],
    ];
    const batches = orders.map((channels, k) =>
      buildBatch(
        sample,
        Array.from({ length: 50 }, (_, n) => plainEvent(100 * k + n)),
        channels,
      ),
    );
    const read = await readAll(await writeFile(sample, batches));
    batches.forEach((batch, k) => {
      for (let n = 0; n < 50; n++) {
        const { steps, channels } = read[50 * k + n];
        expect([...steps.channel].map((code) => channels[code])).toEqual(words(batch, n));
      }
    });
  });

  it('above 256 in a chunk are refused', async () => {
    const sink = new MemorySink();
    const writer = new ShowerFileWriter(sink, sample);
    const append = (k: number) => {
      const channels = Array.from({ length: 100 }, (_, c) => `channel ${k} ${c}`);
      const batch = buildBatch(sample, [plainEvent(k, 100)], channels);
      batch.steps.channel.set(Array.from({ length: 100 }, (_, c) => c));
      return writer.append(batch);
    };
    await append(1);
    await append(2);
    await expect(append(3)).rejects.toMatchObject({ code: 'beyond-format' });
  });
});

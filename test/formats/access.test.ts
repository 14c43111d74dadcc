import { describe, expect, it } from 'vitest';
import { HistoryBatch } from '../../engine/index.ts';
import { EVENTS_PER_CHUNK, ShowerFileReader, ShowerFileWriter } from '../../formats/index.ts';
import { CountingSource, MemorySink } from './memory-file.ts';
import { addEvent, plainEvent, sampleHead } from './random-histories.ts';
import { firstDifference } from './same-bits.ts';

const sample = sampleHead({ trials: null });

async function fileOf(events: number): Promise<Uint8Array> {
  const sink = new MemorySink();
  const writer = new ShowerFileWriter(sink, sample);
  const batch = new HistoryBatch(sample);
  for (let n = 0; n < events; n++) {
    batch.clear();
    addEvent(batch, plainEvent(n, 1));
    await writer.append(batch);
  }
  await writer.finish();
  return sink.bytes;
}

const large = await fileOf(20_000);

async function cost(
  source: CountingSource,
  work: () => Promise<unknown>,
): Promise<{ reads: number; bytes: number }> {
  const before = { reads: source.reads, bytes: source.bytes };
  await work();
  return { reads: source.reads - before.reads, bytes: source.bytes - before.bytes };
}

describe('reading', () => {
  it('opens in the same few reads whatever the number of events', async () => {
    const costs: { reads: number; bytes: number }[] = [];
    for (const bytes of [await fileOf(100), large]) {
      const source = new CountingSource(bytes);
      costs.push(await cost(source, () => ShowerFileReader.open(source)));
    }
    expect(costs[1]).toEqual(costs[0]);
    expect(costs[0].reads).toBe(2);
    expect(costs[0].bytes).toBeLessThanOrEqual(12_288);
  });

  it('takes a directory page, an index page and one chunk for an event, then only the chunk, then nothing', async () => {
    const source = new CountingSource(large);
    const reader = await ShowerFileReader.open(source);
    const first = await cost(source, () => reader.event(7000));
    expect(first.reads).toBe(3);
    const chunkBytes = (large.length / 20_000) * EVENTS_PER_CHUNK;
    expect(first.bytes).toBeLessThan(2000 + 1024 * 40 + 1.5 * chunkBytes);
    const neighbour = await cost(source, () => reader.event(7000 + EVENTS_PER_CHUNK));
    expect(neighbour.reads).toBe(1);
    expect(neighbour.bytes).toBeLessThan(1.5 * chunkBytes);
    expect((await cost(source, () => reader.event(7001))).reads).toBe(0);
  });

  it('gives the same event alone as in a walk through the file', async () => {
    const bytes = await fileOf(300);
    const reader = await ShowerFileReader.open(new CountingSource(bytes));
    let n = 0;
    for await (const batch of reader.batches()) {
      for (let k = 0; k < batch.events.length; k++, n++) {
        const alone = await reader.event(n);
        expect(alone.head).toEqual(batch.view(k).head);
        expect(alone.head.event).toBe(n);
        expect(firstDifference(alone, batch.view(k))).toBe(null);
      }
    }
    expect(n).toBe(300);
  });

  it('shares a read between events that are asked for at the same time', async () => {
    const source = new CountingSource(await fileOf(100));
    const reader = await ShowerFileReader.open(source);
    const shared = await cost(source, () => Promise.all([reader.event(3), reader.event(4), reader.event(5)]));
    expect(shared.reads).toBe(3);
  });

  it('refuses an event that is not there with a RangeError', async () => {
    const reader = await ShowerFileReader.open(new CountingSource(await fileOf(3)));
    for (const n of [-1, 3, 0.5, NaN]) await expect(reader.event(n)).rejects.toThrow(RangeError);
    await expect(reader.summaries(0, 4)).rejects.toThrow(RangeError);
  });
});

import { describe, expect, it } from 'vitest';
import {
  bytesSource,
  recover,
  ShowerFileError,
  ShowerFileReader,
  ShowerFileWriter,
} from '../../formats/index.ts';
import { MemorySink, readAll, writeFile } from './memory-file.ts';
import { buildBatch, plainEvent, sampleHead } from './random-histories.ts';
import { firstDifference } from './same-bits.ts';

const sample = sampleHead({ entries: ['id', 'px', 'from'], steps: ['t', 'channel', 'i'], trials: null });
const EVENTS = 200;
const batch = buildBatch(
  sample,
  Array.from({ length: EVENTS }, (_, n) => plainEvent(n, 1)),
);
const sink = new MemorySink();
const writer = new ShowerFileWriter(sink, sample);
await writer.append(batch);
await writer.finish();
const whole = sink.bytes;
/** Where each part that the writer wrote ends: head, four chunks, page, directory, head, index head, foot. */
const ends: number[] = [];
for (const part of sink.parts) ends.push((ends.at(-1) ?? 0) + part.length);

const salvage = (bytes: Uint8Array) => recover(bytesSource(bytes, 'damaged.shower'));

async function expectEvents(bytes: Uint8Array, numbers: readonly number[]): Promise<void> {
  const { reader, eventCount } = await salvage(bytes);
  expect(eventCount).toBe(numbers.length);
  let n = 0;
  for await (const part of reader.batches()) {
    for (let k = 0; k < part.events.length; k++, n++) {
      expect(part.events[k].event).toBe(n);
      expect(firstDifference(part.view(k), batch.view(numbers[n]))).toBe(null);
    }
  }
  expect(n).toBe(numbers.length);
}

const upTo = (count: number) => Array.from({ length: count }, (_, n) => n);
const without = (from: number, to: number) => upTo(EVENTS).filter((n) => n < from || n >= to);

describe('recovering', () => {
  it('a whole file loses nothing', async () => {
    const { losses, lostFrom, reason, lastGoodEvent } = await salvage(whole);
    expect({ losses, lostFrom, reason, lastGoodEvent }).toEqual({
      losses: [],
      lostFrom: null,
      reason: null,
      lastGoodEvent: EVENTS - 1,
    });
    await expectEvents(whole, upTo(EVENTS));
  });

  it('gives every finished chunk of a file that was cut at any length', async () => {
    for (let length = 0; length < whole.length; length += 23) {
      const cut = whole.slice(0, length);
      if (length < ends[0]) {
        await expect(salvage(cut)).rejects.toBeInstanceOf(ShowerFileError);
        continue;
      }
      const chunks = ends.slice(1, 5).filter((end) => end <= length).length;
      const { eventCount, losses, lastGoodEvent, reader } = await salvage(cut);
      expect(eventCount).toBe(Math.min(64 * chunks, EVENTS));
      expect(lastGoodEvent).toBe(eventCount - 1);
      expect(losses.length).toBe(1);
      expect(losses[0].toByte).toBe(length);
      expect(ends.includes(losses[0].fromByte)).toBe(true);
      if (eventCount > 0) {
        const last = await reader.event(eventCount - 1);
        expect(firstDifference(last, batch.view(eventCount - 1))).toBe(null);
      }
    }
  });

  it('gives all chunks that a killed writer had finished', async () => {
    const killed = new MemorySink();
    const unfinished = new ShowerFileWriter(killed, sample);
    await unfinished.append(batch);
    await expectEvents(killed.bytes, upTo(192));
    const { losses, lastGoodEvent } = await salvage(killed.bytes);
    expect(lastGoodEvent).toBe(191);
    expect(losses).toMatchObject([
      {
        fromByte: ends[3],
        toByte: ends[3],
        events: { first: 192, last: null },
        reason: { code: 'truncated-file' },
      },
    ]);
  });

  it('costs one chunk where a byte of it was changed, and says which events', async () => {
    for (const at of [ends[1], ends[1] + 8, ends[1] + 18, ends[1] + 24, ends[1] + 40, ends[2] - 1]) {
      const damaged = whole.slice();
      damaged[at] ^= 4;
      const { losses, lastGoodEvent, lostFrom } = await salvage(damaged);
      expect(losses).toMatchObject([
        {
          fromByte: ends[1],
          toByte: ends[2],
          events: { first: 64, last: 127 },
          reason: { code: 'wrong-checksum' },
        },
      ]);
      expect([lastGoodEvent, lostFrom]).toEqual([63, ends[1]]);
      await expectEvents(damaged, without(64, 128));
    }
  });

  it('costs what a hole of zeros covers', async () => {
    const damaged = whole.slice();
    damaged.fill(0, ends[1] + 5, ends[2] + 100);
    await expectEvents(damaged, without(64, 192));
  });

  it('costs nothing but the index where only that is damaged', async () => {
    for (const at of [
      ends[4] + 30,
      ends[5] + 30,
      ends[6] + 30,
      ends[7] + 30,
      ends[8] + 3,
      whole.length - 1,
    ]) {
      const damaged = whole.slice();
      damaged[at] ^= 1;
      await expectEvents(damaged, upTo(EVENTS));
      const { losses, reader } = await salvage(damaged);
      expect(losses.length).toBe(1);
      const summaries = await reader.summaries(0, EVENTS);
      const opened = await ShowerFileReader.open(bytesSource(whole, 'whole'));
      expect(summaries).toEqual(await opened.summaries(0, EVENTS));
    }
  });

  it('takes the head from its copy where the first is damaged', async () => {
    for (const at of [3, 10, 16, 25, 200]) {
      const damaged = whole.slice();
      damaged[at] ^= 16;
      await expectEvents(damaged, upTo(EVENTS));
      expect((await salvage(damaged)).reader.sample).toEqual(sample);
    }
  });

  it('finds again what was written from it, as a whole file', async () => {
    const damaged = whole.slice(0, ends[4] + 3);
    damaged[ends[2] + 50] ^= 1;
    const { reader } = await salvage(damaged);
    const mended = new MemorySink();
    const again = new ShowerFileWriter(mended, reader.sample, reader.channels, reader.unknown);
    for await (const part of reader.batches()) await again.append(part);
    await again.finish();
    const events = without(128, 192);
    const read = await readAll(mended.bytes);
    expect(read.map(({ head }) => head.stream)).toEqual(events);
    read.forEach((history, n) => {
      expect(firstDifference(history, batch.view(events[n]))).toBe(null);
    });
  });

  it('refuses foreign files and newer versions as opening does', async () => {
    await expect(salvage(new Uint8Array(3000))).rejects.toMatchObject({ code: 'foreign-file' });
    await expect(salvage(new Uint8Array(0))).rejects.toMatchObject({ code: 'foreign-file' });
    await expect(salvage(whole.slice(0, 5))).rejects.toMatchObject({ code: 'truncated-file' });
  });
});

describe('a file written again', () => {
  it('has the same bytes', async () => {
    const reader = await ShowerFileReader.open(bytesSource(whole, 'whole'));
    const copy = new MemorySink();
    const again = new ShowerFileWriter(copy, reader.sample, reader.channels, reader.unknown);
    for await (const part of reader.batches()) await again.append(part);
    await again.finish();
    expect(Buffer.compare(copy.bytes, whole)).toBe(0);
    expect(Buffer.compare(await writeFile(sample, [batch]), whole)).toBe(0);
  });
});

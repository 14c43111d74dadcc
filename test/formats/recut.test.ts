import { describe, expect, it } from 'vitest';
import { HistoryBatch } from '../../engine/index.ts';
import { ChunkEncoder, EVENTS_PER_CHUNK, ShowerFileWriter } from '../../formats/index.ts';
import { MemorySink, writeFile } from './memory-file.ts';
import { addEvent, buildBatch, plainEvent, sampleHead } from './random-histories.ts';

const sample = sampleHead();
const shapes = Array.from({ length: 1000 }, (_, n) => plainEvent(n, n % 4));
const whole = buildBatch(sample, shapes);

function* inPieces(size: number): Generator<HistoryBatch> {
  const batch = new HistoryBatch(sample);
  for (let n = 0; n < shapes.length; n += size) {
    batch.clear();
    for (const shape of shapes.slice(n, n + size)) addEvent(batch, shape);
    yield batch;
  }
}

describe('the bytes of a file', () => {
  it('do not depend on the sizes of the batches', async () => {
    const expected = await writeFile(sample, [whole]);
    for (const size of [1, 7, 63, 64, 65, 100, 1000]) {
      expect(Buffer.compare(await writeFile(sample, inPieces(size)), expected)).toBe(0);
    }
  });

  it('do not depend on who encodes the chunks', async () => {
    const encoder = new ChunkEncoder(sample, whole.channels);
    const sink = new MemorySink();
    const writer = new ShowerFileWriter(sink, sample);
    for (let n = 0; n < 1000; n += EVENTS_PER_CHUNK) {
      const chunk = encoder.encode(whole, n, Math.min(1000, n + EVENTS_PER_CHUNK), n);
      await writer.appendChunk(structuredClone(chunk));
    }
    await writer.finish();
    expect(Buffer.compare(sink.bytes, await writeFile(sample, [whole]))).toBe(0);
  });

  it('do not depend on the bits of a NaN', async () => {
    const files: Uint8Array[] = [];
    for (const high of [0x7ff80000, 0xfff80000, 0x7ff80001]) {
      const batch = buildBatch(sample, shapes.slice(0, 70));
      new Uint32Array(batch.steps.t.buffer).set([0, high], 20);
      expect(batch.steps.t[10]).toBeNaN();
      files.push(await writeFile(sample, [batch]));
    }
    expect(Buffer.compare(files[0], files[1])).toBe(0);
    expect(Buffer.compare(files[0], files[2])).toBe(0);
  });

  it('depend on every event', async () => {
    const other = buildBatch(sample, shapes);
    other.entries.px[other.entryStart[500]] += 1e-9;
    expect(Buffer.compare(await writeFile(sample, [other]), await writeFile(sample, [whole]))).not.toBe(0);
  });
});

describe('a chunk from elsewhere', () => {
  it('is refused out of turn', async () => {
    const encoder = new ChunkEncoder(sample, whole.channels);
    const writer = new ShowerFileWriter(new MemorySink(), sample);
    await expect(writer.appendChunk(encoder.encode(whole, 64, 128, 64))).rejects.toThrow(RangeError);
    await writer.append(buildBatch(sample, shapes.slice(0, 3)));
    await expect(writer.appendChunk(encoder.encode(whole, 0, 64, 0))).rejects.toThrow(RangeError);
  });
});

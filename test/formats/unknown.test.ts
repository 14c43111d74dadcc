import { describe, expect, it } from 'vitest';
import { bytesSource, FileBatch, ShowerFileReader, ShowerFileWriter } from '../../formats/index.ts';
import { MemorySink } from './memory-file.ts';
import { addEvent, plainEvent, sampleHead } from './random-histories.ts';

// Everything that a newer minor version or an author may add: keys of head, sample, event, chunk and index, columns of
// the tables and of the index.
const sample = { ...sampleHead(), kernels: { q_qg: 'CF * (1 + z)' }, note: 'of the author' };
const unknown = { head: { extra: [1, 'two'] }, index: { later: { deep: true } } };
const EVENTS = 150;

function authorsBatch(): FileBatch {
  const batch = new FileBatch(sample);
  for (let n = 0; n < EVENTS; n++) addEvent(batch, plainEvent(n, 1 + (n % 3)));
  for (const head of batch.events) if (head.event % 2) Object.assign(head, { mood: `m${head.event}` });
  const { steps, entries } = batch;
  batch.own.steps = {
    matrix: {
      values: Float64Array.from({ length: 16 * steps.length }, (_, k) => (k % 5 ? k : NaN)),
      each: 16,
    },
    order: { values: Int32Array.from({ length: steps.length }, (_, k) => k - 1), each: 1 },
  };
  batch.own.entries = {
    spin: { values: Float64Array.from({ length: entries.length }, (_, k) => k / 3), each: 1 },
  };
  batch.unknown = { checkedBy: 'someone' };
  batch.summaries = {
    'findings.violation': Float64Array.from({ length: EVENTS }, (_, n) => n % 4),
    oddness: Float64Array.from({ length: EVENTS }, (_, n) => 1 / (n + 1)),
    charm: Float64Array.from({ length: EVENTS }, (_, n) => -n),
  };
  return batch;
}

async function write(
  pieces: AsyncIterable<FileBatch> | Iterable<FileBatch>,
  keys = unknown,
): Promise<Uint8Array> {
  const sink = new MemorySink();
  const writer = new ShowerFileWriter(sink, sample, undefined, keys);
  for await (const piece of pieces) await writer.append(piece);
  await writer.finish();
  return sink.bytes;
}

const first = await write([authorsBatch()]);
const reader = await ShowerFileReader.open(bytesSource(first, 'first.shower'));

describe('what this version does not know', () => {
  it('is read as it was written', async () => {
    const batch = authorsBatch();
    expect(reader.unknown).toEqual(unknown);
    expect(reader.sample).toEqual(sample);
    for (const n of [0, 63, 64, 149]) {
      const history = await reader.event(n);
      expect(history.own).toEqual(batch.view(n).own);
      expect(history.head).toEqual(batch.view(n).head);
    }
    const summaries = await reader.summaries(0, EVENTS);
    expect(summaries.findings).toEqual({ violation: batch.summaries['findings.violation'] });
    expect(summaries.oddness).toEqual(batch.summaries.oddness);
    expect(summaries.unknown).toEqual({ charm: batch.summaries.charm });
  });

  it('is in the file again when its events are written to another', async () => {
    const again = await write(reader.batches(), {
      head: reader.unknown.head,
      index: reader.unknown.index,
    } as typeof unknown);
    expect(Buffer.compare(again, first)).toBe(0);
  });

  it('survives a new cut of the chunks', async () => {
    const batch = authorsBatch();
    const shifted = new FileBatch(sample);
    for (let n = 0; n < 10; n++) addEvent(shifted, plainEvent(1000 + n, 2));
    const moved = await ShowerFileReader.open(bytesSource(await write([shifted, batch]), 'moved.shower'));
    for (const n of [0, 60, 149]) {
      expect((await moved.event(10 + n)).own).toEqual(batch.view(n).own);
    }
    // The ten in front have no such columns; beside others in their chunk they miss the values.
    const { own } = await moved.event(3);
    expect(
      [...own.steps.order.values, ...own.entries.spin.values].every(
        (value) => value === -1 || Number.isNaN(value),
      ),
    ).toBe(true);
    const { oddness } = await moved.summaries(0, 12);
    expect([...oddness]).toEqual([...Array(10).fill(NaN), 1, 1 / 2]);
  });
});

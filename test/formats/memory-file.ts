import type { HistoryBatch, SampleHead } from '../../engine/index.ts';
import { type ByteSource, bytesSource, ShowerFileReader, ShowerFileWriter } from '../../formats/index.ts';

/** A sink that keeps everything. */
export class MemorySink {
  readonly parts: Uint8Array[] = [];

  write(bytes: Uint8Array): void {
    this.parts.push(bytes);
  }

  get bytes(): Uint8Array {
    const whole = new Uint8Array(this.parts.reduce((sum, part) => sum + part.length, 0));
    let at = 0;
    for (const part of this.parts) {
      whole.set(part, at);
      at += part.length;
    }
    return whole;
  }
}

/** The bytes of a file with these events. */
export async function writeFile(sample: SampleHead, batches: Iterable<HistoryBatch>): Promise<Uint8Array> {
  const sink = new MemorySink();
  const writer = new ShowerFileWriter(sink, sample);
  for (const batch of batches) await writer.append(batch);
  await writer.finish();
  return sink.bytes;
}

/** A source that counts what is read from it. */
export class CountingSource implements ByteSource {
  readonly name = 'counted.shower';
  reads = 0;
  bytes = 0;
  private readonly content: Uint8Array;

  constructor(content: Uint8Array) {
    this.content = content;
  }

  async size(): Promise<number> {
    return this.content.length;
  }

  async read(start: number, length: number): Promise<Uint8Array> {
    const part = this.content.slice(start, start + length);
    this.reads++;
    this.bytes += part.length;
    return part;
  }
}

/** Open a file in memory and read all of it, each event as an object. */
export async function readAll(bytes: Uint8Array): Promise<ReturnType<HistoryBatch['view']>[]> {
  const reader = await ShowerFileReader.open(bytesSource(bytes, 'memory.shower'));
  const events: ReturnType<HistoryBatch['view']>[] = [];
  for await (const batch of reader.batches()) {
    for (let n = 0; n < batch.events.length; n++) events.push(batch.view(n));
  }
  return events;
}

import { createGrower, type GrowSettings, HistoryBatch, resolveSettings } from '../../engine/index.ts';
import {
  type ByteSource,
  bytesSource,
  EVENTS_PER_CHUNK,
  recover,
  ShowerFileReader,
  ShowerFileWriter,
} from '../../formats/index.ts';
import { calibrationTurn } from './calibration.ts';

export interface FileFigures {
  readonly label: string;
  /** Events grown, written and read in a second, each by itself, one thread. */
  readonly grownPerSecond: number;
  readonly writtenPerSecond: number;
  readonly readPerSecond: number;
  readonly recoveredPerSecond: number;
  /** Time to write an event over the time to grow it. */
  readonly writeOverGrow: number;
  /** Time to write, to read an event over a turn of the calibration loop. */
  readonly writeRatio: number;
  readonly readRatio: number;
  /** Bytes of an event in the file, and in columns in memory. */
  readonly fileBytesPerEvent: number;
  readonly memoryBytesPerEvent: number;
  /** Opening the file, and an event from a chunk that was not read yet [ms]. */
  readonly openMs: number;
  readonly eventMs: number;
}

const ROUNDS = 8;
const WARM_UP = 3;

/** Speed and size of a native file in memory, one thread; the fastest round counts. */
export async function fileBench(
  label: string,
  some: Partial<GrowSettings>,
  events: number,
): Promise<FileFigures> {
  const grower = createGrower(resolveSettings(some));
  const batch = new HistoryBatch(grower.sample);
  const best = {
    grow: Infinity,
    write: Infinity,
    read: Infinity,
    recover: Infinity,
    open: Infinity,
    event: Infinity,
  };
  let calibration = Infinity;
  let fileBytes = 0;
  let memoryBytes = 0;
  for (let round = 0; round < ROUNDS; round++) {
    const turn = calibrationTurn();
    const parts: Uint8Array[] = [];
    const writer = new ShowerFileWriter({ write: (bytes) => void parts.push(bytes) }, grower.sample);
    let grow = 0;
    let write = 0;
    memoryBytes = 0;
    for (let event = 0; event < events; event += EVENTS_PER_CHUNK) {
      batch.clear();
      const start = performance.now();
      for (let n = event; n < Math.min(events, event + EVENTS_PER_CHUNK); n++) grower.grow(batch, n);
      const grown = performance.now();
      await writer.append(batch);
      write += performance.now() - grown;
      grow += grown - start;
      memoryBytes += bytesInUse(batch);
    }
    write += await time(() => writer.finish());
    const source = bytesSource(joined(parts), label);
    fileBytes = await source.size();
    const read = await time(() => readAll(source));
    const recovered = await time(() => recover(source));
    const open = await time(() => ShowerFileReader.open(source));
    const reader = await ShowerFileReader.open(source);
    const one = await time(() => reader.event(events >> 1));
    if (round < WARM_UP) continue;
    calibration = Math.min(calibration, turn);
    best.grow = Math.min(best.grow, grow);
    best.write = Math.min(best.write, write);
    best.read = Math.min(best.read, read);
    best.recover = Math.min(best.recover, recovered);
    best.open = Math.min(best.open, open);
    best.event = Math.min(best.event, one);
  }
  return {
    label,
    grownPerSecond: (1000 * events) / best.grow,
    writtenPerSecond: (1000 * events) / best.write,
    readPerSecond: (1000 * events) / best.read,
    recoveredPerSecond: (1000 * events) / best.recover,
    writeOverGrow: best.write / best.grow,
    writeRatio: (1e6 * best.write) / events / calibration,
    readRatio: (1e6 * best.read) / events / calibration,
    fileBytesPerEvent: fileBytes / events,
    memoryBytesPerEvent: memoryBytes / events,
    openMs: best.open,
    eventMs: best.event,
  };
}

async function time(work: () => Promise<unknown>): Promise<number> {
  const start = performance.now();
  await work();
  return performance.now() - start;
}

async function readAll(source: ByteSource): Promise<number> {
  const reader = await ShowerFileReader.open(source);
  let events = 0;
  for await (const batch of reader.batches()) events += batch.events.length;
  if (events !== reader.eventCount) throw new Error(`${events} events of ${reader.eventCount}`);
  return events;
}

function bytesInUse(batch: HistoryBatch): number {
  let bytes = 0;
  for (const table of [batch.entries, batch.steps, batch.trials]) {
    for (const column of Object.values(table ?? {})) {
      if (ArrayBuffer.isView(column) && table)
        bytes += (column as Uint8Array).BYTES_PER_ELEMENT * table.length;
    }
  }
  return bytes;
}

function joined(parts: readonly Uint8Array[]): Uint8Array {
  const whole = new Uint8Array(parts.reduce((sum, part) => sum + part.length, 0));
  let at = 0;
  for (const part of parts) {
    whole.set(part, at);
    at += part.length;
  }
  return whole;
}

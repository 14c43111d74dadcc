import { encodeMessagePack } from '../message-pack/index.ts';
import type { ByteSource } from '../sources/index.ts';
import type { ChunkSummaries } from './event-summaries.ts';
import { decodeBlock, FieldError, Fields } from './fields.ts';
import { readPlainColumn, writePlainColumn } from './plain-column.ts';
import type { Block, BlockPlace } from './read-block.ts';

/** Place of some chunks and summary columns of their events. */
export interface IndexPage {
  /** Number of its first event in the file. */
  readonly first: number;
  readonly events: number;
  readonly chunks: readonly BlockPlace[];
  /** Summary columns by name, one element an event. */
  readonly columns: Readonly<Record<string, Float64Array>>;
}

/** What the writer knows of a chunk that stands in the file. */
export interface WrittenChunk {
  readonly place: BlockPlace;
  readonly summaries: ChunkSummaries;
}

/** Payload of a page about chunks that follow each other. */
export function encodePage(first: number, chunks: readonly WrittenChunk[]): Uint8Array {
  const starts = Float64Array.from(chunks, ({ place }) => place.start);
  const bytes = Float64Array.from(chunks, ({ place }) => place.bytes);
  const all = chunks.map(({ summaries }) => summaries);
  const counts = all.map(({ weight }) => weight.length);
  const events = counts.reduce((sum, count) => sum + count, 0);
  const joined = (part: (of: ChunkSummaries) => ArrayLike<number> | undefined) => {
    const column = new Float64Array(events).fill(NaN);
    let at = 0;
    all.forEach((summaries, k) => {
      column.set(part(summaries) ?? [], at);
      at += counts[k];
    });
    return column;
  };
  const carried = new Set(all.flatMap((summaries) => Object.keys(summaries.carried)));
  return encodeMessagePack({
    first,
    events,
    chunkStart: writePlainColumn(starts, 'u8'),
    chunkBytes: writePlainColumn(bytes, 'u4'),
    columns: {
      branchings: writePlainColumn(
        joined(({ branchings }) => branchings),
        'i4',
      ),
      finalPartons: writePlainColumn(
        joined(({ finalPartons }) => finalPartons),
        'i4',
      ),
      hardestKT: writePlainColumn(
        joined(({ hardestKT }) => hardestKT),
        'f8',
      ),
      worstCoherence: writePlainColumn(
        joined(({ worstCoherence }) => worstCoherence),
        'f8',
      ),
      weight: writePlainColumn(
        joined(({ weight }) => weight),
        'f8',
      ),
      ...Object.fromEntries(
        [...carried].map((name) => [
          name,
          writePlainColumn(
            joined((of) => of.carried[name]),
            'f8',
          ),
        ]),
      ),
    },
  });
}

/** @throws ShowerFileError `malformed-file` where a column is missing or has another length. */
export function decodePage(source: ByteSource, block: Block): IndexPage {
  return decodeBlock(source.name, block, (fields) => {
    const events = fields.integer('events', 1);
    const starts = readPlainColumn(fields.value('chunkStart'), 'chunkStart', null);
    const bytes = readPlainColumn(fields.value('chunkBytes'), 'chunkBytes', starts.length);
    if (starts.length === 0 || starts.length > events) {
      throw new FieldError('chunkStart', `${starts.length} chunks`, `1 to ${events}`);
    }
    const columns: Record<string, Float64Array> = {};
    const map = new Fields(fields.value('columns'), 'columns');
    for (const name of map.keys())
      columns[name] = readPlainColumn(map.value(name), `columns.${name}`, events);
    const chunks = Array.from(starts, (start, k) => ({ start, bytes: bytes[k] }));
    return { first: fields.integer('first'), events, chunks, columns };
  });
}

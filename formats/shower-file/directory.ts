import { encodeMessagePack } from '../message-pack/index.ts';
import { ShowerFileError } from '../shower-file-error.ts';
import type { ByteSource } from '../sources/index.ts';
import { decodeBlock, type UnknownKeys } from './fields.ts';
import { BLOCK_HEAD_BYTES, FOOT_PAYLOAD_BYTES, MOST_EVENTS, PAGES_PER_DIRECTORY } from './layout.ts';
import { readPlainColumn, writePlainColumn } from './plain-column.ts';
import type { Block, BlockPlace } from './read-block.ts';

/** Payload of a directory page: places of up to PAGES_PER_DIRECTORY index pages, the same size however many. */
export function encodeDirectory(pages: readonly BlockPlace[]): Uint8Array {
  const starts = Float64Array.from(pages, ({ start }) => start);
  const bytes = Float64Array.from(pages, (page) => page.bytes);
  return encodeMessagePack({
    pageStart: writePlainColumn(starts, 'u8', PAGES_PER_DIRECTORY),
    pageBytes: writePlainColumn(bytes, 'u4', PAGES_PER_DIRECTORY),
  });
}

/** @throws ShowerFileError `malformed-file`. */
export function decodeDirectory(source: ByteSource, block: Block): BlockPlace[] {
  return decodeBlock(source.name, block, (fields) => {
    const starts = readPlainColumn(fields.value('pageStart'), 'pageStart', null);
    const bytes = readPlainColumn(fields.value('pageBytes'), 'pageBytes', starts.length);
    return Array.from(starts, (start, k) => ({ start, bytes: bytes[k] }));
  });
}

/** What the index as a whole says; it stands right before the foot. */
export interface IndexHead {
  /** Events in the file. */
  readonly events: number;
  /** Events of every chunk and page but the last. */
  readonly eventsPerChunk: number;
  readonly eventsPerPage: number;
  readonly pages: number;
  /** Where the first directory page begins; the others follow, all of the same length. */
  readonly directoryStart: number;
  readonly directoryBytes: number;
  readonly pagesPerDirectory: number;
  readonly unknown: UnknownKeys;
}

export function encodeIndexHead(index: IndexHead): Uint8Array {
  const { unknown, ...known } = index;
  return encodeMessagePack({ ...known, ...unknown });
}

/** @throws ShowerFileError `malformed-file` where its numbers do not fit each other. */
export function decodeIndexHead(source: ByteSource, block: Block): IndexHead {
  return decodeBlock(source.name, block, (fields) => {
    const index = {
      events: fields.integer('events'),
      eventsPerChunk: fields.integer('eventsPerChunk', 1),
      eventsPerPage: fields.integer('eventsPerPage', 1),
      pages: fields.integer('pages'),
      directoryStart: fields.integer('directoryStart'),
      directoryBytes: fields.integer('directoryBytes'),
      pagesPerDirectory: fields.integer('pagesPerDirectory', 1),
    };
    const fault = (found: string, expected: string) =>
      new ShowerFileError('malformed-file', source.name, block.start, found, expected);
    const pages = Math.ceil(index.events / index.eventsPerPage);
    if (index.pages !== pages || index.eventsPerPage % index.eventsPerChunk !== 0) {
      const expected = `${pages} pages for ${index.events} events, and whole chunks to a page`;
      throw fault(`${index.pages} pages`, expected);
    }
    // Every chunk takes some bytes before this block.
    const chunks = Math.ceil(index.events / index.eventsPerChunk);
    if (index.eventsPerChunk > MOST_EVENTS || chunks * BLOCK_HEAD_BYTES > block.start) {
      throw fault(`${index.events} events in ${chunks} chunks`, `no more than ${block.start} bytes can hold`);
    }
    return { ...index, unknown: fields.unknown() };
  });
}

/** Payload of the foot: where the index head is. All its bytes have their place. */
export function encodeFoot(index: BlockPlace): Uint8Array {
  const payload = new Uint8Array(FOOT_PAYLOAD_BYTES);
  const view = new DataView(payload.buffer);
  payload[0] = 0x92;
  payload[1] = 0xcf;
  view.setBigUint64(2, BigInt(index.start));
  payload[10] = 0xce;
  view.setUint32(11, index.bytes);
  return payload;
}

/** @throws ShowerFileError `malformed-file`. */
export function decodeFoot(source: ByteSource, block: Block): BlockPlace {
  const { payload } = block;
  const marks = payload.length === FOOT_PAYLOAD_BYTES && payload[0] === 0x92 && payload[1] === 0xcf;
  if (!marks || payload[10] !== 0xce) {
    const found = `${payload.length} other bytes`;
    const expected = `${FOOT_PAYLOAD_BYTES} bytes that say where the index is`;
    throw new ShowerFileError('malformed-file', source.name, block.start, found, expected);
  }
  const view = new DataView(payload.buffer, payload.byteOffset, payload.length);
  return { start: Number(view.getBigUint64(2)), bytes: view.getUint32(11) };
}

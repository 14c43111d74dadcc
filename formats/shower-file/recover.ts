import { ShowerFileError } from '../shower-file-error.ts';
import type { ByteSource } from '../sources/index.ts';
import { checkFileHead } from './file-head.ts';
import { FILE_HEAD_BYTES } from './layout.ts';
import { ShowerFileReader } from './reader.ts';
import { type Loss, Salvage } from './salvage.ts';
import { walkWhatIsWhole } from './walk.ts';
import { WalkedIndex } from './walked-index.ts';

/** What is whole of a native file. */
export interface Recovery {
  /** Reads the events that are whole, numbered anew from 0. */
  readonly reader: ShowerFileReader;
  /** How many they are. */
  readonly eventCount: number;
  /** What was lost, from front to back; empty for a file that is whole. */
  readonly losses: readonly Loss[];
  /** The first byte that could not be used; null where nothing was lost. */
  readonly lostFrom: number | null;
  /** Why; null where nothing was lost. */
  readonly reason: ShowerFileError | null;
  /** The last event before the first that was lost, the last of all where none was; -1 for none. */
  readonly lastGoodEvent: number;
}

/**
 * Find what is whole of a file, damaged or not; reads it from front to back once.
 *
 * A file whose end is missing gives every chunk that was finished. Damage in the middle costs the chunk that it hit: the events
 * behind it are found again, and numbered without a gap. A damaged head is replaced by the copy at the end.
 *
 * @throws ShowerFileError where there is nothing to find: a foreign file, one of a newer major version, one without a head.
 */
export async function recover(source: ByteSource): Promise<Recovery> {
  const size = await source.size();
  const markDamage = checkMark(await source.read(0, FILE_HEAD_BYTES), source.name);
  const salvage = new Salvage(source);
  if (markDamage) salvage.add({ start: 0, end: FILE_HEAD_BYTES, reason: markDamage });
  for await (const part of walkWhatIsWhole(source)) salvage.add(part);
  salvage.finish();
  const { head, losses } = salvage;
  if (!head) {
    const none = new ShowerFileError('truncated-file', source.name, size, 'the end of the file', 'the head');
    throw losses[0]?.reason ?? none;
  }
  const index = new WalkedIndex(source, size, salvage.chunks, salvage.pages);
  const unknown = { head: head.unknown, index: salvage.unknownIndexKeys };
  const reader = new ShowerFileReader(source, size, head, index, unknown);
  const lost = losses.find(({ events }) => events !== null)?.events;
  return {
    reader,
    eventCount: index.eventCount,
    losses,
    lostFrom: losses[0]?.fromByte ?? null,
    reason: losses[0]?.reason ?? null,
    lastGoodEvent: lost ? lost.first - 1 : index.eventCount - 1,
  };
}

/** Damage to the first bytes, null without; files that are foreign, newer or too short to tell are refused. */
function checkMark(bytes: Uint8Array, file: string): ShowerFileError | null {
  try {
    checkFileHead(bytes, file);
    return null;
  } catch (error) {
    if (error instanceof ShowerFileError && error.code === 'wrong-checksum') return error;
    throw error;
  }
}

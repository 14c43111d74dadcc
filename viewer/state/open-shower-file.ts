import {
  type ByteSource,
  type Recovery,
  recover,
  ShowerFileError,
  ShowerFileReader,
} from '../../formats/index.ts';
import type { OpenedFile } from './event-file.ts';

// What is damaged can hold whole events; what is something else cannot.
const DAMAGE = new Set<ShowerFileError['code']>(['truncated-file', 'wrong-checksum', 'malformed-file']);

/** What a reader has to know of a damaged file as long as it is open. */
export function damageText({
  losses,
  reason,
  eventCount,
}: Pick<Recovery, 'losses' | 'reason' | 'eventCount'>): string {
  const first = reason?.message ?? 'its end is missing';
  const more =
    losses.length > 1
      ? ` Damage in ${losses.length - 1} more ${losses.length === 2 ? 'place' : 'places'}.`
      : '';
  const whole = eventCount === 1 ? 'One event is' : `${eventCount} events are`;
  return `${first}.${more} ${whole} whole and shown, numbered from 0.`;
}

/**
 * Open a native file, or what is whole of a damaged one.
 *
 * @throws ShowerFileError for a file that is foreign, of a newer major version, unreadable, or without one whole event.
 */
export async function openShowerFile(source: ByteSource): Promise<OpenedFile> {
  try {
    return { file: await ShowerFileReader.open(source), warning: null };
  } catch (error) {
    if (!(error instanceof ShowerFileError && DAMAGE.has(error.code))) throw error;
    const whole = await recover(source);
    if (whole.eventCount === 0) throw error;
    return { file: whole.reader, warning: damageText(whole) };
  }
}

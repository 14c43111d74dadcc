import { WrongUse } from './errors.ts';
import { readInteger } from './option.ts';

/** Events `from` to `to` inclusive; `to` null: the last of the file. */
export interface EventRange {
  readonly from: number;
  readonly to: number | null;
}

/** What `readEventRange` takes, in words. */
export const EVENT_RANGE = 'N | A..B | all';

/** Events as the command line names them, undefined for anything else. */
export function readEventRange(text: string): EventRange | undefined {
  if (text === 'all') return { from: 0, to: null };
  const ends = text.split('..').map(readInteger);
  if (ends.length > 2 || ends.includes(undefined)) return undefined;
  const [from, to] = [ends[0] as number, ends[ends.length - 1] as number];
  return from <= to ? { from, to } : undefined;
}

/**
 * First and last event of a range in a file.
 *
 * @throws WrongUse where the file lacks one of them.
 */
export function withinFile(
  range: EventRange,
  eventCount: number,
  file: string,
): { first: number; last: number } {
  const last = range.to ?? eventCount - 1;
  if (range.to !== null && last >= eventCount) {
    const holds = eventCount === 0 ? 'no events' : `events 0 to ${eventCount - 1}`;
    throw new WrongUse('no-such-event', `${file} holds ${holds}; found --event ${last}`);
  }
  return { first: range.from, last };
}

import { CHANNELS, KINDS, REASONS, ROLES, type SampleHead } from '../../engine/index.ts';
import { encodeMessagePack, type PackableOrUndefined, withoutUndefined } from '../message-pack/index.ts';
import type { ByteSource } from '../sources/index.ts';
import { asText, decodeBlock, FieldError, Fields, type UnknownKeys } from './fields.ts';
import { EVENTS_PER_CHUNK, EVENTS_PER_PAGE, MAJOR, MINOR } from './layout.ts';
import type { Block } from './read-block.ts';
import { readSampleHead } from './sample-head.ts';

/** What the head of a file says. */
export interface FileHead {
  readonly sample: SampleHead;
  /** Words of the codes in the columns `channel`, `role`, `kind` and `reason`. */
  readonly channels: readonly string[];
  readonly roles: readonly string[];
  readonly kinds: readonly string[];
  readonly reasons: readonly string[];
  readonly unknown: UnknownKeys;
}

/** Payload of the head. @throws TypeError for a head with values that MessagePack has no standard form for. */
export function encodeHead(
  sample: SampleHead,
  channels: readonly string[],
  unknown: UnknownKeys,
): Uint8Array {
  return encodeMessagePack({
    version: [MAJOR, MINOR],
    sample: withoutUndefined(sample as unknown as PackableOrUndefined),
    channels,
    roles: ROLES,
    kinds: KINDS,
    reasons: REASONS,
    eventsPerChunk: EVENTS_PER_CHUNK,
    eventsPerPage: EVENTS_PER_PAGE,
    ...unknown,
  });
}

/** @throws ShowerFileError `malformed-file`. */
export function decodeHead(source: ByteSource, block: Block): FileHead {
  return decodeBlock(source.name, block, (fields) => {
    // For readers without an index, and for people.
    for (const key of ['version', 'eventsPerChunk', 'eventsPerPage']) fields.optional(key);
    const words = (key: string, absent: readonly string[]) => {
      const list = fields.list(key, asText);
      if (list.length > 256) throw new FieldError(key, `${list.length} words`, '256 at the most');
      return list.length > 0 ? list : absent;
    };
    return {
      sample: readSampleHead(new Fields(fields.value('sample'), 'sample')),
      channels: words('channels', CHANNELS),
      roles: words('roles', ROLES),
      kinds: words('kinds', KINDS),
      reasons: words('reasons', REASONS),
      unknown: fields.unknown(),
    };
  });
}

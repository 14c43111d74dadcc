import { beforeAll, describe, expect, test } from 'vitest';
import { createGrower, HistoryBatch, resolveSettings } from '../../../engine/index.ts';
import { bytesSource, ShowerFileError, ShowerFileWriter } from '../../../formats/index.ts';
import { damageText, openShowerFile } from '../../../viewer/state/index.ts';

let bytes: Uint8Array;

beforeAll(async () => {
  const grower = createGrower(resolveSettings({ energy: 200 }));
  const batch = new HistoryBatch(grower.sample);
  for (let event = 0; event < 300; event++) grower.grow(batch, event);
  const parts: Uint8Array[] = [];
  const writer = new ShowerFileWriter({ write: (part) => void parts.push(part.slice()) }, grower.sample);
  await writer.append(batch);
  await writer.finish();
  bytes = Buffer.concat(parts);
});

const refusal = async (content: Uint8Array): Promise<unknown> =>
  openShowerFile(bytesSource(content, 'a.shower')).catch((error) => error);

describe('opening a native file', () => {
  test('gives a whole one without a warning', async () => {
    const { file, warning } = await openShowerFile(bytesSource(bytes, 'a.shower'));
    expect(file.eventCount).toBe(300);
    expect(warning).toBeNull();
  });

  test('gives what is whole of one that was cut off, and says where and how much', async () => {
    const { file, warning } = await openShowerFile(
      bytesSource(bytes.subarray(0, bytes.length * 0.7), 'a.shower'),
    );
    expect(file.eventCount).toBeGreaterThan(0);
    expect(file.eventCount).toBeLessThan(300);
    expect(warning).toMatch(/^a\.shower, byte \d+: expected /);
    expect(warning).toContain(`${file.eventCount} events are whole and shown`);
    expect((await file.event(file.eventCount - 1)).head.event).toBe(file.eventCount - 1);
  });

  test('refuses one without a whole event, a foreign one and an empty one with their own error', async () => {
    for (const content of [bytes.subarray(0, 3000), Buffer.from('no shower at all'), new Uint8Array(0)]) {
      expect(await refusal(content)).toBeInstanceOf(ShowerFileError);
    }
  });
});

test('the warning counts further places of damage', () => {
  const reason = new ShowerFileError('wrong-checksum', 'a.shower', 100, 'checksum 1', 'checksum 2');
  const loss = { fromByte: 100, toByte: 200, events: null, reason };
  expect(damageText({ losses: [loss, loss, loss], reason, eventCount: 1 })).toBe(
    'a.shower, byte 100: expected checksum 2, found checksum 1. Damage in 2 more places. One event is whole and shown, numbered from 0.',
  );
});

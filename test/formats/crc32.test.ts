import { crc32 as nodeCrc32 } from 'node:zlib';
import fc from 'fast-check';
import { expect, it } from 'vitest';
import { crc32 } from '../../formats/checksum/index.ts';

it('the checksum of "123456789" is the published one', () => {
  expect(crc32(new TextEncoder().encode('123456789'))).toBe(0xcbf43926);
});

it('checksums agree with those of zlib for any bytes at any alignment', () => {
  fc.assert(
    fc.property(fc.uint8Array({ maxLength: 100 }), fc.nat(20), (bytes, start) => {
      expect(crc32(bytes, Math.min(start, bytes.length))).toBe(nodeCrc32(bytes.subarray(start)));
    }),
    { seed: 7, numRuns: 500 },
  );
});

import { describe, expect, it } from 'vitest';
import { bytesSource, ShowerFileError, ShowerFileReader } from '../../formats/index.ts';
import { readAll, writeFile } from './memory-file.ts';
import { buildBatch, plainEvent, sampleHead } from './random-histories.ts';

const sample = sampleHead({ entries: ['id', 'px', 'from'], steps: ['t', 'channel', 'i'], trials: null });
const batch = buildBatch(
  sample,
  Array.from({ length: 66 }, (_, n) => plainEvent(n, 1)),
);
const whole = await writeFile(sample, [batch]);

const few = sampleHead({ entries: ['px'], steps: ['channel'], trials: null });
const small = await writeFile({ ...few, beams: [], shower: {} }, [buildBatch(few, [plainEvent(3, 1)])]);

/** The error of reading everything; null where there is none. */
async function errorOf(bytes: Uint8Array): Promise<unknown> {
  try {
    await readAll(bytes);
    return null;
  } catch (error) {
    return error;
  }
}

async function openError(bytes: Uint8Array): Promise<ShowerFileError> {
  const error = await ShowerFileReader.open(bytesSource(bytes, 'some.file')).catch(
    (thrown: unknown) => thrown,
  );
  if (!(error instanceof ShowerFileError)) throw new Error(`no ShowerFileError but ${String(error)}`);
  return error;
}

const text = (content: string) => new TextEncoder().encode(content);

describe('a full read', () => {
  it('finds no fault in a whole file', async () => {
    expect(await errorOf(whole)).toBe(null);
  });

  it('notices every single changed byte, wherever it is', async () => {
    const missed: string[] = [];
    for (let at = 0; at < small.length; at++) {
      const damaged = small.slice();
      damaged[at] ^= 1 << (at % 8);
      const error = await errorOf(damaged);
      if (!(error instanceof ShowerFileError)) missed.push(`byte ${at}: ${String(error)}`);
    }
    expect(missed).toEqual([]);
  });

  it('notices bytes behind the end, and blocks taken out of the middle', async () => {
    expect((await openError(Uint8Array.of(...whole, 0))).code).toBe('truncated-file');
    const reader = await ShowerFileReader.open(bytesSource(whole, 'whole'));
    expect(reader.eventCount).toBe(66);
    // Both chunks cut out, everything behind them moved to the front.
    const [first, second] = chunkStarts(whole);
    const without = Uint8Array.of(...whole.subarray(0, first), ...whole.subarray(second));
    expect(await errorOf(without)).toBeInstanceOf(ShowerFileError);
  });
});

/** Where blocks with events begin, by their tag. */
function chunkStarts(bytes: Uint8Array): number[] {
  const starts: number[] = [];
  for (let at = 0; at < bytes.length; at++) {
    if (bytes[at] === 0x95 && new TextDecoder('latin1').decode(bytes.subarray(at + 2, at + 6)) === 'evnt')
      starts.push(at);
  }
  return starts;
}

describe('opening', () => {
  it('refuses every shorter length with a typed error that names the place', async () => {
    for (let length = 0; length < small.length; length++) {
      const error = await openError(small.slice(0, length));
      expect(error.code).toBe(length === 0 ? 'foreign-file' : 'truncated-file');
      expect(error.byte).toBeLessThanOrEqual(length);
      expect(error.message).toBe(
        `some.file, byte ${error.byte}: expected ${error.expected}, found ${error.found}`,
      );
    }
  });

  it('says of a foreign file what it is', async () => {
    const cases: [Uint8Array, string][] = [
      [new Uint8Array(0), 'an empty file'],
      [new Uint8Array(5000), 'zeros'],
      [text('<LesHouchesEvents version="3.0">\n'), 'text, "<LesHouchesEvents v"'],
      [text('P'), 'text, "P"'],
      [Uint8Array.of(0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a), 'a PNG image'],
      [Uint8Array.of(0x50, 0x4b, 3, 4, 20, 0), 'a zip archive'],
      [Uint8Array.of(0x1f, 0x8b, 8, 0), 'a gzip file'],
      [Uint8Array.of(1, 2, 3, 4, 5, 6, 7, 8, 9, 250), 'bytes 01 02 03 04 05 06 07 08'],
    ];
    for (const [bytes, found] of cases) {
      const error = await openError(bytes);
      expect([error.code, error.byte, error.found]).toEqual(['foreign-file', 0, found]);
    }
  });

  it('refuses a newer major version and names both', async () => {
    const newer = whole.slice();
    newer[10] = 7;
    newer.set(crcBytes(newer.subarray(0, 14)), 15);
    const error = await openError(newer);
    expect(error.code).toBe('newer-version');
    expect(error.message).toBe(
      'some.file, byte 8: expected version 1.x, the newest known here, found version 7.0',
    );
  });

  it('reads a newer minor version', async () => {
    const newer = whole.slice();
    newer[13] = 9;
    newer.set(crcBytes(newer.subarray(0, 14)), 15);
    expect((await readAll(newer)).length).toBe(66);
  });
});

/** CRC-32 one bit at a time, apart from the one under test. Source: ISO 3309. */
function crcBytes(bytes: Uint8Array): Uint8Array {
  let c = 0xffffffff;
  for (const byte of bytes) {
    c ^= byte;
    for (let bit = 0; bit < 8; bit++) c = c & 1 ? (c >>> 1) ^ 0xedb88320 : c >>> 1;
  }
  c = ~c >>> 0;
  return Uint8Array.of(c >>> 24, c >>> 16, c >>> 8, c);
}

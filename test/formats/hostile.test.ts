import { deflateRawSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { bytesSource, recover, ShowerFileError, ShowerFileReader } from '../../formats/index.ts';
import { blocksOf, craftBlock, craftFoot, withChanged } from './craft.ts';
import { CountingSource, writeFile } from './memory-file.ts';
import { buildBatch, plainEvent, sampleHead } from './random-histories.ts';

// Checksums prove that nothing changed since a file was written, not that its writer meant well.

const sample = sampleHead({ entries: ['id', 'px'], steps: ['t', 'channel'], trials: null });
const shapes = Array.from({ length: 5 }, (_, n) => plainEvent(n, 2));
const whole = await writeFile(sample, [buildBatch(sample, shapes)]);

// biome-ignore lint/suspicious/noExplicitAny: maps of any shape are the point
type Chunk = Record<string, any>;

/** The error of reading a chunk that was changed in this way. */
async function errorOf(change: (chunk: Chunk) => void): Promise<ShowerFileError> {
  const { reader, reason } = await recover(bytesSource(withChanged(whole, 'evnt', change), 'hostile.shower'));
  // A chunk that does not even say which events it holds counts as damage.
  const error = reader.eventCount === 0 ? reason : await reader.event(0).catch((thrown: unknown) => thrown);
  if (!(error instanceof ShowerFileError)) throw new Error(`no ShowerFileError but ${String(error)}`);
  return error;
}

const cases: readonly (readonly [string, (chunk: Chunk) => void, RegExp])[] = [
  [
    'more rows than its bytes can mean',
    (c) => Object.assign(c.rows, { entries: 2 ** 30 }),
    /at the most.*rows\.entries/,
  ],
  [
    'more events than a chunk may have',
    (c) => Object.assign(c, { events: 2 ** 30 }),
    /65536 at the most.*events: 1073741824/,
  ],
  ['rows that are no number', (c) => Object.assign(c.rows, { entries: 'many' }), /rows\.entries.*"many"/],
  ['counts that do not sum to the rows', (c) => c.rows.steps++, /./],
  [
    'other bytes than its groups say',
    (c) => Object.assign(c, { stored: Buffer.alloc(1) }),
    /as the groups say.*stored/,
  ],
  ['a broken deflate stream', (c) => Object.assign(c, { deflated: new Uint8Array(500).fill(7) }), /deflated/],
  [
    'a deflate stream that is too short',
    (c) => Object.assign(c, { deflated: deflateRawSync(Buffer.alloc(9)) }),
    /deflated/,
  ],
  [
    'a deflate stream that goes on',
    (c) => Object.assign(c, { deflated: deflateRawSync(Buffer.alloc(1e5)) }),
    /deflated.*more/,
  ],
  [
    'columns that would inflate to gigabytes',
    (c) => {
      c.rows.entries = 60_000;
      const columns = Array.from({ length: 5000 }, (_, k) => `c${k}`);
      c.groups.push({ table: 'entries', type: 'f8', columns, deflated: 255 });
    },
    /at the most in a chunk.*bytes to inflate/,
  ],
  ['an unknown type', (c) => Object.assign(c.groups[0], { type: 'f2' }), /groups\[0\]\.type.*"f2"/],
  [
    'a type inherited from Object',
    (c) => Object.assign(c.groups[0], { type: 'constructor' }),
    /groups\[0\]\.type/,
  ],
  ['an unknown table', (c) => Object.assign(c.groups[0], { table: 'toString' }), /groups\[0\]\.table/],
  ['any number of elements a row', (c) => Object.assign(c.groups[0], { each: 2 ** 40 }), /groups\[0\]\.each/],
  [
    'planes that a type has not',
    (c) => Object.assign(c.groups[0], { deflated: 2 ** 20 }),
    /groups\[0\]\.deflated/,
  ],
  ['no groups', (c) => Object.assign(c, { groups: [] }), /stored|deflated/],
  ['other events than it says', (c) => Object.assign(c, { heads: [{}] }), /heads/],
  ['heads of the wrong kind', (c) => Object.assign(c.heads[2], { status: 3 }), /heads\[2\]\.status/],
  [
    'a code without a word',
    (c) => Object.assign(c, { channels: ['one'] }),
    /steps\.channel\[\d+\].*code [12]/,
  ],
  [
    'a thousand columns of constants that cost no bytes',
    (c) => {
      const columns = Array.from({ length: 1000 }, (_, k) => `c${k}`);
      c.groups.push({ table: 'steps', type: 'f8', constant: true, each: 4000, columns });
      c.stored = Buffer.concat([c.stored, Buffer.alloc(8 * columns.length)]);
    },
    /fewer constant columns.*steps\.c\d/,
  ],
];

describe('a chunk with', () => {
  for (const [what, change, message] of cases) {
    it(`${what} is refused`, async () => {
      const error = await errorOf(change);
      expect(error.code).toBe('malformed-file');
      expect(error.message).toMatch(message);
    });
  }
});

describe('a file whose lengths lie', () => {
  it('is refused without reading or making room for them', async () => {
    const head = blocksOf(whole)[0];
    const claims = craftBlock('evnt', new Uint8Array(10), 2 ** 30);
    const file = Buffer.concat([whole.subarray(0, 19), craftBlock('head', head.payload), claims]);
    const source = new CountingSource(file);
    const { losses, eventCount } = await recover(source);
    expect(eventCount).toBe(0);
    expect(losses).toMatchObject([{ reason: { code: 'truncated-file' }, events: { first: 0, last: null } }]);
    expect(source.bytes).toBeLessThan(10 * file.length);
  });

  it('is refused where it cannot hold the events that it claims', async () => {
    const parts = blocksOf(whole);
    const index = parts.findIndex(({ tag }) => tag === 'indx');
    const behind = withChanged(whole, 'indx', (map: Chunk) => {
      map.events = 2 ** 50;
      map.pages = 2 ** 40;
    });
    const start = 19 + parts.slice(0, index).reduce((sum, { payload }) => sum + 26 + payload.length, 0);
    const foot = craftFoot(start, behind.length - start);
    const file = Buffer.concat([behind, craftBlock('foot', foot)]);
    await expect(ShowerFileReader.open(bytesSource(file, 'x'))).rejects.toMatchObject({
      code: 'malformed-file',
      found: `${2 ** 50} events in ${2 ** 44} chunks`,
    });
  });

  it('is refused where foot or directory point outside', async () => {
    const parts = blocksOf(whole).map(({ tag, payload }) => craftBlock(tag, payload));
    const foot = craftFoot(2 ** 52, 100);
    const file = Buffer.concat([whole.subarray(0, 19), ...parts.slice(0, -1), craftBlock('foot', foot)]);
    await expect(ShowerFileReader.open(bytesSource(file, 'x'))).rejects.toMatchObject({
      code: 'malformed-file',
    });
  });
});

describe('a head with', () => {
  const heads: readonly (readonly [string, (head: Chunk) => void, RegExp])[] = [
    ['no sample', (h) => delete h.sample, /sample.*nothing/],
    [
      'a word where a number belongs',
      (h) => Object.assign(h.sample, { sqrtS: 'large' }),
      /sample\.sqrtS.*"large"/,
    ],
    ['a seed that is no integer', (h) => Object.assign(h.sample, { seed: 0.5 }), /sample\.seed/],
    [
      'an order that is not known',
      (h) => Object.assign(h.sample, { ordering: 'up' }),
      /sample\.ordering.*"up"/,
    ],
    ['columns that are no list', (h) => Object.assign(h.sample.columns, { entries: {} }), /columns\.entries/],
    ['257 channels', (h) => Object.assign(h, { channels: Array(257).fill('q') }), /channels.*257/],
  ];
  for (const [what, change, message] of heads) {
    it(`${what} is refused`, async () => {
      const file = withChanged(whole, 'head', change as never);
      await expect(recover(bytesSource(file, 'x'))).rejects.toMatchObject({
        code: 'malformed-file',
        byte: 45,
        message: expect.stringMatching(message),
      });
    });
  }

  it('little in it is read, what it lacks being absent', async () => {
    const file = withChanged(whole, 'head', (head: Chunk) => {
      head.sample = { columns: head.sample.columns };
    });
    const { reader } = await recover(bytesSource(file, 'x'));
    const { seed, sqrtS, beams, ordering, meaning } = reader.sample;
    expect({ seed, sqrtS, beams, ordering, z: meaning.z }).toEqual({
      seed: null,
      sqrtS: NaN,
      beams: [],
      ordering: 'none',
      z: null,
    });
  });
});

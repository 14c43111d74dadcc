import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, describe, expect, it } from 'vitest';
import { createGrower, HistoryBatch, resolveSettings } from '../../engine/index.ts';
import { FileBatch, historyToJson, jsonText } from '../../formats/index.ts';
import { readAll, writeFile } from './memory-file.ts';
import { addEvent, plainEvent, sampleHead } from './random-histories.ts';

const READER = fileURLToPath(new URL('stranger.py', import.meta.url));
const folder = mkdtempSync(join(tmpdir(), 'shower-files-'));
const path = join(folder, 'a.shower');
afterAll(() => rmSync(folder, { recursive: true }));

// A plain Python with Debian's package beside it: the reader knows FORMATS.md and nothing of ours.
const stranger = (...wanted: string[]) =>
  execFileSync('/usr/bin/python3', [READER, path, ...wanted], { encoding: 'utf8', maxBuffer: 1 << 28 })
    .trim()
    .split('\n')
    // json.dumps names infinities, which JSON does not know.
    .map(
      (line) => JSON.parse(line.replaceAll('-Infinity', '-1e999').replaceAll('Infinity', '1e999')) as unknown,
    );

/** As it prints, and read again: the same object with keys in any order. */
const printed = (history: Parameters<typeof historyToJson>[0]) =>
  JSON.parse(jsonText(historyToJson(history))) as unknown;

describe('a reader written from FORMATS.md alone', () => {
  it('finds in a file of ours what we print', async () => {
    const grower = createGrower(resolveSettings({ energy: 60, trials: true, seed: 2 ** 53 - 1 }));
    const batch = new HistoryBatch(grower.sample);
    for (let n = 0; n < 1100; n++) grower.grow(batch, 2 ** 40 + n);
    const bytes = await writeFile(grower.sample, [batch]);
    writeFileSync(path, bytes);
    const ours = (await readAll(bytes)).map(printed);
    expect(stranger('all')).toEqual(ours);
    expect(stranger('0', '17', '1023', '1024', '1099')).toEqual(
      [0, 17, 1023, 1024, 1099].map((n) => ours[n]),
    );
  });

  it('finds any bits, foreign words and columns of an author', async () => {
    const sample = sampleHead();
    const batch = new FileBatch(sample, ['mine', 'yours', 'g_gg']);
    for (let n = 0; n < 100; n++) {
      addEvent(batch, {
        ...plainEvent(n, n % 5),
        flavour: n % 3 === 0 ? 'constant' : 'any',
        label: n % 2 ? `é${n}` : null,
      });
    }
    const { length } = batch.steps;
    const boost = Float64Array.from({ length: 16 * length }, (_, k) => (k % 64 < 16 ? NaN : k / 7));
    batch.own.steps = {
      matrix: { values: boost, each: 16 },
      count: { values: Int32Array.from({ length }, (_, k) => 1000 * k), each: 1 },
    };
    const bytes = await writeFile(sample, [batch]);
    writeFileSync(path, bytes);
    expect(stranger('all')).toEqual((await readAll(bytes)).map(printed));
  });
});

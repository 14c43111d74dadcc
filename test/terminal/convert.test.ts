import { copyFileSync, existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { branchlight, scratchFolder, shell } from './run-command.ts';

const EVENTS = 400;
const folder = scratchFolder();
const cwd = folder.path;
const at = (name: string): string => join(cwd, name);

beforeAll(async () => {
  await branchlight(['grow', '--events', String(EVENTS), '--out', 'a.shower'], { cwd });
});
afterAll(() => folder.remove());

const convert = (...words: string[]): ReturnType<typeof branchlight> =>
  branchlight(['convert', ...words], { cwd });

/** Printed events without their number in the file, by their number in the sample. */
async function eventsOf(file: string): Promise<Map<number, string>> {
  const { stdout, status } = await branchlight(['show', file, '--event', 'all', '--json'], { cwd });
  expect(status).toBe(0);
  const events = stdout
    .trimEnd()
    .split('\n')
    .map((line) => JSON.parse(line));
  return new Map(events.map(({ head, ...tables }) => [head.stream, JSON.stringify(tables)]));
}

test('a file that is whole comes out as it was, in place as well', async () => {
  const { status, stderr } = await convert('a.shower', 'same.shower');
  expect([status, stderr]).toEqual([0, `branchlight: same.shower: ${EVENTS} events\n`]);
  expect(readFileSync(at('same.shower')).equals(readFileSync(at('a.shower')))).toBe(true);
  await convert('same.shower', 'same.shower', '--quiet');
  expect(readFileSync(at('same.shower')).equals(readFileSync(at('a.shower')))).toBe(true);
  expect(existsSync(at('same.shower.part'))).toBe(false);
});

test('of a file that was cut off it keeps every whole chunk and says what was lost', async () => {
  const bytes = readFileSync(at('a.shower'));
  writeFileSync(at('cut.shower'), bytes.subarray(0, Math.floor(bytes.length * 0.6)));
  expect((await branchlight(['show', 'cut.shower'], { cwd })).status).toBe(3);
  const { status, stderr, stdout } = await convert('cut.shower', 'mended.shower');
  expect([status, stdout]).toEqual([0, '']);
  const [, last] = stderr.match(/last good event before that is (\d+)\n/) ?? [];
  expect(stderr).toMatch(new RegExp(`lost: bytes \\d+ to \\d+, what came from event ${Number(last) + 1} on`));
  const [mended, whole] = [await eventsOf('mended.shower'), await eventsOf('a.shower')];
  expect(mended.size).toBe(Number(last) + 1);
  expect(mended.size).toBeGreaterThan(0.4 * EVENTS);
  for (const [stream, tables] of mended) expect(tables).toBe(whole.get(stream));
});

test('of a file with a wrong bit in the middle it loses one chunk and keeps the events behind it', async () => {
  const bytes = readFileSync(at('a.shower'));
  bytes[Math.floor(bytes.length / 2)] ^= 16;
  writeFileSync(at('scratched.shower'), bytes);
  const { status, stderr } = await convert('scratched.shower', 'mended.shower', '--quiet');
  expect(status).toBe(0);
  const [, first, last] =
    stderr.match(/lost: bytes \d+ to \d+, events (\d+) to (\d+) .*wrong-checksum/) ?? [];
  expect(stderr).toContain(`the last good event before that is ${Number(first) - 1}\n`);
  const [mended, whole] = [await eventsOf('mended.shower'), await eventsOf('a.shower')];
  for (let n = 0; n < EVENTS; n++) {
    const lost = n >= Number(first) && n <= Number(last);
    expect(mended.get(n)).toBe(lost ? undefined : whole.get(n));
  }
});

test('where nothing can be saved it ends with 3 and writes nothing', async () => {
  writeFileSync(at('foreign.shower'), 'not a sample of histories\n'.repeat(100));
  writeFileSync(at('empty.shower'), '');
  for (const file of ['foreign.shower', 'empty.shower']) {
    const { status, stderr } = await convert(file, 'never.shower');
    expect(status, file).toBe(3);
    expect(stderr, file).toMatch(/^branchlight convert: .*byte 0: expected .*\)\n$/);
    expect(existsSync(at('never.shower'))).toBe(false);
  }
});

test('takes the format from --from and --to where the extension does not tell, and - for streams', async () => {
  copyFileSync(at('a.shower'), at('a.dat'));
  expect((await convert('a.dat', 'b.dat')).status).toBe(2);
  expect((await convert('a.dat', 'b.dat', '--from', 'shower', '--to', 'shower')).status).toBe(0);
  expect(readFileSync(at('b.dat')).equals(readFileSync(at('a.shower')))).toBe(true);
  const piped = await shell('branchlight convert - - --quiet < a.shower | cmp - a.shower', cwd);
  expect([piped.status, piped.stderr]).toEqual([0, '']);
});

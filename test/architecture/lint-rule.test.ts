import { spawnSync } from 'node:child_process';
import { cpSync, mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, describe, expect, it } from 'vitest';

const root = fileURLToPath(new URL('../..', import.meta.url));
const RULE = 'test/architecture/same-bits.grit';

/** A folder with the project's lint configuration and nothing else, so that seeded faults never stand in the tree. */
const house = mkdtempSync(join(tmpdir(), 'branchlight-lint-'));
const { vcs: _, $schema: __, ...configuration } = JSON.parse(readFileSync(join(root, 'biome.json'), 'utf8'));
writeFileSync(join(house, 'biome.json'), JSON.stringify(configuration));
mkdirSync(join(house, dirname(RULE)), { recursive: true });
cpSync(join(root, RULE), join(house, RULE));
afterAll(() => rmSync(house, { recursive: true }));

/** Lines on which the project's own rule speaks, for files of one statement a line. */
function complaints(files: Record<string, readonly string[]>): string[] {
  for (const [path, lines] of Object.entries(files)) {
    mkdirSync(join(house, dirname(path)), { recursive: true });
    writeFileSync(join(house, path), lines.join('\n'));
  }
  const biome = join(root, 'node_modules/.bin/biome');
  const run = spawnSync(biome, ['lint', '--colors=off', '--max-diagnostics=200', ...Object.keys(files)], {
    cwd: house,
    encoding: 'utf8',
  });
  const output = run.stdout + run.stderr;
  expect(output).toContain(`Checked ${Object.keys(files).length} file`);
  return [...output.matchAll(/^(\S+?)(?::(\d+):\d+)? plugin /gm)]
    .map(([, path, line]) => `${path}:${line}`)
    .sort();
}

const FORBIDDEN = [
  'export const a = Math.log(2);',
  'export const b = Math.random();',
  'export const c = [2].map(Math.exp);',
  'export const d = 2 ** 0.5;',
  'export const e = Date.now();',
  'export const f = new Date();',
  'export const g = performance.now();',
];
const EXACT = [
  'export const a = Math.sqrt(2) + Math.min(Math.PI, 1) + Math.imul(2, 3);',
  'export const b = Math.fround(0.1) * Math.abs(-1) * Math.SQRT1_2;',
];

describe('the lint rule, which says in the editor what the architecture test says later', () => {
  it('refuses in the engine, in layout, in marks and in figures what differs between JavaScript engines', () => {
    const folders = ['engine/qcd', 'viewer/figure', 'viewer/layout', 'viewer/marks/ball'];
    const files = Object.fromEntries(folders.map((folder) => [`${folder}/seeded.ts`, FORBIDDEN]));
    const expected = folders.flatMap((folder) => FORBIDDEN.map((_, k) => `${folder}/seeded.ts:${k + 1}`));
    expect(complaints(files)).toEqual(expected);
  });
  it('lets pass what the language defines to the last bit, and everything elsewhere', () => {
    expect(complaints({ 'engine/qcd/exact.ts': EXACT, 'viewer/views/card/free.ts': FORBIDDEN })).toEqual([]);
  });
});

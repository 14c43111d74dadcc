import { readdirSync, readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { FACES } from '../../../viewer/fonts/faces.mjs';

const root = new URL('../../../', import.meta.url);
const files = readdirSync(new URL('public/fonts/', root));

test('every face is there as WOFF2 and declared, and no other', () => {
  const css = readFileSync(new URL('viewer/fonts/fonts.css', root), 'utf8');
  const fonts = files.filter((name) => name.endsWith('.woff2'));
  expect(fonts.sort()).toEqual(FACES.map(({ file }) => `${file}.woff2`).sort());
  for (const name of fonts) {
    expect(css).toContain(`/fonts/${name}`);
    expect(readFileSync(new URL(`public/fonts/${name}`, root)).toString('latin1', 0, 4)).toBe('wOF2');
  }
});

test('the licence of every family stands beside its faces', () => {
  for (const source of new Set(FACES.map((face) => face.package))) {
    const text = readFileSync(new URL(`public/fonts/${source}.OFL.txt`, root), 'utf8');
    expect(text).toMatch(/SIL Open Font License, Version 1\.1/);
    expect(text).toMatch(/^Copyright/);
  }
});

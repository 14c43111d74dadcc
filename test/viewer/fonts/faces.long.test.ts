import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { FACES } from '../../../viewer/fonts/faces.mjs';
import { makeFace } from '../../../viewer/fonts/subset-fonts.mjs';

test.each(FACES)('$file is what the script makes of its package', async (face) => {
  const made = await makeFace(face);
  const kept = readFileSync(new URL(`../../../public/fonts/${face.file}.woff2`, import.meta.url));
  expect(Buffer.compare(made, kept)).toBe(0);
});

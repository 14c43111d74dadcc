// Makes public/fonts from the font packages: `node viewer/fonts/subset-fonts.mjs`. The results are committed.
import { mkdir, readFile, writeFile } from 'node:fs/promises';
import { fileURLToPath } from 'node:url';
import subsetFont from 'subset-font';
import { CHARACTERS } from './characters.mjs';
import { FACES } from './faces.mjs';
import { renameFont } from './name-table.mjs';

const packages = new URL('../../node_modules/@expo-google-fonts/', import.meta.url);
const out = new URL('../../public/fonts/', import.meta.url);

// Figures tabular and lining where the font has both kinds, a slashed zero never; accents stay on their letters.
const FEATURES = ['kern', 'mark', 'mkmk', 'ccmp', 'locl', 'liga', 'case', 'tnum', 'lnum', 'pnum', 'frac'];

/** The subset of one face as WOFF2. */
export async function makeFace(face) {
  const original = await readFile(new URL(`${face.package}/${face.source}.ttf`, packages));
  const subset = await subsetFont(original, CHARACTERS, { targetFormat: 'sfnt', keepFeatures: FEATURES });
  const renamed = renameFont(subset, original, face.family, face.style);
  return subsetFont(renamed, null, {
    keepAllGlyphs: true,
    keepFeatures: FEATURES,
    targetFormat: 'woff2',
    preserveNameIds: [0, 1, 2, 4, 5, 6, 13, 14],
  });
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  await mkdir(out, { recursive: true });
  for (const face of FACES) {
    const bytes = await makeFace(face);
    await writeFile(new URL(`${face.file}.woff2`, out), bytes);
    process.stdout.write(`${face.file}.woff2 ${bytes.length} bytes\n`);
  }
  for (const name of ['source-sans-3', 'source-serif-4']) {
    await writeFile(
      new URL(`${name}.OFL.txt`, out),
      await readFile(new URL(`${name}/LICENSE_FONT`, packages)),
    );
  }
}

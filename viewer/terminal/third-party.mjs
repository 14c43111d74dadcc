// Writes public/THIRD-PARTY.md: the licences of everything that is bundled or served. `--check` only compares (a test).
import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, relative } from 'node:path';
import { build } from 'vite';
import { pageBundle, terminalBundle } from './bundles.mjs';
import { root } from './set-up.mjs';

const target = join(root, 'public', 'THIRD-PARTY.md');
const FONTS = [
  ['Source Sans 3', 'source-sans-3'],
  ['Source Serif 4', 'source-serif-4'],
];

/** Folders in node_modules of which anything is left in a bundle. */
async function bundledPackages() {
  process.env.NODE_ENV = 'production';
  const aside = mkdtempSync(join(tmpdir(), 'branchlight-'));
  const found = new Set();
  try {
    for (const bundle of [pageBundle(root, aside), terminalBundle(root, aside)]) {
      const results = await build({ ...bundle, build: { ...bundle.build, write: false } });
      for (const { modules = {} } of [results].flat().flatMap(({ output }) => output)) {
        for (const [id, { renderedLength }] of Object.entries(modules)) {
          const path = relative(root, id).match(/^node_modules\/((@[^/]+\/)?[^/]+)/)?.[1];
          if (path && renderedLength > 0) found.add(path);
        }
      }
    }
  } finally {
    rmSync(aside, { recursive: true });
  }
  return [...found].sort();
}

function packageSection(name) {
  const folder = join(root, 'node_modules', name);
  const { version, license } = JSON.parse(readFileSync(join(folder, 'package.json'), 'utf8'));
  const file = readdirSync(folder).find((each) => /^licen[cs]e/i.test(each));
  if (!file) throw new Error(`${name} has no licence file`);
  return section(`${name} ${version}`, license, readFileSync(join(folder, file), 'utf8'));
}

function fontSection(name, file) {
  const path = join(root, 'public', 'fonts', `${file}.OFL.txt`);
  if (!existsSync(path)) throw new Error(`the licence of ${name} is missing: ${relative(root, path)}`);
  return section(`${name} (typeface, a subset)`, 'OFL-1.1', readFileSync(path, 'utf8'));
}

const section = (title, licence, text) =>
  `## ${title}\n\n${licence}\n\n\`\`\`text\n${text.replaceAll('\r\n', '\n').trim()}\n\`\`\`\n`;

const packages = await bundledPackages();
const text = [
  '# What ships with Branchlight\n',
  'Parts by others in the viewer and the command line, with their licences.\n',
  ...packages.map(packageSection),
  ...FONTS.map(([name, file]) => fontSection(name, file)),
].join('\n');
if (process.argv.includes('--check')) {
  const current = existsSync(target) && readFileSync(target, 'utf8') === text;
  if (!current) process.stderr.write('public/THIRD-PARTY.md is not current: run `npm run third-party`\n');
  process.exitCode = current ? 0 : 1;
} else {
  writeFileSync(target, text);
  process.stderr.write(
    `public/THIRD-PARTY.md: ${[...packages, ...FONTS.map(([name]) => name)].join(', ')}\n`,
  );
}

import { type SpawnSyncReturns, spawnSync } from 'node:child_process';
import {
  appendFileSync,
  cpSync,
  existsSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  symlinkSync,
  utimesSync,
} from 'node:fs';
import { join, resolve } from 'node:path';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { scratchFolder } from './run-command.ts';

const SOURCES = [
  'engine',
  'formats',
  'viewer',
  'public',
  'index.html',
  'package.json',
  'package-lock.json',
  'tsconfig.json',
];
const folder = scratchFolder();
const copy = join(folder.path, 'copy');

beforeAll(() => {
  for (const source of SOURCES) cpSync(resolve(source), join(copy, source), { recursive: true });
  // The packages of this checkout: what npm itself does with a fresh folder is npm's to test.
  symlinkSync(resolve('node_modules'), join(copy, 'node_modules'));
});
afterAll(() => folder.remove());

const npx = (...words: string[]): SpawnSyncReturns<string> => {
  const env = {
    ...process.env,
    npm_config_cache: join(folder.path, 'npm'),
    npm_config_update_notifier: 'false',
  };
  return spawnSync('npx', ['branchlight', ...words], { cwd: copy, env, encoding: 'utf8' });
};
const dist = (): Map<string, string> => {
  const files = readdirSync(join(copy, 'dist'), { recursive: true, withFileTypes: true }).filter((item) =>
    item.isFile(),
  );
  return new Map(
    files.map(({ parentPath, name }) => [
      join(parentPath, name),
      readFileSync(join(parentPath, name), 'latin1'),
    ]),
  );
};

test('npx builds what is missing, saying so on standard error alone, and only once', () => {
  const first = npx('--version');
  expect(first.stderr).toContain('branchlight: building\n');
  expect(first.stdout).toMatch(/^branchlight \d+\.\d+\.\d+\n$/);
  expect(first.status).toBe(0);
  const second = npx('--version');
  expect([second.stdout, second.stderr]).toEqual([first.stdout, '']);
});

test('two commands that start at once build once', () => {
  appendFileSync(join(copy, 'engine', 'version.ts'), '\n// changed\n');
  const bin = join(copy, 'viewer', 'terminal', 'branchlight.mjs');
  const both = spawnSync('bash', ['-c', `"${bin}" --version & "${bin}" --version; wait`], {
    encoding: 'utf8',
  });
  expect(both.stdout).toMatch(/^(branchlight [\d.]+\n){2}$/);
  expect(both.stderr.match(/branchlight: building/g)).toHaveLength(1);
});

test('rebuilds when a source, the page or the lock file changed, comes or goes', () => {
  for (const file of ['viewer/terminal/main.ts', 'index.html', 'package-lock.json']) {
    appendFileSync(join(copy, file), '\n');
    expect(npx('--version').stderr, file).toContain('building');
  }
  mkdirSync(join(copy, 'public', 'more'));
  appendFileSync(join(copy, 'public', 'more', 'new.txt'), 'new');
  expect(npx('--version').stderr).toContain('building');
  expect(existsSync(join(copy, 'dist', 'viewer', 'more', 'new.txt'))).toBe(true);
});

test('does not rebuild for new times on the same contents, as a checkout gives them', () => {
  utimesSync(join(copy, 'viewer', 'terminal', 'main.ts'), new Date(), new Date());
  expect(npx('--version').stderr).toBe('');
});

test('a build gives the same bytes twice and leaves nothing else behind', () => {
  const before = dist();
  const build = spawnSync(process.execPath, ['viewer/terminal/build.mjs'], { cwd: copy, encoding: 'utf8' });
  expect(build.status, build.stderr).toBe(0);
  expect(dist()).toEqual(before);
  expect(readdirSync(join(copy, '.cache'))).toEqual(['built.json']);
});

test('a build that fails says why, ends with 3 and leaves the last good bundle', () => {
  const before = dist();
  appendFileSync(join(copy, 'viewer', 'terminal', 'main.ts'), '\nimport "./not-there.ts";\n');
  const failed = npx('--version');
  expect(failed.status).toBe(3);
  expect(failed.stdout).toBe('');
  expect(failed.stderr).toContain('not-there');
  expect(failed.stderr).toContain('(set-up-failed)');
  expect(dist()).toEqual(before);
});

import { readdirSync, readFileSync, statSync } from 'node:fs';
import { join } from 'node:path';

/** The project's files by path from its root, with `/` between names; only code has its text. */
export type SourceSet = ReadonlyMap<string, string>;

/** One place where a rule of the house is broken. */
export interface Breach {
  readonly rule: string;
  readonly file: string;
  /** From 1; 0 for the file as a whole. */
  readonly line: number;
  readonly message: string;
}

const CODE = /\.(ts|mts|cts|js|mjs|cjs|tsx|jsx)$/;
export const isCode = (path: string): boolean => CODE.test(path);

/** What .gitignore keeps out of the repository: plain names, and `*` with an ending. */
function ignored(root: string): (name: string) => boolean {
  const patterns = readFileSync(join(root, '.gitignore'), 'utf8').split('\n').filter(Boolean);
  return (name) =>
    name === '.git' ||
    patterns.some((p) => (p.startsWith('*') ? name.endsWith(p.slice(1)) : name === p.replaceAll('/', '')));
}

/** Reads the tree at `root`, without what is ignored. */
export function readSourceSet(root: string): SourceSet {
  const isIgnored = ignored(root);
  const files = new Map<string, string>();
  const walk = (folder: string): void => {
    for (const name of readdirSync(join(root, folder)).sort()) {
      if (isIgnored(name)) continue;
      const path = folder ? `${folder}/${name}` : name;
      if (statSync(join(root, path)).isDirectory()) walk(path);
      else files.set(path, isCode(name) ? readFileSync(join(root, path), 'utf8') : '');
    }
  };
  walk('');
  return files;
}

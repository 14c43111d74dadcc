import { posix } from 'node:path';
import { allImports, type Import } from './imports.ts';
import type { Breach, SourceSet } from './source-set.ts';

const layerOf = (path: string): string => path.slice(0, path.indexOf('/') + 1);

/** What a layer shows to the others: its own index, and engine/math, which everything that must not vary uses. */
const FRONT_DOOR = /^(engine\/index\.ts|engine\/math\/index\.ts|formats\/index\.ts|viewer\/.*)$/;

/** A test may look inside the folder that it mirrors. */
const mirrors = (from: string, target: string): boolean =>
  from.startsWith(`test/${posix.dirname(target)}/`) ||
  posix.dirname(from) === `test/${posix.dirname(target)}`;

function fault(i: Import): string | null {
  const { from, target } = i;
  if (target === null || !/\.[cm]?ts$/.test(target)) return null;
  const folder = posix.dirname(target);
  // Own files, and loose files of a folder that one stands in.
  if (`${posix.dirname(from)}/`.startsWith(`${folder}/`)) return null;
  // Tests look inside the folder that they mirror, and share what supports them without a door.
  if (from.startsWith('test/') && (mirrors(from, target) || target.startsWith('test/'))) return null;
  if (posix.basename(target) !== 'index.ts') return `goes past ${folder}/index.ts`;
  const fromLayer = layerOf(from);
  if (fromLayer !== layerOf(target) && fromLayer !== 'test/' && !FRONT_DOOR.test(target)) {
    return `goes past ${layerOf(target)}index.ts`;
  }
  return null;
}

/** Imports past another folder's index.ts, and `export *`. Workers are started by their file, so they may. */
export function doorBreaches(files: SourceSet): Breach[] {
  const breaches: Breach[] = [];
  for (const i of allImports(files)) {
    const message = i.kind === 'worker' ? null : fault(i);
    if (message !== null)
      breaches.push({ rule: 'door', file: i.from, line: i.line, message: `'${i.specifier}' ${message}` });
    if (i.everything) {
      breaches.push({
        rule: 'export-all',
        file: i.from,
        line: i.line,
        message: `export * from '${i.specifier}'`,
      });
    }
    if (i.target !== null && i.kind !== 'worker' && !/\.[a-z0-9]+$/i.test(i.target)) {
      breaches.push({
        rule: 'extension',
        file: i.from,
        line: i.line,
        message: `'${i.specifier}' has no extension`,
      });
    }
  }
  return breaches;
}

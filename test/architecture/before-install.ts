import { importsOf } from './imports.ts';
import type { Breach, SourceSet } from './source-set.ts';

/** What `npm start` and `npm test` run before anything is installed. */
const FIRST = ['viewer/terminal/start.mjs', 'test/run.mjs'];

/** Packages that a first run would need before it could install them. */
export function beforeInstallBreaches(files: SourceSet): Breach[] {
  const breaches: Breach[] = [];
  const waiting = FIRST.filter((path) => files.has(path));
  const seen = new Set(waiting);
  for (let path = waiting.pop(); path !== undefined; path = waiting.pop()) {
    for (const { specifier, target, kind, line } of importsOf(path, files.get(path) ?? '')) {
      if (kind !== 'static') continue;
      if (target === null ? !specifier?.startsWith('node:') : !target.endsWith('.mjs')) {
        const message = `imports '${specifier}' before anything is installed`;
        breaches.push({ rule: 'before-install', file: path, line, message });
      } else if (target !== null && !seen.has(target)) {
        seen.add(target);
        waiting.push(target);
      }
    }
  }
  return breaches;
}

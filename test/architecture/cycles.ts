import { allImports } from './imports.ts';
import type { Breach, SourceSet } from './source-set.ts';

/**
 * Circles of imports among the files, each reported once, by the path that closes it. Types count: two files that
 * name each other's types are one concept or need a third. A dynamic import does not, since it waits for a call.
 */
export function cycleBreaches(files: SourceSet): Breach[] {
  const edges = new Map<string, { target: string; line: number }[]>();
  for (const { from, target, kind, line } of allImports(files)) {
    if (target === null || kind !== 'static') continue;
    const list = edges.get(from) ?? [];
    list.push({ target, line });
    edges.set(from, list);
  }
  const breaches: Breach[] = [];
  const done = new Set<string>();
  const trail: string[] = [];
  const visit = (file: string): void => {
    if (done.has(file)) return;
    trail.push(file);
    for (const { target, line } of edges.get(file) ?? []) {
      const start = trail.indexOf(target);
      if (start >= 0) {
        const circle = [...trail.slice(start), target].join(' -> ');
        breaches.push({ rule: 'cycle', file, line, message: circle });
      } else visit(target);
    }
    trail.pop();
    done.add(file);
  };
  for (const file of edges.keys()) visit(file);
  return breaches;
}

import type { History } from '../../engine/index.ts';

type Columns = Readonly<Record<string, ArrayLike<number>>>;

/** The first place where two histories differ in a bit, null where none does; 0 and -0 differ, all NaN are alike. */
export function firstDifference(a: History, b: History): string | null {
  for (const table of ['entries', 'steps', 'trials'] as const) {
    const ours = a[table];
    const theirs = b[table];
    if (!ours || !theirs) {
      if (ours !== theirs) return `${table}: one is missing`;
      continue;
    }
    if (ours.length !== theirs.length) return `${table}: ${ours.length} and ${theirs.length} rows`;
    const difference = firstDifferentColumn(ours as unknown as Columns, theirs as unknown as Columns);
    if (difference) return `${table}.${difference}`;
  }
  return null;
}

function firstDifferentColumn(a: Columns, b: Columns): string | null {
  for (const name of new Set([...Object.keys(a), ...Object.keys(b)])) {
    if (name === 'length') continue;
    if (a[name].length !== b[name].length) return `${name}: ${a[name].length} and ${b[name].length} elements`;
    for (let row = 0; row < a[name].length; row++) {
      if (!Object.is(a[name][row], b[name][row]))
        return `${name}[${row}]: ${a[name][row]} and ${b[name][row]}`;
    }
  }
  return null;
}

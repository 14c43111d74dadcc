import type { History } from '../../engine/index.ts';

type Columns = Readonly<Record<string, ArrayLike<number> | null>>;

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
    const ours = a[name];
    const theirs = b[name];
    if (ours === null || theirs === null) {
      if (ours !== theirs) return `${name}: one is missing`;
      continue;
    }
    if (ours.length !== theirs.length) return `${name}: ${ours.length} and ${theirs.length} elements`;
    for (let row = 0; row < ours.length; row++) {
      if (!Object.is(ours[row], theirs[row])) return `${name}[${row}]: ${ours[row]} and ${theirs[row]}`;
    }
  }
  return null;
}

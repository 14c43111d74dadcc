/** Number of single letters to insert, leave out or change to turn `a` into `b`. */
function distance(a: string, b: string): number {
  let row = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const next = [i];
    for (let j = 1; j <= b.length; j++) {
      next.push(Math.min(row[j] + 1, next[j - 1] + 1, row[j - 1] + (a[i - 1] === b[j - 1] ? 0 : 1)));
    }
    row = next;
  }
  return row[b.length];
}

/** The name that `text` was probably meant to be, null where none is close. */
export function nearest(text: string, names: readonly string[]): string | null {
  let best: string | null = null;
  let least = Math.max(2, Math.ceil(text.length / 2));
  for (const name of names) {
    const d = text.length > 2 && name.startsWith(text) ? 0 : distance(text, name);
    if (d < least) {
      least = d;
      best = name;
    }
  }
  return best;
}

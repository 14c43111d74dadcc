/** Number of single letters to insert, leave out, change or swap with their neighbour to turn `a` into `b`. */
function distance(a: string, b: string): number {
  const rows = [Array.from({ length: b.length + 1 }, (_, j) => j)];
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const change = rows[i - 1][j - 1] + (a[i - 1] === b[j - 1] ? 0 : 1);
      row.push(Math.min(rows[i - 1][j] + 1, row[j - 1] + 1, change));
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) {
        row[j] = Math.min(row[j], rows[i - 2][j - 2] + 1);
      }
    }
    rows.push(row);
  }
  return rows[a.length][b.length];
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

/** A stretch of text in one face at one height. */
export interface Run {
  readonly text: string;
  /** A mathematical symbol: serif italic. Everything else is upright sans. */
  readonly symbol: boolean;
  readonly height: 'line' | 'lowered' | 'raised';
}

/**
 * Runs of a short mathematical text: `*k*_{T}` is an italic k with an upright T lowered, `10^{−14}` a raised exponent.
 *
 * Stars enclose symbols, also inside of `_{…}` and `^{…}`, which do not nest. A lone star, `_` or `^` stands for itself.
 */
export function parseNotation(source: string): Run[] {
  const runs: Run[] = [];
  const cut = /([_^])\{([^}]*)\}|([^_^]+|[_^])/g;
  for (const [, mark, shifted, plain] of source.matchAll(cut)) {
    if (mark) addSymbols(runs, shifted, mark === '_' ? 'lowered' : 'raised');
    else addSymbols(runs, plain, 'line');
  }
  return runs;
}

function addSymbols(runs: Run[], text: string, height: Run['height']): void {
  const parts = text.split(/\*([^*]+)\*/);
  parts.forEach((part, k) => {
    if (part) runs.push({ text: part, symbol: k % 2 === 1, height });
  });
}

/** The same text for a reader of plain text: `kT`, `10^−14`. */
export function plainNotation(source: string): string {
  return parseNotation(source)
    .map((run) => (run.height === 'raised' && /^−?\d/.test(run.text) ? `^${run.text}` : run.text))
    .join('');
}

/** A column of a table in text. */
export interface TextColumn {
  readonly name: string;
  readonly unit: string;
  readonly cells: readonly string[];
  /** Numbers stand with their decimal points in one line, words to the left. */
  readonly align: 'number' | 'word';
}

const DIGITS = 6;

/** A number in at most six digits, `-` for a missing one. */
export function numberText(value: number): string {
  if (Number.isNaN(value)) return '-';
  if (value === 0 || !Number.isFinite(value)) return String(value);
  const size = Math.abs(value);
  if (size < 1e-4 || size >= 1e7) return value.toExponential(DIGITS - 1);
  return value.toPrecision(DIGITS);
}

/** Cells padded so that what stands before the decimal points ends in one line, and what follows begins there. */
function alignNumbers(cells: readonly string[]): string[] {
  const head = (cell: string): number => cell.match(/^[-+]?\d*/)![0].length;
  const before = Math.max(0, ...cells.map(head));
  const padded = cells.map((cell) =>
    cell === '-' ? cell : cell.padStart(before - head(cell) + cell.length),
  );
  const width = Math.max(0, ...padded.map((cell) => cell.length));
  return padded.map((cell) => (cell === '-' ? cell.padStart(before || 1) : cell).padEnd(width));
}

/** A table in text: names, units below them, rows; two blanks between columns, no blanks at the ends of lines. */
export function typeset(columns: readonly TextColumn[]): string {
  const texts = columns.map(({ name, unit, cells, align }) => {
    const body = align === 'number' ? alignNumbers(cells) : [...cells];
    const width = Math.max(name.length, unit.length, ...body.map((cell) => cell.length));
    const pad = (text: string): string => (align === 'number' ? text.padStart(width) : text.padEnd(width));
    return [name, unit, ...body].map(pad);
  });
  const withUnits = columns.some(({ unit }) => unit !== '');
  const lines: string[] = [];
  for (let row = 0; row < (texts[0]?.length ?? 0); row++) {
    if (row === 1 && !withUnits) continue;
    lines.push(`  ${texts.map((text) => text[row]).join('  ')}`.trimEnd());
  }
  return lines.join('\n');
}

/** The faces in which things are set: sans for what is read, italic serif for symbols, serif for names and captions. */
export type Face = 'sans' | 'sansBold' | 'symbol' | 'symbolBold' | 'serif' | 'serifBold';

/** A stretch of text in one face; subscripts and superscripts are set smaller and off the line. */
export interface Run {
  readonly text: string;
  readonly face: Face;
  readonly place?: 'sub' | 'sup';
}

export interface FaceSpec {
  readonly family: string;
  readonly weight: 400 | 600;
  readonly style: 'normal' | 'italic';
}

const SANS = "'Source Sans 3', 'Helvetica Neue', Arial, sans-serif";
const SERIF = "'Source Serif 4', Georgia, 'Times New Roman', serif";

/** Font family with fallbacks, weight and style of every face. */
export const FACES: Readonly<Record<Face, FaceSpec>> = {
  sans: { family: SANS, weight: 400, style: 'normal' },
  sansBold: { family: SANS, weight: 600, style: 'normal' },
  symbol: { family: SERIF, weight: 400, style: 'italic' },
  symbolBold: { family: SERIF, weight: 600, style: 'italic' },
  serif: { family: SERIF, weight: 400, style: 'normal' },
  serifBold: { family: SERIF, weight: 600, style: 'normal' },
};

/** Size of sub- and superscripts, and how far they stand off the line, in ems of the text. */
export const SCRIPT = { size: 0.74, sub: 0.22, sup: 0.36 } as const;

/** One run of plain text. */
export const plain = (text: string, bold = false): Run[] => [{ text, face: bold ? 'sansBold' : 'sans' }];

/**
 * Runs of a text in which `_` lowers and `^` raises what follows in braces (or the next character), and `*…*` sets a symbol:
 * `*k*_T = 2.87 GeV`, `√*t*`, `10^{−2}`.
 */
export function runs(source: string, bold = false): Run[] {
  const found: Run[] = [];
  const pattern = /\*([^*]+)\*|([_^])(?:\{([^}]*)\}|(.))|([^*_^]+)/gu;
  for (const [, symbol, script, braced, single, text] of source.matchAll(pattern)) {
    if (symbol !== undefined) found.push({ text: symbol, face: bold ? 'symbolBold' : 'symbol' });
    else if (script !== undefined) {
      found.push({
        text: braced ?? single,
        face: bold ? 'sansBold' : 'sans',
        place: script === '_' ? 'sub' : 'sup',
      });
    } else found.push({ text, face: bold ? 'sansBold' : 'sans' });
  }
  return found;
}

/** The text of runs without its setting. */
export const textOf = (line: readonly Run[]): string => line.map((run) => run.text).join('');

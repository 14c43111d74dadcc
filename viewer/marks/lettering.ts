/** The faces in which things are set: sans for what is read, italic serif for symbols, serif for names and captions. */
export type Face = 'sans' | 'sansBold' | 'symbol' | 'symbolBold' | 'serif' | 'serifBold';

/** A stretch of text in one face; subscripts and superscripts are set smaller and off the line. */
export interface Run {
  readonly text: string;
  readonly face: Face;
  readonly place?: 'sub' | 'sup';
}

/** A face as CSS, SVG and canvas name it. */
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
 * Runs of a short mathematical text: `*k*_{T}` is an italic k with an upright T lowered, `10^{−14}` a raised exponent.
 *
 * Stars enclose symbols, also inside of `_{…}` and `^{…}`, which do not nest. A lone star, `_` or `^` stands for itself.
 */
export function runs(source: string, bold = false): Run[] {
  const found: Run[] = [];
  const cut = /([_^])\{([^}]*)\}|([^_^]+|[_^])/g;
  for (const [, mark, shifted, line] of source.matchAll(cut)) {
    if (mark) addSymbols(found, shifted, bold, mark === '_' ? 'sub' : 'sup');
    else addSymbols(found, line, bold, undefined);
  }
  return found;
}

function addSymbols(found: Run[], source: string, bold: boolean, place: Run['place']): void {
  source.split(/\*([^*]+)\*/).forEach((text, k) => {
    if (!text) return;
    const face = k % 2 === 1 ? (bold ? 'symbolBold' : 'symbol') : bold ? 'sansBold' : 'sans';
    found.push(place ? { text, face, place } : { text, face });
  });
}

/** The text of runs without its setting. */
export const textOf = (line: readonly Run[]): string => line.map((run) => run.text).join('');

import { channels, mix } from './tint.ts';

/** Tints of a theme as #RRGGBB. Ink is now and structure; three hues are for partons, one for findings, the wash for the selection. */
export interface Palette {
  readonly ground: string;
  /** Paper on which what has happened is drawn: the disc inside the current shell, the Lund plane. */
  readonly lit: string;
  /** Between the current shell and the rim: what is to come. */
  readonly shade: string;
  readonly ink: string;
  /** Units and keys. */
  readonly second: string;
  /** Lettering of what is to come. */
  readonly faint: string;
  /** Thin shapes, never lettering. */
  readonly hairline: string;
  /** Rules and grids. */
  readonly rule: string;
  readonly quark: string;
  readonly antiquark: string;
  /** Shapes; lettering only at 18 px and above. */
  readonly gluon: string;
  readonly finding: string;
  /** Highlighter of the selection; always edged or barred with ink. */
  readonly wash: string;
}

const light: Palette = {
  ground: '#FAF6EC',
  lit: '#FFFDF8',
  shade: '#F8F2E6',
  ink: '#1F2329',
  second: '#57554F',
  faint: '#716C61',
  hairline: '#8F897C',
  rule: '#D9D1BF',
  quark: '#173F86',
  antiquark: '#0A7B82',
  gluon: '#B27408',
  finding: '#B5123F',
  wash: '#FFD24A',
};

const dark: Palette = {
  ground: '#15161A',
  lit: '#1E2026',
  shade: '#17191D',
  ink: '#ECE7DB',
  second: '#B4AFA3',
  faint: '#8F8A80',
  hairline: '#7E7A72',
  rule: '#3A3B41',
  quark: '#9DC4F9',
  antiquark: '#2C9F97',
  gluon: '#DDA23C',
  finding: '#EC5080',
  wash: '#FFE794',
};

/**
 * The three themes: `light` first, `dark` for the auditorium, `print` for slides and paper.
 *
 * Contrast on ground and lit is 4.5 or better for everything that letters are set in, and the smallest CIEDE2000 distance
 * between quark, antiquark, gluon, finding and ink stays at 13 or above under protanopia, deuteranopia and tritanopia.
 */
export const palette = {
  light,
  dark,
  print: { ...light, ground: '#FFFFFF', lit: '#FFFFFF', shade: '#FAF8F3' },
} as const satisfies Record<string, Palette>;

/** Tint towards which the lit disc darkens at its lower right limb: the ball's own shading, and the only gradient. */
export const litEdgeOf = (of: Palette): string =>
  luminous(of) ? mix(of.lit, of.rule, 0.42) : mix(of.lit, of.ground, 0.8);

/** Whether a palette is dark ink on light paper. */
export const luminous = (of: Palette): boolean => channels(of.lit)[0] > 128;

import { log } from '../../engine/math/index.ts';
import type { Palette } from './palette.ts';

/** How a parton is drawn: by line style, mark and tint alike. */
export type PartonStyle = 'quark' | 'antiquark' | 'gluon' | 'other';

/** Style of a PDG number. */
export function styleOf(id: number): PartonStyle {
  if (id === 21) return 'gluon';
  if (id >= 1 && id <= 6) return 'quark';
  if (id <= -1 && id >= -6) return 'antiquark';
  return 'other';
}

/** Tint of a style; what is neither quark nor gluon is ink. */
export const tintOf = (palette: Palette, style: PartonStyle): string =>
  style === 'other' ? palette.ink : palette[style];

/** Least width of a gluon's double line [px]: below it the core closes. */
export const GLUON_LEAST = 3;

/**
 * Width of a parton's line [px]: 1.1 + 0.74 ln(E/GeV), times the size of the plate.
 *
 * @param energy [GeV]; where it is missing or below 1 GeV the line has its least width, 1 px, a gluon's 3 px.
 */
export function lineWidth(style: PartonStyle, energy: number, size: number): number {
  if (style === 'other') return 1.2 * size;
  const width = (1.1 + 0.74 * (energy > 1 ? log(energy) : 0)) * size;
  return Math.max(width, style === 'gluon' ? GLUON_LEAST : 1);
}

/** Width of each of a gluon's two lines [px]. */
export const gluonRail = (width: number): number => Math.max(0.95, 0.25 * width);

/** Gaps in an antiquark's line [px along the path at size 1]. */
export const ANTIQUARK_DASH = [9.5, 4] as const;

/** Share by which a line at this depth (−1 far to 1 near) is blended towards the paper: 0 near, 0.46 far. */
export const depthFade = (depth: number): number => 0.46 * Math.max(0, Math.min(1, (1 - depth) / 2));

/** Factor on the width of a line at this depth: 8/7 at the near side, 1 from the middle on. */
export const depthWidth = (depth: number): number => 1 + Math.max(0, Math.min(1, depth)) / 7;

/** Share by which everything that is to come is blended towards the paper, and the factor on its width. */
export const FUTURE = { fade: 0.7, width: 0.55 } as const;

/** Width of the edge of paper along every line, which cuts what lies behind [px at size 1]. */
export const LIT_EDGE = 1.3;

/** Half-length of a recoil tick beyond the line's edge [px at size 1]; below this energy fraction there is none. */
export const TICK = { least: 0.008, length: 24 } as const;

/** Reach of a recoil tick from the line's edge [px], 0 where the partner lost less than 0.8 % of its energy. */
export const tickReach = (fractionLost: number, size: number): number =>
  fractionLost >= TICK.least ? TICK.length * size * Math.sqrt(Math.min(1, fractionLost)) : 0;

/** Arrowheads: length and half-breadth [px at size 1], and what they grow by per pixel of the line's width. */
export const ARROWHEAD = { length: 5.5, half: 2.7, lengthPerWidth: 1.55, halfPerWidth: 0.72 } as const;

/** Length and half-breadth of an arrowhead on a line of this width [px]. */
export const arrowhead = (width: number, size: number): { length: number; half: number } => ({
  length: ARROWHEAD.length * size + ARROWHEAD.lengthPerWidth * width,
  half: ARROWHEAD.half * size + ARROWHEAD.halfPerWidth * width,
});

/** The end of a line carries a smaller head: as on a line of this share of its width. */
export const END_SHARE = 0.7;

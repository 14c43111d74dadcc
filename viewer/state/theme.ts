import { type Palette, palette } from '../marks/index.ts';
import type { Theme } from './store.ts';

// Rows take the wash thinner than marks do, so that letters on them keep their contrast.
const ROW_WASH = { light: 50, dark: 20, print: 50 } as const;

function tokens(tints: Palette, rowWash: number): string {
  const own = Object.entries(tints).map(([role, tint]) => `--${role}: ${tint};`);
  return `${own.join(' ')} --row-wash: color-mix(in srgb, ${tints.wash} ${rowWash}%, transparent);`;
}

/**
 * The tints of the themes as custom properties on the page: light unless `data-theme` says dark; print always the white one.
 */
export function themeCss(): string {
  return [
    `:root { color-scheme: light; ${tokens(palette.light, ROW_WASH.light)} }`,
    `:root[data-theme='dark'] { color-scheme: dark; ${tokens(palette.dark, ROW_WASH.dark)} }`,
    `@media print { :root, :root[data-theme='dark'] { color-scheme: light; ${tokens(palette.print, ROW_WASH.print)} } }`,
  ].join('\n');
}

/** Give a page the themes. A constructed sheet, since a strict content policy drops inline ones. */
export function installTheme(page: Document): void {
  const sheet = new CSSStyleSheet();
  sheet.replaceSync(themeCss());
  page.adoptedStyleSheets = [...page.adoptedStyleSheets, sheet];
}

/** Show a page in one of the themes. */
export function applyTheme(page: Document, theme: Theme): void {
  page.documentElement.dataset.theme = theme;
}

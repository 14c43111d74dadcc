export { type Palette, palette } from './palette.ts';

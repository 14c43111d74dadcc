export { CHAIN_FRAGMENT, CHAIN_VERTEX } from './chain-shader.ts';
export { GLYPH_FRAGMENT, GLYPH_VERTEX } from './glyph-shader.ts';
export { GROUND_FRAGMENT, SCREEN_VERTEX, WASH_FRAGMENT } from './ground-shader.ts';
export { INK_FRAGMENT, LINE_VERTEX, STRAND_FRAGMENT } from './line-shader.ts';

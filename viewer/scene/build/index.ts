export { chainQuads } from './chain-quads.ts';
export { netQuads, outlineQuads, shellQuads } from './circle-quads.ts';
export { coneGlyphs } from './cone-glyphs.ts';
export { coneQuads } from './cone-quads.ts';
export { endLook, eventGlyphs, GLYPH_TINTS, GLYPHS, type Glyph, glyphQuads, still } from './glyph-quads.ts';
export { type Quads, quadIndex, type VertexColumns } from './quads.ts';
export { LINE_STYLES, type LineQuads, lineQuads, measureAlong, strandQuads } from './strand-quads.ts';

export { BallScene, type SceneMemory } from './ball-scene.ts';
export { chainQuads } from './build/chain-quads.ts';
export { coneGlyphs } from './build/cone-glyphs.ts';
export { coneQuads } from './build/cone-quads.ts';
export { eventGlyphs, type Glyph, GLYPHS, glyphQuads } from './build/glyph-quads.ts';
export type { Quads, VertexColumns } from './build/quads.ts';
export { LINE_STYLES, type LineQuads, lineQuads, measureAlong, strandQuads } from './build/strand-quads.ts';
export { SceneError } from './webgl.ts';

import type { Face } from './faces.mjs';
export function makeFace(face: Face): Promise<Uint8Array>;

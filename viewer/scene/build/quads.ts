/** Corner numbering of a quad: two triangles 0 1 2 and 2 1 3, where 0 and 1 begin and 2 and 3 end a segment. */
export function quadIndex(quads: number): Uint32Array {
  const index = new Uint32Array(6 * quads);
  for (let k = 0; k < quads; k++)
    index.set(
      [0, 1, 2, 2, 1, 3].map((corner) => 4 * k + corner),
      6 * k,
    );
  return index;
}

/** Named vertex columns of a geometry: numbers per vertex, and the values end to end. */
export interface VertexColumns {
  readonly [name: string]: { readonly size: number; readonly values: Float32Array };
}

/** Quads as plain arrays: vertex columns, four vertices a quad, and the index of their triangles. */
export interface Quads {
  readonly columns: VertexColumns;
  readonly index: Uint32Array;
}

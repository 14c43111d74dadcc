import { BufferAttribute, BufferGeometry, Mesh, type RawShaderMaterial } from 'three';
import type { Quads } from './build/index.ts';

/** Geometry of plain quads; whoever makes it disposes of it. */
export function geometryOf(quads: Quads): BufferGeometry {
  const geometry = new BufferGeometry();
  for (const [name, { size, values }] of Object.entries(quads.columns)) {
    geometry.setAttribute(name, new BufferAttribute(values, size));
  }
  geometry.setIndex(new BufferAttribute(quads.index, 1));
  return geometry;
}

/** A mesh that is always drawn, in the order given. */
export function meshOf(
  quads: Quads,
  material: RawShaderMaterial,
  order: number,
): Mesh<BufferGeometry, RawShaderMaterial> {
  const mesh = new Mesh(geometryOf(quads), material);
  mesh.frustumCulled = false;
  mesh.matrixAutoUpdate = false;
  mesh.renderOrder = order;
  // Nothing is asked for an empty buffer.
  mesh.visible = quads.index.length > 0;
  return mesh;
}

/** Put other quads into a mesh, freeing what it held. */
export function refill(mesh: Mesh<BufferGeometry, RawShaderMaterial>, quads: Quads): void {
  mesh.geometry.dispose();
  mesh.geometry = geometryOf(quads);
  mesh.visible = quads.index.length > 0;
}

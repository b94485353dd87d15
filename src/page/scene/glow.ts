import { GreaterDepth, Group, Mesh } from 'three';
import { type Paint, pipeMaterial, type SharedUniforms } from './pipe-material.ts';
import { type Tube, tubeGeometry } from './tubes.ts';

export interface Glow {
  readonly group: Group;
  /** Sections by rising index. */
  show(sections: readonly number[]): void;
  dispose(): void;
}

/** What must be seen: drawn once more over everything, with light around it, never thinner than a few pixels. */
export function glowOf(tubes: readonly Tube[], paint: Paint, shared: SharedUniforms): Glow {
  const group = new Group();
  const wide = pipeMaterial(paint, shared, { grow: 1.5, leastPixels: 4, morePixels: 9, alpha: 0.3, halo: true });
  const near = pipeMaterial(paint, shared, { grow: 1.25, leastPixels: 3, morePixels: 4, alpha: 0.5, halo: true });
  const core = pipeMaterial(paint, shared, { grow: 1.03, leastPixels: 2.2, morePixels: 0, alpha: 1, halo: false });
  const behind = pipeMaterial(paint, shared, { grow: 1.03, leastPixels: 2.2, morePixels: 0, alpha: 0.86, halo: false });
  for (const halo of [wide, near]) halo.depthTest = false;
  core.transparent = true; // so that it is drawn in the order below, after the walls
  behind.depthFunc = GreaterDepth; // only where something stands before it
  const meshes = [wide, near, behind, core].map((material, order) => {
    const mesh = new Mesh(undefined, material);
    mesh.renderOrder = 20 + order;
    mesh.frustumCulled = false;
    mesh.visible = false;
    group.add(mesh);
    return mesh;
  });
  let shown = '';
  return {
    group,
    show(sections) {
      const name = sections.join();
      if (name === shown) return;
      shown = name;
      const wanted = new Set(sections);
      const lit = tubes.filter(({ section }) => wanted.has(section));
      const geometry = tubeGeometry(lit, [], sections.length > 2000 ? 6 : 14);
      for (const mesh of meshes) {
        mesh.geometry.dispose();
        mesh.geometry = geometry;
        mesh.visible = lit.length > 0;
      }
    },
    dispose() {
      for (const mesh of meshes) {
        mesh.geometry.dispose();
        mesh.material.dispose();
      }
    },
  };
}

import { FrontSide, GreaterDepth, Group, Mesh } from 'three';
import { type Paint, pipeMaterial, type SharedUniforms } from './pipe-material.ts';
import { type Tube, tubeGeometry } from './tubes.ts';

export interface Glow {
  readonly group: Group;
  /** `lit` by rising index; `chosen` of them get a firm outline besides. */
  show(lit: readonly number[], chosen: readonly number[]): void;
  dispose(): void;
}

/** What must be seen: drawn once more over everything, with light around it, never thinner than a few pixels. */
export function glowOf(
  tubes: readonly Tube[],
  collars: readonly Tube[],
  paint: Paint,
  outlinePaint: Paint,
  shared: SharedUniforms,
): Glow {
  const group = new Group();
  const wide = pipeMaterial(paint, shared, { grow: 1.5, leastPixels: 4, morePixels: 9, alpha: 0.3, halo: true });
  const near = pipeMaterial(paint, shared, { grow: 1.25, leastPixels: 3, morePixels: 4, alpha: 0.5, halo: true });
  const core = pipeMaterial(paint, shared, { grow: 1.03, leastPixels: 2.2, morePixels: 0, alpha: 1, halo: false });
  const behind = pipeMaterial(paint, shared, { grow: 1.03, leastPixels: 2.2, morePixels: 0, alpha: 0.86, halo: false });
  const outline = pipeMaterial(outlinePaint, shared, {
    grow: 1.16,
    leastPixels: 3,
    morePixels: 2.5,
    alpha: 0.999,
    halo: false,
  });
  for (const halo of [wide, near, outline]) halo.depthTest = false;
  for (const material of [core, behind]) material.side = FrontSide; // the far inner wall would shine through as dark stripes
  core.transparent = true; // so that it is drawn in the order below, after the walls
  behind.depthFunc = GreaterDepth; // only where something stands before it
  const meshes = [wide, near, outline, behind, core].map((material, order) => {
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
    show(sections, chosen) {
      const name = `${sections.join()};${chosen.join()}`;
      if (name === shown) return;
      shown = name;
      const sides = sections.length > 2000 ? 6 : 14;
      const of = (from: readonly Tube[], wanted: ReadonlySet<number>): Tube[] =>
        from.filter(({ section }) => wanted.has(section));
      const lit = new Set(sections);
      const marked = new Set(chosen);
      const light = tubeGeometry(of(tubes, lit), [], sides);
      const bodies = tubeGeometry([...of(tubes, lit), ...of(collars, lit)], [], sides);
      const lines = tubeGeometry(of(tubes, marked), [], sides);
      const geometries = [light, light, lines, bodies, bodies];
      meshes.forEach((mesh, place) => {
        mesh.geometry.dispose();
        mesh.geometry = geometries[place]!;
        mesh.visible = (mesh.material === outline ? marked : lit).size > 0;
      });
    },
    dispose() {
      for (const mesh of meshes) {
        mesh.geometry.dispose();
        mesh.material.dispose();
      }
    },
  };
}

import { type BufferGeometry, FrontSide, GreaterDepth, Group, Mesh } from 'three';
import { type Paint, pipeMaterial, type SharedUniforms } from './pipe-material.ts';
import { type Tube, tubeGeometry } from './tubes.ts';

export interface Glow {
  readonly group: Group;
  /** `lit` by rising index; `chosen` of them get a firm outline besides. */
  show(lit: readonly number[], chosen: readonly number[]): void;
  /** While the eye moves on a slow machine only the lit body itself is drawn, as plainly as can be. */
  setCheap(cheap: boolean): void;
  dispose(): void;
}

/** More lit sections than this are left to the plain lines while the eye moves: they have the same colour there. */
const mostPlain = 600;

/** What must be seen: drawn once more over everything, with light around it, never thinner than a few pixels. */
export function glowOf(
  tubes: readonly Tube[],
  collars: readonly Tube[],
  paint: Paint,
  outlinePaint: Paint,
  shared: SharedUniforms,
  roundness: number,
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
  const plain = new Mesh(undefined, core);
  plain.renderOrder = 24;
  plain.frustumCulled = false;
  plain.visible = false;
  group.add(plain);
  let [shown, cheapNow, litCount, chosenCount] = ['', false, 0, 0];
  const reveal = (): void => {
    for (const mesh of meshes) mesh.visible = !cheapNow && (mesh.material === outline ? chosenCount : litCount) > 0;
    plain.visible = cheapNow && litCount > 0 && litCount <= mostPlain;
  };
  const replace = (mesh: Mesh, geometry: BufferGeometry): void => {
    mesh.geometry.dispose();
    mesh.geometry = geometry;
  };
  return {
    group,
    show(sections, chosen) {
      const name = `${sections.join()};${chosen.join()}`;
      if (name === shown) return;
      shown = name;
      const of = (from: readonly Tube[], wanted: ReadonlySet<number>): Tube[] =>
        from.filter(({ section }) => wanted.has(section));
      const [lit, marked] = [new Set(sections), new Set(chosen)];
      const round = { tube: Math.min(roundness, lit.size > 2000 ? 5 : 14), ball: 4 };
      const bodies = of(tubes, lit);
      const light = tubeGeometry(bodies, [], round);
      const solid = tubeGeometry([...bodies, ...of(collars, lit)], [], round);
      const geometries = [light, light, tubeGeometry(of(tubes, marked), [], round), solid, solid];
      meshes.forEach((mesh, place) => {
        replace(mesh, geometries[place]!);
      });
      replace(plain, tubeGeometry(bodies, [], { tube: 4, ball: 4 }));
      [litCount, chosenCount] = [lit.size, marked.size];
      reveal();
    },
    setCheap(cheap) {
      cheapNow = cheap;
      reveal();
    },
    dispose() {
      for (const mesh of [...meshes, plain]) {
        mesh.geometry.dispose();
        mesh.material.dispose();
      }
    },
  };
}

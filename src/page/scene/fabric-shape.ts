import { ShapeUtils, Vector2 } from 'three';
import type { Building } from '../building.ts';
import { MeshDraft } from './mesh-draft.ts';

/** Kinds of `scene.fabric`. */
export const fabricKinds = { wall: 0, slab: 1, roof: 2, space: 3 } as const;

/** Faces and edges of the building round the piping; spaces stay out, they only lend their names. */
export interface FabricShape {
  readonly walls: MeshDraft;
  readonly floors: MeshDraft;
  /** Pairs of points. */
  readonly edges: readonly number[];
}

export function fabricShape(building: Building): FabricShape {
  const { fabric } = building.data.scene;
  const walls = new MeshDraft();
  const floors = new MeshDraft();
  const edges: number[] = [];
  let at = 0;
  for (let body = 0; body < fabric.kind.length; body++) {
    const count = fabric.points[body]!;
    const plan: Vector2[] = [];
    for (let point = at; point < at + count; point++)
      plan.push(new Vector2(fabric.x[point]! / 1000, fabric.y[point]! / 1000));
    at += count;
    if (fabric.kind[body] === fabricKinds.space || count < 3) continue;
    if (ShapeUtils.area(plan) < 0) plan.reverse();
    const draft = fabric.kind[body] === fabricKinds.wall ? walls : floors;
    prism(draft, edges, plan, fabric.base[body]! / 1000, fabric.top[body]! / 1000);
  }
  return { walls, floors, edges };
}

/** Plan counter-clockwise. Coinciding faces of neighbours would flicker, so bodies shrink by a hair. */
function prism(draft: MeshDraft, edges: number[], plan: readonly Vector2[], base: number, top: number): void {
  const hair = 0.001;
  const low = base + hair;
  const high = top - hair;
  for (const triangle of ShapeUtils.triangulateShape([...plan], [])) {
    const [a, b, c] = triangle.map((corner) => plan[corner]!) as [Vector2, Vector2, Vector2];
    draft.triangle([a.x, a.y, high], [b.x, b.y, high], [c.x, c.y, high]);
    draft.triangle([c.x, c.y, low], [b.x, b.y, low], [a.x, a.y, low]);
  }
  plan.forEach((a, corner) => {
    const b = plan[(corner + 1) % plan.length]!;
    draft.quad([a.x, a.y, low], [b.x, b.y, low], [b.x, b.y, high], [a.x, a.y, high]);
    edges.push(a.x, a.y, low, b.x, b.y, low, a.x, a.y, high, b.x, b.y, high, a.x, a.y, low, a.x, a.y, high);
  });
}

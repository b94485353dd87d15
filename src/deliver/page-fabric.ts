import type { Box, Vec3 } from '../geometry/vector.ts';
import type { Fabric, Model, StoreyId } from '../model/model.ts';

/** Upright prisms, one entry each; millimetres from the scene's origin. */
export interface FabricColumns {
  /** 0 wall, 1 slab, 2 roof, 3 space. */
  readonly kind: Int32Array;
  /** Index into the scene's storeys; -1 where nothing says. */
  readonly storey: Int32Array;
  readonly base: Int32Array;
  readonly top: Int32Array;
  /** Count of its plan points. */
  readonly points: Int32Array;
  readonly x: Int32Array;
  readonly y: Int32Array;
}

const nothing = new Int32Array(0);
/** Of a building that says nothing of its walls. */
export const noFabric: FabricColumns = {
  kind: nothing,
  storey: nothing,
  base: nothing,
  top: nothing,
  points: nothing,
  x: nothing,
  y: nothing,
};

interface Prism {
  readonly kind: number;
  readonly name: string | null;
  readonly storey: number;
  readonly base: number;
  readonly top: number;
  readonly outline: readonly Vec3[];
}

const mm = (value: number): number => Math.round(value * 1000);

/** A wall that is known by its box alone and is thick both ways stands askew: its box would hide half a room. */
const thickestBoxWall = 0.8;

export function fabricColumns(
  model: Model,
  origin: Vec3,
): { readonly columns: FabricColumns; readonly names: readonly (string | null)[] } {
  const order = new Map<StoreyId, number>(model.storeys.map(({ id }, index) => [id, index]));
  const storeyOf = (id: StoreyId | null): number => (id === null ? -1 : (order.get(id) ?? -1));
  const prisms: Prism[] = [];
  const add = (
    kind: number,
    name: string | null,
    storey: StoreyId | null,
    box: Box | null,
    plan: Fabric['outline'],
  ) => {
    if (box === null) return;
    const outline = plan !== null && plan.length > 2 ? plan : rectangle(box);
    prisms.push({ kind, name, storey: storeyOf(storey), base: box.min[2], top: box.max[2], outline });
  };
  for (const { name, storey, box, outline } of model.walls)
    if (outline !== null || (box !== null && slimmest(box) <= thickestBoxWall)) add(0, name, storey, box, outline);
  for (const { name, storey, box, outline } of model.slabs) add(1, name, storey, box, outline);
  for (const { name, storey, box, outline } of model.roofs) add(2, name, storey, box, outline);
  for (const { name, longName, storey, box } of model.spaces) add(3, longName ?? name, storey, box, null);
  const column = (of: (prism: Prism) => number): Int32Array => Int32Array.from(prisms, of);
  const plan = prisms.flatMap(({ outline }) => outline);
  return {
    names: prisms.map(({ name }) => name),
    columns: {
      kind: column(({ kind }) => kind),
      storey: column(({ storey }) => storey),
      base: column(({ base }) => mm(base - origin[2])),
      top: column(({ top }) => mm(top - origin[2])),
      points: column(({ outline }) => outline.length),
      x: Int32Array.from(plan, (point) => mm(point[0] - origin[0])),
      y: Int32Array.from(plan, (point) => mm(point[1] - origin[1])),
    },
  };
}

const slimmest = ({ min, max }: Box): number => Math.min(max[0] - min[0], max[1] - min[1]);

const rectangle = ({ min, max }: Box): readonly Vec3[] => [
  [min[0], min[1], min[2]],
  [max[0], min[1], min[2]],
  [max[0], max[1], min[2]],
  [min[0], max[1], min[2]],
];

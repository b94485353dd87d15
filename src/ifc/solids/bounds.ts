import type { Box } from '../../geometry/vector.ts';
import {
  boxOf,
  compose,
  emptyBox,
  type Frame,
  type GrowingBox,
  identity,
  include,
  includeAll,
  moved,
  scaleOf,
} from './frame.ts';
import type { Mesh } from './mesh.ts';
import { type Piece, pieceOf, type Tube } from './piece.ts';

/** Box around parts of a shape; null for none. Round sweeps by their exact extent, all others by their points. */
export function boundsOf(pieces: readonly Piece[]): Box | null {
  if (pieces.length === 0) return null;
  const box = emptyBox();
  for (let k = 0; k < pieces.length; k++) {
    const { shape, frame } = pieces[k]!;
    if (shape.kind === 'tube') includeTube(box, frame, shape);
    else if (shape.kind === 'mesh') includeMesh(box, frame, shape);
    else {
      const { base, shift } = shape;
      includeAll(box, frame, base);
      if (shift[0] !== 0 || shift[1] !== 0 || shift[2] !== 0) {
        includeAll(box, compose(frame, [1, 0, 0, 0, 1, 0, 0, 0, 1, shift[0], shift[1], shift[2]]), base);
      }
    }
  }
  return boxOf(box);
}

/** Boxes of meshes in their own coordinates: a fitting's shape stands in a model a hundred times. */
const ownBoxes = new WeakMap<Mesh, GrowingBox>();

function includeMesh(box: GrowingBox, f: Frame, mesh: Mesh): void {
  if (!isUpright(f)) {
    includeAll(box, f, mesh.points());
    return;
  }
  let own = ownBoxes.get(mesh);
  if (own === undefined) {
    own = emptyBox();
    includeAll(own, identity, mesh.points());
    ownBoxes.set(mesh, own);
  }
  const { min, max } = own;
  if (min[0] > max[0]) return;
  const a = moved(f, min);
  const b = moved(f, max);
  include(box, a[0], a[1], a[2]);
  include(box, b[0], b[1], b[2]);
}

/** Smaller than this is the dust of a sine of 180 degrees. */
const dust = 1e-12;

/** True for a frame that turns axes into axes: then a box stays a box. */
function isUpright(f: Frame): boolean {
  for (let k = 0; k < 9; k += 3) {
    const x = Math.abs(f[k]!) > dust ? 1 : 0;
    const y = Math.abs(f[k + 1]!) > dust ? 1 : 0;
    const z = Math.abs(f[k + 2]!) > dust ? 1 : 0;
    if (x + y + z !== 1) return false;
  }
  return true;
}

/** Parts with frames that carry them into the world. */
export function inWorld(pieces: readonly Piece[], world: Frame): Piece[] {
  const placed: Piece[] = [];
  for (let k = 0; k < pieces.length; k++) placed.push(pieceOf(pieces[k]!.shape, compose(world, pieces[k]!.frame)));
  return placed;
}

function includeTube(box: GrowingBox, f: Frame, { points, outerRadius }: Tube): void {
  const radius = outerRadius * scaleOf(f);
  let a = moved(f, points[0]!);
  for (let k = 1; k < points.length; k++) {
    const b = moved(f, points[k]!);
    const x = b[0] - a[0];
    const y = b[1] - a[1];
    const z = b[2] - a[2];
    const size = Math.sqrt(x * x + y * y + z * z) || 1;
    // A disk at right angles to a unit vector d reaches r·√(1 − dᵢ²) along axis i.
    const rx = reach(radius, x / size);
    const ry = reach(radius, y / size);
    const rz = reach(radius, z / size);
    include(box, a[0] - rx, a[1] - ry, a[2] - rz);
    include(box, a[0] + rx, a[1] + ry, a[2] + rz);
    include(box, b[0] - rx, b[1] - ry, b[2] - rz);
    include(box, b[0] + rx, b[1] + ry, b[2] + rz);
    a = b;
  }
}

const reach = (radius: number, along: number): number => radius * Math.sqrt(Math.max(0, 1 - along * along));

import type { Box } from '../../geometry/vector.ts';
import { boxOf, compose, emptyBox, type Frame, type GrowingBox, include, includeAll, moved, scaleOf } from './frame.ts';
import { type Piece, pieceOf, type Tube } from './piece.ts';

/** Box around parts of a shape; null for none. Round sweeps by their exact extent, all others by their points. */
export function boundsOf(pieces: readonly Piece[]): Box | null {
  if (pieces.length === 0) return null;
  const box = emptyBox();
  for (let k = 0; k < pieces.length; k++) {
    const { shape, frame } = pieces[k]!;
    if (shape.kind === 'tube') includeTube(box, frame, shape);
    else if (shape.kind === 'mesh') includeAll(box, frame, shape.points());
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

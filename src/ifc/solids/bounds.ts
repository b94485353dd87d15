import { type Box, subtract, unit } from '../../geometry/vector.ts';
import { boxOf, compose, emptyBox, type Frame, type GrowingBox, include, includeAll, moved, scaleOf } from './frame.ts';
import type { Piece, Tube } from './piece.ts';

/** World box around parts of a shape; null for none. Round sweeps by their exact extent, all others by their points. */
export function boundsOf(pieces: readonly Piece[], world: Frame): Box | null {
  const box = emptyBox();
  for (const { shape, frame } of pieces) {
    const f = compose(world, frame);
    if (shape.kind === 'tube') includeTube(box, f, shape);
    else if (shape.kind === 'mesh') includeAll(box, f, shape.points());
    else {
      const { base, shift } = shape;
      includeAll(box, f, base);
      if (shift[0] !== 0 || shift[1] !== 0 || shift[2] !== 0) {
        const top: Frame = compose(f, [1, 0, 0, 0, 1, 0, 0, 0, 1, shift[0], shift[1], shift[2]]);
        includeAll(box, top, base);
      }
    }
  }
  return boxOf(box);
}

function includeTube(box: GrowingBox, f: Frame, { points, outerRadius }: Tube): void {
  const path = points.map((one) => moved(f, one));
  const radius = outerRadius * scaleOf(f);
  for (let k = 1; k < path.length; k++) {
    const [a, b] = [path[k - 1]!, path[k]!];
    const d = unit(subtract(b, a));
    // A disk at right angles to d reaches r·√(1 − dᵢ²) along axis i.
    const [rx, ry, rz] = [reach(radius, d[0]), reach(radius, d[1]), reach(radius, d[2])];
    for (const [x, y, z] of [a, b]) {
      include(box, x - rx, y - ry, z - rz);
      include(box, x + rx, y + ry, z + rz);
    }
  }
}

const reach = (radius: number, along: number): number => radius * Math.sqrt(Math.max(0, 1 - along * along));

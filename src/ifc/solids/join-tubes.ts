import { add, cross, distance, dot, length, scale, subtract, unit, type Vec3 } from '../../geometry/vector.ts';

/** A round part as it lies in the world. */
export interface JoinedTube {
  readonly points: readonly Vec3[];
  readonly outer: number;
  readonly inner: number | null;
  readonly ground: 'extrusion' | 'swept-disk';
}

/**
 * One tube out of the parts that a body is made of: the longest, made longer by those that go on where it ends,
 * straight or round a bend. Sockets, collars and insulation stops are short, and give no diameter.
 */
export function joinTubes(parts: readonly JoinedTube[]): JoinedTube {
  const [only] = parts;
  if (parts.length === 1) return only!;
  const main = parts.reduce((best, one) => (pathLength(one.points) > pathLength(best.points) + 1e-9 ? one : best));
  const rest = parts.filter((one) => one !== main);
  const near = main.outer * 0.05 + 1e-4;
  let path: readonly Vec3[] = main.points;
  for (let found = true; found; ) {
    found = false;
    for (const [k, other] of rest.entries()) {
      const longer = continued(path, other, near) ?? stretched(path, other, near);
      if (longer === null) continue;
      path = longer;
      rest.splice(k, 1);
      found = true;
      break;
    }
  }
  return { ...main, points: path };
}

const pathLength = (points: readonly Vec3[]): number =>
  points.slice(1).reduce((sum, point, k) => sum + distance(points[k]!, point), 0);

function continued(path: readonly Vec3[], { points, outer }: JoinedTube, near: number): Vec3[] | null {
  const [first, last] = [path[0]!, path.at(-1)!];
  const [a, b] = [points[0]!, points.at(-1)!];
  if (distance(a, b) < outer * 0.1) return null;
  if (distance(last, a) < near) return [...path, ...points.slice(1)];
  if (distance(last, b) < near) return [...path, ...[...points].reverse().slice(1)];
  if (distance(first, b) < near) return [...points.slice(0, -1), ...path];
  if (distance(first, a) < near) return [...[...points].reverse().slice(0, -1), ...path];
  return null;
}

/** A straight part on the same line that reaches past an end of the path, as a socket does. */
function stretched(path: readonly Vec3[], { points }: JoinedTube, near: number): Vec3[] | null {
  if (path.length !== 2 || points.length !== 2) return null;
  const [a, b] = [path[0]!, path[1]!];
  const along = unit(subtract(b, a));
  const size = distance(a, b);
  const places = points.map((point) => dot(subtract(point, a), along));
  const isOnLine = points.every((point) => length(cross(subtract(point, a), along)) < near);
  const [from, to] = [Math.min(...places), Math.max(...places)];
  // Parts far from the path are something else, though they lie on its line.
  if (!isOnLine || to < -near || from > size + near) return null;
  return [add(a, scale(along, Math.min(0, from))), add(a, scale(along, Math.max(size, to)))];
}

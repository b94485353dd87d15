import { add, cross, distance, dot, length, scale, subtract, unit, type Vec3 } from '../../geometry/vector.ts';
import type { CentreLine } from '../../model/model.ts';
import { metres } from '../../units/quantity.ts';
import { type FittedTube, fitTube, radiusAround } from './fit-tube.ts';
import { compose, type Frame, moved, scaleOf } from './frame.ts';
import type { Piece, Tube } from './piece.ts';
import type { ProductShape } from './product-shape.ts';

/**
 * The centre line of a round body in world metres: from its sweep, else from its Axis with the body's radius, else
 * fitted to its mesh. null where none of them gives one, as for a duct.
 */
export function centreLineOf(shape: ProductShape, world: Frame): CentreLine | null {
  const tubes = shape.body.filter(isTube);
  if (tubes.length > 0) return ofTubes(tubes, world);
  if (shape.axis !== null) {
    const points = apart(shape.axis.map((point) => moved(world, point)));
    if (points === null) return null;
    const around = radiusAround(shape.axis, shape.body);
    return line(points, around?.outer ?? null, around?.inner ?? null, 'axis', around?.residual ?? 0, scaleOf(world));
  }
  const fitted = largestFit(shape.body);
  if (fitted === null) return null;
  const points = apart(fitted.points.map((point) => moved(world, point)));
  return points === null ? null : line(points, fitted.outer, fitted.inner, 'mesh', fitted.residual, scaleOf(world));
}

type TubePiece = Piece & { readonly shape: Tube };
const isTube = (piece: Piece): piece is TubePiece => piece.shape.kind === 'tube';

/** A tube as it lies in the product. */
interface Laid {
  readonly points: readonly Vec3[];
  readonly outer: number;
  readonly inner: number | null;
  readonly ground: Tube['ground'];
}

function ofTubes(tubes: readonly TubePiece[], world: Frame): CentreLine | null {
  const laid = tubes.map(({ shape, frame }): Laid => {
    const f = compose(world, frame);
    const k = scaleOf(f);
    const inner = shape.innerRadius === null ? null : shape.innerRadius * k;
    return {
      points: shape.points.map((one) => moved(f, one)),
      outer: shape.outerRadius * k,
      inner,
      ground: shape.ground,
    };
  });
  // The longest part is the pipe: sockets, collars and insulation stops are short.
  const main = laid.reduce((best, one) => (pathLength(one.points) > pathLength(best.points) + 1e-9 ? one : best));
  const path =
    laid.length === 1
      ? main.points
      : joined(
          main,
          laid.filter((one) => one !== main),
        );
  const points = apart(path);
  return points === null ? null : line(points, main.outer, main.inner, main.ground, 0, 1);
}

const pathLength = (points: readonly Vec3[]): number =>
  points.slice(1).reduce((sum, point, k) => sum + distance(points[k]!, point), 0);

/** The main part made longer by those that go on where it ends, straight or round a bend. */
function joined(main: Laid, others: readonly Laid[]): readonly Vec3[] {
  let path = [...main.points];
  const rest = [...others];
  const near = main.outer * 0.05 + 1e-4;
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
  return path;
}

function continued(path: readonly Vec3[], { points, outer }: Laid, near: number): Vec3[] | null {
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
function stretched(path: readonly Vec3[], { points }: Laid, near: number): Vec3[] | null {
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

function largestFit(body: readonly Piece[]): FittedTube | null {
  let best: FittedTube | null = null;
  for (const { shape, frame } of body) {
    if (shape.kind !== 'mesh') continue;
    const fitted = fitTube(shape);
    if (fitted === null) continue;
    const k = scaleOf(frame);
    const laid: FittedTube = {
      points: fitted.points.map((point) => moved(frame, point)),
      outer: fitted.outer * k,
      inner: fitted.inner === null ? null : fitted.inner * k,
      residual: fitted.residual * k,
    };
    // Of several bodies the outermost is the pipe; what fills or lines it is drawn inside.
    if (best === null || laid.outer > best.outer * 1.001) best = laid;
  }
  return best;
}

/** Neighbours nearer than this are one point. */
const alike = 1e-6;

/** Points without repeated neighbours; null where fewer than two are left or one is no number. */
function apart(points: readonly Vec3[]): Vec3[] | null {
  const kept: Vec3[] = [];
  for (const point of points) {
    if (!point.every(Number.isFinite)) return null;
    const last = kept.at(-1);
    if (last === undefined || distance(last, point) > alike) kept.push(point);
  }
  return kept.length > 1 ? kept : null;
}

function line(
  points: readonly Vec3[],
  outer: number | null,
  inner: number | null,
  ground: CentreLine['ground'],
  residual: number,
  k: number,
): CentreLine {
  return {
    points,
    outerDiameter: outer === null ? null : metres(2 * outer * k),
    innerDiameter: inner === null ? null : metres(2 * inner * k),
    ground,
    residual: residual * k,
  };
}

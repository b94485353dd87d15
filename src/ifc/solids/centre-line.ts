import { distance, type Vec3 } from '../../geometry/vector.ts';
import type { CentreLine } from '../../model/model.ts';
import { metres } from '../../units/quantity.ts';
import { radiusAround } from './fit-around.ts';
import { type FittedTube, fitStraight } from './fit-tube.ts';
import { compose, type Frame, moved, scaleOf } from './frame.ts';
import { type JoinedTube, joinTubes } from './join-tubes.ts';
import type { Piece } from './piece.ts';
import type { ProductShape } from './product-shape.ts';

/**
 * The centre line of a round body in world metres: from its sweep, else from its Axis with the body's radius, else
 * fitted to its mesh. null where none of them gives one, as for a duct.
 */
export function centreLineOf(shape: ProductShape, world: Frame): CentreLine | null {
  const tubes: JoinedTube[] = [];
  for (const { shape: part, frame } of shape.body) {
    if (part.kind !== 'tube') continue;
    const f = compose(world, frame);
    const k = scaleOf(f);
    const inner = part.innerRadius === null ? null : part.innerRadius * k;
    const points = part.points.map((point) => moved(f, point));
    tubes.push({ points, outer: part.outerRadius * k, inner, ground: part.ground });
  }
  if (tubes.length > 0) {
    const { points, outer, inner, ground } = joinTubes(tubes);
    return line(points, outer, inner, ground, 0);
  }
  const k = scaleOf(world);
  if (shape.axis !== null) {
    const around = radiusAround(shape.axis, shape.body);
    const outer = around === null ? null : around.outer * k;
    return line(
      shape.axis.map((point) => moved(world, point)),
      outer,
      null,
      'axis',
      (around?.residual ?? 0) * k,
    );
  }
  const fitted = largestFit(shape.body);
  if (fitted === null) return null;
  const inner = fitted.inner === null ? null : fitted.inner * k;
  return line(
    fitted.points.map((point) => moved(world, point)),
    fitted.outer * k,
    inner,
    'mesh',
    fitted.residual * k,
  );
}

/** Of several bodies the outermost is the pipe: what fills or lines it is drawn inside. */
function largestFit(body: readonly Piece[]): FittedTube | null {
  let best: FittedTube | null = null;
  for (const { shape, frame } of body) {
    if (shape.kind !== 'mesh') continue;
    const fitted = fitStraight(shape);
    if (fitted === null) continue;
    const k = scaleOf(frame);
    const outer = fitted.outer * k;
    if (best !== null && outer < best.outer * 1.001) continue;
    const points = fitted.points.map((point) => moved(frame, point));
    best = { points, outer, inner: fitted.inner === null ? null : fitted.inner * k, residual: fitted.residual * k };
  }
  return best;
}

/** Neighbours nearer than this are one point. */
const alike = 1e-6;

/** null where fewer than two points are left apart, or one is no number. */
function line(
  path: readonly Vec3[],
  outer: number | null,
  inner: number | null,
  ground: CentreLine['ground'],
  residual: number,
): CentreLine | null {
  const points: Vec3[] = [];
  for (const point of path) {
    if (!Number.isFinite(point[0] + point[1] + point[2])) return null;
    const last = points.at(-1);
    if (last === undefined || distance(last, point) > alike) points.push(point);
  }
  if (points.length < 2) return null;
  return {
    points,
    outerDiameter: outer === null ? null : metres(2 * outer),
    innerDiameter: inner === null ? null : metres(2 * inner),
    ground,
    residual,
  };
}

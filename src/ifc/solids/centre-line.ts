import { distance, type Vec3 } from '../../geometry/vector.ts';
import type { CentreLine } from '../../model/model.ts';
import { type Metres, metres } from '../../units/quantity.ts';
import { radiusAround } from './fit-around.ts';
import { fitBend } from './fit-bend.ts';
import { type FittedTube, fitLoosely, fitStraight } from './fit-tube.ts';
import { type Frame, isPlace, moved, scaleOf } from './frame.ts';
import { type JoinedTube, joinTubes } from './join-tubes.ts';
import type { Piece } from './piece.ts';

/**
 * The centre line of a round body whose parts lie in the world, in metres: from its sweep, else from its Axis with the body's radius, else
 * fitted to its mesh. `world` places the axis. null where none of them gives one, as for a duct.
 */
export function centreLineOf(body: readonly Piece[], axis: readonly Vec3[] | null, world: Frame): CentreLine | null {
  const tubes: JoinedTube[] = [];
  for (let i = 0; i < body.length; i++) {
    const { shape, frame } = body[i]!;
    if (shape.kind !== 'tube') continue;
    const k = scaleOf(frame);
    const inner = shape.innerRadius === null ? null : shape.innerRadius * k;
    const points = shape.points.map((point) => moved(frame, point));
    tubes.push({ points, outer: shape.outerRadius * k, inner, ground: shape.ground });
  }
  if (tubes.length > 0) {
    const { points, outer, inner, ground } = joinTubes(tubes);
    return line(points, outer, inner, ground, 0);
  }
  if (axis !== null) {
    const points = axis.map((point) => moved(world, point));
    const around = radiusAround(points, body);
    return line(points, around?.outer ?? null, null, 'axis', around?.residual ?? 0);
  }
  const fitted = largestFit(body);
  return fitted === null ? null : line(fitted.points, fitted.outer, fitted.inner, 'mesh', fitted.residual);
}

/** Of several bodies the outermost is the pipe: what fills or lines it is drawn inside. */
function largestFit(body: readonly Piece[]): FittedTube | null {
  let best: FittedTube | null = null;
  for (const { shape, frame } of body) {
    if (shape.kind !== 'mesh') continue;
    const fitted = fitStraight(shape) ?? fitBend(shape) ?? fitLoosely(shape);
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
    if (!isPlace(point[0], point[1], point[2])) return null;
    const last = points.at(-1);
    if (last === undefined || distance(last, point) > alike) points.push(point);
  }
  if (points.length < 2) return null;
  return {
    points,
    outerDiameter: diameter(outer),
    innerDiameter: diameter(inner),
    ground,
    residual,
  };
}

/** Widest radius, in metres, that is a pipe's and no slip of the pen. */
const widest = 1000;

const diameter = (radius: number | null): Metres | null =>
  radius === null || !(radius < widest) ? null : metres(2 * radius);

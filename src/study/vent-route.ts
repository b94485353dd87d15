import type { PlanPoint } from '../geometry/plan-outline.ts';
import { polyline } from '../geometry/polyline.ts';
import { distance, type Vec3 } from '../geometry/vector.ts';
import type { Place } from '../network/change.ts';
import type { Network, Pipe, PipeId } from '../network/network.ts';
import { type ChangedPiping, withVent } from './changed-piping.ts';
import type { Row } from './row.ts';
import { type Foot, onWall, type PlaceAt, placeOf } from './vent-feet.ts';

/** Vents meet at least this far above the flood level of what they serve, metres: common practice, no source. */
export const aboveFlood = 0.15;
const millimetre = 0.001;

export interface Route {
  readonly to: Place;
  /** From the foot upward, then level. */
  readonly points: readonly Vec3[];
  readonly length: number;
}

/**
 * The shortest way for a vent: straight up, then level along the row and square to it, to a live vent. It joins an
 * upright vent where the modelled vents meet, or else 150 mm over the flood level; a level one wherever it runs above that.
 * null where no vent is left to join.
 */
export function routeFrom(row: Row, piping: ChangedPiping, from: Vec3, live: ReadonlySet<PipeId>): Route | null {
  let best: (Route & { pipe: PipeId }) | null = null;
  for (const pipe of piping.network.pipes) {
    if (!live.has(pipe.id) || pipe.points === null) continue;
    const join = joinOn(row, piping.network, pipe, from);
    if (join === null || join.at[2] < from[2]) continue;
    const points = wayTo(row.along, from, join.at);
    const { length } = polyline(points);
    if (points.length > 1 && (best === null || length < best.length - 1e-9))
      best = { to: join.place, points, length, pipe: pipe.id };
  }
  return best;
}

/** Where on a vent another may join: the point nearest in plan among those that are high enough. */
export function joinOn(
  { flood, meet }: Pick<Row, 'flood' | 'meet'>,
  network: Network,
  pipe: Pipe,
  from: Vec3,
): PlaceAt | null {
  const least = flood + aboveFlood;
  const points = pipe.points!;
  // A vent reaches to the centres of the joints at its ends: another may join there too.
  const [first, last] = pipe.ends.map((joint) => network.joints[joint]!.at);
  const line = polyline([first ?? points[0]!, ...points, last ?? points.at(-1)!]);
  let best: { at: number; away: number } | null = null;
  for (let leg = 1; leg < line.points.length; leg++) {
    const [a, b] = [line.points[leg - 1]!, line.points[leg]!];
    const length = distance(a, b);
    const share = length === 0 ? null : shareOn(a, b, from, least, meet);
    if (share === null) continue;
    const away = Math.hypot(a[0] + (b[0] - a[0]) * share - from[0], a[1] + (b[1] - a[1]) * share - from[1]);
    if (best === null || away < best.away - 1e-9) best = { at: line.along[leg - 1]! + share * length, away };
  }
  return best === null ? null : onWall(network, pipe, best.at - distance(first ?? points[0]!, points[0]!));
}

/** Of the leg from `a` to `b`; null where all of it lies too low. */
function shareOn(a: Vec3, b: Vec3, from: Vec3, least: number, meet: number | null): number | null {
  const rise = b[2] - a[2];
  const [dx, dy] = [b[0] - a[0], b[1] - a[1]];
  const plan = Math.hypot(dx, dy);
  const high = Math.max(a[2], b[2]);
  if (high < least - millimetre) return null;
  const shareAt = (z: number): number => (rise === 0 ? 0 : Math.min(1, Math.max(0, (z - a[2]) / rise)));
  if (Math.abs(rise) >= plan) return shareAt(Math.max(least, meet ?? least));
  const nearest = ((from[0] - a[0]) * dx + (from[1] - a[1]) * dy) / (plan * plan);
  const [low, up] =
    rise === 0 || Math.min(a[2], b[2]) >= least ? [0, 1] : rise > 0 ? [shareAt(least), 1] : [0, shareAt(least)];
  return Math.min(up, Math.max(low, nearest));
}

/** Up, along the row, square to it; legs shorter than a millimetre fall away. */
export function wayTo(along: PlanPoint, from: Vec3, to: Vec3): Vec3[] {
  const [dx, dy] = [to[0] - from[0], to[1] - from[1]];
  const ahead = dx * along[0] + dy * along[1];
  const top: Vec3 = [from[0], from[1], to[2]];
  const corner: Vec3 = [from[0] + ahead * along[0], from[1] + ahead * along[1], to[2]];
  const points: Vec3[] = [from];
  for (const point of [top, corner]) {
    if (distance(point, points.at(-1)!) > millimetre && distance(point, to) > millimetre) points.push(point);
  }
  if (distance(points.at(-1)!, to) > millimetre) points.push(to);
  return points;
}

/** The piping with a vent from the foot to the vent nearest by; null where the foot has no place or finds no vent. */
export function ventFrom(row: Row, piping: ChangedPiping, foot: Foot, name: string): ChangedPiping | null {
  const start = placeOf(row, piping, foot);
  const route = start === null ? null : routeFrom(row, piping, start.at, liveIn(row, piping));
  if (start === null || route === null) return null;
  const { material, storey } = row;
  return withVent(piping, { name, material, storey, from: start.place, to: route.to, points: route.points });
}

/** Pipes of the changed piping that a new vent may join: the live ones that are left, and those added before. */
function liveIn({ live }: Row, { origin }: ChangedPiping): Set<PipeId> {
  return new Set(origin.flatMap((from, id) => (from === null || live.has(from) ? [id as PipeId] : [])));
}

/** Vents from several feet, the one with the shortest way first: each may join those before it. null: one finds none. */
export function ventsFrom(
  row: Row,
  piping: ChangedPiping,
  feet: readonly { readonly foot: Foot; readonly name: string }[],
): ChangedPiping | null {
  let changed = piping;
  const left = [...feet];
  while (left.length > 0) {
    const lengths = left.map(({ foot }) => {
      const start = placeOf(row, changed, foot);
      return start === null ? null : (routeFrom(row, changed, start.at, liveIn(row, changed))?.length ?? null);
    });
    if (lengths.some((length) => length === null)) return null;
    const next = lengths.reduce<number>((best, length, at) => (length! < lengths[best]! - 1e-9 ? at : best), 0);
    const [{ foot, name }] = left.splice(next, 1) as [(typeof left)[number]];
    const added = ventFrom(row, changed, foot, name);
    if (added === null) return null;
    changed = added;
  }
  return changed;
}

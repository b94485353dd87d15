import type { Finding } from '../../findings/finding.ts';
import type { PlanPoint } from '../../geometry/plan-outline.ts';
import { polyline } from '../../geometry/polyline.ts';
import { planDistance, type Vec3 } from '../../geometry/vector.ts';
import type { ElementId } from '../../model/model.ts';
import type { Place } from '../../network/change.ts';
import type { JointId, PipeId } from '../../network/network.ts';
import type { Piping } from '../../pipeline.ts';
import { unchanged, withVent } from '../changed-piping.ts';
import type { PlaceAt } from '../vent-feet.ts';
import { joinOn, wayTo } from '../vent-route.ts';
import type { Option, VentChange } from './change.ts';
import type { Scene } from './scene.ts';

/** A vent that is wanted: where it starts, for whom, and where it may end. */
export interface VentWish {
  readonly foot: PlaceAt;
  readonly why: Finding;
  /** Elements at its foot. */
  readonly about: readonly ElementId[];
  /** It may join no other vent below this, metres: the flood level of what it serves. */
  readonly flood: number;
  readonly kind?: VentChange['kind'];
  /** Vents that it may join; all live ones where absent. */
  readonly onto?: (pipe: PipeId) => boolean;
  /** Whether it may go through the roof by itself; true where absent. */
  readonly sky?: boolean;
  /** The foot stands on an upright pipe: the vent leaves it sideways before it rises. */
  readonly sideways?: boolean;
}

/** A vent beside an upright pipe stands this far from it, metres. */
const beside = 0.3;
/** To a vent no farther than this, in plan, it leads straight, metres. */
const near = 1;
/** It leaves the upright pipe at 60 degrees. */
const sixthBend = Math.sqrt(3);
/** A vent ends this far over the roof, metres: common practice, no source. */
const overRoof = 0.3;

/** The shortest ways of a vent: to the `most` nearest vents, each another element, and through the roof; cheapest first. */
export function ventOptions(scene: Scene, wish: VentWish, most = 2): Option[] {
  const { outcome, live, costs } = scene;
  const from = wish.foot.at;
  const seen = new Set<ElementId | null>();
  const joins: { option: Option; element: ElementId | null }[] = [];
  for (const [pipe, flooded] of live) {
    const there = outcome.network.pipes[pipe]!;
    if (there.points === null || wish.onto?.(pipe) === false) continue;
    const flood = Math.max(wish.flood, flooded);
    const join = joinOn({ flood, meet: null }, outcome.network, there, from);
    if (join === null || join.at[2] < from[2]) continue;
    const points = wayOf(scene, wish, join.at);
    if (points.length < 2 || atFoot(wish.foot.place, join.place)) continue;
    const option = ventOption(scene, wish, points, join.place, there.element, costs.vent(points, 2, false));
    joins.push({ option, element: there.element });
  }
  const nearest = joins
    .sort(({ option: a }, { option: b }) => a.cost - b.cost || (a.key < b.key ? -1 : 1))
    .filter(({ element }) => {
      if (seen.has(element)) return false;
      seen.add(element);
      return true;
    })
    .slice(0, most)
    .map(({ option }) => option);
  return [...nearest, ...(wish.sky === false ? [] : throughRoof(scene, wish))].sort((a, b) => a.cost - b.cost);
}

function throughRoof(scene: Scene, wish: VentWish): Option[] {
  const [x, y, z] = wish.foot.at;
  const side: Vec3 = wish.sideways === true ? [x + beside, y, z] : wish.foot.at;
  const top: Vec3 = [side[0], side[1], Math.max(scene.sky.above(side) + overRoof, z + overRoof)];
  const points: Vec3[] = wish.sideways === true ? [wish.foot.at, side, top] : [side, top];
  return [ventOption(scene, wish, points, { open: top }, null, scene.costs.vent(points, 1, true))];
}

/** Up, along the line it stands on, square to it; away from an upright pipe first. */
function wayOf(scene: Scene, { foot, sideways }: VentWish, to: Vec3): Vec3[] {
  const from = foot.at;
  if (sideways !== true) return wayTo(lineAt(scene, foot) ?? toward(from, to), from, to);
  const plan = planDistance(from, to);
  const [x, y] = toward(from, to);
  // A vent nearby is met from right below it.
  const away = plan > 0 && plan <= near ? plan : beside;
  const rise = Math.min(away * sixthBend, Math.max(0, to[2] - from[2]));
  const side: Vec3 = [from[0] + x * away, from[1] + y * away, from[2] + rise];
  return [from, ...wayTo(toward(side, to), side, to)];
}

function toward(from: Vec3, to: Vec3): PlanPoint {
  const plan = planDistance(from, to);
  return plan < 1e-6 ? [1, 0] : [(to[0] - from[0]) / plan, (to[1] - from[1]) / plan];
}

/** Direction in plan of the longest level pipe at a foot. */
function lineAt({ outcome: { network } }: Scene, { place }: PlaceAt): PlanPoint | null {
  const pipes = 'pipe' in place ? [place.pipe] : 'joint' in place ? network.joints[place.joint]!.pipes : [];
  let best: { direction: PlanPoint; plan: number } | null = null;
  for (const pipe of pipes) {
    const { points } = network.pipes[pipe]!;
    if (points === null) continue;
    const [a, b] = [points[0]!, points[points.length - 1]!];
    const plan = planDistance(a, b);
    if (plan < Math.abs(b[2] - a[2]) || plan <= (best?.plan ?? 0)) continue;
    best = { direction: toward(a, b), plan };
  }
  return best?.direction ?? null;
}

const atFoot = (foot: Place, end: Place): boolean =>
  ('joint' in foot && 'joint' in end && foot.joint === end.joint) ||
  ('pipe' in foot && 'pipe' in end && foot.pipe === end.pipe);

function ventOption(
  { outcome }: Scene,
  { foot, why, about, kind = 'vent' }: VentWish,
  points: readonly Vec3[],
  to: Place,
  joins: ElementId | null,
  cost: number,
): Option {
  const first = outcome.model.elements.length;
  const change: VentChange = {
    kind,
    about: [...about, ...(joins === null || about.includes(joins) ? [] : [joins])],
    points,
    length: polyline(points).length,
    added: points.slice(1).map((_, leg) => (first + leg) as ElementId),
    joins,
    apply: (piping) => withNewVent(piping, foot.place, to, points),
  };
  return { key: `${kind} ${spot(points[0]!)} ${spot(points[points.length - 1]!)}`, cost, change, pins: [], why };
}

/** The piping with a vent of no size yet along points. */
export function withNewVent(piping: Piping, from: Place, to: Place, points: readonly Vec3[]): Piping {
  const { model, identities, network } = withVent(unchanged(piping), {
    name: 'New vent',
    material: null,
    storey: null,
    from,
    to,
    points,
  });
  return { ...piping, model, identities, network };
}

/** A place as text, to the millimetre. */
export const spot = (at: Vec3): string => at.map((metres) => metres.toFixed(3)).join(' ');

/** Elements at a joint: what stands there, else its pipes. */
export function elementsAt({ outcome: { network } }: Scene, place: Place): ElementId[] {
  if ('open' in place) return [];
  if ('pipe' in place) return network.pipes[place.pipe]!.element === null ? [] : [network.pipes[place.pipe]!.element!];
  return pipesAt(network.joints[place.joint]!.pipes, (pipe) => network.pipes[pipe]!.element);
}

const pipesAt = (pipes: readonly PipeId[], elementOf: (pipe: PipeId) => ElementId | null): ElementId[] => [
  ...new Set(pipes.flatMap((pipe) => elementOf(pipe) ?? [])),
];

/** A joint as a place with its point; null where the model has no geometry. */
export function jointPlace({ at }: Scene, joint: JointId): PlaceAt | null {
  const point = at(joint);
  return point === null ? null : { place: { joint }, at: point };
}

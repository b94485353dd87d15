import type { Finding } from '../../findings/finding.ts';
import { polyline } from '../../geometry/polyline.ts';
import { distance, type Vec3 } from '../../geometry/vector.ts';
import type { ElementId } from '../../model/model.ts';
import { type Place, removePipes } from '../../network/change.ts';
import type { JointId, PipeId } from '../../network/network.ts';
import { otherEnd } from '../../network/other-end.ts';
import type { Piping } from '../../pipeline.ts';
import type { PlaceAt } from '../vent-feet.ts';
import { wayTo } from '../vent-route.ts';
import type { Option } from './change.ts';
import type { Scene } from './scene.ts';
import { elementsAt, spot, withNewVent } from './vent-changes.ts';

/**
 * The vent that stands on a joint, set on another place: its first length goes, and a new one rises from there to where
 * that one ended; a vent that went straight to open air does so from its new place.
 */
export function movedVentOptions(scene: Scene, from: JointId, to: PlaceAt, why: Finding): Option[] {
  const { outcome, costs } = scene;
  const foot = outcome.shown.roles.feet.find(({ joint }) => joint === from);
  const first = foot?.path[0];
  if (first === undefined || ('joint' in to.place && to.place.joint === from)) return [];
  const { element } = outcome.network.pipes[first]!;
  const top = otherEnd(outcome.network, first, from);
  const there = scene.at(top);
  if (there === null || element === null || there[2] < to.at[2]) return [];
  const opens = foot!.path.length === 1;
  const end: Vec3 = opens ? [to.at[0], to.at[1], there[2]] : there;
  const points = opens ? [to.at, end] : wayTo(directionOf(to.at, there), to.at, there);
  if (points.length < 2) return [];
  const added = points.slice(1).map((_, leg) => (outcome.model.elements.length + leg) as ElementId);
  const place: Place = opens ? { open: end } : { joint: top };
  return [
    {
      key: `moved-vent ${spot(to.at)} ${spot(end)}`,
      cost: costs.vent(points, 1, false),
      change: {
        kind: 'moved-vent',
        about: [element, ...elementsAt(scene, to.place)],
        points,
        length: polyline(points).length,
        added,
        joins: null,
        apply: (piping) => moved(piping, first, to.place, place, points),
      },
      pins: [],
      why,
    },
  ];
}

/** Added first and taken away after: what was there keeps its ids meanwhile. */
function moved(piping: Piping, first: PipeId, from: Place, to: Place, points: readonly Vec3[]): Piping {
  const added = withNewVent(piping, from, to, points);
  return { ...added, network: removePipes(added.network, new Set([first])).network };
}

function directionOf(from: Vec3, to: Vec3): readonly [number, number] {
  const plan = distance([from[0], from[1], 0], [to[0], to[1], 0]);
  return plan < 1e-6 ? [1, 0] : [(to[0] - from[0]) / plan, (to[1] - from[1]) / plan];
}

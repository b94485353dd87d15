import { boxCentre, boxSize } from '../geometry/box.ts';
import { boxGrid } from '../geometry/box-grid.ts';
import { footOn } from '../geometry/polyline.ts';
import { planDistance } from '../geometry/vector.ts';
import type { Model } from '../model/model.ts';
import { wanted } from './join-touching.ts';
import { legsOf } from './legs.ts';
import { type BodyPart, bodyNode, type Piping } from './piping.ts';
import { type Pair, settlePairs } from './settle-pairs.ts';
import type { Welds } from './welds.ts';

/**
 * Bodies that sit on a pipe running through them: a saddle or a cleanout tee when nothing else makes it whole, a manhole
 * built over its drain.
 */
export function joinRunsThrough(model: Model, piping: Piping, welds: Welds): void {
  const { bodies, pipes } = piping;
  const need = bodies.map((body) => wanted(body, model.elements[body.element]!.predefinedType));
  const askers = bodies.flatMap((body, index) =>
    body.box !== null && sitsOnPipes(body) && (body.part === 'chamber' || welds.degree[index]! < need[index]!)
      ? [index]
      : [],
  );
  if (askers.length === 0) return;
  const legs = legsOf(piping);
  const grid = boxGrid(legs.boxes);
  const pairs: Pair[] = [];
  for (const index of askers) {
    const body = bodies[index]!;
    const node = bodyNode(piping, index);
    const looked = new Set<number>();
    grid.touching(body.box!, (leg) => {
      const pipe = legs.pipe[leg]!;
      if (looked.has(pipe)) return;
      looked.add(pipe);
      const place = placeUnder(body, piping, pipe);
      if (place === null) return;
      pairs.push({
        cost: place.off,
        names: [model.elements[body.element]!.globalId, model.elements[pipes[pipe]!.element]!.globalId],
        settle: () => {
          const own = [2 * pipe, 2 * pipe + 1].some((end) => welds.root(end) === welds.root(node));
          if (!own && (body.part === 'chamber' || welds.degree[index]! < need[index]!))
            welds.join(node, welds.wall(pipe, place.at), 'end-in-fitting', 0);
        },
      });
    });
  }
  settlePairs(pairs);
}

const sitsOnPipes = ({ part }: BodyPart): boolean =>
  part === 'fitting' || part === 'cleanout' || part === 'trap' || part === 'chamber';

/** Where a pipe passes the middle of a body, well away from its own ends; null where it only brushes the box. */
function placeUnder({ part, box }: BodyPart, { pipes }: Piping, pipe: number): { at: number; off: number } | null {
  const { axis, diameter } = pipes[pipe]!;
  const [dx, dy, dz] = boxSize(box!);
  const upright = part === 'chamber';
  const half = (upright ? Math.min(dx, dy) : Math.min(dx, dy, dz)) / 2;
  const centre = boxCentre(box!);
  const foot = footOn(axis!, centre);
  if (foot.at <= half || foot.at >= axis!.length - half) return null;
  const off = upright ? planDistance(foot.point, centre) : foot.off;
  return off <= Math.max(upright ? 0 : diameter / 2, half / 2) ? { at: foot.at, off } : null;
}

import { boxCentre, distanceOfBoxes, grown } from '../geometry/box.ts';
import { boxGrid } from '../geometry/box-grid.ts';
import { distance } from '../geometry/vector.ts';
import type { Model } from '../model/model.ts';
import { type BodyPart, bodyNode, type Piping } from './piping.ts';
import { takesEnds } from './propose-joins.ts';
import { type Pair, settlePairs } from './settle-pairs.ts';
import type { Reach } from './tolerance.ts';
import type { Welds } from './welds.ts';

/** Connections without which a body makes no sense; one that has fewer looks for what it touches. */
export function wanted({ part }: BodyPart, predefinedType: string | null): number {
  if (part === 'fitting') return predefinedType === 'JUNCTION' ? 3 : predefinedType === 'OBSTRUCTION' ? 1 : 2;
  return part === 'trap' || part === 'valve' ? 2 : 1;
}

/** Metres between the places where two bodies are known to connect; null where one of them shows none. */
function nearestSpots(a: BodyPart, b: BodyPart): number | null {
  if (a.spots.length === 0 || b.spots.length === 0) return null;
  return Math.min(...a.spots.map((spot) => Math.min(...b.spots.map((other) => distance(spot, other)))));
}

/** Fittings, valves and terminals that touch each other with no pipe between. */
export function joinTouching(model: Model, piping: Piping, welds: Welds, reach: Reach): void {
  const { bodies } = piping;
  const need = bodies.map((body) => wanted(body, model.elements[body.element]!.predefinedType));
  const lacks = (body: number): boolean => welds.degree[body]! < need[body]!;
  const full = (body: number): boolean => welds.degree[body]! >= (bodies[body]!.capacity ?? Number.POSITIVE_INFINITY);
  const askers = bodies.flatMap(({ part, box }, body) =>
    box !== null && takesEnds(part) && lacks(body) ? [body] : [],
  );
  if (askers.length === 0) return;
  const grid = boxGrid(bodies.map(({ part, box }) => (takesEnds(part) ? box : null)));
  const name = (body: number): string => model.elements[bodies[body]!.element]!.globalId;
  const pairs: Pair[] = [];
  for (const a of askers) {
    const box = bodies[a]!.box!;
    grid.touching(grown(box, reach.ofBodies), (b) => {
      if (b === a || (lacks(b) && b < a)) return;
      const other = bodies[b]!.box!;
      const spots = nearestSpots(bodies[a]!, bodies[b]!);
      const gap = spots ?? distanceOfBoxes(box, other);
      if (gap > (spots === null ? reach.ofBodies : reach.ofEnd(0))) return;
      pairs.push({
        cost: gap + (spots === null ? 0.1 * distance(boxCentre(box), boxCentre(other)) : 0),
        names: name(a) < name(b) ? [name(a), name(b)] : [name(b), name(a)],
        settle: () => {
          if ((lacks(a) || lacks(b)) && !full(a) && !full(b))
            welds.join(bodyNode(piping, a), bodyNode(piping, b), 'box-contact', gap);
        },
      });
    });
  }
  settlePairs(pairs);
}

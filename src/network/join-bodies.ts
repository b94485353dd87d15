import { boxCentre, boxSize, distanceOfBoxes, distanceToBox, grown } from '../geometry/box.ts';
import { boxGrid } from '../geometry/box-grid.ts';
import { footOn } from '../geometry/polyline.ts';
import { type Box, distance, planDistance } from '../geometry/vector.ts';
import type { Identity } from '../model/identity.ts';
import type { Model } from '../model/model.ts';
import { type BodyPart, bodyNode, endPoint, type Piping } from './piping.ts';
import { takesEnds } from './propose-joins.ts';
import { freeEnds } from './settle-joins.ts';
import type { Reach } from './tolerance.ts';
import type { Welds } from './welds.ts';

/** Connections without which a body makes no sense; one that has fewer looks for what it touches. */
function wanted({ part }: BodyPart, predefinedType: string | null): number {
  if (part === 'fitting') return predefinedType === 'JUNCTION' ? 3 : predefinedType === 'OBSTRUCTION' ? 1 : 2;
  return part === 'trap' || part === 'valve' ? 2 : 1;
}

interface Pair {
  readonly gap: number;
  readonly cost: number;
  readonly names: readonly [string, string];
  readonly settle: () => void;
}

function settle(pairs: Pair[]): void {
  const text = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0);
  pairs.sort(
    (a, b) =>
      Math.round(a.cost * 1e6) - Math.round(b.cost * 1e6) ||
      text(a.names[0], b.names[0]) ||
      text(a.names[1], b.names[1]),
  );
  for (const pair of pairs) pair.settle();
}

/** Fittings, valves and terminals that touch each other with no pipe between. */
export function joinTouching(model: Model, piping: Piping, welds: Welds, reach: Reach): void {
  const { bodies } = piping;
  const need = bodies.map((body) => wanted(body, model.elements[body.element]!.predefinedType));
  const lacks = (body: number): boolean => welds.degree[body]! < need[body]!;
  const grid = boxGrid(bodies.map(({ part, box }) => (takesEnds(part) ? box : null)));
  const name = (body: number): string => model.elements[bodies[body]!.element]!.globalId;
  const pairs: Pair[] = [];
  bodies.forEach(({ part, box }, a) => {
    if (box === null || !takesEnds(part) || !lacks(a)) return;
    grid.touching(grown(box, reach.ofBodies), (b) => {
      if (b === a || (lacks(b) && b < a)) return;
      const other = bodies[b]!.box!;
      const gap = distanceOfBoxes(box, other);
      if (gap > reach.ofBodies) return;
      pairs.push({
        gap,
        cost: gap + 0.1 * distance(boxCentre(box), boxCentre(other)),
        names: name(a) < name(b) ? [name(a), name(b)] : [name(b), name(a)],
        settle: () => {
          const full = (body: number): boolean => welds.degree[body]! >= (bodies[body]!.capacity ?? Infinity);
          if ((lacks(a) || lacks(b)) && !full(a) && !full(b))
            welds.join(bodyNode(piping, a), bodyNode(piping, b), 'box-contact', gap);
        },
      });
    });
  });
  settle(pairs);
}

/**
 * Outlets of fixtures: the free end in, at or just under the body; the lowest, and the one whose system says drainage,
 * where several offer. A trap or fitting that touches the fixture serves as well as an end.
 */
export function joinFixtures(
  model: Model,
  identities: readonly Identity[],
  piping: Piping,
  welds: Welds,
  reach: Reach,
): void {
  const { bodies, pipes } = piping;
  const ends = freeEnds(piping, welds);
  const points = ends.map((node) => endPoint(pipes[node >> 1]!.axis!, (node & 1) as 0 | 1));
  const endGrid = boxGrid(points.map((at) => ({ min: at, max: at })));
  const bodyGrid = boxGrid(bodies.map(({ part, box }) => (part === 'trap' || part === 'fitting' ? box : null)));
  const name = (node: number): string => model.elements[welds.elementOf(node)]!.globalId;
  const pairs: Pair[] = [];
  const seconds: Pair[] = [];
  bodies.forEach((fixture, index) => {
    const self = bodyNode(piping, index);
    if (takesEnds(fixture.part) || welds.isHeld(self)) return;
    const box = outletBox(fixture, model);
    if (box === null) return;
    const around = grown(box, reach.ofFixture);
    const centre = boxCentre(box);
    endGrid.touching(around, (i) => {
      const at = points[i]!;
      const gap = distanceToBox(at, box);
      if (gap > reach.ofFixture) return;
      const medium = identities[pipes[ends[i]! >> 1]!.element]!.medium;
      const cost =
        gap +
        0.05 * Math.max(0, at[2] - box.min[2]) +
        0.02 * planDistance(at, centre) +
        (medium === 'sanitary' ? 0 : medium === null ? 0.02 : 0.05);
      const names: [string, string] = [name(self), name(ends[i]!)];
      const join = (free: () => boolean) => () => {
        if (!welds.isHeld(ends[i]!) && free()) welds.join(ends[i]!, self, 'outlet', gap);
      };
      pairs.push({ gap, cost, names, settle: join(() => !welds.isHeld(self)) });
      if (gap === 0 && medium === 'sanitary') seconds.push({ gap, cost, names, settle: join(() => true) });
    });
    bodyGrid.touching(around, (b) => {
      const other = bodies[b]!;
      const gap = distanceOfBoxes(box, other.box!);
      const need = wanted(other, model.elements[other.element]!.predefinedType);
      const limit = welds.degree[b]! <= 1 ? reach.ofFixture : reach.ofBodies;
      if (gap > limit || welds.degree[b]! >= need) return;
      const cost = gap + 0.02 * planDistance(boxCentre(other.box!), centre) + (other.part === 'trap' ? 0 : 0.01);
      pairs.push({
        gap,
        cost,
        names: [name(self), name(bodyNode(piping, b))],
        settle: () => {
          if (!welds.isHeld(self) && welds.degree[b]! < need) welds.join(self, bodyNode(piping, b), 'outlet', gap);
        },
      });
    });
  });
  settle(pairs);
  settle(seconds);
}

function outletBox(fixture: BodyPart, model: Model): Box | null {
  if (fixture.box !== null) return fixture.box;
  const origin = model.elements[fixture.element]!.origin;
  return origin === null ? null : { min: origin, max: origin };
}

/** A fitting that sits on a pipe running through it (a saddle, a cleanout tee) when nothing else makes it whole. */
export function joinRunsThrough(model: Model, piping: Piping, welds: Welds): void {
  const { bodies, pipes } = piping;
  const legs: { pipe: number; box: Box }[] = [];
  pipes.forEach(({ axis }, pipe) => {
    for (let leg = 0; axis !== null && leg + 1 < axis.points.length; leg++)
      legs.push({ pipe, box: spanned(axis.points[leg]!, axis.points[leg + 1]!) });
  });
  const grid = boxGrid(legs.map(({ box }) => box));
  const pairs: Pair[] = [];
  bodies.forEach((body, index) => {
    const { part, box } = body;
    if (box === null || !(part === 'fitting' || part === 'cleanout' || part === 'trap')) return;
    const need = wanted(body, model.elements[body.element]!.predefinedType);
    if (welds.degree[index]! >= Math.max(need, part === 'fitting' ? 2 : 1)) return;
    const centre = boxCentre(box);
    const half = Math.min(...boxSize(box)) / 2;
    const looked = new Set<number>();
    grid.touching(box, (i) => {
      const { pipe } = legs[i]!;
      if (looked.has(pipe)) return;
      looked.add(pipe);
      const { axis, diameter } = pipes[pipe]!;
      const foot = footOn(axis!, centre);
      const inside = foot.at > half && foot.at < axis!.length - half;
      if (!inside || foot.off > Math.max(diameter / 2, half / 2)) return;
      pairs.push({
        gap: 0,
        cost: foot.off,
        names: [model.elements[body.element]!.globalId, model.elements[pipes[pipe]!.element]!.globalId],
        settle: () => {
          if (welds.degree[index]! < need)
            welds.join(bodyNode(piping, index), welds.wall(pipe, foot.at), 'end-in-fitting', 0);
        },
      });
    });
  });
  settle(pairs);
}

const spanned = (a: readonly number[], b: readonly number[]): Box => ({
  min: [Math.min(a[0]!, b[0]!), Math.min(a[1]!, b[1]!), Math.min(a[2]!, b[2]!)],
  max: [Math.max(a[0]!, b[0]!), Math.max(a[1]!, b[1]!), Math.max(a[2]!, b[2]!)],
});

import { boxCentre, distanceOfBoxes, distanceToBox, grown } from '../geometry/box.ts';
import { boxGrid } from '../geometry/box-grid.ts';
import { type Box, distance, planDistance, type Vec3 } from '../geometry/vector.ts';
import type { Identity, Medium } from '../model/identity.ts';
import type { Model } from '../model/model.ts';
import { wanted } from './join-touching.ts';
import { type BodyPart, bodyNode, endNode, endPoint, type Piping } from './piping.ts';
import { takesEnds } from './propose-joins.ts';
import { freeEnds } from './settle-joins.ts';
import { type Pair, settlePairs } from './settle-pairs.ts';
import type { Reach } from './tolerance.ts';
import type { Welds } from './welds.ts';

/** What tells two offers apart, metres of gap for each metre of height over the lowest, and beside the middle in plan. */
const perMetreUp = 0.05;
const perMetreAside = 0.02;
/** What an offer loses whose system does not say that it drains. */
const unsaid: Readonly<Record<NonNullable<Medium> | 'null', number>> = {
  sanitary: 0,
  null: 0.02,
  vent: 0.05,
  storm: 0.05,
  supply: 0.05,
  other: 0.05,
};

/** Two fixtures share an outlet that lies in or at the bodies of both, metres. */
const sharedReach = 0.01;

/**
 * Outlets of fixtures: the free end in, at or just under the body; the lowest, and the one whose system says drainage,
 * where several offer. A trap or fitting that touches the fixture serves as well as an end. What is left of sanitary ends
 * inside a fixture are its further outlets; a fixture that found none shares the end in its body with the one that did,
 * or drains where two pipes meet in it without a fitting.
 */
export function joinFixtures(
  model: Model,
  identities: readonly Identity[],
  piping: Piping,
  welds: Welds,
  reach: Reach,
): void {
  const { bodies, pipes } = piping;
  const askers = bodies.flatMap(({ part }, body) =>
    takesEnds(part) || welds.isHeld(bodyNode(piping, body)) ? [] : [body],
  );
  if (askers.length === 0) return;
  const ends = freeEnds(piping, welds);
  const points = ends.map((node) => endPoint(pipes[node >> 1]!.axis!, (node & 1) as 0 | 1));
  const endGrid = boxGrid(points.map((at) => ({ min: at, max: at })));
  const bodyGrid = boxGrid(bodies.map(({ part, box }) => (part === 'trap' || part === 'fitting' ? box : null)));
  const name = (node: number): string => model.elements[welds.elementOf(node)]!.globalId;
  const first: Pair[] = [];
  const further: Pair[] = [];
  const shared: Pair[] = [];
  for (const index of askers) {
    const box = outletBox(bodies[index]!, model);
    if (box === null) continue;
    const self = bodyNode(piping, index);
    const around = grown(box, reach.ofFixture);
    const centre = boxCentre(box);
    const { spots } = bodies[index]!;
    /** From where it is known to connect, else from the middle. */
    const aside = (at: Vec3): number =>
      spots.length > 0 ? Math.min(...spots.map((spot) => distance(spot, at))) : planDistance(at, centre);
    endGrid.touching(around, (i) => {
      const [at, end] = [points[i]!, ends[i]!];
      const gap = distanceToBox(at, box);
      if (gap > reach.ofFixture) return;
      const { medium } = identities[pipes[end >> 1]!.element]!;
      const up = Math.max(0, at[2] - box.min[2]);
      const cost = gap + perMetreUp * up + perMetreAside * aside(at) + unsaid[medium ?? 'null'];
      const names: [string, string] = [name(self), name(end)];
      const join = (): void => {
        if (!welds.isHeld(end)) welds.join(end, self, 'outlet', gap);
      };
      first.push({ cost, names, settle: () => (welds.isHeld(self) ? undefined : join()) });
      if (gap === 0 && medium === 'sanitary') further.push({ cost, names, settle: join });
      if (gap <= sharedReach)
        shared.push({
          cost,
          names,
          settle: () => (welds.isHeld(self) ? undefined : welds.join(end, self, 'outlet', gap)),
        });
    });
    bodyGrid.touching(around, (b) => {
      const other = bodies[b]!;
      const gap = distanceOfBoxes(box, other.box!);
      const need = wanted(other, model.elements[other.element]!.predefinedType);
      const limit = welds.degree[b]! <= 1 ? reach.ofFixture : reach.ofBodies;
      if (gap > limit || welds.degree[b]! >= need) return;
      first.push({
        cost: gap + perMetreAside * planDistance(boxCentre(other.box!), centre) + (other.part === 'trap' ? 0 : 0.01),
        names: [name(self), name(bodyNode(piping, b))],
        settle: () => {
          if (!welds.isHeld(self) && welds.degree[b]! < need) welds.join(self, bodyNode(piping, b), 'outlet', gap);
        },
      });
    });
  }
  settlePairs(first);
  settlePairs(further);
  settlePairs(shared);
  const left = askers.filter((body) => !welds.isHeld(bodyNode(piping, body)));
  if (left.length > 0) joinToCorners(left, model, identities, piping, welds);
}

/** A fixture that found no end of its own stands on one where pipes meet without a fitting: both drain it. */
function joinToCorners(
  fixtures: readonly number[],
  model: Model,
  identities: readonly Identity[],
  piping: Piping,
  welds: Welds,
): void {
  const { bodies, pipes } = piping;
  const ends = pipes.flatMap(({ element, axis }, pipe) =>
    axis === null || identities[element]!.medium !== 'sanitary'
      ? []
      : ([0, 1] as const).map((side) => ({ node: endNode(pipe, side), at: endPoint(axis, side) })),
  );
  const grid = boxGrid(ends.map(({ at }) => ({ min: at, max: at })));
  const name = (node: number): string => model.elements[welds.elementOf(node)]!.globalId;
  const pairs: Pair[] = [];
  for (const index of fixtures) {
    const box = outletBox(bodies[index]!, model);
    if (box === null) continue;
    const self = bodyNode(piping, index);
    grid.touching(grown(box, sharedReach), (i) => {
      const { node, at } = ends[i]!;
      const gap = distanceToBox(at, box);
      if (gap > sharedReach || welds.bodyOf(node) >= 0) return;
      pairs.push({
        cost: gap + perMetreUp * Math.max(0, at[2] - box.min[2]),
        names: [name(self), name(node)],
        settle: () => {
          if (!welds.isHeld(self) && welds.bodyOf(node) < 0) welds.join(node, self, 'outlet', gap);
        },
      });
    });
  }
  settlePairs(pairs);
}

function outletBox(fixture: BodyPart, model: Model): Box | null {
  if (fixture.box !== null) return fixture.box;
  const { origin } = model.elements[fixture.element]!;
  return origin === null ? null : { min: origin, max: origin };
}

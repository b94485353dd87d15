import type { ElementId } from '../model/model.ts';
import type { PipeId } from '../network/network.ts';
import type { FixtureId } from '../paths/paths.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import { pairedFixtures, pairedPipes } from './twin-pairs.ts';
import type { TwinPlaces } from './twin-places.ts';
import type { Unit } from './twin-units.ts';

export type Difference =
  /** A pipe that the others have: the one of their model, and where it would stand here, in decimetres. */
  | { readonly lacks: ElementId; readonly role: string; readonly at: string }
  | { readonly has: ElementId; readonly role: string }
  | { readonly fixture: 'lacks' | 'has'; readonly element: ElementId }
  | { readonly size: ElementId; readonly here: NominalSize; readonly there: NominalSize }
  | { readonly fall: ElementId; readonly here: number; readonly there: number }
  | { readonly reading: string; readonly there: string; readonly fixtures: readonly ElementId[] };

/** Falls that differ by less are one. */
const sameFall = 0.1;

/** How the second differs from the first. */
export function differencesOf(places: TwinPlaces, model: Unit, unit: Unit): Difference[] {
  if (model === unit) return [];
  const { network, paths, shown } = places.outcome;
  const fixtures = pairedFixtures(places, model, unit);
  const paired = new Set(fixtures.flatMap(([, other]) => other ?? []));
  const elementOf = (fixture: FixtureId): ElementId => paths.fixtures[fixture]!.element;
  const differences: Difference[] = [
    ...fixtures.flatMap(([fixture, other]): Difference[] =>
      other === null ? [{ fixture: 'lacks', element: elementOf(fixture) }] : [],
    ),
    ...unit.fixtures
      .filter((fixture) => !paired.has(fixture))
      .map((fixture): Difference => ({ fixture: 'has', element: elementOf(fixture) })),
  ];
  const role = (pipe: PipeId): string => shown.roles.uses[pipe]!.role;
  const lone = {
    here: onlyFor(
      places,
      unit.fixtures.filter((fixture) => !paired.has(fixture)),
    ),
    there: onlyFor(
      places,
      fixtures.flatMap(([fixture, other]) => (other === null ? [fixture] : [])),
    ),
  };
  const told = new Set<ElementId>();
  const once = (pipe: PipeId, made: (element: ElementId) => Difference[]): Difference[] => {
    const { element } = network.pipes[pipe]!;
    if (element === null || told.has(element)) return [];
    const own = made(element);
    if (own.length > 0) told.add(element);
    return own;
  };
  for (const { here, there } of pairedPipes(places, model, unit)) {
    if (here === null && there !== null && !lone.there(there) && !stands(places, model, unit, there))
      differences.push(
        ...once(there, (element) => [{ lacks: element, role: role(there), at: spotIn(places, model, unit, there) }]),
      );
    if (there === null && here !== null && !lone.here(here) && !stands(places, unit, model, here))
      differences.push(...once(here, (element) => [{ has: element, role: role(here) }]));
    if (here !== null && there !== null)
      differences.push(...once(here, (element) => pipeDifference(places.outcome, element, here, there)));
  }
  return [...differences, ...readingDifferences(places.outcome, fixtures)];
}

/** Pipes that only these fixtures use, by water or by air: what is told of the fixture tells them too. */
function onlyFor({ outcome, ventedThrough }: TwinPlaces, fixtures: readonly FixtureId[]): (pipe: PipeId) => boolean {
  const { loads, roles } = outcome.shown;
  const own = new Set(fixtures);
  const vented = new Map<PipeId, number>();
  for (const fixture of fixtures)
    for (const pipe of new Set(roles.venting[fixture]!.vents)) vented.set(pipe, (vented.get(pipe) ?? 0) + 1);
  return (pipe) => {
    const { from, to } = loads.pipes[pipe]!;
    if (to === from) return vented.get(pipe) === ventedThrough[pipe];
    for (let at = from; at < to; at++) if (!own.has(loads.order[at]!)) return false;
    return true;
  };
}

/** Some pipe stands at the same place in the other part, though it may serve more than that part. */
function stands(places: TwinPlaces, unit: Unit, other: Unit, pipe: PipeId): boolean {
  const at = places.pipeAt(unit, pipe);
  return at === null || places.hasPipeAt(other, at, places.outcome.paths.wet[pipe]!);
}

function pipeDifference({ shown, paths }: Outcome, element: ElementId, here: PipeId, there: PipeId): Difference[] {
  const [size, other] = [shown.loads.modelled[here]!.size, shown.loads.modelled[there]!.size];
  const [fall, otherFall] = [paths.slopes[here]!.slope, paths.slopes[there]!.slope];
  return [
    ...(size !== null && other !== null && size !== other ? [{ size: element, here: size, there: other }] : []),
    ...(fall !== null && otherFall !== null && Math.abs(fall - otherFall) > sameFall * Math.max(fall, otherFall)
      ? [{ fall: element, here: fall, there: otherFall }]
      : []),
  ];
}

/** How the traps are vented here and there, each way once. */
function readingDifferences(
  { shown, paths }: Outcome,
  fixtures: readonly (readonly [FixtureId, FixtureId | null])[],
): Difference[] {
  const found = new Map<string, { reading: string; there: string; fixtures: ElementId[] }>();
  for (const [model, other] of fixtures) {
    if (other === null) continue;
    const [there, reading] = [shown.roles.venting[model]!.how, shown.roles.venting[other]!.how];
    if (there === reading) continue;
    const key = `${reading} ${there}`;
    const known = found.get(key) ?? { reading, there, fixtures: [] };
    known.fixtures.push(paths.fixtures[other]!.element);
    found.set(key, known);
  }
  // The most of one row are vented alike; the one at its head may have a name of its own.
  return [...found.values()].sort((a, b) => b.fixtures.length - a.fixtures.length).slice(0, 1);
}

/** Where a pipe of one part would stand in the other, world decimetres. */
function spotIn(places: TwinPlaces, model: Unit, unit: Unit, pipe: PipeId): string {
  const at = places.pipeAt(model, pipe);
  return at === null ? '' : at.map((metres, axis) => Math.round((metres + unit.origin[axis]!) * 10)).join(' ');
}

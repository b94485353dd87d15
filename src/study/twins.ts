import { distance, subtract, type Vec3 } from '../geometry/vector.ts';
import type { ElementId } from '../model/model.ts';
import type { PipeId } from '../network/network.ts';
import type { FixtureId } from '../paths/paths.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import { type Unit, unitsOf } from './twin-units.ts';

/** Parts of a building that should be alike: most of them are, some differ. */
export interface Twins {
  readonly what: Unit['what'];
  /** Those that are alike, in the order of the building; the first stands for all. */
  readonly alike: readonly Unit[];
  /** The others, each with how it differs from them. */
  readonly odd: readonly { readonly unit: Unit; readonly differences: readonly Difference[] }[];
}

export type Difference =
  /** A pipe that the others have: the one of their model, and where it would stand here, in decimetres. */
  | { readonly lacks: ElementId; readonly role: string; readonly at: string }
  | { readonly has: ElementId; readonly role: string }
  | { readonly fixture: 'lacks' | 'has'; readonly element: ElementId }
  | { readonly size: ElementId; readonly here: NominalSize; readonly there: NominalSize }
  | { readonly fall: ElementId; readonly here: number; readonly there: number }
  | { readonly reading: string; readonly there: string; readonly fixtures: readonly ElementId[] };

/** Things at one place in two parts lie within this of each other, metres. */
const same = 0.15;
/** Parts are taken for twins when this share of their fixtures stands at the same places. */
const likeness = 0.75;
/** Fewer fixtures are alike by chance. */
const leastFixtures = 2;
/** Falls that differ by less are one. */
const sameFall = 0.1;

/** Storeys, rooms and batteries that should be alike and are not. Families without a difference are not told. */
export function twins(outcome: Outcome): Twins[] {
  const found = (['storey', 'room', 'battery'] as const).flatMap((what) =>
    families(outcome, unitsOf(outcome, what)).map((family) => compared(outcome, what, family)),
  );
  return withoutRepeats(found.filter(({ odd }) => odd.length > 0));
}

/** Each unit joins the first family whose first member it resembles. */
function families(outcome: Outcome, units: readonly Unit[]): Unit[][] {
  const all: Unit[][] = [];
  for (const unit of units) {
    if (unit.fixtures.length < leastFixtures) continue;
    const family = all.find(([first]) => likenessOf(outcome, first!, unit) >= likeness);
    if (family === undefined) all.push([unit]);
    else family.push(unit);
  }
  // Of two that differ nobody can say which is odd, unless one of them is wrong; three or more have a majority.
  return all.filter((family) => family.length >= 3 || (family.length === 2 && anyWrong(outcome, family)));
}

function anyWrong({ findings, network, paths }: Outcome, family: readonly Unit[]): boolean {
  const wrong = family.map(({ fixtures, pipes }) => {
    const own = new Set<number>([
      ...fixtures.map((fixture) => paths.fixtures[fixture]!.element),
      ...pipes.flatMap((pipe) => network.pipes[pipe]!.element ?? []),
    ]);
    return findings.some(({ severity, about }) => severity === 'error' && about.some((element) => own.has(element)));
  });
  return wrong[0] !== wrong[1];
}

function likenessOf(outcome: Outcome, a: Unit, b: Unit): number {
  const pairs = pairedFixtures(outcome, a, b).filter(([, other]) => other !== null).length;
  return pairs / Math.max(a.fixtures.length, b.fixtures.length);
}

/** Fixtures of the first with those of the second at the same place and of the same row of the code; null: none. */
function pairedFixtures(outcome: Outcome, a: Unit, b: Unit): [FixtureId, FixtureId | null][] {
  const free = new Set(b.fixtures);
  return a.fixtures.map((fixture): [FixtureId, FixtureId | null] => {
    const at = placeOf(outcome, a, fixture);
    for (const other of free) {
      if (!alikeFixtures(outcome, fixture, other)) continue;
      if (at !== null && !near(at, placeOf(outcome, b, other))) continue;
      free.delete(other);
      return [fixture, other];
    }
    return [fixture, null];
  });
}

function alikeFixtures({ shown }: Outcome, a: FixtureId, b: FixtureId): boolean {
  const [one, two] = [shown.loads.fixtures[a]!, shown.loads.fixtures[b]!];
  return one.row.id === two.row.id && one.trap === two.trap;
}

const placeOf = ({ network, paths }: Outcome, unit: Unit, fixture: FixtureId): Vec3 | null => {
  const { at } = network.joints[paths.fixtures[fixture]!.outlet]!;
  return at === null ? null : subtract(at, unit.origin);
};

const near = (a: Vec3, b: Vec3 | null): boolean => b !== null && distance(a, b) <= same;

/** The family against the member that most of the others are like. */
function compared(outcome: Outcome, what: Unit['what'], family: readonly Unit[]): Twins {
  const differences = family.map((one) => family.map((other) => differencesOf(outcome, one, other)));
  const alikeCount = differences.map((row) => row.filter(({ length }) => length === 0).length);
  const most = alikeCount.indexOf(Math.max(...alikeCount));
  // Of two, the one with no error stands for what both should be.
  const model = family.length === 2 && !isSound(outcome, family[0]!) ? 1 : most;
  const alike = family.filter((_, at) => differences[model]![at]!.length === 0);
  const odd = family.flatMap((unit, at) => {
    const own = differences[model]![at]!;
    return own.length === 0 ? [] : [{ unit, differences: own }];
  });
  return { what, alike, odd };
}

const isSound = (outcome: Outcome, unit: Unit): boolean =>
  !anyWrong(outcome, [unit, { ...unit, fixtures: [], pipes: [] }]);

/** How the second differs from the first. */
function differencesOf(outcome: Outcome, model: Unit, unit: Unit): Difference[] {
  if (model === unit) return [];
  const { network, paths, shown } = outcome;
  const fixtures = pairedFixtures(outcome, model, unit);
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
  const pipes = pairedPipes(outcome, model, unit);
  const role = (pipe: PipeId): string => shown.roles.uses[pipe]!.role;
  const lone = {
    here: onlyFor(
      outcome,
      unit.fixtures.filter((fixture) => !paired.has(fixture)),
    ),
    there: onlyFor(
      outcome,
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
  for (const { here, there } of pipes) {
    if (here === null && there !== null && !lone.there(there) && !stands(outcome, model, unit, there))
      differences.push(
        ...once(there, (element) => [{ lacks: element, role: role(there), at: spotIn(outcome, model, unit, there) }]),
      );
    if (there === null && here !== null && !lone.here(here) && !stands(outcome, unit, model, here))
      differences.push(...once(here, (element) => [{ has: element, role: role(here) }]));
    if (here !== null && there !== null)
      differences.push(...once(here, (element) => pipeDifference(outcome, element, here, there)));
  }
  return [...differences, ...readingDifferences(outcome, fixtures)];
}

/** Pipes that only these fixtures use, by water or by air: what is told of the fixture tells them too. */
function onlyFor({ shown }: Outcome, fixtures: readonly FixtureId[]): (pipe: PipeId) => boolean {
  const own = new Set(fixtures);
  const vents = new Set(fixtures.flatMap((fixture) => shown.roles.venting[fixture]!.vents));
  const others = new Set(
    shown.roles.venting.flatMap((one, fixture) => (own.has(fixture as FixtureId) ? [] : one.vents)),
  );
  return (pipe) => {
    const { from, to } = shown.loads.pipes[pipe]!;
    if (to === from) return vents.has(pipe) && !others.has(pipe);
    return shown.loads.order.slice(from, to).every((fixture) => own.has(fixture));
  };
}

/** Some pipe stands at the same place in the other part, though it may serve more than that part. */
function stands(outcome: Outcome, unit: Unit, other: Unit, pipe: PipeId): boolean {
  const at = middleOf(outcome, unit, pipe);
  if (at === null) return true;
  return outcome.network.pipes.some(({ id }) => {
    const middle = outcome.paths.wet[id] === outcome.paths.wet[pipe] ? middleOf(outcome, other, id) : null;
    return middle !== null && distance(at, middle) <= same;
  });
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

/** Pipes of both at the same place, by their middles and directions; those of one alone with null beside them. */
function pairedPipes(outcome: Outcome, model: Unit, unit: Unit): { here: PipeId | null; there: PipeId | null }[] {
  const free = new Map(unit.pipes.map((pipe) => [pipe, middleOf(outcome, unit, pipe)]));
  const pairs: { here: PipeId | null; there: PipeId | null }[] = model.pipes.map((there) => {
    const at = middleOf(outcome, model, there);
    let best: { pipe: PipeId; away: number } | null = null;
    for (const [pipe, middle] of free) {
      if (at === null || middle === null || outcome.paths.wet[pipe] !== outcome.paths.wet[there]) continue;
      const away = distance(at, middle);
      const ends = Math.abs(outcome.network.pipes[pipe]!.length - outcome.network.pipes[there]!.length);
      if (away <= same && ends <= 2 * same && (best === null || away < best.away)) best = { pipe, away };
    }
    if (best !== null) free.delete(best.pipe);
    return { here: best?.pipe ?? null, there };
  });
  return [...pairs, ...[...free.keys()].map((here) => ({ here, there: null }))];
}

function middleOf({ network }: Outcome, unit: Unit, pipe: PipeId): Vec3 | null {
  const { points } = network.pipes[pipe]!;
  if (points === null) return null;
  const [a, b] = [points[0]!, points[points.length - 1]!];
  return subtract([(a[0] + b[0]) / 2, (a[1] + b[1]) / 2, (a[2] + b[2]) / 2], unit.origin);
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
function spotIn(outcome: Outcome, model: Unit, unit: Unit, pipe: PipeId): string {
  const at = middleOf(outcome, model, pipe);
  return at === null ? '' : at.map((metres, axis) => Math.round((metres + unit.origin[axis]!) * 10)).join(' ');
}

/** A room or battery whose difference its storey tells already is not told again. */
function withoutRepeats(all: readonly Twins[]): Twins[] {
  const told = new Set<string>();
  const keys = (difference: Difference): string[] => {
    if ('lacks' in difference) return [`lacks ${difference.at}`];
    if ('reading' in difference) return difference.fixtures.map((fixture) => `vented ${fixture}`);
    return [JSON.stringify(difference)];
  };
  return all.flatMap((family): Twins[] => {
    const odd = family.odd.flatMap(({ unit, differences }) => {
      const own = differences.filter((one) => !keys(one).some((key) => told.has(key)));
      return own.length === 0 ? [] : [{ unit, differences: own }];
    });
    for (const { differences } of odd) for (const one of differences) for (const key of keys(one)) told.add(key);
    return odd.length === 0 ? [] : [{ ...family, odd }];
  });
}

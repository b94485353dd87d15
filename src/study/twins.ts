import type { Outcome } from '../verdicts/outcome.ts';
import { type Difference, differencesOf } from './twin-differences.ts';
import { twinForms } from './twin-forms.ts';
import { pairedFixtures } from './twin-pairs.ts';
import { type TwinPlaces, twinPlaces } from './twin-places.ts';
import { type Unit, unitsOf } from './twin-units.ts';

/** Parts of a building that should be alike: most of them are, some differ. */
export interface Twins {
  readonly what: Unit['what'];
  /** Those that are alike, in the order of the building; the first stands for all. */
  readonly alike: readonly Unit[];
  /** The others, each with how it differs from them. */
  readonly odd: readonly { readonly unit: Unit; readonly differences: readonly Difference[] }[];
}

/** Parts are taken for twins when this share of their fixtures stands at the same places. */
const likeness = 0.75;
/** Fewer fixtures are alike by chance. */
const leastFixtures = 2;
/** The commonest forms of a family of which one is taken for what all should be. */
const mostForms = 16;

/** Storeys, rooms and batteries that should be alike and are not. Families without a difference are not told. */
export function twins(outcome: Outcome): Twins[] {
  const places = twinPlaces(outcome);
  const found = (['storey', 'room', 'battery'] as const).flatMap((what) =>
    families(places, unitsOf(outcome, what)).map((family) => compared(places, what, family)),
  );
  return withoutRepeats(found.filter(({ odd }) => odd.length > 0));
}

/** Each unit joins the first family whose first member it resembles. */
function families(places: TwinPlaces, units: readonly Unit[]): Unit[][] {
  const all: Unit[][] = [];
  for (const unit of units) {
    if (unit.fixtures.length < leastFixtures) continue;
    const family = all.find(([first]) => isLike(places, first!, unit));
    if (family === undefined) all.push([unit]);
    else family.push(unit);
  }
  // Of two that differ nobody can say which is odd, unless one of them is wrong; three or more have a majority.
  return all.filter(
    ([first, second, third]) =>
      third !== undefined || (second !== undefined && isSound(places, first!) !== isSound(places, second)),
  );
}

function isLike(places: TwinPlaces, a: Unit, b: Unit): boolean {
  const [fewer, more] = [a.fixtures.length, b.fixtures.length].sort((m, n) => m - n) as [number, number];
  if (fewer / more < likeness) return false;
  return pairedFixtures(places, a, b).filter(([, other]) => other !== null).length / more >= likeness;
}

/** No error is about any of it. */
const isSound = ({ outcome, wrong }: TwinPlaces, { fixtures, pipes }: Unit): boolean =>
  !fixtures.some((fixture) => wrong.has(outcome.paths.fixtures[fixture]!.element)) &&
  !pipes.some((pipe) => {
    const { element } = outcome.network.pipes[pipe]!;
    return element !== null && wrong.has(element);
  });

/** The family against the member that most of the others are like. */
function compared(places: TwinPlaces, what: Unit['what'], family: readonly Unit[]): Twins {
  const model = modelOf(places, family);
  const alike: Unit[] = [];
  const odd: { unit: Unit; differences: Difference[] }[] = [];
  for (const unit of family) {
    const differences = differencesOf(places, model, unit);
    if (differences.length === 0) alike.push(unit);
    else odd.push({ unit, differences });
  }
  return { what, alike, odd };
}

function modelOf(places: TwinPlaces, family: readonly Unit[]): Unit {
  const [first, second, third] = family as [Unit, Unit, Unit?];
  // Of two, the one with no error stands for what both should be.
  if (third === undefined) return isSound(places, first) ? first : second;
  const forms = twinForms(places, family);
  const candidates = [...forms].sort((a, b) => b.length - a.length).slice(0, mostForms);
  const alikeCounts = candidates.map(([model]) =>
    forms.reduce((sum, form) => (differencesOf(places, model!, form[0]!).length === 0 ? sum + form.length : sum), 0),
  );
  return candidates[alikeCounts.indexOf(Math.max(...alikeCounts))]![0]!;
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

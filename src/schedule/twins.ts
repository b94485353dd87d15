import type { ElementId } from '../model/model.ts';
import type { Difference } from '../study/twin-differences.ts';
import { type Twins, twins } from '../study/twins.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import { slopeText } from './number-text.ts';
import { elementName } from './result-findings.ts';
import { resultIndex } from './result-index.ts';
import { shownText } from './shown-text.ts';
import { paragraph, type TextLine } from './text-line.ts';
import { counted, countedKinds, listed, plainWords } from './trade-words.ts';
import { row } from './understood-text.ts';

/** Storeys, rooms or batteries that should be alike and are not. */
export interface TwinsResult {
  readonly what: 'storey' | 'room' | 'battery';
  /** Names of those that are alike. */
  readonly alike: readonly string[];
  readonly odd: readonly {
    readonly name: string;
    /** GlobalIds of what differs; of a pipe or fixture that it lacks, the one of its twin. */
    readonly about: readonly string[];
    readonly sentence: string;
  }[];
}

export function twinsResult(outcome: Outcome): TwinsResult[] {
  const index = resultIndex(outcome);
  return twins(outcome).map(({ what, alike, odd }) => ({
    what,
    alike: alike.map(({ name }) => name),
    odd: odd.map(({ unit, differences }) => ({
      name: unit.name,
      about: [...new Set(differences.flatMap(elementsOf))].map(index.idOf),
      sentence: `${shownText(unit.name)} is not like ${listed(some(alike))}: ${listed(inWords(outcome, differences))}.`,
    })),
  }));
}

const mostNamed = 4;

function some(units: Twins['alike']): string[] {
  const names = units.slice(0, mostNamed).map(({ name }) => shownText(name));
  return units.length > mostNamed ? [...names, `${units.length - mostNamed} more`] : names;
}

function elementsOf(difference: Difference): ElementId[] {
  if ('lacks' in difference) return [difference.lacks];
  if ('has' in difference) return [difference.has];
  if ('element' in difference) return [difference.element];
  if ('size' in difference) return [difference.size];
  if ('fall' in difference) return [difference.fall];
  return [...difference.fixtures];
}

/** `a relief vent`, `an individual vent`. */
const article = (thing: string): string => `${/^[aeiou]/.test(thing) ? 'an' : 'a'} ${thing}`;

const mostTold = 3;

/** Fixtures first, then pipes that are missing or too many, then sizes, falls and readings; alike ones together. */
function inWords(outcome: Outcome, differences: readonly Difference[]): string[] {
  const name = (element: ElementId): string => elementName(outcome, element);
  const kind = (element: ElementId): string => plainWords(outcome.identities[element]!.kind ?? 'fixture');
  const fixtures = (which: 'has' | 'lacks'): ElementId[] =>
    differences.flatMap((one) => ('element' in one && one.fixture === which ? [one.element] : []));
  const more = fixtures('has').map(kind);
  const fewer = fixtures('lacks').map(kind);
  const missing = differences.flatMap((one) => ('lacks' in one ? [one] : []));
  const extra = differences.flatMap((one) => ('has' in one ? [one] : []));
  const told = (list: readonly { role: string; element: ElementId }[]): string =>
    list.length <= mostTold
      ? listed(
          list.map(
            ({ role, element }) => `${article(role === 'idle' ? 'idle pipe' : plainWords(role))} (${name(element)})`,
          ),
        )
      : countedKinds(list.map(({ role }) => plainWords(role)));
  return [
    ...(more.length === 0 ? [] : [`it has ${countedKinds(more)} more`]),
    ...(fewer.length === 0 ? [] : [`it lacks ${countedKinds(fewer)}`]),
    ...(missing.length === 0
      ? []
      : [`it lacks ${told(missing.map(({ role, lacks }) => ({ role, element: lacks })))} that they have`]),
    ...(extra.length === 0
      ? []
      : [`it has ${told(extra.map(({ role, has }) => ({ role, element: has })))} that they have not`]),
    ...folded(
      differences.flatMap((one) => ('size' in one ? [`${name(one.size)} is ${one.here}, there ${one.there}`] : [])),
      'other sizes',
    ),
    ...folded(
      differences.flatMap((one) =>
        'fall' in one ? [`${name(one.fall)} falls ${slopeText(one.here)}, there ${slopeText(one.there)}`] : [],
      ),
      'other falls',
    ),
    ...differences.flatMap((one) =>
      'reading' in one
        ? [
            `${counted(one.fixtures.length, 'trap')} ${one.fixtures.length === 1 ? 'is' : 'are'} ${ventedBy(one.reading)}, there ${ventedBy(one.there)}`,
          ]
        : [],
    ),
  ];
}

const ventedBy = (how: string): string =>
  how === 'unvented' || how === 'free' ? (how === 'free' ? 'free of a vent' : how) : `vented by a ${plainWords(how)}`;

const folded = (texts: readonly string[], rest: string): string[] =>
  texts.length <= mostTold ? [...texts] : [...texts.slice(0, mostTold), `${texts.length - mostTold} ${rest}`];

const mostFamilies = 6;

/** A line for each part that is not like its twins. */
export function twinsText(found: readonly TwinsResult[]): TextLine[] {
  const lines = found.flatMap(({ odd }) => odd.map(({ sentence }) => sentence));
  return [
    ...lines.slice(0, mostFamilies).flatMap((text, at) => paragraph(text, row(at === 0 ? 'Twins' : ''))),
    ...(lines.length > mostFamilies ? paragraph(`and ${lines.length - mostFamilies} more`, row(''), 'quiet') : []),
  ];
}

import type { Facts } from '../../findings/finding.ts';
import { brokenText } from '../../findings/sentences.ts';
import type { ResultFinding } from '../../schedule/result.ts';
import { visible } from '../../schedule/shown-text.ts';
import { decimal, lengthText, placeIn, sizeLabel, slopeText } from '../format.ts';
import { frenchCondition } from '../words/french-conditions.ts';
import type { FrenchFacts } from '../words/french-facts.ts';
import { frenchSentence } from '../words/french-sentences.ts';
import { kindName, named } from '../words/words.ts';
import type { Desk } from './desk.ts';
import { factsLine } from './facts.ts';
import { nameOfId } from './names.ts';

/** The finding's own sentence; in French made anew from its code, its things and its facts. */
export function findingSentence(desk: Desk, finding: ResultFinding): string {
  const { building, words } = desk;
  if (words.language === 'en') return visible(finding.sentence);
  const about = finding.about.map((id) => nameOfId(building, words, id));
  const clause = finding.clause === null ? '' : ` (${building.result.code.id}, ${placeIn(words, finding.clause)})`;
  const sentence = frenchSentence(finding.code, { ...wordedFacts(desk, finding.facts), about, clause });
  if (sentence !== null) return visible(sentence);
  const facts = factsLine(building, words, finding.facts);
  return visible(
    `${about[0] ?? ''} : ${named(words.codes, finding.code)}${facts === '' ? '' : ` – ${facts}`}${clause}.`,
  );
}

/** What stands against a reading, as a clause without a name; null where the facts alone must speak. */
export function conditionText(desk: Desk, facts: Readonly<Record<string, unknown>>): string | null {
  const given = wordedFacts(desk, facts);
  const text = desk.words.language === 'fr' ? frenchCondition(given) : brokenText(given);
  return text === brokenText(emptyFacts) || text === frenchCondition(emptyFacts) ? null : visible(text);
}

function wordedFacts({ building, words }: Desk, facts: Readonly<Record<string, unknown>>): FrenchFacts {
  return {
    facts: facts as Facts,
    about: [],
    clause: '',
    unit: words.shortUnit(building.result.code.unit),
    length: (value) => lengthText(words, value),
    slope: (value) => slopeText(words, value),
    number: (value) => decimal(words, value, 2),
    size: (text) => (/ in$/.test(text) ? sizeLabel(words, text) : text),
    role: (id) => named(words.roles, String(id)),
    kind: (id) => kindName(words, String(id)),
  };
}

const emptyFacts: FrenchFacts = {
  facts: {},
  about: [],
  clause: '',
  unit: '',
  length: String,
  slope: String,
  number: String,
  size: String,
  role: String,
  kind: String,
};

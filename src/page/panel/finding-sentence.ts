import type { ResultFinding } from '../../schedule/result.ts';
import { visible } from '../../schedule/shown-text.ts';
import { named } from '../words/words.ts';
import type { Desk } from './desk.ts';
import { factsLine } from './facts.ts';
import { nameOfId } from './names.ts';

/** The finding's own sentence; in French made from its code, its thing and its facts. */
export function findingSentence(desk: Desk, finding: ResultFinding): string {
  const { building, words } = desk;
  if (words.language === 'en') return visible(finding.sentence);
  const about = finding.about[0] === undefined ? '' : `${nameOfId(building, words, finding.about[0])} : `;
  const facts = factsLine(building, words, finding.facts);
  const clause = finding.clause === null ? '' : ` (${building.result.code.id}, ${finding.clause})`;
  return `${about}${named(words.codes, finding.code)}${facts === '' ? '' : ` – ${facts}`}${clause}.`;
}

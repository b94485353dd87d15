import { fullId, keyMatches } from './answer-keys.ts';
import type { Answers, FixtureAnswer } from './answers.ts';
import { type FixtureDetail, type Identity, noDetail } from './identity.ts';
import { answerableParts, fixtureKinds } from './identity-words.ts';
import type { Element } from './model.ts';
import { usualDetail } from './usual-detail.ts';

/** The user's answers on what things are, ready to be asked for each element. */
export interface AnswerBook {
  fixture(element: Element): FixtureAnswer | null;
  isCleanout(element: Element): boolean;
}

export function answerBook({ fixtures, cleanouts }: Answers): AnswerBook {
  const isPattern = (key: string): boolean => key.startsWith('name:');
  // The more of a name a pattern spells out, the more it counts; of two alike the first.
  const patterns = [...fixtures]
    .filter(([key]) => isPattern(key))
    .toSorted(([a], [b]) => b.replaceAll('*', '').length - a.replaceAll('*', '').length);
  const hasFullIds = [...fixtures.keys()].some((key) => key.includes('#') && !isPattern(key));
  const cleanoutIds = new Set(cleanouts.filter((key) => !isPattern(key)));
  const cleanoutPatterns = cleanouts.filter(isPattern);
  return {
    fixture: (element) =>
      fixtures.get(element.globalId) ??
      (hasFullIds ? fixtures.get(fullId(element)) : undefined) ??
      patterns.find(([key]) => keyMatches(key, element))?.[1] ??
      null,
    isCleanout: (element) =>
      cleanouts.length > 0 &&
      (cleanoutIds.has(element.globalId) ||
        cleanoutIds.has(fullId(element)) ||
        cleanoutPatterns.some((key) => keyMatches(key, element))),
  };
}

/** What the user says the element is, on top of what was read; null where the user says nothing on it. */
export function answeredIdentity(book: AnswerBook, element: Element, read: Identity): Identity | null {
  if (read.part === 'pipe') return null;
  if (book.isCleanout(element))
    return { ...read, part: 'cleanout', kind: null, detail: noDetail, evidence, weak: false };
  const answer = book.fixture(element);
  if (answer === null || (read.part === 'fitting' && answer.kind === undefined)) return null;
  const part = answerableParts.find((one) => one === answer.kind);
  if (part !== undefined) return { ...read, part, kind: null, detail: noDetail, evidence, weak: false };
  const kind = fixtureKinds.find((one) => one === answer.kind) ?? read.kind;
  if (answer.kind === undefined && read.part !== 'fixture') return null;
  return {
    ...read,
    part: 'fixture',
    kind,
    detail: answeredDetail(
      kind === read.kind ? read.detail : { ...usualDetail(kind), domestic: read.detail.domestic },
      answer,
    ),
    medium: 'sanitary',
    evidence: answer.kind === undefined ? `${read.evidence}, ${evidence}` : evidence,
    weak: answer.kind === undefined ? read.weak : false,
  };
}

const evidence = 'answers file';

function answeredDetail(read: FixtureDetail, { detail = {} }: FixtureAnswer): FixtureDetail {
  const { flush, style, heads, emergency, domestic, flushLitres, flow, intermittent, frequency } = detail;
  return {
    ...read,
    ...(flush === 'tank' || flush === 'valve' || flush === 'flushometer-tank' ? { flush } : {}),
    ...(typeof style === 'string' ? { style } : {}),
    ...(typeof heads === 'number' ? { heads } : {}),
    ...(typeof emergency === 'boolean' ? { emergency } : {}),
    ...(typeof domestic === 'boolean' ? { domestic } : {}),
    ...(typeof flushLitres === 'number' ? { flushLitres } : {}),
    ...(typeof flow === 'number' ? { flow } : {}),
    ...(typeof intermittent === 'boolean' ? { intermittent } : {}),
    ...(typeof frequency === 'number' ? { frequency } : {}),
  };
}

import type { Question } from './question.ts';
import type { Result } from './result.ts';
import { shownText } from './shown-text.ts';
import type { Survey, SurveySystem } from './survey.ts';
import { terminalsText } from './terminals-text.ts';
import { blank, heading, paragraph, type TextLine } from './text-line.ts';
import { counted, plainWords } from './trade-words.ts';
import { twinsText } from './twins.ts';
import { row, understoodText } from './understood-text.ts';

/** A survey for a person: what is in the model, what was understood, what could not be used, what to ask. */
export function surveyText(survey: Survey, result: Result): TextLine[] {
  return [
    ...understoodText(result),
    ...terminalsText(survey),
    ...paragraph(inModel(survey), row('In the file')),
    ...some(survey.systems, mostSystems, 'more systems').flatMap((system, place) =>
      paragraph(typeof system === 'string' ? system : systemText(system), row(place === 0 ? 'IFC systems' : '')),
    ),
    ...paragraph(portsText(survey), row('Ports')),
    ...(survey.pipes.total === 0 ? [] : paragraph(knownText(survey), row('Known'))),
    ...listText(
      'Open ends',
      survey.openEnds.map(({ sentence }) => shownText(sentence)),
    ),
    ...listText(
      'Not placed',
      survey.unresolved.map(({ stepId, reason }) => `#${stepId}: ${shownText(reason)}`),
    ),
    ...twinsText(survey.twins ?? []),
    ...questionsText(survey.questions),
  ];
}

const mostSystems = 8;
const mostListed = 8;
const mostQuestions = 8;

function some<T>(list: readonly T[], most: number, rest: string): (T | string)[] {
  return list.length <= most ? [...list] : [...list.slice(0, most), `and ${list.length - most} ${rest}`];
}

function inModel({ classes, storeys, counts }: Survey): string {
  const kinds = some(classes, 10, 'more classes').map((entry) =>
    typeof entry === 'string' ? entry : `${entry.count} ${shownText(entry.class)}`,
  );
  const all = [counted(counts.elements, 'distribution element'), ...kinds].join(', ');
  return storeys.length === 0 ? `${all}; no storeys` : `${all}; ${counted(storeys.length, 'storey')}`;
}

function systemText({ name, predefinedType, elements, uses }: SurveySystem): string {
  const type = predefinedType === null ? '' : ` (${shownText(predefinedType)})`;
  const split = Object.entries(uses).map(([use, count]) =>
    use === 'left-out' || use === 'unresolved' ? `${count} ${plainWords(use)}` : counted(count, use),
  );
  return `${shownText(name ?? 'without a name')}${type}: ${counted(elements, 'element')}${split.length === 0 ? '' : `, ${split.join(', ')}`}`;
}

function portsText({ ports }: Survey): string {
  if (ports.total === 0) return 'none: joints come from geometry';
  const lost = ports.withoutOwner === 0 ? '' : `, ${ports.withoutOwner} on no element`;
  return `${ports.total}, ${ports.connected} of them connected${lost}`;
}

function knownText({ pipes }: Survey): string {
  return `${pipes.withSize} of ${counted(pipes.total, 'pipe')} with a size, ${pipes.withSlope} with a slope, ${pipes.withShape} with a length`;
}

function listText(title: string, texts: readonly string[]): TextLine[] {
  if (texts.length === 0) return [];
  return [
    blank,
    ...heading(`${title}: ${texts.length}`),
    ...some(texts, mostListed, 'more').flatMap((text) => paragraph(text, '  - ', 'warning')),
  ];
}

function questionsText(questions: readonly Question[]): TextLine[] {
  if (questions.length === 0) return [blank, ...paragraph('Nothing to ask: no unknown can change a size.', '', 'good')];
  const sizes = questions.filter(isSizeQuestion);
  const others = questions.filter((question) => !isSizeQuestion(question));
  const asked = [
    ...others.map(({ ask, weight }) => `${shownText(ask)} (${counted(weight, 'pipe')})`),
    ...(sizes.length < 2
      ? sizes.map(({ ask }) => shownText(ask))
      : [`What sizes are the ${sizes.length} pipes that show none?`]),
  ];
  return [
    blank,
    ...heading(`To ask the designer: ${questions.length}, most weighty first`),
    ...some(asked, mostQuestions, 'more').flatMap((ask) => paragraph(ask, '  - ')),
    ...paragraph('--questions FILE writes all of them to fill in.', '    ', 'quiet'),
  ];
}

const isSizeQuestion = ({ answer }: Question): boolean => answer.part === 'pipes' && answer.field === 'size';

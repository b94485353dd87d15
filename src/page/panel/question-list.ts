import type { Question } from '../../schedule/question.ts';
import { kindName, named, phrase } from '../words/words.ts';
import type { Desk } from './desk.ts';
import { make, modelText } from './element.ts';
import { fill } from './fill.ts';
import { nameOfId, shown } from './names.ts';

const most = 40;

/** What to ask the designer, the answer that settles most first. */
export function questionList(desk: Desk): HTMLElement {
  const { building, words } = desk;
  const { questions } = building.data;
  if (questions.length === 0) return make('p', { class: 'quiet' }, words.questions.none);
  const list = make('ol', { class: 'questions' });
  fill(
    desk,
    list,
    questions.map((question) => () => questionItem(desk, question)),
    most,
    (more) => make('li', {}, more),
  );
  return make('div', {}, make('p', { class: 'quiet' }, words.questions.lead), list);
}

function questionItem(desk: Desk, { about, ask, weight, choices, answer }: Question): HTMLElement {
  const { building, words } = desk;
  const first = about[0] ?? '';
  const pipe = building.pipeAt.get(first);
  const fixture = building.fixtureAt.get(first);
  const name = nameOfId(building, words, first);
  const text = modelText(words.questions.ask === null ? shown(ask) : words.questions.ask(answer, name));
  const open =
    pipe !== undefined
      ? () =>
          desk.choosePipe(
            pipe,
            about.flatMap((id) => building.pipeAt.get(id) ?? []),
          )
      : fixture !== undefined
        ? () => desk.chooseFixture(fixture)
        : null;
  const choice = (one: string): string =>
    answer.field === 'kind' && Object.hasOwn(words.kinds, one)
      ? kindName(words, one)
      : answer.part === 'batteries'
        ? named(words.roles, one)
        : shown(phrase(words, one));
  const place = [answer.part, answer.key, answer.field].filter((part) => part !== null).join(' › ');
  return make(
    'li',
    { class: 'question' },
    open === null
      ? make('p', { class: 'question-text' }, text)
      : make('button', { type: 'button', class: 'question-text', onclick: open }, text),
    make('p', { class: 'question-weight' }, words.questions.weight(weight)),
    choices.length > 0 &&
      make('p', { class: 'quiet' }, `${words.questions.choices}${words.colon}${choices.map(choice).join(', ')}`),
    make('p', { class: 'quiet' }, `${words.questions.where}${words.colon}`, make('code', {}, modelText(shown(place)))),
  );
}

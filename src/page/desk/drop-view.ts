import type { DeskParts } from '../../deliver/desk-html.ts';
import { make } from '../panel/element.ts';
import { shown } from '../panel/names.ts';
import type { Language } from '../state.ts';
import { type DeskWords, deskWords } from '../words/desk-words.ts';
import { wordsIn } from '../words/languages.ts';
import { chosenFiles, type Dropped } from './dropped.ts';
import { type DeskOwn, type Stage, stages } from './messages.ts';
import { type OwnActions, ownBar } from './own-bar.ts';

export interface DropActions extends OwnActions {
  check(dropped: Dropped): void;
  cancel(): void;
  chooseCode(code: string): void;
  otherLanguage(): void;
}

export interface DropView {
  readonly root: HTMLElement;
  idle(note?: string): void;
  busy(files: readonly string[], stage: Stage): void;
  refused(message: string, fault: boolean): void;
}

/** The empty page: a place to drop a model, what happens with it, and why it could not be read. */
export function dropView(
  parts: DeskParts,
  language: Language,
  code: string,
  own: DeskOwn,
  actions: DropActions,
): DropView {
  const words = deskWords[language];
  const input = make('input', {
    type: 'file',
    id: 'models',
    class: 'offscreen',
    multiple: true,
    accept: '.ifc,.ifczip,.gz,.zip,.json',
    onchange: () => {
      const files = [...(input.files ?? [])];
      // The same file may be chosen again after it was mended.
      input.value = '';
      if (files.length > 0) actions.check(chosenFiles(files));
    },
  });
  const state = make('div', { class: 'drop-state' });
  const live = make('div', { class: 'offscreen', role: 'status', 'aria-live': 'polite' });
  const zone = make(
    'label',
    { class: 'drop-zone', for: 'models' },
    make('strong', {}, words.drop),
    make('span', { class: 'drop-choose' }, words.choose),
    make('span', { class: 'quiet' }, words.formats),
  );
  const root = make(
    'main',
    { class: 'drop' },
    make(
      'button',
      {
        type: 'button',
        class: 'tool drop-language',
        lang: language === 'en' ? 'fr' : 'en',
        onclick: actions.otherLanguage,
      },
      words.otherLanguage,
    ),
    make('h1', {}, 'Drainwright'),
    make('p', { class: 'drop-lead' }, words.lead),
    input,
    zone,
    state,
    live,
    make('p', { class: 'drop-code' }, codeChooser(parts, language, code, actions.chooseCode)),
    make('p', { class: 'drop-own' }, make('span', {}, words.own.lead), ownBar(language, own, actions)),
    make('p', { class: 'drop-private' }, words.private),
    make('p', { class: 'quiet' }, words.caution),
  );
  const show = (...children: readonly HTMLElement[]): void => state.replaceChildren(...children);
  return {
    root,
    idle(note) {
      zone.hidden = false;
      show(...(note === undefined ? [] : [make('p', { class: 'quiet', role: 'status' }, note)]));
    },
    busy(files, stage) {
      zone.hidden = true;
      const first = state.querySelector('progress') === null;
      if (first) show(...progress(words, files, actions.cancel));
      const bar = state.querySelector('progress');
      if (bar !== null) bar.value = stages.indexOf(stage) + 0.5;
      const said = state.querySelector('.drop-stage');
      if (said !== null) said.textContent = words.stages[stage];
      live.textContent = words.stages[stage];
      if (first) state.querySelector('button')?.focus();
    },
    refused(message, fault) {
      zone.hidden = false;
      show(
        make(
          'div',
          { class: 'drop-refused', role: 'alert' },
          make('h2', {}, fault ? words.fault : words.refused),
          make('p', { class: fault ? 'drop-fault' : '', lang: 'en' }, shownMessage(message)),
        ),
      );
      input.focus();
    },
  };
}

/** Which code to check by; every edition that the page carries. */
export function codeChooser(
  { codes }: DeskParts,
  language: Language,
  chosen: string,
  choose: (code: string) => void,
): HTMLElement {
  const words = wordsIn(language);
  const select = make(
    'select',
    { id: 'code', onchange: () => choose(select.value) },
    ...codes.map(({ id, title, edition }) =>
      make('option', { value: id, selected: id === chosen }, `${words.codeTitle(id, title)} ${edition}`),
    ),
  );
  return make('label', { class: 'code-choice' }, make('span', {}, deskWords[language].code), select);
}

function progress(words: DeskWords, files: readonly string[], cancel: () => void): HTMLElement[] {
  return [
    make('p', { class: 'drop-file' }, make('bdi', {}, files.map(shown).join(', '))),
    make('progress', { max: stages.length, value: 0, 'aria-label': words.stages.sizing }),
    make('p', { class: 'drop-stage' }),
    make('button', { type: 'button', class: 'button', onclick: cancel }, words.cancel),
  ];
}

/** File names in a message may be anything: lines stay lines, nothing steers the reader's eye. */
const shownMessage = (message: string): string => message.split('\n').slice(0, 12).map(shownLine).join('\n');
const shownLine = (line: string): string => line.replace(/[\p{Cc}\p{Cf}]/gu, ' ').slice(0, 1000);

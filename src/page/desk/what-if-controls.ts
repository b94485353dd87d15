import { fixtureKinds } from '../../model/identity-words.ts';
import type { Building } from '../building.ts';
import { make } from '../panel/element.ts';
import type { Chosen, Language } from '../state.ts';
import { deskWords } from '../words/desk-words.ts';
import { wordsIn } from '../words/languages.ts';
import { kindName, named } from '../words/words.ts';
import type { DeskEdit } from './messages.ts';

const readings = ['wet-vent', 'circuit-vent', 'individual-vent'] as const;

/** Under the card of a pipe or fixture: what would be if it, or the reading of its battery, were another. */
export function whatIfControls(
  building: Building,
  language: Language,
  chosen: Chosen,
  ask: (edit: DeskEdit) => void,
): HTMLElement {
  const [words, own] = [wordsIn(language), deskWords[language].whatIf];
  const { result, data } = building;
  const row = chosen.is === 'pipe' ? result.pipes[chosen.row]! : result.fixtures[chosen.row]!;
  const choice = (id: string, label: string, options: readonly (readonly [value: string, label: string])[]) => {
    const select = make(
      'select',
      { id, onchange: () => ask({ about: row.globalId, words: `${id.replace('if-', '')} ${select.value}` }) },
      make('option', { value: '', selected: true, disabled: true }, own.asIs),
      ...options.map(([value, text]) => make('option', { value }, text)),
    );
    return make('label', { class: 'code-choice' }, make('span', {}, label), select);
  };
  const hasBattery = result.batteries.some(({ id }) => 'battery' in row && row.battery === id);
  return make(
    'section',
    { class: 'what-if', 'aria-label': own.title },
    make('h3', {}, own.title),
    chosen.is === 'pipe' &&
      choice(
        'if-size',
        own.size,
        data.sizes.map(({ label }) => [label, label]),
      ),
    chosen.is === 'fixture' &&
      choice(
        'if-kind',
        own.kind,
        fixtureKinds.map((kind) => [kind, kindName(words, kind)]),
      ),
    hasBattery &&
      choice(
        'if-reading',
        own.reading,
        readings.map((reading) => [reading, named(words.roles, reading)]),
      ),
  );
}

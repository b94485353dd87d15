import { lengthText, oneSize, shortLoad, sizesText } from '../format.ts';
import type { LabelText } from '../scene/label-wishes.ts';
import type { Hit } from '../scene/pick.ts';
import { named } from '../words/words.ts';
import type { Desk } from './desk.ts';
import { capital, fixtureName, pipeName } from './names.ts';

/** What the picture writes beside its pipes. */
export function labelWords(desk: Desk): LabelText {
  const { words } = desk;
  return {
    pipe: (section) => labelText(desk, section),
    run: (section) => runText(desk, section),
    step: (section) => labelText(desk, section),
    stopped: () => `▲ ${words.follow.stopped}`,
    measure: ({ length, plan, rise }) =>
      words.tools.distances(lengthText(words, length), lengthText(words, plan), lengthText(words, rise)),
  };
}

/** What stands under the pointer. */
export function tipText({ building, words }: Desk, hit: Hit): string {
  if (hit.is === 'fixture') return fixtureName(building, words, hit.index);
  const row = building.data.scene.pipes.pipe[hit.index] ?? -1;
  if (row < 0) return '';
  const state = building.state(hit.index);
  return [
    pipeName(building, words, row),
    state === undefined ? '' : capital(named(words.roles, state.role)),
    oneSize(words, state?.modelled, ''),
  ]
    .filter((text) => text !== '')
    .join(' · ');
}

function labelText({ building, words }: Desk, section: number): string {
  const state = building.state(section);
  if (state === undefined) return '';
  const load = state.ventLoad !== undefined && state.load.most === 0 ? state.ventLoad : state.load;
  const size = state.verdict === 'undersized' ? oneSize(words, state.modelled) : sizesText(words, state);
  return `${size} · ${shortLoad(words, load, building.result.code.unit)}`;
}

function runText({ building, words }: Desk, section: number): string {
  const state = building.state(section);
  return state === undefined ? '' : sizesText(words, state);
}

import { lengthText } from '../format.ts';
import { named, phrase } from '../words/words.ts';
import { copyButton, pipeButton } from './chips.ts';
import type { Desk } from './desk.ts';
import { make, modelText } from './element.ts';
import { capital, nameOfId, shown } from './names.ts';
import { proofDrop } from './proof-drop.ts';

/** What stands behind every number: the file, the code, the settings, and the count of everything that was read. */
export function modelCard(desk: Desk): HTMLElement {
  const { building, words } = desk;
  const { result } = building;
  const { counts, code } = result;
  const line = (label: string, ...value: readonly (Node | string | null)[]): HTMLElement =>
    make('div', { class: 'fact' }, make('dt', {}, label), make('dd', {}, ...value));
  const leftOut = Object.entries(counts.leftOut).sort(([a, m], [b, n]) => n - m || (a < b ? -1 : 1));
  const left = leftOut.reduce((sum, [, of]) => sum + of, 0);
  const widest = Math.max(0, ...result.joints.inferred.map(({ gap }) => gap));
  const settings = Object.entries(result.settings);
  return make(
    'div',
    { class: 'model-card' },
    ...(result.models ?? [result.model]).map((model) =>
      make(
        'dl',
        { class: 'facts' },
        line(words.model.file, modelText(shown(model.file))),
        line(words.model.schema, shown(model.schema)),
        line(words.model.unit, shown(phrase(words, model.lengthUnit))),
        line(
          words.model.sha256,
          make('code', { class: 'hash' }, model.sha256),
          copyButton(desk, model.sha256, words.model.sha256),
        ),
        ...(model.remarks ?? []).map((remark) => line(words.model.remarks, modelText(shown(remark)))),
      ),
    ),
    make(
      'dl',
      { class: 'facts' },
      line(words.model.code, `${words.codeTitle(code.id, code.title)} (${code.id})`),
      line(words.model.edition, code.edition),
      ...(code.localTables === undefined
        ? []
        : [line(words.model.localTables, code.localTables.map(shown).join(', '))]),
      line(words.model.program, `${capital(result.program.name)} ${result.program.version}`),
      ...(settings.length === 0
        ? []
        : [line(words.model.settings, settings.map(([name, value]) => `${name}: ${String(value)}`).join(', '))]),
      ...(result.answers ?? []).map(({ key, field, part, value }) =>
        line(
          words.model.answered,
          modelText(`${shown(key.startsWith('name:') ? key.slice(5) : nameOfId(building, words, key))}: `),
          `${field ?? part}${value === true ? '' : ` ${shown(String(value))}`}`,
        ),
      ),
    ),
    make('h3', {}, words.model.counts),
    make(
      'table',
      { class: 'counts' },
      make(
        'tbody',
        {},
        ...(
          [
            [words.model.pipes, counts.pipes],
            [words.model.fittings, counts.fittings],
            [words.model.fixtures, counts.fixtures],
            [words.model.terminals, counts.terminals],
            ...leftOut.map(
              ([reason, of]) => [`${words.model.leftOut}${words.colon}${phrase(words, reason)}`, of] as const,
            ),
            [words.model.unresolved.toLowerCase(), counts.unresolved],
          ] as const
        ).map(([label, count]) => make('tr', {}, make('th', { scope: 'row' }, label), make('td', {}, String(count)))),
      ),
      make(
        'tfoot',
        {},
        make('tr', {}, make('th', { scope: 'row' }, words.model.elements), make('td', {}, String(counts.elements))),
      ),
    ),
    counts.pipes + counts.fittings + counts.fixtures + counts.terminals + left + counts.unresolved === counts.elements
      ? make('p', { class: 'quiet' }, words.model.adds)
      : null,
    make(
      'dl',
      { class: 'facts' },
      line(
        words.model.joints,
        words.model.jointLine(
          result.joints.ports,
          result.joints.geometry,
          widest === 0 ? '' : lengthText(words, widest),
        ),
      ),
      ...result.systems.map(({ sewerEnd }) => {
        const row = sewerEnd.pipe === null ? undefined : building.pipeAt.get(sewerEnd.pipe);
        return line(
          words.model.sewer,
          row === undefined ? null : pipeButton(desk, row),
          ` (${named(words.sewerHow, sewerEnd.how)})`,
        );
      }),
    ),
    result.unresolved.length > 0
      ? make(
          'section',
          {},
          make('h3', {}, words.model.unresolved),
          make(
            'ul',
            { class: 'finding-rows' },
            ...result.unresolved
              .slice(0, 100)
              .map(({ globalId, stepId, reason }) =>
                make(
                  'li',
                  { class: 'finding-row' },
                  modelText(`${nameOfId(building, words, globalId)} #${stepId}: ${shown(phrase(words, reason))}`),
                ),
              ),
          ),
        )
      : null,
    proofDrop(desk),
    make('h3', {}, words.model.caution),
    make('p', { class: 'caution' }, words.caution === '' ? result.caution : words.caution),
  );
}

import type { BrokenCondition, ResultBattery } from '../../schedule/result.ts';
import { placeIn } from '../format.ts';
import { countedKind, named, phrase, ruleName } from '../words/words.ts';
import type { Desk } from './desk.ts';
import { make, modelText } from './element.ts';
import { factsLine } from './facts.ts';
import { conditionText } from './finding-sentence.ts';
import { rowTakes } from './margin-facts.ts';
import { batteryName, capital, shown } from './names.ts';
import { weighTable } from './weigh-table.ts';

/** Each battery with all its readings side by side: which one was taken, and what stands against each. */
export function batteryList(desk: Desk): HTMLElement {
  const { building, words } = desk;
  const { batteries } = building.result;
  if (batteries.length === 0) return make('p', { class: 'quiet' }, words.battery.none);
  return make('div', {}, ...batteries.map((battery) => batteryCard(desk, battery)));
}

export function batteryCard(desk: Desk, battery: ResultBattery): HTMLElement {
  const { building, words } = desk;
  const rows = battery.pipes.flatMap((id) => building.pipeAt.get(id) ?? []);
  const kinds = new Map<string | null, number>();
  for (const id of battery.fixtures) {
    const row = building.fixtureAt.get(id);
    const kind = row === undefined ? null : (building.result.fixtures[row]?.kind ?? null);
    kinds.set(kind, (kinds.get(kind) ?? 0) + 1);
  }
  const weighed = building.data.weighed.find(({ id }) => id === battery.id);
  const takes = rowTakes(desk, battery.id);
  const readings = [
    { reading: battery.reading, holds: battery.broken.length === 0, broken: battery.broken, chosen: true },
    ...battery.others.map((other) => ({ ...other, chosen: false })),
  ];
  return make(
    'section',
    { class: 'battery' },
    make('h3', {}, words.battery.one(batteryName(battery.id))),
    make('p', { class: 'kinds' }, [...kinds].map(([kind, count]) => countedKind(words, kind, count)).join(', ')),
    make(
      'table',
      { class: 'readings' },
      make('caption', {}, words.weigh.asDrawn),
      make(
        'thead',
        {},
        make(
          'tr',
          {},
          make('th', { scope: 'col' }, words.battery.reading),
          make('th', { scope: 'col' }, words.battery.condition),
        ),
      ),
      make(
        'tbody',
        {},
        ...readings.map(({ reading, holds, broken, chosen }) =>
          make(
            'tr',
            { class: chosen ? 'chosen' : '' },
            make(
              'th',
              { scope: 'row' },
              capital(named(words.roles, reading)),
              chosen && make('span', { class: 'tag' }, words.battery.chosen),
            ),
            make(
              'td',
              {},
              make(
                'span',
                { class: holds ? 'holds' : 'breaks' },
                holds ? `✓ ${words.battery.holds}` : `✕ ${words.battery.broken}`,
              ),
              broken.length > 0 && make('ul', {}, ...broken.map((condition) => brokenLine(desk, condition))),
            ),
          ),
        ),
      ),
    ),
    weighed !== undefined && weighTable(desk, weighed),
    takes !== null && make('p', { class: 'quiet' }, takes),
    battery.why !== '' &&
      make('p', { class: 'quiet' }, `${words.battery.why} `, modelText(shown(phrase(words, battery.why))), '.'),
    rows.length > 0 &&
      make(
        'button',
        {
          type: 'button',
          class: 'button',
          onclick: () => {
            const first = rows[0];
            if (first !== undefined) desk.choosePipe(first, rows);
          },
        },
        words.battery.show,
      ),
  );
}

function brokenLine(desk: Desk, broken: BrokenCondition): HTMLElement {
  const { building, words } = desk;
  const { clause, facts } = broken;
  const why = conditionText(desk, facts) ?? factsLine(building, words, facts);
  return make(
    'li',
    {},
    capital(ruleName(words, broken)),
    why === '' ? ' ' : `${words.colon}${shown(why)} `,
    make('span', { class: 'clause' }, placeIn(words, clause)),
  );
}

import { shortLoad } from '../format.ts';
import { countedKind } from '../words/words.ts';
import { fixtureButton } from './chips.ts';
import type { Desk } from './desk.ts';
import { make } from './element.ts';

const mostUsers = 24;

/** Whose water and whose air goes through a pipe, and what that makes of it. */
export function users(desk: Desk, row: number): HTMLElement {
  const { building, words } = desk;
  const { unit } = building.result.code;
  const list = (title: string, empty: string, rows: readonly number[], total: string): HTMLElement =>
    make(
      'section',
      {},
      make('h3', {}, title, total !== '' && make('span', { class: 'total' }, total)),
      rows.length === 0 ? make('p', { class: 'quiet' }, empty) : make('p', { class: 'kinds' }, kindCounts(desk, rows)),
      make(
        'ul',
        { class: 'users' },
        ...rows
          .slice(0, mostUsers)
          .map((fixture) =>
            make(
              'li',
              {},
              fixtureButton(desk, fixture),
              make('span', { class: 'amount' }, shortLoad(words, building.result.fixtures[fixture]!.load, unit)),
            ),
          ),
        rows.length > mostUsers && make('li', { class: 'quiet' }, `… ${rows.length - mostUsers}`),
      ),
    );
  const pipe = building.result.pipes[row]!;
  const water = building.servesWater(row);
  const air = building.servesAir(row);
  const why = water.length > 0 ? (air.length > 0 ? 'both' : 'water') : air.length > 0 ? 'air' : 'none';
  return make(
    'div',
    {},
    make('p', { class: 'role-why' }, words.pipe.roleWhy[why]),
    list(
      words.pipe.water(water.length),
      words.pipe.noWater,
      water,
      water.length === 0 ? '' : shortLoad(words, pipe.load, unit),
    ),
    list(
      words.pipe.air(air.length),
      words.pipe.noAir,
      air,
      pipe.ventLoad === undefined ? '' : shortLoad(words, pipe.ventLoad, unit),
    ),
  );
}

function kindCounts({ building, words }: Desk, rows: readonly number[]): string {
  const counts = new Map<string | null, number>();
  for (const row of rows) {
    const kind = building.result.fixtures[row]?.kind ?? null;
    counts.set(kind, (counts.get(kind) ?? 0) + 1);
  }
  return [...counts].map(([kind, count]) => countedKind(words, kind, count)).join(', ');
}

import { lengthText, loadText, oneSize } from '../format.ts';
import { kindName, named } from '../words/words.ts';
import { copyButton, pipeButton } from './chips.ts';
import type { Desk } from './desk.ts';
import { make, modelText } from './element.ts';
import { findingsAbout } from './findings-about.ts';
import { fixtureSymbol } from './fixture-symbol.ts';
import { capital, fixtureName, shown } from './names.ts';

/** A fixture: what it is and how that is known, its trap and vent, and the two ways that start at it. */
export function fixtureCard(desk: Desk, row: number): HTMLElement {
  const { building, words, store } = desk;
  const fixture = building.result.fixtures[row]!;
  const line = (label: string, ...value: readonly (Node | string | null | false)[]): HTMLElement =>
    make('div', { class: 'fact' }, make('dt', {}, label), make('dd', {}, ...value));
  const water = building.water(row);
  const air = building.air(row);
  const hasAir = air.arm.length + air.through.length + air.dry.length > 0;
  const arm = fixture.trapArm;
  const follow = (what: 'water' | 'air'): void => {
    store.set({ follow: { what, fixture: row, step: 0 }, view: 'model' });
    desk.scene?.frameWay();
  };
  const vented =
    fixture.ventedBy.how === 'unvented'
      ? words.fixture.unvented
      : fixture.ventedBy.how === 'free'
        ? words.fixture.free
        : named(words.roles, fixture.ventedBy.how);
  return make(
    'article',
    { class: 'card', 'aria-labelledby': 'card-title' },
    make(
      'h2',
      { id: 'card-title', tabindex: '-1' },
      fixtureSymbol(fixture.kind),
      modelText(fixtureName(building, words, row)),
    ),
    make(
      'p',
      { class: 'card-role' },
      [capital(kindName(words, fixture.kind)), fixture.storey === null ? null : shown(fixture.storey)]
        .filter((text) => text !== null)
        .join(' · '),
    ),
    fixture.ventedBy.how === 'unvented' &&
      make(
        'div',
        { class: 'banner banner-undersized' },
        make('span', { class: 'mark', 'aria-hidden': 'true' }, '▲'),
        make('strong', {}, `${words.fixture.ventedBy} ${words.fixture.unvented}`),
        make('p', {}, words.fixture.plainUnvented),
      ),
    make(
      'div',
      { class: 'actions' },
      water.length > 0 &&
        make('button', { type: 'button', class: 'button strong', onclick: () => follow('water') }, words.fixture.flush),
      hasAir &&
        make('button', { type: 'button', class: 'button strong', onclick: () => follow('air') }, words.fixture.air),
    ),
    make(
      'dl',
      { class: 'facts' },
      line(words.pipe.load, loadText(words, fixture.load, building.result.code.unit)),
      line(
        words.fixture.row,
        fixture.row === null ? words.fixture.unidentified : shown(fixture.row.replaceAll('-', ' ')),
      ),
      line(words.fixture.known, modelText(shown(fixture.evidence))),
      line(words.fixture.trapSize, oneSize(words, fixture.trapSize, words.pipe.noSize)),
      line(words.fixture.trapAt, named(words.trapHow, fixture.trap.how)),
      ...(arm === null || arm.length === null
        ? []
        : [
            line(
              words.fixture.trapArm,
              lengthText(words, arm.length),
              arm.limit === null ? null : ` ${words.fixture.armLimit(lengthText(words, arm.limit))}`,
              arm.limit === null ? null : armGauge(arm.length, arm.limit),
            ),
          ]),
      line(words.fixture.ventedBy, vented),
      line(
        'GlobalId',
        make('code', {}, modelText(shown(fixture.globalId))),
        copyButton(desk, fixture.globalId, 'GlobalId'),
      ),
      line('STEP', make('code', {}, `#${fixture.stepId}`)),
    ),
    findingsAbout(desk, fixture.globalId),
    water.length > 0 &&
      make(
        'section',
        {},
        make('h3', {}, words.fixture.path),
        make('ol', { class: 'path' }, ...pathRows(desk, water).map((pipe) => make('li', {}, pipeButton(desk, pipe)))),
      ),
  );
}

const mostPath = 40;

function pathRows({ building }: Desk, sections: readonly number[]): readonly number[] {
  const rows: number[] = [];
  for (const section of sections) {
    const row = building.data.scene.pipes.pipe[section] ?? -1;
    if (row >= 0 && rows.at(-1) !== row) rows.push(row);
  }
  return rows.slice(0, mostPath);
}

/** How much of the allowed length the trap arm takes; past the mark it stands out. */
function armGauge(length: number, limit: number): HTMLElement {
  const gauge = make('span', { class: length > limit ? 'gauge over' : 'gauge', 'aria-hidden': 'true' }, make('i'));
  (gauge.firstElementChild as HTMLElement).style.width = `${Math.min(100, (length / limit) * 100)}%`;
  return gauge;
}

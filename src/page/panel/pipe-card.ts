import type { PipeState, ResultPipe } from '../../schedule/result.ts';
import { lengthText, loadText, oneSize, sizeText, slopeText } from '../format.ts';
import { planWords } from '../words/plan-words.ts';
import { named, phrase } from '../words/words.ts';
import { argument } from './argument.ts';
import { copyButton, pipeButton, verdictMarks } from './chips.ts';
import type { Desk } from './desk.ts';
import { make, modelText } from './element.ts';
import { findingsAbout } from './findings-about.ts';
import { marginFacts } from './margin-facts.ts';
import { batteryName, capital, pipeName, shown } from './names.ts';
import { connectedRows, upstreamOf } from './neighbours.ts';
import { physics } from './physics.ts';
import { users } from './users.ts';

/** A pipe's case, in the order of an argument: verdict, what it is, why that size, why not smaller, whose it is. */
export function pipeCard(desk: Desk, row: number): HTMLElement {
  const { building, words } = desk;
  const pipe = building.result.pipes[row]!;
  return make(
    'article',
    { class: 'card', 'aria-labelledby': 'card-title' },
    make('h2', { id: 'card-title', tabindex: '-1' }, modelText(pipeName(building, words, row))),
    make('p', { class: 'card-role' }, roleText(desk, pipe)),
    verdictBanner(desk, row, pipe),
    actions(desk, row),
    argument(desk, pipe),
    users(desk, row),
    sections(desk, pipe),
    physics(desk, pipe),
    findingsAbout(desk, pipe.globalId),
    facts(desk, row, pipe),
  );
}

function roleText({ words }: Desk, pipe: PipeState): string {
  const also = pipe.also.map((role) => named(words.roles, role));
  return [
    capital(named(words.roles, pipe.role)),
    ...(also.length === 0 ? [] : [words.pipe.also(also.join(` ${words.and} `))]),
    ...(pipe.portion === undefined ? [] : [words.pipe.portion[pipe.portion]]),
    ...(pipe.storey === null ? [] : [shown(pipe.storey)]),
  ].join(' · ');
}

function verdictBanner({ building, words }: Desk, row: number, pipe: ResultPipe): HTMLElement {
  const [wet, airs] = [building.servesWater(row).length > 0, building.servesAir(row).length > 0];
  const drawn = oneSize(words, pipe.modelled);
  const needed = sizeText(words, pipe.required);
  const text = {
    undersized: words.pipe.tooSmall(drawn, needed),
    oversized: words.pipe.oversized(drawn, needed),
    agrees: words.pipe.agrees(drawn),
    unknown: words.pipe.unknown(needed),
  }[pipe.verdict];
  return make(
    'div',
    { class: `banner banner-${pipe.verdict}` },
    make('span', { class: 'mark', 'aria-hidden': 'true' }, verdictMarks[pipe.verdict]),
    make('strong', {}, text),
    pipe.reason !== undefined && make('p', {}, modelText(shown(phrase(words, pipe.reason)))),
    pipe.verdict === 'undersized' &&
      make('p', {}, words.pipe.plain[wet && airs && pipe.role.includes('vent') ? 'both' : wet ? 'drain' : 'vent']),
    pipe.provisional && make('p', {}, words.pipe.provisional),
  );
}

function actions(desk: Desk, row: number): HTMLElement {
  const { building, words, store } = desk;
  const pipe = building.result.pipes[row]!;
  const alone = store.state.isolated;
  const next = pipe.next === null ? undefined : building.pipeAt.get(pipe.next);
  const up = upstreamOf(desk, row);
  return make(
    'div',
    { class: 'actions' },
    make(
      'button',
      {
        type: 'button',
        class: 'button',
        onclick: () => store.set({ isolated: alone === null ? connectedRows(desk, row) : null }),
      },
      alone === null ? words.pipe.isolate : words.pipe.showAll,
    ),
    up !== undefined &&
      make(
        'button',
        { type: 'button', class: 'button', onclick: () => desk.choosePipe(up) },
        `↑ ${words.pipe.upstream}`,
      ),
    next !== undefined &&
      make('button', { type: 'button', class: 'button', onclick: () => desk.choosePipe(next) }, `↓ ${words.pipe.next}`),
  );
}

function sections({ words, building }: Desk, pipe: ResultPipe): HTMLElement | null {
  if (pipe.sections === undefined) return null;
  const { unit } = building.result.code;
  return make(
    'section',
    {},
    make('h3', {}, words.pipe.sections),
    make(
      'ul',
      { class: 'sections' },
      ...pipe.sections.map((section) =>
        make(
          'li',
          {},
          make('span', { class: `mark mark-${section.verdict}`, 'aria-hidden': 'true' }, verdictMarks[section.verdict]),
          make('span', {}, words.pipe.section(lengthText(words, section.from), lengthText(words, section.to))),
          make(
            'span',
            { class: 'amount' },
            `${named(words.roles, section.role)}, ${loadText(words, section.load, unit)}, ${sizeText(words, section.required)}`,
          ),
        ),
      ),
    ),
  );
}

function facts(desk: Desk, row: number, pipe: ResultPipe): HTMLElement {
  const { building, words } = desk;
  const line = (label: string, ...value: readonly (Node | string | false)[]): HTMLElement =>
    make('div', { class: 'fact' }, make('dt', {}, label), make('dd', {}, ...value));
  const slope =
    pipe.slope === null
      ? words.pipe.vertical
      : `${pipe.slope.value === null ? '' : `${slopeText(words, pipe.slope.value)}, `}${words.pipe.slopeGround[pipe.slope.ground]}`;
  const next = pipe.next === null ? undefined : building.pipeAt.get(pipe.next);
  return make(
    'section',
    {},
    make('h3', {}, words.pipe.facts),
    make(
      'dl',
      { class: 'facts' },
      line(
        words.pipe.drawn,
        oneSize(words, pipe.modelled, words.pipe.notDrawn),
        pipe.modelled !== null && make('small', {}, modelText(` ${words.pipe.drawnFrom(shown(pipe.modelled.from))}`)),
      ),
      line(words.pipe.needed, sizeText(words, pipe.required)),
      line(words.pipe.load, loadText(words, pipe.load, building.result.code.unit)),
      ...(pipe.ventLoad === undefined
        ? []
        : [line(words.pipe.ventLoad, loadText(words, pipe.ventLoad, building.result.code.unit))]),
      ...marginFacts(desk, row).map((text) => line(planWords[words.language].takes, text)),
      ...(pipe.length === null ? [] : [line(words.pipe.length, lengthText(words, pipe.length))]),
      ...(pipe.developedLength === undefined
        ? []
        : [line(words.pipe.developedLength, lengthText(words, pipe.developedLength))]),
      line(words.pipe.slope, slope),
      ...(pipe.system === null ? [] : [line(words.pipe.system, modelText(shown(pipe.system)))]),
      ...(pipe.battery === undefined ? [] : [line(words.pipe.battery, batteryName(pipe.battery))]),
      ...(next === undefined ? [] : [line(words.pipe.next, pipeButton(desk, next))]),
      line('GlobalId', make('code', {}, modelText(shown(pipe.globalId))), copyButton(desk, pipe.globalId, 'GlobalId')),
      line('STEP', make('code', {}, `#${pipe.stepId}`)),
    ),
    building.sectionsOf[row]?.length === 0 && make('p', { class: 'quiet' }, words.page.noShapes),
  );
}

import type { PipeState, ResultPipe, TrailStep } from '../../schedule/result.ts';
import { lengthText, loadText, oneSize, shortLoad, sizeText, slopeText } from '../format.ts';
import { countedKind, named, phrase, ruleName } from '../words/words.ts';
import { copyButton, fixtureButton, pipeButton, verdictMarks } from './chips.ts';
import type { Desk } from './desk.ts';
import { make, modelText } from './element.ts';
import { factTexts } from './facts.ts';
import { opener } from './finding-list.ts';
import { findingSentence } from './finding-sentence.ts';
import { batteryName, capital, pipeName, shown } from './names.ts';
import { clauseText } from './reason.ts';

/** A pipe's case, in the order of an argument: verdict, what it is, why that size, why not smaller, whose it is. */
export function pipeCard(desk: Desk, row: number): HTMLElement {
  const { building, words } = desk;
  const pipe = building.result.pipes[row]!;
  return make(
    'article',
    { class: 'card', 'aria-labelledby': 'card-title' },
    make('h2', { id: 'card-title', tabindex: '-1' }, modelText(pipeName(building, words, row))),
    make('p', { class: 'card-role' }, roleText(desk, pipe)),
    verdictBanner(desk, pipe),
    actions(desk, row),
    argument(desk, pipe),
    users(desk, row),
    sections(desk, pipe),
    findings(desk, pipe),
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

function verdictBanner({ words }: Desk, pipe: ResultPipe): HTMLElement {
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

/** The pipe that brings it most; of equal ones the one of the same role, then the last in the result's order. */
export function upstreamOf({ building }: Desk, row: number): number | undefined {
  const own = building.result.pipes[row];
  const id = own?.globalId;
  let best: number | undefined;
  building.result.pipes.forEach(({ next, load, role }, index) => {
    if (next !== id || index === row) return;
    if (best === undefined || load.most > building.result.pipes[best]!.load.most) best = index;
    else if (load.most === building.result.pipes[best]!.load.most && role === own?.role) best = index;
  });
  return best;
}

/** A pipe alone says little: its battery comes with it, or the pipes of its whole water and air. */
export function connectedRows({ building }: Desk, row: number): readonly number[] {
  const pipe = building.result.pipes[row]!;
  const battery = building.result.batteries.find(({ id }) => id === pipe.battery);
  const rows = new Set([row]);
  const { pipe: rowOf } = building.data.scene.pipes;
  const addSection = (section: number): void => {
    const of = rowOf[section] ?? -1;
    if (of >= 0) rows.add(of);
  };
  const fixtures =
    battery === undefined
      ? [...building.servesWater(row), ...building.servesAir(row)]
      : battery.fixtures.flatMap((id) => building.fixtureAt.get(id) ?? []);
  for (const fixture of fixtures) {
    for (const section of building.water(fixture)) {
      addSection(section);
      if (rowOf[section] === row) break;
    }
    const { arm, through, dry } = building.air(fixture);
    for (const section of [...arm, ...through, ...dry]) addSection(section);
  }
  return [...rows].sort((a, b) => a - b);
}

/** The trail as an argument: what governs and why, then what would be asked without it, then everything. */
function argument(desk: Desk, pipe: ResultPipe): HTMLElement {
  const { words } = desk;
  if (pipe.trail.length === 0) return make('p', { class: 'quiet' }, words.pipe.noTrail);
  const governing = pipe.trail.filter(({ governs }) => governs);
  const size = sizeText(words, pipe.required);
  const rules = [...new Set(governing.map((step) => ruleName(words, step)))].join(` ${words.and} `);
  const others = pipe.trail.filter(({ governs, asks }) => !governs && asks !== null);
  const second = others.reduce<TrailStep | null>(
    (best, step) => (best === null || (step.asks?.dn ?? 0) > (best.asks?.dn ?? 0) ? step : best),
    null,
  );
  return make(
    'section',
    { class: 'argument' },
    make('h3', {}, words.pipe.why(size)),
    make('ol', { class: 'steps' }, ...governing.map((step) => demand(desk, step))),
    make('h3', {}, words.pipe.whyNot),
    make(
      'p',
      {},
      governing.length === 0 ? '' : `${words.pipe.failsBelow(size, rules)} `,
      second === null || second.asks === null
        ? words.pipe.onlyDemand
        : words.pipe.nextDemand(oneSize(words, second.asks), ruleName(words, second)),
    ),
    make(
      'details',
      {},
      make('summary', {}, `${words.pipe.demands} (${pipe.trail.length})`),
      make('ol', { class: 'steps' }, ...pipe.trail.map((step) => demand(desk, step))),
    ),
  );
}

function demand(desk: Desk, step: TrailStep): HTMLElement {
  const { building, words } = desk;
  const facts = factTexts(building, words, step.facts);
  return make(
    'li',
    { class: step.governs ? 'step governs' : 'step' },
    make(
      'div',
      { class: 'step-head' },
      make('span', { class: 'step-rule' }, capital(ruleName(words, step))),
      make('span', { class: 'step-size' }, oneSize(words, step.asks, words.pipe.noSize)),
    ),
    facts.length > 0 &&
      make(
        'ul',
        { class: 'step-facts' },
        ...facts.map(({ label, value }) => make('li', {}, `${label} `, make('b', {}, modelText(shown(value))))),
      ),
    make(
      'div',
      { class: 'step-clause' },
      clauseText(words, step),
      step.trust === 'memory' && make('span', { class: 'trust' }, ` · ${words.pipe.fromMemory}`),
    ),
  );
}

const mostUsers = 24;

function users(desk: Desk, row: number): HTMLElement {
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
  return make(
    'div',
    {},
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

function findings(desk: Desk, pipe: ResultPipe): HTMLElement | null {
  const list = desk.building.findingsAbout.get(pipe.globalId) ?? [];
  if (list.length === 0) return null;
  return make(
    'section',
    {},
    make('h3', {}, desk.words.pipe.about),
    make(
      'ul',
      { class: 'finding-rows' },
      ...list.map((finding) => {
        const open = opener(desk, finding);
        const text = modelText(findingSentence(desk, finding));
        return make(
          'li',
          {},
          open === null
            ? make('span', { class: 'finding-row' }, text)
            : make('button', { type: 'button', class: 'finding-row', onclick: open }, text),
        );
      }),
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

import { oneSize, sizeText } from '../format.ts';
import type { PipeOrder } from '../state.ts';
import { kindName, named } from '../words/words.ts';
import { verdictMark } from './chips.ts';
import type { Desk } from './desk.ts';
import { make, modelText } from './element.ts';
import { fill } from './fill.ts';
import { fixtureSymbol } from './fixture-symbol.ts';
import { fixtureName, pipeName, shown } from './names.ts';

const page = 120;

/** Pipes and fixtures that answer a search, worst verdict first; all pipes where nothing is searched. */
export function pipeList(desk: Desk, search: string): HTMLElement {
  const { building, words } = desk;
  const wanted = folded(search).trim();
  const pipes = orderedPipes(desk).filter((row) => wanted === '' || pipeWords(desk, row).includes(wanted));
  const fixtures =
    wanted === ''
      ? []
      : building.result.fixtures.flatMap((_, row) => (fixtureWords(desk, row).includes(wanted) ? row : []));
  const lines = [
    ...fixtures.map((row) => () => fixtureLine(desk, row)),
    ...pipes.map((row) => () => pipeLine(desk, row)),
  ];
  const list = make('ul', { class: 'pipe-list' });
  fill(desk, list, lines, page, (more) => make('li', {}, more));
  return make(
    'div',
    {},
    wanted !== '' &&
      make(
        'p',
        { class: 'quiet', role: 'status' },
        lines.length === 0 ? words.search.none : words.search.found(lines.length),
      ),
    lines.length > 1 && orderSelect(desk),
    list,
  );
}

const worst = { undersized: 0, unknown: 1, oversized: 2, agrees: 3 } as const;

/** In the order asked for; equal ones in the order of the result. */
function orderedPipes({ building, words, store }: Desk): readonly number[] {
  const { pipes } = building.result;
  const { pipesBy } = store.state;
  const storeys = new Map(building.data.scene.storeys.map(({ name }, at) => [name, at]));
  const weight = (row: number): number => {
    const { verdict, modelled, load, ventLoad, storey } = pipes[row]!;
    switch (pipesBy) {
      case 'verdict':
        return worst[verdict];
      case 'size':
        return -(modelled?.dn ?? 0);
      case 'load':
        return -Math.max(load.most, ventLoad?.most ?? 0);
      case 'storey':
        return -(storey === null ? -1 : (storeys.get(storey) ?? -1));
      case 'name':
        return 0;
    }
  };
  const names = new Intl.Collator(words.language, { numeric: true });
  const byName = (a: number, b: number): number =>
    pipesBy === 'name' ? names.compare(pipes[a]!.name ?? '', pipes[b]!.name ?? '') : 0;
  return pipes.map((_, row) => row).sort((a, b) => weight(a) - weight(b) || byName(a, b) || a - b);
}

function orderSelect({ store, words }: Desk): HTMLElement {
  const select = make(
    'select',
    { id: 'pipes-by', onchange: () => store.set({ pipesBy: select.value as PipeOrder }) },
    ...(['verdict', 'name', 'size', 'load', 'storey'] as const).map((by) =>
      make('option', { value: by, selected: by === store.state.pipesBy }, words.pipesBy.by[by]),
    ),
  );
  return make('p', { class: 'list-order' }, make('label', { for: 'pipes-by' }, words.pipesBy.label), select);
}

/** Accents and case make no difference to a search. */
const folded = (text: string): string => text.normalize('NFD').replace(/\p{M}/gu, '').toLowerCase();

function pipeWords({ building, words }: Desk, row: number): string {
  const pipe = building.result.pipes[row]!;
  return folded(
    [
      pipe.name,
      pipe.globalId,
      `#${pipe.stepId}`,
      named(words.roles, pipe.role),
      ...pipe.also.map((role) => named(words.roles, role)),
      pipe.storey,
      pipe.system,
      oneSize(words, pipe.modelled, ''),
      words.verdict[pipe.verdict],
      pipe.battery,
      ...pipe.trail.filter(({ governs }) => governs).map(({ clause }) => clause),
    ].join('\n'),
  );
}

function fixtureWords({ building, words }: Desk, row: number): string {
  const fixture = building.result.fixtures[row]!;
  return folded(
    [fixture.name, fixture.globalId, `#${fixture.stepId}`, kindName(words, fixture.kind), fixture.storey].join('\n'),
  );
}

function pipeLine(desk: Desk, row: number): HTMLElement {
  const { building, words } = desk;
  const pipe = building.result.pipes[row]!;
  const drawn = oneSize(words, pipe.modelled);
  const size =
    pipe.verdict === 'undersized' || pipe.verdict === 'oversized'
      ? `${drawn} → ${sizeText(words, pipe.required)}`
      : drawn;
  return make(
    'li',
    {},
    make(
      'button',
      { type: 'button', class: 'line', onclick: () => desk.choosePipe(row) },
      verdictMark(pipe.verdict),
      make('span', { class: 'line-name' }, modelText(pipeName(building, words, row))),
      make('span', { class: 'line-size' }, size),
      make(
        'span',
        { class: 'line-more' },
        [named(words.roles, pipe.role), shown(pipe.storey)].filter((text) => text !== '').join(' · '),
      ),
    ),
  );
}

function fixtureLine(desk: Desk, row: number): HTMLElement {
  const { building, words } = desk;
  const fixture = building.result.fixtures[row]!;
  return make(
    'li',
    {},
    make(
      'button',
      { type: 'button', class: 'line', onclick: () => desk.chooseFixture(row) },
      fixtureSymbol(fixture.kind),
      make('span', { class: 'line-name' }, modelText(fixtureName(building, words, row))),
      make('span', { class: 'line-size' }, oneSize(words, fixture.trapSize, '')),
      make(
        'span',
        { class: 'line-more' },
        [kindName(words, fixture.kind), shown(fixture.storey)].filter((text) => text !== '').join(' · '),
      ),
    ),
  );
}

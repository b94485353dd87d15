import type { ResultFinding } from '../../schedule/result.ts';
import { type UndersizedGroup, undersizedGroups } from '../../schedule/undersized-text.ts';
import { oneSize, sizeText } from '../format.ts';
import type { PageState } from '../state.ts';
import { named } from '../words/words.ts';
import { severityMarks } from './chips.ts';
import type { Desk } from './desk.ts';
import { make, modelText } from './element.ts';
import { fill } from './fill.ts';
import { placeOf } from './finding-places.ts';
import { findingSentence } from './finding-sentence.ts';
import { batteryName, capital, pipeName } from './names.ts';
import { reasonText } from './reason.ts';

const mostShown = 60;
const mostGroups = 30;

/** All findings, filtered by severity and grouped by cause, by battery and stack, or by storey. */
export function findingList(desk: Desk): HTMLElement {
  const { building, words, store } = desk;
  const { findings } = building.result;
  const severities = (['error', 'warning', 'note'] as const).filter((severity) =>
    findings.some((finding) => finding.severity === severity),
  );
  const chip = (value: string | null, label: string, count: number): HTMLElement =>
    make(
      'button',
      {
        type: 'button',
        class: 'chip',
        'aria-pressed': String(store.state.findingFilter === value),
        onclick: () => store.set({ findingFilter: value }),
      },
      `${label} `,
      make('span', { class: 'chip-count' }, String(count)),
    );
  const filter = store.state.findingFilter;
  const wanted = findings.filter(({ severity }) => filter === null || severity === filter);
  const { findingsBy } = store.state;
  return make(
    'div',
    {},
    make(
      'div',
      { class: 'chips', role: 'group', 'aria-label': words.findings.filter },
      chip(null, words.findings.all, findings.length),
      ...severities.map((severity) =>
        chip(
          severity,
          words.findings.severity[severity],
          findings.filter((finding) => finding.severity === severity).length,
        ),
      ),
    ),
    findings.length === 0 && make('p', { class: 'quiet' }, words.findings.none),
    findings.length > 0 && groupSelect(desk),
    paged(
      desk,
      findingsBy === 'cause' ? byCause(desk, wanted) : byPlace(desk, wanted, findingsBy),
      mostGroups,
      (more) => more,
    ),
    make('p', { class: 'quiet' }, words.findings.noJudgement),
  );
}

function groupSelect({ store, words }: Desk): HTMLElement {
  const select = make(
    'select',
    { id: 'findings-by', onchange: () => store.set({ findingsBy: select.value as PageState['findingsBy'] }) },
    ...(['cause', 'place', 'storey'] as const).map((by) =>
      make('option', { value: by, selected: by === store.state.findingsBy }, words.findings.by[by]),
    ),
  );
  return make('p', { class: 'list-order' }, make('label', { for: 'findings-by' }, words.findings.groupBy), select);
}

/** Undersized pipes by what makes them so, then everything else by its code; errors stand first in the result. */
function byCause(desk: Desk, wanted: readonly ResultFinding[]): readonly (() => HTMLElement)[] {
  const undersized = wanted.some(({ code }) => code === 'undersized');
  const groups = undersized ? undersizedGroups(desk.building.result) : [];
  const rest = grouped(
    wanted.filter(({ code }) => code !== 'undersized'),
    ({ code }) => code,
  );
  return [
    ...groups.map((group) => () => undersizedGroup(desk, group)),
    ...rest.map(
      ([code, list]) =>
        () =>
          listGroup(desk, capital(named(desk.words.codes, code)), list),
    ),
  ];
}

function byPlace(desk: Desk, wanted: readonly ResultFinding[], by: 'place' | 'storey'): readonly (() => HTMLElement)[] {
  return grouped(wanted, (finding) => placeOf(desk, finding, by)).map(
    ([place, list]) =>
      () =>
        listGroup(desk, place, list),
  );
}

/** In the order in which the keys first occur. */
function grouped(
  findings: readonly ResultFinding[],
  keyOf: (finding: ResultFinding) => string,
): readonly (readonly [string, readonly ResultFinding[]])[] {
  const groups = new Map<string, ResultFinding[]>();
  for (const finding of findings) {
    const key = keyOf(finding);
    const list = groups.get(key);
    if (list === undefined) groups.set(key, [finding]);
    else list.push(finding);
  }
  return [...groups];
}

function undersizedGroup(desk: Desk, group: UndersizedGroup): HTMLElement {
  const { building, words } = desk;
  const rows = group.pipes.flatMap(({ globalId }) => building.pipeAt.get(globalId) ?? []);
  const first = group.root;
  const title = words.findings.undersized(
    group.pipes.length,
    oneSize(words, first.modelled),
    sizeText(words, first.required),
  );
  return make(
    'section',
    { class: 'finding finding-error' },
    make(
      'button',
      { type: 'button', class: 'finding-head', onclick: () => rows[0] !== undefined && desk.choosePipe(rows[0], rows) },
      make('span', { class: 'mark mark-undersized', 'aria-hidden': 'true' }, '▲'),
      make('span', { class: 'finding-title' }, title),
      make(
        'span',
        { class: 'finding-why' },
        [
          group.battery === null ? null : capital(words.findings.ofBattery(batteryName(group.battery))),
          capital(named(words.roles, first.role)),
          reasonText(desk, first, group.governing),
        ]
          .filter((text) => text !== null && text !== '')
          .join(' · '),
      ),
    ),
    rowsOf(
      desk,
      rows.map((row) => ({ label: pipeName(building, words, row), open: () => desk.choosePipe(row) })),
      rows.every((row) => pipeName(building, words, row).length < 16),
    ),
  );
}

function listGroup(desk: Desk, title: string, list: readonly ResultFinding[]): HTMLElement {
  const { severity } = list[0]!;
  return make(
    'section',
    { class: `finding finding-${severity}` },
    make(
      'h3',
      { class: 'finding-code' },
      make('span', { class: `mark mark-${severity}`, 'aria-hidden': 'true' }, severityMarks[severity]),
      modelText(title),
      list.length > 1 && make('span', { class: 'chip-count' }, String(list.length)),
    ),
    rowsOf(
      desk,
      list.map((finding) => ({
        label: findingSentence(desk, finding),
        open: opener(desk, finding),
      })),
    ),
  );
}

/** What choosing a finding does: the thing at fault is chosen, and everything it speaks of is framed. */
export function opener(desk: Desk, { about }: ResultFinding): (() => void) | null {
  const { building } = desk;
  const pipes = about.flatMap((id) => building.pipeAt.get(id) ?? []);
  const first = about[0] ?? '';
  const fixture = building.fixtureAt.get(first) ?? about.flatMap((id) => building.fixtureAt.get(id) ?? [])[0];
  const pipe = building.pipeAt.get(first) ?? (fixture === undefined ? pipes[0] : undefined);
  if (pipe !== undefined) return () => desk.choosePipe(pipe, pipes);
  if (fixture !== undefined) return () => desk.chooseFixture(fixture);
  return null;
}

interface Row {
  readonly label: string;
  readonly open: (() => void) | null;
}

function rowsOf(desk: Desk, rows: readonly Row[], short = false): HTMLElement {
  const line = ({ label, open }: Row): HTMLElement =>
    make(
      'li',
      {},
      open === null
        ? make('span', { class: 'finding-row' }, modelText(shownLong(label)))
        : make('button', { type: 'button', class: 'finding-row', onclick: open }, modelText(shownLong(label))),
    );
  const list = make('ul', { class: short ? 'finding-rows short' : 'finding-rows' });
  fill(
    desk,
    list,
    rows.map((row) => () => line(row)),
    mostShown,
    (more) => make('li', {}, more),
  );
  return list;
}

function paged(
  desk: Desk,
  items: readonly (() => HTMLElement)[],
  most: number,
  wrap: (more: HTMLElement) => HTMLElement,
): HTMLElement {
  const host = make('div', {});
  fill(desk, host, items, most, wrap);
  return host;
}

const shownLong = (text: string): string => (text.length > 600 ? `${text.slice(0, 600)}…` : text);

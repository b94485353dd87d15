import type { ResultFinding } from '../../schedule/result.ts';
import { type UndersizedGroup, undersizedGroups } from '../../schedule/undersized-text.ts';
import { oneSize, sizeText } from '../format.ts';
import { named } from '../words/words.ts';
import { severityMarks } from './chips.ts';
import type { Desk } from './desk.ts';
import { make, modelText } from './element.ts';
import { fill } from './fill.ts';
import { findingSentence } from './finding-sentence.ts';
import { batteryName, capital, pipeName } from './names.ts';
import { reasonText } from './reason.ts';

const mostShown = 60;
const mostGroups = 30;

/** Findings by cause: undersized pipes that share one stand together, everything else by its code; errors first. */
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
  const groups = filter === null || filter === 'error' ? undersizedGroups(building.result) : [];
  const byCode = new Map<string, ResultFinding[]>();
  for (const finding of wanted) {
    if (finding.code === 'undersized') continue;
    const list = byCode.get(finding.code);
    if (list === undefined) byCode.set(finding.code, [finding]);
    else list.push(finding);
  }
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
    paged(
      desk,
      [
        ...groups.map((group) => () => undersizedGroup(desk, group)),
        ...[...byCode.values()].map((list) => () => codeGroup(desk, list)),
      ],
      mostGroups,
      (more) => more,
    ),
    make('p', { class: 'quiet' }, words.findings.noJudgement),
  );
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

function codeGroup(desk: Desk, list: readonly ResultFinding[]): HTMLElement {
  const { words } = desk;
  const { code, severity } = list[0]!;
  const title = capital(named(words.codes, code));
  return make(
    'section',
    { class: `finding finding-${severity}` },
    make(
      'h3',
      { class: 'finding-code' },
      make('span', { class: `mark mark-${severity}`, 'aria-hidden': 'true' }, severityMarks[severity]),
      title,
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

import { answerTexts } from '../schedule/answers-text.ts';
import { sums } from '../schedule/check-text.ts';
import { lengthText } from '../schedule/number-text.ts';
import { counted, countedKinds, plainWords, sentence } from '../schedule/trade-words.ts';
import { systemText } from '../schedule/understood-text.ts';
import { type Html, html, table, tag } from './html-element.ts';
import type { Section } from './report-section.ts';
import type { ReportSource } from './report-source.ts';

/** What was checked, by what, against which code. */
export function titleBlock({ result }: ReportSource): Html[] {
  const { program, code } = result;
  const said = answerTexts(result);
  const files = result.models ?? [result.model];
  return [
    tag('h1', 'Sanitary drainage and vents'),
    tag('p', files.map(({ file }) => file).join(', ')),
    tag(
      'dl',
      ...facts('Plumbing code', `${code.title}, ${code.edition} (${code.id})`),
      ...(code.localTables === undefined ? [] : facts('Local tables', code.localTables.join(', '))),
      ...facts('Program', `${program.name} ${program.version}`),
      ...files.flatMap(({ file, schema, lengthUnit, sha256, remarks = [] }) => [
        ...facts(file, `${schema}, ${lengthUnit.toLowerCase()}`, tag('div', tag('code', `SHA-256 ${sha256}`))),
        ...remarks.flatMap((remark) => facts('Remark', remark)),
      ]),
      ...(said.length === 0 ? [] : facts('Set and answered', said.join('; '))),
    ),
  ];
}

const facts = (term: string, ...told: readonly (Html | string)[]): Html[] => [tag('dt', term), tag('dd', ...told)];

export function summarySection(source: ReportSource): Section {
  const { result, names } = source;
  const { fixtures, pipes, systems, counts, code } = result;
  const kinds = countedKinds(fixtures.map(({ kind }) => plainWords(kind ?? 'unidentified fixture')));
  const roles = countedKinds(pipes.map(({ role }) => plainWords(role)));
  return {
    id: 'summary',
    title: 'Summary',
    parts: [
      ...sums(result).map(({ text, tone }) => html('p', tone === 'error' ? { class: 'bad' } : {}, text)),
      tag(
        'dl',
        ...facts('Fixtures', fixtures.length === 0 ? 'none' : `${fixtures.length}: ${kinds}`),
        ...facts('Pipes', pipes.length === 0 ? 'none' : `${counts.pipes}: ${roles}`),
        ...systems.flatMap((system, at) =>
          facts(systems.length === 1 ? 'Drain system' : `Drain system ${at + 1}`, systemText(system, code.unit, names)),
        ),
        ...facts('Batteries', String(result.batteries.length)),
      ),
    ],
  };
}

/** What the sizes rest on: what was read, joined, left out and not placed. */
export function basisSection({ result, names }: ReportSource): Section {
  const { joints, counts, unresolved } = result;
  const left = Object.entries(counts.leftOut).sort(([a, m], [b, n]) => n - m || (a < b ? -1 : 1));
  const widest = Math.max(0, ...joints.inferred.map(({ gap }) => gap));
  return {
    id: 'basis',
    title: 'What this rests on',
    parts: [
      tag(
        'p',
        `${counted(counts.elements, 'element')} of distribution read: ${counted(counts.pipes, 'pipe')}, ${counted(counts.fittings, 'fitting')}, ` +
          `${counted(counts.fixtures, 'fixture')}, ${counted(counts.terminals, 'terminal')}; ` +
          `${counted(joints.ports, 'joint')} by ports, ${joints.geometry} by geometry` +
          (joints.inferred.length === 0 ? '.' : `, the widest gap bridged is ${lengthText(widest)}.`),
      ),
      left.length === 0
        ? null
        : tag('ul', ...left.map(([reason, count]) => tag('li', sentence(`${count} left out: ${reason}`)))),
      unresolved.length === 0
        ? null
        : table(
            'Elements that could not be placed',
            [
              { head: 'Element', cell: ({ globalId }) => names.of(globalId) },
              { head: 'GlobalId', cell: ({ globalId }) => tag('code', globalId) },
              { head: 'Why', cell: ({ reason }) => reason },
            ],
            unresolved,
          ),
      tag(
        'p',
        'Lengths are developed lengths where the text says so; sizes are nominal. The model is not changed by this report.',
      ),
    ],
  };
}

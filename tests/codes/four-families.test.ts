import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { describe, expect, test } from 'vitest';
import { modelOf } from '../support/model-of.ts';
import { runModel, type SketchRun } from '../support/run-sketch.ts';
import { sketch } from '../support/sketch.ts';
import { givenAnswers } from '../support/worked-answer.ts';
import { workedCase, workedText } from '../support/worked-case.ts';

// The same battery, six wall urinals and two lavatories, under every family, wet vented and circuit vented, each drawn as
// the code would have it. The drawings and the sizes argued by hand stand in the open set (sample-models/worked); here
// they come into one table, as README shows it.
interface Column {
  readonly title: string;
  /** Case of the open set and place of the code's answer in it. */
  readonly wet: readonly [name: string, answer: number];
  readonly circuit: readonly [name: string, answer: number];
  /** Pipe past the last fixture of the second drawing. */
  readonly end: string;
}
const wet = (answer: number) => ['wall-urinals-wet-vented', answer] as const;
const level = (answer: number) => ['wall-urinals-circuit-vented-level', answer] as const;
const european = ['wall-urinals-on-a-ventilated-branch', 0] as const;
const columns: readonly Column[] = [
  {
    title: 'NPC 2020',
    wet: wet(0),
    circuit: ['wall-urinals-circuit-vented-lavatories-on-the-vent', 0],
    end: 'RV-K',
  },
  { title: 'IPC 2021', wet: wet(1), circuit: level(0), end: 'RV-S2' },
  { title: 'UPC 2021, public', wet: wet(2), circuit: level(1), end: 'RV-S2' },
  { title: 'UPC 2021, assembly', wet: wet(3), circuit: level(2), end: 'RV-S2' },
  { title: 'EN 12056-2', wet: european, circuit: european, end: 'J6-K' },
];

function runOf([name, at]: Column['wet']): SketchRun {
  const answer = workedCase(name).answers[at]!;
  const model = modelOf(sketch(workedText(name, 'piping')), { ports: true, sizes: true });
  return runModel(model, { code: answer.code, answers: givenAnswers(answer, name) });
}

/** What stands in one cell: allowed, or the condition that is broken. */
const verdictOf = (run: SketchRun, reading: string): string => {
  const [row] = run.result.batteries;
  const found = row?.reading === reading ? row : row?.others.find((one) => one.reading === reading);
  if (found === undefined) return 'no such vent';
  return found.broken.length === 0 ? 'allowed' : `not allowed (${found.broken[0]?.clause})`;
};
const sizeOf = (run: SketchRun, role: string): string => {
  const sizes = run.result.pipes
    .filter((pipe) => pipe.role === role)
    .map(({ required }) => required?.most?.label ?? 'none');
  return sizes.length === 0 ? '-' : [...new Set(sizes)].join(', ');
};

function columnOf({ wet: asWet, circuit, end }: Column): string[] {
  const wetRun = runOf(asWet);
  const run = runOf(circuit);
  const wetVerdict = verdictOf(wetRun, 'wet-vent');
  const other = run.result.batteries[0]?.reading === 'ventilated-branch';
  return [
    String(run.pipe(end).load.most),
    wetVerdict,
    wetVerdict === 'allowed' ? sizeOf(wetRun, 'wet-vent') : '-',
    other ? 'as a ventilated branch' : verdictOf(run, 'circuit-vent'),
    other ? run.size('J5-J6') : sizeOf(run, 'circuit-vented-branch'),
    other ? run.size('LJ-VT') : sizeOf(run, 'circuit-vent'),
    sizeOf(run, 'relief-vent'),
  ];
}
const lines = ['load', 'wet vented', 'wet vent', 'circuit vented', 'its branch', 'its vent', 'its relief vent'];

describe('six wall urinals and two lavatories under every family', () => {
  const cells = columns.map(columnOf);

  test('the table is the one that README shows', () => {
    const table = [
      `| | ${columns.map(({ title }) => title).join(' | ')} |`,
      `| --- |${columns.map(() => ' --- |').join('')}`,
      ...lines.map((line, at) => `| ${line} | ${cells.map((column) => column[at]).join(' | ')} |`),
    ];
    process.stdout.write(`\n${table.join('\n')}\n`);
    const readme = readFileSync(resolve(import.meta.dirname, '../../README.md'), 'utf8').split('\n');
    const shown = readme.indexOf(table[0]!);
    expect(readme.slice(shown, shown + table.length)).toEqual(table);
  });

  test('National Plumbing Code: 11; wet vent 3 in; branch 3 in, vents 1½ in (Tables 2.5.8.1., 2.4.10.6.-B, 2.5.7.1.)', () => {
    expect(cells[0]).toEqual(['11', 'allowed', '3 in', 'allowed', '3 in', '1½ in', '1½ in']);
  });

  test('IPC-W01, W02: 14; no wet vent; branch 3 in, circuit vent 1½ in, no relief vent', () => {
    expect(cells[1]).toEqual(['14', 'not allowed (912.1)', '-', 'allowed', '3 in', '1½ in', '-']);
  });

  test('UPC-W01, W02: 14; no wet vent; branch 3 in, circuit vent 2 in, no relief vent', () => {
    expect(cells[2]).toEqual(['14', 'not allowed (908.2)', '-', 'allowed', '3 in', '2 in', '-']);
  });

  test('UPC-W03, assembly: 32; branch 3 in, circuit vent 3 in', () => {
    expect(cells[3]).toEqual(['32', 'not allowed (908.2)', '-', 'allowed', '3 in', '3 in', '-']);
  });

  test('EN 12056-2: 5.8; 0.7 x root = 1.69 l/s: DN 70 with a vent of DN 50', () => {
    expect(cells[4]).toEqual(['5.8', 'no such vent', '-', 'as a ventilated branch', 'DN 70', 'DN 50', '-']);
  });
});

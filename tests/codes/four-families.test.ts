import { describe, expect, test } from 'vitest';
import type { Settings } from '../../src/model/answers.ts';
import { circuitVentedRow, times, wetVentedRow } from '../support/rows.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';
import { at48, circuitRowToStack } from '../support/stack-rows.ts';

// The same battery, six wall urinals and two lavatories, under every family, each drawn as the code would have it: what each
// allows, and with what sizes. Worked by hand: IPC-W01, W02; UPC-W01 to W03; National Plumbing Code Tables 2.4.9.3.,
// 2.4.10.6.-B, 2.5.8.1. and 2.5.8.3.; EN 12056-2 Tables 2 and 7, K 0.7, which knows ventilated branches instead.
const urinal = 'urinal, washout, trap 2 in';
const wetDrawing = at48(wetVentedRow(times(6, urinal)));
const levelRow = circuitRowToStack([...times(6, urinal), ...times(2, 'lavatory, trap 1 1/4 in')], { run: 0.6 });
/** Outlets of less than 2 in keep off the branch there: the lavatories drain into the upright part of the circuit vent. */
const canadianRow = circuitVentedRow(times(6, urinal), { lavatories: true });
const europeanRow = wetVentedRow(times(6, 'urinal, wall, tank, trap 2 in'));

interface Column {
  readonly title: string;
  readonly code: string;
  readonly settings: Settings;
  readonly wet: string;
  readonly circuit: string;
  /** Pipe past the last fixture, in both drawings and in the second. */
  readonly end: string;
}
const inches = { omitSizes: ['2½ in'] };
const american = { wet: wetDrawing, circuit: levelRow, end: 'RV-S2' };
const columns: readonly Column[] = [
  { title: 'NPC 2020', code: 'npc-2020', settings: inches, wet: wetDrawing, circuit: canadianRow, end: 'RV-K' },
  { title: 'IPC 2021', code: 'ipc-2021', settings: { ...inches, use: 'public' }, ...american },
  { title: 'UPC 2021, public', code: 'upc-2021', settings: { ...inches, use: 'public' }, ...american },
  { title: 'UPC 2021, assembly', code: 'upc-2021', settings: { ...inches, use: 'assembly' }, ...american },
  {
    title: 'EN 12056-2',
    code: 'en12056-2000',
    settings: { K: 0.7 },
    wet: europeanRow,
    circuit: europeanRow,
    end: 'J6-K',
  },
];

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

function columnOf({ code, settings, wet, circuit, end }: Column): string[] {
  const wetRun = runSketch(wet, { code, answers: { settings } });
  const run = runSketch(circuit, { code, answers: { settings } });
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

  test('the table, as README shows it', () => {
    const table = [
      `| | ${columns.map(({ title }) => title).join(' | ')} |`,
      `|---|${columns.map(() => '---').join('|')}|`,
      ...lines.map((line, at) => `| ${line} | ${cells.map((column) => column[at]).join(' | ')} |`),
    ].join('\n');
    process.stdout.write(`\n${table}\n`);
    expect(table.split('\n')).toHaveLength(lines.length + 2);
  });

  test('National Plumbing Code: wall urinals (washout) 1.5, lavatories 1: 11; wet vent 3 in takes 12; branch 3 in', () => {
    // On the wet vent 2 + 5 x 1.5 = 9.5 count: 2 in takes 4, 3 in 12.
    expect(cells[0]?.slice(0, 5)).toEqual(['11', 'allowed', '3 in', 'allowed', '3 in']);
  });

  test('… its vents: 2 in traps ask for 1½ in (Table 2.5.7.1.), wet portion 2 units, 1½ in (Table 2.5.8.1.)', () => {
    expect(cells[0]?.slice(5)).toEqual(['1½ in', '1½ in']);
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

  test('EN 12056-2: six urinals of 0.8 and two basins of 0.5, 5.8; 0.7 x root = 1.69 l/s: DN 70 with a vent of DN 50', () => {
    expect(cells[4]).toEqual(['5.8', 'no such vent', '-', 'as a ventilated branch', 'DN 70', 'DN 50', '-']);
  });
});

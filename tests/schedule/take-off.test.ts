import { describe, expect, test } from 'vitest';
import { csvText } from '../../src/schedule/csv-text.ts';
import { takeOff, takeOffCsv } from '../../src/schedule/take-off.ts';
import { outcomeOf, sampleText } from '../support/weigh-sketch.ts';

describe('the hall, circuit vented, taken off by hand from its sketch', () => {
  const rows = takeOff(outcomeOf(sampleText('hall-circuit-vented')));
  const of = (what: string, size: string) => rows.filter((row) => row.what === what && row.size === size);
  const slope = Math.hypot(1, 0.02);

  test.each([
    ['relief vent', '1½ in', 2, 2.992 + Math.hypot(4.2, 0.042), 'RV at -0.492 to 2.5; 4.2 level, rising 1:100'],
    ['circuit vented branch', '3 in', 7, 4.2 * slope, 'CV to RV: 0.3 + 5 x 0.7 + 0.4 at 1:50'],
    ['circuit vent', '1½ in', 3, 0.48 + 0.408 + 2.542 - 0.48, 'CV at -0.408 over LJ at 0.48 to VJ at 2.542'],
    ['branch vent', '1½ in', 1, 3.9 - 2.542, 'VJ to VT1'],
    [
      'fixture drain',
      '1¼ in',
      4,
      2 * (0.12 + Math.hypot(0.55, 0.011)),
      'tail 0.12; arm 0.4 and 0.15 at 1:50, one piece',
    ],
  ])('%s %s: %i pipes, %f m developed (%s)', (what, size, count, length) => {
    const found = of(what, size);
    expect(found.reduce((sum, row) => sum + row.count, 0)).toBe(count);
    const developed = found.reduce((sum, row) => sum + (row.developedLength ?? 0), 0);
    // The arm of a lavatory bends in plan: what is drawn as one piece may be shorter than both legs, not longer.
    if (what === 'fixture drain') expect(developed).toBeLessThanOrEqual(length + 0.001);
    else expect(developed).toBeCloseTo(length, 3);
  });

  test('cleanouts: 1½ in on the lavatories’ drop, 3 in at the building drain', () => {
    expect(rows.filter(({ item }) => item === 'cleanout').map(({ size, count }) => [size, count])).toEqual([
      ['3 in', 1],
      ['1½ in', 1],
    ]);
  });

  test('every pipe of the model stands in it once or more, with its storey and material', () => {
    const outcome = outcomeOf(sampleText('dwelling'));
    const pipes = takeOff(outcome).filter(({ item }) => item === 'pipe');
    const all = outcome.network.pipes
      .filter(({ element }) => element !== null)
      .reduce((sum, { length }) => sum + length, 0);
    expect(pipes.reduce((sum, { length }) => sum + (length ?? 0), 0)).toBeCloseTo(all, 6);
    expect(new Set(pipes.map(({ storey }) => storey))).toEqual(new Set(['Basement', 'Ground floor', 'Upper floor']));
    expect(new Set(pipes.map(({ material }) => material))).toEqual(new Set(['PVC-DWV']));
  });
});

describe('CSV that no spreadsheet takes for a formula', () => {
  test.each([
    ['=1+1', "'=1+1"],
    ['+49', "'+49"],
    ['-2', "'-2"],
    ['@cmd', "'@cmd"],
    [' =A1', "' =A1"],
    ['\t=A1', "'\\u{9}=A1"],
    ['\uFF1DA1', "'\uFF1DA1"],
    ['a,b', '"a,b"'],
    ['say "so"', '"say ""so"""'],
    ['plain', 'plain'],
    ['3 in × 2 in', '3 in × 2 in'],
  ])('%j is written %s', (text, written) => {
    expect(csvText([[text, 1.5]])).toBe(`\uFEFF${written},1.5\r\n`);
  });

  test('names of the model are text, whatever they say; every row has nine fields', () => {
    const text = sampleText('hall-circuit-vented')
      .replace('storey "Ground floor"', 'storey "=HYPERLINK(1)"')
      .replace('model "', 'material "-1+1"\nmodel "');
    const csv = takeOffCsv(outcomeOf(text));
    expect(csv).toContain("'=HYPERLINK(1)");
    expect(csv).not.toMatch(/(^|,)"?[=+@-]/m);
    const lines = csv.trimEnd().split('\r\n');
    expect(lines.length).toBeGreaterThan(20);
    for (const line of lines.slice(0, -2)) expect(line.match(/,(?=(?:[^"]*"[^"]*")*[^"]*$)/g)?.length).toBe(8);
    expect(lines.at(-1)).toContain('licensed person');
  });
});

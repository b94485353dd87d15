import { describe, expect, test } from 'vitest';
import { demandText } from '../../src/schedule/demand-text.ts';
import { explain } from '../../src/schedule/explain.ts';
import { findInResult } from '../../src/schedule/find-in-result.ts';
import type { TrailStep } from '../../src/schedule/result.ts';
import { europeanTower } from '../support/european.ts';
import { circuitVentedRow, times, wetVentedRow } from '../support/rows.ts';
import { codeOf, runSketch } from '../support/run-sketch.ts';
import { tower } from '../support/towers.ts';

const said = (facts: TrailStep['facts'], step: Partial<TrailStep> = {}, unit = 'fixture units'): string =>
  demandText(
    {
      rule: 'X',
      title: 'A demand',
      clause: '1.2.3.',
      table: null,
      row: null,
      asks: { label: '4 in', dn: 100 },
      governs: false,
      trust: 'published',
      ...step,
      facts,
    },
    unit,
    (globalId) => `<${globalId}>`,
  );

describe('a demand is a sentence: the size, what it holds, what for, where it is printed', () => {
  test.each<[TrailStep['facts'], string]>([
    [{ loadUnits: 14, limitUnits: 36 }, '4 in, which holds 36, for 14 fixture units'],
    [
      { loadUnits: 14, column: 'no water closet served', leftOut: 1, closets: 0, limitUnits: 36 },
      '4 in, which holds 36, for 14 fixture units with no water closet served and 1 fixture left out',
    ],
    [
      { loadUnits: 2.5, column: 'water closets served', leftOut: 2, closets: 1, limitUnits: 3 },
      '4 in, which holds 3, for 2.5 fixture units, 1 water closet and 2 fixtures left out',
    ],
    [
      { loadUnits: 64, storey: 'Level 4', column: 'one storey', limitUnits: 100 },
      '4 in, which holds 100, for 64 fixture units from one storey on Level 4',
    ],
    [
      { loadUnits: 40, slope: 0.02, slopeAssumed: false, columnSlope: 0.02, limitUnits: 240 },
      '4 in, which holds 240, for 40 fixture units at 2 % (1:50)',
    ],
    [
      { loadUnits: 40, slope: 0.015, slopeAssumed: false, columnSlope: 0.01, limitUnits: 180 },
      '4 in, which holds 180, for 40 fixture units at 1.5 % (1:67) in the column of 1 % (1:100)',
    ],
    [
      { stackSize: '4 in', loadUnits: 60, lengthM: 18.41, row: '4 in, up to 140', limitM: 61 },
      '4 in, which reaches 61 m, for 60 fixture units, a stack of 4 in and 18.41 m',
    ],
    [{ loadUnits: 8, lengthM: 40, limitM: 'NL' }, '4 in, which has no limit of length, for 8 fixture units and 40 m'],
    [{ stackSize: '4 in', demand: 'half the stack' }, '4 in for half of a stack of 4 in'],
    [{ closets: 8, closetsMost: 6 }, '4 in for 8 water closets, 6 at most'],
    [{ trap: '2 in', demand: 'trap' }, '4 in for a trap of 2 in'],
    [{ upstream: 'A', vent: false }, '4 in; as large as <A>, which joins it'],
    [{ upstream: 'A', vent: true }, '4 in; as large as the vent <A>, which joins it'],
    [{ circuitVent: '4 in', most: '2 in' }, '4 in for a circuit vent of 4 in; never asked above 2 in'],
    [
      { requiredDrain: '3 in', lengthM: 20, stepAboveM: 12.19, oneSizeUp: true },
      '4 in for a drain of 3 in and 20 m; one size up, past 12.19 m',
    ],
    [{ setting: 'sewerFloor' }, '4 in; by the setting sewerFloor'],
    [{}, '4 in'],
    [{ somethingNewM: 2.5 }, '4 in; something new 2.5 m'],
  ])('%j: %s', (facts, text) => {
    expect(said(facts)).toBe(`A demand: ${text} (1.2.3.)`);
  });

  test('a flow tells how it came about', () => {
    const root = { loadUnits: 20, frequencyFactor: 0.5, wastewaterLps: 2.236, flowLps: 2.236, limitLps: 2.7 };
    expect(said(root, {}, 'l/s of discharge units')).toBe(
      'A demand: 4 in, which carries 2.7 l/s, for 2.24 l/s (20 l/s of discharge units, K 0.5: 2.24 l/s) (1.2.3.)',
    );
    expect(said({ ...root, loadUnits: 2.5, wastewaterLps: 0.79, largestLps: 2.5, flowLps: 2.5 }, {}, 'l/s')).toContain(
      'for 2.5 l/s (its largest appliance; 2.5 l/s, K 0.5: 0.79 l/s)',
    );
  });

  test('no size: what the last one holds; a row; a figure from memory', () => {
    expect(said({ loadUnits: 38, limitUnits: 36 }, { asks: null, row: '4 in', trust: 'memory' })).toBe(
      'A demand: no size of the table, whose last size holds 36, for 38 fixture units (1.2.3., row 4 in; figure not yet checked against print)',
    );
  });
});

test('a storey goes by the name that the model gives it', () => {
  // Six showers of 3 on storey 2: 18, the limit of 3 in from one storey.
  const it = runSketch(tower([[], times(6, 'shower, heads 2, trap 2 in')]));
  const step = it.pipe('S2-SF').trail.find(({ rule }) => rule === 'NPC-R17-storey');
  expect([step?.facts.loadUnits, step?.facts.storey]).toEqual([18, 'Storey 2']);
});

describe('why not smaller: what the smaller size holds, in what its table counts', () => {
  const why = (text: string, pipe: string, code = 'npc-2020'): string => {
    const { result } = runSketch(text, { code });
    const sizes = codeOf(code).series.sizes.map(({ label, dn }) => ({ label, dn }));
    return explain(result, findInResult(result, pipe), sizes).story.find((line) => line.startsWith('Why not'))!;
  };

  test('a length of vent: eight pedestal urinals, 32, 16.6 m: row 42, 1½ in reaches 9 m', () => {
    const row = circuitVentedRow(times(8, 'urinal, pedestal, trap 2 in'), { run: 12 });
    expect(why(row, 'CV-VJ')).toBe(
      'Why not 1½ in? 1½ in reaches 9 m. “Vent by load and length” asks for 2 in (2.5.3.1.(11); 2.5.8.3.(1),(4), row up to 42).',
    );
  });

  test('a load: seven stall urinals wet vented, 14: 3 in holds 12', () => {
    const row = wetVentedRow(times(7, 'urinal, stall, trap 2 in'));
    expect(why(row, 'J5-J6')).toContain('3 in holds 12. “Load that sizes a wet vent” asks for 4 in');
  });

  test('a flow: sixteen closets, K 0.5, 2.83 l/s at 1 %: DN 100 half full carries 2.50', () => {
    const floors = times(4, '').map(() => ({ west: times(2, 'closet'), east: times(2, 'closet') }));
    expect(why(europeanTower(floors, { slope: '1:100' }), 'SF-OUT', 'en12056-2000')).toMatch(
      /^Why not DN 100\? DN 100 holds 2\.5 l\/s\. .* asks for DN 125 \(6\.6\)\.$/,
    );
  });
});

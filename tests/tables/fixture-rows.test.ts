import { describe, expect, test } from 'vitest';
import { type FixtureFacts, fixtureRowsFor, largestTrap, loadAtTrap } from '../../src/tables/fixture-rows.ts';
import { inches, openOwn } from '../support/table-files.ts';

const npc = openOwn('npc-2020');
const rowsFor = (facts: FixtureFacts) => fixtureRowsFor(npc.kinds, npc.table('fixtures'), facts);

describe('which rows of Table 2.4.9.3. a fixture may be', () => {
  const cases: readonly [facts: FixtureFacts, rows: readonly string[], why: string][] = [
    [{ kind: 'water-closet', flush: 'tank' }, ['wc-tank'], 'known'],
    [{ kind: 'water-closet', flush: null }, ['wc-tank', 'wc-valve'], 'tank or valve: lightest and heaviest'],
    [{ kind: 'urinal', style: 'stall' }, ['urinal-stall'], 'known'],
    [{ kind: 'urinal', style: 'wall' }, ['urinal-wall-washout', 'urinal-wall-other'], 'on the wall, its flush unknown'],
    [
      { kind: 'urinal', style: null },
      ['urinal-pedestal', 'urinal-stall', 'urinal-wall-washout', 'urinal-wall-other'],
      'any of the four',
    ],
    [{ kind: 'lavatory', style: null }, ['lavatory-domestic'], 'nobody says barber, so it is none'],
    [{ kind: 'lavatory', style: 'barber' }, ['lavatory-barber'], 'said to be one'],
    [{ kind: 'wash-fountain' }, ['lavatory-multiple'], 'several users at once'],
    [{ kind: 'sink', domestic: null }, ['sink-domestic', 'sink-other'], 'either'],
    [{ kind: 'kitchen-sink', domestic: true }, ['sink-domestic'], 'known'],
    [{ kind: 'mop-sink' }, ['sink-other'], 'named among the other sinks'],
    [{ kind: 'shower', heads: null }, ['shower-1'], 'one head unless more are said'],
    [{ kind: 'shower', heads: 3 }, ['shower-2-3'], 'known'],
    [{ kind: 'shower', heads: 6 }, ['shower-4-6'], 'known'],
    [{ kind: 'shower', heads: 7 }, [], 'past the printed rows'],
    [{ kind: 'floor-drain', emergency: null }, ['floor-drain'], 'nobody says emergency'],
    [{ kind: 'floor-drain', emergency: true }, ['emergency-floor-drain'], 'said to be one'],
    [{ kind: 'clinical-sink' }, [], 'not listed: Table 2.4.10.2. by its trap'],
    [{ kind: 'other-fixture', style: 'autopsy-table' }, ['autopsy-table'], 'said to be one'],
    [{ kind: 'other-fixture', style: null }, [], 'not listed'],
  ];
  for (const [facts, rows, why] of cases)
    test(`${Object.values(facts).join(' ')}: ${rows.join(', ') || 'none'} (${why})`, () => {
      expect(rowsFor(facts).map(({ key }) => key)).toEqual(rows);
    });
});

describe('the load of a row by its trap', () => {
  const cases: readonly [facts: FixtureFacts, trap: string | null, fu: number | null, why: string][] = [
    [{ kind: 'floor-drain' }, '2', 2, 'printed'],
    [{ kind: 'floor-drain' }, '3', 3, 'printed'],
    [{ kind: 'floor-drain' }, '2 1/2', 3, 'between two, the larger'],
    [{ kind: 'floor-drain' }, '4', null, 'past 3 in: Table 2.4.10.2.'],
    [{ kind: 'mop-sink' }, '3', 3, 'RULES example: a mop sink with a 3 in trap'],
    [{ kind: 'mop-sink' }, '4', 3, 'past the largest: its load'],
    [{ kind: 'lavatory' }, '1 1/2', 1.5, 'printed'],
    [{ kind: 'lavatory' }, null, 1, 'trap unknown: the smallest'],
    [{ kind: 'bathtub' }, '2', 1.5, 'one load for every trap'],
    [{ kind: 'wash-fountain' }, '1 1/2', null, 'by trap, Table 2.4.10.2.'],
  ];
  for (const [facts, trap, fu, why] of cases)
    test(`${facts.kind}, trap ${trap ?? 'unknown'}: ${fu ?? 'another table'} (${why})`, () => {
      const row = rowsFor(facts)[0]!;
      const load = loadAtTrap(row, trap === null ? null : inches(trap), npc.series);
      expect(load === null ? null : load.value / 60).toBe(fu);
      if (fu === null) expect(row.loadFrom).toBe('loads-by-trap');
    });

  test('largest trap that is printed', () => {
    expect(largestTrap(rowsFor({ kind: 'mop-sink' })[0]!)).toBe('3 in');
    expect(largestTrap(rowsFor({ kind: 'bathtub' })[0]!)).toBeNull();
  });

  test('a fixture of no row takes the table by trap', () => {
    expect(npc.kinds.unlisted).toBe('loads-by-trap');
  });
});

test('every row of the printed table is reached by some kind, groups apart', () => {
  const reached = new Set(npc.kinds.entries.flatMap(({ rows }) => rows));
  const missed = npc
    .table('fixtures')
    .rows.filter(({ name }) => !reached.has(name))
    .map(({ name }) => name);
  expect(missed).toEqual(['bathroom-group-tank', 'bathroom-group-valve']);
});

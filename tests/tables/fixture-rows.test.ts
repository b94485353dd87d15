import { describe, expect, test } from 'vitest';
import {
  allFixtureRows,
  type FixtureFacts,
  fixtureRowsFor,
  loadAtTrap,
  trapRange,
  unlistedFixture,
} from '../../src/tables/fixture-rows.ts';
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
    [{ kind: 'shower', heads: 1 }, ['shower-1'], 'known'],
    [{ kind: 'shower', heads: null }, ['shower-1', 'shower-2-3', 'shower-4-6'], 'several, but nobody says how many'],
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
  const cases: readonly [facts: FixtureFacts, trap: string | null, fu: number | null, table: string, why: string][] = [
    [{ kind: 'floor-drain' }, '2', 2, 'fixtures', 'printed'],
    [{ kind: 'floor-drain' }, '3', 3, 'fixtures', 'printed'],
    [{ kind: 'floor-drain' }, '2 1/2', 3, 'fixtures', 'between two, the larger'],
    [{ kind: 'floor-drain' }, '4', 6, 'loads-by-trap', 'past 3 in: Table 2.4.10.2.'],
    [{ kind: 'floor-drain' }, '5', null, '', 'past that table too'],
    [{ kind: 'mop-sink' }, '3', 3, 'fixtures', 'RULES example: a mop sink with a 3 in trap'],
    [{ kind: 'mop-sink' }, '4', 3, 'fixtures', 'past the largest: its load'],
    [{ kind: 'lavatory' }, '1 1/2', 1.5, 'fixtures', 'printed'],
    [{ kind: 'lavatory' }, null, 1, 'fixtures', 'trap unknown: the smallest'],
    [{ kind: 'bathtub' }, '2', 1.5, 'fixtures', 'one load for every trap'],
    [{ kind: 'wash-fountain' }, '1 1/2', 2, 'loads-by-trap', 'by trap, Table 2.4.10.2.'],
  ];
  for (const [facts, trap, fu, table, why] of cases)
    test(`${facts.kind}, trap ${trap ?? 'unknown'}: ${fu ?? 'no figure'} (${why})`, () => {
      const load = loadAtTrap(rowsFor(facts)[0]!, trap === null ? null : inches(trap), npc);
      expect(load === null ? null : load.value / 60).toBe(fu);
      if (load !== null) expect(load.place.table).toBe(table);
    });

  test('RULES example: a laboratory sink of an odd kind on a 2 in trap counts 3', () => {
    const row = unlistedFixture(npc)!;
    expect(loadAtTrap(row, inches('2'), npc)?.value).toBe(180);
    expect(trapRange(row, npc)).toEqual({ least: '1¼ in', largest: '4 in' });
  });

  const ranges: readonly [facts: FixtureFacts, least: string, largest: string, why: string][] = [
    [{ kind: 'mop-sink' }, '1 1/2', '3', 'loads for three traps'],
    [{ kind: 'bathtub' }, '1 1/2', '1 1/2', 'print names one'],
    [{ kind: 'floor-drain' }, '2', '4', 'past 3 in by Table 2.4.10.2.'],
    [{ kind: 'clothes-washer', domestic: true }, '2', '2', 'no outlet size, a 2 in trap'],
  ];
  for (const [facts, least, largest, why] of ranges)
    test(`traps of a ${facts.kind}: ${least} to ${largest} in (${why})`, () => {
      expect(trapRange(rowsFor(facts)[0]!, npc)).toEqual({ least: inches(least), largest: inches(largest) });
    });
});

test('an unidentified fixture is measured by every row, groups apart', () => {
  const all = allFixtureRows(npc.kinds, npc.table('fixtures'));
  expect(new Set(all.map(({ key }) => key)).size).toBe(34);
  expect(all.some(({ kind }) => kind === 'water-closet')).toBe(true);
  expect(all.some(({ key }) => key.startsWith('bathroom-group'))).toBe(false);
});

test('every row of the printed table is reached by some kind, groups apart', () => {
  const reached = new Set(npc.kinds.entries.flatMap(({ rows }) => rows));
  const missed = npc
    .table('fixtures')
    .rows.filter(({ name }) => !reached.has(name))
    .map(({ name }) => name);
  expect(missed).toEqual(['bathroom-group-tank', 'bathroom-group-valve']);
});

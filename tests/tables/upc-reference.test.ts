import {
  type Case,
  type CellOf,
  compareFamily,
  orNA,
  plain,
  same,
  sized,
  sizedOrNA,
} from '../support/compare-family.ts';

// Every cell against the figures that it was typed from.
const loadFor =
  (use: string): CellOf =>
  (row) =>
    row.key === 'floor-drain' ? { '2 in': row[use] } : (row[use] ?? 'NA');
const pair =
  (slope: string, at: 0 | 1): CellOf =>
  (row) =>
    (row[slope] as readonly number[])[at];
const upc: readonly Case[] = [
  {
    table: 'fixtures',
    file: 'table-702.1',
    cells: 42 * 6,
    expected: {
      fixture: plain('key'),
      trap: sizedOrNA('trapSize'),
      private: loadFor('private'),
      public: loadFor('public'),
      assembly: loadFor('assembly'),
      drain: sizedOrNA('minDrain'),
    },
  },
  { table: 'loads-by-trap', file: 'table-702.2-1', cells: 10, expected: { trap: sized('trap'), load: plain('load') } },
  {
    table: 'loads-by-flow',
    file: 'table-702.2-2',
    cells: 12,
    rows: (rows) => rows.filter(({ toGpm }) => toGpm !== null),
    expected: { flow: plain('toGpm'), from: plain('fromGpm'), load: plain('load') },
  },
  {
    table: 'drains-and-vents',
    file: 'table-703.2',
    cells: 77,
    expected: {
      size: sized('size'),
      ...same('vertical', 'horizontal'),
      verticalLength: plain('verticalLengthFt'),
      horizontalLength: plain('horizontalLengthFt'),
      vent: orNA('ventUnits'),
      ventLength: orNA('ventLengthFt'),
    },
  },
  {
    table: 'cleanouts',
    file: 'table-707.1',
    cells: 10,
    expected: { pipe: sized('pipe'), cleanout: plain('cleanout') },
  },
  {
    table: 'sewer',
    file: 'table-717.1',
    cells: 21,
    rows: (rows) => rows.filter(({ size }) => typeof size === 'number'),
    expected: {
      size: sized('size'),
      ...Object.fromEntries(['1:192', '1:96', '1:48'].map((slope) => [slope, pair(slope, 0)])),
      ...Object.fromEntries(['1:192', '1:96', '1:48'].map((slope) => [`least ${slope}`, pair(slope, 1)])),
    },
  },
  {
    table: 'trap-arm',
    file: 'table-1002.2',
    cells: 12,
    expected: { shortest: (row) => (typeof row.minIn === 'number' ? row.minIn : 'NA'), longest: plain('maxFt') },
  },
];

compareFamily('upc', 'upc-2015', upc, 66);

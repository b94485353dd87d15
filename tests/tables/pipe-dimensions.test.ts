import { existsSync, readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { describe, expect, test } from 'vitest';
import { readPipeDimensions } from '../../src/tables/read-pipe-dimensions.ts';
import { asInches, openOwn, ownTables, type ReferenceRow, writtenTables } from '../support/table-files.ts';

const dimensions = readPipeDimensions(ownTables);
const rowOf = (series: string, size: string) =>
  dimensions.find(({ id }) => id === series)?.rows.find((row) => row.size === size);

describe('pipe as made, diameters in millimetres', () => {
  const cases: readonly [
    series: string,
    size: string,
    outer: number,
    inner: number,
    fitting: number | null,
    dn: number,
    source: string,
  ][] = [
    ['abs-dwv-40', '1½ in', 48.26, 40.89, 56.64, 40, 'ASTM D2661: 1.900 x 0.145 in'],
    ['pvc-dwv-40', '2 in', 60.325, 52.5, 68.58, 50, 'ASTM D2665: 2.375 x 0.154 in'],
    ['pvc-dwv-40', '3 in', 88.9, 77.93, 100.58, 80, 'ASTM D2665: 3.500 x 0.216 in'],
    ['pvc-dwv-40', '4 in', 114.3, 102.26, 127.51, 100, 'ASTM D2665: 4.500 x 0.237 in'],
    ['copper-dwv', '3 in', 79.375, 76.96, 85.725, 80, 'ASTM B306: 3.125 in; fittings 3 3/8 in'],
    ['ci-no-hub', '4 in', 111.25, 100.08, 123.95, 100, 'CISPI 301: 4.38 in'],
    ['pp-ht', '110 mm', 110, 104.6, null, 100, 'EN 1451-1: 110 x 2.7 mm'],
    ['pp-ht', '75 mm', 75, 71.2, null, 70, 'EN 1451-1: 75 x 1.9 mm'],
    ['pe-1519', '56 mm', 56, 50, null, 56, 'EN 1519-1: 56 x 3.0 mm'],
    ['ci-877', 'DN 125', 135, 127, null, 125, 'EN 877: 135 x 4.0 mm'],
  ];
  for (const [series, size, outer, inner, fitting, dn, source] of cases)
    test(`${series} ${size}: ${outer} outside (${source})`, () => {
      const row = rowOf(series, size);
      expect(row?.outerMm).toBeCloseTo(outer, 2);
      expect(row?.innerMm).toBeCloseTo(inner, 2);
      if (fitting === null) expect(row?.fittingMm).toBeNull();
      else expect(row?.fittingMm).toBeCloseTo(fitting, 2);
      expect(row?.dn).toBe(dn);
    });

  test('thirteen series, eight of North America and five of Europe', () => {
    const of = (region: string) => dimensions.filter((series) => series.region === region).length;
    expect([dimensions.length, of('north-america'), of('europe')]).toEqual([13, 8, 5]);
  });

  test('every North American row is of its size and DN as the code lists them', () => {
    const sizes = new Map(openOwn('npc-2020').series.sizes.map(({ label, dn }) => [String(label), dn]));
    const rows = dimensions.filter(({ region }) => region === 'north-america').flatMap((series) => series.rows);
    expect(rows.filter(({ size, dn }) => sizes.get(size) !== dn)).toEqual([]);
    expect(rows.length).toBeGreaterThan(55);
  });

  test('no outside diameter means two sizes of the code within 0.6 mm', () => {
    const known = new Set(openOwn('npc-2020').series.sizes.map(({ dn }) => dn));
    const all = dimensions
      .flatMap(({ id, rows }) => rows.map((row) => ({ id, ...row })))
      .filter(({ dn }) => known.has(dn));
    const clashes = all.flatMap((a) =>
      all
        .filter((b) => b.dn > a.dn && Math.abs(a.outerMm - b.outerMm) <= 0.6)
        .map((b) => `${a.id} ${a.size}, ${b.id} ${b.size}`),
    );
    expect(clashes).toEqual([]);
    expect(all.length).toBeGreaterThan(80);
  });
});

describe('what the reader refuses', () => {
  const sound = {
    id: 'demo',
    title: 'Demonstration pipe',
    standard: 'none',
    region: 'europe',
    unit: 'mm',
    trust: 'memory',
    fittingTrust: 'memory',
    seen: 'invented',
    rows: [{ size: '110 mm', dn: 100, outer: 110, inner: 104, fitting: 128 }],
  };
  const read = (series: readonly object[]) => () =>
    readPipeDimensions(writtenTables({ 'shared/pipe-dimensions.json': { series } }));
  const place = 'tables/shared/pipe-dimensions.json: series';
  test('a sound series is read', () => expect(read([sound])()).toHaveLength(1));
  test('a series twice', () => expect(read([sound, sound])).toThrow(`${place}: "demo" stands twice`));
  test('an unknown unit', () =>
    expect(read([{ ...sound, unit: 'ft' }])).toThrow(`${place}[0].unit: is "ft", expected in, mm`));
  test('a bore wider than the pipe', () => {
    const rows = [{ ...sound.rows[0], inner: 111 }];
    expect(read([{ ...sound, rows }])).toThrow(`${place}[0].rows[0].inner: is not below the outside diameter`);
  });
  test('a missing diameter', () => {
    const rows = [{ size: '110 mm', dn: 100, inner: 104, fitting: null }];
    expect(read([{ ...sound, rows }])).toThrow(`${place}[0].rows[0].outer: missing`);
  });
  test('sizes that do not rise', () => {
    expect(read([{ ...sound, rows: [sound.rows[0], sound.rows[0]] }])).toThrow(
      'rows[1].outer: outside diameters do not rise',
    );
  });
});

const reference = resolve(import.meta.dirname, '../../../shared/checks/pipe-dimensions.json');
const there = existsSync(reference);
describe.skipIf(!there)(`against the reference${there ? '' : ' (not there: nothing compared)'}`, () => {
  test('every diameter of every series', () => {
    const theirs = JSON.parse(readFileSync(reference, 'utf8')).series as readonly {
      readonly id: string;
      readonly rows: readonly ReferenceRow[];
    }[];
    expect(theirs.map(({ id }) => id)).toEqual(dimensions.map(({ id }) => id));
    let seen = 0;
    for (const [index, { id, rows }] of theirs.entries())
      for (const [line, row] of rows.entries()) {
        const ours = dimensions[index]?.rows[line];
        const inchRow = row.nominalIn !== undefined;
        if (inchRow) expect(ours?.size).toBe(asInches(row.nominalIn));
        for (const [have, want] of [
          [ours?.outerMm, row.odMm],
          [ours?.innerMm, row.idMm],
          [ours?.fittingMm, row.fittingOdMm ?? null],
          [ours?.dn, row.dn12056 ?? row.dn],
        ]) {
          seen += 1;
          // The reference prints tenths of a millimetre.
          if (want === null) expect(have).toBeNull();
          else expect(Math.abs(Number(have) - Number(want)), `${id} ${ours?.size}`).toBeLessThanOrEqual(0.1);
        }
      }
    expect(seen).toBe(112 * 4);
  });
});

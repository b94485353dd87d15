import { describe, expect, test } from 'vitest';
import { readPipeDimensions } from '../../src/tables/read-pipe-dimensions.ts';
import { readWallRules } from '../../src/tables/read-wall-rules.ts';
import { ownTables, writtenTables } from '../support/table-files.ts';

const dimensions = readPipeDimensions(ownTables);
const rulesOf = (family: string) => readWallRules(ownTables, family, dimensions);
const npc = rulesOf('npc');

test('studs 38 × 89, 38 × 140, 38 × 184: 3 1/2, 5 1/2, 7 1/4 in, rounded', () => {
  expect(npc.studs.map(({ faceMm, depthMm }) => [faceMm, depthMm])).toEqual([
    [38, 89],
    [38, 140],
    [38, 184],
  ]);
});

describe('largest hole in a stud', () => {
  test.each([
    ['npc', 89, true, 29.7, 'NBC 9.23.5.3.: a third'],
    ['npc', 140, true, 46.7, 'NBC 9.23.5.3.'],
    ['npc', 89, false, 49, 'NBC 9.23.5.3.: all but 40 mm'],
    ['npc', 184, false, 144, 'NBC 9.23.5.3.'],
    ['ipc', 88.9, true, 35.6, 'IRC R602.6: 40 %'],
    ['ipc', 88.9, false, 53.3, 'IRC R602.6: 60 %'],
    ['upc', 139.7, false, 83.8, 'IRC R602.6: 60 %'],
    ['upc', 38, false, 6, 'IRC R602.6: 16 mm to either edge'],
  ])('%s, %f mm deep, loadbearing %s: %f (%s)', (family, depth, bearing, most) => {
    expect(rulesOf(family).holes!.stud.mostMm(depth, bearing)).toBeCloseTo(most, 1);
  });
  test('a loadbearing top plate keeps 50 mm (NBC 9.23.5.4.), another is free', () => {
    expect(npc.holes!.plate.mostMm(140, true)).toBe(90);
    expect(npc.holes!.plate.mostMm(140, false)).toBe(Number.POSITIVE_INFINITY);
  });
  test('EN 12056 goes with no building code that we know', () => {
    expect(rulesOf('en12056').holes).toBe(null);
  });
});

describe('words', () => {
  test.each([
    ['Wood Stud 38x140', 'framing'],
    ['Metal Stud Layer', 'steel'],
    ['Holzständer mit Dämmung', 'framing'],
    ['Air space', 'air'],
    ['Face brick', 'solid'],
    ['Béton armé', 'solid'],
    ['Gypsum board', null],
    ['Repair mortar', null],
  ])('layer %s: %s', (name, kind) => expect(npc.layerOf(name)).toBe(kind));
  test.each([
    ['npc', 'ABS, black', 'abs-dwv-40', false],
    ['npc', 'Copper tube', 'copper-dwv', false],
    ['npc', 'Cast iron, hub and spigot', 'ci-hub-service', false],
    ['npc', 'CAST IRON', 'ci-no-hub', false],
    ['npc', 'PVC SDR 35', 'pvc-sewer-35', false],
    ['npc', 'PVC-DWV', 'pvc-dwv-40', false],
    ['npc', 'Drainage', 'pvc-dwv-40', true],
    ['npc', null, 'pvc-dwv-40', true],
    ['en12056', 'PVC-U', 'pvcu-1329', false],
    ['en12056', 'light grey', 'pp-ht', true],
    ['en12056', 'HT', 'pp-ht', false],
  ])('%s, material %s: %s, assumed %s', (family, material, series, assumed) => {
    const found = rulesOf(family).pipeOf(material);
    expect([found.series.id, found.assumed]).toEqual([series, assumed]);
  });
});

describe('refused with its place', () => {
  const walls = ownTables.read('shared/walls.json') as Record<string, unknown>;
  const readBroken = (change: object) => () =>
    readWallRules(writtenTables({ 'shared/walls.json': { ...walls, ...change } }), 'npc', dimensions);
  test.each([
    [{ studs: { source: 's', trust: 'memory', rows: [{ name: 'a', face: 38, depth: 0 }] } }, 'studs.rows[0].depth'],
    [{ clearance: { source: 's', trust: 'memory', mm: -3 } }, 'clearance.mm'],
    [{ surprise: 1 }, 'surprise'],
    [
      { materials: { source: 's', usual: { 'north-america': 'gold', europe: 'pp-ht' }, europe: [], words: [] } },
      'gold',
    ],
  ])('%j', (change, says) => expect(readBroken(change)).toThrow(says));
});

import { describe, expect, test } from 'vitest';
import { nominalSize } from '../../src/units/nominal-size.ts';
import type { Cavity } from '../../src/verdicts/wall-body.ts';
import { holesIn, passesStuds, pipeWidth, smallestStud, wallFit } from '../../src/verdicts/wall-fit.ts';
import { codeOf, runSketch } from '../support/run-sketch.ts';

const npc = codeOf('npc-2020');
const cavity = (depthMm: number): Cavity => ({ depthMm, ground: 'layers', framing: 'wood' });

describe('between studs: judged by the fitting, not the pipe', () => {
  // Outside diameters: ASTM D2661, D2665, D2949, A74, B306; CISPI 301. Fittings: socket or hub, as tables/shared says.
  test.each<[string | null, string, number, boolean, string]>([
    ['copper', '3 in', 89, true, '79.4, fitting 85.7: 3.3 mm left (copper industry page)'],
    ['ABS', '3 in', 89, false, '88.9 passes by 0.1 mm, its socket of 100.6 does not'],
    ['ABS', '2 in', 89, true, '60.3 and 68.6'],
    ['PVC-DWV', '4 in', 140, true, '114.3 and 127.5'],
    ['PVC-DWV', '4 in', 89, false, '114.3'],
    ['Cast iron, hub and spigot', '2 in', 89, false, 'barrel 58.4, hub 92.0'],
    ['Cast iron', '3 in', 89, false, 'no-hub: barrel 85.1, coupling about 97.8'],
    ['PVC schedule 30', '3 in', 89, true, 'thin wall, made for it: fitting 88.9'],
    [null, '3 in', 89, false, 'no material stated: PVC is taken'],
  ])('%s, %s in %i mm: %s (%s)', (material, size, depth, fits) => {
    const width = pipeWidth(npc, nominalSize(size), material);
    expect(width.assumed).toBe(material === null);
    expect(wallFit(npc, width, cavity(depth), false, true)?.fits).toBe(fits);
  });
});

describe('bored along the wall: National Building Code 9.23.5.3., a hole 3 mm wider than the pipe', () => {
  // A loadbearing stud keeps two thirds of its depth, another 40 mm.
  test.each([
    { size: '1½ in', depth: 140, bearing: true, most: 46.67, fits: false, why: '48.3 + 3 = 51.3 of 140 / 3' },
    { size: '2 in', depth: 140, bearing: false, most: 100, fits: true, why: '63.3 of 140 - 40' },
    { size: '1½ in', depth: 89, bearing: false, most: 49, fits: false, why: '51.3 of 89 - 40: fails by 2.3 mm' },
    { size: '1¼ in', depth: 89, bearing: false, most: 49, fits: true, why: '45.2 of 49' },
    { size: '3 in', depth: 140, bearing: false, most: 100, fits: true, why: '91.9 of 100' },
    { size: '1½ in', depth: 184, bearing: true, most: 61.33, fits: true, why: '51.3 of 184 / 3' },
  ])('$size in a stud of $depth mm, loadbearing $bearing: $fits ($why)', ({ size, depth, bearing, most, fits }) => {
    const { outerMm } = pipeWidth(npc, nominalSize(size), 'PVC');
    const hole = holesIn(npc, outerMm!, depth)![bearing ? 'loadbearing' : 'other'];
    expect(hole.mostMm).toBeCloseTo(most, 2);
    expect(hole.fits).toBe(fits);
  });

  test('the smallest stud by the fitting alone, and by the hole too', () => {
    const of = (size: string, bored: boolean, bearing: boolean) =>
      smallestStud(npc, pipeWidth(npc, nominalSize(size), 'PVC'), bored, bearing)?.name ?? null;
    expect([of('1½ in', false, true), of('1½ in', true, false), of('1½ in', true, true)]).toEqual([
      '38 × 89',
      '38 × 140',
      '38 × 184',
    ]);
    expect([of('3 in', false, true), of('3 in', true, false), of('3 in', true, true)]).toEqual([
      '38 × 140',
      '38 × 140',
      null,
    ]);
    expect([of('4 in', false, true), of('4 in', true, false)]).toEqual(['38 × 140', '38 × 184']);
    expect([of('6 in', false, true), of('8 in', false, true)]).toEqual(['38 × 184', null]); // 183.1; 219.1
  });

  test('a pipe shorter than from stud to stud lies between them: 400 less a face of 38 is 362 mm', () => {
    expect(passesStuds(npc, { run: 'along', length: 0.361 })).toBe(false);
    expect(passesStuds(npc, { run: 'along', length: 0.363 })).toBe(true);
    expect(passesStuds(npc, { run: 'upright', length: 3 })).toBe(false);
  });
});

describe('the finding fit-in-wall', () => {
  const rowIn = (wall: string, size = '3 in'): string => `model "Row in a wall"
storey "Ground floor" at 0
wall "W" from -0.5 4 to 6 4 height 3 ${wall}
node VF at 0.6 4 0.5
drain ${size}: VF > J1 (to 0.4) > J2 (east 0.75 fall 1:50) > BF (east 2 fall 1:50) > B (to -0.6) > OUT (east 9 fall 1:50)
urinal U1 from VF south 0.15 rise 1:50, siphon, trap 2 in
urinal U2 from J2 south 0.15 rise 1:50, siphon, trap 2 in
drain 2 in: U1 > VF
drain 2 in: U2 > J2
vent 3 in: VF > VT (to 4.2)
terminal VT
sewer OUT
roof "Roof" from -1 -1 to 20 6 top 3.6 thick 0.3`;
  // Two wall urinals of 3: wet vented 6 less the last 3: Table 2.5.8.1. 2 in takes 4; downstream 6: Table -B 2 in takes 6.
  const found = (text: string) =>
    runSketch(text)
      .findings('fit-in-wall')
      .map(({ facts, severity }) => `${severity} ${facts.what} ${facts.required} ${facts.stud}`)
      .sort();

  test('2 in through loadbearing studs of 140 mm: a hole of 63.3, at most 46.7; 184 allows 61.3', () => {
    expect(found(rowIn('layers "gypsum board" 13 "stud" 140 "gypsum board" 13 loadbearing'))).toEqual([
      'warning hole 2 in null',
      'warning hole 2 in null',
    ]);
  });
  test('the same wall as a partition allows 100: no finding', () => {
    expect(found(rowIn('layers "gypsum board" 13 "stud" 140 "gypsum board" 13 partition'))).toEqual([]);
  });
  test('nobody says whether it bears load: both are said', () => {
    const [first] = runSketch(rowIn('layers "gypsum board" 13 "stud" 140 "gypsum board" 13')).findings('fit-in-wall');
    expect(first?.facts).toMatchObject({ loadBearing: null, stud: null, studIfNotLoadbearing: '38 × 140' });
    expect(first?.sentence).toContain('if it bears load');
  });
  test('metal studs are punched by their makers: no hole is judged', () => {
    expect(found(rowIn('layers "gypsum board" 13 "metal stud" 92 "gypsum board" 13 loadbearing'))).toEqual([]);
  });
  test('steel studs of 64 mm: the fitting of 2 in is 68.6 wide, upright or level', () => {
    // J1-J2, J2-BF along the wall, the drop BF-B to the wall's foot. VF-J1 is all fittings; the vent of 1½ in (56.6) fits.
    expect(found(rowIn('layers "gypsum board" 13 "metal stud" 64 "gypsum board" 13 partition'))).toEqual(
      Array(3).fill('warning fitting 2 in 38 × 89'),
    );
  });
  test('a wall of one layer that says nothing: the layer is the room', () => {
    expect(found(rowIn('layers "infill" 60 partition'))).toEqual(Array(3).fill('warning fitting 2 in 38 × 89'));
    expect(found(rowIn('layers "infill" 70 partition'))).toEqual([]);
  });
  test('a masonry wall has no cavity to judge', () => {
    expect(found(rowIn('layers "brick" 90 "concrete" 200 loadbearing'))).toEqual([]);
  });
  test('an arm that goes through the wall from face to face is no pipe in it', () => {
    // The urinals of the row stand 0.15 m before the wall's axis: their arms of 2 in enter it across.
    const about = (text: string) =>
      runSketch(text)
        .findings('fit-in-wall')
        .map(({ sentence }) => sentence.split(' ')[0]);
    expect(about(rowIn('layers "gypsum board" 13 "stud" 64 "gypsum board" 13 partition')).sort()).toEqual([
      'BF-B',
      'J1-J2',
      'J2-BF',
    ]);
  });
});

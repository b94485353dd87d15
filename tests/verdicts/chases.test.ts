import { describe, expect, test } from 'vitest';
import { wallBodies } from '../../src/verdicts/wall-bodies.ts';
import { hall } from '../support/rows.ts';
import { codeOf } from '../support/run-sketch.ts';
import { outcomeOf } from '../support/weigh-sketch.ts';

const rules = codeOf('npc-2020').walls;
const lone = `node J at 0 0 0.5
lavatory L from J south 0.3 rise 1:50, trap 1 1/4 in
drain 1 1/4 in: L > J > F (to -0.4) > OUT (east 9 fall 1:50)
vent 3 in: J > VT (to 4.2)
terminal VT
sewer OUT`;
const bodiesOf = (walls: string) => wallBodies(outcomeOf(hall('Walls', `${walls}\n${lone}`)).model, rules);
const told = (walls: string) =>
  bodiesOf(walls).map(({ wall, cavity }) => [
    wall.name,
    cavity === null ? null : Math.round(cavity.depthMm),
    cavity?.framing ?? null,
  ]);

describe('room for pipe', () => {
  test.each<[string, number | null, string | null, string]>([
    [
      'layers "gypsum board" 13 "stud 38 x 140" 140 "gypsum board" 13',
      140,
      'wood',
      'the framing layer; boards add nothing',
    ],
    ['layers "gypsum board" 13 "metal stud" 92 "gypsum board" 13', 92, 'steel', 'steel studs'],
    [
      'layers "gypsum board" 13 "stud" 64 "air" 25 "stud" 64 "gypsum board" 13',
      153,
      'wood',
      'a double wall: the clear distance',
    ],
    ['layers "brick" 90 "air" 40 "block" 140', 40, null, 'an air layer alone is clear of studs'],
    ['layers "brick" 90 "insulation" 100 "block" 140', null, null, 'masonry is thicker than what nobody names'],
    ['layers "concrete" 200', null, null, 'solid'],
    ['layers "render" 15 "infill" 120 "render" 15', 120, null, 'words say nothing: the thickest'],
  ])('%s: %s mm, %s (%s)', (layers, depth, framing) => {
    expect(told(`wall "W" from 0 4 to 6 4 height 3 ${layers}`)).toEqual([['W', depth, framing]]);
  });
});

describe('a chase between two walls that stand face to face', () => {
  const pair = (gap: number, more = ''): string =>
    `wall "A" from 0 4 to 6 4 height 3 layers "stud" 64\nwall "B" from 6 ${4.064 + gap} to 0 ${4.064 + gap} height 3 layers "stud" 64${more}`;
  test('0.25 m apart: clear of studs, as wide as they stand apart', () => {
    expect(told(pair(0.25)).slice(2)).toEqual([['the chase between A and B', 250, null]]);
  });
  test('1 m apart: a room', () => expect(told(pair(1)).length).toBe(2));
  test('touching: no chase', () => expect(told(pair(0)).length).toBe(2));
  test('at a right angle: no chase', () => {
    const walls = `wall "A" from 0 4 to 6 4 height 3 layers "stud" 64\nwall "B" from 3 4.1 to 3 6 height 3 layers "stud" 64`;
    expect(told(walls).length).toBe(2);
  });
  test('it reaches as far as both do', () => {
    const walls = `wall "A" from 0 4 to 6 4 height 3 layers "stud" 64\nwall "B" from 2 4.264 to 9 4.264 height 2 layers "stud" 64`;
    const { prism } = bodiesOf(walls)[2]!;
    const xs = prism.outline.map(([x]) => x);
    expect(
      [Math.min(...xs), Math.max(...xs), prism.low, prism.high].map((value) => Math.round(value * 1000) / 1000),
    ).toEqual([2, 6, 0, 2]);
  });
});

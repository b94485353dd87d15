import { describe, expect, test } from 'vitest';
import { nominalSize } from '../../src/units/nominal-size.ts';
import { codeOf } from '../support/run-sketch.ts';

const { cleanouts } = codeOf('npc-2020');

describe('cleanouts by Table 2.4.7.2. (examination decks; a trade guide)', () => {
  test.each([
    ['1½ in', '1½ in', 7.5, 'below 3 in: of the pipe’s own size'],
    ['2½ in', '2½ in', 7.5, 'below 3 in'],
    ['3 in', '3 in', 15, '3 and 4 in: 3 in'],
    ['4 in', '3 in', 15, '3 and 4 in: 3 in'],
    ['6 in', '4 in', 26, 'above 4 in: 4 in'],
    ['15 in', '4 in', 26, 'above 4 in, no limit'],
  ])('a pipe of %s takes a cleanout of %s every %f m (%s)', (pipe, size, reach) => {
    expect(cleanouts?.sizeFor(nominalSize(pipe))).toBe(size);
    expect(cleanouts?.reach(nominalSize(pipe))).toBe(reach);
  });
  test('each place names its rule and clause: R30, R33, R34, R35', () => {
    expect(cleanouts?.places.map(({ rule }) => rule)).toEqual(
      ['R30', 'R30', 'R30', 'R33', 'R34', 'R35', 'R35', 'R35', 'R35', 'R35'].map((id) => `NPC-${id}`),
    );
    expect(cleanouts?.places.every(({ clause }) => clause.startsWith('2.4.7.'))).toBe(true);
  });
});

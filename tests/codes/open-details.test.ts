import { expect, test } from 'vitest';
import type { FixtureDetail, FixtureKind } from '../../src/model/identity.ts';
import { codeOf } from '../support/run-sketch.ts';

// What nobody says of a fixture, and which of its answers leave one row of the code's fixture table.
const nothing: FixtureDetail = { flush: null, style: null, heads: null, emergency: null, domestic: null };
const open = (code: string, kind: FixtureKind, said: Partial<FixtureDetail> = {}) =>
  codeOf(code).fixtures.openDetails(kind, { ...nothing, ...said });

const cases: readonly [code: string, kind: FixtureKind, field: string, choices: readonly unknown[], why: string][] = [
  ['npc-2020', 'water-closet', 'flush', ['tank', 'valve'], 'Table 2.4.9.3.: 4 and 6'],
  [
    'npc-2020',
    'urinal',
    'style',
    ['pedestal', 'stall', 'wall-washout', 'wall-other'],
    'Table 2.4.9.3.: 4, 2, 1.5 and 3; "wall" or "washout" would leave two of them',
  ],
  ['npc-2020', 'dishwasher', 'domestic', [true, false], 'Table 2.4.9.3.: 1.5 and 3'],
  [
    'en12056-2000',
    'urinal',
    'flush',
    ['tank', 'valve'],
    'Table 2: 0.8 and 0.5; a slab urinal counts by the person and is taken only where it is said, so "trough" settles nothing',
  ],
];
test.each(cases)('%s, %s: %s', (code, kind, field, choices) => {
  expect(open(code, kind)).toEqual([{ field, choices }]);
});

test('nothing is open where it is said, or where all rows count alike', () => {
  expect(open('npc-2020', 'water-closet', { flush: 'tank' })).toEqual([]);
  expect(open('npc-2020', 'lavatory')).toEqual([]);
  // Domestic or commercial, a clothes washer counts 2 on a 2 in trap (Table 2.4.9.3.).
  expect(open('npc-2020', 'clothes-washer')).toEqual([]);
});

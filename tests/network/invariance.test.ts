import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Vec3 } from '../../src/geometry/vector.ts';
import { buildNetwork } from '../../src/network/build-network.ts';
import { body, type DrawnPart, drawn, joinsOf, pipe } from '../support/drawn.ts';
import { tower } from '../support/fitted.ts';
import { moved } from '../support/model-twins.ts';

/** Everything that geometry has to decide, close together: wall tees, sockets, gaps, a coupling, a manhole, a closet. */
const yard: readonly DrawnPart[] = [
  pipe('sewer', '-6 0 -1 > -0.3 0 -0.95', { diameter: 0.16 }),
  body('manhole', 'chamber', [0, 0, -0.7], 0.8),
  pipe('drain', '0.3 0 -0.94 > 6 0 -0.85', { diameter: 0.16 }),
  pipe('next', '5.94 0 -0.8507 > 9 0 -0.8', { diameter: 0.16 }),
  pipe('wye', '4.2 1.5 -0.8 > 3.1 0.06 -0.89', { diameter: 0.11 }),
  pipe('stack', '9.1 0 -0.72 > 9.1 0 6', { diameter: 0.11 }),
  body('bend', 'fitting', [9.07, 0, -0.77], 0.16),
  pipe('branch', '9.1 2 2.04 > 9.1 0.058 2', { diameter: 0.075 }),
  pipe('opposite', '9.1 -2 2.04 > 9.1 -0.058 2.003', { diameter: 0.075 }),
  pipe('by', '9.22 -3 2.4 > 9.22 3 2.4', { diameter: 0.11 }),
  pipe('gapped', '9.1 4 2.08 > 9.1 2.009 2.041', { diameter: 0.075 }),
  pipe('stub', '7 2 0 > 7 2 1', { diameter: 0.11 }),
  body('closet', 'fixture', [7, 2, 1.2], 0.38, { kind: 'water-closet' }),
];

const expected = [
  'branch+gapped',
  'branch+opposite+stack1+stack2',
  'by',
  'by',
  'drain1+drain2+wye',
  'drain1+sewer@manhole',
  'drain2+next',
  'gapped',
  'next+stack1@bend',
  'opposite',
  'sewer',
  'stack2',
  'stub',
  'stub@closet',
  'wye',
];

const joined = (parts: readonly DrawnPart[], angle = 0, shift: Vec3 = [0, 0, 0]): string[] => {
  const drawing = drawn(parts);
  return joinsOf(drawing, buildNetwork(moved(drawing.model, angle, shift), drawing.identities).value);
};
const kilometre = fc.double({ min: -1000, max: 1000, noNaN: true });
const place = fc.record({
  angle: fc.double({ min: 0, max: 2 * Math.PI, noNaN: true }),
  shift: fc.tuple(kilometre, kilometre, kilometre),
});

describe('who is joined to whom does not depend on', () => {
  test('anything: the yard as drawn', () => expect(joined(yard)).toEqual(expected));

  test('turning the model about the vertical and shifting it by up to a kilometre', () => {
    fc.assert(
      fc.property(place, ({ angle, shift }) => {
        expect(joined(yard, angle, shift)).toEqual(expected);
      }),
      { numRuns: 200, seed: 1 },
    );
  });

  test('the order of the elements', () => {
    fc.assert(
      fc.property(fc.shuffledSubarray([...yard], { minLength: yard.length }), (parts) => {
        expect(joined(parts)).toEqual(expected);
      }),
      { numRuns: 200, seed: 2 },
    );
  });

  test('any of these, for a building without ports', () => {
    const { parts } = tower(2, 3, (end) => ((end * 7919) % 11) / 1000);
    const bare = parts.map(({ ports: _, ...part }) => part);
    const truth = joined(bare);
    fc.assert(
      fc.property(place, fc.shuffledSubarray(bare, { minLength: bare.length }), ({ angle, shift }, order) => {
        expect(joined(order, angle, shift)).toEqual(truth);
      }),
      { numRuns: 50, seed: 3 },
    );
  });
});

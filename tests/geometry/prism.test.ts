import * as fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { PlanPoint } from '../../src/geometry/plan-outline.ts';
import { insideOutline, type Prism, stretchesInside } from '../../src/geometry/prism.ts';
import { distance, type Vec3 } from '../../src/geometry/vector.ts';

const square = (size: number): PlanPoint[] => [
  [0, 0],
  [size, 0],
  [size, size],
  [0, size],
];
const cube: Prism = { outline: square(1), low: 0, high: 1 };
const ell: Prism = {
  outline: [
    [0, 0],
    [3, 0],
    [3, 1],
    [1, 1],
    [1, 3],
    [0, 3],
  ],
  low: 0,
  high: 1,
};
const micro = (value: number): number => Math.round(value * 1e6) / 1e6;
const spans = (points: readonly Vec3[], prism: Prism) =>
  stretchesInside(points, prism).map(({ from, to }) => [from, to].map(micro));

describe('stretches of a line inside an upright body', () => {
  test.each<[string, Vec3[], Prism, number[][]]>([
    [
      'through it',
      [
        [-1, 0.5, 0.5],
        [2, 0.5, 0.5],
      ],
      cube,
      [[1, 2]],
    ],
    [
      'from inside out',
      [
        [0.5, 0.5, 0.5],
        [0.5, 0.5, 3],
      ],
      cube,
      [[0, 0.5]],
    ],
    [
      'beside it',
      [
        [-1, 1.5, 0.5],
        [2, 1.5, 0.5],
      ],
      cube,
      [],
    ],
    [
      'over it',
      [
        [-1, 0.5, 1.5],
        [2, 0.5, 1.5],
      ],
      cube,
      [],
    ],
    [
      'across the notch of an L: twice',
      [
        [2, 0.5, 0.5],
        [0.5, 2, 0.5],
      ],
      ell,
      [
        [0, micro(Math.SQRT1_2)],
        [micro(Math.SQRT2), micro(1.5 * Math.SQRT2)],
      ],
    ],
    [
      'bent: each leg for itself',
      [
        [0.5, 0.5, -1],
        [0.5, 0.5, 0.5],
        [3, 0.5, 0.5],
      ],
      cube,
      [
        [1, 1.5],
        [1.5, 2],
      ],
    ],
  ])('%s', (_, points, prism, expected) => expect(spans(points, prism)).toEqual(expected));
});

test('what is found inside is inside, and never longer than the line', () => {
  const place = fc.tuple(...[0, 1, 2].map(() => fc.double({ min: -2, max: 5, noNaN: true }))) as fc.Arbitrary<
    [number, number, number]
  >;
  fc.assert(
    fc.property(place, place, (a, b) => {
      const length = distance(a, b);
      let sum = 0;
      for (const { from, to } of stretchesInside([a, b], ell)) {
        const share = (from + to) / 2 / length;
        const [x, y, z] = [0, 1, 2].map((axis) => a[axis]! + (b[axis]! - a[axis]!) * share) as [number, number, number];
        expect(insideOutline(ell.outline, [x, y]) && z >= 0 && z <= 1).toBe(true);
        sum += to - from;
      }
      expect(sum).toBeLessThanOrEqual(length + 1e-9);
    }),
  );
});

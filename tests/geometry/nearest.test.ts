import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { boxAround, distanceOfBoxes, distanceToBox } from '../../src/geometry/box.ts';
import { boxGrid } from '../../src/geometry/box-grid.ts';
import { meetingPoint } from '../../src/geometry/meeting-point.ts';
import { cutOut, footOn, pointAlong, polyline } from '../../src/geometry/polyline.ts';
import { type Box, distance, unit, type Vec3 } from '../../src/geometry/vector.ts';

const metre = fc.double({ min: -100, max: 100, noNaN: true });
const point: fc.Arbitrary<Vec3> = fc.tuple(metre, metre, metre);
const box: fc.Arbitrary<Box> = fc.tuple(point, fc.double({ min: 0, max: 40, noNaN: true })).map(([min, size]) => ({
  min,
  max: [min[0] + size, min[1] + size / 3, min[2] + size / 7],
}));
const touch = (a: Box, b: Box): boolean => [0, 1, 2].every((i) => a.min[i]! <= b.max[i]! && b.min[i]! <= a.max[i]!);

test('the grid finds what a look at every box finds', () => {
  fc.assert(
    fc.property(fc.array(box, { maxLength: 60 }), box, (boxes, where) => {
      const found: number[] = [];
      boxGrid(boxes).touching(where, (item) => found.push(item));
      const truth = boxes.flatMap((it, i) => (touch(it, where) ? [i] : []));
      expect(found.sort((a, b) => a - b)).toEqual(truth);
    }),
    { seed: 1 },
  );
});

test('the grid passes over boxes that are missing or not numbers', () => {
  const nowhere: Box = { min: [Number.NaN, 0, 0], max: [1, 1, 1] };
  const endless: Box = { min: [0, 0, 0], max: [Number.POSITIVE_INFINITY, 1, 1] };
  const here: Box = { min: [0, 0, 0], max: [1, 1, 1] };
  const found: number[] = [];
  boxGrid([nowhere, null, endless, here]).touching(here, (item) => found.push(item));
  expect(found).toEqual([3]);
});

describe('boxes', () => {
  const unitBox: Box = { min: [0, 0, 0], max: [1, 1, 1] };
  test.each([
    { at: [0.5, 0.5, 0.5], far: 0 },
    { at: [2, 0.5, 0.5], far: 1 },
    { at: [4, 5, 1], far: 5 },
    { at: [-1, -2, -2], far: 3 },
  ] as { at: Vec3; far: number }[])('$at is $far m from the unit box', ({ at, far }) =>
    expect(distanceToBox(at, unitBox)).toBeCloseTo(far, 12),
  );
  test('distance of two boxes is that of their nearest points', () => {
    expect(distanceOfBoxes(unitBox, { min: [4, 5, 0], max: [6, 6, 6] })).toBe(5);
    expect(distanceOfBoxes(unitBox, { min: [0.5, 0.5, 0.5], max: [6, 6, 6] })).toBe(0);
  });
  test('no points, no box', () => expect(boxAround([])).toBeNull());
});

describe('along a polyline of 3 m east and 4 m north', () => {
  const line = polyline([
    [0, 0, 0],
    [3, 0, 0],
    [3, 4, 0],
  ]);
  test('it is 7 m long', () => expect(line.length).toBe(7));
  test('5 m along lies 2 m north of the corner', () => expect(pointAlong(line, 5)).toEqual([3, 2, 0]));
  test('a cut from 1 to 5 m keeps the corner', () =>
    expect(cutOut(line, 1, 5)).toEqual([
      [1, 0, 0],
      [3, 0, 0],
      [3, 2, 0],
    ]));
  test('the foot of a point beside the second leg', () =>
    expect(footOn(line, [4, 2, 0])).toEqual({ at: 5, off: 1, point: [3, 2, 0], leg: 1 }));
  test('beyond its end the foot is the end', () =>
    expect(footOn(line, [3, 7, 0])).toEqual({ at: 7, off: 3, point: [3, 4, 0], leg: 1 }));
});

describe('where lines meet', () => {
  const through = (at: Vec3, from: Vec3) => ({
    point: from,
    direction: unit([at[0] - from[0], at[1] - from[1], at[2] - from[2]]),
  });
  test('three lines through one point meet there, far from the origin too', () => {
    const at: Vec3 = [24_525_622.89, 6_876_896.57, 123.94];
    const lines = [
      through(at, [at[0] + 2, at[1], at[2]]),
      through(at, [at[0], at[1] - 3, at[2]]),
      through(at, [at[0] - 1, at[1] + 1, at[2] + 1]),
    ];
    expect(distance(meetingPoint(lines)!, at)).toBeLessThan(1e-6);
  });
  test('two that pass 20 mm apart meet in the middle between', () => {
    const lines = [through([0, 0, 0], [1, 0, 0]), through([0, 0, 0.02], [0, 1, 0.02])];
    expect(distance(meetingPoint(lines)!, [0, 0, 0.01])).toBeLessThan(1e-12);
  });
  test('parallels meet nowhere, nor do lines 4 degrees apart', () => {
    expect(meetingPoint([through([0, 0, 0], [1, 0, 0]), through([0, 1, 0], [1, 1, 0])])).toBeNull();
    expect(meetingPoint([through([0, 0, 0], [1, 0, 0]), through([0, 0, 0], [1, 0.07, 0])])).toBeNull();
  });
});

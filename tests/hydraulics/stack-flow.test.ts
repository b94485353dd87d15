import { describe, expect, test } from 'vitest';
import {
  gallonPerMinute,
  inch,
  shareOfStack,
  stackCapacity,
  terminalLength,
  terminalSpeed,
} from '../../src/hydraulics/stack-flow.ts';
import { airDrawn, patternLength, ventLength } from '../../src/hydraulics/vent-air.ts';

// Check cases HY-C30 to HY-C58 of Wyly and Eaton's formulas, Darcy's and the pattern of the stack-vent table; ours are
// checked in both systems of units.
const within = (share: number) => (value: number, wanted: number) =>
  expect(Math.abs(value / wanted - 1), `${value} against ${wanted}`).toBeLessThan(share);
const foot = 0.3048;

describe('HY-F08 to F10 stacks', () => {
  test.each([
    ['HY-C30, C31', 3, 7 / 24, 66.76, 4.2119, 10.377, 3.163, 5.6, 1.707],
    ['HY-C32, C33', 4, 7 / 24, 143.77, 9.0708, 12.571, 3.832, 8.22, 2.505],
    ['HY-C34, C35', 3, 1 / 4, 51.63, 3.2576, 9.364, 2.854, 4.56, 1.39],
    ['HY-C36, C37', 4, 1 / 4, 111.2, 7.0156, 11.343, 3.457, 6.69, 2.039],
    ['HY-C38, C39', 2, 7 / 24, 22.64, 1.4286, 7.919, 2.414, 3.26, 0.994],
    ['HY-C40, C41', 6, 1 / 3, 529.56, 33.4099, 18.006, 5.488, 16.86, 5.139],
  ])('%s %i in', (_, size, share, gallons, litres, feetASecond, metresASecond, feet, metres) => {
    const flow = stackCapacity(share, size * inch);
    const speed = terminalSpeed(flow, size * inch);
    within(1e-3)(flow / gallonPerMinute, gallons);
    within(1e-3)(flow, litres);
    within(2e-3)(speed / foot, feetASecond);
    within(2e-3)(speed, metresASecond);
    within(2e-3)(terminalLength(speed) / foot, feet);
    within(2e-3)(terminalLength(speed), metres);
  });

  test.each([
    ['HY-C42', 4, 0.096, 0.1954],
    ['HY-C43', 5.2, 0.096, 0.2287],
    ['HY-C44', 9.5, 0.146, 0.1679],
  ])('%s %f l/s in %f m', (_, flow, bore, share) => {
    within(1e-3)(shareOfStack(flow, bore), share);
  });
});

describe('HY-F13, F14 air down a stack and through its vent', () => {
  test.each([
    ['HY-C55', 0.15, 566.67],
    ['HY-C56', 0.2, 400],
    ['HY-C57', 0.25, 300],
    ['HY-C58', 7 / 24, 242.86],
  ])('%s a stack filled %f draws for 100', (_, share, air) => {
    within(1e-3)(airDrawn(100, share), air);
  });

  test.each([
    ['HY-C45', 4, 2.067, 0.033, 349.2, 6.37],
    ['HY-C46', 4, 3.068, 0.033, 349.2, 45.86],
    ['HY-C47', 4, 4.026, 0.033, 349.2, 178.47],
    ['HY-C48', 3, 2.067, 0.037, 162.1, 26.34],
    ['HY-C49', 3, 1.61, 0.037, 162.1, 7.55],
  ])('%s %i in stack at 7/24, vent of %f in inside', (_, stack, vent, friction, gallons, metres) => {
    const air = airDrawn(stackCapacity(7 / 24, stack * inch), 7 / 24);
    within(5e-3)(air / gallonPerMinute, gallons);
    within(5e-3)(ventLength(vent * inch, air, friction), metres);
  });
});

describe('HY-F15 pattern of the stack-vent table', () => {
  test.each([
    ['HY-C50', 4, 3 / 20, 2.067, 10.68],
    ['HY-C51', 4, 7 / 24, 3.068, 45.66],
    ['HY-C52', 3, 1 / 5, 2.067, 34.63],
    ['HY-C53', 6, 1 / 4, 4.026, 25.63],
    ['HY-C54', 10, 7 / 24, 7.981, 55.69],
  ])('%s %i in stack filled %f, vent of %f in inside', (_, stack, share, vent, metres) => {
    within(5e-3)(patternLength(vent * inch, stack * inch, share), metres);
  });
});

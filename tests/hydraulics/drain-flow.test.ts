import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { fillAtSpeed, flowAtFill, flowInDrain, fullestFlow } from '../../src/hydraulics/drain-flow.ts';
import { colebrookWhite, manning, manningSlope } from '../../src/hydraulics/friction.ts';
import { partFull } from '../../src/hydraulics/part-full.ts';
import { gallonPerMinute, inch } from '../../src/hydraulics/stack-flow.ts';

// Check cases HY-C01 to HY-C29, each computed twice by other routes than ours: areas by Simpson's rule, Manning in US
// units with 1.486 and by ratio to full bore, Colebrook-White by iterating Darcy-Weisbach to 1e-10.
const within = (share: number) => (value: number, wanted: number) =>
  expect(Math.abs(value / wanted - 1), `${value} against ${wanted}`).toBeLessThan(share);
const foot = 0.3048;

describe('HY-F01 part-full circle', () => {
  test.each([
    ['HY-C01', 0.1, 0.05, Math.PI, 0.00392699, 0.15708, 0.025, 0.1],
    ['HY-C02', 0.1, 0.07, 3.96463, 0.0058723, 0.198231, 0.0296235, 0.0916515],
    ['HY-C03', 0.0779, 0.02, 2.12539, 0.000967357, 0.0827838, 0.0116853, 0.0680588],
  ])('%s bore %f depth %f', (_, bore, depth, angle, area, wetted, radius, surface) => {
    const found = partFull(bore, depth);
    const same = within(5e-6);
    same(found.angle, angle);
    same(found.area, area);
    same(found.wetted, wetted);
    same(found.radius, radius);
    same(found.surface, surface);
  });
});

describe('HY-F02 Manning', () => {
  test.each([
    ['HY-C04', 0.1, 0.01, 0.5, 0.013, 0.6577, 2.5827],
    ['HY-C05', 0.1, 0.02, 0.5, 0.009, 1.3435, 5.2758],
    ['HY-C06', 0.1, 0.02, 0.7, 0.011, 1.2309, 7.228],
    ['HY-C07', 0.15, 0.01, 0.5, 0.013, 0.8618, 7.6147],
    ['HY-C08', 0.0779, 0.02083333, 0.5, 0.012, 0.8707, 2.0748],
    ['HY-C09', 0.1, 0.01, 1, 0.013, 0.6577, 5.1654],
    ['HY-C10', 0.1, 0.01, 0.938, 0.013, 0.7261, 5.5565],
  ])('%s bore %f, %f m/m, filled %f, n %f', (_, bore, slope, fill, n, speed, flow) => {
    const found = flowAtFill(bore, slope, fill, manning(n));
    within(5e-4)(found.speed, speed);
    within(5e-4)(found.flow, flow);
  });

  test.each([
    ['HY-C25', 3, 0.020833, 2.252, 24.81],
    ['HY-C26', 4, 0.020833, 2.728, 53.43],
    ['HY-C27', 3, 0.010417, 1.592, 17.54],
    ['HY-C28', 4, 0.010417, 1.929, 37.78],
    ['HY-C29', 6, 0.010417, 2.528, 111.38],
  ])('%s %i in half full, n 0.015, in US units', (_, size, slope, feet, gallons) => {
    const found = flowAtFill(size * inch, slope, 0.5, manning(0.015));
    within(5e-4)(found.speed / foot, feet);
    within(5e-4)(found.flow / gallonPerMinute, gallons);
  });
});

describe('HY-F03 Colebrook-White', () => {
  test.each([
    ['HY-C11', 0.096, 0.01, 0.5, 0.001, 0.6902, 2.498],
    ['HY-C12', 0.096, 0.02, 0.7, 0.001, 1.099, 5.9479],
    ['HY-C13', 0.146, 0.01, 0.7, 0.001, 1.0242, 12.8203],
    ['HY-C14', 0.184, 0.005, 0.5, 0.001, 0.7514, 9.9902],
    ['HY-C15', 0.1046, 0.01, 0.5, 0.001, 0.7316, 3.1433],
    ['HY-C16', 0.1046, 0.01, 0.5, 0.00025, 0.8778, 3.7715],
    ['HY-C17', 0.146, 0.02, 1, 0.0015, 1.2174, 20.3814],
  ])('%s bore %f, %f m/m, filled %f, roughness %f m', (_, bore, slope, fill, roughness, speed, flow) => {
    const found = flowAtFill(bore, slope, fill, colebrookWhite(roughness, 1.31e-6));
    within(5e-4)(found.speed, speed);
    within(5e-4)(found.flow, flow);
  });
});

describe('HY-F05 depth from flow', () => {
  test.each([
    ['HY-C18', 2, 0.1, 0.01, 0.013, 0.4319, 0.6158],
    ['HY-C19', 1, 0.0779, 0.02, 0.011, 0.3228, 0.7516],
    ['HY-C20', 3.5, 0.1, 0.02, 0.013, 0.4877, 0.9202],
  ])('%s %f l/s in %f m', (_, flow, bore, slope, n, fill, speed) => {
    const found = flowInDrain(bore, slope, flow, manning(n));
    within(5e-4)(found!.fill, fill);
    within(5e-4)(found!.speed, speed);
  });

  test('more than a pipe carries without running full has no depth, and neither has a pipe without fall', () => {
    const most = flowAtFill(0.1, 0.01, fullestFlow, manning(0.013)).flow;
    expect(flowInDrain(0.1, 0.01, most * 1.001, manning(0.013))).toBeNull();
    expect(flowInDrain(0.1, 0.01, most * 0.999, manning(0.013))?.fill).toBeCloseTo(fullestFlow, 1);
    expect(flowInDrain(0.1, 0, 1, manning(0.013))).toBeNull();
  });

  test('depth gives the flow back, and a steeper pipe runs shallower and faster', () => {
    const laws = [manning(0.012), colebrookWhite(0.001, 1.31e-6)];
    fc.assert(
      fc.property(
        fc.double({ min: 0.03, max: 0.6, noNaN: true }),
        fc.double({ min: 0.002, max: 0.1, noNaN: true }),
        fc.double({ min: 0.05, max: 0.9, noNaN: true }),
        fc.constantFrom(...laws),
        (bore, slope, fill, law) => {
          const { flow, speed } = flowAtFill(bore, slope, fill, law);
          const back = flowInDrain(bore, slope, flow, law)!;
          const steeper = flowInDrain(bore, slope * 1.5, flow, law)!;
          return Math.abs(back.fill - fill) < 1e-6 && steeper.fill < fill && steeper.speed > speed;
        },
      ),
    );
  });
});

describe('HY-F06 slope for 2 ft/s half full', () => {
  test.each([
    ['HY-C21', 3, 0.015, 0.01643],
    ['HY-C22', 4, 0.015, 0.0112],
    ['HY-C23', 2, 0.013, 0.02119],
    ['HY-C24', 6, 0.012, 0.00417],
  ])('%s %i in, n %f', (_, size, n, slope) => {
    within(1e-3)(manningSlope(n, (size * inch) / 4, 2 * foot), slope);
  });

  test.each([
    // By the radius of the part-full circle, depth by depth; Colebrook-White by iterating Darcy-Weisbach.
    ['3 in at 1:48, Manning n 0.012', 0.0779, 1 / 48, manning(0.012), 0.243],
    ['DN 100 at 1 %, Colebrook-White 1 mm', 0.096, 0.01, colebrookWhite(0.001, 1.31e-6), 0.374],
    ['DN 100 at 0.5 %, 0.555 m/s at the most', 0.096, 0.005, colebrookWhite(0.001, 1.31e-6), null],
  ])('fill from which on 0.6 m/s: %s', (_, bore, slope, law, fill) => {
    const found = fillAtSpeed(bore, slope, 0.6, law);
    if (fill === null) expect(found).toBeNull();
    else expect(found).toBeCloseTo(fill, 3);
  });

  test('HY-F04 the greatest speed, 1.140 of full bore at 0.813: reached at that speed, not past it', () => {
    const most = 1.14 * flowAtFill(0.1, 0.02, 1, manning(0.012)).speed;
    expect(fillAtSpeed(0.1, 0.02, most * 0.999, manning(0.012))).toBeGreaterThan(0.75);
    expect(fillAtSpeed(0.1, 0.02, most * 1.001, manning(0.012))).toBeNull();
  });

  test('HY-F04 half full runs as fast as full, and carries half', () => {
    const [half, full] = [0.5, 1].map((fill) => flowAtFill(0.1, 0.02, fill, manning(0.012)));
    expect(half!.speed).toBeCloseTo(full!.speed, 12);
    expect(half!.flow * 2).toBeCloseTo(full!.flow, 9);
  });
});

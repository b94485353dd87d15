import * as fc from 'fast-check';
import { expect, test } from 'vitest';
import { armOf, hall, lavatoryPair } from '../support/rows.ts';
import { weighSketch } from '../support/weigh-sketch.ts';

/** Stall urinals so far apart, wet vented through two lavatories over the line's head at the origin. */
const row = (count: number, apart: number): string => {
  const joints = Array.from(
    { length: count + 1 },
    (_, at) => ` > ${at === count ? 'K' : `J${at + 1}`} (east ${apart} fall 1:50)`,
  );
  const arms = Array.from({ length: count }, (_, at) => armOf(at + 1, 'urinal, stall, trap 2 in'));
  return hall(
    'A row of any length',
    `node LJ at 0 0 0.5
${lavatoryPair('LJ')}
drain 3 in: LJ > LF (to -0.4)${joints.join('')} > BF (to -1.6) > OUT (east 9 fall 1:50)
${arms.join('')}
vent 3 in: LJ > VT (to 4.2)
terminal VT
sewer OUT`,
  );
};

test('circuit and relief vent: up to 150 mm over the highest rim, level to the nearest vent, whatever the row', () => {
  const level = 1.1 + 0.15; // the stall's back is the highest thing that could be a rim
  const slope = Math.hypot(1, 0.02);
  fc.assert(
    fc.property(fc.integer({ min: 2, max: 8 }), fc.integer({ min: 50, max: 120 }), (count, centimetres) => {
      const apart = centimetres / 100;
      const circuit = weighSketch(row(count, apart)).of('circuit-vent');
      expect(circuit.holds).toBe(true);
      const length = (role: string): number =>
        circuit.adds.filter((one) => one.role === role).reduce((sum, one) => sum + one.length, 0);
      // Foot at J1, which lies one spacing from the lavatories' vent.
      expect(length('circuit-vent')).toBeCloseTo(level + 0.4 + apart / 50 + apart, 3);
      // Foot 0.4 m behind the last urinal, or half way to the drop; it joins the circuit vent over J1.
      const behind = Math.min(0.4, (apart * slope) / 2) / slope;
      const out = count * apart + behind;
      expect(length('relief-vent')).toBeCloseTo(level + 0.4 + out / 50 + out - apart, 3);
    }),
    { numRuns: 25 },
  );
});

test('a longer row never needs a smaller largest pipe, under any reading', () => {
  fc.assert(
    fc.property(fc.integer({ min: 2, max: 7 }), (count) => {
      const [shorter, longer] = [count, count + 1].map((urinals) => weighSketch(row(urinals, 0.7)));
      for (const reading of ['wet-vent', 'circuit-vent', 'individual-vent']) {
        const dn = (one: typeof shorter): number => one!.of(reading).largest?.underFloor?.dn ?? 0;
        expect(dn(longer)).toBeGreaterThanOrEqual(dn(shorter));
      }
    }),
    { numRuns: 6 },
  );
});

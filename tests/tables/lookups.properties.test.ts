import fc from 'fast-check';
import { expect, test } from 'vitest';
import { sizeForLength } from '../../src/tables/find-length.ts';
import { sizeForLoad } from '../../src/tables/find-size.ts';
import { sizeAtSlope } from '../../src/tables/find-slope.ts';
import type { NominalSize } from '../../src/units/nominal-size.ts';
import type { Load } from '../../src/units/quantity.ts';
import { openOwn } from '../support/table-files.ts';

const npc = openOwn('npc-2020');
/** No size counts as larger than every size. */
const rank = (size: NominalSize | null | undefined): number =>
  size === null || size === undefined ? Number.POSITIVE_INFINITY : npc.series.rank(size);
const loads = fc.integer({ min: 0, max: 4_000_000 }).map((sixtieths) => sixtieths as Load);
const small = fc.integer({ min: 0, max: 7000 }).map((sixtieths) => sixtieths as Load);
const anyLoad = fc.oneof(small, loads);
const length = fc.double({ min: 0, max: 350, noNaN: true });
const columns = [
  ['branch', 'load'],
  ['stack', 'total'],
  ['stack', 'oneStorey'],
  ['wet-vent', 'noCloset'],
  ['wet-vent', 'withCloset'],
] as const;

test('a larger load never takes a smaller size', () => {
  fc.assert(
    fc.property(fc.constantFrom(...columns), anyLoad, anyLoad, ([table, column], a, b) => {
      const [light, heavy] = a <= b ? [a, b] : [b, a];
      const of = (load: Load): number => rank(sizeForLoad(npc.table(table), column, load).size);
      expect(of(light)).toBeLessThanOrEqual(of(heavy));
    }),
  );
});

test('a longer vent, or a heavier one, never takes a smaller size', () => {
  fc.assert(
    fc.property(
      anyLoad,
      length,
      fc.nat(6000),
      fc.double({ min: 0, max: 100, noNaN: true }),
      (load, long, more, further) => {
        const of = (fu: number, metres: number): number =>
          rank(sizeForLength(npc.table('vent-length'), 'load', fu, metres)?.size);
        expect(of(load, long)).toBeLessThanOrEqual(of(load, long + further));
        expect(of(load, long)).toBeLessThanOrEqual(of(load + more, long));
      },
    ),
  );
});

test('a steeper drain never takes a larger size', () => {
  const slope = fc.double({ min: 0.001, max: 0.1, noNaN: true });
  fc.assert(
    fc.property(anyLoad, slope, slope, (load, a, b) => {
      const of = (drawn: number): number => rank(sizeAtSlope(npc.table('drain'), load, drawn).size);
      expect(of(Math.max(a, b))).toBeLessThanOrEqual(of(Math.min(a, b)));
    }),
  );
});

test('the figure that is named holds the load, and the one below it does not', () => {
  fc.assert(
    fc.property(fc.constantFrom(...columns), anyLoad, ([table, column], load) => {
      const { size, cell, smaller } = sizeForLoad(npc.table(table), column, load);
      if (size === null) return;
      expect(Number(cell.value)).toBeGreaterThanOrEqual(load);
      const below = smaller?.cell.value ?? null;
      if (typeof below === 'number') expect(below).toBeLessThan(load);
    }),
  );
});

test('leaving sizes out never gives a smaller one, nor one that was left out', () => {
  const omitted = fc.subarray([...npc.table('branch').sizes]).map((sizes) => new Set(sizes));
  fc.assert(
    fc.property(anyLoad, omitted, (load, omit) => {
      const all = sizeForLoad(npc.table('branch'), 'load', load).size;
      fc.pre(omit.size < npc.table('branch').sizes.length);
      const some = sizeForLoad(npc.table('branch'), 'load', load, omit).size;
      expect(rank(some)).toBeGreaterThanOrEqual(rank(all));
      if (some !== null) expect(omit.has(some)).toBe(false);
    }),
  );
});

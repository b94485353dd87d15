import fc from 'fast-check';
import { expect, test } from 'vitest';
import { branchTable } from '../../src/codes/en12056/branch-tables.ts';
import { flowOf } from '../../src/codes/en12056/flow.ts';
import { loadOf } from '../../src/units/quantity.ts';
import { europeanTower } from '../support/european.ts';
import { codeOf, runSketch } from '../support/run-sketch.ts';
import { openOwn } from '../support/table-files.ts';

// What must hold whatever the figures are: EN 12056-2 in its four systems.
const family = openOwn('en12056-2000');
const rank = (label: string | undefined): number => (label === undefined ? -1 : family.series.rank(label as never));
const fixture = fc.constantFrom('lavatory', 'bathtub', 'shower', 'kitchen-sink', 'closet', 'urinal, valve', 'bidet');
const system = fc.constantFrom('I', 'II', 'IV');

test('more discharge units, steady flow or a larger appliance never make a flow smaller', () => {
  const amount = fc.double({ min: 0, max: 200, noNaN: true });
  fc.assert(
    fc.property(
      amount,
      amount,
      fc.double({ min: 0, max: 3, noNaN: true }),
      fc.constantFrom(0.5, 0.7, 1, 1.2),
      (a, more, largest, K) => {
        const flow = (units: number, steady: number, top: number): number =>
          flowOf({ settings: { K, mixedK: 'add' } })({
            load: loadOf(units),
            largest: loadOf(top),
            steady,
            statedUses: [],
          }).flow;
        const base = flow(a, 0, largest);
        return flow(a + more, 0, largest) >= base && flow(a, more, largest) >= base && flow(a, 0, largest + 1) >= base;
      },
    ),
  );
});

test('a branch that carries more, or more closets on more turns, is never smaller', () => {
  const table = fc.constantFrom('branch-unventilated', 'branch-ventilated');
  const flows = fc.tuple(fc.double({ min: 0.01, max: 4, noNaN: true }), fc.double({ min: 0.01, max: 4, noNaN: true }));
  fc.assert(
    fc.property(table, system, flows, fc.nat(6), fc.nat(270), (name, of, [a, b], closets, turn) => {
      const look = branchTable(family.table(name), of as 'I', {
        family,
        omit: new Set(),
        settings: { K: 0.5, system: of, national: 'none' },
      });
      const [low, high] = [look.forFlow(Math.min(a, b)), look.forFlow(Math.max(a, b))];
      const few = look.forClosets(closets, turn);
      const many = look.forClosets(closets + 1, turn + 10);
      return (
        (high === null || (low !== null && rank(high.size) >= rank(low.size))) && rank(many?.size) >= rank(few?.size)
      );
    }),
  );
});

test('a fixture more on the top storey makes no pipe of the stack and its drain smaller; every size is of the series', () => {
  const floors = fc.array(fc.array(fixture, { minLength: 1, maxLength: 4 }), { minLength: 2, maxLength: 5 });
  fc.assert(
    fc.property(floors, fixture, system, (storeys, more, of) => {
      const text = (last: readonly string[]): string =>
        europeanTower(storeys.map((west, at) => ({ west: at === storeys.length - 1 ? last : west })));
      const top = storeys.at(-1)!;
      const [before, after] = [top, [more, ...top]].map((last) =>
        runSketch(text(last), { code: 'en12056-2000', answers: { settings: { system: of, entries: 'square' } } }),
      );
      const sizes = before!.result.pipes
        .concat(after!.result.pipes)
        .flatMap(({ required }) => [required?.least, required?.most]);
      const known = sizes.every((size) => size == null || codeOf('en12056-2000').series.has(size.label));
      const grows = ['S1-SF', 'SF-OUT', 'S2-S1'].every((name) => rank(after!.size(name)) >= rank(before!.size(name)));
      return known && grows;
    }),
    { numRuns: 25 },
  );
});

test('a steeper drain never asks for a larger size, and ranges hold both readings of the entries', () => {
  fc.assert(
    fc.property(
      fc.integer({ min: 2, max: 14 }),
      fc.integer({ min: 20, max: 180 }),
      fc.constantFrom(0.5, 0.7, 1),
      (count, run, K) => {
        const floors = Array.from({ length: count }, () => ({ west: ['closet', 'lavatory'], east: ['bathtub'] }));
        const at = (one: number, settings = {}) =>
          runSketch(europeanTower(floors, { slope: `1:${one}` }), {
            code: 'en12056-2000',
            answers: { settings: { K, ...settings } },
          });
        const ask = (one: ReturnType<typeof at>): number =>
          rank(one.pipe('SF-OUT').trail.find(({ rule }) => rule === 'EN-R30')?.asks?.label);
        const open = at(run);
        const [swept, square] = ['swept', 'square'].map(
          (entries) => at(run, { entries }).pipe('S1-SF').required?.most?.label,
        );
        const range = open.pipe('S1-SF').required;
        expect([range?.least?.label, range?.most?.label]).toEqual([swept, square]);
        return ask(at(Math.max(10, run - 10))) <= ask(open);
      },
    ),
    { numRuns: 15 },
  );
});

import { expect, test } from 'vitest';
import type { FixtureKind } from '../../src/model/identity.ts';
import { codeOf } from '../support/run-sketch.ts';
import { inches } from '../support/table-files.ts';

// Table 2.4.9.3.: "lavatory, domestic: single, or two singles on one trap", and so sinks and laundry trays; a domestic
// dishwasher or grinder that empties into a domestic sink counts nothing (R11). Loads on a 1½ in trap: sink, lavatory,
// laundry tray, dishwasher, shower 1.5; commercial dishwasher 3; a commercial sink on 2 in 2.
const code = codeOf('npc-2020');

interface OnTrap {
  readonly kind: FixtureKind;
  readonly domestic?: boolean;
  readonly trap?: string;
}
/** What the trap carries, in fixture units. */
const carried = (on: readonly OnTrap[]): number => {
  const fixtures = on.map(({ kind, domestic = true, trap = '1 1/2' }) => {
    const detail = { flush: null, style: null, heads: null, emergency: null, domestic };
    const row = code.fixtures.rowsFor(kind, detail)[0]!;
    return { kind, domestic, row, load: row.loadAt(inches(trap)).load };
  });
  const counts = code.sharedTrap!(fixtures);
  return fixtures.reduce((sum, { load }, at) => sum + (counts[at] ? load / 60 : 0), 0);
};

const sink: OnTrap = { kind: 'kitchen-sink' };
const dishwasher: OnTrap = { kind: 'dishwasher' };
const lavatory: OnTrap = { kind: 'lavatory' };
const small: OnTrap = { kind: 'lavatory', trap: '1 1/4' }; // 1
const tray: OnTrap = { kind: 'laundry-tray' };
const shower: OnTrap = { kind: 'shower' };
const cases: readonly [what: string, on: readonly OnTrap[], units: number][] = [
  ['a sink and its dishwasher', [sink, dishwasher], 1.5],
  ['a grinder and its sink', [{ kind: 'garbage-grinder' }, sink], 1.5],
  ['a sink and a commercial dishwasher', [sink, { ...dishwasher, domestic: false }], 4.5],
  ['a commercial sink on 2 in and a dishwasher', [{ ...sink, domestic: false, trap: '2' }, dishwasher], 3.5],
  ['a lavatory and a dishwasher: no sink', [lavatory, dishwasher], 3],
  ['a sink and a lavatory: two rows', [sink, lavatory], 3],
  ['a lavatory and a sink', [lavatory, sink], 3],
  ['two sinks', [sink, sink], 1.5],
  ['two sinks by two names', [{ kind: 'sink' }, sink], 1.5],
  ['two sinks, one of them commercial on 2 in', [sink, { ...sink, domestic: false, trap: '2' }], 3.5],
  ['two lavatories, 1 and 1.5: the heavier', [small, lavatory], 1.5],
  ['two lavatories, 1.5 and 1', [lavatory, small], 1.5],
  ['two laundry trays', [tray, tray], 1.5],
  ['a lavatory and a laundry tray: two rows', [lavatory, tray], 3],
  ['two showers: no such row', [shower, shower], 3],
  ['three lavatories', [lavatory, lavatory, lavatory], 4.5],
  ['two sinks and a dishwasher', [sink, dishwasher, sink], 1.5],
];
for (const [what, on, units] of cases) test(`${what}: ${units}`, () => expect(carried(on)).toBe(units));

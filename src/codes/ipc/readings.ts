import { sizeForLoad } from '../../tables/find-size.ts';
import { unitsOf } from '../../units/quantity.ts';
import { coordinateMetres } from '../../units/uncertainty.ts';
import type { BatteryFacts, Broken } from '../battery.ts';
import type { ReadingRule } from '../plumbing-code.ts';
import type { Reading } from '../reading.ts';
import { bathroomFaults } from '../rules/bathroom-conditions.ts';
import { circuitConditions } from '../rules/circuit-conditions.ts';
import type { Tools } from '../tools.ts';
import { groupSize, partOf } from './fixtures.ts';
import { openReadings } from './open-readings.ts';

/** Ways to vent a row, in the order of the book: 910 to 917. */
export function readings(tools: Tools): ReadingRule[] {
  const { family } = tools;
  return [
    { reading: 'common-vent', applies: isTwoLevels, broken: commonVentBreaks(tools) },
    { reading: 'wet-vent', applies: fromUpstream, broken: wetVentBreaks(tools) },
    {
      reading: 'circuit-vent',
      applies: fromUpstream,
      broken: circuitConditions(family, {
        allowed: 'IPC-R62',
        groups: 'IPC-R63',
        vent: 'IPC-R64',
        slope: 'IPC-R65',
        relief: 'IPC-R66',
        others: 'IPC-R69',
      }),
    },
    ...openReadings(tools),
    { reading: 'individual-vent', applies: fromUpstream, broken: individualBreaks(tools) },
  ];
}

/**
 * Neither holds and both break equally many: a vent over a drop is drawn for a wet vent; on a level branch whatever is no
 * bathroom fixture speaks for a circuit vent.
 */
export const whenNoneHolds = ({ traps, circuit }: BatteryFacts): Reading =>
  circuit.vertical === 0 && traps.some(({ row }) => partOf(row) === null) ? 'circuit-vent' : 'wet-vent';

const fromUpstream = ({ open }: BatteryFacts): boolean => open === null;

/** Two traps on one vertical pipe below one vent, and nobody else's water. */
const isTwoLevels = ({ open, traps, guests, wet }: BatteryFacts): boolean =>
  open === null && traps.length === 2 && guests.length === 0 && wet.level === 0 && wet.vertical > 0;

type Breaks = (facts: BatteryFacts) => Broken[];

function commonVentBreaks({ family, omit }: Tools): Breaks {
  const table = family.table('common-vent');
  const { id, clause } = family.rule('IPC-R46');
  return ({ traps, wet }) => {
    const broken: Broken[] = [];
    const breaks = (facts: Broken['facts']): void => {
      broken.push({ rule: id, clause, facts, finding: 'common-vent-not-allowed' });
    };
    const [upper] = traps;
    if (wet.storeys > 1) breaks({ storeys: wet.storeys });
    if (upper?.closet) breaks({ closetAbove: true });
    if (upper !== undefined && sizeForLoad(table, 'upper', upper.load, omit).size === null)
      breaks({ loadUnits: unitsOf(upper.load), limitUnits: lastLimit(table) });
    return broken;
  };
}

const lastLimit = (table: ReturnType<Tools['family']['table']>): number => {
  const value = table.rows.at(-1)!.amount(table.columns.at(-1)!.id).value;
  return typeof value === 'number' ? value / 60 : 0;
};

function wetVentBreaks({ family, omit }: Tools): Breaks {
  const table = family.table('wet-vent');
  const mostGroups = family.number('wet-vent-groups', 'count');
  return (facts) => {
    const { wet, traps } = facts;
    const broken: Broken[] = [];
    const breaks = (
      rule: string,
      given: Broken['facts'],
      finding: Broken['finding'] = 'wet-vent-not-allowed',
    ): void => {
      broken.push({ rule, clause: family.rule(rule).clause, facts: given, finding });
    };
    const faults = bathroomFaults(facts, partOf, groupSize);
    if (faults.outside > 0) breaks('IPC-R51', { outsideGroup: faults.outside, kinds: faults.kinds.join(', ') });
    if (faults.groups > mostGroups.value)
      breaks('IPC-R51', { bathroomGroups: faults.groups, bathroomGroupsMost: mostGroups.value });
    if (faults.storeys > 1) breaks('IPC-R51', { storeys: faults.storeys });
    const own = traps.filter(({ ownVent }) => ownVent);
    if (wet.level === 0) {
      const closets = traps.filter(({ closet }) => closet);
      const first = closets[0];
      if (closets.some(({ joins }) => joins !== first?.joins)) breaks('IPC-R53', { closetsApart: true });
      if (first !== undefined && traps.some(({ closet, place }) => !closet && place > first.place))
        breaks('IPC-R53', { closetUpstream: true });
      if (own.length === 0) breaks('IPC-R55', { dryVentApart: true });
    } else {
      if (own.length === 0) breaks('IPC-R54', { dryVentApart: true });
      if (own.length > 0 && own.every(({ emergency }) => emergency)) breaks('IPC-R54', { emergencyVent: true });
      if (own.some(({ closet, drops }) => closet && drops.height > coordinateMetres))
        breaks('IPC-R52', { closetDrops: true });
    }
    if (sizeForLoad(table, 'load', wet.passes, omit).size === null)
      breaks('IPC-R56', { loadUnits: unitsOf(wet.passes), limitUnits: lastLimit(table) }, 'wet-vent-overloaded');
    return broken;
  };
}

function individualBreaks({ family }: Tools): Breaks {
  const { id, clause } = family.rule('IPC-R39');
  return ({ traps }) => {
    const without = traps.filter(({ ownVent, free }) => !ownVent && !free);
    return without.length === 0
      ? []
      : [{ rule: id, clause, facts: { traps: without.length }, finding: 'unvented-trap' }];
  };
}

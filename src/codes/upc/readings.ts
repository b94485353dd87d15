import { type Load, unitsOf } from '../../units/quantity.ts';
import { coordinateMetres } from '../../units/uncertainty.ts';
import type { BatteryFacts, Broken } from '../battery.ts';
import type { ReadingRule } from '../plumbing-code.ts';
import type { Reading } from '../reading.ts';
import { bathroomFaults } from '../rules/bathroom-conditions.ts';
import { circuitConditions } from '../rules/circuit-conditions.ts';
import type { Tools } from '../tools.ts';
import { groupSize, partOf } from './fixtures.ts';

type Breaks = (facts: BatteryFacts) => Broken[];

/** Ways to vent a row: 905, 908, 910 and 911. Two traps at two levels on one vertical pipe are a vertical wet vent here. */
export function readings(tools: Tools): ReadingRule[] {
  const { family } = tools;
  const upright = verticalBreaks(tools);
  const level = horizontalBreaks(tools);
  return [
    {
      reading: 'wet-vent',
      applies: fromUpstream,
      broken: (facts) => (facts.wet.level === 0 ? upright(facts) : level(facts)),
    },
    {
      reading: 'circuit-vent',
      applies: fromUpstream,
      broken: circuitConditions(family, {
        allowed: 'UPC-R51',
        groups: 'UPC-R52',
        vent: 'UPC-R53',
        slope: 'UPC-R54',
        relief: 'UPC-R55',
        others: 'UPC-R56',
      }),
    },
    {
      reading: 'combination-waste-and-vent',
      applies: ({ open, wet }) => (open === null ? !wet.stack : open.end !== 'stack'),
      broken: combinationBreaks(tools),
    },
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

/** A vertical pipe of one storey that drains light fixtures and vents up to four (908.1, R42). */
function verticalBreaks({ family }: Tools): Breaks {
  const mostLoad = family.number('vertical-wet-load', 'load');
  const mostFixtures = family.number('vertical-wet-fixtures', 'count');
  const longest = family.number('vertical-wet-length', 'length');
  const { id, clause } = family.rule('UPC-R42');
  return ({ wet, traps, guests }) => {
    const broken: Broken[] = [];
    const breaks = (facts: Broken['facts']): void => {
      broken.push({ rule: id, clause, facts, finding: 'wet-vent-not-allowed' });
    };
    if (wet.storeys > 1) breaks({ storeys: wet.storeys });
    if (traps.length > mostFixtures.value) breaks({ wetFixtures: traps.length, wetFixturesMost: mostFixtures.value });
    const last = Math.max(...traps.map(({ place }) => place));
    const draining = [...traps.filter(({ place }) => place < last), ...guests];
    const heaviest = Math.max(0, ...draining.map(({ load }) => load)) as Load;
    if (heaviest > mostLoad.value)
      breaks({ wetUnits: unitsOf(heaviest), wetUnitsMost: unitsOf(mostLoad.value as Load) });
    if (wet.length > longest.value + coordinateMetres)
      breaks({ wetLengthM: wet.length, wetLengthMostM: longest.value });
    return broken;
  };
}

/** A level branch that vents one bathroom, from the vent of a lavatory, bath, shower or bidet; its closet last (908.2, R45 to R50). */
function horizontalBreaks(tools: Tools): Breaks {
  const { family, settings } = tools;
  const mostGroups = typeof settings.wetVentGroups === 'number' ? settings.wetVentGroups : 1;
  const size = groupSize(tools);
  return (facts) => {
    const { traps } = facts;
    const broken: Broken[] = [];
    const breaks = (rule: string, given: Broken['facts']): void => {
      broken.push({ rule, clause: family.rule(rule).clause, facts: given, finding: 'wet-vent-not-allowed' });
    };
    const faults = bathroomFaults(facts, partOf, size);
    if (faults.outside > 0) breaks('UPC-R45', { outsideGroup: faults.outside, kinds: faults.kinds.join(', ') });
    if (faults.groups > mostGroups)
      breaks('UPC-R45', { bathroomGroups: faults.groups, bathroomGroupsMost: mostGroups });
    if (faults.storeys > 1) breaks('UPC-R45', { storeys: faults.storeys });
    const own = traps.filter(({ ownVent }) => ownVent);
    const barred = own.find(({ row, kind }) => partOf(row) === 'closet' || kind === 'floor-drain');
    if (own.length === 0) breaks('UPC-R46', { dryVentApart: true });
    else if (barred !== undefined) breaks('UPC-R46', { dryVentOf: barred.kind });
    const closet = traps.find((trap) => trap.closet);
    if (closet !== undefined && traps.some((trap) => !trap.closet && trap.place > closet.place))
      breaks('UPC-R49', { closetUpstream: true });
    return broken;
  };
}

/** By approval only, without closets and urinals; what lies far is vented by itself (910, R72). */
function combinationBreaks({ family, settings }: Tools): Breaks {
  const longest = family.number('combination-branch', 'length');
  const { id, clause } = family.rule('UPC-R72');
  return ({ traps, guests, open }) => {
    const broken: Broken[] = [];
    const breaks = (facts: Broken['facts']): void => {
      broken.push({ rule: id, clause, facts, finding: 'combination-not-allowed' });
    };
    if (settings.combinationApproved !== true) breaks({ approval: true });
    const barred = [...traps, ...guests].filter(({ kind }) => kind === 'water-closet' || kind === 'urinal');
    if (barred.length > 0) {
      const kinds = [...new Set(barred.map(({ kind }) => kind!))].sort();
      breaks({ barred: barred.length, barredKinds: kinds.join(', ') });
    }
    const farthest = Math.max(...traps.map(({ reach }, at) => open?.reaches[at] ?? reach));
    if (farthest > longest.value + coordinateMetres) breaks({ armM: farthest, armMostM: longest.value });
    return broken;
  };
}

function individualBreaks({ family }: Tools): Breaks {
  const { id, clause } = family.rule('UPC-R34');
  return ({ traps }) => {
    const without = traps.filter(({ ownVent, free }) => !ownVent && !free);
    return without.length === 0
      ? []
      : [{ rule: id, clause, facts: { traps: without.length }, finding: 'unvented-trap' }];
  };
}

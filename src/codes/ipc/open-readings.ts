import type { FixtureKind } from '../../model/identity.ts';
import { sizeForLoad } from '../../tables/find-size.ts';
import { unitsOf } from '../../units/quantity.ts';
import { coordinateMetres } from '../../units/uncertainty.ts';
import type { BatteryFacts, Broken } from '../battery.ts';
import type { ReadingRule } from '../plumbing-code.ts';
import { heaviestInterval } from '../rules/branch-intervals.ts';
import type { Tools } from '../tools.ts';
import { singleStackColumn } from './single-stack.ts';

type Breaks = (facts: BatteryFacts) => Broken[];

/** Venting without a vent to each row: common vents past a joint, waste stacks, combination pipes, single stacks. */
export function openReadings(tools: Tools): ReadingRule[] {
  return [
    { reading: 'common-vent', applies: isJointAndVent, broken: commonVentBelow(tools) },
    { reading: 'waste-stack-vent', applies: isOnStack, broken: wasteStack(tools) },
    {
      reading: 'combination-waste-and-vent',
      applies: ({ open, wet }) => (open === null ? !wet.stack : open.end !== 'stack'),
      broken: combination(tools),
    },
    {
      reading: 'single-stack',
      applies: (facts) => isOnStack(facts) || facts.open?.end === 'stack',
      broken: singleStack(tools),
    },
  ];
}

/** Every trap joins the stack itself: one on the drain past its foot does not stand on it. */
const isOnStack = ({ open, wet }: BatteryFacts): boolean => open === null && wet.stack && wet.offStack === 0;

/** Two drains that run together, and a vent on what they have become. */
const isJointAndVent = ({ open, traps, guests }: BatteryFacts): boolean =>
  open !== null && open.end === 'vent' && traps.length === 2 && guests.length === 0;

/** Same level: the vent stands at the joint of the two drains or downstream of it (911.2, R45). */
function commonVentBelow({ family }: Tools): Breaks {
  const { id, clause } = family.rule('IPC-R45');
  return ({ traps, wet }) => {
    const broken: Broken[] = [];
    const breaks = (facts: Broken['facts']): void => {
      broken.push({ rule: id, clause, facts, finding: 'common-vent-not-allowed' });
    };
    if (new Set(traps.map(({ storey }) => storey)).size > 1) breaks({ storeys: wet.storeys });
    if (traps.some(({ drops }) => drops.pipes > 0) || wet.vertical > 0) breaks({ drops: traps.length });
    return broken;
  };
}

/** A vertical stack that vents all its fixtures: no closet, no urinal, no offset (913, R59, R61). */
function wasteStack({ family, omit }: Tools): Breaks {
  const table = family.table('waste-stack');
  const interval = family.number('interval-least', 'length');
  return ({ wet, stack, traps, guests }) => {
    const broken: Broken[] = [];
    const breaks = (rule: string, facts: Broken['facts']): void => {
      broken.push({ rule, clause: family.rule(rule).clause, facts, finding: 'waste-stack-vent-not-allowed' });
    };
    const barred = [...traps, ...guests].filter(({ kind }) => kind === 'water-closet' || kind === 'urinal').length;
    const closets = stack?.footClosets ?? 0;
    if (barred > 0 || closets > 0)
      breaks('IPC-R59', { barred: Math.max(barred, closets), barredKinds: 'water closets and urinals' });
    if (wet.level > 0) breaks('IPC-R59', { offsets: wet.offsets.length, offsetsMost: 0 });
    if (stack === null) return broken;
    const total = sizeForLoad(table, 'total', stack.footLoad, omit);
    if (total.size === null)
      breaks('IPC-R61', { loadUnits: unitsOf(stack.footLoad), limitUnits: printed(total.cell.value) });
    const heaviest = heaviestInterval(stack.allJoins, interval.value);
    const one = sizeForLoad(table, 'oneInterval', heaviest, omit);
    if (one.size === null) breaks('IPC-R61', { loadUnits: unitsOf(heaviest), limitUnits: printed(one.cell.value) });
    return broken;
  };
}

const printed = (value: unknown): number | null => (typeof value === 'number' ? value / 60 : null);

/** Kinds that a combination pipe may take (915.1, R89). */
const combinationKinds: ReadonlySet<FixtureKind> = new Set([
  'floor-drain',
  'sink',
  'kitchen-sink',
  'mop-sink',
  'laundry-tray',
  'lavatory',
  'wash-fountain',
  'drinking-fountain',
]);

/** One level pipe, of two pipe sizes' worth of room, for floor drains, sinks, lavatories and fountains (915, R89 to R93). */
function combination({ family, omit }: Tools): Breaks {
  const table = family.table('combination');
  const arms = family.table('trap-arm');
  const drop = family.number('combination-drop', 'length');
  const steepest = family.number('combination-slope-most', 'slope');
  return ({ traps, guests, wet, open, circuit }) => {
    const broken: Broken[] = [];
    const breaks = (rule: string, facts: Broken['facts']): void => {
      broken.push({ rule, clause: family.rule(rule).clause, facts, finding: 'combination-not-allowed' });
    };
    const barred = [...traps, ...guests].filter(({ kind }) => kind === null || !combinationKinds.has(kind));
    if (barred.length > 0) {
      const kinds = [...new Set(barred.map(({ kind }) => kind ?? 'unidentified fixture'))].sort();
      breaks('IPC-R89', { barred: barred.length, barredKinds: kinds.join(', ') });
    }
    if (wet.vertical > 0) breaks('IPC-R90', { verticalPipes: wet.vertical });
    const highest = Math.max(...traps.map(({ drops }) => drops.height));
    if (highest > drop.value + coordinateMetres) breaks('IPC-R90', { dropM: highest, dropMostM: drop.value });
    if (circuit.steepest !== null && circuit.steepest > steepest.value * 1.005)
      breaks('IPC-R90', { slope: circuit.steepest, slopeMost: steepest.value });
    const column = open?.endsAt === 'building-drain' ? 'toBuildingDrain' : 'toBranchOrStack';
    const found = sizeForLoad(table, column, wet.passes, omit);
    if (found.size === null)
      breaks('IPC-R91', { loadUnits: unitsOf(wet.passes), limitUnits: printed(found.cell.value) });
    for (const { reach, size } of traps) {
      const row = arms.rows.findLast(
        (one) => family.series.rank(one.size('trap').value as never) <= family.series.rank(size),
      );
      const longest = row?.amount('longest').value;
      if (traps.length > 1 && typeof longest === 'number' && reach > longest + coordinateMetres)
        breaks('IPC-R93', { armM: reach, armMostM: longest });
    }
    return broken;
  };
}

/** Fixtures near one stack that is large enough to be the vent of all of them (917, R95, R96). */
function singleStack({ family, omit }: Tools): Breaks {
  const table = family.table('single-stack');
  const closetFar = family.number('single-stack-closet-distance', 'length');
  const far = family.number('single-stack-distance', 'length');
  return ({ traps, stack, open }) => {
    const broken: Broken[] = [];
    const breaks = (rule: string, facts: Broken['facts']): void => {
      broken.push({ rule, clause: family.rule(rule).clause, facts, finding: 'single-stack-not-allowed' });
    };
    traps.forEach(({ closet, reach }, at) => {
      const length = open?.reaches[at] ?? reach;
      const most = closet ? closetFar.value : far.value;
      if (length > most + coordinateMetres) breaks('IPC-R96', { toStackM: length, toStackMostM: most, closet });
    });
    if (stack === null) return broken;
    const found = sizeForLoad(table, singleStackColumn(stack.rise).id, stack.footLoad, omit);
    if (found.size === null)
      breaks('IPC-R95', { loadUnits: unitsOf(stack.footLoad), limitUnits: printed(found.cell.value) });
    return broken;
  };
}

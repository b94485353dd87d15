import { type Finding, finding } from '../../findings/finding.ts';
import { reachesSlope } from '../../tables/find-slope.ts';
import type { Row } from '../../tables/table.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import { type Load, unitsOf } from '../../units/quantity.ts';
import { coordinateMetres, turnDegrees } from '../../units/uncertainty.ts';
import type { Check, CheckedTrap } from '../check.ts';
import { slopeReading } from '../rules/slopes-as-laid.ts';
import { yokesTooLow } from '../rules/stack-foot-checks.ts';
import { type ArmLimits, armFaults, everyTrapVented, leastSlope, outletPipe } from '../rules/trap-checks.ts';
import { frostCheck, islandVents } from '../rules/vent-checks.ts';
import { endsOverRoof, ventLeavesUpward, ventsMeetHigh } from '../rules/vent-place-checks.ts';
import { widthOf } from '../rules/vent-sizes.ts';
import type { Tools } from '../tools.ts';
import { cleanouts } from './cleanouts.ts';
import { sudsMakers } from './fixtures.ts';

/** Demands that are no size: R22, R24, R26, R34 to R39, R61 to R63, R70, R71, R73. */
export function checks(tools: Tools): Check[] {
  const { family, settings } = tools;
  const { rule, series } = family;
  return [
    slopes(tools),
    outletPipe(rule('UPC-R39'), { vertical: family.number('tailpiece-vertical', 'length').value }),
    cleanouts(tools),
    everyTrapVented(rule('UPC-R34')),
    trapArms(tools),
    armTurns(tools),
    commonVents(tools),
    ventStacks(tools),
    ventAreas(tools),
    sudsZones(tools),
    sewerLoads(tools),
    ventLeavesUpward(rule('UPC-R65'), family.number('vent-leaves', 'angle').value),
    ventsMeetHigh(
      rule('UPC-R64'),
      { usual: family.number('rim-usual', 'length').value, closet: family.number('rim-closet', 'length').value },
      family.number('vent-rise', 'length').value,
    ),
    endsOverRoof(rule('UPC-R67'), family.number('terminal-above-roof', 'length').value),
    islandVents(rule('UPC-R71'), {
      allows: (row) => row.startsWith('sink-') || row === 'lavatory',
      allowed: 'sinks and lavatories',
    }),
    valves(tools),
    ...(settings.frostEnlargement === true
      ? [frostCheck(rule('UPC-R70'), series, family.size('frost-least').value)]
      : []),
  ];
}

/** A quarter inch a foot; an eighth from 4 in on where the authority approves (708.1, R24). */
function slopes({ family, settings }: Tools): Check {
  const { rank } = family.series;
  const full = family.number('slope-least', 'slope');
  const approved = family.number('slope-least-approved', 'slope');
  const from = family.size('slope-approved-from');
  const share = family.number('slope-percent-share', 'share');
  return leastSlope(
    family.rule('UPC-R24'),
    (_, size) =>
      share.value * (settings.slopeEighth === true && rank(size) >= rank(from.value) ? approved.value : full.value),
  );
}

/** The row of the arm table for a trap: the largest that begins at or below its size. */
export function armRow({ family }: Tools): (trap: NominalSize) => Row | undefined {
  const table = family.table('trap-arm');
  const { rank } = family.series;
  return (trap) => table.rows.findLast((row) => rank(row.size('from').value as NominalSize) <= rank(trap));
}

/** Shortest, longest, fall and slope of an arm; of a closet its length alone (1002.2, 1002.4, R35, R36, R38). */
function trapArms(tools: Tools): Check {
  const { family } = tools;
  const { series, rule } = family;
  const rowOf = armRow(tools);
  const closet = family.number('closet-arm', 'length');
  const slope = family.number('slope-least', 'slope');
  const share = family.number('slope-percent-share', 'share');
  const printed = (trap: NominalSize, column: string): number | null => {
    const value = rowOf(trap)?.amount(column).value;
    return typeof value === 'number' ? value : null;
  };
  const limits: ArmLimits = {
    longest: (trap) => printed(trap, 'longest'),
    shortest: (trap) => printed(trap, 'shortest') ?? (2 * widthOf(series, trap)) / 1000,
    fall: 1,
    slope: () => slope.value * share.value,
    turn: () => null,
  };
  const none = (): null => null;
  const ofCloset: ArmLimits = { longest: () => closet.value, shortest: none, fall: null, slope: none, turn: none };
  return {
    id: 'UPC-R35',
    run: ({ traps }) =>
      traps
        .filter(isVented)
        .flatMap((trap) =>
          trap.siphonic
            ? armFaults(trap, ofCloset, series, rule('UPC-R36').clause)
            : armFaults(trap, limits, series, rule('UPC-R35').clause),
        ),
  };
}

const isVented = ({ how }: CheckedTrap): boolean => how !== 'unvented' && how !== 'free';

/** An arm that turns more than a quarter, from 3 in on more than 135 degrees, needs a cleanout (1002.3, R37). */
function armTurns({ family }: Tools): Check {
  const small = family.number('arm-turn', 'angle');
  const large = family.number('arm-turn-large', 'angle');
  const { rank } = family.series;
  const { clause } = family.rule('UPC-R37');
  return {
    id: 'UPC-R37',
    run: ({ traps }) =>
      traps.filter(isVented).flatMap(({ element, size, arm, siphonic }): Finding[] => {
        const most = rank(size) >= rank('3 in' as NominalSize) ? large.value : small.value;
        if (siphonic || arm === null || arm.turn === null || arm.turn <= most + turnDegrees) return [];
        return [
          finding('cleanout-missing', [element], { turnDeg: arm.turn, limitDeg: most, what: 'trap arm' }, clause),
        ];
      }),
  };
}

/** One vent serves two fixtures at one level, no more (905.6, R22). */
function commonVents({ family }: Tools): Check {
  const { clause } = family.rule('UPC-R22');
  return {
    id: 'UPC-R22',
    run: ({ vents, traps }) => {
      const vented = new Map(traps.map(({ element, how }) => [element, how]));
      return vents.flatMap(({ elements, role, traps: own }): Finding[] => {
        if (role !== 'continuous-vent') return [];
        const alone = own.filter(({ element }) => vented.get(element) === role);
        if (alone.length <= 2) return [];
        const about = [...elements, ...alone.map(({ element }) => element)];
        const facts = { fixtures: alone.length, wetFixtures: alone.length, wetFixturesMost: 2 };
        return [finding('common-vent-not-allowed', about, facts, clause)];
      });
    },
  };
}

/** Ten storeys or more ask for a vent stack, and a yoke vent at every fifth floor from the top (907, R62, R63). */
function ventStacks({ family }: Tools): Check {
  const storeys = family.number('vent-stack-storeys', 'count');
  const each = family.number('yoke-floors', 'count');
  const overFloor = family.number('yoke-height', 'length');
  const { rule } = family;
  return {
    id: 'UPC-R62',
    run: ({ stacks }) =>
      stacks.flatMap(({ elements, height, ventStack, yokes, yokeTops, topStorey, lowestStorey }): Finding[] => {
        const found = yokesTooLow(yokeTops, overFloor.value, rule('UPC-R63'));
        if (height < storeys.value) return found;
        if (ventStack === null || ventStack === 'above a branch') {
          const facts = { storeysHigh: height, storeysFrom: storeys.value };
          found.push(
            ventStack === null
              ? finding('vent-stack-missing', elements, facts, rule('UPC-R62').clause)
              : finding('vent-stack-misplaced', elements, { ...facts, at: ventStack }, rule('UPC-R62').clause),
          );
        }
        for (let floor = topStorey - each.value + 1; floor > lowestStorey; floor -= each.value) {
          // Its lower end stands below the branch of the floor, which may be under that floor.
          if (yokes.some((storey) => storey === floor || storey === floor - 1)) continue;
          found.push(
            finding('yoke-vent-missing', elements, { storey: floor, storeys: height }, rule('UPC-R63').clause),
          );
        }
        return found;
      }),
  };
}

/** The vents that reach open air are together as large as the sewer that the load requires (904.1, R61). */
function ventAreas({ family }: Tools): Check {
  const { series } = family;
  const { clause } = family.rule('UPC-R61');
  const areaOf = (size: NominalSize): number => Math.PI * (widthOf(series, size) / 2000) ** 2;
  return {
    id: 'UPC-R61',
    run: ({ drains }) =>
      drains.flatMap(({ elements, required, mouths }): Finding[] => {
        const open = mouths.flatMap(({ how, size }) => (how === 'valve' || size === null ? [] : [size]));
        if (required === null || open.length === 0) return [];
        const area = open.reduce((sum, size) => sum + areaOf(size), 0);
        const least = areaOf(required);
        // Areas of nominal bores are exact: this much is only the rounding of the arithmetic.
        if (area >= least * (1 - 1e-9)) return [];
        return [
          finding(
            'vent-area-too-small',
            elements,
            { areaM2: area, leastM2: least, vents: open.length, required },
            clause,
          ),
        ];
      }),
  };
}

/** A large building sewer carries the least load that its size and slope want (717.1, R27). */
function sewerLoads({ family }: Tools): Check {
  const table = family.table('sewer');
  const { share } = slopeReading(family);
  const { clause } = family.rule('UPC-R27');
  return {
    id: 'UPC-R27',
    run: ({ pipes }) =>
      pipes.flatMap(({ use, element, modelled }): Finding[] => {
        if (use.drain !== 'building-sewer' || use.vertical || element === null || modelled === null) return [];
        const row = table.rows.find((one) => one.size('size').value === modelled);
        const column =
          use.slope === null
            ? undefined
            : table.columns.findLast(({ slope }) => slope !== null && reachesSlope(use.slope!, slope * share));
        const least = column === undefined ? undefined : row?.amount(`least ${column.id}`).value;
        if (typeof least !== 'number' || use.load >= least) return [];
        const facts = { modelled, loadUnits: unitsOf(use.load), leastUnits: unitsOf(least as Load), slope: use.slope };
        return [finding('sewer-too-large', [element], facts, clause)];
      }),
  };
}

/** A stack of several storeys that carries suds takes no drain near its turn to level (711.1, R26). */
function sudsZones({ family }: Tools): Check {
  const length = family.number('suds-length', 'length');
  const storeys = family.number('suds-storeys', 'count');
  const { clause } = family.rule('UPC-R26');
  return {
    id: 'UPC-R26',
    run: ({ stacks }) =>
      stacks.flatMap(({ elements, storeysServed, joins, footHeight, firstBelow, footCounts }): Finding[] => {
        if (storeysServed < storeys.value || (footCounts[sudsMakers] ?? 0) === 0) return [];
        const lowest = joins.at(-1)?.height ?? null;
        const above = lowest === null || footHeight === null ? Number.POSITIVE_INFINITY : lowest - footHeight;
        const below = firstBelow?.distance ?? Number.POSITIVE_INFINITY;
        const nearest = Math.min(above, below);
        if (nearest >= length.value - coordinateMetres) return [];
        return [
          finding('suds-zone', elements, { distanceM: nearest, leastM: length.value, above: above <= below }, clause),
        ];
      }),
  };
}

/** The code names no air admittance valves: whoever approves decides (R73). */
function valves({ family }: Tools): Check {
  const { id } = family.rule('UPC-R73');
  return {
    id,
    run: ({ vents }) =>
      vents.flatMap(({ elements, mouth }): Finding[] =>
        mouth === 'valve' ? [finding('valve-needs-approval', elements, {})] : [],
      ),
  };
}

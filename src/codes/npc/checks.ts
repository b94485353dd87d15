import { type Finding, finding } from '../../findings/finding.ts';
import { rowAtSize } from '../../tables/find-row.ts';
import { leastSlopeOf } from '../../tables/find-slope.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import { coordinateMetres, turnDegrees } from '../../units/uncertainty.ts';
import type { Check, CheckedTrap } from '../check.ts';
import { cleanoutRules } from '../cleanouts.ts';
import { cleanoutChecks, manholes } from '../rules/cleanout-checks.ts';
import { type ArmLimits, armFaults, everyTrapVented, leastSlope, outletPipe } from '../rules/trap-checks.ts';
import { frostCheck, mainVentCheck, valveHeight } from '../rules/vent-checks.ts';
import { endsOverRoof, ventLeavesUpward, ventsMeetHigh } from '../rules/vent-place-checks.ts';
import { widthOf } from '../rules/vent-sizes.ts';
import type { Tools } from '../tools.ts';
import { isPumped } from './fixtures.ts';
import { stackChecks } from './stack-checks.ts';

/** Demands that are no size: R15, R26 to R36, R39 to R42, R67, R68, R71, R72, R78, R83 to R86. */
export function checks(tools: Tools): Check[] {
  const { family, settings } = tools;
  const { rule, series } = family;
  const mainVent = family.size('main-vent');
  return [
    outletPipe(rule('NPC-R15'), { whole: family.number('outlet-pipe-length', 'length').value }),
    slopes(tools),
    standpipes(tools),
    cleanouts(tools),
    manholes(rule('NPC-R32'), series, {
      from: family.size('manhole-sewer').value,
      first: family.number('manhole-first', 'length').value,
      next: family.number('manhole-spacing', 'length').value,
    }),
    everyTrapVented(rule('NPC-R36')),
    trapArms(tools),
    ventLeavesUpward(rule('NPC-R41'), family.number('vent-leaves', 'angle').value),
    ventsMeetHigh(
      rule('NPC-R42'),
      { usual: family.number('rim-usual', 'length').value, closet: family.number('rim-closet', 'length').value },
      0,
    ),
    ...stackChecks(tools),
    mainVentCheck(rule('NPC-R78'), series, () => mainVent.value),
    endsOverRoof(rule('NPC-R83'), family.number('terminal-above-roof', 'length').value),
    ...(settings.frostEnlargement === true
      ? [frostCheck(rule('NPC-R84'), series, family.size('frost-least').value)]
      : []),
    valves(tools),
    valveHeight(rule('NPC-R85'), family.number('valve-above-drain', 'length').value),
    freshAir(tools),
  ];
}

function slopes({ family }: Tools): Check {
  const { rank } = family.series;
  const smallUpTo = family.size('slope-small-up-to');
  const small = family.number('slope-small', 'slope');
  const branchLarge = family.number('slope-branch-large', 'slope');
  const drain = family.table('drain');
  return leastSlope(family.rule('NPC-R26'), ({ use }, size) => {
    if (isPumped(use)) return null;
    if (rank(size) <= rank(smallUpTo.value)) return small.value;
    if (use.drain === 'building-drain' || use.drain === 'building-sewer')
      return leastSlopeOf(drain, size)?.slope ?? null;
    return branchLarge.value;
  });
}

function trapArms({ family }: Tools): Check {
  const table = family.table('trap-arm');
  const { series } = family;
  const least = family.number('trap-arm-least', 'factor');
  const mostTurn = family.number('trap-arm-turn', 'angle');
  const closet = {
    height: family.number('closet-vent-vertical', 'length'),
    plan: family.number('closet-vent-horizontal', 'length'),
    turn: family.number('closet-vent-turn', 'angle'),
  };
  const arms = family.rule('NPC-R39');
  const closets = family.rule('NPC-R40');
  const printed = (trap: NominalSize, column: string): number | null => {
    const value = rowAtSize(table, 'trap', trap, 'smaller', series)?.amount(column).value;
    return typeof value === 'number' ? value : null;
  };
  const isListed = (trap: NominalSize): boolean => rowAtSize(table, 'trap', trap, 'smaller', series) !== null;
  const limits: ArmLimits = {
    longest: (trap) => printed(trap, 'longest'),
    shortest: (trap) => (least.value * widthOf(series, trap)) / 1000,
    fall: family.number('trap-arm-fall', 'factor').value,
    slope: (trap) => printed(trap, 'slope'),
    turn: () => mostTurn.value,
  };
  const ofCloset = ({ element, arm, size }: CheckedTrap): Finding[] => {
    if (arm === null) return [];
    const found: Finding[] = [];
    const far = (value: number | null, limit: number, room: number): boolean => value !== null && value > limit + room;
    const report = (what: string, facts: Record<string, number | null>): void => {
      found.push(finding('trap-arm-too-long', [element], { ...facts, trap: size, what }, closets.clause));
    };
    if (far(arm.height, closet.height.value, coordinateMetres))
      report('closet height', { lengthM: arm.height, limitM: closet.height.value });
    if (far(arm.plan, closet.plan.value, coordinateMetres))
      report('closet length', { lengthM: arm.plan, limitM: closet.plan.value });
    if (far(arm.turn, closet.turn.value, turnDegrees))
      report('closet turn', { turnDeg: arm.turn, limitDeg: closet.turn.value });
    return found;
  };
  return {
    id: 'NPC-R39',
    run: ({ traps }) =>
      traps
        .filter(({ how }) => how !== 'unvented' && how !== 'free')
        .flatMap((trap) => {
          if (trap.siphonic) return ofCloset(trap);
          return isListed(trap.size) ? armFaults(trap, limits, series, arms.clause) : [];
        }),
  };
}

/** A clothes washer's drawn trap lies well below its standpipe's mouth (R29). */
function standpipes({ family }: Tools): Check {
  const least = family.number('standpipe-least', 'length');
  const { clause } = family.rule('NPC-R29');
  return {
    id: 'NPC-R29',
    run: ({ traps }) =>
      traps.flatMap(({ element, fixture, isDrawn, outletLength, outletLevel }): Finding[] => {
        const upright = outletLength - outletLevel;
        if (fixture !== 'clothes-washer' || !isDrawn || upright >= least.value - coordinateMetres) return [];
        return [finding('standpipe-too-short', [element], { heightM: upright, leastM: least.value }, clause)];
      }),
  };
}

/** Where drains must open and how wide (R30, R31, R33 to R35); places that a model does not tell are not asked. */
function cleanouts({ family }: Tools): Check {
  const { rule, series } = family;
  const printed = cleanoutRules(family)!;
  return cleanoutChecks(
    {
      spacing: { rule: rule('NPC-R30'), reach: printed.reach },
      size: { rule: rule('NPC-R31'), least: printed.sizeFor },
      buildingDrain: rule('NPC-R33'),
      stackFoot: { rule: rule('NPC-R34'), within: family.number('stack-cleanout-within', 'length').value },
      sink: { rule: rule('NPC-R35'), turn: family.number('sink-drain-turn', 'angle').value },
      interceptor: rule('NPC-R35'),
      buildingTrap: rule('NPC-R35'),
    },
    series,
  );
}

/** An air admittance valve stands only where the code lists it, and some vent still reaches open air (R85). */
function valves({ family }: Tools): Check {
  const { id, clause } = family.rule('NPC-R85');
  return {
    id,
    run: ({ vents, drains }) => [
      ...vents.flatMap(({ elements, mouth }): Finding[] =>
        mouth === 'valve' ? [finding('valve-needs-approval', elements, { listed: true }, clause)] : [],
      ),
      ...drains.flatMap(({ elements, mouths }): Finding[] =>
        mouths.length > 0 && mouths.every(({ how }) => how === 'valve')
          ? [finding('valve-not-allowed', elements, { onlyValves: true }, clause)]
          : [],
      ),
    ],
  };
}

/** A building trap has a fresh air inlet close upstream (R86). */
function freshAir({ family }: Tools): Check {
  const within = family.number('fresh-air-within', 'length');
  const least = family.size('fresh-air-least');
  const { id, clause } = family.rule('NPC-R86');
  const { rank } = family.series;
  return {
    id,
    run: ({ access }) =>
      access.buildingTraps.flatMap(({ element, freshAir: inlet }): Finding[] => {
        const near = inlet !== null && inlet.distance <= within.value + coordinateMetres;
        if (near && (inlet.size === null || rank(inlet.size) >= rank(least.value))) return [];
        const facts = {
          withinM: within.value,
          least: least.value,
          ...(near ? { size: inlet.size } : { distanceM: inlet?.distance ?? null }),
        };
        return [finding('fresh-air-inlet-missing', [element], facts, clause)];
      }),
  };
}

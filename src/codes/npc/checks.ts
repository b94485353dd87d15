import { type Finding, finding } from '../../findings/finding.ts';
import { rowAtSize } from '../../tables/find-row.ts';
import { leastSlopeOf } from '../../tables/find-slope.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import { unitsOf } from '../../units/quantity.ts';
import { coordinateMetres, turnDegrees } from '../../units/uncertainty.ts';
import type { Check, CheckedStack, CheckedTrap } from '../check.ts';
import { type ArmLimits, armFaults, everyTrapVented, leastSlope, outletPipe } from '../rules/trap-checks.ts';
import { mainVentCheck } from '../rules/vent-checks.ts';
import { widthOf } from '../rules/vent-sizes.ts';
import type { Tools } from '../tools.ts';

/** Demands that are no size: R15, R26, R36, R39, R40, R67, R68, R71, R72, R78. */
export function checks(tools: Tools): Check[] {
  const { family } = tools;
  const mainVent = family.size('main-vent');
  return [
    outletPipe(family.rule('NPC-R15'), { whole: family.number('outlet-pipe-length', 'length').value }),
    slopes(tools),
    everyTrapVented(family.rule('NPC-R36')),
    trapArms(tools),
    stackVents(tools),
    offsetRelief(tools),
    mainVentCheck(family.rule('NPC-R78'), family.series, () => mainVent.value),
  ];
}

function slopes({ family }: Tools): Check {
  const { rank } = family.series;
  const smallUpTo = family.size('slope-small-up-to');
  const small = family.number('slope-small', 'slope');
  const branchLarge = family.number('slope-branch-large', 'slope');
  const drain = family.table('drain');
  return leastSlope(family.rule('NPC-R26'), ({ use }, size) => {
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

/** A stack goes on upward (R67), has a vent stack beyond four storeys (R68) and yoke vents beyond eleven (R71). */
function stackVents({ family }: Tools): Check {
  const storeys = family.number('vent-stack-storeys', 'count');
  const yokeStoreys = family.number('yoke-storeys', 'count');
  const section = family.number('yoke-section', 'count');
  const freeVent = family.size('yoke-free-vent');
  const { rank } = family.series;
  /** Every storey is tied to the vent stack by a vent as large as its branch, or of the printed size if that is less. */
  const isTied = (ties: CheckedStack['ties']): boolean =>
    ties.every((tie) => tie !== null && rank(tie.vent) >= Math.min(rank(tie.branch), rank(freeVent.value)));
  return {
    id: 'NPC-R68',
    run: ({ stacks }) =>
      stacks.flatMap(
        ({ elements, hasStackVent, ventStack, isWetVent, storeysServed, yokes, ties, topStorey, footLoad }) => {
          const found: Finding[] = [];
          if (!hasStackVent)
            found.push(
              finding('stack-vent-missing', elements, { loadUnits: unitsOf(footLoad) }, family.rule('NPC-R67').clause),
            );
          if (storeysServed > storeys.value && ventStack !== 'foot' && !isWetVent) {
            found.push(
              finding(
                ventStack === null ? 'vent-stack-missing' : 'vent-stack-misplaced',
                elements,
                {
                  storeys: storeysServed,
                  storeysMost: storeys.value,
                  ...(ventStack === null ? {} : { at: ventStack }),
                },
                family.rule('NPC-R68').clause,
              ),
            );
          }
          if (storeysServed > yokeStoreys.value && !isTied(ties)) {
            for (let bottom = topStorey - section.value + 1; bottom > 0; bottom -= section.value) {
              if (yokes.some((storey) => storey >= bottom - 1 && storey <= bottom)) continue;
              found.push(
                finding(
                  'yoke-vent-missing',
                  elements,
                  { storey: bottom, storeys: storeysServed },
                  family.rule('NPC-R71').clause,
                ),
              );
            }
          }
          return found;
        },
      ),
  };
}

function offsetRelief({ family }: Tools): Check {
  const length = family.number('offset-relief-length', 'length');
  const storeys = family.number('offset-relief-storeys', 'count');
  const load = family.number('offset-relief-load', 'load');
  const { clause } = family.rule('NPC-R72');
  return {
    id: 'NPC-R72',
    run: ({ stacks }) =>
      stacks.flatMap(({ offsets }) =>
        offsets
          .filter(
            (one) =>
              one.length > length.value + coordinateMetres &&
              one.storeysAbove > storeys.value &&
              one.loadAbove > load.value &&
              one.reliefVents < 2,
          )
          .map((one) =>
            finding(
              'offset-relief-vent-missing',
              one.elements,
              {
                offsetM: one.length,
                storeys: one.storeysAbove,
                loadUnits: unitsOf(one.loadAbove),
                reliefVents: one.reliefVents,
              },
              clause,
            ),
          ),
      ),
  };
}

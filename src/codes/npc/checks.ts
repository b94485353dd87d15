import { type Finding, finding } from '../../findings/finding.ts';
import { rowAtSize } from '../../tables/find-row.ts';
import { leastSlopeOf, reachesSlope } from '../../tables/find-slope.ts';
import { unitsOf } from '../../units/quantity.ts';
import { coordinateMetres, turnDegrees } from '../../units/uncertainty.ts';
import type { Check, CheckedPipe, CheckedTrap } from '../check.ts';
import type { Tools } from '../tools.ts';

/** Demands that are no size: R15, R26, R36, R39, R40, R67, R68, R71, R72, R78. */
export function checks(tools: Tools): Check[] {
  return [
    outletLength(tools),
    leastSlope(tools),
    everyTrapVented(tools),
    trapArms(tools),
    stackVents(tools),
    offsetRelief(tools),
    mainVent(tools),
  ];
}

function outletLength({ family }: Tools): Check {
  const longest = family.number('outlet-pipe-length', 'length');
  const { clause } = family.rule('NPC-R15');
  return {
    id: 'NPC-R15',
    run: ({ traps }) =>
      traps
        .filter(({ outletLength: length }) => length > longest.value + coordinateMetres)
        .map(({ element, outletLength: length }) =>
          finding('outlet-pipe-too-long', [element], { lengthM: length, limitM: longest.value }, clause),
        ),
  };
}

function leastSlope({ family }: Tools): Check {
  const { rank } = family.series;
  const smallUpTo = family.size('slope-small-up-to');
  const small = family.number('slope-small', 'slope');
  const branchLarge = family.number('slope-branch-large', 'slope');
  const drain = family.table('drain');
  const { clause } = family.rule('NPC-R26');
  const leastOf = ({ use, required, modelled }: CheckedPipe): number | null => {
    const size = modelled ?? required;
    if (size === null) return null;
    if (rank(size) <= rank(smallUpTo.value)) return small.value;
    if (use.drain === 'building-drain' || use.drain === 'building-sewer')
      return leastSlopeOf(drain, size)?.slope ?? null;
    return branchLarge.value;
  };
  return {
    id: 'NPC-R26',
    run: ({ pipes }) => {
      const found: Finding[] = [];
      for (const pipe of pipes) {
        const { use, element, slopeGround, slopeUncertainty, length } = pipe;
        if (element === null || use.drain === null || use.vertical || use.portion === 'outlet' || use.slope === null)
          continue;
        // A stub between two fittings says nothing of the slope a pipe is laid to.
        if (slopeGround === 'geometry' && length < shortest) continue;
        const least = leastOf(pipe);
        if (least === null || reachesSlope(use.slope + slopeUncertainty, least)) continue;
        found.push(
          finding(
            'slope-too-small',
            [element],
            { slope: use.slope, least, size: pipe.modelled ?? pipe.required },
            clause,
          ),
        );
      }
      return found;
    },
  };
}

const shortest = 0.15;

function everyTrapVented({ family }: Tools): Check {
  const { clause } = family.rule('NPC-R36');
  return {
    id: 'NPC-R36',
    run: ({ traps }) =>
      traps
        .filter(({ drains, how }) => drains && how === 'unvented')
        .map(({ element, kind }) => finding('unvented-trap', [element], { kind }, clause)),
  };
}

function trapArms({ family }: Tools): Check {
  const table = family.table('trap-arm');
  const { series } = family;
  const least = family.number('trap-arm-least', 'factor');
  const mostFall = family.number('trap-arm-fall', 'factor');
  const mostTurn = family.number('trap-arm-turn', 'angle');
  const closet = {
    height: family.number('closet-vent-vertical', 'length'),
    plan: family.number('closet-vent-horizontal', 'length'),
    turn: family.number('closet-vent-turn', 'angle'),
  };
  const arms = family.rule('NPC-R39');
  const closets = family.rule('NPC-R40');
  const widthOf = (size: CheckedTrap['size']): number => series.sizes[series.rank(size)]!.lengthsMm[0]! / 1000;

  const ofArm = ({ element, size, arm }: CheckedTrap): Finding[] => {
    const row = rowAtSize(table, 'trap', size, 'smaller', series);
    if (arm === null || row === null) return [];
    const found: Finding[] = [];
    const longest = row.amount('longest').value;
    const slope = row.amount('slope').value;
    const width = widthOf(size);
    if (typeof longest === 'number' && arm.length > longest + coordinateMetres) {
      found.push(
        finding(
          'trap-arm-too-long',
          [element],
          { lengthM: arm.length, limitM: longest, trap: size, what: 'length' },
          arms.clause,
        ),
      );
    }
    if (arm.length < least.value * width - coordinateMetres) {
      found.push(
        finding(
          'trap-arm-too-long',
          [element],
          { lengthM: arm.length, limitM: least.value * width, trap: size, what: 'too short' },
          arms.clause,
        ),
      );
    }
    if (arm.fall !== null && arm.fall > mostFall.value * width + coordinateMetres) {
      found.push(
        finding(
          'trap-arm-too-steep',
          [element],
          { fallM: arm.fall, limitM: mostFall.value * width, trap: size },
          arms.clause,
        ),
      );
    }
    if (
      typeof slope === 'number' &&
      arm.slope !== null &&
      Math.abs(arm.slope) > arm.slopeUncertainty &&
      !reachesSlope(arm.slope + arm.slopeUncertainty, slope)
    ) {
      found.push(finding('slope-too-small', [element], { slope: arm.slope, least: slope, size }, arms.clause));
    }
    if (arm.turn !== null && arm.turn > mostTurn.value + turnDegrees) {
      found.push(
        finding(
          'trap-arm-too-long',
          [element],
          { turnDeg: arm.turn, limitDeg: mostTurn.value, trap: size, what: 'turn' },
          arms.clause,
        ),
      );
    }
    return found;
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
        .flatMap((trap) => (trap.siphonic ? ofCloset(trap) : ofArm(trap))),
  };
}

/** A stack goes on upward (R67), has a vent stack beyond four storeys (R68) and yoke vents beyond eleven (R71). */
function stackVents({ family }: Tools): Check {
  const storeys = family.number('vent-stack-storeys', 'count');
  const yokeStoreys = family.number('yoke-storeys', 'count');
  const section = family.number('yoke-section', 'count');
  return {
    id: 'NPC-R68',
    run: ({ stacks }) =>
      stacks.flatMap(({ elements, hasStackVent, ventStack, isWetVent, storeysServed, yokes, topStorey, footLoad }) => {
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
              { storeys: storeysServed, storeysMost: storeys.value, ...(ventStack === null ? {} : { at: ventStack }) },
              family.rule('NPC-R68').clause,
            ),
          );
        }
        if (storeysServed > yokeStoreys.value) {
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
      }),
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

function mainVent({ family }: Tools): Check {
  const least = family.size('main-vent');
  const { rank } = family.series;
  const { clause } = family.rule('NPC-R78');
  return {
    id: 'NPC-R78',
    run: ({ drains }) =>
      drains
        .filter(({ widestVent }) => widestVent === null || rank(widestVent) < rank(least.value))
        .map(({ elements, widestVent }) =>
          finding('main-vent-missing', elements, { least: least.value, widest: widestVent }, clause),
        ),
  };
}

import { type Finding, finding } from '../../findings/finding.ts';
import { unitsOf } from '../../units/quantity.ts';
import { coordinateMetres } from '../../units/uncertainty.ts';
import type { Check, CheckedStack } from '../check.ts';
import { nearFoot, yokesTooLow } from '../rules/stack-foot-checks.ts';
import { widthOf } from '../rules/vent-sizes.ts';
import type { Tools } from '../tools.ts';

/** What stacks must have and must be left free of: R27, R28, R67, R68, R71, R72. */
export const stackChecks = (tools: Tools): Check[] => [
  stackVents(tools),
  yokeVents(tools),
  offsetRelief(tools),
  footDistance(tools),
  sudsZones(tools),
];

/** A stack goes on upward (R67) and has a vent stack beyond four storeys (R68). */
function stackVents({ family }: Tools): Check {
  const storeys = family.number('vent-stack-storeys', 'count');
  return {
    id: 'NPC-R68',
    run: ({ stacks }) =>
      stacks.flatMap(({ elements, hasStackVent, ventStack, isWetVent, storeysServed, footLoad }): Finding[] => {
        const found: Finding[] = [];
        if (!hasStackVent)
          found.push(
            finding('stack-vent-missing', elements, { loadUnits: unitsOf(footLoad) }, family.rule('NPC-R67').clause),
          );
        if (storeysServed <= storeys.value || ventStack === 'foot' || isWetVent) return found;
        const facts = { storeys: storeysServed, storeysMost: storeys.value };
        const { clause } = family.rule('NPC-R68');
        found.push(
          ventStack === null
            ? finding('vent-stack-missing', elements, facts, clause)
            : finding('vent-stack-misplaced', elements, { ...facts, at: ventStack }, clause),
        );
        return found;
      }),
  };
}

/**
 * Beyond eleven storeys a yoke vent for each five from the top and at or above each offset, which joins the vent stack
 * clear of the floor (R71).
 */
function yokeVents({ family }: Tools): Check {
  const storeys = family.number('yoke-storeys', 'count');
  const section = family.number('yoke-section', 'count');
  const overFloor = family.number('yoke-height', 'length');
  const freeVent = family.size('yoke-free-vent');
  const { clause } = family.rule('NPC-R71');
  const { rank } = family.series;
  /** Every storey is tied to the vent stack by a vent as large as its branch, or of the printed size if that is less. */
  const isTied = (ties: CheckedStack['ties']): boolean =>
    ties.every((tie) => tie !== null && rank(tie.vent) >= Math.min(rank(tie.branch), rank(freeVent.value)));
  return {
    id: 'NPC-R71',
    run: ({ stacks }) =>
      stacks.flatMap((stack): Finding[] => {
        const { elements, storeysServed, ties, topStorey, lowestStorey, yokes, yokeTops, offsets, joins } = stack;
        const found = yokesTooLow(yokeTops, overFloor.value, { clause });
        if (storeysServed <= storeys.value || isTied(ties)) return found;
        // Below the lowest storey of all stands the foot of the vent stack.
        for (let bottom = topStorey - section.value + 1; bottom > lowestStorey; bottom -= section.value) {
          // Its lower end stands below the branch of the storey, which may be under that floor.
          if (yokes.some((storey) => storey >= bottom - 1 && storey <= bottom)) continue;
          found.push(finding('yoke-vent-missing', elements, { storey: bottom, storeys: storeysServed }, clause));
        }
        const lowest = joins.at(-1)?.height ?? null;
        for (const { elements: level, storey, height, reliefVents } of offsets) {
          // Below the lowest drain the foot of the vent stack does it, beside a long offset its own relief vents.
          if (lowest === null || height === null || lowest > height || reliefVents > 0) continue;
          if (yokes.some((one) => one === storey || one === storey + 1)) continue;
          found.push(
            finding(
              'yoke-vent-missing',
              [...elements.slice(0, 1), ...level],
              { storey, offset: true, storeys: storeysServed },
              clause,
            ),
          );
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

/** A heavy stack, or one of several storeys, keeps its foot and the head of its offsets free (R27). */
function footDistance({ family }: Tools): Check {
  const load = family.number('foot-load', 'load');
  const storeys = family.number('foot-storeys', 'count');
  const distance = family.number('foot-distance', 'length');
  const leastOf = (carried: number, served: number): number | null =>
    carried >= load.value || served >= storeys.value ? distance.value : null;
  return nearFoot(
    family.rule('NPC-R27'),
    ({ footLoad, storeysServed }) => leastOf(footLoad, storeysServed),
    ({ loadAbove, servedAbove }) => leastOf(loadAbove, servedAbove),
  );
}

/** Name under which clothes washers are counted. */
export const washers = 'clothes-washers';
/** A pipe of several washers has a pressure zone. */
const severalWashers = 2;

/** Nothing joins near the turn at the foot of a stack of several clothes washers (R28). */
function sudsZones({ family }: Tools): Check {
  const { series } = family;
  const before = family.number('suds-before', 'factor');
  const beforeMost = family.number('suds-before-most', 'length');
  const after = family.number('suds-after', 'factor');
  const { clause } = family.rule('NPC-R28');
  return {
    id: 'NPC-R28',
    run: ({ stacks, pipes }) =>
      stacks.flatMap(({ elements, footSize, footHeight, footCounts, firstBelow }, id): Finding[] => {
        if (footSize === null || (footCounts[washers] ?? 0) < severalWashers) return [];
        const width = widthOf(series, footSize) / 1000;
        const found: Finding[] = [];
        const report = (distance: number, least: number, above: boolean): void => {
          if (distance < least - coordinateMetres)
            found.push(finding('suds-zone', elements, { distanceM: distance, leastM: least, above }, clause));
        };
        if (firstBelow !== null) report(firstBelow.distance, after.value * width, false);
        // Only what joins a part that carries their water already can be pushed back into.
        const joined = pipes.flatMap(({ use }) => {
          const own = use.drain === 'stack' && use.stack?.id === id ? use.stack.joins.at(-1) : undefined;
          const from = use.inflows.find((one) => pipes[one]!.use.stack?.id === id);
          const suds = from === undefined ? 0 : (pipes[from]!.use.counts[washers] ?? 0);
          return own?.height == null || suds < severalWashers || use.inflows.length < 2 ? [] : [own.height];
        });
        if (footHeight !== null && joined.length > 0)
          report(Math.min(...joined) - footHeight, Math.min(before.value * width, beforeMost.value), true);
        return found;
      }),
  };
}

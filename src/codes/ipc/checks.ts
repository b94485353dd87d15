import { type Finding, finding } from '../../findings/finding.ts';
import { rowAtSize } from '../../tables/find-row.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import { coordinateMetres } from '../../units/uncertainty.ts';
import type { Check, CheckedStack } from '../check.ts';
import { branchIntervals } from '../rules/branch-intervals.ts';
import { manholes } from '../rules/cleanout-checks.ts';
import { nearFoot, yokesTooLow } from '../rules/stack-foot-checks.ts';
import { type ArmLimits, armFaults, everyTrapVented, leastSlope, outletPipe } from '../rules/trap-checks.ts';
import { frostCheck, islandVents, mainVentCheck, valveHeight } from '../rules/vent-checks.ts';
import { endsOverRoof, ventLeavesUpward, ventsMeetHigh, ventsRiseFirst } from '../rules/vent-place-checks.ts';
import { shareOf, widthOf } from '../rules/vent-sizes.ts';
import type { Tools } from '../tools.ts';
import { cleanouts } from './cleanouts.ts';
import { inclinedOffsetVents, offsetVents } from './offset-checks.ts';

/** Demands that are no size: R15, R17, R39 to R43, R45, R47, R75, R76, R78, R79, R81, R85, R94, R97 to R99. */
export function checks(tools: Tools): Check[] {
  const { family, omit, settings } = tools;
  const { series, rule } = family;
  const vents = family.table('stack-vent');
  const share = family.number('vent-share', 'share');
  const rims = {
    usual: family.number('rim-usual', 'length').value,
    closet: family.number('rim-closet', 'length').value,
  };
  const rise = family.number('vent-rise', 'length').value;
  const islands = new Set(['sink', 'kitchen-sink', 'kitchen-sink-disposer', 'lavatory']);
  return [
    slopes(tools),
    outletPipe(rule('IPC-R47'), {
      vertical: family.number('tailpiece-vertical', 'length').value,
      level: family.number('tailpiece-horizontal', 'length').value,
    }),
    cleanouts(tools),
    manholes(rule('IPC-R33'), series, {
      from: family.size('manhole-sewer').value,
      first: family.number('manhole-first', 'length').value,
      next: family.number('sewer-manhole-spacing', 'length').value,
    }),
    everyTrapVented(rule('IPC-R39')),
    trapArms(tools),
    commonVents(tools),
    ventStacks(tools),
    tallStacks(tools),
    offsetVents(tools),
    inclinedOffsetVents(tools),
    nearFootOf(tools),
    mainVentCheck(rule('IPC-R78'), series, ({ required }) =>
      required === null
        ? null
        : series.larger(
            shareOf(share.value, required, { series, sizes: vents.sizes, omit }),
            family.size('vent-least').value,
          ),
    ),
    ventLeavesUpward(rule('IPC-R82'), family.number('vent-leaves', 'angle').value),
    ventsRiseFirst(rule('IPC-R82'), rims, rise),
    ventsMeetHigh(rule('IPC-R82'), rims, rise),
    endsOverRoof(rule('IPC-R84'), family.number('terminal-above-roof', 'length').value),
    islandVents(rule('IPC-R94'), {
      allows: (row) => islands.has(row),
      allowed: 'sinks and lavatories',
    }),
    valves(tools),
    valveHeight(rule('IPC-R99'), family.number('valve-above-drain', 'length').value),
    ...(settings.frostEnlargement === true
      ? [frostCheck(rule('IPC-R85'), series, family.size('frost-least').value)]
      : []),
  ];
}

function slopes({ family }: Tools): Check {
  const table = family.table('slope');
  const { rank } = family.series;
  const share = family.number('slope-percent-share', 'share');
  return leastSlope(family.rule('IPC-R15'), (_, size) => {
    const row = table.rows.findLast((one) => rank(one.size('from').value as NominalSize) <= rank(size));
    const value = row?.amount('slope').value;
    return typeof value === 'number' ? value * share.value : null;
  });
}

/** Length and fall of a fixture drain before its vent; closets are free of both (909, R40 to R43). */
function trapArms({ family }: Tools): Check {
  const table = family.table('trap-arm');
  const { series, rule } = family;
  const crown = family.number('crown-vent', 'factor');
  const limits: ArmLimits = {
    longest: (trap) => {
      const value = rowAtSize(table, 'trap', trap, 'smaller', series)?.amount('longest').value;
      return typeof value === 'number' ? value : null;
    },
    shortest: (trap) => (crown.value * widthOf(series, trap)) / 1000,
    fall: family.number('trap-arm-fall', 'factor').value,
    slope: () => null,
    turn: () => null,
  };
  return {
    id: 'IPC-R40',
    run: ({ traps }) =>
      traps
        .filter(({ how, siphonic }) => how !== 'unvented' && how !== 'free' && !siphonic)
        .flatMap((trap) => armFaults(trap, limits, series, rule('IPC-R40').clause)),
  };
}

/** A vent at the joint of drains serves two traps of one storey, no more (911.1, R45). */
function commonVents({ family }: Tools): Check {
  const { clause } = family.rule('IPC-R45');
  return {
    id: 'IPC-R45',
    run: ({ vents, traps }) => {
      const vented = new Map(traps.map(({ element, how }) => [element, how]));
      return vents.flatMap(({ elements, role, traps: own }): Finding[] => {
        const shares = role === 'dual-vent' || role === 'continuous-vent';
        const alone = own.filter(({ element }) => vented.get(element) === role);
        if (!shares || alone.length === 0) return [];
        const storeys = new Set(alone.map(({ storey }) => storey)).size;
        if (alone.length <= 2 && storeys < 2) return [];
        return [
          finding(
            'common-vent-not-allowed',
            [...elements, ...alone.map(({ element }) => element)],
            {
              fixtures: alone.length,
              ...(storeys > 1 ? { storeys } : { wetFixtures: alone.length, wetFixturesMost: 2 }),
            },
            clause,
          ),
        ];
      });
    },
  };
}

/** Five branch intervals or more ask for a vent stack, from the lowest branch or near the foot (904.2, 904.4, R75, R76). */
function ventStacks({ family }: Tools): Check {
  const { series, rule } = family;
  const least = family.number('interval-least', 'length');
  const from = family.number('vent-stack-intervals', 'count');
  const beyond = family.number('vent-stack-foot', 'factor');
  return {
    id: 'IPC-R75',
    run: ({ stacks, pipes }) => {
      const ownVents = new Set(
        pipes.flatMap(({ use }) =>
          use.role === 'waste-stack-vent' || use.role === 'single-stack' ? [use.stack?.id ?? -1] : [],
        ),
      );
      return stacks.flatMap(({ elements, joins, ventStack, ventStackBeyond, footSize }, id): Finding[] => {
        const intervals = branchIntervals(joins, least.value).length;
        if (intervals < from.value || ownVents.has(id)) return [];
        if (ventStack === null)
          return [
            finding('vent-stack-missing', elements, { intervals, intervalsFrom: from.value }, rule('IPC-R75').clause),
          ];
        const far = footSize === null ? Number.POSITIVE_INFINITY : (beyond.value * widthOf(series, footSize)) / 1000;
        if (ventStack === 'above a branch' || ventStackBeyond > far + coordinateMetres)
          return [
            finding(
              'vent-stack-misplaced',
              elements,
              {
                intervals,
                at: ventStack,
                ...(ventStack === 'drain' ? { distanceM: ventStackBeyond, distanceMostM: far } : {}),
              },
              rule('IPC-R76').clause,
            ),
          ];
        return [];
      });
    },
  };
}

/** Beyond ten branch intervals a relief vent at every tenth from the top (908, R81). */
function tallStacks({ family }: Tools): Check {
  const least = family.number('interval-least', 'length');
  const each = family.number('tall-stack-intervals', 'count');
  const height = family.number('yoke-height', 'length');
  const { clause } = family.rule('IPC-R81');
  return {
    id: 'IPC-R81',
    run: ({ stacks }) =>
      stacks.flatMap(({ elements, joins, yokeHeights, yokeTops }): Finding[] => {
        const found = yokesTooLow(yokeTops, height.value, { clause });
        const intervals = branchIntervals(joins, least.value);
        if (intervals.length <= each.value) return found;
        for (let at = each.value; at < intervals.length; at += each.value) {
          // Its lower end stands below the branch of the tenth interval and above that of the next.
          const above = intervals[at - 1]!.top;
          const below = intervals[at]!.top;
          const stands = yokeHeights.some(
            (height) => (above === null || height <= above) && (below === null || height > below),
          );
          if (!stands)
            found.push(finding('yoke-vent-missing', elements, { interval: at, intervals: intervals.length }, clause));
        }
        return found;
      }),
  };
}

/** No level branch joins within ten pipe sizes of a stack's foot, nor of the head of an offset (704.3, R17). */
function nearFootOf({ family }: Tools): Check {
  const { series } = family;
  const sizes = family.number('foot-distance', 'factor');
  const least = ({ footSize }: CheckedStack): number | null =>
    footSize === null ? null : (sizes.value * widthOf(series, footSize)) / 1000;
  return nearFoot(family.rule('IPC-R17'), least, (_, stack) => least(stack));
}

/** Where air admittance valves may stand: not on tall stacks, with relief far down one, never as the only vent (918, R97 to R99). */
function valves({ family }: Tools): Check {
  const least = family.number('interval-least', 'length');
  const below = family.number('valve-intervals', 'count');
  const onStack = family.number('stack-valve-intervals', 'count');
  const { rule } = family;
  return {
    id: 'IPC-R97',
    run: ({ vents, drains }) => {
      const found: Finding[] = [];
      for (const { elements, role, mouth, stack } of vents) {
        if (mouth !== 'valve' || stack === null) continue;
        const intervals = branchIntervals(stack.joins, least.value);
        if (role === 'stack-vent' || role === 'vent-stack') {
          if (intervals.length > onStack.value)
            found.push(
              finding(
                'valve-not-allowed',
                elements,
                { intervals: intervals.length, intervalsMost: onStack.value },
                rule('IPC-R98').clause,
              ),
            );
          continue;
        }
        const { height } = stack;
        const above = intervals.filter(({ top }) => top !== null && height !== null && top > height + coordinateMetres);
        // A relief vent is drawn as a foot of its own; a branch vented by valves alone has none.
        const relieved = vents.some((one) => one.role === 'relief-vent' && one.stack?.height === height);
        if (above.length > below.value && !relieved)
          found.push(
            finding(
              'valve-not-allowed',
              elements,
              { below: above.length, belowMost: below.value },
              rule('IPC-R97').clause,
            ),
          );
      }
      for (const { elements, mouths } of drains) {
        if (mouths.length > 0 && mouths.every(({ how }) => how === 'valve'))
          found.push(finding('valve-not-allowed', elements, { onlyValves: true }, rule('IPC-R99').clause));
      }
      return found;
    },
  };
}

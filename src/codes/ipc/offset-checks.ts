import { type Finding, finding } from '../../findings/finding.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import { unitsOf } from '../../units/quantity.ts';
import { coordinateMetres } from '../../units/uncertainty.ts';
import type { Check, CheckedPipe, CheckedStack } from '../check.ts';
import { branchIntervals } from '../rules/branch-intervals.ts';
import { nextAbove, shareOf, widthOf } from '../rules/vent-sizes.ts';
import type { Tools } from '../tools.ts';

/**
 * A horizontal offset with more than four branch intervals above and branches below is vented, above and below it; or stack
 * and offset are one size larger than a building drain, and as wide as stack and vent together (711.2, 907, R26, R27, R79).
 */
export function offsetVents(tools: Tools): Check {
  const { family, omit } = tools;
  const { series } = family;
  const least = family.number('interval-least', 'length');
  const most = family.number('offset-intervals', 'count');
  const share = family.number('stack-vent-share', 'share');
  const sizes = family.table('branch-and-stack').sizes;
  const { clause } = family.rule('IPC-R79');
  return {
    id: 'IPC-R79',
    run: ({ stacks, pipes }) =>
      stacks.flatMap(({ offsets }, id): Finding[] => {
        const own = pipes.filter(({ use }) => use.drain === 'stack' && use.stack?.id === id);
        return offsets.flatMap((offset): Finding[] => {
          const level = own.filter((pipe) => isOf(offset, pipe));
          const stack = level[0]?.use.stack ?? null;
          if (stack === null || stack.joins.length === stack.allJoins.length) return [];
          const intervals = branchIntervals(stack.joins, least.value).length;
          if (intervals <= most.value || offset.reliefVents >= 2) return [];
          const larger = enlarged(level);
          const vent = ventOf(pipes, id) ?? (larger === null ? null : halfOf(larger));
          if (larger !== null && vent !== null && isLarge(own, larger, straight(own), vent)) return [];
          const facts = {
            offsetM: offset.length,
            intervals,
            intervalsMost: most.value,
            loadUnits: unitsOf(offset.loadAbove),
            reliefVents: offset.reliefVents,
            ...(larger === null ? {} : { larger }),
          };
          return [finding('offset-relief-vent-missing', offset.elements, facts, clause)];
        });
      }),
  };

  /** One size above what the offset requires, as a building drain. */
  function enlarged(level: readonly CheckedPipe[]): NominalSize | null {
    const required = level.flatMap(({ required: size }) => size ?? []);
    const [first, ...rest] = required;
    return first === undefined ? null : nextAbove(sizes, rest.reduce(series.larger, first), series, omit);
  }

  function halfOf(size: NominalSize): NominalSize {
    return shareOf(share.value, size, { series, sizes, omit });
  }

  /** What the vertical parts of the stack require. */
  function straight(own: readonly CheckedPipe[]): NominalSize | null {
    const required = own.flatMap(({ use, required: size }) => (use.vertical ? (size ?? []) : []));
    const [first, ...rest] = required;
    return first === undefined ? null : rest.reduce(series.larger, first);
  }

  /** Everything is drawn so large, and its area is that of the straight stack and a vent. */
  function isLarge(
    own: readonly CheckedPipe[],
    larger: NominalSize,
    stack: NominalSize | null,
    vent: NominalSize,
  ): boolean {
    const area = (size: NominalSize): number => widthOf(series, size) ** 2;
    return own.every(
      ({ modelled }) =>
        modelled !== null &&
        series.rank(modelled) >= series.rank(larger) &&
        area(modelled) >= (stack === null ? 0 : area(stack)) + area(vent),
    );
  }
}

/**
 * An inclined offset with more than four branch intervals above is vented as a level one is where a branch joins within
 * 2 ft of it (711.1, R28): a yoke vent between its neighbouring branches.
 */
export function inclinedOffsetVents({ family }: Tools): Check {
  const least = family.number('interval-least', 'length');
  const most = family.number('offset-intervals', 'count');
  const distance = family.number('offset-branch-distance', 'length');
  const { clause } = family.rule('IPC-R28');
  return {
    id: 'IPC-R28',
    run: ({ stacks }) =>
      stacks.flatMap(({ inclined, joins, yokeHeights, elements }): Finding[] =>
        inclined.flatMap(({ elements: own, top, bottom }) => {
          const above = joins.filter(({ height }) => height !== null && height >= top - coordinateMetres);
          const below = joins.flatMap(({ height }) =>
            height !== null && height < top - coordinateMetres ? [height] : [],
          );
          const intervals = branchIntervals(above, least.value).length;
          const near = joins.flatMap(({ height }) =>
            height === null ? [] : [Math.max(0, height - top, bottom - height)],
          );
          const nearest = Math.min(...near);
          if (intervals <= most.value || nearest >= distance.value - coordinateMetres) return [];
          const next = Math.max(Number.NEGATIVE_INFINITY, ...below);
          const last = Math.min(Number.POSITIVE_INFINITY, ...above.flatMap(({ height }) => height ?? []));
          if (yokeHeights.some((height) => height > next && height <= last)) return [];
          const facts = { intervals, intervalsMost: most.value, distanceM: nearest, leastM: distance.value };
          return [finding('offset-relief-vent-missing', [...own, ...elements.slice(0, 1)], facts, clause)];
        }),
      ),
  };
}

/** Size that the stack's vent stack requires, else its stack vent. */
function ventOf(pipes: readonly CheckedPipe[], stack: number): NominalSize | null {
  const sizeOf = (role: string): NominalSize | null =>
    pipes.find(({ use }) => use.role === role && use.vent?.serves === stack)?.required ?? null;
  return sizeOf('vent-stack') ?? sizeOf('stack-vent');
}

const isOf = ({ elements }: CheckedStack['offsets'][number], { element, use }: CheckedPipe): boolean =>
  element !== null && elements.includes(element) && use.offset !== null && !use.vertical;

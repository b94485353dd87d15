import { type Load, plusLoad } from '../../units/quantity.ts';
import { coordinateMetres } from '../../units/uncertainty.ts';
import type { StackJoin } from '../stack-use.ts';

export interface BranchInterval {
  /** Height of its highest connection, metres; null without geometry. */
  readonly top: number | null;
  readonly load: Load;
}

/**
 * Branch intervals of a stack, counted down from its highest connection: a connection less than `least` metres below the
 * first of an interval belongs to that interval. Without heights every connection is an interval of its own.
 */
export function branchIntervals(joins: readonly StackJoin[], least: number): BranchInterval[] {
  const intervals: BranchInterval[] = [];
  for (const { height, load } of joins) {
    const last = intervals.at(-1);
    const isNear =
      last !== undefined && last.top !== null && height !== null && last.top - height < least - coordinateMetres;
    if (isNear) intervals[intervals.length - 1] = { top: last.top, load: plusLoad(last.load, load) };
    else intervals.push({ top: height, load });
  }
  return intervals;
}

/** Load of the heaviest of them; nothing where there is none. */
export const heaviestInterval = (joins: readonly StackJoin[], least: number): Load =>
  Math.max(0, ...branchIntervals(joins, least).map(({ load }) => load)) as Load;

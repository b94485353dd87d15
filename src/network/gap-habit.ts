import type { Proposal } from './propose-joins.ts';
import { largestReach } from './tolerance.ts';

/** A habit is what at least this share of the ends shows, and at least so many. */
const share = 0.2;
const fewest = 8;
/** Slack over the gaps seen, metres: what drawing adds. */
const slack = 0.001;

/**
 * The gap that a model leaves out of habit: some programs stop every pipe short of its fitting by the same few
 * centimetres. Judged on the ends whose nearest neighbour lies just out of reach; 0 where those are few. Never above
 * what may be bridged unasked.
 */
export function gapHabit(proposals: readonly Proposal[]): number {
  const nearest = new Map<number, { gap: number; within: boolean }>();
  for (const { end, gap, within } of proposals) {
    const known = nearest.get(end);
    if (known === undefined || gap < known.gap) nearest.set(end, { gap, within });
  }
  const near = [...nearest.values()].filter(({ gap }) => gap <= largestReach);
  const short = near.filter(({ within }) => !within).map(({ gap }) => gap);
  if (short.length < fewest || short.length < share * near.length) return 0;
  short.sort((a, b) => a - b);
  return Math.min(largestReach, short[Math.floor(0.95 * (short.length - 1))]! + slack);
}

import type { FixtureFacts } from './fixture-facts.ts';
import type { FixtureLoad } from './loads.ts';

type Counts = Readonly<Record<string, number>>;
const none: Counts = {};

/** How many fixtures of each sort that the code counts drain through every pipe. By pipe id. */
export function countFixtures({ code, paths, identities }: FixtureFacts, loads: readonly FixtureLoad[]): Counts[] {
  const counts: Counts[] = paths.wet.map(() => none);
  if (code.counts.length === 0) return counts;
  const sums = code.counts.map(({ takes }) => {
    const sum = new Int32Array(paths.wet.length);
    for (const pipe of paths.inFlowOrder) {
      for (const fixture of paths.entering[pipe]!) {
        const { kind } = identities[paths.fixtures[fixture]!.element]!;
        if (takes({ kind, ...loads[fixture]! })) sum[pipe]!++;
      }
      const next = paths.next[pipe];
      if (next !== null && next !== undefined) sum[next]! += sum[pipe]!;
    }
    return sum;
  });
  for (const pipe of paths.inFlowOrder) {
    counts[pipe] = Object.fromEntries(code.counts.map(({ id }, at) => [id, sums[at]![pipe]!]));
  }
  return counts;
}

import type { ResultPipe, SizeLabel, TrailStep } from './result.ts';

export interface NextSmaller {
  readonly size: SizeLabel;
  readonly fails: TrailStep;
}

/** What a limit of a demand's table counts: the code's unit of load, metres of vent, litres a second. */
export function limitCounts({ facts }: TrailStep): 'load' | 'm' | 'l/s' {
  if (facts.limitM !== undefined) return 'm';
  return facts.limitLps === undefined && facts.carriesLps === undefined ? 'load' : 'l/s';
}

/** null where no size is required, or none is smaller. */
export function nextSmallerOf({ required, trail }: ResultPipe, sizes: readonly SizeLabel[]): NextSmaller | null {
  const most = required?.most ?? null;
  if (most === null) return null;
  const size = sizes.filter(({ dn }) => dn < most.dn).at(-1);
  const fails = trail.find(({ asks }) => asks === null || (size !== undefined && asks.dn > size.dn));
  return size === undefined || fails === undefined ? null : { size, fails };
}

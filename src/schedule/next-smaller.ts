import type { ResultPipe, SizeLabel, TrailStep } from './result.ts';

export interface NextSmaller {
  readonly size: SizeLabel;
  readonly fails: TrailStep;
}

/** null where no size is required, or none is smaller. */
export function nextSmallerOf({ required, trail }: ResultPipe, sizes: readonly SizeLabel[]): NextSmaller | null {
  const most = required?.most ?? null;
  if (most === null) return null;
  const size = sizes.filter(({ dn }) => dn < most.dn).at(-1);
  const fails = trail.find(({ asks }) => asks === null || (size !== undefined && asks.dn > size.dn));
  return size === undefined || fails === undefined ? null : { size, fails };
}

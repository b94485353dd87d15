import type { MendChange } from './mend.ts';

/** Pipes that change alike for one reason stand together; everything else by itself. */
export function groupedChanges(changes: readonly MendChange[]): MendChange[][] {
  const groups: MendChange[][] = [];
  for (const change of changes) {
    const last = groups.at(-1);
    const like = last?.[0];
    if (
      last !== undefined &&
      like?.kind === 'size' &&
      change.kind === 'size' &&
      like.from === change.from &&
      like.to === change.to
    )
      last.push(change);
    else groups.push([change]);
  }
  return groups;
}

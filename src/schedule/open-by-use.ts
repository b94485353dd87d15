import type { Result } from './result.ts';

/** Fixtures that nothing but the use of the building leaves open. */
export const openByUse = ({ findings }: Pick<Result, 'findings'>): ReadonlySet<string> =>
  new Set(findings.flatMap(({ code, about }) => (code === 'use-unknown' ? about : [])));

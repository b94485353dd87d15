import type { PageData } from '../deliver/page-data.ts';
import type { MendChange, MendResult } from '../schedule/mend.ts';

/** One of the two buildings that a page with a plan holds. */
export interface PlanSide {
  readonly plan: MendResult;
  readonly side: Side;
  /** Errors of the building as modelled, and as mended. */
  readonly errors: Readonly<Record<Side, number>>;
  /** What becomes of pipes of this side, by GlobalId; those that stay as they are are not in it. */
  readonly fates: ReadonlyMap<string, PipeFate>;
}

/** As modelled, as mended. */
export type Side = 'before' | 'after';

/** `fitted`: a new vent starts or ends on it, or a cleanout is set into it. */
export type PipeFate = 'added' | 'resized' | 'relaid' | 'fitted';

/** In the order of the legend. */
export const fates: readonly PipeFate[] = ['added', 'resized', 'relaid', 'fitted'];

const fateOf: Readonly<Record<MendChange['kind'], PipeFate | null>> = {
  vent: 'fitted',
  'moved-vent': 'fitted',
  'extended-vent': 'fitted',
  reading: null,
  slope: 'relaid',
  trap: 'fitted',
  cleanout: 'fitted',
  size: 'resized',
};

/** null where the page holds no plan. Where several changes concern a pipe the one that is first in the legend counts. */
export function planSide({ mend }: PageData, side: Side): PlanSide | null {
  if (mend === null) return null;
  const { plan, after } = mend;
  const found = new Map<string, PipeFate>();
  const put = (id: string, fate: PipeFate): void => {
    const known = found.get(id);
    if (known === undefined || fates.indexOf(fate) < fates.indexOf(known)) found.set(id, fate);
  };
  for (const { kind, about } of plan.changes) {
    const fate = fateOf[kind];
    if (fate !== null) for (const id of about) put(id, fate);
  }
  if (side === 'after') for (const { globalId } of after.result.pipes) if (isNew(globalId)) put(globalId, 'added');
  return { plan, side, errors: { before: plan.before.errors, after: plan.after.errors }, fates: found };
}

/** A pipe that no model holds: the stages call it so. */
export const isNew = (globalId: string): boolean => globalId.startsWith('added-');

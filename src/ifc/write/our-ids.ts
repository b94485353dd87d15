import type { Cursor } from '../lines/cursor.ts';
import type { LineIndex } from '../lines/line-index.ts';
import { type Digest, deriveGlobalId } from './derive-global-id.ts';

/** The two classes of our lines that carry a GlobalId. */
export type OurClass = 'IFCPROPERTYSET' | 'IFCRELDEFINESBYPROPERTIES';

/** Every set of ours bears this prefix; none begins with `pset`, which is the standard's. */
export const ourPrefix = 'Drainwright_';

export interface Target {
  readonly stepId: number;
  /** Empty where the file gives none. */
  readonly globalId: string;
}

/** GlobalId of the record with this STEP id, read with a cursor of the caller's; null when there is no such record. */
export function targetAt(index: LineIndex, stepId: number, cursor: Cursor): Target | null {
  const record = index.find(stepId);
  if (record < 0) return null;
  return { stepId, globalId: cursor.at(index.args[record] ?? 0).text() ?? '' };
}

/** GlobalId of our line of this class about the set `name` on `target`; `alone` when no other target shares its GlobalId. */
export function ourGlobalId(digest: Digest, target: Target, name: string, line: OurClass, alone: boolean): string {
  const own = alone && target.globalId !== '' ? [] : [`#${target.stepId}`];
  return deriveGlobalId(digest, ['Drainwright', target.globalId, name, line, ...own]);
}

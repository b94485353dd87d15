import type { Storey, StoreyId } from '../../model/model.ts';
import type { Source } from './source.ts';
import type { StoreyRecord } from './spatial.ts';

/** Storeys of all files, and which one a file's storey became. */
export interface JoinedStoreys {
  readonly storeys: readonly Storey[];
  readonly idOf: (file: number, record: number) => StoreyId | null;
}

/** Storeys of different files whose floors are nearer than this are the same floor. */
const sameFloor = 0.05;

/**
 * Lowest first, then by GlobalId. A floor that several files model is one storey, the first file's. Files that lie
 * `apart` bring none: their floors are not those of the building.
 */
export function joinStoreys(all: readonly Source[], apart: (file: number) => boolean): JoinedStoreys {
  const sources = all.filter(({ file }) => !apart(file));
  const kept: { readonly file: number; readonly storey: StoreyRecord }[] = [];
  const standsFor = new Map<StoreyRecord, StoreyRecord>();
  for (const { file, spatial } of sources) {
    const before = kept.slice();
    for (const storey of spatial.storeys) {
      const same = before.find((one) => Math.abs(one.storey.elevation - storey.elevation) <= sameFloor);
      if (same === undefined) kept.push({ file, storey });
      standsFor.set(storey, same?.storey ?? storey);
    }
  }
  kept.sort((a, b) => a.storey.elevation - b.storey.elevation || compare(a.storey.globalId, b.storey.globalId));
  const rank = new Map(kept.map(({ storey }, k) => [storey, k as StoreyId]));
  const byRecord = new Map(
    sources.map(({ file, spatial }) => [
      file,
      new Map(spatial.storeys.map((storey) => [storey.record, rank.get(standsFor.get(storey)!)!])),
    ]),
  );
  return {
    storeys: kept.map(({ file, storey: { globalId, name, elevation } }, k) => ({
      id: k as StoreyId,
      file,
      globalId,
      name,
      elevation,
    })),
    idOf: (file, record) => byRecord.get(file)?.get(record) ?? null,
  };
}

const compare = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0);

import { InputError } from '../../findings/input-error.ts';
import type { PropertySetToWrite } from '../../model/property-set.ts';
import { Cursor } from '../lines/cursor.ts';
import type { LineIndex } from '../lines/line-index.ts';
import type { Digest } from './derive-global-id.ts';
import { targetAt } from './our-ids.ts';
import { extentOf, strayRecords } from './stray-lines.ts';
import { type AppendOptions, type ResolvedSet, writtenBlock } from './written-block.ts';

/**
 * The file with the property sets in it, as pieces to write one after the other. Ours stand in one piece before the
 * `ENDSEC` that closes the last DATA section; every byte that we did not write stays. What an earlier run wrote is
 * left out. Throws an InputError for a file that is damaged in a way that makes adding lines unsafe.
 */
export function appendSets(
  index: LineIndex,
  sets: readonly PropertySetToWrite[],
  { name, digest, version }: AppendOptions,
): readonly Uint8Array[] {
  const at = placeToWrite(index, name);
  const { cuts, maxId } = formerRun(index, digest);
  const resolved = resolvedSets(index, sets);
  const block = resolved.length === 0 ? [] : writtenBlock(index, resolved, maxId + 1, { name, digest, version });
  return [...without(index.bytes.subarray(0, at), cuts), ...block, index.bytes.subarray(at)];
}

/** The bytes without anything that we wrote: what `InputSha256` is taken over, and what a second run starts from. */
export function withoutOurLines(index: LineIndex, digest: Digest): readonly Uint8Array[] {
  return without(index.bytes, formerRun(index, digest).cuts);
}

function placeToWrite({ damage, dataEnd }: LineIndex, name: string): number {
  const refused = 'nothing was written; have the program that made the file export it again';
  if (damage.cutOff !== null || dataEnd === null)
    throw new InputError(name, `the file is cut off ${damage.cutOff?.where ?? 'before ENDSEC'}; ${refused}`);
  if (damage.openStrings.length > 0)
    throw new InputError(name, `a text is never closed (byte ${damage.openStrings[0]}); ${refused}`);
  return dataEnd;
}

interface Cut {
  readonly from: number;
  readonly to: number;
}

function formerRun(index: LineIndex, digest: Digest): { readonly cuts: readonly Cut[]; readonly maxId: number } {
  const stray = strayRecords(index, digest);
  const cuts = [
    ...(index.ownBlock === null ? [] : [index.ownBlock]),
    ...stray.map((record) => extentOf(index, record)),
  ];
  cuts.sort((a, b) => a.from - b.from);
  if (stray.length === 0) return { cuts, maxId: index.maxId };
  const gone = new Set(stray);
  return { cuts, maxId: index.ids.reduce((max, id, record) => (gone.has(record) ? max : Math.max(max, id)), 0) };
}

function without(bytes: Uint8Array, cuts: readonly Cut[]): Uint8Array[] {
  const pieces: Uint8Array[] = [];
  let from = 0;
  for (const cut of cuts) {
    pieces.push(bytes.subarray(from, cut.from));
    from = cut.to;
  }
  return [...pieces, bytes.subarray(from)];
}

/** Sets with the record that they go on, in the order given; one for the building falls away where the file has none. */
function resolvedSets(index: LineIndex, sets: readonly PropertySetToWrite[]): ResolvedSet[] {
  const cursor = new Cursor(index.bytes);
  return sets.flatMap((set) => {
    if (set.properties.length === 0) return [];
    const stepId = set.on === 'building' ? buildingOf(index) : set.on;
    if (stepId === null) return [];
    const target = targetAt(index, stepId, cursor);
    if (target === null) throw new Error(`no record #${stepId} to write ${set.name} on`);
    return { ...set, target };
  });
}

function buildingOf(index: LineIndex): number | null {
  const buildings = index.recordsOf('IFCBUILDING');
  const [record] = buildings.length === 1 ? buildings : index.recordsOf('IFCPROJECT');
  return record === undefined ? null : (index.ids[record] ?? null);
}

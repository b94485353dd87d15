import { Cursor } from '../lines/cursor.ts';
import { endOfStatement, isDigit } from '../lines/end-of-statement.ts';
import { type LineIndex, startOf } from '../lines/line-index.ts';
import { pastLineEnd } from '../lines/own-block.ts';
import type { Digest } from './derive-global-id.ts';
import { ourGlobalId, ourPrefix, targetAt } from './our-ids.ts';

/**
 * Records that an earlier run of ours wrote and another program saved again, so that the marks around them are gone:
 * property sets whose GlobalId is the one we derive for the element they stand on, their relations, and the values
 * that nothing else uses. Ascending. Lines that only look alike are left alone.
 */
export function strayRecords(index: LineIndex, digest: Digest): readonly number[] {
  const sets = ourSets(index);
  if (sets.size === 0) return [];
  const cursor = new Cursor(index.bytes);
  const second = new Cursor(index.bytes);
  const found = new Set<number>();
  const values = new Set<number>();
  for (const relation of index.recordsOf('IFCRELDEFINESBYPROPERTIES')) {
    const related = cursor
      .at(index.args[relation] ?? 0)
      .skip(4)
      .ids();
    const set = sets.get(cursor.id());
    if (set === undefined || !related.some((stepId) => isOurs(index, digest, set, stepId, second))) continue;
    found.add(relation).add(set.record);
    for (const value of set.values) values.add(value);
  }
  const usedElsewhere = references(index, values, found);
  for (const value of values) {
    const record = index.find(value);
    const isValue = index.types[index.typeOf[record] ?? 0] === 'IFCPROPERTYSINGLEVALUE';
    if (isValue && !usedElsewhere.has(value)) found.add(record);
  }
  return [...found].sort((a, b) => a - b);
}

/** From the `#` of a record past its `;` and the line end behind it. */
export function extentOf(index: LineIndex, record: number): { readonly from: number; readonly to: number } {
  const { bytes } = index;
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  const watch = { lineGuided: false, openStrings: [], oddStrings: [] };
  const end = endOfStatement(bytes, view, (index.args[record] ?? 0) + 1, watch);
  const from = startOf(index, record);
  return { from, to: end < 0 || bytes[end] !== semicolon ? Math.max(end, from) : pastLineEnd(bytes, end + 1) };
}

interface OurSet {
  readonly record: number;
  readonly name: string;
  readonly globalId: string;
  readonly values: readonly number[];
}

function ourSets(index: LineIndex): ReadonlyMap<number, OurSet> {
  const cursor = new Cursor(index.bytes);
  const sets = new Map<number, OurSet>();
  for (const record of index.recordsOf('IFCPROPERTYSET')) {
    const globalId = cursor.at(index.args[record] ?? 0).text() ?? '';
    const name = cursor.skip(1).text();
    if (name === null || !name.startsWith(ourPrefix)) continue;
    sets.set(index.ids[record] ?? 0, { record, name, globalId, values: cursor.skip(1).ids() });
  }
  return sets;
}

function isOurs(index: LineIndex, digest: Digest, { name, globalId }: OurSet, stepId: number, cursor: Cursor): boolean {
  const target = targetAt(index, stepId, cursor);
  if (target === null) return false;
  return [true, false].some((alone) => ourGlobalId(digest, target, name, 'IFCPROPERTYSET', alone) === globalId);
}

/** Which of the ids are referred to by any record but those in `except`; text that looks like a reference counts. */
function references(index: LineIndex, ids: ReadonlySet<number>, except: ReadonlySet<number>): ReadonlySet<number> {
  const { bytes } = index;
  const skipped = [...except].map((record) => extentOf(index, record)).sort((a, b) => a.from - b.from);
  const found = new Set<number>();
  let next = 0;
  for (let at = bytes.indexOf(hash); at >= 0; at = bytes.indexOf(hash, at + 1)) {
    while (next < skipped.length && at >= (skipped[next]?.to ?? 0)) next++;
    if (at >= (skipped[next]?.from ?? Number.POSITIVE_INFINITY)) continue;
    let id = 0;
    let i = at + 1;
    for (; isDigit(bytes[i]); i++) id = id * 10 + (bytes[i] ?? 0) - 48;
    if (ids.has(id) && startOf(index, index.find(id)) !== at) found.add(id);
  }
  return found;
}

const hash = 35;
const semicolon = 59;

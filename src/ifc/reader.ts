import { Cursor, textTable } from './lines/cursor.ts';
import type { LineIndex } from './lines/line-index.ts';
import { newTextWatch, type TextWatch } from './lines/text.ts';

/** What went wrong while records were followed; the index knows what is wrong with the bytes themselves. */
export interface Troubles {
  /** References to instances that do not exist, in the records that were read: record that refers, id it asks for. */
  readonly dangling: { readonly record: number; readonly id: number }[];
  /** Placements (records) that come back to themselves or hang more than 200 deep: their elements have no place. */
  readonly endlessPlacements: number[];
  /** Shapes (records) that contain themselves. */
  readonly endlessShapes: number[];
}

/** One file's lines, opened record by record. All that reads a file shares its texts' and references' troubles. */
export interface Reader {
  readonly index: LineIndex;
  readonly watch: TextWatch;
  readonly troubles: Troubles;
  /** A cursor of one's own: a reader that follows references must not use the cursor that it stands on. */
  readonly cursor: () => Cursor;
  /** Class of a record in upper case; '' for -1. */
  readonly type: (record: number) => string;
  /** Record with this id; -1 for 0 and for a reference into nothing, which is noted as said by record `from`. */
  readonly follow: (id: number, from: number) => number;
  /** Records of a class in order of their STEP ids, whatever order the lines stand in. */
  readonly all: (type: string) => Uint32Array;
}

/** More dangling references than this are counted no further. */
const mostDangling = 10_000;

export function readerOf(index: LineIndex): Reader {
  const watch = newTextWatch();
  const texts = textTable(index.bytes);
  const { ids, typeOf, types, find } = index;
  const dangling: Troubles['dangling'] = [];
  return {
    index,
    watch,
    troubles: { dangling, endlessPlacements: [], endlessShapes: [] },
    cursor: () => new Cursor(index.bytes, watch, texts),
    type: (record) => (record < 0 ? '' : types[typeOf[record]!]!),
    follow: (id, from) => {
      if (id === 0) return -1;
      const record = find(id);
      if (record < 0 && dangling.length < mostDangling) dangling.push({ record: from, id });
      return record;
    },
    all: (type) => {
      const records = index.recordsOf(type);
      for (let k = 1; k < records.length; k++) {
        if (ids[records[k]!]! < ids[records[k - 1]!]!) return records.slice().sort((a, b) => ids[a]! - ids[b]!);
      }
      return records;
    },
  };
}

import { Cursor } from './lines/cursor.ts';
import type { LineIndex } from './lines/line-index.ts';
import type { NameTable } from './lines/name-table.ts';
import { newTextWatch, type TextWatch } from './lines/text.ts';
import { textTable } from './lines/text-table.ts';

/** What went wrong while records were followed; the index knows what is wrong with the bytes themselves. */
export interface Troubles {
  /** References to instances that do not exist, in the records that were read: record that refers, id it asks for. */
  readonly dangling: { readonly record: number; readonly id: number }[];
  /** Placements (records) that come back to themselves or hang more than 200 deep: their elements have no place. */
  readonly endlessPlacements: number[];
  /** Shapes (records) that contain themselves. */
  readonly endlessShapes: number[];
}

/** More dangling references than this are counted no further. */
const mostDangling = 10_000;

/**
 * One file's lines, opened record by record. All that reads a file shares its texts' and references' troubles.
 * The readers of this folder are classes, not closures: a process that reads many models keeps their compiled code.
 */
export class Reader {
  readonly index: LineIndex;
  readonly args: Uint32Array;
  readonly watch: TextWatch = newTextWatch();
  readonly troubles: Troubles = { dangling: [], endlessPlacements: [], endlessShapes: [] };
  private readonly texts: NameTable<null>;

  constructor(index: LineIndex) {
    this.index = index;
    this.args = index.args;
    this.texts = textTable(index.bytes);
  }

  /** A cursor of one's own: a reader that follows references must not use the cursor that it stands on. */
  cursor(): Cursor {
    return new Cursor(this.index.bytes, this.watch, this.texts);
  }

  /** A cursor of one's own in front of a record's first argument. */
  open(record: number): Cursor {
    return this.cursor().at(this.args[record]!);
  }

  /** Class of a record in upper case; '' for -1. */
  type(record: number): string {
    const { index } = this;
    return record < 0 ? '' : index.types[index.typeOf[record]!]!;
  }

  /** Record with this id; -1 for 0 and for a reference into nothing, which is noted as said by record `from`. */
  follow(id: number, from: number): number {
    if (id === 0) return -1;
    const record = this.index.find(id);
    if (record < 0 && this.troubles.dangling.length < mostDangling) this.troubles.dangling.push({ record: from, id });
    return record;
  }

  /** Records of a class in order of their STEP ids, whatever order the lines stand in. */
  all(type: string): Uint32Array {
    const { ids } = this.index;
    const records = this.index.recordsOf(type);
    for (let k = 1; k < records.length; k++) {
      if (ids[records[k]!]! < ids[records[k - 1]!]!) return records.slice().sort((a, b) => ids[a]! - ids[b]!);
    }
    return records;
  }

  /** Records of several classes together, in order of their STEP ids. */
  allOf(types: Iterable<string>): number[] {
    const { ids } = this.index;
    const found: number[] = [];
    for (const type of types) {
      const records = this.index.recordsOf(type);
      for (let k = 0; k < records.length; k++) found.push(records[k]!);
    }
    return found.sort((a, b) => ids[a]! - ids[b]!);
  }
}

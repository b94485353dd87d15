import { endOfComment, endOfStatement, isDigit, type StringWatch } from './end-of-statement.ts';
import { TypeTable } from './type-table.ts';

/** What the scan gathers about instances; arrays longer than `count`. */
export interface RecordList {
  count: number;
  ids: Uint32Array;
  typeOf: Uint16Array;
  args: Uint32Array;
  maxId: number;
  readonly table: TypeTable;
  readonly merged: number[];
  readonly idsTooLarge: number[];
  /** Reason of `endOfStatement` when the bytes ended inside an instance, else 0. */
  cut: number;
}

export function newRecordList(view: DataView): RecordList {
  // Instances of real models take 50 to 60 bytes on average; a denser file makes the arrays grow.
  const capacity = 1024 + Math.floor(view.byteLength / 48);
  return {
    count: 0,
    ids: new Uint32Array(capacity),
    typeOf: new Uint16Array(capacity),
    args: new Uint32Array(capacity),
    maxId: 0,
    table: new TypeTable(view),
    merged: [],
    idsTooLarge: [],
    cut: 0,
  };
}

const largestId = 4_294_967_295;
/** A class name ends within so many bytes; the longest of the schema has 56. */
const longestName = 240;
const bracket = 40;
const brackets = 0x28282828;
const ones = 0x01010101;
const high = 0x80808080 | 0;

/**
 * Reads instances one after the other and stops in front of the first thing that is none: a keyword, a comment, an
 * unreadable statement, the end of the bytes, or the instance that the end cuts off (then `list.cut` says so).
 */
export function instances(b: Uint8Array, view: DataView, from: number, list: RecordList, watch: StringWatch): number {
  const n = b.length;
  const lastWord = n - 4;
  const { table } = list;
  let { ids, typeOf, args, count, maxId } = list;
  let at = from;
  while (at < n) {
    let c = b[at] as number;
    if (c <= 32) {
      at++;
      continue;
    }
    if (c !== 35) break;
    let i = at + 1;
    let id = 0;
    c = b[i] as number;
    while (c >= 48 && c <= 57) {
      id = id * 10 + c - 48;
      c = b[++i] as number;
    }
    if (i === at + 1) break;
    if (c !== 61) i = pastBlanks(b, i);
    if (b[i] !== 61) break;
    i++;
    if ((b[i] as number) <= 32 || b[i] === 47) i = pastBlanks(b, i);

    // The class name, four bytes at a time, up to its bracket.
    const name = i;
    let hash = 0;
    let word = 0;
    let mark = 0;
    while (i <= lastWord && i - name < longestName) {
      word = view.getInt32(i, true);
      const p = word ^ brackets;
      mark = (p - ones) & ~p & high;
      if (mark !== 0) break;
      hash = Math.imul(hash ^ word, 0x9e3779b1);
      i += 4;
    }
    if (mark === 0) {
      // No bracket: nearly always no instance either, but the last few bytes of a file do not fill a word.
      while (i < n && b[i] !== bracket && i - name < longestName) i++;
      if (b[i] !== bracket) break;
      word = tailBefore(b, name, i);
    } else {
      const before = (31 - Math.clz32(mark & -mark)) >> 3;
      word = before === 0 ? 0 : word & ((1 << (before << 3)) - 1);
      i += before;
    }
    hash = Math.imul(hash ^ word, 0x9e3779b1);
    let type = table.code(hash, name, i, word);
    if (type < 0) {
      // Something stands between the name and its bracket: a comment, or no name stands here at all.
      const nameEnd = pastWord(b, name);
      i = pastBlanks(b, nameEnd);
      if (b[i] !== bracket) break;
      type = table.codeOf(name, nameEnd);
    }

    const opened = watch.openStrings.length;
    const end = endOfStatement(b, view, i + 1, watch);
    if (end < 0) {
      list.cut = end;
      break;
    }
    if (id > largestId) list.idsTooLarge.push(at);
    else {
      if (count === ids.length) {
        ids = grown(ids, new Uint32Array(count * 2));
        typeOf = grown(typeOf, new Uint16Array(count * 2));
        args = grown(args, new Uint32Array(count * 2));
      }
      ids[count] = id;
      typeOf[count] = type;
      args[count] = i;
      count++;
      if (id > maxId) maxId = id;
    }
    if (b[end] === 59) at = end + 1;
    else {
      if (watch.openStrings.length === opened) list.merged.push(end);
      at = end;
    }
  }
  Object.assign(list, { ids, typeOf, args, count, maxId });
  return at;
}

function grown<T extends Uint32Array | Uint16Array>(old: T, larger: T): T {
  larger.set(old);
  return larger;
}

/** Bytes after the last whole word of a name, little-endian. */
function tailBefore(b: Uint8Array, name: number, end: number): number {
  let tail = 0;
  for (let i = end - ((end - name) & 3), shift = 0; i < end; i++, shift += 8) tail |= (b[i] as number) << shift;
  return tail;
}

function pastWord(b: Uint8Array, from: number): number {
  let i = from;
  for (let c = b[i]; c !== undefined && isWord(c); ) c = b[++i];
  return i;
}

const isWord = (c: number): boolean => (c >= 65 && c <= 90) || (c >= 97 && c <= 122) || isDigit(c) || c === 95;

function pastBlanks(b: Uint8Array, from: number): number {
  let i = from;
  while (i < b.length) {
    if ((b[i] as number) <= 32) i++;
    else if (b[i] === 47 && b[i + 1] === 42) {
      const end = endOfComment(b, i);
      if (end < 0) return b.length;
      i = end + 1;
    } else break;
  }
  return i;
}

import { endOfComment, endOfStatement, type StringWatch } from './end-of-statement.ts';
import { type TypeTable, typeTable } from './type-table.ts';

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

export function newRecordList(b: Uint8Array): RecordList {
  // Instances of real models take 50 to 60 bytes on average; a denser file makes the arrays grow.
  const capacity = 1024 + Math.floor(b.length / 48);
  return {
    count: 0,
    ids: new Uint32Array(capacity),
    typeOf: new Uint16Array(capacity),
    args: new Uint32Array(capacity),
    maxId: 0,
    table: typeTable(b),
    merged: [],
    idsTooLarge: [],
    cut: 0,
  };
}

const largestId = 4_294_967_295;

/**
 * Reads instances one after the other and stops in front of the first thing that is none: a keyword, a comment, an
 * unreadable statement, the end of the bytes, or the instance that the end cuts off (then `list.cut` says so).
 */
export function instances(
  b: Uint8Array,
  words: Int32Array,
  from: number,
  list: RecordList,
  watch: StringWatch,
): number {
  const n = b.length;
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
    const name = i;
    let hash = 0;
    c = b[i] as number;
    while ((c >= 65 && c <= 90) || (c >= 97 && c <= 122) || (c >= 48 && c <= 57) || c === 95) {
      hash = (Math.imul(hash, 31) + (c >= 97 ? c - 32 : c)) | 0;
      c = b[++i] as number;
    }
    const nameEnd = i;
    if (c !== 40) i = pastBlanks(b, i);
    if (b[i] !== 40) break;
    const opened = watch.openStrings.length;
    const end = endOfStatement(b, words, i + 1, watch);
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
      typeOf[count] = table.code(hash, name, nameEnd);
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

import { endOfQuoted, isLetter, pastArguments, pastComment, type TypedList, typedListsBetween } from './byte-walk.ts';
import { isDigit } from './end-of-statement.ts';
import type { NameTable } from './name-table.ts';
import { readNumber, readNumbers } from './number.ts';
import { plainText } from './plain-text.ts';
import { decodeText, newTextWatch, type TextWatch } from './text.ts';
import { longestRemembered, textTable } from './text-table.ts';

/** Brackets deeper than this are damage: what stands in them reads as absent. */
export const deepest = 100;

/**
 * Reads the arguments of a record one after the other, straight from the bytes. Every reader takes the argument that
 * stands next, whatever it is, and moves on: one of another kind than asked for reads as absent. A typed value such
 * as `IFCLABEL('x')` reads as what stands in its brackets.
 */
export class Cursor {
  readonly bytes: Uint8Array;
  readonly watch: TextWatch;
  private readonly remembered: NameTable<null>;
  private pos = 0;
  private depth = 0;

  /** `texts`: short texts of the file that were decoded before. */
  constructor(bytes: Uint8Array, watch: TextWatch = newTextWatch(), texts: NameTable<null> = textTable(bytes)) {
    this.bytes = bytes;
    this.watch = watch;
    this.remembered = texts;
  }

  /** In front of the first argument of the record whose `(` stands at `open`. */
  at(open: number): this {
    this.pos = open + 1;
    return this;
  }

  /** Passes over so many arguments; stays behind the last one where there are fewer. */
  skip(count: number): this {
    this.pos = pastArguments(this.bytes, this.pos, count);
    return this;
  }

  /** True where another argument stands here: not past the last one. */
  get more(): boolean {
    const c = this.next();
    return c !== 41 && c !== 59 && this.pos < this.bytes.length;
  }

  /** STEP id of a reference; 0 for `$` and anything else. */
  id(): number {
    const b = this.bytes;
    let i = this.pos;
    if (b[i] !== 35) {
      if (this.next() !== 35) {
        this.skip(1);
        return 0;
      }
      i = this.pos;
    }
    let id = 0;
    let c = b[++i]!;
    for (; c >= 48 && c <= 57; c = b[++i]!) id = id * 10 + c - 48;
    this.leave(i);
    return id;
  }

  /** STEP ids of all references in a list, in order; none for `$`. A lone reference counts as a list of one. */
  ids(): number[] {
    const b = this.bytes;
    const n = b.length;
    const found = gathered;
    let count = 0;
    let depth = 0;
    let i = this.pos;
    for (; i < n; i++) {
      const c = b[i]!;
      if (c === 35) {
        let id = 0;
        let d = b[++i]!;
        for (; d >= 48 && d <= 57; d = b[++i]!) id = id * 10 + d - 48;
        i--;
        if (id !== 0) found[count++] = id;
      } else if (c === 44) {
        if (depth === 0) break;
      } else if (c === 40) depth++;
      else if (c === 41) {
        if (depth === 0) break;
        depth--;
      } else if (c === 39) i = endOfQuoted(b, i);
      else if (c === 47) i = pastComment(b, i) - 1;
      else if (c === 59) break;
    }
    this.pos = b[i] === 44 ? i + 1 : i;
    return found.slice(0, count);
  }

  /** Text, decoded; null for `$` and what is no text. */
  text(): string | null {
    if (this.next() !== 39) return this.inner(readText);
    const from = this.pos + 1;
    const end = endOfQuoted(this.bytes, this.pos);
    this.leave(end + 1);
    if (end - from > longestRemembered) return decodeText(this.bytes, from, end, this.watch);
    const known = this.remembered.at(from, end);
    return known.isOdd ? decodeText(this.bytes, from, end, this.watch) : known.name;
  }

  /** GlobalId or another text that stands only once: decoded, and not remembered. */
  unique(): string | null {
    if (this.next() !== 39) return this.text();
    const from = this.pos + 1;
    const end = endOfQuoted(this.bytes, this.pos);
    this.leave(end + 1);
    return plainText(this.bytes, from, end) ?? decodeText(this.bytes, from, end, this.watch);
  }

  /** All texts in a list, in order. */
  texts(): string[] {
    const found: string[] = [];
    const b = this.bytes;
    const end = this.endOfArgument();
    for (let i = this.pos; i < end; i++) {
      if (b[i] !== 39) continue;
      const close = endOfQuoted(b, i);
      found.push(decodeText(b, i + 1, close, this.watch));
      i = close;
    }
    this.pos = end;
    this.skip(1);
    return found;
  }

  /** Number, integer or real; null for `$` and what is none. */
  number(): number | null {
    const c = this.next();
    if (!isDigit(c) && c !== 45 && c !== 43 && (c !== 46 || !isDigit(this.bytes[this.pos + 1]))) {
      return this.inner(readOneNumber);
    }
    const value = readNumber(this.bytes, this.pos);
    this.skip(1);
    return Number.isFinite(value) ? value : null;
  }

  /** Adds all numbers of a list, nested lists in order, to `into`; references and texts between them are no numbers. */
  numbers(into: number[]): number[] {
    const end = readNumbers(this.bytes, this.pos, into);
    this.pos = this.bytes[end] === 44 ? end + 1 : end;
    return into;
  }

  /** References and numbers of a list that holds both, such as `(#12,IFCPARAMETERVALUE(0.5))`. */
  mixed(): { readonly ids: number[]; readonly numbers: number[] } {
    const start = this.pos;
    const ids = this.ids();
    this.pos = start;
    return { ids, numbers: this.numbers([]) };
  }

  /** Typed lists of numbers, such as `(IFCLINEINDEX((1,2)),IFCARCINDEX((2,3,4)))`; none for `$`. */
  typedLists(): TypedList[] {
    const end = this.endOfArgument();
    const found = typedListsBetween(this.bytes, this.pos, end);
    this.pos = end;
    this.skip(1);
    return found;
  }

  /** `.X.` as `X` in upper case; null for `$` and anything else. */
  enumeration(): string | null {
    if (this.next() !== 46) return this.inner(readEnumeration);
    const b = this.bytes;
    const from = this.pos + 1;
    let i = from;
    while (i < b.length && b[i] !== 46 && b[i] !== 44 && b[i] !== 41 && b[i] !== 59) i++;
    this.leave(b[i] === 46 ? i + 1 : i);
    if (i - from > longestRemembered) return null;
    const { name } = this.remembered.at(from, i);
    return isUpper(name) ? name : name.toUpperCase();
  }

  /** `.T.` and `.F.`; null for `.U.`, `$` and anything else. */
  flag(): boolean | null {
    const value = this.enumeration();
    return value === 'T' ? true : value === 'F' ? false : null;
  }

  /** First byte of the argument that stands here, blanks and comments passed over: `#`, `$`, `'`, `(` … */
  next(): number {
    const b = this.bytes;
    for (;;) {
      const c = b[this.pos] as number;
      if (c <= 32) this.pos++;
      else if (c === 47 && b[this.pos + 1] === 42) this.pos = pastComment(b, this.pos);
      else return c;
    }
  }

  /** Class name of a typed value such as `IFCLABEL('x')`, upper case, without moving; null where none stands. */
  typeName(): string | null {
    if (!isLetter(this.next())) return null;
    const b = this.bytes;
    let i = this.pos;
    while (isLetter(b[i]) || isDigit(b[i]) || b[i] === 95) i++;
    if (i - this.pos > longestRemembered) return null;
    const { name } = this.remembered.at(this.pos, i);
    return isUpper(name) ? name : name.toUpperCase();
  }

  /** First byte within the brackets of the typed value that stands here, without moving; 0 where there is none. */
  firstByteWithin(): number {
    const b = this.bytes;
    this.next();
    let i = this.pos;
    while (i < b.length && b[i] !== 40 && b[i] !== 44 && b[i] !== 41) i++;
    if (b[i] !== 40) return 0;
    for (i++; i < b.length && b[i]! <= 32; ) i++;
    return b[i] ?? 0;
  }

  /** Moves on past a list; gives a cursor in front of its first entry, null for an empty list. */
  firstOfList(): Cursor | null {
    this.next();
    const inside = new Cursor(this.bytes, this.watch, this.remembered).at(this.pos);
    this.skip(1);
    return inside.more ? inside : null;
  }

  /** Offset where the argument that stands here begins. */
  get offset(): number {
    this.next();
    return this.pos;
  }

  /** From right behind an argument that was read to the front of the next. */
  private leave(end: number): void {
    this.pos = end;
    const c = this.bytes[end];
    if (c === 44) this.pos = end + 1;
    else if (c !== 41) this.skip(1);
  }

  /** What `read` finds within the brackets of a typed value or of a list's first entry; null for anything else. */
  private inner<T>(read: (within: Cursor) => T | null): T | null {
    const end = this.endOfArgument();
    let open = this.pos;
    while (open < end && this.bytes[open] !== 40) open++;
    let value: T | null = null;
    if (open < end && end - open > 2 && this.depth < deepest) {
      this.pos = open + 1;
      this.depth++;
      value = read(this);
      this.depth--;
    }
    this.pos = end;
    this.skip(1);
    return value;
  }

  /** Offset of the `,` or `)` behind the argument that stands here. */
  private endOfArgument(): number {
    this.next();
    const b = this.bytes;
    const n = b.length;
    let depth = 0;
    let most = 0;
    let i = this.pos;
    for (; i < n; i++) {
      const c = b[i];
      if (c === 39) i = endOfQuoted(b, i);
      else if (c === 40) {
        if (++depth > most) most = depth;
      } else if (c === 41) {
        if (depth === 0) break;
        depth--;
      } else if (c === 44) {
        if (depth === 0) break;
      } else if (c === 47) i = pastComment(b, i) - 1;
      else if (c === 59) break;
    }
    if (most > deepest) {
      this.watch.tooDeep++;
      if (this.watch.firstTooDeep < 0) this.watch.firstTooDeep = this.pos;
    }
    return i;
  }
}

/** Ids are gathered here first, so that the list is made once and as long as it must be. */
const gathered: number[] = [];

const readText = (within: Cursor): string | null => within.text();
const readOneNumber = (within: Cursor): number | null => within.number();
const readEnumeration = (within: Cursor): string | null => within.enumeration();

const isUpper = (text: string): boolean => {
  for (let k = 0; k < text.length; k++) if (text.charCodeAt(k) >= 97) return false;
  return true;
};

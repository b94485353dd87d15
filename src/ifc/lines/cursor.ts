import { isDigit } from './end-of-statement.ts';
import { readNumber } from './number.ts';
import { decodeText, newTextWatch, type TextWatch } from './text.ts';

/** Brackets deeper than this are damage: what stands in them is passed over. */
export const deepest = 100;

/**
 * Reads the arguments of a record one after the other, straight from the bytes. Every reader takes the argument that
 * stands next, whatever it is, and moves on: one of another kind than asked for reads as absent. A typed value such
 * as `IFCLABEL('x')` reads as what stands in its brackets.
 */
export class Cursor {
  readonly bytes: Uint8Array;
  readonly watch: TextWatch;
  /** Brackets deeper than `deepest` that were met. */
  tooDeep = 0;
  private pos = 0;

  constructor(bytes: Uint8Array, watch: TextWatch = newTextWatch()) {
    this.bytes = bytes;
    this.watch = watch;
  }

  /** In front of the first argument of the record whose `(` stands at `open`. */
  at(open: number): this {
    this.pos = open + 1;
    return this;
  }

  /** Passes over so many arguments. */
  skip(count: number): this {
    for (let k = 0; k < count; k++) this.pass();
    return this;
  }

  /** True where another argument stands here: not past the last one. */
  get more(): boolean {
    return this.next() !== 41 && this.pos < this.bytes.length;
  }

  /** STEP id of a reference; 0 for `$` and anything else. */
  id(): number {
    if (this.next() !== 35) {
      this.pass();
      return 0;
    }
    const b = this.bytes;
    let i = this.pos + 1;
    let id = 0;
    for (let c = b[i] as number; c >= 48 && c <= 57; c = b[++i] as number) id = id * 10 + c - 48;
    this.pos = i;
    this.toNext();
    return id;
  }

  /** STEP ids of all references in a list, in order; none for `$`. A lone reference counts as a list of one. */
  ids(): number[] {
    const found: number[] = [];
    const b = this.bytes;
    const end = this.endOfArgument();
    for (let i = this.pos; i < end; i++) {
      const c = b[i];
      if (c === 35) {
        let id = 0;
        for (let d = b[++i] as number; d >= 48 && d <= 57; d = b[++i] as number) id = id * 10 + d - 48;
        i--;
        if (id !== 0) found.push(id);
      } else if (c === 39) i = endOfQuoted(b, i);
    }
    this.pos = end;
    this.toNext();
    return found;
  }

  /** Text, decoded; null for `$` and what is no text. */
  text(): string | null {
    const c = this.next();
    if (c === 39) {
      const from = this.pos + 1;
      const end = endOfQuoted(this.bytes, this.pos);
      this.pos = end + 1;
      this.toNext();
      return shortText(this.bytes, from, end) ?? decodeText(this.bytes, from, end, this.watch);
    }
    return this.inner(() => this.text());
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
    this.toNext();
    return found;
  }

  /** Number, integer or real; null for `$` and what is none. */
  number(): number | null {
    const c = this.next();
    if (isDigit(c) || c === 45 || c === 43 || c === 46) {
      if (c === 46 && !isDigit(this.bytes[this.pos + 1])) return this.pass();
      const value = readNumber(this.bytes, this.pos);
      this.pass();
      return Number.isFinite(value) ? value : null;
    }
    return this.inner(() => this.number());
  }

  /** Adds all numbers of a list, nested lists in order, to `into`; references and texts between them are no numbers. */
  numbers(into: number[]): number[] {
    const end = this.endOfArgument();
    numbersBetween(this.bytes, this.pos, end, into);
    this.pos = end;
    this.toNext();
    return into;
  }

  /** References and numbers of a list that holds both, such as `(#12,IFCPARAMETERVALUE(0.5))`. */
  mixed(): { readonly ids: number[]; readonly numbers: number[] } {
    const start = this.offset;
    const ids = this.ids();
    this.pos = start;
    return { ids, numbers: this.numbers([]) };
  }

  /** Typed lists of numbers, such as `(IFCLINEINDEX((1,2)),IFCARCINDEX((2,3,4)))`; none for `$`. */
  typedLists(): { readonly type: string; readonly numbers: number[] }[] {
    const b = this.bytes;
    const end = this.endOfArgument();
    const found: { readonly type: string; readonly numbers: number[] }[] = [];
    let i = this.pos;
    while (i < end) {
      if (!isLetter(b[i])) {
        i++;
        continue;
      }
      const from = i;
      while (i < end && b[i] !== 40) i++;
      const type = (shortText(b, from, i) ?? '').trim().toUpperCase();
      let close = i;
      while (close < end && b[close] !== 41) close++;
      found.push({ type, numbers: numbersBetween(b, i, close, []) });
      i = close;
    }
    this.pos = end;
    this.toNext();
    return found;
  }

  /** `.X.` as `X` in upper case; null for `$` and anything else. */
  enumeration(): string | null {
    if (this.next() === 46) {
      const b = this.bytes;
      const from = this.pos + 1;
      let i = from;
      while (i < b.length && b[i] !== 46 && b[i] !== 44 && b[i] !== 41) i++;
      this.pos = i + (b[i] === 46 ? 1 : 0);
      this.toNext();
      return shortText(b, from, i)?.toUpperCase() ?? null;
    }
    return this.inner(() => this.enumeration());
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
      else if (c === 47 && b[this.pos + 1] === 42) {
        const end = b.indexOf(47, this.pos + 3);
        this.pos = end < 0 ? b.length : end + 1;
      } else return c;
    }
  }

  /** Class name of a typed value such as `IFCLABEL('x')`, upper case, without moving; null where none stands. */
  typeName(): string | null {
    const c = this.next();
    if (!isLetter(c)) return null;
    let i = this.pos;
    while (isLetter(this.bytes[i]) || isDigit(this.bytes[i]) || this.bytes[i] === 95) i++;
    return shortText(this.bytes, this.pos, i)?.toUpperCase() ?? null;
  }

  /** First byte within the brackets of the typed value that stands here, without moving; 0 where there is none. */
  firstByteWithin(): number {
    const b = this.bytes;
    let i = this.offset;
    while (i < b.length && b[i] !== 40 && b[i] !== 44 && b[i] !== 41) i++;
    if (b[i] !== 40) return 0;
    for (i++; i < b.length && b[i]! <= 32; ) i++;
    return b[i] ?? 0;
  }

  /** Moves on past a list; gives a cursor in front of its first entry, null for an empty list. */
  firstOfList(): Cursor | null {
    const open = this.offset;
    this.pass();
    const inside = new Cursor(this.bytes, this.watch).at(open);
    return inside.more ? inside : null;
  }

  /** Offset where the argument that stands here begins. */
  get offset(): number {
    this.next();
    return this.pos;
  }

  /** Passes over one argument, and reads it as absent. */
  private pass(): null {
    this.pos = this.endOfArgument();
    this.toNext();
    return null;
  }

  /** What `read` finds within the brackets of a typed value or of a list's first entry; null for anything else. */
  private inner<T>(read: () => T | null): T | null {
    const end = this.endOfArgument();
    let open = this.pos;
    while (open < end && this.bytes[open] !== 40) open++;
    const within = open < end && end - open > 2 && this.depthBelow < deepest;
    let value: T | null = null;
    if (within) {
      this.pos = open + 1;
      this.depthBelow++;
      value = read();
      this.depthBelow--;
    }
    this.pos = end;
    this.toNext();
    return value;
  }

  private depthBelow = 0;

  /** Offset of the `,` or `)` behind the argument that stands here. */
  private endOfArgument(): number {
    this.next();
    const b = this.bytes;
    const n = b.length;
    let depth = 0;
    let deep = false;
    let i = this.pos;
    for (; i < n; i++) {
      const c = b[i];
      if (c === 39) i = endOfQuoted(b, i);
      else if (c === 40) {
        if (++depth > deepest) deep = true;
      } else if (c === 41) {
        if (depth === 0) break;
        depth--;
      } else if (c === 44) {
        if (depth === 0) break;
      } else if (c === 59) break;
    }
    if (deep) this.tooDeep++;
    return i;
  }

  /** From behind an argument to the front of the next; stays in front of the closing bracket. */
  private toNext(): void {
    const b = this.bytes;
    let c = b[this.pos] as number;
    while (c !== 44 && c !== 41 && c !== 59 && this.pos < b.length) c = b[++this.pos] as number;
    if (c === 44) this.pos++;
  }
}

const isLetter = (c: number | undefined): boolean => c !== undefined && ((c >= 65 && c <= 90) || (c >= 97 && c <= 122));

/** Offset of the quote that ends a string opened at `open`; a doubled quote is part of the string. */
function endOfQuoted(b: Uint8Array, open: number): number {
  const n = b.length;
  for (let i = open + 1; i < n; i++) {
    if (b[i] === 39) {
      if (b[i + 1] !== 39) return i;
      i++;
    }
  }
  return n;
}

function numbersBetween(b: Uint8Array, from: number, end: number, into: number[]): number[] {
  let i = from;
  while (i < end) {
    const c = b[i]!;
    if ((c >= 48 && c <= 57) || c === 45 || c === 43) {
      into.push(readNumber(b, i));
      for (i++; i < end; i++) if (b[i] === 44 || b[i] === 41) break;
    } else if (c === 35 || isLetter(c)) {
      for (i++; i < end; i++) if (b[i] === 44 || b[i] === 40 || b[i] === 41) break;
    } else if (c === 39) i = endOfQuoted(b, i) + 1;
    else i++;
  }
  return into;
}

const codes: number[] = [];
/** Plain short texts as they stand; null where something must be decoded or the text is long. */
function shortText(b: Uint8Array, from: number, to: number): string | null {
  const length = to - from;
  if (length > 64) return null;
  codes.length = length;
  for (let k = 0; k < length; k++) {
    const c = b[from + k] as number;
    if (c === 92 || c === 39 || c >= 128) return null;
    codes[k] = c;
  }
  return String.fromCharCode.apply(null, codes);
}

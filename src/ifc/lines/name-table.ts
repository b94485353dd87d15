export interface Remembered<T> {
  readonly name: string;
  readonly meaning: T;
  /** True where the name cannot be taken as remembered. */
  readonly isOdd: boolean;
}

interface Known<T> extends Remembered<T> {
  readonly from: number;
  readonly length: number;
  readonly next: Known<T> | null;
}

const slots = 1 << 12;
/** A file with more distinct names than this has them read anew each time. */
const mostNames = 40_000;

/** Remembers what each distinct name in a file means, found by its bytes: a name is decoded once, not each time. */
export class NameTable<T> {
  private readonly bytes: Uint8Array;
  private readonly learn: (from: number, to: number) => Remembered<T>;
  private readonly table: (Known<T> | null)[] = Array<Known<T> | null>(slots).fill(null);
  private count = 0;

  constructor(bytes: Uint8Array, learn: (from: number, to: number) => Remembered<T>) {
    this.bytes = bytes;
    this.learn = learn;
  }

  /** The text that stands at [from, to). */
  at(from: number, to: number): Remembered<T> {
    const b = this.bytes;
    let hash = 0;
    for (let i = from; i < to; i++) hash = (Math.imul(hash, 31) + b[i]!) | 0;
    return this.hashed(hash, from, to);
  }

  /** The string that is opened by the quote at `open`. */
  quoted(open: number): Remembered<T> {
    const b = this.bytes;
    const from = open + 1;
    let hash = 0;
    let i = from;
    for (; i < b.length; i++) {
      const c = b[i]!;
      if (c === 39 && b[++i] !== 39) return this.hashed(hash, from, i - 1);
      hash = (Math.imul(hash, 31) + c) | 0;
    }
    return this.hashed(hash, from, i);
  }

  private hashed(hash: number, from: number, to: number): Remembered<T> {
    const b = this.bytes;
    const slot = (hash ^ (hash >>> 12)) & (slots - 1);
    const length = to - from;
    for (let known = this.table[slot] ?? null; known !== null; known = known.next) {
      if (known.length !== length) continue;
      const start = known.from;
      let k = 0;
      while (k < length && b[start + k] === b[from + k]) k++;
      if (k === length) return known;
    }
    const learned = this.learn(from, to);
    if (++this.count > mostNames) return learned;
    const { name, meaning, isOdd } = learned;
    const known = { name, meaning, isOdd, from, length, next: this.table[slot] ?? null };
    this.table[slot] = known;
    return known;
  }
}

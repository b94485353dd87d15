/** Remembers what each distinct name in a file means, found by its bytes: a name is decoded once, not each time. */
export interface NameTable<T> {
  /** Meaning of the text between quotes [from, to). */
  readonly at: (from: number, to: number) => NamedMeaning<T>;
}

export interface NamedMeaning<T> {
  readonly name: string;
  readonly meaning: T;
  /** True where the name cannot be taken as remembered. */
  readonly isOdd?: boolean;
}

const slots = 1 << 12;
/** A file with more distinct names than this has them read anew each time. */
const mostNames = 40_000;

export function nameTable<T>(b: Uint8Array, learn: (from: number, to: number) => NamedMeaning<T>): NameTable<T> {
  interface Known extends NamedMeaning<T> {
    readonly from: number;
    readonly length: number;
    readonly next: Known | null;
  }
  let count = 0;
  const first: (Known | null)[] = Array<Known | null>(slots).fill(null);
  return {
    at: (from, to) => {
      let hash = 0;
      for (let i = from; i < to; i++) hash = (Math.imul(hash, 31) + b[i]!) | 0;
      const slot = (hash ^ (hash >>> 12)) & (slots - 1);
      const length = to - from;
      for (let known = first[slot] ?? null; known !== null; known = known.next) {
        if (known.length !== length) continue;
        let k = 0;
        while (k < length && b[known.from + k] === b[from + k]) k++;
        if (k === length) return known;
      }
      const read = learn(from, to);
      if (++count > mostNames) return read;
      const { name, meaning, isOdd = false } = read;
      const fresh: Known = { name, meaning, isOdd, from, length, next: first[slot] ?? null };
      first[slot] = fresh;
      return fresh;
    },
  };
}

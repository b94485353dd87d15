/** Class names met so far, each with a small number. */
export interface TypeTable {
  /** By code, upper case. Code 0 is nobody's; the empty name of a complex instance has the name `(`. */
  readonly names: readonly string[];
  /** Code of the name that stands at [from, to) and whose upper-case bytes give this hash. */
  readonly code: (hash: number, from: number, to: number) => number;
}

/** More classes than this are no IFC: the rest share code 0 and are never asked for. */
const mostTypes = 65_000;
const slots = 1 << 14;

export function typeTable(b: Uint8Array): TypeTable {
  const names: string[] = [''];
  const spelled: Uint8Array[] = [new Uint8Array(0)];
  const first = new Uint16Array(slots);
  const next: number[] = [0];

  const isAt = (code: number, from: number, to: number): boolean => {
    const name = spelled[code] as Uint8Array;
    if (name.length !== to - from) return false;
    for (let i = 0; i < name.length; i++) {
      const c = b[from + i] as number;
      if (name[i] !== c && name[i] !== c - 32) return false;
    }
    return true;
  };
  const code = (hash: number, from: number, to: number): number => {
    const slot = (hash ^ (hash >>> 14)) & (slots - 1);
    for (let known = first[slot] as number; known !== 0; known = next[known] as number) {
      if (isAt(known, from, to)) return known;
    }
    if (names.length === mostTypes) return 0;
    const name = String.fromCharCode(...b.subarray(from, Math.min(to, from + 200))).toUpperCase();
    names.push(to === from ? '(' : name);
    spelled.push(Uint8Array.from(b.subarray(from, to), (c) => (c >= 97 ? c - 32 : c)));
    next.push(first[slot] as number);
    first[slot] = names.length - 1;
    return names.length - 1;
  };
  return { names, code };
}

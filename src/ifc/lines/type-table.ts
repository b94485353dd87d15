/** One way to spell a class name: letters may be small, blanks may follow. */
interface Spelling {
  readonly words: readonly number[];
  readonly length: number;
  readonly code: number;
  readonly next: Spelling | null;
}

/** More classes than this are no IFC: the rest share code 0 and are never asked for. */
const mostTypes = 65_000;
const mostSpellings = 100_000;
const slots = 1 << 14;

/** Class names met so far, each with a small number. */
export class TypeTable {
  /** By code, upper case. Code 0 is nobody's; the empty name of a complex instance has the name `(`. */
  readonly names: string[] = [''];
  private readonly view: DataView;
  private readonly codes = new Map<string, number>();
  private readonly table: (Spelling | null)[] = Array<Spelling | null>(slots).fill(null);
  private spellings = 0;

  constructor(view: DataView) {
    this.view = view;
  }

  /**
   * Code of the name that stands at [from, to), or -1 where that is no name. `hash` is any number that the same bytes
   * always give; `tail` holds the bytes after the last whole word of four, little-endian.
   */
  code(hash: number, from: number, to: number, tail: number): number {
    const { view } = this;
    const slot = (hash ^ (hash >>> 15)) & (slots - 1);
    const length = to - from;
    const whole = length >> 2;
    for (let known = this.table[slot] ?? null; known !== null; known = known.next) {
      if (known.length !== length) continue;
      const { words } = known;
      let k = 0;
      while (k < whole && words[k] === view.getInt32(from + (k << 2), true)) k++;
      if (k === whole && words[k] === tail) return known.code;
    }
    return this.learn(slot, from, to, tail);
  }

  /** Code of the word that stands at [from, to), however it is told from its bracket. */
  codeOf(from: number, to: number): number {
    return this.codeOfText(textBetween(this.view, from, to));
  }

  private codeOfText(text: string): number {
    const name = text === '' ? '(' : text.toUpperCase();
    const known = this.codes.get(name);
    if (known !== undefined) return known;
    if (this.names.length === mostTypes) return 0;
    this.names.push(name);
    this.codes.set(name, this.names.length - 1);
    return this.names.length - 1;
  }

  private learn(slot: number, from: number, to: number, tail: number): number {
    const { view } = this;
    const text = textBetween(view, from, to).trim();
    if (!/^\w*$/.test(text)) return -1;
    const code = this.codeOfText(text);
    if (this.spellings++ < mostSpellings) {
      const words: number[] = [];
      for (let i = from; i + 4 <= to; i += 4) words.push(view.getInt32(i, true));
      words.push(tail);
      this.table[slot] = { words, length: to - from, code, next: this.table[slot] ?? null };
    }
    return code;
  }
}

function textBetween(view: DataView, from: number, to: number): string {
  let text = '';
  for (let i = from; i < to; i++) text += String.fromCharCode(view.getUint8(i));
  return text;
}

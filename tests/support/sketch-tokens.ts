import { InputError } from '../../src/findings/input-error.ts';
import { type PipeSize, sizeOfDn, sizeOfInches } from './pipe-sizes.ts';

/** One statement of the notation: the line it begins on and its words. `>` at a line's end carries it on. */
export interface Statement {
  readonly line: number;
  readonly words: readonly string[];
}

const word = /"[^"]*"|\d+:\d+(?:\.\d+)?|[():>,]|[^\s():>,"]+/g;

/** Comments run from `#` to the end of the line. */
export function statements(text: string): readonly Statement[] {
  const found: { line: number; words: string[] }[] = [];
  let carries = false;
  text.split(/\r?\n/).forEach((raw, index) => {
    const line = raw.replace(/("[^"]*")|#.*$/g, (_, quoted: string | undefined) => quoted ?? '');
    if ((line.match(/"/g)?.length ?? 0) % 2 === 1) throw new InputError(`line ${index + 1}`, 'a quote is not closed');
    const words = line.match(word) ?? [];
    if (words.length === 0) return;
    const last = found.at(-1);
    if (carries && last !== undefined) last.words.push(...words);
    else found.push({ line: index + 1, words: [...words] });
    carries = words.at(-1) === '>';
  });
  return found;
}

/** Reads the words of one statement from left to right; every complaint names the line. */
export class Cursor {
  readonly line: number;
  readonly #words: readonly string[];
  #at = 0;

  constructor(statement: Statement) {
    this.line = statement.line;
    this.#words = statement.words;
  }

  get done(): boolean {
    return this.#at >= this.#words.length;
  }

  peek(ahead = 0): string | undefined {
    return this.#words[this.#at + ahead];
  }

  take(what: string): string {
    const found = this.#words[this.#at];
    if (found === undefined) return this.fail(`${what} is missing at the end of the line`);
    this.#at += 1;
    return found;
  }

  /** Takes the word if it stands next. */
  took(expected: string): boolean {
    if (this.peek() !== expected) return false;
    this.#at += 1;
    return true;
  }

  need(expected: string): void {
    if (!this.took(expected)) this.fail(`"${expected}" expected, found ${this.#shown()}`);
  }

  number(what: string): number {
    const text = this.take(what);
    const value = Number(text);
    return text === '' || !Number.isFinite(value) ? this.fail(`${what}: "${text}" is no number`) : value;
  }

  /** A quoted text or one word. */
  text(what: string): string {
    const found = this.take(what);
    return found.startsWith('"') ? found.slice(1, -1) : found;
  }

  /** A name of a node, part or pipe: letters, digits, dots. A dash stands between the two nodes of a pipe. */
  name(what: string): string {
    const found = this.take(what);
    return /^[\p{L}\d][\p{L}\d._'+]*$/u.test(found) ? found : this.fail(`${what}: "${found}" is no name`);
  }

  /** `1:50` as a ratio. */
  slope(what: string): number {
    const found = this.take(what);
    const parts = /^(\d+):(\d+(?:\.\d+)?)$/.exec(found);
    return parts ? Number(parts[1]) / Number(parts[2]) : this.fail(`${what}: "${found}" is no slope such as 1:50`);
  }

  get atSize(): boolean {
    return /^(DN\d*|[\d.]*[¼½¾]?(in|")?|\d+\/\d+)$/.test(this.peek() ?? '') && this.peek() !== '';
  }

  /** `3 in`, `1½ in`, `1 1/2 in`, `DN 100`. */
  size(what: string): PipeSize {
    const first = this.take(what);
    if (/^DN\d*$/.test(first)) {
      const dn = first === 'DN' ? this.number(what) : Number(first.slice(2));
      return sizeOfDn(dn) ?? this.fail(`${what}: DN ${dn} is not in the table of pipe sizes`);
    }
    let text = first;
    if (/^\d\/\d$/.test(this.peek() ?? '')) text += ` ${this.take(what)}`;
    const parts = /^(\d*(?:\.\d+)?)([¼½¾]|\s?[13]\/[24])?(in|")?$/.exec(text);
    if (!parts) return this.fail(`${what}: "${text}" is no size such as 3 in or DN 80`);
    if (parts[3] === undefined) this.need('in');
    const inches = Number(parts[1] || 0) + fraction((parts[2] ?? '').trim());
    return sizeOfInches(inches) ?? this.fail(`${what}: ${inches} in is not in the table of pipe sizes`);
  }

  end(): void {
    if (!this.done) this.fail(`${this.#shown()} is not understood here`);
  }

  fail(problem: string): never {
    throw new InputError(`line ${this.line}`, problem);
  }

  #shown(): string {
    const next = this.peek();
    return next === undefined ? 'the end of the line' : `"${next}"`;
  }
}

function fraction(text: string): number {
  const known: Record<string, number> = { '': 0, '¼': 0.25, '½': 0.5, '¾': 0.75, '1/4': 0.25, '1/2': 0.5, '3/4': 0.75 };
  return known[text] ?? 0;
}

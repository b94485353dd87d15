/** Text of a STEP exchange file, built line by line. */
export type Ref = { readonly ref: number };
/** A number is written as a real; `typed` and `.X.` say what else. `undefined` is a derived attribute, `*`. */
export type Arg = number | string | null | Ref | Raw | readonly Arg[];
interface Raw {
  readonly raw: string;
}

/** Text written as it stands: `.T.`, `IFCLABEL('x')`, integers. */
export const raw = (text: string): Raw => ({ raw: text });
export const word = (value: string): Raw => raw(`.${value}.`);
export const typed = (type: string, value: number | string): Raw => raw(`${type}(${encode(value)})`);

export class StepFile {
  readonly #lines: { readonly keyword: string; readonly args: readonly Arg[] }[] = [];
  readonly #shared = new Map<string, Ref>();

  add(keyword: string, ...args: readonly Arg[]): Ref {
    this.#lines.push({ keyword, args });
    return { ref: this.#lines.length };
  }

  /** The same record for the same arguments: directions, profiles, points that many lines share. */
  share(keyword: string, ...args: readonly Arg[]): Ref {
    const key = `${keyword}${JSON.stringify(args)}`;
    const known = this.#shared.get(key);
    if (known !== undefined) return known;
    const made = this.add(keyword, ...args);
    this.#shared.set(key, made);
    return made;
  }

  /** Lines in the order made, numbered from 1; with a seed both the order and the numbers are shuffled. */
  render(header: readonly string[], seed: number | null): string {
    const random = seed === null ? null : randomOf(seed);
    const numbers = this.#lines.map((_, index) => (random === null ? index + 1 : 3 * index + 17));
    if (random !== null) shuffle(numbers, random);
    const data = this.#lines.map(
      ({ keyword, args }, index) =>
        `#${numbers[index]}=${keyword}(${args.map((arg) => encode(arg, numbers)).join(',')});`,
    );
    if (random !== null) shuffle(data, random);
    const ends = ['ENDSEC;', 'END-ISO-10303-21;', ''];
    return ['ISO-10303-21;', 'HEADER;', ...header, 'ENDSEC;', 'DATA;', ...data, ...ends].join('\n');
  }
}

function encode(arg: Arg, numbers: readonly number[] = []): string {
  if (arg === null) return '$';
  if (typeof arg === 'number') return real(arg);
  if (typeof arg === 'string') return stepText(arg);
  if ('raw' in arg) return arg.raw;
  if ('ref' in arg) return `#${numbers[arg.ref - 1]}`;
  return `(${arg.map((each) => encode(each, numbers)).join(',')})`;
}

/** Nine decimals hold a coordinate in any unit; a real always has its dot. */
function real(value: number): string {
  const text = value.toFixed(9).replace(/0+$/, '');
  return text === '-0.' ? '0.' : text;
}

/** ASCII only: other characters as `\X2\`, quotes and backslashes doubled. */
export function stepText(text: string): string {
  const safe = text.replace(/['\\]/g, '$&$&').replace(/[^\x20-\x7e]+/g, (run) => {
    const units = [...Array(run.length).keys()].map((at) =>
      run.charCodeAt(at).toString(16).toUpperCase().padStart(4, '0'),
    );
    return `\\X2\\${units.join('')}\\X0\\`;
  });
  return `'${safe}'`;
}

/** A small generator of our own (xorshift), so that a seed means the same file everywhere. */
function randomOf(seed: number): () => number {
  let state = (seed * 2654435761 + 88172645) >>> 0 || 1;
  return () => {
    state ^= state << 13;
    state >>>= 0;
    state ^= state >>> 17;
    state ^= state << 5;
    state >>>= 0;
    return state / 4294967296;
  };
}

function shuffle<T>(list: T[], random: () => number): void {
  for (let last = list.length - 1; last > 0; last -= 1) {
    const other = Math.floor(random() * (last + 1));
    [list[last], list[other]] = [list[other]!, list[last]!];
  }
}

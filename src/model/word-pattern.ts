import { InputError } from '../findings/input-error.ts';
import { foldLetters } from './fold-text.ts';

/**
 * One way to write a word of the names table, as a row of tokens. A token is a folded word, `#` for a number, or a
 * word with `*` wherever any letters may stand.
 */
export interface WordForm {
  readonly tokens: readonly string[];
  /** Nothing but numbers stands before it, or after it. */
  readonly first: boolean;
  readonly last: boolean;
  /** None of these rows of words follows. */
  readonly notBefore: readonly (readonly string[])[];
  /** Neither the first matched word nor the one before it is one of these. */
  readonly not: readonly string[];
}

const mostForms = 1500;

/** Every form of a word written in the signs that the table's head explains. A fault names the place in the table. */
export function wordForms(word: string, where: string): readonly WordForm[] {
  const refuse = (problem: string): never => {
    throw new InputError(where, `${JSON.stringify(word)} ${problem}`);
  };
  const parts = word.split(' ').filter((part) => part !== '');
  const not = parts[0]?.startsWith('!') ? listed(parts.shift() ?? '') : [];
  const notBefore = parts.at(-1)?.startsWith('!') ? listed(parts.pop() ?? '') : [];
  let body = parts.join(' ');
  const first = body.startsWith('^');
  const last = body.endsWith('$');
  body = body.slice(first ? 1 : 0, last ? -1 : undefined);
  if (/[!^$]/.test(body)) refuse('has ! ^ or $ in a place where it means nothing');
  const rows = new Map<string, readonly string[]>();
  for (const choice of choices(body, refuse)) {
    for (const spelled of spellings(choice.replaceAll('~', '\u0000'))) {
      for (const joined of joints(spelled)) {
        const tokens = tokensOf(joined);
        if (tokens.length === 0) refuse('can be empty');
        for (const token of tokens)
          if (!/^(?:#|&|\p{N}+|\*?[\p{L}\p{M}]+(?:\*[\p{L}\p{M}]+)*\*?)$/u.test(token))
            refuse(`holds ${JSON.stringify(token)}, which is no word`);
        rows.set(tokens.join(' '), tokens);
        if (rows.size > mostForms) refuse(`can be written in more than ${mostForms} ways`);
      }
    }
  }
  const negated = notBefore.flatMap((row) => spellings(row).map((spelled) => tokensOf(spelled.replaceAll('_', ' '))));
  return [...rows.values()].map((tokens) => ({
    tokens,
    first,
    last,
    notBefore: negated,
    not: not.flatMap((entry) => spellings(entry).map(foldLetters)),
  }));
}

const listed = (part: string): string[] => part.slice(1).split('|');

/** `a(s)` and `[a|b]c` in every reading. */
function choices(body: string, refuse: (problem: string) => never): string[] {
  const open = body.search(/[[(]/);
  if (open < 0) return /[\])|]/.test(body) ? refuse('has a bracket or bar too many') : [body];
  const close = closing(body, open);
  if (close < 0) return refuse('has an open bracket');
  const inside = alternatives(body.slice(open + 1, close));
  if (body[open] === '(') inside.push('');
  const rest = choices(body.slice(close + 1), refuse);
  const made: string[] = [];
  for (const inner of inside)
    for (const middle of choices(inner, refuse)) {
      for (const end of rest) made.push(body.slice(0, open) + middle + end);
      if (made.length > mostForms) refuse(`can be written in more than ${mostForms} ways`);
    }
  return made;
}

function closing(body: string, open: number): number {
  let depth = 0;
  for (let at = open; at < body.length; at += 1) {
    const sign = body[at];
    if (sign === '[' || sign === '(') depth += 1;
    else if (sign === ']' || sign === ')') depth -= 1;
    if (depth === 0) return at;
  }
  return -1;
}

function alternatives(inside: string): string[] {
  const found: string[] = [''];
  let depth = 0;
  for (const sign of inside) {
    if (sign === '[' || sign === '(') depth += 1;
    if (sign === ']' || sign === ')') depth -= 1;
    if (sign === '|' && depth === 0) found.push('');
    else found[found.length - 1] += sign;
  }
  return found;
}

/** As written, and with the letters that old systems write out: ü as ue, å as aa, ø as oe. */
function spellings(text: string): string[] {
  const long = text.normalize('NFC').replace(/[äöüåø]/giu, (letter) => writtenOut[letter.toLowerCase()] ?? letter);
  return long === text ? [text] : [text, long];
}

const writtenOut: Readonly<Record<string, string>> = { ä: 'ae', ö: 'oe', ü: 'ue', å: 'aa', ø: 'oe' };

/** Each joint (marked by a zero byte) closed and open. */
function joints(text: string): string[] {
  const at = text.indexOf('\u0000');
  if (at < 0) return [text];
  const rest = joints(text.slice(at + 1));
  return rest.flatMap((end) => [text.slice(0, at) + end, `${text.slice(0, at)} ${end}`]);
}

/** Split as `foldText` splits: at every sign that is no letter or digit, and between letters and digits. */
const tokensOf = (text: string): string[] =>
  text
    .replace(/(?<=[\p{L}\p{M}*])(?=\p{N})|(?<=\p{N})(?=\p{L})|(?=&)|(?<=&)/gu, ' ')
    .split(/[\s'’.-]+/u)
    .filter((token) => token !== '')
    .map(foldLetters);

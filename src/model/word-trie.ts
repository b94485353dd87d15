import type { Word } from './fold-text.ts';
import type { WordForm } from './word-pattern.ts';

/** Words of the names table, ready to be found in a text in one pass over its words. */
export interface WordTrie {
  /** Every place where a form matches: entry, first and last word. In the order of the words, then of the entries. */
  find(words: readonly Word[]): readonly Match[];
}

export interface Match {
  /** Index of the entry that `build` was given. */
  readonly entry: number;
  /** Index of its first word, and one past its last. */
  readonly from: number;
  readonly to: number;
  /** Position and length among the letters of the text: within a word where the script has no spaces. */
  readonly at: number;
  readonly length: number;
}

interface Node {
  readonly next: Map<string, Node>;
  readonly globs: { readonly fits: (text: string) => boolean; readonly pattern: string; readonly node: Node }[];
  readonly ends: { readonly entry: number; readonly form: WordForm }[];
}

export function buildTrie(forms: Iterable<{ readonly entry: number; readonly form: WordForm }>): WordTrie {
  const root = emptyNode();
  /** Words of unspaced script are looked for inside longer runs. */
  const inside: { readonly text: string; readonly entry: number }[] = [];
  for (const { entry, form } of forms) {
    const [only] = form.tokens;
    if (form.tokens.length === 1 && only !== undefined && unspaced.test(only)) {
      inside.push({ text: only.replaceAll('*', ''), entry });
      continue;
    }
    let node = root;
    for (const token of form.tokens) node = childOf(node, token);
    node.ends.push({ entry, form });
  }
  const starts = rememberingStarts(root);

  function find(words: readonly Word[]): Match[] {
    const found: Match[] = [];
    for (let from = 0; from < words.length; from += 1) {
      const word = words[from];
      if (word === undefined) break;
      if (word.unspaced) findInside(inside, word, from, found);
      for (const node of starts(word)) follow(node, words, from, from + 1, found);
    }
    return found;
  }
  return { find };
}

function follow(node: Node, words: readonly Word[], from: number, to: number, found: Match[]): void {
  for (const { entry, form } of node.ends)
    if (allowed(form, words, from, to)) found.push(matchOf(entry, words, from, to));
  const word = words[to];
  if (word === undefined) return;
  for (const child of childrenFor(node, word)) follow(child, words, from, to + 1, found);
}

function matchOf(entry: number, words: readonly Word[], from: number, to: number): Match {
  const first = words[from];
  const last = words[to - 1];
  const at = first?.at ?? 0;
  return { entry, from, to, at, length: (last?.at ?? 0) + (last?.text.length ?? 0) - at };
}

function allowed(form: WordForm, words: readonly Word[], from: number, to: number): boolean {
  if (form.first && !words.slice(0, from).every(({ isNumber }) => isNumber)) return false;
  if (form.last && !words.slice(to).every(({ isNumber }) => isNumber)) return false;
  if (form.not.length > 0) {
    const here = words[from]?.text ?? '';
    const before = words[from - 1]?.text ?? '';
    if (form.not.includes(here) || form.not.includes(before)) return false;
  }
  return !form.notBefore.some((row) => row.every((token, step) => words[to + step]?.text === token));
}

function findInside(
  inside: readonly { readonly text: string; readonly entry: number }[],
  word: Word,
  from: number,
  found: Match[],
): void {
  for (const { text, entry } of inside) {
    const place = word.text.indexOf(text);
    if (place >= 0) found.push({ entry, from, to: from + 1, at: word.at + place, length: text.length });
  }
}

/** Few different words make up many texts: which branches a word opens is worked out once. */
function rememberingStarts(root: Node): (word: Word) => readonly Node[] {
  const known = new Map<string, readonly Node[]>();
  return (word) => {
    const key = word.isNumber ? `#${word.text}` : word.text;
    const seen = known.get(key);
    if (seen !== undefined) return seen;
    if (known.size >= mostRemembered) known.clear();
    const nodes = childrenFor(root, word);
    known.set(key, nodes);
    return nodes;
  };
}

const mostRemembered = 20_000;

function childrenFor(node: Node, word: Word): Node[] {
  const literal = node.next.get(word.text);
  const children = literal === undefined ? [] : [literal];
  if (word.isNumber) {
    const number = node.next.get('#');
    if (number !== undefined) children.push(number);
  } else for (const glob of node.globs) if (glob.fits(word.text)) children.push(glob.node);
  return children;
}

function childOf(node: Node, token: string): Node {
  if (!token.includes('*')) {
    const known = node.next.get(token);
    if (known !== undefined) return known;
    const made = emptyNode();
    node.next.set(token, made);
    return made;
  }
  const known = node.globs.find(({ pattern }) => pattern === token);
  if (known !== undefined) return known.node;
  const made = emptyNode();
  node.globs.push({ fits: globTest(token), pattern: token, node: made });
  return made;
}

/** Pieces between the stars in their order: the first at the start, the last at the end. Never looks back. */
function globTest(token: string): (text: string) => boolean {
  const pieces = token.split('*');
  const start = pieces[0] ?? '';
  const end = pieces.at(-1) ?? '';
  const middle = pieces.slice(1, -1);
  return (text) => {
    if (text.length < start.length + end.length || !text.startsWith(start) || !text.endsWith(end)) return false;
    let at = start.length;
    for (const piece of middle) {
      const found = text.indexOf(piece, at);
      if (found < 0) return false;
      at = found + piece.length;
    }
    return at <= text.length - end.length;
  };
}

const emptyNode = (): Node => ({ next: new Map(), globs: [], ends: [] });
const unspaced = /^[*]?[\u3005-\u3007\u3040-\u30FF\u3400-\u4DBF\u4E00-\u9FFF\uAC00-\uD7AF]/u;

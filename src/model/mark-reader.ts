import { foldText } from './fold-text.ts';
import type { FixtureKind } from './identity.ts';
import type { NamesData } from './names-data.ts';
import { flushLitres, headCount, type TextMarks, type UrinalMark, urinalStyle } from './text-marks.ts';
import { wordForms } from './word-pattern.ts';
import { buildTrie } from './word-trie.ts';

/** Reads the marks of a text (flush, style, use), and the venting its words promise; without memory. */
export interface MarkReader {
  marks(text: string): TextMarks;
  venting(text: string): string | null;
}

type Mark =
  | { readonly what: 'list'; readonly key: string }
  | { readonly what: 'style'; readonly kind: FixtureKind; readonly style: string }
  | { readonly what: 'venting'; readonly reading: string };

export function markReader(data: NamesData): MarkReader {
  const marks: { readonly mark: Mark; readonly words: readonly string[] }[] = [
    ...[...data.marks.lists].map(([key, words]) => ({ mark: { what: 'list', key } as const, words })),
    ...data.marks.styles.map(({ kind, style, words }) => ({ mark: { what: 'style', kind, style } as const, words })),
    ...[...data.readings].map(([reading, words]) => ({ mark: { what: 'venting', reading } as const, words })),
  ];
  const trie = buildTrie(
    marks.flatMap(({ words }, entry) =>
      words.flatMap((word) => wordForms(word, 'marks of the names table').map((form) => ({ entry, form }))),
    ),
  );
  const found = (text: string): readonly Mark[] =>
    trie.find(foldText(text)).flatMap(({ entry }) => marks[entry]?.mark ?? []);
  return {
    marks: (text) => marksOf(text, found(text)),
    venting: (text) => found(text).find((mark) => mark.what === 'venting')?.reading ?? null,
  };
}

function marksOf(text: string, marks: readonly Mark[]): TextMarks {
  const lists = new Set(marks.flatMap((mark) => (mark.what === 'list' ? [mark.key] : [])));
  const urinals = urinalMarks.filter((mark) => lists.has(`urinal ${mark}`));
  const styles = new Map<FixtureKind, string>();
  for (const mark of marks) if (mark.what === 'style' && !styles.has(mark.kind)) styles.set(mark.kind, mark.style);
  const tank = lists.has('flush tank');
  const valve = lists.has('flush valve');
  return {
    flush: tank === valve ? null : tank ? 'tank' : 'valve',
    flushLitres: flushLitres(text),
    urinal: urinalStyle(new Set(urinals)),
    emergency: lists.has('emergency'),
    domestic: lists.has('domestic') === lists.has('commercial') ? null : lists.has('domestic'),
    several: lists.has('several'),
    heads: headCount(text),
    bowls: lists.has('triple') ? 'triple' : lists.has('double') ? 'double' : null,
    styles,
  };
}

const urinalMarks: readonly UrinalMark[] = ['stall', 'trough', 'washout', 'wall', 'pedestal', 'waterless'];

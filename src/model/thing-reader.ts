import { foldText, type Word } from './fold-text.ts';
import type { NamesData } from './names-data.ts';
import type { KindMeaning, TextReading, WordKind } from './names-table.ts';
import { wordForms } from './word-pattern.ts';
import { buildTrie, type Match, type WordTrie } from './word-trie.ts';

/** Reads texts with the words of the names table, without memory. */
export interface ThingReader {
  thing(text: string): TextReading | null;
  medium(text: string): TextReading | null;
}

interface Entry {
  readonly kind: WordKind;
  readonly word: string;
  readonly rank: number;
  readonly strength: 0 | 1 | 2;
  /** A tag such as `WC`, and whether it also means something else. */
  readonly tag: 'tag' | 'ambiguous tag' | null;
}

interface Hit {
  readonly entry: Entry;
  readonly match: Match;
  readonly rank: number;
}

/** A tag in front of a text stands above a bare noun of the same text: `WC-Guest-01`. */
const tagRank = 20;
const leadingTagRank = 55;
const mostWordsBesideTag = 3;
/** A head noun (`seat`, `faucet`, `door`) behind a fixture's name makes it something else, whatever the fixture's rank. */
const headRank = 101;
/** Bare words such as `soil` and `drain` are enough for a system, never for a thing. */
const leastPipeRank = 30;
const pipePhraseRank = 80;
/** `Pump discharge` and `tank vent` say nothing of what flows by their general noun. */
const leastSpeakingRank = 60;
const pipeRankAsThing = 15;
const notHeads: ReadonlySet<string> = new Set(['type', 'style', 'model', 'mounted', 'mount', 'height', 'typ', 'tipo']);

export function thingReader(data: NamesData): ThingReader {
  const entries = entriesOf(data);
  const trie = buildTrie(
    entries.flatMap(({ entry, where }, index) => wordForms(entry.word, where).map((form) => ({ entry: index, form }))),
  );
  const heads = buildTrie(
    data.heads.flatMap(({ words, where }, index) =>
      words.flatMap((word) => wordForms(word, where).map((form) => ({ entry: index, form }))),
    ),
  );
  const reader: Reader = {
    data,
    trie,
    entries: entries.map(({ entry }) => entry),
    heads,
    withWords: new Set(data.remarks.with),
    forWords: new Set(data.remarks.for),
    placeWords: new Set(data.remarks.place),
    ofWords: new Set(data.of.words),
    carriers: new Set(data.of.carriers),
  };
  return { thing: (text) => readThing(reader, foldText(text)), medium: (text) => readMedium(reader, foldText(text)) };
}

interface Reader {
  readonly data: NamesData;
  readonly trie: WordTrie;
  readonly entries: readonly Entry[];
  readonly heads: WordTrie;
  readonly withWords: ReadonlySet<string>;
  readonly forWords: ReadonlySet<string>;
  readonly placeWords: ReadonlySet<string>;
  readonly ofWords: ReadonlySet<string>;
  readonly carriers: ReadonlySet<string>;
}

function entriesOf(data: NamesData): { readonly entry: Entry; readonly where: string }[] {
  const words = data.words.flatMap((group) =>
    group.words.map((word, index) => ({
      entry: {
        kind: group.kind,
        word,
        rank: group.rank,
        strength: group.weak ? (1 as const) : (2 as const),
        tag: null,
      },
      where: `${group.where}[${index}]`,
    })),
  );
  const tags = data.abbreviations.map(({ tag, kind, ambiguous, where }) => ({
    entry: {
      kind,
      word: tag,
      rank: tagRank,
      strength: 0 as const,
      tag: ambiguous ? ('ambiguous tag' as const) : ('tag' as const),
    },
    where,
  }));
  return [...words, ...tags];
}

function readThing(reader: Reader, words: readonly Word[]): TextReading | null {
  const said = withoutRemarks(reader, words);
  const hits = hitsIn(reader, said).filter((hit) => !isModifier(reader, said, hit));
  const heads = reader.heads.find(said);
  const turned = hits.map((hit) => turnedByHead(reader, said, heads, hit));
  return best(
    reader,
    turned.flatMap((hit) => asThing(reader, hit)),
  );
}

/** What flows in a thing says least of all what it is; only phrases such as `sink drain` are pipes against a noun. */
function asThing(reader: Reader, hit: Hit): Hit[] {
  if (meaningOf(reader, hit.entry.kind).part !== 'pipe' || hit.rank >= pipePhraseRank) return [hit];
  return hit.rank < leastPipeRank ? [] : [{ ...hit, rank: pipeRankAsThing }];
}

function readMedium(reader: Reader, words: readonly Word[]): TextReading | null {
  return best(
    reader,
    hitsIn(reader, words).filter(
      ({ entry, rank }) =>
        speaksOfMedium(meaningOf(reader, entry.kind)) && (entry.kind !== 'not-plumbing' || rank >= leastSpeakingRank),
    ),
  );
}

const speaksOfMedium = ({ part, medium, kind }: KindMeaning): boolean =>
  medium !== null && part !== 'fixture' && kind !== 'accessory' && kind !== 'supply-part';

function hitsIn(reader: Reader, words: readonly Word[]): Hit[] {
  const start = firstTelling(words);
  const letters = words.slice(start).filter(({ isNumber }) => !isNumber);
  const hits: Hit[] = [];
  for (const match of reader.trie.find(words)) {
    const entry = reader.entries[match.entry];
    if (entry === undefined) continue;
    const rank = entry.tag === null ? entry.rank : rankOfTag(reader, entry, match, start, letters, words);
    if (rank !== null) hits.push({ entry, match, rank });
  }
  return hits;
}

/** null where the tag does not count: deep in a long text, or beside other words when it means two things. */
function rankOfTag(
  reader: Reader,
  entry: Entry,
  match: Match,
  start: number,
  letters: readonly Word[],
  words: readonly Word[],
): number | null {
  const own = words.slice(match.from, match.to).filter(({ isNumber }) => !isNumber).length;
  const others = letters.length - own;
  const alone = others === 0 || (others === 1 && (letters.at(-1)?.text.length ?? 0) === 1 && match.from <= start);
  const [first] = letters;
  const oneLetter = own === 1 && first !== undefined && entry.word.length === 1;
  if (entry.tag === 'ambiguous tag' || oneLetter) {
    if (oneLetter ? others > 0 : !alone) return null;
  }
  const leads = match.from === start;
  if (!leads && letters.length > mostWordsBesideTag) return null;
  return leads && meaningOf(reader, entry.kind).part === 'fixture' ? leadingTagRank : tagRank;
}

/** `M_` in front of a name only says that the family is metric; numbers in front say nothing. */
function firstTelling(words: readonly Word[]): number {
  let start = 0;
  while (start < words.length - 1 && words[start]?.isNumber === true) start += 1;
  return words[start]?.text === 'm' && words.length > start + 1 ? start + 1 : start;
}

/** The words before `with`, `for`, `above` and their like in other languages, where something stands before them. */
function withoutRemarks(reader: Reader, words: readonly Word[]): readonly Word[] {
  for (let index = 1; index < words.length; index += 1) {
    const text = words[index]?.text ?? '';
    if (!reader.withWords.has(text) && !reader.forWords.has(text) && !reader.placeWords.has(text)) continue;
    const before = words.slice(0, index);
    if (before.every(({ isNumber, text: said }) => isNumber || said.length === 1)) continue;
    if (text.length === 1 && (words[index + 1]?.text.length ?? 0) < 3) continue;
    if (reader.placeWords.has(text) && hitsIn(reader, before).length === 0) continue;
    return before;
  }
  return words;
}

/** `colonne de lavabo`, `back of sink`: the word before `de` is the thing, unless it only counts (`set of`). */
function isModifier(reader: Reader, words: readonly Word[], { entry, match }: Hit): boolean {
  if (meaningOf(reader, entry.kind).part !== 'fixture') return false;
  const link = words[match.from - 1];
  const thing = words[match.from - 2];
  if (link === undefined || thing === undefined || thing.isNumber || !reader.ofWords.has(link.text)) return false;
  if (thing.segment !== words[match.from]?.segment) return false;
  return !reader.carriers.has(thing.text);
}

function turnedByHead(reader: Reader, words: readonly Word[], heads: readonly Match[], hit: Hit): Hit {
  if (meaningOf(reader, hit.entry.kind).part !== 'fixture') return hit;
  const last = words[hit.match.to - 1];
  const head = heads.find(({ from }) => {
    if (words[from]?.segment !== last?.segment || notHeads.has(words[from + 1]?.text ?? '')) return false;
    if (from === hit.match.to) return true;
    const between = words[hit.match.to];
    return from === hit.match.to + 1 && between !== undefined && !between.isNumber && between.text.length > 1;
  });
  const turned = head === undefined ? undefined : reader.data.heads[head.entry];
  if (turned === undefined || head === undefined) return hit;
  const entry: Entry = { ...hit.entry, kind: turned.kind, strength: 2, rank: headRank };
  return { entry, match: { ...hit.match, to: head.to }, rank: headRank };
}

function best(reader: Reader, hits: readonly Hit[]): TextReading | null {
  let chosen: Hit | undefined;
  for (const hit of hits) if (chosen === undefined || precedes(hit, chosen)) chosen = hit;
  if (chosen === undefined) return null;
  const { kind, word, strength } = chosen.entry;
  return { kind, meaning: meaningOf(reader, kind), word, strength, rank: chosen.rank };
}

/** Highest rank, then earliest, then longest; then the table's own order. */
function precedes(a: Hit, b: Hit): boolean {
  if (a.rank !== b.rank) return a.rank > b.rank;
  if (a.match.at !== b.match.at) return a.match.at < b.match.at;
  if (a.match.length !== b.match.length) return a.match.length > b.match.length;
  return a.match.entry < b.match.entry;
}

function meaningOf(reader: Reader, kind: WordKind): KindMeaning {
  const meaning = reader.data.kinds.get(kind);
  if (meaning === undefined) throw new Error(`word kind ${kind} is not in the names table`);
  return meaning;
}

import { placeOf, type TableSource } from '../tables/table-source.ts';
import { foldText } from './fold-text.ts';
import { markReader } from './mark-reader.ts';
import { type NamesData, readNamesData } from './names-data.ts';
import type { KindMeaning, NamesTable, PropertyUse, TextReading, WordKind } from './names-table.ts';
import { thingReader } from './thing-reader.ts';

const namesPath = 'shared/fixture-names.json';
const typesPath = 'shared/ifc-kinds.json';

/** Reads and compiles the names table. Throws InputError where a file is not as it should be. */
export function readNamesTable(source: TableSource): NamesTable {
  const data = readNamesData(
    source.read(namesPath),
    placeOf(source, namesPath),
    source.read(typesPath),
    placeOf(source, typesPath),
  );
  const things = thingReader(data);
  const marks = markReader(data);
  const uses = propertyUses(data);
  const codes = classificationCodes(data);
  const meaning = (kind: WordKind): KindMeaning => {
    const found = data.kinds.get(kind);
    if (found === undefined) throw new Error(`word kind ${kind} is not in the names table`);
    return found;
  };
  const readThing = remembered(things.thing);
  const foldName = remembered(foldedName);
  const properties = new Map([...data.enumeratedProperties].map(([name, values]) => [foldName(name), values]));
  return {
    readThing,
    readMedium: remembered(things.medium),
    readMarks: remembered(marks.marks),
    readVenting: remembered(marks.venting),
    readClassification: remembered(
      (text) => byCode(codes, meaning, text) ?? readThing(text),
      (text) => text,
    ),
    meaning,
    kind: (name) => meaning(name as WordKind).kind,
    refines: (inner, outer) => data.refinements.get(outer)?.includes(inner) ?? false,
    typeMeaning: (enumeration, value) => {
      const found = data.enumerations.get(enumeration)?.get(value);
      return found === undefined ? 'unknown' : found;
    },
    propertyMeaning: (name, value) =>
      properties.get(foldName(name))?.get(value.toUpperCase().replaceAll(/[\s-]/g, '_')) ?? null,
    propertyUse: remembered((name) => uses.get(foldName(name)) ?? null),
    holdsAnything: (ifcClass) => data.anything.includes(ifcClass),
  };
}

/**
 * The answer for a text, worked out once. Numbers of four and more digits (element ids, article numbers) never decide,
 * so texts that differ only in them share one answer.
 */
function remembered<T>(read: (text: string) => T, keyOf = withoutIds): (text: string) => T {
  const known = new Map<string, T>();
  return (text) => {
    const key = keyOf(text.slice(0, longestKey));
    const found = known.get(key);
    if (found !== undefined || known.has(key)) return found as T;
    if (known.size >= mostRemembered) known.clear();
    const made = read(key);
    known.set(key, made);
    return made;
  };
}

const withoutIds = (text: string): string => text.replace(/\d{4,}/g, '0');
const mostRemembered = 50_000;
/** No more of a text is read: see `foldText`. */
const longestKey = 1000;

/** Property names as people write them: `Drain_Size`, `DrainSize`, `Drain size (mm)` are one. */
const foldedName = (name: string): string =>
  foldText(name.replace(/\((?:mm|cm|m|in|inch|inches|")\)|\[[^\]]{0,8}\]/giu, ' '))
    .map(({ text }) => text)
    .join(' ');

function propertyUses(data: NamesData): ReadonlyMap<string, PropertyUse> {
  const order: readonly PropertyUse[] = ['trap', 'outlet', 'medium', 'flush', 'kind'];
  const uses = new Map<string, PropertyUse>();
  for (const use of order)
    for (const name of data.properties.get(use) ?? []) if (!uses.has(foldedName(name))) uses.set(foldedName(name), use);
  return uses;
}

interface Code {
  readonly digits: readonly string[];
  readonly kind: WordKind;
  readonly sure: boolean;
}

/** Longest first, so that a group never hides its member. */
const classificationCodes = (data: NamesData): readonly Code[] =>
  data.classifications
    .map(({ code, kind, sure }) => ({ digits: codeWords(code), kind, sure }))
    .toSorted((a, b) => b.digits.length - a.digits.length);

function byCode(codes: readonly Code[], meaning: (kind: WordKind) => KindMeaning, text: string): TextReading | null {
  const words = codeWords(text);
  const start = words.findIndex((word) => /^\d|^pr$/.test(word));
  if (start < 0) return null;
  for (const shift of [0, 1]) {
    const found = codes.find(({ digits }) => digits.every((digit, step) => words[start + shift + step] === digit));
    if (found !== undefined && found.kind !== 'unknown')
      return {
        kind: found.kind,
        meaning: meaning(found.kind),
        word: found.digits.join(' '),
        strength: found.sure ? 2 : 1,
        rank: 30,
      };
  }
  return null;
}

/** A number in pairs where it is written in one piece: `221316`. A year in front (`Uniclass 2015`) may be skipped. */
const codeWords = (text: string): readonly string[] =>
  foldText(text).flatMap(({ text: word, isNumber }) =>
    isNumber && word.length >= 6 && word.length % 2 === 0 ? (word.match(/../g) ?? []) : [word],
  );

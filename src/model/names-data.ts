import { InputError } from '../findings/input-error.ts';
import { at, fieldsOf, listAt, numberAt, objectAt, oneOf, textAt, textsAt } from '../tables/read-json.ts';
import type { FixtureKind, Medium, Part } from './identity.ts';
import { fixtureKinds, parts } from './identity-words.ts';
import type { KindMeaning, PropertyMeaning, TypeMeaning, WordKind } from './names-table.ts';

/** The two files of names as they stand, checked, not yet compiled. */
export interface NamesData {
  readonly kinds: ReadonlyMap<string, KindMeaning>;
  readonly words: readonly WordGroup[];
  readonly remarks: {
    readonly with: readonly string[];
    readonly for: readonly string[];
    readonly place: readonly string[];
  };
  readonly of: { readonly words: readonly string[]; readonly carriers: readonly string[] };
  readonly heads: readonly { readonly kind: WordKind; readonly words: readonly string[]; readonly where: string }[];
  readonly abbreviations: readonly {
    readonly tag: string;
    readonly kind: WordKind;
    readonly ambiguous: boolean;
    readonly where: string;
  }[];
  readonly marks: MarkWords;
  readonly readings: ReadonlyMap<string, readonly string[]>;
  readonly classifications: readonly { readonly code: string; readonly kind: WordKind; readonly sure: boolean }[];
  readonly properties: ReadonlyMap<string, readonly string[]>;
  readonly refinements: ReadonlyMap<string, readonly WordKind[]>;
  readonly enumerations: ReadonlyMap<string, ReadonlyMap<string, TypeMeaning | null>>;
  readonly enumeratedProperties: ReadonlyMap<string, ReadonlyMap<string, PropertyMeaning>>;
  readonly anything: readonly string[];
}

export interface WordGroup {
  readonly kind: WordKind;
  readonly rank: number;
  readonly weak: boolean;
  readonly words: readonly string[];
  readonly where: string;
}

export interface MarkWords {
  readonly lists: ReadonlyMap<string, readonly string[]>;
  readonly styles: readonly { readonly kind: FixtureKind; readonly style: string; readonly words: readonly string[] }[];
}

/** `names` and `types` are the parsed files; the places name where each came from. Throws InputError at the first fault. */
export function readNamesData(names: unknown, namesPlace: string, types: unknown, typesPlace: string): NamesData {
  const head = ['about', 'source', 'trust'];
  const file = fieldsOf(names, namesPlace, [
    ...head,
    'kinds',
    'words',
    'remarks',
    'of',
    'heads',
    'abbreviations',
    'marks',
    'readings',
    'classifications',
    'properties',
  ]);
  const kinds = readKinds(file.kinds, at(namesPlace, 'kinds'));
  const kindAt = (value: unknown, where: string): WordKind => {
    const meaning = kinds.get(textAt(value, where));
    if (meaning === undefined) throw new InputError(where, `is ${JSON.stringify(value)}, which is none of the kinds`);
    return meaning.kind;
  };
  const rows = <T>(key: string, read: (row: unknown, where: string) => T): T[] => {
    const where = at(namesPlace, key);
    return listAt(file[key], where).map((row, index) => read(row, `${where}[${index}]`));
  };
  const remarks = fieldsOf(file.remarks, at(namesPlace, 'remarks'), ['with', 'for', 'place']);
  const of = fieldsOf(file.of, at(namesPlace, 'of'), ['words', 'carriers']);
  const typeFile = fieldsOf(types, typesPlace, [...head, 'anything', 'refinements', 'enumerations', 'properties']);
  return {
    kinds,
    words: rows('words', (row, where) => {
      const group = fieldsOf(row, where, ['kind', 'language', 'rank', 'words'], ['weak', 'trust']);
      return {
        kind: kindAt(group.kind, at(where, 'kind')),
        rank: numberAt(group.rank, at(where, 'rank')),
        weak: group.weak === true,
        words: textsAt(group.words, at(where, 'words')),
        where: at(where, 'words'),
      };
    }),
    remarks: {
      with: textsAt(remarks.with, at(namesPlace, 'remarks.with')),
      for: textsAt(remarks.for, at(namesPlace, 'remarks.for')),
      place: textsAt(remarks.place, at(namesPlace, 'remarks.place')),
    },
    of: {
      words: textsAt(of.words, at(namesPlace, 'of.words')),
      carriers: textsAt(of.carriers, at(namesPlace, 'of.carriers')),
    },
    heads: rows('heads', (row, where) => {
      const group = fieldsOf(row, where, ['kind', 'words']);
      return { kind: kindAt(group.kind, at(where, 'kind')), words: textsAt(group.words, at(where, 'words')), where };
    }),
    abbreviations: rows('abbreviations', (row, where) => {
      const entry = fieldsOf(row, where, ['tag', 'kind', 'means'], ['also']);
      return {
        tag: textAt(entry.tag, at(where, 'tag')),
        kind: kindAt(entry.kind, at(where, 'kind')),
        ambiguous: entry.also !== undefined,
        where,
      };
    }),
    marks: readMarkWords(file.marks, at(namesPlace, 'marks')),
    readings: textLists(file.readings, at(namesPlace, 'readings')),
    classifications: rows('classifications', (row, where) => {
      const entry = fieldsOf(row, where, ['system', 'code', 'title', 'kind', 'sure'], ['trust']);
      return {
        code: textAt(entry.code, at(where, 'code')),
        kind: kindAt(entry.kind, at(where, 'kind')),
        sure: entry.sure === true,
      };
    }),
    properties: textLists(file.properties, at(namesPlace, 'properties')),
    anything: textsAt(typeFile.anything, at(typesPlace, 'anything')),
    refinements: mapped(typeFile.refinements, at(typesPlace, 'refinements'), (list, where) =>
      listAt(list, where).map((kind, index) => kindAt(kind, `${where}[${index}]`)),
    ),
    enumerations: mapped(typeFile.enumerations, at(typesPlace, 'enumerations'), (values, where) =>
      mapped(values, where, (value, place) => {
        const entry = fieldsOf(value, place, ['kind', 'trust'], ['note']);
        const trust = oneOf(entry.trust, at(place, 'trust'), ['sure', 'likely', 'open'] as const);
        return entry.kind === null ? null : { kind: kindAt(entry.kind, at(place, 'kind')), trust };
      }),
    ),
    enumeratedProperties: mapped(typeFile.properties, at(typesPlace, 'properties'), (values, where) =>
      mapped(values, where, (value, place) => {
        const entry = fieldsOf(value, place, [], ['kind', 'style', 'flush']);
        return {
          kind: entry.kind === undefined ? null : kindAt(entry.kind, at(place, 'kind')),
          style: entry.style === undefined ? null : textAt(entry.style, at(place, 'style')),
          flush: entry.flush === undefined ? null : oneOf(entry.flush, at(place, 'flush'), ['tank', 'valve'] as const),
        };
      }),
    ),
  };
}

function readKinds(value: unknown, where: string): ReadonlyMap<string, KindMeaning> {
  return new Map(
    Object.entries(objectAt(value, where)).map(([name, row]) => {
      const place = at(where, name);
      const entry = fieldsOf(row, place, ['part'], ['fixture', 'style', 'medium']);
      const part: Part = oneOf(entry.part, at(place, 'part'), parts);
      const fixture = entry.fixture === undefined ? null : oneOf(entry.fixture, at(place, 'fixture'), fixtureKinds);
      if ((part === 'fixture') !== (fixture !== null))
        throw new InputError(place, 'a fixture, and nothing else, names its fixture kind');
      const medium: Medium =
        entry.medium === undefined
          ? null
          : oneOf(entry.medium, at(place, 'medium'), ['sanitary', 'vent', 'storm', 'supply', 'other'] as const);
      const style = entry.style === undefined ? null : textAt(entry.style, at(place, 'style'));
      return [name, { kind: wordKind(name), part, fixture, style, medium }];
    }),
  );
}

const wordKind = (name: string): WordKind => name as WordKind;

function readMarkWords(value: unknown, where: string): MarkWords {
  const plain = ['emergency', 'domestic', 'commercial', 'several', 'double', 'triple'];
  const file = fieldsOf(value, where, ['flush', 'urinal', 'styles', ...plain]);
  const lists = new Map(plain.map((key) => [key, textsAt(file[key], at(where, key))]));
  for (const group of ['flush', 'urinal'])
    for (const [key, words] of textLists(file[group], at(where, group))) lists.set(`${group} ${key}`, words);
  const styles = listAt(file.styles, at(where, 'styles')).map((row, index) => {
    const place = `${at(where, 'styles')}[${index}]`;
    const entry = fieldsOf(row, place, ['kind', 'style', 'words']);
    return {
      kind: oneOf(entry.kind, at(place, 'kind'), fixtureKinds),
      style: textAt(entry.style, at(place, 'style')),
      words: textsAt(entry.words, at(place, 'words')),
    };
  });
  return { lists, styles };
}

const textLists = (value: unknown, where: string): Map<string, readonly string[]> =>
  mapped(value, where, (list, place) => textsAt(list, place));

/** An object as a map, so that a name such as `__proto__` is only ever looked for, never walked into. */
function mapped<T>(value: unknown, where: string, read: (value: unknown, where: string) => T): Map<string, T> {
  return new Map(Object.entries(objectAt(value, where)).map(([key, entry]) => [key, read(entry, at(where, key))]));
}

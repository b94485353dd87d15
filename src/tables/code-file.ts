import { InputError } from '../findings/input-error.ts';
import { type NominalSize, nominalSize, type SizeSeries, sizeSeries } from '../units/nominal-size.ts';
import { at, fieldsOf, listAt, numberAt, oneOf, textAt, textsAt } from './read-json.ts';

/** `tables/<family>/code.json`: what a family of codes is, before any of its tables is read. */
export interface CodeFile {
  readonly family: string;
  readonly title: string;
  /** Oldest first. */
  readonly editions: readonly string[];
  /** The edition that the table files quote; the others are laid over it. */
  readonly base: string;
  /** `fixture units`, and as it stands beside a number. */
  readonly unit: string;
  readonly unitShort: string;
  readonly series: SizeSeries;
  /** Tables that exist, in the order of the book. */
  readonly tables: readonly string[];
  /** Role or thing to the word that the edition uses for it. */
  readonly words: Readonly<Record<string, string>>;
  readonly notes: readonly string[];
}

export function readCodeFile(json: unknown, where: string): CodeFile {
  const file = fieldsOf(
    json,
    where,
    ['family', 'title', 'editions', 'base', 'unit', 'unitShort', 'sizes', 'tables', 'words'],
    ['notes'],
  );
  const text = (key: string): string => textAt(file[key], at(where, key));
  const editions = textsAt(file.editions, at(where, 'editions'));
  const words = Object.entries(fieldsOfAny(file.words, at(where, 'words')));
  return {
    family: text('family'),
    title: text('title'),
    editions,
    base: oneOf(file.base, at(where, 'base'), editions),
    unit: text('unit'),
    unitShort: text('unitShort'),
    series: readSeries(file.sizes, at(where, 'sizes')),
    tables: textsAt(file.tables, at(where, 'tables')),
    words: Object.fromEntries(words.map(([key, word]) => [key, textAt(word, at(where, key))])),
    notes: file.notes === undefined ? [] : textsAt(file.notes, at(where, 'notes')),
  };
}

function readSeries(value: unknown, where: string): SizeSeries {
  const sizes = listAt(value, where).map((entry, index) => {
    const place = `${where}[${index}]`;
    const fields = fieldsOf(entry, place, ['label', 'dn', 'lengthsMm']);
    return {
      label: nominalSize(textAt(fields.label, at(place, 'label'))),
      dn: numberAt(fields.dn, at(place, 'dn')),
      lengthsMm: listAt(fields.lengthsMm, at(place, 'lengthsMm')).map((mm) => numberAt(mm, at(place, 'lengthsMm'))),
    };
  });
  const wrong = sizes.findIndex(({ dn }, index) => index > 0 && dn <= (sizes[index - 1]?.dn ?? 0));
  if (wrong > 0) throw new InputError(`${where}[${wrong}]`, 'sizes do not rise');
  const labels = sizes.map(({ label }): NominalSize => label);
  if (new Set(labels).size !== labels.length) throw new InputError(where, 'a label stands twice');
  return sizeSeries(sizes);
}

const fieldsOfAny = (value: unknown, where: string): Readonly<Record<string, unknown>> =>
  fieldsOf(value, where, [], typeof value === 'object' && value !== null ? Object.keys(value) : []);

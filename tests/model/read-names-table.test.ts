import { describe, expect, test } from 'vitest';
import { InputError } from '../../src/findings/input-error.ts';
import { fixtureKinds } from '../../src/model/identity-words.ts';
import { readNamesTable } from '../../src/model/read-names-table.ts';
import { ownTables, writtenTables } from '../support/table-files.ts';

const wordsPath = 'shared/fixture-names.json';
const typesPath = 'shared/ifc-kinds.json';

/** Our own files with one change. */
function changed(path: string, change: (file: Record<string, unknown>) => void) {
  const files: Readonly<Record<string, unknown>> = {
    [wordsPath]: ownTables.read(wordsPath),
    [typesPath]: ownTables.read(typesPath),
  };
  const file = structuredClone(files[path]) as Record<string, unknown>;
  change(file);
  return writtenTables({ ...files, [path]: file }, 'local');
}

test('our own tables are read, and every fixture kind can be named', () => {
  const names = readNamesTable(ownTables);
  const words = ownTables.read(wordsPath) as { kinds: Record<string, { fixture?: string }> };
  const named = new Set(Object.values(words.kinds).flatMap(({ fixture }) => fixture ?? []));
  // A disposer is a fixture only where it is commercial: the kind comes from its part.
  expect(fixtureKinds.filter((kind) => !named.has(kind))).toEqual(['garbage-grinder']);
  expect(names.meaning(names.kind('cleanout')).part).toBe('cleanout');
});

test('a word of a local table is understood', () => {
  const local = changed(wordsPath, (file) => {
    (file.words as unknown[]).push({ kind: 'urinal', language: 'xx', rank: 80, words: ['piddle [bowl|trough](s)'] });
  });
  expect(readNamesTable(local).readThing('Piddle Troughs 1800')?.kind).toBe('urinal');
});

describe('what is wrong in a table is named at its place', () => {
  const list = (file: Record<string, unknown>, key: string): Record<string, unknown>[] =>
    file[key] as Record<string, unknown>[];
  test.each([
    [
      'an unknown kind',
      wordsPath,
      (file: Record<string, unknown>) => {
        list(file, 'words')[0]!.kind = 'sofa';
      },
      'local/shared/fixture-names.json: words[0].kind: is "sofa"',
    ],
    [
      'a word that cannot be read',
      wordsPath,
      (file: Record<string, unknown>) => {
        list(file, 'words')[2]!.words = ['basin(s'];
      },
      'local/shared/fixture-names.json: words[2].words[0]: "basin(s" has an open bracket',
    ],
    [
      'an unknown key',
      wordsPath,
      (file: Record<string, unknown>) => {
        file.extra = 1;
      },
      'local/shared/fixture-names.json: extra: unknown key',
    ],
    [
      'a missing list',
      wordsPath,
      (file: Record<string, unknown>) => {
        delete file.heads;
      },
      'local/shared/fixture-names.json: heads: missing',
    ],
    [
      'a rank that is no number',
      wordsPath,
      (file: Record<string, unknown>) => {
        list(file, 'words')[1]!.rank = '80';
      },
      'words[1].rank: is "80", expected a number',
    ],
    [
      'a fixture kind on a part that is none',
      wordsPath,
      (file: Record<string, unknown>) => {
        (file.kinds as Record<string, unknown>).trap = { part: 'trap', fixture: 'sink' };
      },
      'kinds.trap: a fixture, and nothing else, names its fixture kind',
    ],
    [
      'an unknown trust',
      typesPath,
      (file: Record<string, unknown>) => {
        (file.enumerations as Record<string, Record<string, Record<string, unknown>>>).IfcValve!.CHECK!.trust = 'maybe';
      },
      'local/shared/ifc-kinds.json: enumerations.IfcValve.CHECK.trust',
    ],
    [
      'a property of an unknown kind',
      typesPath,
      (file: Record<string, unknown>) => {
        (file.properties as Record<string, Record<string, Record<string, unknown>>>).SinkType!.BUCKET!.kind = 'pail';
      },
      'properties.SinkType.BUCKET.kind: is "pail"',
    ],
  ] as const)('%s', (_, path, change, says) => {
    const source = changed(path, change);
    expect(() => readNamesTable(source)).toThrow(InputError);
    expect(() => readNamesTable(source)).toThrow(says);
  });
});

describe('classification numbers', () => {
  const names = readNamesTable(ownTables);
  // Numbers and titles as the classification systems print them; MasterFormat titles from memory.
  test.each([
    ['23-45 05 21 11 11: Water Operated Water Closets', 'water-closet', 2],
    ['OmniClass:23.45.05.21.11.11', 'water-closet', 2],
    ['Uniclass 2015:Pr_40_20_93_94 WC pans', 'water-closet', 2],
    ['Uniclass 2015:Pr_40_20_93_89 WC cisterns', 'supply-part', 2],
    ['MasterFormat:22 47 13 Drinking Fountains', 'drinking-fountain', 2],
    ['MasterFormat:224713', 'drinking-fountain', 2],
    ['22 47 13.13', 'drinking-fountain', 2],
    ['23-45 05 14 14: Sinks/Lavatories', 'lavatory', 1],
  ])('%s is a %s', (text, kind, strength) => {
    expect(names.readClassification(text)).toMatchObject({ kind, strength });
  });

  test('a number that holds several kinds is read by its title, or not at all', () => {
    expect(names.readClassification('MasterFormat:22 42 13 Commercial Urinals')?.kind).toBe('urinal');
    expect(names.readClassification('MasterFormat:22 42 13')).toBeNull();
  });
});

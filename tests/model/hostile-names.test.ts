import fc from 'fast-check';
import { expect, test } from 'vitest';
import { noAnswers } from '../../src/model/answers.ts';
import { identify } from '../../src/model/identify.ts';
import { readNamesTable } from '../../src/model/read-names-table.ts';
import { plainModel } from '../support/plain-model.ts';
import { ownTables } from '../support/table-files.ts';

const names = readNamesTable(ownTables);
names.readThing('warm');

const long: readonly (readonly [string, string])[] = [
  ['one letter', 'a'.repeat(50_000)],
  ['one word over and over', 'sink '.repeat(10_000)],
  ['a word that never ends', `wasch${'tisch'.repeat(10_000)}`],
  ['digits', '1 '.repeat(25_000)],
  ['brackets and stars', '(*[|])~!^$'.repeat(5000)],
  ['accents stacked on one letter', `e${'\u0301'.repeat(50_000)}`],
  ['double-encoded', 'Ã¤'.repeat(25_000)],
  ['unspaced script', '便'.repeat(50_000)],
  ['with and for', 'with for mit avec '.repeat(3000)],
  ['of', 'de la douche '.repeat(4000)],
  ['blanks', ' '.repeat(50_000)],
  ['litres', '6.1 '.repeat(12_000)],
];

// The quickest of five: other work on the machine must not fail it. Each text differs, since texts are remembered.
test.each(long)('50 kB of %s are read in less than 50 ms', (_, text) => {
  const times = ['v', 'w', 'x', 'y', 'z'].map((letter) => {
    const one = `${letter} ${text}`;
    const start = performance.now();
    names.readThing(one);
    names.readMedium(one);
    names.readMarks(one);
    names.readVenting(one);
    names.readClassification(one);
    names.propertyUse(one);
    return performance.now() - start;
  });
  expect(Math.min(...times)).toBeLessThan(50);
});

const odd = [
  '__proto__',
  'constructor',
  'toString',
  'hasOwnProperty',
  '',
  ' ',
  '\u0000',
  '\u001b[31mWC\u0007',
  '\ud800',
  '\u202eknis',
  'name:*',
  '%s%n',
  '{}',
  '\\S\\X',
];

test.each(odd)('%j as every text of an element and its system', (text) => {
  const property = { set: text, name: text, value: text, measure: 'text', from: 'own' } as const;
  const said = { name: text, typeName: text, objectType: text, description: text, tag: text, classifications: [text] };
  const model = plainModel(
    (['segment', 'fitting', 'terminal', 'valve', 'chamber', 'treatment', 'other'] as const).map((kind) => ({
      ifcClass: text,
      typeClass: text,
      predefinedType: text,
      kind,
      ...said,
      properties: [property],
      in: [text],
    })),
    [{ name: text, predefinedType: text }],
  );
  const { value } = identify(model, noAnswers, names);
  expect(value).toHaveLength(7);
  for (const { evidence } of value) expect(typeof evidence).toBe('string');
});

test('a name with a control character is still read', () => {
  expect(names.readThing('\u001b[31mLavatory\u0007')?.kind).toBe('lavatory');
});

test('any text at all gets an answer or none, and the same one twice', () => {
  fc.assert(
    fc.property(fc.string({ unit: 'binary', maxLength: 120 }), (text) => {
      const first = names.readThing(text);
      expect(names.readThing(text)).toBe(first);
      expect(first === null || first.meaning.kind === first.kind).toBe(true);
    }),
  );
});

test('a fixture with its element number, its tag or a maker in front stays what it is', () => {
  const kinds = [
    'water closet',
    'urinal',
    'lavatory',
    'mop sink',
    'floor drain',
    'bidet',
    'kitchen sink',
    'shower stall',
  ];
  fc.assert(
    fc.property(
      fc.constantFrom(...kinds),
      fc.integer({ min: 1, max: 9_999_999 }),
      fc.oneof(fc.stringMatching(/^[A-Z]{1,2}\d{1,3}$/), fc.constant('CO7')),
      (kind, id, tag) => {
        const plain = names.readThing(kind)?.kind;
        expect(plain).toBeDefined();
        for (const text of [
          `${kind}:${id}`,
          `M_${kind}_${id}`,
          `${tag}-${kind.toUpperCase()}`,
          `${kind} - 600 x 400 mm`,
        ])
          expect(names.readThing(text)?.kind, text).toBe(plain);
      },
    ),
  );
});

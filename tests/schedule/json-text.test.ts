import fc from 'fast-check';
import { expect, test } from 'vitest';
import { jsonText } from '../../src/schedule/json-text.ts';

const text = (value: Readonly<Record<string, unknown>>): string => [...jsonText(value)].join('');

test('one line a row, keys in their order', () => {
  expect(
    text({ format: 'x', version: 1, rows: [{ a: 1 }, { a: [2, 3] }], ids: ['p', 'q'], none: [], gone: undefined }),
  ).toBe(
    [
      '{',
      '"format": "x",',
      '"version": 1,',
      '"rows": [',
      '  {"a":1},',
      '  {"a":[2,3]}',
      '],',
      '"ids": ["p","q"],',
      '"none": []',
      '}',
      '',
    ].join('\n'),
  );
});

test('whatever the data, it reads back as itself and steers no terminal', () => {
  fc.assert(
    fc.property(fc.dictionary(fc.string({ unit: 'binary' }), fc.jsonValue()), (value) => {
      const written = text({ ...value, rows: [{ value }] });
      expect(JSON.parse(written)).toEqual(JSON.parse(JSON.stringify({ ...value, rows: [{ value }] })));
      // biome-ignore lint/suspicious/noControlCharactersInRegex: the test looks for control characters
      expect(written).not.toMatch(/[\u0000-\u0009\u000B-\u001F\u007F-\u009F\u202A-\u202E\u2066-\u2069]/);
    }),
  );
});

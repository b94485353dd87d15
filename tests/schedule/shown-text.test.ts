import fc from 'fast-check';
import { expect, test } from 'vitest';
import { columnsOf, padded, shortened, shownText, visible, wrapped } from '../../src/schedule/shown-text.ts';

// Control and bidirectional characters: Unicode 15.1, UnicodeData.txt (general categories Cc and Cf).
const attacks = [
  { text: 'Stack\u001B[31m', shown: 'Stack\\u{1B}[31m', what: 'an escape sequence' },
  { text: 'Stack\u001B]0;title\u0007', shown: 'Stack\\u{1B}]0;title\\u{7}', what: 'a window title' },
  { text: 'a\u009B1mb', shown: 'a\\u{9B}1mb', what: 'an eight-bit control sequence' },
  { text: 'invoice\u202Efdp', shown: 'invoice\\u{202E}fdp', what: 'a right-to-left override' },
  { text: 'a\u2066b\u2069', shown: 'a\\u{2066}b\\u{2069}', what: 'a bidirectional isolate' },
  { text: 'a\u200Bb', shown: 'a\\u{200B}b', what: 'a zero-width space' },
  { text: 'ok\b\bKO', shown: 'ok\\u{8}\\u{8}KO', what: 'backspaces' },
  { text: 'a\r\nb\tc', shown: 'a b c', what: 'line breaks and tabs' },
  { text: 'a\u2028b', shown: 'a b', what: 'a line separator' },
  { text: 'a\uD800b', shown: 'a\\u{D800}b', what: 'half a surrogate pair' },
  { text: 'Étage 1½ “é”', shown: 'Étage 1½ “é”', what: 'nothing harmful' },
];
for (const { text, shown, what } of attacks) {
  test(`${what} is shown, not obeyed`, () => expect(shownText(text)).toBe(shown));
}

test('no text of any kind brings a control or a direction mark through', () => {
  fc.assert(
    fc.property(fc.string({ unit: 'binary' }), (text) => {
      // biome-ignore lint/suspicious/noControlCharactersInRegex: the test looks for control characters
      expect(visible(text)).not.toMatch(/[\u0000-\u0009\u000B-\u001F\u007F-\u009F\u202A-\u202E\u2066-\u2069]/);
      expect(shownText(text)).not.toContain('\n');
    }),
  );
});

test('columns: wide characters count two, combining marks none', () => {
  expect(columnsOf('abc')).toBe(3);
  expect(columnsOf('排水')).toBe(4);
  expect(columnsOf('e\u0301')).toBe(1);
  expect(padded('排水', 6)).toBe('排水  ');
  expect(shortened('排水立管', 6)).toBe('排水…');
  expect(shortened('stack', 5)).toBe('stack');
});

test('wrapping keeps every character but the spaces it breaks at, and keeps to the width', () => {
  fc.assert(
    fc.property(fc.string({ maxLength: 200 }), fc.integer({ min: 20, max: 60 }), (text, width) => {
      const shown = shownText(text);
      const lines = wrapped(shown, width, '  - ');
      for (const line of lines) expect(columnsOf(line)).toBeLessThanOrEqual(width);
      const words = lines.map((line) => line.slice(4)).join('');
      expect(words.replaceAll(' ', '')).toBe(shown.replaceAll(' ', ''));
    }),
  );
});

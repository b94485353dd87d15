import { describe, expect, test } from 'vitest';
import { decodeText, newTextWatch } from '../../../src/ifc/lines/text.ts';
import { latin1, utf8 } from '../step-file.ts';

/** The text between quotes, written as the file writes it. */
const decode = (bytes: Uint8Array) => {
  const watch = newTextWatch();
  return { text: decodeText(bytes, 0, bytes.length, watch), watch };
};

describe('escapes of ISO 10303-21, clause 6.4.3', () => {
  const cases = [
    ['plain text', 'Floor drain', 'Floor drain'],
    ['doubled quote', "Owner''s WC", "Owner's WC"],
    ['doubled backslash', 'A\\\\B', 'A\\B'],
    ['\\X\\ one byte of ISO 8859-1', 'Caf\\X\\E9', 'Café'],
    ['\\X\\ hexadecimal digits may be small', 'Caf\\X\\e9', 'Café'],
    ['\\X2\\ two bytes a character', '\\X2\\041204430434\\X0\\', 'Вуд'],
    ['\\X2\\ a pair of surrogates is one character', '\\X2\\D83DDEBD\\X0\\', '🚽'],
    ['\\X4\\ four bytes a character', '\\X4\\0001F6BD000000E9\\X0\\', '🚽é'],
    ['\\S\\ adds 128 to the next character', 'Geb\\S\\dude', 'Gebäude'],
    ['\\S\\ before a doubled quote', "\\S\\''x", '§x'],
    ['\\PE\\ turns \\S\\ to ISO 8859-5', '\\PE\\\\S\\2\\S\\5', 'ВЕ'],
    ['\\PB\\ turns \\S\\ to ISO 8859-2', '\\PB\\Podla\\S\\~', 'Podlaţ'.replace('ţ', 'ţ')],
    ['\\PA\\ turns it back', '\\PE\\\\S\\2\\PA\\\\S\\d', 'Вä'],
    ['print directives are no text', 'a\\N\\b\\F\\c', 'abc'],
    ['an escape beside another', '\\X2\\00E9\\X0\\\\X2\\00E8\\X0\\', 'éè'],
    ['empty', '', ''],
  ] as const;
  for (const [what, written, meant] of cases) {
    test(`${what}: ${written} is ${meant}`, () => {
      const { text, watch } = decode(utf8(written));
      expect(text).toBe(meant);
      expect(watch.brokenEscapes).toBe(0);
    });
  }
});

describe('what is no right escape stays as it is written, and is counted', () => {
  for (const written of [
    'C:\\models\\hall',
    'ends in \\',
    '\\X2\\00E9',
    '\\X2\\00E',
    '\\X2\\00G9\\X0\\',
    '\\X2\\D83D\\X0\\',
    '\\X4\\00110000\\X0\\',
    '\\X\\G1',
    '\\S\\',
    '\\PZ\\x',
    '\\X3\\00\\X0\\',
    '3.Nadzemn podla~\\X0\\',
  ]) {
    test(written, () => {
      const { text, watch } = decode(utf8(written));
      expect(text).toBe(written);
      expect(watch.brokenEscapes).toBe(1);
      expect(watch.first).toBe(0);
    });
  }

  test('the rest of the text is decoded all the same', () => {
    expect(decode(utf8('\\X2\\00E \\X\\E9')).text).toBe('\\X2\\00E é');
  });
});

describe('raw bytes', () => {
  test('UTF-8 is read as UTF-8', () => {
    expect(decode(utf8('Spülbecken 漢 🚽')).text).toBe('Spülbecken 漢 🚽');
  });

  test('what is no UTF-8 is read as Windows-1252: é, the euro, curly quotes', () => {
    const { text, watch } = decode(latin1('caf\xe9 \x80 \x93x\x94'));
    expect(text).toBe('café € “x”');
    expect(watch.notUtf8).toBe(1);
  });

  test('a byte order mark inside a text is kept', () => {
    expect(decode(utf8('\ufeffWC')).text).toBe('\ufeffWC');
  });
});

import fc from 'fast-check';
import { expect, test } from 'vitest';
import { foldText } from '../../src/model/fold-text.ts';

const words = (text: string): string =>
  foldText(text)
    .map(({ text: word }) => word)
    .join(' ');

test.each([
  ['Tvättställ', 'tvattstall'],
  ['Håndvask Ærø', 'handvask aero'],
  ['Miska ustępowa łazienkowa', 'miska ustepowa lazienkowa'],
  ['WEISS Fußboden', 'weiss fussboden'],
  ['SlopSink', 'slop sink'],
  ['WCPan', 'wc pan'],
  ['WCs', 'wcs'],
  ['WC01', 'wc 01'],
  ['M_WC_01', 'm wc 01'],
  ['Sink w/ Drainboard', 'sink with drainboard'],
  ['Cabinet c/w basin', 'cabinet with basin'],
  ['WC m/ sisterne', 'wc with sisterne'],
  ['Cuvette + robinet', 'cuvette with robinet'],
  ['S&V', 's & v'],
  ['ｼﾝｸ', 'シンク'],
  ['洋風便器(ロータンク)', '洋風便器 ロータンク'],
  ['унитаз подвесной', 'унитаз подвеснои'],
  ['HulevesiviemÃ¤ri', 'hulevesiviemari'],
  ['Ã‰vent 50', 'event 50'],
  ['LÃ¼ftung', 'luftung'],
  ['ÃœberlaufrohrÂ°', 'uberlaufrohr'],
  ['Ã§a marche', 'ca marche'],
])('%s folds to %s', (text, folded) => {
  expect(words(text)).toBe(folded);
});

test('a colon, comma, bracket or spaced dash begins a segment; a bare hyphen or underscore does not', () => {
  const segments = foldText('Water Closet - Flush Tank:Private, (Wall-Hung)_A').map(({ segment }) => segment);
  expect(segments).toEqual([0, 0, 1, 1, 2, 3, 3, 4]);
});

test('any text folds, to words of letters and digits only, and folding them again changes nothing', () => {
  fc.assert(
    fc.property(fc.string({ unit: 'binary', maxLength: 300 }), (text) => {
      const once = words(text);
      expect(once).toMatch(/^[\p{L}\p{M}\p{N}& ]*$/u);
      expect(words(once)).toBe(once);
    }),
  );
});

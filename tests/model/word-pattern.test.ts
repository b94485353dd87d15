import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { InputError } from '../../src/findings/input-error.ts';
import { foldText } from '../../src/model/fold-text.ts';
import { wordForms } from '../../src/model/word-pattern.ts';
import { buildTrie } from '../../src/model/word-trie.ts';

const written = (word: string): string[] => wordForms(word, 'here').map(({ tokens }) => tokens.join(' '));
const finds = (word: string, text: string): boolean => {
  const trie = buildTrie(wordForms(word, 'here').map((form) => ({ entry: 0, form })));
  return trie.find(foldText(text)).length > 0;
};

test.each([
  ['drain(s)', ['drains', 'drain']],
  ['[lava|hand] basin', ['lava basin', 'hand basin']],
  ['clean~out', ['cleanout', 'clean out']],
  [
    'wash~(hand~)basin',
    ['washhandbasin', 'washhand basin', 'wash handbasin', 'wash hand basin', 'washbasin', 'wash basin'],
  ],
  ['Spülkasten', ['spulkasten', 'spuelkasten']],
  ["siphon d'évier", ['siphon d evier']],
  ['[wc|klosett]sitz*', ['wcsitz*', 'klosettsitz*']],
  ['# compartment', ['# compartment']],
  ['WC01', ['wc 01']],
])('%s is written %s', (word, forms) => {
  expect(written(word).sort()).toEqual([...forms].sort());
});

test.each([
  ['clean~out(s)', 'Floor Clean-Outs', true],
  ['clean~out(s)', 'CleanOut', true],
  ['clean~out', 'cleanouts', false],
  ['basin', 'basins', false],
  ['basin !mixer|waste_outlet', 'Basin mixer', false],
  ['basin !mixer|waste_outlet', 'Basin waste outlet', false],
  ['basin !mixer|waste_outlet', 'Basin waste', true],
  ['!catch basin', 'Catch basin', false],
  ['!catch basin', 'Wash basin', true],
  ['*wanne(n)', 'Raumsparwannen', true],
  ['*wanne(n)', 'wannenbad', false],
  ['wasch*tür', 'Waschraumtür', true],
  ['*batteri*', 'Servantbatteriet', true],
  ['^siphon', 'Siphon laiton', true],
  ['^siphon', '12 Siphon', true],
  ['^siphon', 'Lavabo siphon', false],
  ['vanity$', 'Vanity 900', true],
  ['vanity$', 'Vanity top', false],
  ['# compartment sink', '3 Compartment Sink', true],
  ['# compartment sink', 'Compartment Sink', false],
  ['便器', '洋風便器', true],
  ['s & v', 'S&V', true],
])('%s in %s: %s', (word, text, found) => {
  expect(finds(word, text)).toBe(found);
});

describe('words that cannot be read', () => {
  test.each([
    ['drain(s', 'has an open bracket'],
    ['drain s]', 'has a bracket or bar too many'],
    ['[a|b', 'has an open bracket'],
    ['(s)', 'can be empty'],
    ['*', 'holds "*", which is no word'],
    ['a ^ b', 'has ! ^ or $'],
    ['[a|b][c|d][e|f][g|h][i|j][k|l][m|n][o|p][q|r][s|t][u|v]', 'in more than 1500 ways'],
  ])('%s %s', (word, says) => {
    expect(() => wordForms(word, 'table.json: words[3]')).toThrow(InputError);
    expect(() => wordForms(word, 'table.json: words[3]')).toThrow(says);
    expect(() => wordForms(word, 'table.json: words[3]')).toThrow('table.json: words[3]');
  });
});

test('a plain word is found in a text exactly where it stands as a word', () => {
  const word = fc.stringMatching(/^[a-z]{1,6}$/);
  fc.assert(
    fc.property(word, fc.array(word, { maxLength: 8 }), (wanted, text) => {
      const trie = buildTrie([{ entry: 7, form: wordForms(wanted, 'here')[0]! }]);
      const found = trie.find(foldText(text.join(' '))).map(({ entry, from, to }) => [entry, from, to]);
      expect(found).toEqual(text.flatMap((one, index) => (one === wanted ? [[7, index, index + 1]] : [])));
    }),
  );
});

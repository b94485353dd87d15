import { expect, test } from 'vitest';
import { sentences } from '../../src/findings/sentences.ts';
import { english } from '../../src/page/words/english.ts';
import { french } from '../../src/page/words/french.ts';
import { frenchCondition } from '../../src/page/words/french-conditions.ts';
import type { FrenchFacts } from '../../src/page/words/french-facts.ts';
import { frenchSentences } from '../../src/page/words/french-sentences.ts';

// A word of the other language in a sentence is a fault that no type can find; these are the commonest English ones.
const englishWords =
  /\b(the|and|of|is|are|not|needs?|drawn|pipe|vent|trap|storey|fixtures?|at least|at most|has|have)\b/i;

const given = (facts: FrenchFacts['facts']): FrenchFacts => ({
  facts,
  about: ['A-1', 'B-2'],
  clause: ' (npc-2020, 2.4.9.1.)',
  unit: 'f.é.',
  length: (value) => `${value} m`.replace('.', ','),
  slope: (value) => `${value * 100} %`,
  number: (value) => String(value).replace('.', ','),
  size: (text) => text.replace(/ in$/, ' po'),
  role: () => 'ventilation interne',
  kind: () => 'urinoir',
});
const full: FrenchFacts['facts'] = {
  modelled: '3 in',
  required: '4 in',
  requiredLeast: '4 in',
  loadUnits: 14,
  storeys: 5,
  storeysMost: 4,
  storey: 1,
  size: '3 in',
  least: '4 in',
  lengthM: 2.5,
  limitM: 2.4,
  trap: '2 in',
  fallM: 0.07,
  slope: 0.01,
  climbM: 0.02,
  heightM: 3,
  closets: 3,
  joints: 12,
  gapM: 0.014,
  candidates: 2,
  fixtures: 7,
  battery: 'battery-1',
  file: 'a.ifc',
  problem: 'x',
  count: 2,
  line: 7,
  upstream: '4 in',
  from: 'Pset',
  other: '3 in',
  otherFrom: 'ObjectType',
  offsetM: 2,
  reliefVents: 0,
  taken: 'urinal',
  takenFrom: 'Pset',
  limitUnits: 12,
  said: 'DN 77',
  topM: 2.1,
  widest: '2 in',
};

test.each(Object.keys(sentences) as (keyof typeof sentences)[])('%s has a sentence in French', (code) => {
  const sentence = frenchSentences[code](given(full));
  expect(sentence).toMatch(/[.?]$/);
  expect(sentence).not.toMatch(englishWords);
  expect(sentence).not.toMatch(/undefined|NaN| in\b/);
});

test.each([
  [{ guestUnits: 3, guestUnitsMost: 2 }, '3 f.é., au plus 2'],
  [{ closets: 3, closetsMost: 2 }, '3 toilettes'],
  [{ trapsAtStart: 2 }, 'plus d’un appareil'],
  [{ turnDeg: 90, turnMostDeg: 45 }, '90°'],
  [{ smallOutlets: 2, smallBelow: '2 in' }, 'moins de 2 po'],
  [{ loadUnits: 14.5, limitUnits: 12 }, '14,5 f.é. sont comptés, la limite est de 12'],
  [{}, 'une condition n’est pas tenue'],
])('a broken condition %j in French', (facts, part) => {
  const text = frenchCondition(given(facts));
  expect(text).toContain(part);
  expect(text).not.toMatch(englishWords);
});

test('both languages know the same kinds', () => {
  expect(Object.keys(french.kinds).sort()).toEqual(Object.keys(english.kinds).sort());
});

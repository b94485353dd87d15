import { expect, test } from 'vitest';
import { sentences } from '../../src/findings/sentences.ts';
import { english } from '../../src/page/words/english.ts';
import { french } from '../../src/page/words/french.ts';
import { frenchCondition } from '../../src/page/words/french-conditions.ts';
import type { FrenchFacts } from '../../src/page/words/french-facts.ts';
import { frenchPhysics } from '../../src/page/words/french-physics.ts';
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

test('what physics says, in French: the figures of its English sentences, commas for points', () => {
  const level = {
    kind: 'level',
    bore: 0.096,
    law: 'Colebrook-White, roughness 1 mm',
    slope: 0.01,
    halfFull: { flow: 2.5, speed: 0.69, cleansItself: true },
    otherLaw: { law: 'Manning, n 0.012', flow: 2.51, speed: 0.69 },
    cleansFrom: 0.37,
    atFlow: { flow: 2, fill: 0.44, speed: 0.65, cleansItself: true },
  } as const;
  const stack = { kind: 'stack', bore: 0.1016, flow: 9.07, speed: 3.83, terminalLength: 2.5, share: 0.2 } as const;
  expect(frenchPhysics(french, level)).toEqual([
    'À titre indicatif, sans effet sur le diamètre : à demi rempli, un diamètre intérieur de 96 mm à 1 % (1:100) débite 2,5 l/s à 0,69 m/s selon Colebrook-White (rugosité 1 mm), 2,51 l/s à 0,69 m/s selon Manning (n 0,012).',
    'Il s’autocure, ce qui demande 0,6 m/s, dès qu’il est rempli à 37 %, soit 36 mm de hauteur.',
    'À son débit de 2 l/s il est rempli à 44 %, soit 42 mm de hauteur, à 0,65 m/s : il s’autocure.',
  ]);
  const slow = { ...level, cleansFrom: null, atFlow: null };
  const all = [...frenchPhysics(french, slow), ...frenchPhysics(french, stack)];
  expect(all).toHaveLength(5);
  for (const sentence of all) {
    expect(sentence).toMatch(/\.$/);
    expect(sentence).not.toMatch(englishWords);
  }
});

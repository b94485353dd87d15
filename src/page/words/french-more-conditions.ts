import { has, num } from '../../findings/sentence-facts.ts';
import { type FrenchFacts, text } from './french-facts.ts';

const kinds = (f: FrenchFacts, key: string): string =>
  text(f, key)
    .split(', ')
    .map((kind) => french[kind] ?? kind.replaceAll('-', ' '))
    .join(', ');
const french: Readonly<Record<string, string>> = {
  urinal: 'urinoir',
  'water-closet': 'toilette',
  'water closet': 'toilette',
  'water closets and urinals': 'toilettes et urinoirs',
  sink: 'évier',
  'kitchen-sink': 'évier de cuisine',
  'mop-sink': 'évier de service',
  'clothes-washer': 'laveuse',
  'drinking-fountain': 'fontaine à boire',
  'floor-drain': 'avaloir de sol',
  'floor drain': 'avaloir de sol',
  shower: 'douche',
  bathtub: 'baignoire',
  'unidentified fixture': 'appareil non identifié',
};

/** Conditions of the American codes, in French: by the fact that each is known by. */
const texts: Readonly<Record<string, (f: FrenchFacts) => string>> = {
  outsideGroup: (f) =>
    `${num(f, 'outsideGroup')} de ses appareils (${kinds(f, 'kinds')}) ne sont d’aucun groupe de salle de bains; donnez-leur leurs propres ventilations ou une ventilation terminale à la rangée`,
  bathroomGroupsMost: (f) =>
    `elle reçoit ${num(f, 'bathroomGroups')} groupes de salle de bains, au plus ${num(f, 'bathroomGroupsMost')}; ventilez les autres à part`,
  dryVentApart: () =>
    'sa ventilation sèche n’est sur le tuyau d’aucun de ses appareils; qu’elle soit celle de l’un d’eux',
  emergencyVent: () => 'sa ventilation sèche est celle d’un avaloir de secours; qu’elle soit celle d’un autre appareil',
  dryVentOf: (f) =>
    `sa ventilation sèche est celle d’un appareil qui ne convient pas (${kinds(f, 'dryVentOf')}); qu’elle soit celle d’un lavabo, d’une baignoire, d’une douche ou d’un bidet`,
  closetDrops: () => 'la toilette ventilée y descend à la verticale; que son tuyau s’y raccorde de niveau',
  closetAbove: () => 'le plus haut de ses deux appareils est une toilette; qu’elle soit le plus bas',
  drops: (f) =>
    `${num(f, 'drops')} de ses tuyaux descendent avant de s’y raccorder, ce qui viderait les siphons; menez-les de niveau ou ventilez-les à part`,
  circuitLeast: (f) =>
    `${num(f, 'circuitTraps')} appareil s’y raccorde, au moins ${num(f, 'circuitLeast')} le doivent; donnez-lui sa propre ventilation`,
  circuitMost: (f) =>
    `${num(f, 'circuitTraps')} appareils respirent par une ventilation terminale, au plus ${num(f, 'circuitMost')}; faites-en des groupes, chacun avec la sienne`,
  furtherVents: () => 'une autre ventilation s’y trouve; faites-en des groupes, chacun avec une ventilation terminale',
  ventDry: (f) => `${num(f, 'fixturesOnVent')} appareils se vident dans sa ventilation; elle doit rester sèche`,
  slopeMost: (f) =>
    `sa pente est de ${f.slope(num(f, 'slope'))}, au plus ${f.slope(num(f, 'slopeMost'))} là où il ventile`,
  othersElsewhere: (f) =>
    `${num(f, 'othersElsewhere')} appareils d’un autre étage s’y vident; menez-les à part à la colonne`,
  barred: (f) => `${kinds(f, 'barredKinds')} (${num(f, 'barred')}) ne peuvent s’y vider; ventilez-les autrement`,
  dropMostM: (f) =>
    `un appareil y descend de ${f.length(num(f, 'dropM'))}, au plus ${f.length(num(f, 'dropMostM'))}; ventilez-le à part`,
  armMostM: (f) =>
    `un tuyau de vidange mesure ${f.length(num(f, 'armM'))} jusqu’à lui, au plus ${f.length(num(f, 'armMostM'))}; rapprochez-le ou ventilez-le à part`,
  toStackMostM: (f) =>
    `un appareil est à ${f.length(num(f, 'toStackM'))} de la colonne, au plus ${f.length(num(f, 'toStackMostM'))}; ventilez-le`,
  wetFixturesMost: (f) =>
    `elle ventile ${num(f, 'wetFixtures')} appareils, au plus ${num(f, 'wetFixturesMost')}; ventilez les autres à part`,
  wetUnitsMost: (f) =>
    `un appareil de ${f.number(num(f, 'wetUnits'))} ${f.unit} s’y vide, au plus ${f.number(num(f, 'wetUnitsMost'))}; qu’il soit le plus bas, ou ventilé à part`,
  wetLengthMostM: (f) =>
    `sa partie humide mesure ${f.length(num(f, 'wetLengthM'))}, au plus ${f.length(num(f, 'wetLengthMostM'))}; ventilez à part ce qui est plus bas`,
  approval: () =>
    'le code ne le permet que là où la structure empêche d’autres ventilations et avec l’accord de l’autorité',
};

/** null where the condition is none of these. */
export function frenchAmericanCondition(given: FrenchFacts): string | null {
  const key = Object.keys(texts).find((one) => has(given, one));
  return key === undefined ? null : texts[key]!(given);
}

import { has, num } from '../../findings/sentence-facts.ts';
import { type FrenchFacts, text } from './french-facts.ts';
import { frenchAmericanCondition } from './french-more-conditions.ts';

/** The condition of a reading that a group breaks, in French; the same facts as its English words. */
export function frenchCondition(f: FrenchFacts): string {
  const { facts } = f;
  const american = frenchAmericanCondition(f);
  if (american !== null) return american;
  const load = (key: string): string => `${f.number(num(f, key))} ${f.unit}`;
  if (has(f, 'guestUnits'))
    return `des appareils ventilés à part apportent ${load('guestUnits')}, au plus ${f.number(num(f, 'guestUnitsMost'))} peuvent s’y joindre; que les autres se raccordent en aval`;
  if (has(f, 'closetsMost'))
    return `${text(f, 'closets')} toilettes sont desservies, au plus ${text(f, 'closetsMost')} peuvent l’être; ventilez les autres à part`;
  if (facts.closetsApart === true)
    return 'ses deux toilettes ne se raccordent pas au même niveau par un raccord double; raccordez-les ainsi';
  if (facts.closetUpstream === true)
    return 'une toilette se raccorde en amont d’un autre appareil ainsi ventilé; qu’elle se raccorde la dernière';
  if (has(f, 'armMost'))
    return `un bras de ${text(f, 'arm')} s’y raccorde, au plus ${text(f, 'armMost')} est permis; ventilez cet appareil à part`;
  if (has(f, 'storey') && has(f, 'limitUnits'))
    return `l’étage ${num(f, 'storey') + 1} apporte ${load('loadUnits')}, au plus ${f.number(num(f, 'limitUnits'))} peuvent venir d’un étage au-dessus du plus bas; ventilez les autres à part`;
  if (has(f, 'offsetsMost'))
    return `il y a ${text(f, 'offsets')} déviations horizontales, au plus ${text(f, 'offsetsMost')}; menez-la droit, ou ventilez à part ce qui est plus bas`;
  if (has(f, 'offsetMostM'))
    return `la déviation mesure ${f.length(num(f, 'offsetM'))}, au plus ${f.length(num(f, 'offsetMostM'))}; raccourcissez-la, ou ventilez à part ce qui est plus bas`;
  if (facts.joinedInOffset === true)
    return 'une évacuation se raccorde dans la déviation horizontale; raccordez-la au-dessus ou au-dessous';
  if (has(f, 'verticalPipes')) return 'le branchement a une partie verticale; menez-le de niveau, ou terminez-le là';
  if (has(f, 'storeys')) return `ses appareils sont sur ${text(f, 'storeys')} étages; ventilez chaque étage à part`;
  if (facts.stackUpstream === true)
    return 'une colonne de chute se raccorde en amont d’un appareil à ventilation terminale; menez-la au-delà de la rangée';
  if (has(f, 'trapsAtStart'))
    return num(f, 'trapsAtStart') === 0
      ? 'la ventilation ne se raccorde pas au tuyau de l’appareil le plus en amont; qu’elle s’y raccorde'
      : 'plus d’un appareil se raccorde en amont de la ventilation; qu’elle se raccorde après le premier';
  if (has(f, 'smallOutlets'))
    return f.facts.smallOutlets === 1
      ? `une tubulure de moins de ${text(f, 'smallBelow')} en voisine de plus grandes`
      : `${text(f, 'smallOutlets')} tubulures de moins de ${text(f, 'smallBelow')} en voisinent de plus grandes`;
  if (has(f, 'trapsMost'))
    return `${text(f, 'traps')} appareils se raccordent entre deux ventilations, au plus ${text(f, 'trapsMost')} le peuvent`;
  if (has(f, 'turnMostDeg'))
    return `le branchement tourne en plan de ${f.number(num(f, 'turnDeg'))}° entre deux ventilations, au plus ${text(f, 'turnMostDeg')}°`;
  if (has(f, 'fixturesMost'))
    return `${text(f, 'fixturesOnVent')} appareils se vident dans la ventilation, au plus ${text(f, 'fixturesMost')} le peuvent; menez les autres au branchement`;
  if (facts.fixturesApart === true)
    return 'les deux appareils sur la ventilation ne se raccordent pas par un seul raccord double; raccordez-les ainsi';
  if (has(f, 'limitUnits'))
    return `${load('loadUnits')} sont comptés, la limite est de ${f.number(num(f, 'limitUnits'))}; ventilez-en une partie à part`;
  if (has(f, 'loadUnits')) return `aucun diamètre ne tient ${load('loadUnits')}`;
  return 'une condition n’est pas tenue';
}

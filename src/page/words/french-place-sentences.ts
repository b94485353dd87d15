import type { PlaceCode } from '../../findings/place-sentences.ts';
import { has, num } from '../../findings/sentence-facts.ts';
import { type FrenchFacts, text } from './french-facts.ts';

const first = ({ about }: FrenchFacts): string => about[0] ?? 'La maquette';
const metres = (given: FrenchFacts, key: string): string => given.length(num(given, key));

/** Findings about where vents, cleanouts and connections stand, in French. */
export const frenchPlaceSentences: Readonly<Record<PlaceCode, (given: FrenchFacts) => string>> = {
  'vent-joins-too-low': (f) =>
    `La ventilation ${first(f)} en rejoint une autre à ${metres(f, 'meetsM')} du plancher, alors que ${f.about[1] ?? 'un appareil desservi'} déborde à ${metres(f, 'floodsM')} : raccordez-les ${num(f, 'aboveM') > 0 ? `${metres(f, 'aboveM')} ` : ''}plus haut, sinon une évacuation bouchée se viderait par la ventilation${f.clause}.`,
  'dry-vent-too-flat': (f) =>
    has(f, 'angleDeg')
      ? `La ventilation ${first(f)} part du côté d’une évacuation horizontale : faites-la partir au-dessus de l’axe du tuyau${f.clause}.`
      : `La ventilation ${first(f)} est horizontale à ${metres(f, 'levelM')} du plancher, et ${f.about[1] ?? 'un appareil qu’elle sert'} déborde à ${metres(f, 'floodsM')} : faites-la d’abord monter de ${metres(f, 'aboveM')} au-dessus${f.clause}.`,
  'terminal-too-low': (f) =>
    `La ventilation ${first(f)} finit ${num(f, 'overRoofM') < 0 ? 'sous le toit' : `à ${metres(f, 'overRoofM')} au-dessus du toit`}, au moins ${metres(f, 'leastM')} au-dessus${f.clause}.`,
  'frost-enlargement-missing': (f) =>
    `${first(f)} traverse le toit en ${text(f, 'size')}; sous ${text(f, 'least')} le gel peut le fermer${f.clause}.`,
  'fresh-air-inlet-missing': (f) =>
    `Le siphon ${first(f)} du collecteur principal ${
      has(f, 'size')
        ? `a une prise d’air frais de ${text(f, 'size')}, au moins ${text(f, 'least')}`
        : `n’a pas de prise d’air frais à ${metres(f, 'withinM')} ou moins en amont${has(f, 'distanceM') ? `; la ventilation la plus proche est à ${metres(f, 'distanceM')}` : ''} : donnez-lui-en une de ${text(f, 'least')}`
    }${f.clause}.`,
  'standpipe-too-short': (f) =>
    `Le tuyau vertical de ${first(f)} monte de ${metres(f, 'heightM')} au-dessus de son siphon, au moins ${metres(f, 'leastM')}${f.clause}.`,
  'yoke-vent-misplaced': (f) =>
    has(f, 'heightM')
      ? `La ventilation de chute ${first(f)} rejoint sa colonne secondaire à ${metres(f, 'heightM')} du plancher, au moins ${metres(f, 'leastM')}${f.clause}.`
      : `La ventilation de chute ${first(f)} ne se raccorde pas où le code le demande${f.clause}.`,
  'branch-near-foot': (f) =>
    `${first(f)} se raccorde à ${metres(f, 'distanceM')} en aval ${f.facts.offset === true ? 'de la tête d’une déviation' : 'du pied'} d’une colonne, au moins ${metres(f, 'leastM')}${f.clause}.`,
  'suds-zone': (f) =>
    `La colonne ${first(f)} porte des eaux mousseuses, et une évacuation s’y raccorde à ${metres(f, 'distanceM')} ${f.facts.above === true ? 'au-dessus' : 'en aval'} de son pied : à moins de ${metres(f, 'leastM')} du coude la mousse peut refouler${f.clause}.`,
  'cleanout-missing': (f) => `${missingCleanout(f)}${f.clause}.`,
  'cleanout-too-small': (f) =>
    `Le regard de nettoyage ${first(f)} est de ${text(f, 'modelled')}, au moins ${text(f, 'least')}${has(f, 'pipe') ? ` sur un tuyau de ${text(f, 'pipe')}` : ''}${f.clause}.`,
};

const drains = (f: FrenchFacts, one: string, many: string): string =>
  f.facts.pipes === 1 ? `1 évacuation horizontale ${one}` : `${text(f, 'pipes')} évacuations horizontales ${many}`;

function missingCleanout(f: FrenchFacts): string {
  switch (f.facts.what) {
    case 'none drawn':
      return `La maquette ne dessine aucun regard de nettoyage : rien n’est vérifié un à un; le code en veut un ${wanted(f)} et partout où l’espacement finit`;
    case 'building drain':
      return `Le collecteur principal ${first(f)} n’a pas de regard de nettoyage : il en faut un le plus près possible de sa sortie du bâtiment`;
    case 'stack foot':
      return has(f, 'distanceM')
        ? `Le regard de nettoyage le plus proche de la colonne ${first(f)} est à ${metres(f, 'distanceM')} de son pied, au plus ${metres(f, 'withinM')}`
        : `La colonne ${first(f)} n’a pas de regard de nettoyage : il en faut un à son pied ou à ${metres(f, 'withinM')} au plus au-dessus`;
    case 'sink':
      return `L’évacuation de ${first(f)} tourne de ${f.number(num(f, 'turnDeg'))}° en tout et n’a pas de regard de nettoyage; au-delà de ${f.number(num(f, 'limitDeg'))}° il en faut un`;
    case 'interceptor':
      return `Aucun regard de nettoyage ne suit le séparateur ${first(f)}`;
    case 'manhole':
      return `L’égout ${first(f)} finit à ${metres(f, 'distanceM')} du bâtiment ou du dernier regard de visite; il en faut un à ${metres(f, 'limitM')} au plus`;
    case 'running trap':
      return `Aucun regard de nettoyage ne précède le siphon ${first(f)} du collecteur principal`;
    case 'spacing':
      return `${f.facts.pipes === 1 ? '1 évacuation est' : `${text(f, 'pipes')} évacuations sont`} hors d’atteinte de tout regard de nettoyage, la plus lointaine ${first(f)} : ${metres(f, 'distanceM')}, au plus ${metres(f, 'limitM')}`;
    case 'bend':
      return `${drains(f, 'tourne', 'tournent')} de plus de ${f.number(num(f, 'limitDeg'))}° en un raccord (${first(f)} : jusqu’à ${f.number(num(f, 'turnDeg'))}°) sans regard de nettoyage à ${metres(f, 'withinM')} ou moins`;
    case 'upper end':
      return `${drains(f, 'n’a pas', 'n’ont pas')} de regard de nettoyage à l’extrémité amont (${first(f)}) : au-delà de ${metres(f, 'limitM')} il en faut un`;
    case 'turns':
      return `${drains(f, 'tourne', 'tournent')} jusqu’à ${f.number(num(f, 'turnDeg'))}° en tout depuis le dernier regard de nettoyage (${first(f)}) : chaque ${f.number(num(f, 'limitDeg'))}° en demande un de plus`;
    case 'urinal':
      return `${f.facts.pipes === 1 ? '1 urinoir n’a pas' : `${text(f, 'pipes')} urinoirs n’ont pas`} de regard de nettoyage (${first(f)}) : il en faut un au-dessus du raccord de chacun`;
    case 'kitchen sink':
      return `${f.facts.pipes === 1 ? '1 évier de cuisine n’a pas' : `${text(f, 'pipes')} éviers de cuisine n’ont pas`} de regard de nettoyage sur l’évacuation (${first(f)}) : il en faut un à chacun, aux étages aussi`;
    case 'trap arm':
      return `Le bras de siphon de ${first(f)} tourne de ${f.number(num(f, 'turnDeg'))}°; au-delà de ${f.number(num(f, 'limitDeg'))}° il faut un regard de nettoyage`;
    default:
      return `${first(f)} n’a pas de regard de nettoyage`;
  }
}

function wanted(f: FrenchFacts): string {
  const at: string[] = [];
  const add = (key: string, one: string, many: (count: number) => string): void => {
    const count = num(f, key);
    if (count > 0) at.push(count === 1 ? one : many(count));
  };
  add('buildingDrains', 'sur le collecteur principal', (count) => `sur chacun des ${count} collecteurs principaux`);
  add('stacks', 'au pied de la colonne', (count) => `au pied de ${count} colonnes`);
  add('sinks', 'sur l’évacuation d’un évier de cuisine', (count) => `sur l’évacuation de ${count} éviers de cuisine`);
  add(
    'upperEnds',
    'à l’extrémité amont de l’évacuation horizontale',
    (count) => `à l’extrémité amont de ${count} évacuations horizontales`,
  );
  add('urinals', 'à l’urinoir', (count) => `à chacun des ${count} urinoirs`);
  add('interceptors', 'après le séparateur', (count) => `après ${count} séparateurs`);
  return at.length === 0 ? 'où les évacuations commencent' : at.join(', ');
}

import type { FindingCode } from '../../findings/finding.ts';
import { has, num, type SentenceFacts } from '../../findings/sentence-facts.ts';
import { frenchCondition } from './french-conditions.ts';
import { type FrenchFacts, text } from './french-facts.ts';
import { frenchPlaceSentences } from './french-place-sentences.ts';

type Sentence = (given: FrenchFacts) => string;

const first = ({ about }: SentenceFacts): string => about[0] ?? 'La maquette';
const many = ({ about }: SentenceFacts, one: string, several: string): string =>
  about.length < 2
    ? `${about[0] ?? 'La maquette'} ${one}`
    : `${about.length} éléments (${about.slice(0, 3).join(', ')}${about.length > 3 ? ', …' : ''}) ${several}`;
const load = (f: FrenchFacts, key = 'loadUnits'): string => `${f.number(num(f, key))} ${f.unit}`;
const group = (f: FrenchFacts): string =>
  `La rangée de ${text(f, 'fixtures')} appareils${has(f, 'battery') ? ` (groupe ${text(f, 'battery').replace(/^battery-/, '')})` : ''}`;

/** What of its way a branch may not have. */
function outOfReach(f: FrenchFacts): string {
  const how = f.facts.ventilated === true ? 'avec une ventilation' : 'sans ventilation';
  switch (f.facts.what) {
    case 'bends':
      return `a ${f.number(num(f, 'bends'))} coudes de 90°, au plus ${text(f, 'bendsMost')} ${how}`;
    case 'drop':
      return `chute de ${f.length(num(f, 'lengthM'))}, au plus ${f.length(num(f, 'limitM'))} ${how}`;
    case 'steep':
      return `a une pente de ${f.slope(num(f, 'slope'))}, au plus ${f.slope(num(f, 'slopeMost'))} ${how}`;
    case 'group':
      return `reçoit ${text(f, 'fixtures')} appareils ensemble, ce qu’aucune ligne du tableau ne permet ${how}`;
    default:
      return `mesure ${f.length(num(f, 'lengthM'))}, au plus ${f.length(num(f, 'limitM'))} ${how}`;
  }
}

/** The findings' sentences in French, built from the same facts as the English ones. */
export const frenchSentences: Readonly<Record<FindingCode, Sentence>> = {
  ...frenchPlaceSentences,
  undersized: (f) =>
    `${first(f)} (${f.role(f.facts.role)}) est dessiné en ${text(f, 'modelled')} et doit être de ${has(f, 'requiredLeast') && f.facts.requiredLeast !== f.facts.required ? `${text(f, 'requiredLeast')} à ` : ''}${text(f, 'required')} pour ${load(f)}${f.clause}${has(f, 'steeperSlope') ? `; posé à ${f.slope(num(f, 'steeperSlope'))} ou plus, ${text(f, 'steeperSize')} suffit` : ''}${f.facts.provisional === true ? '; provisoire, un chiffre du code n’a pas pu être lu' : ''}.`,
  oversized: (f) =>
    `${first(f)} (${f.role(f.facts.role)}) est dessiné en ${text(f, 'modelled')}; ${text(f, 'required')} suffit pour sa propre charge${f.clause}${f.facts.mainVent === true ? '; c’est la plus large ventilation du collecteur principal, qui doit en avoir une de son diamètre minimal' : ''}.`,
  'size-unknown': (f) =>
    has(f, 'said')
      ? `${many(f, 'se dit de', 'se disent de')} ${text(f, 'said')} (${text(f, 'from')}), ce qui n’est pas un diamètre du code.`
      : `${many(f, 'n’a pas de diamètre', 'n’ont pas de diamètre')} dans la maquette : calculé, mais rien à comparer.`,
  'size-contradicted': (f) =>
    `${first(f)} est de ${text(f, 'size')} selon ${text(f, 'from')} mais de ${text(f, 'other')} selon ${text(f, 'otherFrom')}; le premier est retenu.`,
  'size-from-name': (f) =>
    `${many(f, 'ne dit son diamètre', 'ne disent leur diamètre')} que par son nom${has(f, 'size') ? ` (${text(f, 'size')})` : ''} : rien de dessiné ni d’indiqué ne le confirme.`,
  'smaller-downstream': (f) =>
    `${first(f)} est dessiné en ${text(f, 'modelled')}, plus petit que ${f.about[1] ?? 'le tuyau'} (${text(f, 'upstream')}) qui s’y vide${f.clause}.`,
  'unvented-trap': (f) =>
    `Le siphon de ${first(f)} n’a pas d’accès à l’air : aucune ventilation sur son propre tuyau, et aucune en amont que le code permette${f.clause}.`,
  'wet-vent-overloaded': (f) =>
    `${group(f)} : aucun diamètre de ventilation interne ne suffit, ${frenchCondition(f)}${f.clause}.`,
  'wet-vent-not-allowed': (f) =>
    `${group(f)} ne peut avoir une ventilation interne : ${frenchCondition(f)}${f.clause}.`,
  'circuit-vent-not-allowed': (f) =>
    `${group(f)} ne peut avoir une ventilation terminale : ${frenchCondition(f)}${f.clause}.`,
  'relief-vent-missing': (f) =>
    `${group(f)} a une ventilation terminale, et aucune ventilation d’équilibrage, ni évacuation ventilée qui en tienne lieu, ne se raccorde en aval de son dernier appareil${f.clause}.`,
  'additional-circuit-vent-missing': (f) =>
    `${group(f)} exige une ventilation terminale supplémentaire : ${frenchCondition(f)}${f.clause}.`,
  'one-vent-short': (f) =>
    `${group(f)} est lue comme ${f.role(f.facts.reading)} et ${text(f, 'undersized')} de ses tuyaux sont trop petits pour cela; comme ${f.role(f.facts.instead)}, il ne lui manque qu’une chose, ${f.facts.lacks === 'relief-vent-missing' ? 'une ventilation d’équilibrage en aval de son dernier appareil' : 'une ventilation terminale supplémentaire'}${f.clause} : dessinez-la, ou posez les tuyaux plus grands.`,
  'common-vent-not-allowed': (f) =>
    `${group(f)} ne peut avoir une ventilation commune : ${frenchCondition(f)}${f.clause}.`,
  'waste-stack-vent-not-allowed': (f) =>
    `${group(f)} ne peut être ventilée par sa colonne d’eaux usées : ${frenchCondition(f)}${f.clause}.`,
  'combination-not-allowed': (f) =>
    `${group(f)} ne peut avoir une évacuation et ventilation combinées : ${frenchCondition(f)}${f.clause}.`,
  'single-stack-not-allowed': (f) =>
    `${group(f)} ne peut être ventilée par une colonne unique : ${frenchCondition(f)}${f.clause}.`,
  'island-vent-not-allowed': (f) =>
    `La ventilation ${first(f)} redescend avant l’air libre : seuls les éviers et les lavabos peuvent être ventilés ainsi${f.clause}.`,
  'valve-not-allowed': (f) =>
    f.facts.onlyValves === true
      ? `Toutes les ventilations du collecteur principal ${first(f)} finissent par un clapet d’admission d’air; une au moins doit atteindre l’air libre${f.clause}.`
      : `La ventilation ${first(f)} finit par un clapet d’admission d’air : ${
          has(f, 'intervalsMost')
            ? `sa colonne a ${text(f, 'intervals')} intervalles de branchement, au plus ${text(f, 'intervalsMost')} peuvent finir ainsi; menez-la à l’air libre`
            : has(f, 'leastM')
              ? `il est à ${f.length(num(f, 'heightM'))} au-dessus de l’évacuation qu’il ventile, au moins ${f.length(num(f, 'leastM'))}`
              : has(f, 'belowMost')
                ? `il est à ${text(f, 'below')} intervalles de branchement sous le haut de la colonne; au-delà de ${text(f, 'belowMost')} le branchement exige une ventilation d’équilibrage`
                : 'le code ne le permet pas ici'
        }${f.clause}.`,
  'valve-needs-approval': (f) =>
    `La ventilation ${first(f)} finit par un clapet d’admission d’air : ${f.facts.listed === true ? 'le code ne le permet que pour un appareil d’îlot, où le gel peut fermer une ventilation, dans une maison en rénovation, ou lorsqu’aucune ventilation ne peut sortir; la maquette ne dit pas lequel' : 'ce code n’en nomme pas'}, l’autorité compétente décide${f.clause}.`,
  'stack-vent-missing': (f) =>
    `La colonne de chute ${first(f)} porte ${load(f)} et ne se prolonge pas vers le haut en colonne de ventilation primaire${f.clause}.`,
  'vent-stack-missing': (f) =>
    has(f, 'intervals')
      ? `La colonne de chute ${first(f)} a ${text(f, 'intervals')} intervalles de branchement; dès ${text(f, 'intervalsFrom')} il lui faut une colonne de ventilation secondaire${f.clause}.`
      : has(f, 'storeysHigh')
        ? `La colonne de chute ${first(f)} traverse ${text(f, 'storeysHigh')} étages; dès ${text(f, 'storeysFrom')} il lui faut une colonne de ventilation secondaire${f.clause}.`
        : `La colonne de chute ${first(f)} reçoit des appareils de ${text(f, 'storeys')} étages; au-delà de ${text(f, 'storeysMost')} il lui faut une colonne de ventilation secondaire dès son pied${f.clause}.`,
  'vent-stack-misplaced': (f) =>
    has(f, 'distanceMostM')
      ? `La colonne de ventilation secondaire de ${first(f)} part à ${f.length(num(f, 'distanceM'))} du pied de sa colonne de chute, au plus ${f.length(num(f, 'distanceMostM'))}${f.clause}.`
      : `La colonne de ventilation secondaire de ${first(f)} ne part pas d’une partie verticale de sa colonne de chute, au raccordement le plus bas ou juste au-dessous${f.clause}.`,
  'yoke-vent-missing': (f) =>
    has(f, 'interval')
      ? `La colonne de chute ${first(f)} a ${text(f, 'intervals')} intervalles de branchement et pas de ventilation vers sa colonne secondaire au ${text(f, 'interval')}e depuis le haut${f.clause}.`
      : `La colonne de chute ${first(f)} reçoit des appareils de ${text(f, 'storeys')} étages et n’a pas de ventilation de chute ${f.facts.offset === true ? 'à sa déviation ou au-dessus, ' : ''}à l’étage ${num(f, 'storey') + 1}${f.clause}.`,
  'offset-relief-vent-missing': (f) =>
    has(f, 'leastM')
      ? `Un branchement rejoint la colonne à ${f.length(num(f, 'distanceM'))} de sa déviation inclinée ${first(f)}, sous ${text(f, 'intervals')} intervalles de branchement : à moins de ${f.length(num(f, 'leastM'))} il faut à côté une ventilation vers la colonne de ventilation secondaire${f.clause}.`
      : has(f, 'intervals')
        ? `La déviation ${first(f)}, longue de ${f.length(num(f, 'offsetM'))}, est sous ${text(f, 'intervals')} intervalles de branchement avec ${load(f)}; au-delà de ${text(f, 'intervalsMost')} il lui faut une ventilation au-dessus et une au-dessous, et elle en a ${text(f, 'reliefVents')}${has(f, 'larger') ? `; ou une colonne et une déviation de ${text(f, 'larger')}, aussi larges que la colonne et la ventilation réunies` : ''}${f.clause}.`
        : `La déviation ${first(f)}, longue de ${f.length(num(f, 'offsetM'))} sous ${text(f, 'storeys')} étages avec ${load(f)}, a ${text(f, 'reliefVents')} des deux ventilations d’équilibrage exigées${f.clause}.`,
  'trap-arm-too-long': (f) =>
    has(f, 'turnDeg')
      ? `Le bras de siphon de ${first(f)} tourne de ${f.number(num(f, 'turnDeg'))}°, au plus ${f.number(num(f, 'limitDeg'))}°${f.clause}.`
      : f.facts.what === 'too short'
        ? `Le bras de siphon de ${first(f)} mesure ${f.length(num(f, 'lengthM'))}, au moins ${f.length(num(f, 'limitM'))} sur un siphon de ${text(f, 'trap')}${f.clause}.`
        : `Du siphon de ${first(f)} à sa ventilation il y a ${f.length(num(f, 'lengthM'))}${f.facts.what === 'closet height' ? ' de hauteur' : ''}, au plus ${f.length(num(f, 'limitM'))} sur un siphon de ${text(f, 'trap')}${f.clause}.`,
  'trap-arm-too-steep': (f) =>
    `Le bras de siphon de ${first(f)} descend de ${f.length(num(f, 'fallM'))} avant sa ventilation, au plus ${f.length(num(f, 'limitM'))} sur un siphon de ${text(f, 'trap')} : il viderait le siphon${f.clause}.`,
  'outlet-pipe-too-long': (f) =>
    `Entre ${first(f)} et son siphon le tuyau mesure ${f.length(num(f, 'lengthM'))}, au plus ${f.length(num(f, 'limitM'))}${f.clause}.`,
  'slope-too-small': (f) =>
    `${first(f)} a une pente de ${f.slope(num(f, 'slope'))}; ${text(f, 'size')} exige ${f.slope(num(f, 'least'))}${f.clause}.`,
  'slope-unknown': (f) =>
    `${many(f, 'n’a pas de pente', 'n’ont pas de pente')}, ni dessinée ni indiquée : chaque diamètre est lu à sa propre pente minimale. À quelle pente seront-ils posés ?`,
  backfall: (f) => `${first(f)} remonte de ${f.length(num(f, 'climbM'))} sur le parcours de son eau.`,
  'no-open-air': (f) =>
    `${first(f)} finit ${has(f, 'topM') ? `à l’intérieur, à ${f.length(num(f, 'topM'))},` : 'fermé'} et non à l’air libre : les siphons qui comptent sur lui ne sont pas ventilés.`,
  'open-air-assumed': () =>
    'La maquette n’a pas de toit : une ventilation qui finit 2 m au-dessus du plus haut étage avec appareils est réputée à l’air libre.',
  'storeys-assumed': (f) =>
    `La maquette n’a pas d’étages : on en compte un par ${f.length(num(f, 'heightM'))} de hauteur.`,
  'closet-needs-larger': (f) =>
    `${first(f)} porte ${text(f, 'closets')} toilettes et exige un plus grand diamètre${f.clause}.`,
  'branch-too-long': (f) => `Le branchement de ${first(f)} ${outOfReach(f)}${f.clause}.`,
  'appliance-not-allowed': (f) =>
    f.facts.what === 'mixed'
      ? `La colonne ${first(f)} reçoit ${text(f, 'soil')} toilettes ou urinoirs et ${text(f, 'others')} autres appareils : dans ce système, chacun a sa colonne${f.clause}.`
      : `${first(f)} n’est pas permis dans ce système${f.clause}.`,
  'vent-area-too-small': (f) => {
    const area = (key: string): string => `${f.number(num(f, key) * 10000)} cm²`;
    const whose =
      f.facts.vents === 1
        ? `La seule ventilation du collecteur principal ${first(f)} qui atteint l’air libre a ${area('areaM2')}`
        : `Les ${text(f, 'vents')} ventilations du collecteur principal ${first(f)} qui atteignent l’air libre ont ensemble ${area('areaM2')}`;
    return `${whose}, moins que les ${area('leastM2')} de l’égout de ${text(f, 'required')} que sa charge exige : une ventilation de plus, ou une plus grande${f.clause}.`;
  },
  'main-vent-missing': (f) =>
    `Aucune ventilation du collecteur principal n’atteint l’air libre en ${text(f, 'least')} ou plus${has(f, 'widest') ? `; la plus large est de ${text(f, 'widest')}` : ''}${f.clause}.`,
  'fixture-unidentified': (f) =>
    has(f, 'kind')
      ? `${first(f)} : ${f.kind(f.facts.kind)}, mais il manque un détail qui décide de sa charge; les diamètres sont donnés pour les deux cas.`
      : `${first(f)} se vide, mais rien dans la maquette ne dit ce que c’est : les diamètres vont du plus léger au plus lourd possible.`,
  'sewer-too-large': (f) =>
    `L’égout du bâtiment ${first(f)} est dessiné en ${text(f, 'modelled')} et porte ${load(f)} : à sa pente il lui en faut au moins ${f.number(num(f, 'leastUnits'))} pour se curer; un égout plus petit ou plus pentu${f.clause}.`,
  'use-unknown': (f) =>
    `${many(f, 'compte', 'comptent')} selon l’usage du bâtiment, que personne n’indique (réglage use : ${text(f, 'uses')}) : les diamètres vont du plus léger au plus lourd.`,
  'fixture-unconnected': (f) => `${first(f)} n’a pas de tuyau d’évacuation.`,
  'kind-contradicted': (f) =>
    `${first(f)} est pris pour : ${f.kind(f.facts.taken)}, selon ${text(f, 'takenFrom')}; mais ${text(f, 'otherFrom')} dit : ${f.kind(f.facts.other)}.`,
  'open-end': (f) =>
    f.facts.cutOff === true
      ? `${first(f)} s’interrompt : ce qui s’y vide (${num(f, 'fixtures') === 1 ? 'un appareil' : `${text(f, 'fixtures')} appareils`}) ne va pas plus loin, et aucun diamètre au-delà ne le compte.`
      : `${first(f)} a un bout ouvert${has(f, 'gapM') ? `; la chose la plus proche est à ${f.length(num(f, 'gapM'))}` : ''}.`,
  'dead-end': (f) =>
    f.facts.noFixtures === true
      ? `${many(f, 'appartient', 'appartiennent')} à une évacuation où aucun appareil de la maquette ne se vide : rien à calculer.`
      : `${first(f)} ne mène nulle part : ni eau ni air n’y passe.`,
  'joint-inferred': (f) =>
    `${text(f, 'joints')} raccords sans ports reliés ont été trouvés par géométrie; le plus grand écart est de ${f.length(num(f, 'gapM'))}.`,
  'joint-contradicted': (f) =>
    f.facts.what === 'direction'
      ? `Les ports de ${first(f)} et de ${f.about[1] ?? 'un autre élément'} sont reliés contre leur sens d’écoulement.`
      : `Des ports relient ${first(f)} à ${f.about[1] ?? 'un autre élément'}, mais ils sont à ${f.length(num(f, 'gapM'))} l’un de l’autre.`,
  loop: (f) => `${many(f, 'ferme', 'ferment')} une boucle entre évacuations.`,
  'no-sewer-end': (f) =>
    `${many(f, 'se vide', 'se vident')} dans une tuyauterie sans sortie : aucun bout vers l’égout n’a été trouvé.`,
  'sewer-end-assumed': (f) =>
    `La sortie vers l’égout est supposée à ${first(f)} (${num(f, 'candidates') === 1 ? 'seul bout ouvert' : `${text(f, 'candidates')} bouts ouverts`}) : dites-le dans le fichier de réponses si c’en est un autre.`,
  'wrong-system': (f) => `${first(f)} est classé dans un réseau auquel, d’après sa tuyauterie, il n’appartient pas.`,
  'fit-in-wall': fitInWall,
  'double-water-path': (f) =>
    `L’eau de ${first(f)} a ${text(f, 'ways')} chemins : le calcul suit l’un d’eux; ce qui sort par ${f.about.slice(1).join(', ') || 'l’autre'} n’y est pas compté.`,
  'doubled-element': (f) => `${first(f)} se trouve deux fois au même endroit; un seul est retenu.`,
  'group-not-applied': (f) =>
    `${text(f, 'fixtures')} appareils pourraient former des groupes de salle de bains, mais la maquette ne les met dans aucune pièce : leurs charges sont additionnées une à une${f.clause}.`,
  'files-apart': (f) =>
    `${text(f, 'file')} est à ${f.length(num(f, 'distanceM'))} de ${text(f, 'from')} : les deux comptent depuis des origines différentes, rien de ${text(f, 'file')} n’est raccordé. Exportez les deux avec la même origine.`,
  'file-damaged': (f) =>
    `${text(f, 'file')} est endommagé : ${text(f, 'problem').replaceAll('-', ' ')}, ${text(f, 'count')} fois, d’abord à la ligne ${text(f, 'line')}.`,
  'text-damaged': (f) =>
    `${text(f, 'file')} a ${text(f, 'count')} textes endommagés (${text(f, 'problem').replaceAll('-', ' ')}), d’abord à la ligne ${text(f, 'line')}.`,
};

function fitInWall(f: FrenchFacts): string {
  const wall = has(f, 'wall') ? text(f, 'wall') : 'son mur';
  const stud = has(f, 'stud') ? text(f, 'stud') : null;
  const lighter = has(f, 'studIfNotLoadbearing') ? text(f, 'studIfNotLoadbearing') : null;
  const takes =
    stud !== null
      ? `des poteaux de ${stud} le reçoivent${lighter === null ? '' : ` (${lighter} si le mur ne porte rien)`}`
      : lighter !== null
        ? `des poteaux de ${lighter} le reçoivent si le mur ne porte rien`
        : 'aucun poteau courant ne le reçoit : une gaine, ou un autre endroit';
  const mm = (key: string): string => `${f.number(num(f, key))} mm`;
  if (f.facts.what !== 'hole')
    return `${first(f)} en ${text(f, 'required')} n’entre pas dans ${wall} : ${f.facts.what === 'fitting' ? 'ses raccords font' : 'il fait'} ${mm('needsMm')} de large, le mur a ${mm('cavityMm')}; ${takes}.`;
  const bears = f.facts.loadBearing === true ? ' et porte' : f.facts.loadBearing === false ? '' : ' s’il porte';
  return `${first(f)} en ${text(f, 'required')} court le long de ${wall} à travers ses poteaux : un trou de ${mm('holeMm')}, au plus ${mm('holeMostMm')} dans un poteau de ${mm('cavityMm')} de profondeur${bears} et non renforcé (${text(f, 'holeClause')}); ${takes}.`;
}

/** The sentence of a finding in French; a code that has none yet says its name and its facts. */
export const frenchSentence = (code: string, given: FrenchFacts): string | null =>
  Object.hasOwn(frenchSentences, code) ? frenchSentences[code as FindingCode](given) + frenchOnlyIf(given) : null;

/** Readings under which alone a finding holds; empty where it holds under all. */
function frenchOnlyIf({ facts, kind }: FrenchFacts): string {
  const { onlyIf } = facts;
  if (!Array.isArray(onlyIf) || onlyIf.length === 0) return '';
  const loads: Readonly<Record<string, string>> = { lightest: 'la plus légère', heaviest: 'la plus lourde' };
  if (onlyIf.every((word) => loads[word] !== undefined))
    return ` Seulement selon la lecture ${onlyIf.map((word) => loads[word]).join(' ou ')} de ce qui est ouvert.`;
  const named = onlyIf.slice(0, mostKinds).map(kind).join(', ');
  const more = onlyIf.length > mostKinds ? ` ou l’un de ${onlyIf.length - mostKinds} autres` : '';
  return ` Seulement si ce que rien n’identifie est : ${named}${more}.`;
}

const mostKinds = 4;

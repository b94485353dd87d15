import type { MendResult } from '../../schedule/mend.ts';
import { weightNames } from '../../schedule/mend-text.ts';
import type { MarginStep } from '../margin-step.ts';
import type { PipeFate, Side } from '../plan-side.ts';
import type { Language } from '../state.ts';
import { frenchAdvice } from './french-advice.ts';

/** Words of the plan that mends a building, of its two sides, and of what pipes still take. */
export interface PlanWords {
  readonly tab: string;
  readonly title: string;
  readonly sides: string;
  readonly side: Readonly<Record<Side, string>>;
  readonly afterNote: string;
  readonly errors: (count: number) => string;
  readonly points: (points: string) => string;
  readonly sized: (what: string, from: string, to: string) => string;
  readonly pipes: (count: number) => string;
  readonly newVent: (vent: string) => string;
  readonly movedVent: (name: string, vent: string) => string;
  readonly longerVent: (name: string, vent: string) => string;
  readonly vent: (role: string, size: string, length: string) => string;
  readonly joins: (name: string) => string;
  readonly throughRoof: string;
  readonly toNewVent: string;
  readonly toWhereItWent: string;
  readonly from: (name: string) => string;
  readonly row: (fixtures: number, from: string, to: string) => string;
  readonly relaid: (names: string, from: string | null, to: string) => string;
  readonly lowered: (length: string, down: boolean) => string;
  readonly trap: (name: string, from: string, to: string) => string;
  readonly cleanout: (size: string, place: string) => string;
  readonly places: Readonly<Record<string, string>>;
  readonly follows: string;
  readonly proved: string;
  readonly left: (left: number, of: number) => string;
  readonly cheapest: string;
  readonly noChange: string;
  readonly brokenOff: (runs: number) => string;
  readonly weights: string;
  readonly weight: Readonly<Record<keyof MendResult['weights'], string>>;
  readonly leftTitle: string;
  /** What a person has to do about an error that is left, by its code; null: the plan's own sentence stands in this language. */
  readonly advice: ((code: string) => string) | null;
  readonly proposals: string;
  readonly fates: Readonly<Record<PipeFate | 'same', string>>;
  readonly margins: Readonly<Record<MarginStep, string>>;
  readonly takes: string;
  readonly takesLoad: (load: string, next: string | null) => string;
  readonly takesLength: (length: string) => string;
  readonly tooMuch: (load: string) => string;
  readonly takesNothing: (next: string | null) => string;
  readonly rowTakes: (load: string, more: string) => string;
  readonly or: string;
  readonly laid: string;
}

export const planWords: Readonly<Record<Language, PlanWords>> = {
  en: {
    tab: 'Mend',
    title: 'The least change that puts it right',
    sides: 'The building as modelled or as mended',
    side: { before: 'As modelled', after: 'As mended' },
    afterNote: 'The building as mended: a proposal, not what is modelled.',
    errors: (count) => (count === 1 ? '1 error' : `${count} errors`),
    points: (points) => `${points} points`,
    sized: (what, from, to) => `${what}: ${from} → ${to}`,
    pipes: (count) => `${count} pipes`,
    newVent: (vent) => `New ${vent}`,
    movedVent: (name, vent) => `${name} moved: ${vent}`,
    longerVent: (name, vent) => `${name} goes on: ${vent}`,
    vent: (role, size, length) => `${role} of ${size}, ${length}`,
    joins: (name) => `to ${name}`,
    throughRoof: 'through the roof to open air',
    toNewVent: 'to the new vent beside it',
    toWhereItWent: 'to where it goes on',
    from: (name) => `from ${name}`,
    row: (fixtures, from, to) => `The row of ${fixtures} fixtures is read as ${to}, not ${from}`,
    relaid: (names, from, to) => `${names} laid to ${to}${from === null ? '' : `, now ${from}`}`,
    lowered: (length, down) => `its lower end comes ${down ? 'down' : 'up'} ${length}, and what follows with it`,
    trap: (name, from, to) => `${name} set ${to} from its fixture, now ${from}`,
    cleanout: (size, place) => `New cleanout of ${size} (${place})`,
    places: {},
    follows: 'It follows from the other changes.',
    proved: 'The changed building was run through all stages: no error is left.',
    left: (left, of) => `The changed building was run through all stages: ${left} of ${of} errors are left.`,
    cheapest: 'No other combination of the changes that the program knows costs less.',
    noChange: 'No change that the program knows settles these errors.',
    brokenOff: (runs) =>
      `The search was broken off after ${runs} runs of all stages: a better plan may exist. The command mend searches longer.`,
    weights: 'What a point is',
    weight: weightNames,
    leftTitle: 'Errors that are left',
    advice: null,
    proposals: 'A proposal for the designer; nothing that is drawn in the model is moved.',
    fates: {
      added: 'New pipe',
      resized: 'Another size',
      relaid: 'Another fall',
      fitted: 'A fitting set in',
      same: 'As it is',
    },
    margins: {
      over: 'Too much already',
      '0': 'Full: takes no more',
      '10': 'Up to 10 % to spare',
      '25': 'Up to 25 % to spare',
      '50': 'Up to half to spare',
      more: 'More than half to spare',
      none: 'Load does not decide',
    },
    takes: 'Still takes',
    takesLoad: (load, next) => (next === null ? `${load} more` : `${load} more before it needs ${next}`),
    takesLength: (length) => `${length} more length`,
    tooMuch: (load) => `${load} too much as drawn`,
    takesNothing: (next) => (next === null ? 'nothing more' : `nothing more; then it needs ${next}`),
    rowTakes: (load, more) => `The row takes ${load} more${more === '' ? '' : `: ${more}`}.`,
    or: 'or',
    laid: 'laid as',
  },
  fr: {
    tab: 'Remède',
    title: 'Le moindre changement qui corrige le modèle',
    sides: 'Le bâtiment tel que modélisé ou corrigé',
    side: { before: 'Tel que modélisé', after: 'Corrigé' },
    afterNote: 'Le bâtiment corrigé : une proposition, non ce qui est modélisé.',
    errors: (count) => (count < 2 ? `${count} erreur` : `${count} erreurs`),
    points: (points) => `${points} points`,
    sized: (what, from, to) => `${what} : ${from} → ${to}`,
    pipes: (count) => `${count} tuyaux`,
    newVent: (vent) => `Nouveau : ${vent}`,
    movedVent: (name, vent) => `${name} déplacé : ${vent}`,
    longerVent: (name, vent) => `${name} prolongé : ${vent}`,
    vent: (role, size, length) => `${role} de ${size}, ${length}`,
    joins: (name) => `jusqu’à ${name}`,
    throughRoof: 'à travers le toit, à l’air libre',
    toNewVent: 'jusqu’au nouvel évent voisin',
    toWhereItWent: 'jusqu’à sa suite',
    from: (name) => `depuis ${name}`,
    row: (fixtures, from, to) => `La rangée de ${fixtures} appareils est lue comme ${to}, non comme ${from}`,
    relaid: (names, from, to) => `${names} posé à ${to}${from === null ? '' : `, actuellement ${from}`}`,
    lowered: (length, down) =>
      `son extrémité inférieure ${down ? 'descend' : 'monte'} de ${length}, et la suite avec elle`,
    trap: (name, from, to) => `${name} placé à ${to} de son appareil, actuellement à ${from}`,
    cleanout: (size, place) => `Nouveau regard de nettoyage de ${size} (${place})`,
    places: {
      drop: 'descente',
      'branch head': 'tête du branchement',
      'along a branch': 'le long du branchement',
      'building drain': 'collecteur principal',
      'stack foot': 'pied de la colonne',
      sink: 'évier',
      'kitchen sink': 'évier de cuisine',
      urinal: 'urinoir',
      'upper end': 'extrémité amont',
      turns: 'changements de direction',
      interceptor: 'séparateur',
      'running trap': 'siphon principal',
      spacing: 'écartement',
      'too small': 'trop petit',
    },
    follows: 'Cela découle des autres changements.',
    proved: 'Le bâtiment changé a passé toutes les étapes : il ne reste aucune erreur.',
    left: (left, of) => `Le bâtiment changé a passé toutes les étapes : il reste ${left} erreurs sur ${of}.`,
    cheapest: 'Aucune autre combinaison des changements connus du programme ne coûte moins.',
    noChange: 'Aucun changement connu du programme ne remédie à ces erreurs.',
    brokenOff: (runs) =>
      `La recherche a été arrêtée après ${runs} passages par toutes les étapes : un meilleur plan peut exister. La commande mend cherche plus longtemps.`,
    weights: 'Ce qu’est un point',
    weight: {
      sizeStep: 'un mètre de tuyau d’un diamètre de plus ou de moins',
      newVent: 'un mètre d’évent nouveau',
      ventJoint: 'chacune de ses extrémités',
      throughRoof: 'une traversée du toit',
      openedWall: 'un mètre dans un mur',
      reading: 'une rangée lue autrement',
      relaying: 'un mètre posé à une autre pente',
      trap: 'un siphon déplacé',
      cleanout: 'un regard de nettoyage',
    },
    leftTitle: 'Erreurs qui restent',
    advice: frenchAdvice,
    proposals: 'Une proposition au concepteur ; rien de ce qui est dessiné dans le modèle n’est déplacé.',
    fates: {
      added: 'Tuyau nouveau',
      resized: 'Autre diamètre',
      relaid: 'Autre pente',
      fitted: 'Raccord inséré',
      same: 'Tel quel',
    },
    margins: {
      over: 'Déjà trop chargé',
      '0': 'Plein : rien de plus',
      '10': 'Réserve jusqu’à 10 %',
      '25': 'Réserve jusqu’à 25 %',
      '50': 'Réserve jusqu’à la moitié',
      more: 'Réserve de plus de la moitié',
      none: 'La charge n’en décide pas',
    },
    takes: 'Accepte encore',
    takesLoad: (load, next) => (next === null ? `${load} de plus` : `${load} de plus, ensuite ${next}`),
    takesLength: (length) => `${length} de longueur`,
    tooMuch: (load) => `${load} de trop tel que dessiné`,
    takesNothing: (next) => (next === null ? 'rien de plus' : `rien de plus ; ensuite ${next}`),
    rowTakes: (load, more) => `La rangée accepte encore ${load}${more === '' ? '' : ` : ${more}`}.`,
    or: 'ou',
    laid: 'posé en',
  },
};

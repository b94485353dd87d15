/** What stands round a clause's number, longest first: `Table 2.4.9.3., row 3 in, up to 10` in French. */
const words: readonly (readonly [RegExp, string])[] = [
  [/\(provincial and local additions\)/g, '(ajouts provinciaux et locaux)'],
  [/\bnotes? to Tables? /g, 'notes des tableaux '],
  [/\(definition\)/g, '(définition)'],
  [/\bdefinitions?\b/g, 'définition'],
  [/\bTables /g, 'tableaux '],
  [/\bTable /g, 'tableau '],
  [/\bDivision /g, 'division '],
  [/\bchapter /g, 'chapitre '],
  [/\b[Aa]ppendix /g, 'annexe '],
  [/\bformula /g, 'formule '],
  [/\brow /g, 'ligne '],
  [/\bup to /g, 'jusqu’à '],
  [/\band above\b/g, 'et plus'],
  [/\bnational \(Austria, Germany\)/g, 'national (Autriche, Allemagne)'],
  [/ to (?=\d)/g, ' à '],
  [/ and (?=\d)/g, ' et '],
  [/(?<=[\d½¼¾]) in\b/g, ' po'],
];

/** Where a rule is printed, and in which row of its table. */
export const frenchPlace = (place: string): string =>
  words.reduce((text, [english, french]) => text.replace(english, french), place);

/**
 * What a property or quantity says about a drainage element, judged by its name alone. Names of other meanings give
 * null, and their values are never read.
 */
export type PropertyMeaning =
  | { readonly bears: 'size'; readonly means: 'nominal' | 'outer' | 'inner' | 'unknown' }
  /** One of two sides of a cross-section: a round one where both are alike. */
  | { readonly bears: 'side'; readonly side: 'width' | 'depth' }
  /** `ratio` m/m unless the value says otherwise; `one-in` is the n of 1:n. */
  | { readonly bears: 'slope'; readonly form: 'ratio' | 'one-in' | 'percent' | 'per-mille' }
  | { readonly bears: 'length' }
  /** A word or number on kind, trap, flush, venting, status: kept as it is. */
  | { readonly bears: 'fact' };

/** Meaning of a property by its name. Names are asked for again and again: whoever reads a file remembers them. */
export function propertyMeaning(name: string): PropertyMeaning | null {
  const words = foldedName(name);
  if (words === '' || words.length > longestName) return null;
  const bare = words
    .replace(/\([^)]*\)|\[[^\]]*\]/g, ' ')
    .replace(/\s+/g, ' ')
    .trim();
  if (size.notThePipe.test(bare)) return fact.test(bare) ? { bears: 'fact' } : null;
  if (slope.test(bare)) return { bears: 'slope', form: slopeForm(words) };
  for (const [means, pattern] of sizeWords) if (pattern.test(bare)) return { bears: 'size', means };
  if (/^(?:width|breite|largeur|breedte|bredd|bredde|larghezza|anchura)$/.test(bare))
    return { bears: 'side', side: 'width' };
  if (/^(?:depth|height|hohe|tiefe|hauteur|hoogte|hojd|hoyde|altezza|altura)$/.test(bare))
    return { bears: 'side', side: 'depth' };
  if (lengthWords.test(bare)) return { bears: 'length' };
  return fact.test(bare) ? { bears: 'fact' } : null;
}

const longestName = 80;

/** Lower case, accents off, words apart: `NominalDiameter` and `Außen-Durchmesser` as people would say them. */
function foldedName(name: string): string {
  return name
    .normalize('NFKD')
    .replace(/[\u0300-\u036f]/g, '')
    .replace(/ß/g, 'ss')
    .replace(/[øØ]/g, 'o')
    .replace(/[łŁ]/g, 'l')
    .replace(/([a-z])([A-Z])/g, '$1 $2')
    .toLowerCase()
    .replace(/[_.\-/]+/g, ' ')
    .replace(/\s+/g, ' ')
    .trim();
}

const diameter = '(?:diameter|diam|durchmesser|diametre|diametro|doorsnede|srednica|halkaisija)';
const pipe = '(?:pipe|segment|rohr|leitungs?|tube|tuyau|leiding|buis|ror|tubo|tuberia|tubazione|rury) ?';

const sizeWords: readonly (readonly ['nominal' | 'outer' | 'inner' | 'unknown', RegExp])[] = [
  [
    'nominal',
    new RegExp(
      `^(?:${pipe})?(?:nominal(?:e|er|ni)? (?:pipe )?(?:${diameter}|size|bore|width)|${diameter} nominal(?:e|na|ni)?|nennweite|nenndurchmesser|nenn ?diameter|dn|nw|nps|nom(?:inal)? ?dia|nominale (?:diameter|maat)|trade size|nominell diameter|${diameter} n)$`,
    ),
  ],
  [
    'outer',
    new RegExp(
      `^(?:${pipe})?(?:(?:outer|outside|external|overall outside|aussen|aeussere?r?|exterieur|buiten|uitwendige|ytter|utvendig|udvendig|ulko) ?${diameter}|${diameter} (?:outer|outside|external|aussen|exterieur|exterior|externo|esterno|zewnetrzna|ext)|od|da)$`,
    ),
  ],
  [
    'inner',
    new RegExp(
      `^(?:${pipe})?(?:(?:inner|inside|internal|innen|innere?r?|interieur|binnen|inwendige|inner|innvendig|indvendig|sisa) ?${diameter}|${diameter} (?:inner|inside|internal|innen|interieur|interior|interno|wewnetrzna|int)|lichte weite|clear width|di)$`,
    ),
  ],
  [
    'unknown',
    new RegExp(
      `^(?:${pipe})?(?:${diameter}|size|pipe size|grosse|taille|maat|dimension|overall size|calculated size|calibre)(?: 1)?$`,
    ),
  ],
];

const size = {
  /** Diameters and sizes of something else than the pipe. */
  notThePipe:
    /\b(?:insulation|isol\w*|dammung|isolatie|lining|max\w*|min\w*|hydraulic|bend|radius|wall|wand|thickness|dicke|hole|bolt|flange|thread|vent diameter|lock|allowed|outlet|inlet|drain(?:age)? size|waste|trap|ontw|auslauf|ablauf|abgang|sortie|uitlaat|connection|anschluss|room|opening|weight|cover|manhole|chamber|frame)\b/,
};

const lengthWords = new RegExp(
  `^(?:${pipe})?(?:(?:cut|net|gross|nominal|overall|total|real|true|actual|centerline|centreline) )?(?:length|lange|laenge|longueur|lengte|lengde|langd|laengde|lunghezza|longitud|comprimento|dlugosc|pituus)$`,
);

const slope = new RegExp(
  `^(?:${pipe})?(?:slope|gradient|fall|gefalle|gefaelle|neigung|pente|afschot|verhang|helling|pendenza|pendiente|declive|inclination|inclinaison|inclinazione|inclinacion|inclinacao|lutning|fald|helning|spadek|kaltevuus)(?: ?(?:value|percent|ratio|in|1 ?:.*|%.*|‰.*|degrees?))?$`,
);

function slopeForm(words: string): 'ratio' | 'one-in' | 'percent' | 'per-mille' {
  if (/‰|promill?e|per mille|permille/.test(words)) return 'per-mille';
  if (/%|percent|prozent|procent/.test(words)) return 'percent';
  return /\b1 ?: ?|1 in\b/.test(words) ? 'one-in' : 'ratio';
}

/** Whatever helps to tell kind, trap, flush, venting, status, or what a thing drains into. */
const fact = new RegExp(
  [
    'service|system|medium|fluid|abbreviation|discipline|category|kategorie|family|familie|type|typ|art|kind|usage|function|funktion',
    'omniclass|uniclass|masterformat|uniformat|assembly (?:code|description)|keynote|classification|nl ?sfb',
    'trap|siphon|sifon|geruchverschluss|p trap|flush\\w*|spul\\w*|chasse|cistern\\w*|tank|valve|lpf|gpf|water closet|toilet\\w*|wc|urinal\\w*',
    'sink|basin|lavatory|bath|shower|bidet|stall|mounting|montage|pan|bowl',
    'vent\\w*|wet|circuit|relief|reading|stack|riser|sanitary|drain\\w*|waste|sewer|sewage|storm|rain\\w*|soil',
    'fixture units?|dfu|wfu|drainage units?|discharge units?|du|volumestr\\w*',
    'outlet|inlet|connection|anschluss|auslauf|ablauf|abgang|ontw|size of outlet',
    'heads?|emergency|domestic|commercial|private|public|grease|clean ?out|rodding|reinigung\\w*',
    'status|phase\\w*|existing|demolish\\w*|bestand|new construction',
    'vertical|vertikaal|vertikal|orientation|invert|rim|cover level|spillover|flood level|material|schedule|source|standard|part type|mark|comments?|description',
  ]
    .map((part) => `\\b(?:${part})\\b`)
    .join('|'),
);

/** Metres in the unit that a property's name states, such as `Lengte (mm)`; null where it states none. */
export function metresInName(name: string): number | null {
  const unit = /[([]\s*(mm|cm|dm|m|in|inch|inches|"|ft|feet)\s*[)\]]|[\s_](mm|cm)\s*$/i.exec(name);
  const word = (unit?.[1] ?? unit?.[2] ?? '').toLowerCase();
  return metresByWord[word] ?? null;
}

const metresByWord: Readonly<Record<string, number>> = {
  mm: 0.001,
  cm: 0.01,
  dm: 0.1,
  m: 1,
  in: 0.0254,
  inch: 0.0254,
  inches: 0.0254,
  '"': 0.0254,
  ft: 0.3048,
  feet: 0.3048,
};

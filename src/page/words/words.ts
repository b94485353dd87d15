import type { Question } from '../../schedule/question.ts';
import type { ColourBy, Language } from '../state.ts';
import type { PanelWords } from './panel-words.ts';

/** Every word of the page in one language. Names of roles, kinds, findings and rules fall back to the id in plain words. */
export interface Words extends PanelWords {
  readonly language: Language;
  readonly page: {
    readonly about: string;
    readonly model: string;
    readonly riser: string;
    readonly panel: string;
    readonly views: string;
    readonly tools: string;
    readonly otherLanguage: string;
    readonly dark: string;
    readonly light: string;
    readonly copyLink: string;
    readonly copied: string;
    readonly copy: string;
    readonly keys: string;
    readonly close: string;
    readonly back: string;
    readonly more: (count: number) => string;
    readonly noPicture: string;
    readonly noShapes: string;
    readonly nothingToDraw: string;
    readonly picture: string;
    readonly keyHelp: readonly (readonly [keys: string, what: string])[];
    readonly skip: string;
  };
  readonly summary: {
    readonly understood: string;
    readonly fixtures: (count: number) => string;
    readonly allReach: (count: number) => string;
    readonly notReach: (count: number) => string;
    readonly sanitary: (pipes: number, systems: number) => string;
    readonly leftOut: (count: number, reasons: string) => string;
    readonly unplaced: (count: number) => string;
    readonly batteries: (count: number) => string;
    readonly tooSmall: (pipes: number, causes: number) => string;
    readonly noneTooSmall: string;
    readonly noneJudged: (pipes: number) => string;
    readonly unvented: (count: number) => string;
    readonly nothing: string;
    readonly share: string;
  };
  readonly tabs: Readonly<Record<'findings' | 'questions' | 'batteries' | 'pipes' | 'model', string>>;
  readonly questions: {
    readonly lead: string;
    readonly none: string;
    readonly weight: (pipes: number) => string;
    readonly choices: string;
    readonly where: string;
    /** The question in this language; null where its own sentence is in it already. */
    readonly ask: ((place: Question['answer'], name: string) => string) | null;
  };
  readonly pipesBy: {
    readonly label: string;
    readonly by: Readonly<Record<'verdict' | 'name' | 'size' | 'load' | 'storey', string>>;
  };
  readonly search: {
    readonly label: string;
    readonly hint: string;
    readonly none: string;
    readonly found: (count: number) => string;
  };
  readonly findings: {
    readonly all: string;
    readonly severity: Readonly<Record<'error' | 'warning' | 'note', string>>;
    readonly undersized: (pipes: number, drawn: string, needed: string) => string;
    readonly ofBattery: (battery: string) => string;
    readonly none: string;
    readonly filter: string;
    readonly noJudgement: string;
    readonly groupBy: string;
    readonly by: Readonly<Record<'cause' | 'place' | 'storey', string>>;
    readonly stack: (name: string) => string;
    readonly elsewhere: string;
  };
  readonly model: {
    readonly file: string;
    readonly sha256: string;
    readonly schema: string;
    readonly unit: string;
    readonly code: string;
    readonly edition: string;
    readonly localTables: string;
    readonly program: string;
    readonly settings: string;
    readonly answered: string;
    readonly counts: string;
    readonly elements: string;
    readonly adds: string;
    readonly joints: string;
    readonly jointLine: (ports: number, geometry: number, widest: string) => string;
    readonly sewer: string;
    readonly remarks: string;
    readonly caution: string;
    readonly unresolved: string;
    readonly pipes: string;
    readonly fittings: string;
    readonly fixtures: string;
    readonly terminals: string;
    readonly leftOut: string;
  };
  readonly legend: {
    readonly colourBy: string;
    readonly by: Readonly<Record<ColourBy, string>>;
    readonly noSystem: string;
    readonly noSize: string;
    readonly noStorey: string;
    readonly loadOver: (from: string, unit: string) => string;
    readonly loadStep: (to: string, unit: string) => string;
    readonly hide: (name: string) => string;
  };
  readonly tools: {
    readonly fit: string;
    readonly view: string;
    readonly views: Readonly<Record<'home' | 'top' | 'front' | 'right' | 'back' | 'left' | 'below', string>>;
    readonly storey: string;
    readonly wholeBuilding: string;
    readonly labels: string;
    readonly context: string;
    readonly measure: string;
    readonly measureHint: string;
    readonly distances: (length: string, plan: string, rise: string) => string;
  };
  readonly riser: {
    readonly whole: (system: number) => string;
    readonly part: (name: string) => string;
    readonly lost: string;
    readonly looks: Readonly<Record<'drain' | 'vent' | 'both' | 'undersized', string>>;
    readonly marks: Readonly<Record<'cleanout' | 'open-air' | 'admittance-valve' | 'sewer' | 'no-air', string>>;
    readonly fit: string;
    readonly picture: string;
    readonly name: string;
    readonly print: string;
    readonly none: string;
    readonly which: string;
    readonly zoomIn: string;
    readonly zoomOut: string;
    readonly fold: string;
    readonly like: (storey: string, other: string) => string;
    readonly also: (storey: string, count: number, others: string) => string;
  };
  readonly verdict: Readonly<Record<'undersized' | 'agrees' | 'oversized' | 'unknown', string>>;
  readonly roles: Readonly<Record<string, string>>;
  readonly kinds: Readonly<Record<string, readonly [one: string, many: string]>>;
  readonly codes: Readonly<Record<string, string>>;
  readonly rules: Readonly<Record<string, string>>;
  readonly factWords: Readonly<Record<string, string>>;
  readonly unit: (unit: string) => string;
  readonly shortUnit: (unit: string) => string;
  readonly caution: string;
  readonly yes: string;
  readonly no: string;
  readonly and: string;
  readonly to: string;
  readonly level: string;
  /** Before a list: French sets a space before its colon. */
  readonly colon: string;
  readonly codeTitle: (id: string, title: string) => string;
  /** Where a trap is known to be, by the result's word for it. */
  readonly trapHow: Readonly<Record<string, string>>;
  readonly sewerHow: Readonly<Record<string, string>>;
  /** Sentences of the result that come from a fixed list. */
  readonly limits: Readonly<Record<string, string>>;
  readonly phrases: Readonly<Record<string, string>>;
}

/** An id as its language names it; unknown ids stand as plain words, so nothing is lost when a code adds its own. */
export const named = (names: Readonly<Record<string, string>>, id: string): string =>
  Object.hasOwn(names, id) ? (names[id] ?? id) : id.replaceAll('-', ' ');

export function countedKind(words: Words, kind: string | null, count: number): string {
  const names = kind !== null && Object.hasOwn(words.kinds, kind) ? words.kinds[kind] : undefined;
  const [one, many] =
    names ?? (kind === null ? [words.fixture.unidentified, words.fixture.unidentified] : [kind, kind]);
  return `${count} ${count === 1 ? one : many}`;
}

export function kindName(words: Words, kind: string | null): string {
  if (kind === null) return words.fixture.unidentified;
  return (Object.hasOwn(words.kinds, kind) ? words.kinds[kind]?.[0] : undefined) ?? kind.replaceAll('-', ' ');
}

/** What a rule is about: its own title, or the language's name for it where it has one. */
export function ruleName(words: Words, { rule, title }: { readonly rule: string; readonly title: string }): string {
  const own = (id: string): string | undefined => (Object.hasOwn(words.rules, id) ? words.rules[id] : undefined);
  return own(rule) ?? own(rule.replace(/^([A-Z]+-R\d+).*$/, '$1')) ?? title;
}

/** A sentence of the result that its maker took from a fixed list, in the page's language where the list is known. */
export const phrase = (words: Words, text: string): string =>
  (Object.hasOwn(words.phrases, text) ? words.phrases[text] : undefined) ?? text;

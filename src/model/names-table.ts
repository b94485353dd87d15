import type { FixtureKind, Medium, Part } from './identity.ts';
import type { TextMarks } from './text-marks.ts';

/** Words that the names table sorts names into: fixture kinds, parts, pipes by medium, and what is no plumbing. */
export type WordKind = string & { readonly __wordKind: true };

/** What a word kind is for the network. */
export interface KindMeaning {
  readonly kind: WordKind;
  readonly part: Part;
  /** Only where `part` is `fixture`. */
  readonly fixture: FixtureKind | null;
  readonly style: string | null;
  readonly medium: Medium;
}

/** How a text was understood. */
export interface TextReading {
  readonly kind: WordKind;
  readonly meaning: KindMeaning;
  /** The words that decided, as they stand in the table: `water~closet(s)`. */
  readonly word: string;
  /** 0 an abbreviation, 1 one bare or little trusted noun, 2 a word that stands for itself. */
  readonly strength: 0 | 1 | 2;
  readonly rank: number;
}

/** What an IFC predefined type says: `sure` decides, `likely` yields to a clear name, `open` is a hint. */
export interface TypeMeaning {
  readonly kind: WordKind;
  readonly trust: 'sure' | 'likely' | 'open';
}

/**
 * Everything the project knows on names, compiled. Reading the same text twice costs a look-up; apart from that
 * memory the table never changes.
 */
export interface NamesTable {
  /** What a thing so named is; null where nothing in the text decides. */
  readThing(text: string): TextReading | null;
  /** What flows in a pipe or system so named: only pipe words, drains of rain and things that are no plumbing count. */
  readMedium(text: string): TextReading | null;
  /** Flush, style, heads and so on, read from the whole text, side remarks included. */
  readMarks(text: string): TextMarks;
  /** `wet-vent`, `circuit-vent`, `individual-vent` where the words are said. */
  readVenting(text: string): string | null;
  /** By number where the table knows it, else by the title. */
  readClassification(text: string): TextReading | null;
  meaning(kind: WordKind): KindMeaning;
  /** True where `inner` is a kind of `outer`: a kitchen sink is a sink. */
  refines(inner: WordKind, outer: WordKind): boolean;
  /** Meaning of a predefined type: `unknown` where the enumeration lacks the value, null where it says nothing. */
  typeMeaning(enumeration: string, value: string): TypeMeaning | null | 'unknown';
  /** What a property with an enumerated value says, `ToiletType` `SLOPHOPPER`. */
  propertyMeaning(name: string, value: string): PropertyMeaning | null;
  /** What the property's name promises; null for one that identity does not read. */
  propertyUse(name: string): PropertyUse | null;
  /** True for a class that holds anything, such as `IfcFlowTerminal`: its own predefined type proves little. */
  holdsAnything(ifcClass: string): boolean;
  /** The word kind of a name in the table's list of kinds; a name that is not there is our own fault. */
  kind(name: string): WordKind;
}

export type PropertyUse = 'trap' | 'outlet' | 'medium' | 'kind' | 'flush';

export interface PropertyMeaning {
  readonly kind: WordKind | null;
  readonly style: string | null;
  readonly flush: 'tank' | 'valve' | null;
}

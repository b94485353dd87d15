/**
 * What an element is for the trade, read from class, predefined type, properties, classification and names.
 * `fixture` drains water and has a trap; the others are the parts that end or interrupt piping.
 */
export type Part =
  | 'pipe'
  | 'fitting'
  | 'fixture'
  | 'trap'
  | 'cleanout'
  | 'vent-terminal'
  | 'air-admittance-valve'
  | 'chamber'
  | 'sewer-connection'
  | 'valve'
  | 'tank'
  | 'not-drainage'
  | 'unknown-terminal';

export type FixtureKind =
  | 'water-closet'
  | 'urinal'
  | 'lavatory'
  | 'sink'
  | 'kitchen-sink'
  | 'mop-sink'
  | 'laundry-tray'
  | 'shower'
  | 'bathtub'
  | 'bidet'
  | 'floor-drain'
  | 'clothes-washer'
  | 'dishwasher'
  | 'drinking-fountain'
  | 'garbage-grinder'
  | 'wash-fountain'
  | 'macerating-toilet'
  | 'clinical-sink'
  | 'dental-unit'
  | 'other-fixture';

export interface FixtureDetail {
  readonly flush: 'tank' | 'valve' | 'flushometer-tank' | null;
  /**
   * Urinal: `stall`, `wall-washout`, `wall-other`, `pedestal`, `wall` (either of the wall ones), `washout` (stall or wall),
   * `trough`, `waterless`. Lavatory: `multiple`, `dental`, `barber`. Other kinds: as the names table says. Not of fixtures:
   * pipe `building-sewer`; tank `interceptor`, `sump`, `pump`; valve `backwater-valve`; fitting `garbage-grinder`.
   */
  readonly style: string | null;
  readonly heads: number | null;
  readonly emergency: boolean | null;
  readonly domestic: boolean | null;
  /** Litres to a flush of closets and urinals, where a text gives them (`6.1 Lpf`, `1.6 gpf`); absent where none does. */
  readonly flushLitres?: number;
  /** Steady flow, or that of a pump, which the user states: litres a second. It stands for the fixture's load. */
  readonly flow?: number;
  /** That flow comes and goes: some codes rate it less. */
  readonly intermittent?: boolean;
  /** Frequency factor of its use where the user states one other than the building's (EN 12056). */
  readonly frequency?: number;
}

export const noDetail: FixtureDetail = { flush: null, style: null, heads: null, emergency: null, domestic: null };

/** Which medium an element belongs to by its systems and names. `null`: nothing says. */
export type Medium = 'sanitary' | 'vent' | 'storm' | 'supply' | 'other' | null;

export interface Identity {
  readonly part: Part;
  /** Of fixtures; null when it is one but nobody can say which (`fixture-unidentified`). */
  readonly kind: FixtureKind | null;
  readonly detail: FixtureDetail;
  readonly medium: Medium;
  /** Text that decided: `PredefinedType TOILETPAN`, `type name "WC Standuri"`, `answers file`. */
  readonly evidence: string;
  /** True when the kind came from an abbreviation or one bare noun and deserves a look. */
  readonly weak: boolean;
  /** Millimetres: trap or outlet size that a property states, else null. */
  readonly outletMm: number | null;
  /** What the designer's own words say the venting is, `wet-vent` or `circuit-vent` or `individual-vent`, else null. */
  readonly reading: string | null;
}

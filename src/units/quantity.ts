declare const unit: unique symbol;

/** A number that knows its unit. Adding two yields a plain number: the line must name the unit of its result again. */
export type Quantity<U extends string> = number & { readonly [unit]: U };

export type Metres = Quantity<'m'>;
export const metres = (value: number): Metres => value as Metres;

/** Fall over plan length, m/m. Zero is level. */
export type Slope = Quantity<'m/m'>;
export const slopeOf = (value: number): Slope => value as Slope;

/** A load in whole sixtieths of the code's own unit (fixture units; EN 12056: l/s of discharge units). */
export type Load = Quantity<'load/60'>;

export const noLoad = 0 as Load;
const sixtieths = 60;
/** Printed figures are exact in sixtieths; what is not (continuous flow) is rounded up, never down. Nothing is 0, not -0. */
export const loadOf = (units: number): Load => (Math.ceil(units * sixtieths - 1e-6) + 0) as Load;
export const unitsOf = (load: Load): number => load / sixtieths;
export const plusLoad = (a: Load, b: Load): Load => (a + b) as Load;

/** From the lightest to the heaviest reading of what the model leaves open. Equal when nothing is open. */
export interface Range<T> {
  readonly least: T;
  readonly most: T;
}

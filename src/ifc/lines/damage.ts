/** What the bytes themselves show to be wrong. Offsets point at the first byte of the place, in file order. */
export interface Damage {
  /** Where the text stops short of its end marks, and in the middle of what; null in a whole file. */
  readonly cutOff: { readonly offset: number; readonly where: CutOff } | null;
  /** Records that begin inside another one because its `;` is missing. */
  readonly merged: readonly number[];
  /** Strings whose closing quote is missing: reading went on with the next line. */
  readonly openStrings: readonly number[];
  /** Strings that hold a line which looks like an instance, yet are closed: read as text. */
  readonly oddStrings: readonly number[];
  /** Statements that are no instance and no keyword, or whose instance lacks its number, `=` or `(`. */
  readonly unreadable: readonly number[];
  /** Instances whose number is past 4 294 967 295; they are left out. */
  readonly idsTooLarge: readonly number[];
  /** STEP ids that stand more than once, once for each record that a later one replaces; the last record counts. */
  readonly doubledIds: readonly number[];
  /** Instances outside any DATA section; they are read all the same. */
  readonly outsideData: number;
}

export type CutOff = 'in a string' | 'in a comment' | 'in an instance' | 'before ENDSEC' | 'before END-ISO-10303-21';

import { plainLabel } from '../tables/printed-value.ts';

/**
 * A property set to be written on one occurrence. Numbers of `length` are in the file's own unit; `integer` is whole.
 * Texts may hold any character: the writer encodes them.
 */
export interface PropertySetToWrite {
  readonly name: string;
  /** STEP id of the element; `building`: the one building of the file, else its project. */
  readonly on: number | 'building';
  /** In the order they are written; names do not repeat. */
  readonly properties: readonly PropertyToWrite[];
}

export interface PropertyToWrite {
  readonly name: string;
  readonly value: ValueToWrite;
}

export type ValueToWrite =
  | { readonly as: 'label' | 'text'; readonly value: string }
  | { readonly as: 'real' | 'length' | 'positive-length' | 'integer'; readonly value: number };

/** Properties in the order given; those without a value, and empty texts, are left out. */
export const propertiesToWrite = (properties: Readonly<Record<string, ValueToWrite | null>>): PropertyToWrite[] =>
  Object.entries(properties).flatMap(([name, value]) =>
    value === null || value.value === '' ? [] : [{ name, value }],
  );

/** Sizes in a label or text are written with plain fractions, `1 1/2 in`. */
export const labelToWrite = (value: string): ValueToWrite => ({ as: 'label', value: plainLabel(value) });
export const textToWrite = (value: string): ValueToWrite => ({ as: 'text', value: plainLabel(value) });

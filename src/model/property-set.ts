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

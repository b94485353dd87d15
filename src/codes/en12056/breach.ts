/** What of a way its table does not allow. Metres, bends of 90 degrees, m/m. */
export interface Breach {
  readonly what: 'length' | 'bends' | 'drop' | 'slope' | 'steep' | 'group';
  readonly value: number;
  readonly limit: number;
}

const foot = 0.3048;

/** Column of Table 917.2 by the height of the stack in metres: below 75 ft, below 160 ft, above. */
export const singleStackColumn = (rise: number): { readonly id: string; readonly title: string } =>
  rise < 75 * foot
    ? { id: 'under75', title: 'below 75 ft' }
    : rise < 160 * foot
      ? { id: 'under160', title: '75 to below 160 ft' }
      : { id: 'over160', title: '160 ft and above' };

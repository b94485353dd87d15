import type { Cell } from '../../tables/table.ts';
import { loadOf } from '../../units/quantity.ts';
import type { PlumbingCode } from '../plumbing-code.ts';

/** So many units for each litre a second that never stops: the American and Canadian codes alike. */
export const steadyLoadBy =
  (rate: Cell<number>): NonNullable<PlumbingCode['steadyLoad']> =>
  (litresASecond) => {
    const load = loadOf(rate.value * litresASecond);
    return { load, cell: { ...rate, value: load } };
  };

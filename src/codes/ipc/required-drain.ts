import { sizeForLoad } from '../../tables/find-size.ts';
import type { Trust } from '../../tables/table.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import type { Load } from '../../units/quantity.ts';
import { leastTrust } from '../rules/vent-sizes.ts';
import type { Tools } from '../tools.ts';

export interface RequiredDrain {
  readonly size: NominalSize;
  readonly trust: Trust;
}

/**
 * The drain that a load requires by Table 710.1(2), whatever that drain joins: what a vent by 906.2 is half of (R72). Not
 * below the trap, nor below the least for a water closet. null: no size holds the load.
 */
export function requiredDrain({ family, omit }: Tools) {
  const table = family.table('branch-and-stack');
  const closetDrain = family.size('closet-drain');
  const { larger } = family.series;
  return (load: Load, closets: number, trap: NominalSize | null): RequiredDrain | null => {
    const found = sizeForLoad(table, 'branch', load, omit);
    if (found.size === null) return null;
    const floors = [...(trap === null ? [] : [trap]), ...(closets > 0 ? [closetDrain.value] : [])];
    const size = floors.reduce(larger, found.size);
    return { size, trust: leastTrust(found.cell.trust, closets > 0 ? closetDrain.trust : 'published') };
  };
}

import type { Facts } from '../../findings/finding.ts';
import type { SizeFound } from '../../tables/find-size.ts';
import type { RuleEntry } from '../../tables/rule-list.ts';
import type { Cell } from '../../tables/table.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import { type Load, unitsOf } from '../../units/quantity.ts';
import type { Step } from '../sizing-rule.ts';

/** A demand that a table answers. A size that is not found is `null`: past the last row, or only unread cells left. */
export function tableStep(rule: RuleEntry, found: SizeFound, facts: Facts, unit: 'load' | 'm' = 'load'): Step {
  return {
    rule: rule.id,
    clause: rule.clause,
    cell: found.cell,
    trust: found.cell.trust,
    facts: {
      ...facts,
      ...limitFact(found.cell, unit),
      ...(found.provisional
        ? { unread: found.unread.map(({ place }) => `${place.table} ${place.row} ${place.column}`) }
        : {}),
    },
    asks: found.size,
    provisional: found.provisional || (found.size === null && found.unread.length > 0),
    smaller:
      found.smaller === null ? null : { size: found.smaller.size, limit: printedLimit(found.smaller.cell, unit) },
  };
}

/** Loads are kept in sixtieths; a limit of length is in metres already. */
const printedLimit = ({ value }: Cell, unit: 'load' | 'm'): number | string | null =>
  typeof value === 'number' && unit === 'load' ? unitsOf(value as Load) : value;

const limitFact = (cell: Cell, unit: 'load' | 'm'): Facts =>
  unit === 'load' ? { limitUnits: printedLimit(cell, unit) } : { limitM: printedLimit(cell, unit) };

/** A demand that one number of the code makes: a floor, a closet limit. */
export function floorStep(rule: RuleEntry, cell: Cell<NominalSize>, facts: Facts): Step {
  return { rule: rule.id, clause: rule.clause, cell, trust: cell.trust, facts, asks: cell.value, provisional: false };
}

/** A demand that follows from another pipe's size, or from the fixture itself. */
export function followStep(rule: RuleEntry, asks: NominalSize, facts: Facts): Step {
  return { rule: rule.id, clause: rule.clause, cell: null, trust: rule.trust, facts, asks, provisional: false };
}

/** The load is heavier than any row: no size. */
export const pastTableStep = ({ id, clause, trust }: RuleEntry, facts: Facts): Step => ({
  rule: id,
  clause,
  cell: null,
  trust,
  facts: { ...facts, pastTable: true },
  asks: null,
  provisional: false,
});

import type { Facts } from '../../findings/finding.ts';
import type { SizeFound } from '../../tables/find-size.ts';
import type { RuleEntry } from '../../tables/rule-list.ts';
import type { Cell } from '../../tables/table.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import type { Step } from '../sizing-rule.ts';

/** A demand that a cell of sizes answers: the row was found by flow, by appliance or by the stack. */
export function cellStep(
  { id, clause }: RuleEntry,
  cell: Cell,
  asks: NominalSize | null,
  facts: Facts,
  smaller: Step['smaller'] = null,
): Step {
  return { rule: id, clause, cell, trust: cell.trust, facts, asks, provisional: false, smaller };
}

/** A demand that a table of flows answers, each size with what it carries in l/s. */
export function flowStep({ id, clause }: RuleEntry, found: SizeFound, facts: Facts): Step {
  const { cell, size, smaller } = found;
  return {
    rule: id,
    clause,
    cell,
    trust: cell.trust,
    facts: typeof cell.value === 'number' ? { ...facts, limitLps: cell.value } : facts,
    asks: size,
    provisional: found.provisional,
    smaller: smaller === null ? null : { size: smaller.size, limit: smaller.cell.value },
  };
}

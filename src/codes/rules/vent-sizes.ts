import { sizeForLength } from '../../tables/find-length.ts';
import type { RuleEntry } from '../../tables/rule-list.ts';
import type { Table, Trust } from '../../tables/table.ts';
import type { NominalSize, SizeSeries } from '../../units/nominal-size.ts';
import { unitsOf } from '../../units/quantity.ts';
import { coordinateMetres } from '../../units/uncertainty.ts';
import type { Role } from '../role.ts';
import type { SizingRule, Step } from '../sizing-rule.ts';
import type { PipeUse } from '../use.ts';
import { followStep, pastTableStep, tableStep } from './steps.ts';

/** Nominal bore in millimetres: inches as printed, or the DN. */
export const widthOf = ({ sizes, rank }: SizeSeries, size: NominalSize): number => sizes[rank(size)]!.lengthsMm[0]!;

/** A nominal width is met within this, millimetres: half of 1¼ in and the like are exact. */
const sameWidth = 0.1;

/** Smallest of the sizes on offer that is at least this share of another; that one itself where none is. */
export function shareOf(
  share: number,
  size: NominalSize,
  { series, sizes, omit }: { series: SizeSeries; sizes: readonly NominalSize[]; omit: ReadonlySet<NominalSize> },
): NominalSize {
  const least = widthOf(series, size) * share;
  return sizes.find((one) => !omit.has(one) && widthOf(series, one) >= least - sameWidth) ?? size;
}

/** The next size on offer above; null above the largest. */
export const nextAbove = (
  sizes: readonly NominalSize[],
  size: NominalSize,
  { rank }: SizeSeries,
  omit: ReadonlySet<NominalSize>,
): NominalSize | null => sizes.find((one) => !omit.has(one) && rank(one) > rank(size)) ?? null;

const falling: readonly Trust[] = ['published', 'cross-checked', 'memory'];
/** A demand that rests on several figures is trusted as its weakest. */
export const leastTrust = (...trusts: readonly Trust[]): Trust =>
  trusts.reduce((a, b) => (falling.indexOf(a) >= falling.indexOf(b) ? a : b));

/** Not smaller than any vent that joins it on the way to the sky. */
export const noStepDown = (rule: RuleEntry, { rank }: SizeSeries, roles: ReadonlySet<Role>): SizingRule => ({
  id: rule.id,
  reads: 'sizes',
  ask: (pipe, soFar) => {
    if (!roles.has(pipe.role) || pipe.drain !== null) return undefined;
    let largest: { size: NominalSize; from: PipeUse['pipe'] } | null = null;
    for (const from of pipe.joining) {
      const size = soFar(from);
      if (size !== null && (largest === null || rank(size) > rank(largest.size))) largest = { size, from };
    }
    return largest === null ? undefined : followStep(rule, largest.size, { fromPipe: largest.from });
  },
});

export interface StackVentTable {
  readonly table: Table;
  readonly series: SizeSeries;
  readonly omit: ReadonlySet<NominalSize>;
}

/** A vent of a stack by the stack's size, its whole load and the developed length; past the table: no size. */
export function byStackTable(
  rule: RuleEntry,
  pipe: PipeUse,
  stackSize: NominalSize,
  { table, series, omit }: StackVentTable,
): Step | undefined {
  const { vent } = pipe;
  if (vent === null || vent.length === null) return undefined;
  const facts = { stackSize, loadUnits: unitsOf(vent.load), lengthM: vent.length };
  const group = { column: 'stack', size: printedStack(table, stackSize, series) };
  const found = sizeForLength(table, 'load', vent.load, vent.length - coordinateMetres, { group, omit });
  if (found === null) return pastTableStep(rule, facts);
  return tableStep(rule, found, { ...facts, row: found.row.name }, 'm');
}

/** A stack between printed sizes takes the next larger row. */
function printedStack(table: Table, size: NominalSize, { rank }: SizeSeries): NominalSize {
  const printed = [...new Set(table.rows.flatMap((row) => row.size('stack').value ?? []))] as NominalSize[];
  return printed.filter((one) => rank(one) >= rank(size)).sort((a, b) => rank(a) - rank(b))[0] ?? size;
}

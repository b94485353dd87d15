import type { RuleEntry } from '../../tables/rule-list.ts';
import type { Cell } from '../../tables/table.ts';
import type { NominalSize, SizeSeries } from '../../units/nominal-size.ts';
import type { SizingRule } from '../sizing-rule.ts';
import type { PipeUse } from '../use.ts';
import { floorStep, followStep } from './steps.ts';

/** What carries the water of one trap is not below that trap. */
export const trapFloor = (id: string, rule: RuleEntry): SizingRule => ({
  id,
  reads: 'use',
  ask: (pipe) =>
    pipe.trap === null || pipe.portion === 'outlet'
      ? undefined
      : followStep(rule, pipe.trap, { trap: pipe.trap, demand: 'trap' }),
});

/** A drain that carries a water closet is not below the code's least for one. */
export const closetFloor = (
  rule: RuleEntry,
  least: Cell<NominalSize>,
  carries: (pipe: PipeUse) => number = ({ closets }) => closets,
): SizingRule => ({
  id: rule.id,
  reads: 'use',
  ask: (pipe) => {
    const closets = pipe.drain === null ? 0 : carries(pipe);
    return closets > 0 ? floorStep(rule, least, { closets }) : undefined;
  },
});

/** Not smaller than any drain that flows in, nor, where the code says so, than any vent that joins. */
export const noReduction = (
  rule: RuleEntry,
  { rank }: SizeSeries,
  counts: 'drains' | 'drains and vents',
): SizingRule => ({
  id: rule.id,
  reads: 'sizes',
  ask: (pipe, soFar) => {
    if (pipe.drain === null) return undefined;
    const from = [
      ...pipe.inflows.map((one) => ({ one, vent: false })),
      ...(counts === 'drains' ? [] : pipe.joining.map((one) => ({ one, vent: true }))),
    ];
    let largest: { size: NominalSize; from: PipeUse['pipe']; vent: boolean } | null = null;
    for (const { one, vent } of from) {
      const size = soFar(one);
      if (size !== null && (largest === null || rank(size) > rank(largest.size))) largest = { size, from: one, vent };
    }
    return largest === null
      ? undefined
      : followStep(rule, largest.size, {
          fromPipe: largest.from,
          ...(counts === 'drains' ? {} : { vent: largest.vent }),
        });
  },
});

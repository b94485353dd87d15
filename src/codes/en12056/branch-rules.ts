import { sizeForLoad } from '../../tables/find-size.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import { followStep } from '../rules/steps.ts';
import type { SizesSoFar, SizingRule, Step } from '../sizing-rule.ts';
import type { Tools } from '../tools.ts';
import type { PipeUse } from '../use.ts';
import { branchTable } from './branch-tables.ts';
import { flowOf } from './flow.ts';
import { cellStep } from './steps.ts';
import { isGerman, isLine, systemOf } from './system.ts';

/** Whether a branch carries more than any row of its table: it is sized as a drain then (R30). */
export type BeyondTables = (pipe: PipeUse) => boolean;

/** Sizes of branches in systems I, II and IV: R10, R13, R15, R16, and the German sums of discharge units. */
export function branchRules(tools: Tools): { readonly rules: SizingRule[]; readonly beyond: BeyondTables } {
  const { family, omit } = tools;
  const { rule, series } = family;
  const system = systemOf(tools);
  const flows = flowOf(tools);
  const follow: SizingRule[] = [
    { id: 'EN-R15', reads: 'sizes', ask: (pipe, soFar) => neverSmaller(pipe, soFar) },
    {
      id: 'EN-R15-trap',
      reads: 'use',
      ask: (pipe) =>
        pipe.trap !== null && pipe.trapStated && pipe.portion !== 'outlet'
          ? followStep(rule('EN-R15'), pipe.trap, { trap: pipe.trap })
          : undefined,
    },
  ];
  if (system === 'III') return { rules: follow, beyond: () => false };

  const tables = {
    without: branchTable(family.table('branch-unventilated'), system, tools),
    with: branchTable(family.table('branch-ventilated'), system, tools),
  };
  const tableOf = (pipe: PipeUse) => (pipe.reach?.ventilated === true ? tables.with : tables.without);
  const german = isGerman(tools) ? germanBranch(tools) : () => undefined;

  const byFlow = (pipe: PipeUse): Step | undefined => {
    if (!isLine(pipe.drain)) return undefined;
    const national = german(pipe);
    if (national !== undefined) return national;
    const { flow, facts } = flows(pipe);
    const found = tableOf(pipe).forFlow(flow);
    if (found === null) return undefined;
    const ventilated = pipe.reach?.ventilated === true;
    return cellStep(
      rule(ventilated ? 'EN-R13' : 'EN-R10'),
      found.cell,
      found.size,
      { ...facts, limitLps: found.row.amount('flow').value as number, ventilated },
      found.smaller,
    );
  };
  return {
    beyond: (pipe) =>
      isLine(pipe.drain) && german(pipe) === undefined && tableOf(pipe).forFlow(flows(pipe).flow) === null,
    rules: [
      { id: 'EN-R10', reads: 'use', ask: (pipe) => (pipe.reach?.ventilated === true ? undefined : byFlow(pipe)) },
      { id: 'EN-R13', reads: 'use', ask: (pipe) => (pipe.reach?.ventilated === true ? byFlow(pipe) : undefined) },
      { id: 'EN-R16', reads: 'use', ask: (pipe) => byClosets(pipe) },
      ...follow,
    ],
  };

  /** Water closets ask for a size by their number and how far their way turns. */
  function byClosets(pipe: PipeUse): Step | undefined {
    if (!isLine(pipe.drain) || pipe.closets === 0) return undefined;
    const turn = pipe.reach?.closetTurn ?? 0;
    if (isGerman(tools) && (pipe.counts['large-flush'] ?? 0) === 0) {
      const least = family.size('din-closet-branch');
      return cellStep(rule('EN-R16'), least, least.value, { closets: pipe.closets, turnDeg: turn, national: 'din' });
    }
    const found = tableOf(pipe).forClosets(pipe.closets, turn);
    return found === null
      ? undefined
      : cellStep(rule('EN-R16'), found.limits, found.size, { closets: pipe.closets, turnDeg: turn }, found.smaller);
  }

  /** Not smaller than any drain that flows in. */
  function neverSmaller(pipe: PipeUse, soFar: SizesSoFar): Step | undefined {
    if (pipe.drain === null) return undefined;
    let largest: { size: NominalSize; from: number } | null = null;
    for (const from of pipe.inflows) {
      const size = soFar(from);
      if (size !== null && (largest === null || series.rank(size) > series.rank(largest.size)))
        largest = { size, from };
    }
    return largest === null ? undefined : followStep(rule('EN-R15'), largest.size, { fromPipe: largest.from });
  }

  /** Collecting branches in Germany: by the sum of discharge units in the column of K; K 1.2 has none. */
  function germanBranch({ settings }: Tools): (pipe: PipeUse) => Step | undefined {
    const column = `K${(settings.K as number).toFixed(1)}`;
    const pair = { without: family.table('din-branch-unventilated'), with: family.table('din-branch-ventilated') };
    return (pipe) => {
      const ventilated = pipe.reach?.ventilated === true;
      const table = ventilated ? pair.with : pair.without;
      const plain = pipe.fixtures > 1 && pipe.statedUses.length === 0 && pipe.steady === 0;
      if (!plain || !table.columns.some(({ id }) => id === column)) return undefined;
      const found = sizeForLoad(table, column, pipe.load, omit);
      if (found.size === null) return undefined;
      const { cell, size, smaller } = found;
      const { id } = rule(ventilated ? 'EN-R13' : 'EN-R10');
      const limit = typeof cell.value === 'number' ? { limitUnits: cell.value / 60 } : {};
      return {
        rule: id,
        clause: 'DIN 1986-100',
        cell,
        trust: cell.trust,
        facts: { loadUnits: pipe.load / 60, ...limit, ventilated },
        asks: size,
        provisional: false,
        smaller:
          smaller === null
            ? null
            : { size: smaller.size, limit: typeof smaller.cell.value === 'number' ? smaller.cell.value / 60 : null },
      };
    };
  }
}

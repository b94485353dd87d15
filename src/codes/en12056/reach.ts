import { rowAtSize } from '../../tables/find-row.ts';
import { reachesSlope } from '../../tables/find-slope.ts';
import type { Amount, Row } from '../../tables/table.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import type { ShortBranchFacts } from '../plumbing-code.ts';
import type { Tools } from '../tools.ts';
import type { Way } from '../way.ts';
import { branchTable } from './branch-tables.ts';
import type { Breach } from './breach.ts';
import { flowOf } from './flow.ts';
import { isGerman, systemOf } from './system.ts';
import { applianceTables } from './system-three.ts';

/** How far a branch may reach: Tables 5 and 8, in Germany by size (R11, R13). Systems I, II and IV. */
export function reachOf(tools: Tools): (way: Way, ventilated: boolean, size: NominalSize | null) => readonly Breach[] {
  const { family } = tools;
  const { series } = family;
  const system = systemOf(tools);
  const rowOf = (table: string): Row | undefined => family.table(table).rows.find(({ name }) => name === system);
  const rows = { without: rowOf('branch-unventilated-reach'), with: rowOf('branch-ventilated-reach') };
  const byName = series.rank('DN 70' as NominalSize);
  return (way, ventilated, size) => {
    const national =
      isGerman(tools) && !ventilated && size !== null
        ? rowAtSize(family.table('din-reach'), 'size', size, 'smaller', series)
        : null;
    const row = national ?? (ventilated ? rows.with : rows.without);
    if (row === undefined) return [];
    const isLarge = national === null && size !== null && series.rank(size) > byName;
    const limits: readonly (readonly [Breach['what'], number, Amount, number])[] = [
      ['length', way.length, row.amount('longest').value, coordinate],
      ['bends', way.bends, row.amount('bends').value, turn],
      ['drop', way.drop, row.amount(isLarge ? 'dropAbove70' : 'drop').value, coordinate],
    ];
    return limits.flatMap(([what, value, limit, room]) =>
      typeof limit === 'number' && value > limit + room ? [{ what, value, limit }] : [],
    );
  };
}

/** Least gradient of a branch, m/m. */
export function leastGradient(tools: Tools): (ventilated: boolean) => number | null {
  const { family } = tools;
  const system = systemOf(tools);
  return (ventilated) => {
    const table = family.table(ventilated ? 'branch-ventilated-reach' : 'branch-unventilated-reach');
    const value = table.rows.find(({ name }) => name === system)?.amount('slope').value;
    return typeof value === 'number' ? value : null;
  };
}

/** Lengths from coordinates carry a millimetre, turns a hundredth of a bend; a limit that lies within it holds. */
const coordinate = 0.001;
const turn = 0.01;

/** A trap needs no vent where its branch is within the reach of Table 5, in system III of Table 6 (R11, R12). */
export function shortBranch(tools: Tools): (trap: ShortBranchFacts) => { rule: string; clause: string } | null {
  const { family } = tools;
  const system = systemOf(tools);
  if (system === 'III') {
    const ask = applianceTables(tools);
    const { id, clause } = family.rule('EN-R12');
    return ({ way, carried }) => {
      const found = ask(carried, way, false);
      return found !== null && found.breaches.length === 0 ? { rule: id, clause } : null;
    };
  }
  const { id, clause } = family.rule('EN-R11');
  const reach = reachOf(tools);
  const flows = flowOf(tools);
  const table = branchTable(family.table('branch-unventilated'), system, tools);
  return ({ way, carried, closetTurn }) => {
    const size = table.forBoth(flows(carried).flow, carried.closets, closetTurn)?.size ?? null;
    return reach(way, false, size).length === 0 ? { rule: id, clause } : null;
  };
}

/** A slope that is the printed one or steeper. */
export const isSteepEnough = (slope: number, uncertainty: number, least: number): boolean =>
  reachesSlope(slope + uncertainty, least);

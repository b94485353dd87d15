import { rowAtSize } from '../../tables/find-row.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import { noLoad, unitsOf } from '../../units/quantity.ts';
import type { VentLengthTo } from '../plumbing-code.ts';
import type { Role } from '../role.ts';
import { followStep } from '../rules/steps.ts';
import type { SizesSoFar, SizingRule, Step } from '../sizing-rule.ts';
import type { Tools } from '../tools.ts';
import type { PipeUse } from '../use.ts';
import { branchTable } from './branch-tables.ts';
import { boresOf } from './drain-rules.ts';
import { flowOf } from './flow.ts';
import { cellStep } from './steps.ts';
import { isGerman, systemOf } from './system.ts';

const ofStack: ReadonlySet<Role> = new Set([
  'stack-vent',
  'vent-stack',
  'vent-header',
  'yoke-vent',
  'offset-relief-vent',
]);

/** Branch vents of system III are measured to the vent they join; the others are not measured. */
export const ventLength =
  (tools: Tools) =>
  (role: Role): VentLengthTo | null =>
    systemOf(tools) === 'III' && !ofStack.has(role) ? 'stack' : null;

/** Sizes of dry vents: R22, R25, R40 to R43. */
export function ventRules(tools: Tools): SizingRule[] {
  const { family } = tools;
  const { rule, series } = family;
  const system = systemOf(tools);
  const flows = flowOf(tools);
  const secondary = family.table('stack-secondary');
  const valves = family.table('air-admittance');
  const branches = system === 'III' ? null : branchTable(family.table('branch-ventilated'), system, tools);
  const small = family.size('branch-vent-III');
  const large = family.size('branch-vent-III-large');
  const longest = family.number('branch-vent-III-length', 'length');
  const mostBends = family.number('branch-vent-III-bends', 'count');
  const share = family.number('joined-vents-share', 'share');
  const bores = boresOf(tools);
  // The table is one branch's own: where vents of several branches have met, its rows no longer count.
  const isOfBranch = ({ role, vent, drain }: PipeUse): boolean =>
    vent !== null &&
    vent.bends !== null &&
    drain === null &&
    role !== 'idle' &&
    !ofStack.has(role) &&
    vent.load > noLoad;

  /** A valve must let in so many times the flow; what it is rated for stands in no model, so it is told, not judged. */
  const valveFacts = (pipe: PipeUse, where: 'branch' | 'stack', flow: number) => {
    const factor = valves.rows.find(({ name }) => name === where)!.amount(system).value;
    return pipe.vent?.valve === true && typeof factor === 'number'
      ? { valveAirLps: Math.round(factor * flow * 100) / 100, valveClause: rule('EN-R25').clause }
      : {};
  };

  return [
    {
      id: 'EN-R22',
      reads: 'sizes',
      ask: (pipe, soFar) => {
        const stack = pipe.role === 'stack-vent' ? pipe.vent?.stack : null;
        const size = stack === null || stack === undefined ? null : soFar(stack.foot);
        if (size === null) return undefined;
        const air = valveFacts(pipe, 'stack', flows(stack!.carries).flow);
        return followStep(rule('EN-R22'), size, { stackSize: size, ...air });
      },
    },
    {
      id: 'EN-R42',
      reads: 'sizes',
      ask: (pipe, soFar) => {
        if (pipe.role !== 'vent-stack' && pipe.role !== 'yoke-vent') return undefined;
        const foot = pipe.vent?.stack?.foot ?? pipe.vent?.between?.[0];
        const size = foot === undefined ? null : soFar(foot);
        const row = size === null ? null : rowAtSize(secondary, 'size', size, 'larger', series);
        if (size === null || row === null) return undefined;
        const cell = row.size('vent');
        return cellStep(rule('EN-R42'), cell, cell.value as NominalSize, { stackSize: size });
      },
    },
    { id: 'EN-R40', reads: 'use', ask: (pipe) => (isOfBranch(pipe) ? ofBranch(pipe) : undefined) },
    {
      id: 'EN-R41',
      reads: 'use',
      ask: (pipe) => (isOfBranch(pipe) && system === 'III' ? inSystemThree(pipe) : undefined),
    },
    { id: 'EN-R43', reads: 'sizes', ask: (pipe, soFar) => joined(pipe, soFar) },
  ];

  /** The second figure of the row that the branch reads by its flow and its closets. */
  function ofBranch(pipe: PipeUse): Step | undefined {
    const vent = pipe.vent!;
    if (branches === null) return undefined;
    const { flow, facts } = flows({ ...vent, steady: 0 });
    const found = branches.forBoth(flow, vent.closets, 0);
    const told = { ...facts, closets: vent.closets, ...valveFacts(pipe, 'branch', flow) };
    const { id, clause, trust } = rule('EN-R40');
    if (found === null)
      return {
        rule: id,
        clause,
        cell: null,
        trust,
        facts: { ...told, pastTable: true },
        asks: null,
        provisional: false,
      };
    const cell = found.row.size(`vent${system}`);
    return cellStep(rule('EN-R40'), cell, cell.value as NominalSize, { ...told, branchSize: found.size });
  }

  function inSystemThree(pipe: PipeUse): Step {
    const { length, bends, load } = pipe.vent!;
    const isLong = (length ?? 0) > longest.value + coordinate || (bends ?? 0) > mostBends.value + turn;
    const cell = isLong ? large : small;
    const flow = flows({ ...pipe.vent!, steady: 0 }).flow;
    return cellStep(rule('EN-R41'), cell, cell.value, {
      loadUnits: unitsOf(load),
      lengthM: length,
      lengthMostM: longest.value,
      bends: bends === null ? null : Math.round(bends * 10) / 10,
      ...valveFacts(pipe, 'branch', flow),
    });
  }

  /** Vents that meet: not below the largest; in Germany half the sum of their areas as well. The standard says no more. */
  function joined(pipe: PipeUse, soFar: SizesSoFar): Step | undefined {
    if (pipe.drain !== null || pipe.role === 'idle') return undefined;
    const sizes = pipe.joining.flatMap((from) => soFar(from) ?? []);
    const [first, ...rest] = sizes;
    if (first === undefined || (pipe.role !== 'vent-header' && pipe.role !== 'branch-vent')) return undefined;
    const largest = rest.reduce((a, b) => series.larger(a, b), first);
    if (!isGerman(tools) || pipe.role !== 'vent-header') return followStep(rule('EN-R22'), largest, { joined: sizes });
    const area = (size: NominalSize): number => (bores.find((one) => one.size === size)?.bore ?? 0) ** 2;
    const needed = share.value * sizes.reduce((sum, size) => sum + area(size), 0);
    const wide = bores.find((one) => one.bore ** 2 >= needed)?.size ?? largest;
    return followStep(rule('EN-R43'), series.larger(wide, largest), {
      joined: sizes,
      areaMm2: Math.round((Math.PI / 4) * needed * 1e6),
    });
  }
}

const coordinate = 0.001;
const turn = 0.01;

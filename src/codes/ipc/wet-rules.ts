import { sizeForLoad } from '../../tables/find-size.ts';
import { sizeAtSlope } from '../../tables/find-slope.ts';
import { type Load, unitsOf } from '../../units/quantity.ts';
import { coordinateMetres } from '../../units/uncertainty.ts';
import type { BatteryFacts } from '../battery.ts';
import { heaviestInterval } from '../rules/branch-intervals.ts';
import { columnFacts, slopeReading } from '../rules/slopes-as-laid.ts';
import { floorStep, followStep, tableStep } from '../rules/steps.ts';
import { shareOf } from '../rules/vent-sizes.ts';
import type { SizingRule } from '../sizing-rule.ts';
import type { Tools } from '../tools.ts';
import type { PipeUse } from '../use.ts';
import { requiredDrain } from './required-drain.ts';
import { singleStackColumn } from './single-stack.ts';

/** Wet pipes that also vent: International Plumbing Code 911 to 917, rules R46, R56, R61, R65, R68, R91 and R95. */
export function wetRules(tools: Tools): SizingRule[] {
  const { family, omit, settings } = tools;
  const { rule, series } = family;
  const commonVent = family.table('common-vent');
  const wetVent = family.table('wet-vent');
  const wasteStack = family.table('waste-stack');
  const combination = family.table('combination');
  const singleStack = family.table('single-stack');
  const byLoad = family.table('branch-and-stack');
  const bySlope = family.table('drain');
  const interval = family.number('interval-least', 'length');
  const closetDrain = family.size('closet-drain');
  const ventShare = family.number('vent-share', 'share');
  const closetNear = family.number('single-stack-closet-small', 'length');
  const singleClosets = family.number('single-stack-closets', 'count');
  const assumedSlope = typeof settings.assumedSlope === 'number' ? settings.assumedSlope : null;
  const drainFor = requiredDrain(tools);
  const asLaid = slopeReading(family);

  const lineFacts = (load: Load) => ({ loadUnits: unitsOf(load) });
  const circuitOf = (pipe: PipeUse): BatteryFacts['circuit'] | null =>
    pipe.role === 'circuit-vented-branch' ? (pipe.battery?.facts.circuit ?? null) : null;

  return [
    {
      id: 'IPC-R46',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.role !== 'common-vent' || pipe.battery === null) return undefined;
        const upper = pipe.battery.facts.traps[0]!.load;
        return tableStep(rule('IPC-R46'), sizeForLoad(commonVent, 'upper', upper, omit), {
          ...lineFacts(upper),
          column: 'upper fixture',
        });
      },
    },
    {
      id: 'IPC-R56',
      reads: 'use',
      ask: (pipe) =>
        pipe.role === 'wet-vent'
          ? tableStep(rule('IPC-R56'), sizeForLoad(wetVent, 'load', pipe.load, omit), {
              ...lineFacts(pipe.load),
              closets: pipe.closets,
            })
          : undefined,
    },
    {
      id: 'IPC-R61',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.role !== 'waste-stack-vent' || pipe.stack === null) return undefined;
        const { footLoad } = pipe.stack;
        const facts = { ...lineFacts(footLoad), column: 'whole stack' };
        return tableStep(rule('IPC-R61'), sizeForLoad(wasteStack, 'total', footLoad, omit), facts);
      },
    },
    {
      id: 'IPC-R61-interval',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.role !== 'waste-stack-vent' || pipe.stack === null) return undefined;
        const heaviest = heaviestInterval(pipe.stack.allJoins, interval.value);
        return tableStep(rule('IPC-R61'), sizeForLoad(wasteStack, 'oneInterval', heaviest, omit), {
          ...lineFacts(heaviest),
          column: 'one interval',
        });
      },
    },
    {
      // One size over the whole vent section, for everything on the branch.
      id: 'IPC-R65',
      reads: 'use',
      ask: (pipe) => {
        const circuit = circuitOf(pipe);
        if (circuit === null) return undefined;
        const { load } = circuit;
        const facts = { ...lineFacts(load), column: 'whole branch' };
        if (pipe.endsAt === 'stack')
          return tableStep(rule('IPC-R65'), sizeForLoad(byLoad, 'branch', load, omit), facts);
        const slope = pipe.slope ?? assumedSlope;
        const found = sizeAtSlope(bySlope, load, slope, omit, asLaid);
        return tableStep(rule('IPC-R65'), found, {
          ...facts,
          slope,
          slopeAssumed: pipe.slope === null,
          ...columnFacts(found),
        });
      },
    },
    {
      id: 'IPC-R65-closet',
      reads: 'use',
      ask: (pipe) => {
        const closets = circuitOf(pipe)?.closets ?? 0;
        return closets > 0 ? floorStep(rule('IPC-R65'), closetDrain, { closets }) : undefined;
      },
    },
    {
      id: 'IPC-R68',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.standsIn?.as !== 'relief-vent' || pipe.battery === null) return undefined;
        const { load, closets } = pipe.battery.facts.circuit;
        const branch = drainFor(load, closets, null);
        if (branch === null) return undefined;
        const half = shareOf(ventShare.value, branch.size, { series, sizes: byLoad.sizes, omit });
        const facts = { requiredDrain: branch.size, ...lineFacts(load) };
        return { ...followStep(rule('IPC-R68'), half, facts), trust: branch.trust };
      },
    },
    {
      id: 'IPC-R91',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.role !== 'combination-waste-and-vent') return undefined;
        const column = pipe.endsAt === 'building-drain' ? 'toBuildingDrain' : 'toBranchOrStack';
        return tableStep(rule('IPC-R91'), sizeForLoad(combination, column, pipe.load, omit), {
          ...lineFacts(pipe.load),
          column: column === 'toBuildingDrain' ? 'to the building drain' : 'to a branch or stack',
        });
      },
    },
    {
      id: 'IPC-R95',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.role !== 'single-stack' || pipe.stack === null) return undefined;
        const { footLoad, rise } = pipe.stack;
        const column = singleStackColumn(rise);
        return tableStep(rule('IPC-R95'), sizeForLoad(singleStack, column.id, footLoad, omit), {
          ...lineFacts(footLoad),
          heightM: rise,
          column: column.title,
        });
      },
    },
    {
      // A 3 in branch takes one water closet, close to the stack: what is farther or more needs the next size.
      id: 'IPC-R96',
      reads: 'use',
      ask: (pipe) => {
        const row = pipe.battery?.reading === 'single-stack' && pipe.drain !== 'stack' ? pipe.battery.facts : null;
        if (row === null || pipe.closets === 0) return undefined;
        const reach = Math.max(
          ...row.traps.map(({ closet, reach: own }, at) => (closet ? (row.open?.reaches[at] ?? own) : 0)),
        );
        const near = pipe.closets === 1 && reach <= closetNear.value + coordinateMetres;
        const larger = singleStack.sizes.find((size) => series.rank(size) > series.rank(closetDrain.value));
        if (near || larger === undefined) return undefined;
        const facts = { closets: pipe.closets, toStackM: reach, toStackMostM: closetNear.value };
        return followStep(rule('IPC-R96'), larger, facts);
      },
    },
    {
      id: 'IPC-R95-closets',
      reads: 'use',
      ask: (pipe) => {
        const closets = pipe.role === 'single-stack' ? (pipe.stack?.footClosets ?? 0) : 0;
        if (closets <= singleClosets.value) return undefined;
        const larger = singleStack.sizes.find((size) => series.rank(size) > series.rank(closetDrain.value));
        return larger === undefined
          ? undefined
          : followStep(rule('IPC-R95'), larger, { closets, closetsMost: singleClosets.value });
      },
    },
  ];
}

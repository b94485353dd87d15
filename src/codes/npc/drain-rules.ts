import { oneSizeAbove } from '../../tables/find-row.ts';
import { sizeForLoad } from '../../tables/find-size.ts';
import { sizeAtSlope } from '../../tables/find-slope.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import { unitsOf } from '../../units/quantity.ts';
import { closetFloor, noReduction, trapFloor } from '../rules/drain-floors.ts';
import { floorStep, followStep, tableStep } from '../rules/steps.ts';
import type { SizingRule } from '../sizing-rule.ts';
import type { Tools } from '../tools.ts';
import type { PipeUse } from '../use.ts';
import { isPumped } from './fixtures.ts';

/** A sink of three compartments: the pipe that takes its outlets is one size larger (2.4.9.3.(2)). */
const compartments = 3;

/** Sizes of pipes that carry water: National Plumbing Code 2.4.9. and 2.4.10., rules R14 to R25. */
export function drainRules({ family, omit, settings }: Tools): SizingRule[] {
  const branch = family.table('branch');
  const stack = family.table('stack');
  const drain = family.table('drain');
  const rule = family.rule;
  const { rank } = family.series;
  const offsetLength = family.number('stack-offset-length', 'length');
  const assumedSlope = typeof settings.assumedSlope === 'number' ? settings.assumedSlope : null;
  const closetDrain = family.size('closet-drain');
  const closetsBranch = {
    count: family.number('closets-branch-count', 'count'),
    size: family.size('closets-branch-size'),
  };
  const closetsStack = { most: family.number('closets-stack-most', 'count'), size: family.size('closets-stack-size') };
  const discharge = family.size('macerator-discharge');
  const drainFloor = family.size('building-drain-least');
  const sewerFloor = { ...family.size('building-sewer-least'), value: settings.sewerFloor as NominalSize };

  const isLevelDrain = (pipe: PipeUse): boolean =>
    pipe.drain === 'branch' ||
    (pipe.drain === 'fixture-drain' && pipe.portion !== 'outlet' && !pipe.vertical && !isPumped(pipe));
  const isOffset = (pipe: PipeUse): boolean => pipe.offset !== null && pipe.offset >= offsetLength.value;
  const loadFacts = (pipe: PipeUse) => ({ loadUnits: unitsOf(pipe.load) });
  const slopeFacts = (pipe: PipeUse) => ({ slope: pipe.slope ?? assumedSlope, slopeAssumed: pipe.slope === null });

  return [
    {
      id: 'NPC-R14',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.outlet === null) return undefined;
        if (pipe.fixtures < compartments)
          return followStep(rule('NPC-R14'), pipe.outlet, { outlet: pipe.outlet, demand: 'outlet' });
        const larger = oneSizeAbove(branch, pipe.outlet, family.series, omit) ?? pipe.outlet;
        return followStep(rule('NPC-R14'), larger, {
          outlet: pipe.outlet,
          outlets: pipe.fixtures,
          demand: 'common outlet',
        });
      },
    },
    trapFloor('NPC-R14-trap', rule('NPC-R14')),
    {
      id: 'NPC-R16',
      reads: 'use',
      ask: (pipe) =>
        isLevelDrain(pipe)
          ? tableStep(rule('NPC-R16'), sizeForLoad(branch, 'load', pipe.load, omit), loadFacts(pipe))
          : undefined,
    },
    {
      id: 'NPC-R17',
      reads: 'use',
      ask: (pipe) =>
        pipe.drain === 'stack' && !isOffset(pipe)
          ? tableStep(rule('NPC-R17'), sizeForLoad(stack, 'total', pipe.load, omit), {
              ...loadFacts(pipe),
              column: 'whole stack',
            })
          : undefined,
    },
    {
      id: 'NPC-R17-storey',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.drain !== 'stack' || pipe.stack === null || isOffset(pipe)) return undefined;
        const { storey, load } = pipe.stack.heaviestStorey;
        return tableStep(rule('NPC-R17'), sizeForLoad(stack, 'oneStorey', load, omit), {
          loadUnits: unitsOf(load),
          storey,
          column: 'one storey',
        });
      },
    },
    {
      id: 'NPC-R18',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.drain !== 'stack' || !isOffset(pipe)) return undefined;
        const asBranch = sizeForLoad(branch, 'load', pipe.load, omit);
        const asDrain = sizeAtSlope(drain, pipe.load, pipe.slope ?? assumedSlope, omit);
        const facts = {
          ...loadFacts(pipe),
          ...slopeFacts(pipe),
          offsetM: pipe.offset,
          byBranchTable: asBranch.size,
          byDrainTable: asDrain.size,
          reading: settings.stackOffset as string,
        };
        if (asBranch.size === null || asDrain.size === null)
          return tableStep(rule('NPC-R18'), asBranch.size === null ? asBranch : asDrain, facts);
        const branchLarger = rank(asBranch.size) >= rank(asDrain.size);
        return tableStep(
          rule('NPC-R18'),
          (settings.stackOffset === 'larger') === branchLarger ? asBranch : asDrain,
          facts,
        );
      },
    },
    {
      id: 'NPC-R19',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.drain !== 'building-drain' && pipe.drain !== 'building-sewer') return undefined;
        if (pipe.vertical) return undefined;
        const found = sizeAtSlope(drain, pipe.load, pipe.slope ?? assumedSlope, omit);
        return tableStep(rule('NPC-R19'), found, { ...loadFacts(pipe), ...slopeFacts(pipe), columnSlope: found.slope });
      },
    },
    // Nor smaller than a vent that joins (2.4.9.1.).
    noReduction(rule('NPC-R20'), family.series, 'drains and vents'),
    closetFloor(rule('NPC-R21'), closetDrain),
    {
      id: 'NPC-R22',
      reads: 'use',
      ask: (pipe) => {
        const counts = pipe.drain === 'branch' || pipe.drain === 'building-drain' || pipe.drain === 'building-sewer';
        return counts && pipe.closets >= closetsBranch.count.value
          ? floorStep(rule('NPC-R22'), closetsBranch.size, {
              closets: pipe.closets,
              closetsMost: closetsBranch.count.value - 1,
            })
          : undefined;
      },
    },
    {
      id: 'NPC-R23',
      reads: 'use',
      ask: (pipe) =>
        pipe.drain === 'stack' && pipe.closets > closetsStack.most.value
          ? floorStep(rule('NPC-R23'), closetsStack.size, {
              closets: pipe.closets,
              closetsMost: closetsStack.most.value,
            })
          : undefined,
    },
    {
      id: 'NPC-R24',
      reads: 'use',
      ask: (pipe) => (isPumped(pipe) ? floorStep(rule('NPC-R24'), discharge, {}) : undefined),
    },
    {
      id: 'NPC-R25',
      reads: 'use',
      ask: (pipe) =>
        pipe.drain === 'building-drain'
          ? floorStep(rule('NPC-R25'), drainFloor, {})
          : pipe.drain === 'building-sewer'
            ? floorStep(rule('NPC-R25'), sewerFloor, { setting: 'sewerFloor' })
            : undefined,
    },
  ];
}

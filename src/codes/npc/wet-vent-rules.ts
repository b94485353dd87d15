import { rowAtSize } from '../../tables/find-row.ts';
import { sizeForLoad } from '../../tables/find-size.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import { unitsOf } from '../../units/quantity.ts';
import { floorStep, followStep, tableStep } from '../rules/steps.ts';
import type { SizingRule } from '../sizing-rule.ts';
import type { Tools } from '../tools.ts';

/** Wet vents, wet portions of vents, circuit-vented branches and drains that stand in: R43, R49, R50, R58, R61, R63, R69. */
export function wetVentRules({ family, omit, settings }: Tools): SizingRule[] {
  const wetVent = family.table('wet-vent');
  const branch = family.table('branch');
  const byTrap = family.table('vent-by-trap');
  const rule = family.rule;
  const { series } = family;
  const branchTrap = family.size('circuit-branch-trap');
  const branchSmall = family.size('circuit-branch-small');
  const branchLarge = family.size('circuit-branch-large');
  const additionalDrain = family.size('additional-drain');

  return [
    {
      // One size for the whole wet vent, from the load of the whole wet vent (R49, R50).
      id: 'NPC-R50',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.role !== 'wet-vent' || pipe.battery === null) return undefined;
        const { load, closets, leftOut } = pipe.battery.facts.wet;
        const column = closets > 0 ? 'withCloset' : 'noCloset';
        return tableStep(rule('NPC-R50'), sizeForLoad(wetVent, column, load, omit), {
          loadUnits: unitsOf(load),
          column: closets > 0 ? 'water closets served' : 'no water closet served',
          leftOut: leftOut.length,
          closets,
        });
      },
    },
    {
      id: 'NPC-R58',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.standsIn?.as !== 'relief-vent') return undefined;
        const { load } = pipe.standsIn;
        const facts = { loadUnits: unitsOf(load) };
        return tableStep(rule('NPC-R58'), sizeForLoad(wetVent, 'noCloset', load, omit), facts);
      },
    },
    {
      id: 'NPC-R58-branch',
      reads: 'use',
      ask: (pipe) =>
        pipe.standsIn?.as === 'relief-vent'
          ? tableStep(rule('NPC-R58'), sizeForLoad(branch, 'load', pipe.standsIn.load, omit), {
              loadUnits: unitsOf(pipe.standsIn.load),
            })
          : undefined,
    },
    {
      id: 'NPC-R58-trap',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.standsIn?.as !== 'relief-vent') return undefined;
        const cell = rowAtSize(byTrap, 'trap', pipe.standsIn.largestTrap, 'larger', series)?.size('vent');
        return cell === undefined
          ? undefined
          : {
              ...followStep(rule('NPC-R58'), cell.value as NominalSize, { trap: pipe.standsIn.largestTrap }),
              cell,
              trust: cell.trust,
            };
      },
    },
    {
      id: 'NPC-R61',
      reads: 'use',
      ask: (pipe) =>
        pipe.standsIn?.as === 'additional-circuit-vent' ? floorStep(rule('NPC-R61'), additionalDrain, {}) : undefined,
    },
    {
      id: 'NPC-R61-wet',
      reads: 'use',
      ask: (pipe) =>
        pipe.standsIn?.as === 'additional-circuit-vent'
          ? tableStep(rule('NPC-R61'), sizeForLoad(wetVent, 'noCloset', pipe.load, omit), {
              loadUnits: unitsOf(pipe.load),
            })
          : undefined,
    },
    {
      id: 'NPC-R63',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.role !== 'circuit-vented-branch' || pipe.battery === null) return undefined;
        const { traps } = pipe.battery.facts.circuit;
        const largest = traps.map(({ size }) => size).reduce((a, b) => series.larger(a, b));
        const small = series.rank(largest) < series.rank(branchTrap.value);
        return floorStep(rule('NPC-R63'), small ? branchSmall : branchLarge, { largestTrap: largest });
      },
    },
    {
      id: 'NPC-R69',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.role !== 'circuit-vent' || pipe.wetPortion === null) return undefined;
        const { load } = pipe.wetPortion;
        return tableStep(rule('NPC-R69'), sizeForLoad(wetVent, 'noCloset', load, omit), {
          loadUnits: unitsOf(load),
          mayAsk: '2 in',
        });
      },
    },
    {
      id: 'NPC-R70',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.role !== 'vent-stack' || pipe.wetPortion === null) return undefined;
        const { load, closets } = pipe.wetPortion;
        const column = closets > 0 ? 'withCloset' : 'noCloset';
        return tableStep(rule('NPC-R70'), sizeForLoad(wetVent, column, load, omit), {
          loadUnits: unitsOf(load),
          closets,
        });
      },
    },
    {
      id: 'NPC-R69-least',
      reads: 'use',
      ask: (pipe) =>
        pipe.role === 'circuit-vent' && pipe.portion === 'wet'
          ? followStep(rule('NPC-R69'), settings.leastWetPortion as NominalSize, { setting: 'leastWetPortion' })
          : undefined,
    },
  ];
}

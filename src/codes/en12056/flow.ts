import type { Facts } from '../../findings/finding.ts';
import { unitsOf } from '../../units/quantity.ts';
import type { Tools } from '../tools.ts';
import type { Carried } from '../way.ts';

/** What a pipe has to carry, l/s, and how that came about. */
export interface Flow {
  readonly flow: number;
  readonly facts: Facts;
}

export type FlowOf = (carried: Pick<Carried, 'load' | 'largest' | 'steady' | 'statedUses'>) => Flow;

/**
 * Discharge units are summed before the root is taken, steady and pumped flow comes on top in full, and no pipe carries
 * less than its largest appliance lets out (R03 to R07).
 */
export function flowOf({ settings }: Pick<Tools, 'settings'>): FlowOf {
  const frequency = settings.K as number;
  const adds = settings.mixedK === 'add';
  return ({ load, largest, steady, statedUses }) => {
    const apart = statedUses.reduce((sum, use) => sum + use.load, 0);
    const uses = [
      { frequency, units: (load - apart) / sixtieths },
      ...statedUses.map((use) => ({ frequency: use.frequency, units: unitsOf(use.load) })),
    ];
    const wastewater = adds
      ? uses.reduce((sum, use) => sum + use.frequency * Math.sqrt(use.units), 0)
      : Math.sqrt(uses.reduce((sum, use) => sum + use.frequency ** 2 * use.units, 0));
    const flow = exact(Math.max(wastewater + steady, unitsOf(largest)));
    return {
      flow,
      facts: {
        loadUnits: unitsOf(load),
        frequencyFactor: frequency,
        ...(statedUses.length === 0
          ? {}
          : {
              usesJoined: adds ? 'added' : 'in quadrature',
              otherFactors: statedUses.map((use) => `${use.frequency}`),
            }),
        wastewaterLps: exact(wastewater),
        ...(steady === 0 ? {} : { steadyLps: steady }),
        ...(flow > wastewater + steady + nothing ? { largestLps: unitsOf(largest) } : {}),
        flowLps: flow,
      },
    };
  };
}

/** A root has no end of digits: the limit itself must hold. */
const exact = (value: number): number => Number(value.toFixed(9));
const nothing = 1e-9;
const sixtieths = 60;

import { rowAtSize } from '../../tables/find-row.ts';
import { sizeForLoad } from '../../tables/find-size.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import { unitsOf } from '../../units/quantity.ts';
import { coordinateMetres } from '../../units/uncertainty.ts';
import type { VentLengthTo } from '../plumbing-code.ts';
import type { Role } from '../role.ts';
import { floorStep, followStep, tableStep } from '../rules/steps.ts';
import { leastTrust, nextAbove, noStepDown, shareOf } from '../rules/vent-sizes.ts';
import type { SizesSoFar, SizingRule, Step } from '../sizing-rule.ts';
import type { Tools } from '../tools.ts';
import type { PipeUse } from '../use.ts';
import { closetsOf } from './drain-rules.ts';

const toSky: ReadonlySet<Role> = new Set(['stack-vent', 'vent-stack', 'vent-header']);
/** Vents of tanks are no vents of traps; a yoke vent follows the stack and the vent stack that it joins. */
const notByLoad: ReadonlySet<Role> = new Set(['idle', 'unknown', 'tank-vent', 'yoke-vent']);
const growsToSky: ReadonlySet<Role> = new Set([
  'individual-vent',
  'dual-vent',
  'continuous-vent',
  'branch-vent',
  'circuit-vent',
  'relief-vent',
  'island-vent',
  'stack-vent',
  'vent-stack',
  'vent-header',
]);

/** A vent ends where it meets one that carries more; the vents of stacks are measured to open air (904.1, R57). */
export const ventLength = (role: Role): VentLengthTo | null =>
  toSky.has(role) ? 'sky' : notByLoad.has(role) ? null : 'join';

/** Sizes of dry vents: Uniform Plumbing Code 703.2, 904, 907, 911, rules R53, R55, R57 to R60, R63 and R66. */
export function ventRules({ family, omit }: Tools): SizingRule[] {
  const { rule, series } = family;
  const table = family.table('drains-and-vents');
  const share = family.number('vent-share', 'share');
  const least = family.size('vent-least');
  const closetVent = family.size('closet-vent');
  const circuitLeast = family.size('circuit-vent-least');
  const reliefLeast = family.size('relief-least');
  const level = family.number('vent-horizontal-share', 'share');
  const sizes = table.sizes.filter(
    (size) => typeof rowAtSize(table, 'size', size, 'larger', series)?.amount('vent').value === 'number',
  );

  const isVent = (pipe: PipeUse): boolean =>
    pipe.vent !== null && !notByLoad.has(pipe.role) && pipe.drain === null && pipe.portion !== 'wet';

  const groupFacts = ({ battery }: PipeUse): Step['facts'] =>
    battery === null ? {} : { loadUnits: unitsOf(battery.facts.circuit.load) };

  return [
    {
      id: 'UPC-R57',
      reads: 'use',
      ask: (pipe) =>
        isVent(pipe)
          ? tableStep(rule('UPC-R57'), sizeForLoad(table, 'vent', pipe.vent!.load, omit), {
              loadUnits: unitsOf(pipe.vent!.load),
            })
          : undefined,
    },
    {
      id: 'UPC-R58',
      reads: 'sizes',
      ask: (pipe, soFar) => {
        const drain = isVent(pipe) ? drainOf(pipe, soFar) : null;
        if (drain === null) return undefined;
        return { ...followStep(rule('UPC-R58'), halfOf(drain), { drain }), trust: share.trust };
      },
    },
    {
      id: 'UPC-R59',
      reads: 'use',
      ask: (pipe) => {
        const closets = isVent(pipe) ? closetsOf(pipe.vent!) : 0;
        return closets > 0 ? floorStep(rule('UPC-R59'), closetVent, { closets }) : undefined;
      },
    },
    {
      id: 'UPC-R53',
      reads: 'use',
      ask: (pipe) =>
        isVent(pipe) && pipe.role === 'circuit-vent'
          ? floorStep(rule('UPC-R53'), circuitLeast, groupFacts(pipe))
          : undefined,
    },
    {
      id: 'UPC-R55-vent',
      reads: 'use',
      ask: (pipe) =>
        isVent(pipe) && pipe.role === 'relief-vent'
          ? floorStep(rule('UPC-R55'), reliefLeast, groupFacts(pipe))
          : undefined,
    },
    {
      // A relief vent is sized for the group of its circuit vent, whose traps breathe elsewhere.
      id: 'UPC-R55-group',
      reads: 'use',
      ask: (pipe) => {
        if (!isVent(pipe) || pipe.role !== 'relief-vent' || pipe.battery === null) return undefined;
        const { load } = pipe.battery.facts.circuit;
        return tableStep(rule('UPC-R55'), sizeForLoad(table, 'vent', load, omit), { loadUnits: unitsOf(load) });
      },
    },
    { id: 'UPC-R60', reads: 'sizes', ask: (pipe, soFar) => byLength(pipe, soFar) },
    noStepDown(rule('UPC-R66'), series, growsToSky),
    {
      id: 'UPC-R63',
      reads: 'sizes',
      ask: (pipe, soFar) => {
        const ends = pipe.role === 'yoke-vent' ? (pipe.vent?.between ?? []) : [];
        const [stack, ventStack] = ends.flatMap((one) => soFar(one) ?? []);
        if (stack === undefined || ventStack === undefined) return undefined;
        const smaller = series.rank(stack) <= series.rank(ventStack) ? stack : ventStack;
        return followStep(rule('UPC-R63'), smaller, { smallerOfBoth: smaller });
      },
    },
  ];

  function drainOf(pipe: PipeUse, soFar: SizesSoFar): NominalSize | null {
    const drain = pipe.vent?.drain ?? null;
    return drain === null ? null : soFar(drain);
  }

  function halfOf(drain: NominalSize): NominalSize {
    return series.larger(shareOf(share.value, drain, { series, sizes, omit }), least.value);
  }

  /**
   * The least size that load and floors allow has a greatest length, a third of it level at most; one size larger over the
   * whole length has none (904.2).
   */
  function byLength(pipe: PipeUse, soFar: SizesSoFar): Step | undefined {
    const { vent } = pipe;
    if (!isVent(pipe) || vent === null || vent.length === null) return undefined;
    const byLoad = sizeForLoad(table, 'vent', vent.load, omit).size;
    if (byLoad === null) return undefined;
    const drain = drainOf(pipe, soFar);
    const floors = [
      ...(drain === null ? [] : [halfOf(drain)]),
      ...(closetsOf(vent) > 0 ? [closetVent.value] : []),
      ...(pipe.role === 'circuit-vent' ? [circuitLeast.value] : []),
      ...(pipe.role === 'relief-vent' ? [reliefLeast.value] : []),
    ];
    const smallest = floors.reduce(series.larger, byLoad);
    const cell = rowAtSize(table, 'size', smallest, 'larger', series)?.amount('ventLength');
    if (typeof cell?.value !== 'number') return undefined;
    const mostLevel = cell.value * level.value;
    const tooLong = vent.length > cell.value + coordinateMetres;
    const tooLevel = vent.level !== null && vent.level > mostLevel + coordinateMetres;
    const facts = {
      leastSize: smallest,
      lengthM: vent.length,
      lengthMostM: cell.value,
      levelM: vent.level,
      levelMostM: mostLevel,
    };
    const larger = nextAbove(sizes, smallest, series, omit);
    const asks = tooLong || tooLevel ? larger : smallest;
    if (asks === null) return { ...followStep(rule('UPC-R60'), smallest, facts), asks: null };
    const trust = leastTrust(cell.trust, tooLevel ? level.trust : cell.trust);
    return {
      ...followStep(rule('UPC-R60'), asks, { ...facts, ...(asks === smallest ? {} : { oneSizeUp: true }) }),
      trust,
    };
  }
}

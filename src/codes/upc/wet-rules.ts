import type { NominalSize } from '../../units/nominal-size.ts';
import { unitsOf } from '../../units/quantity.ts';
import type { BatteryFacts } from '../battery.ts';
import { floorStep, followStep, pastTableStep, tableStep } from '../rules/steps.ts';
import { nextAbove } from '../rules/vent-sizes.ts';
import type { SizingRule, Step } from '../sizing-rule.ts';
import type { Tools } from '../tools.ts';
import type { PipeUse } from '../use.ts';
import { closetsOf, drainSize } from './drain-rules.ts';

/** Wet pipes that also vent: Uniform Plumbing Code 908, 910 and 911, rules R43, R47, R54, R55 and R72. */
export function wetRules(tools: Tools): SizingRule[] {
  const { family, omit, settings } = tools;
  const { rule, series } = family;
  const table = family.table('drains-and-vents');
  const verticalLeast = family.size('vertical-wet-least');
  const small = { load: family.number('wet-vent-small-load', 'load'), size: family.size('wet-vent-small') };
  const large = family.size('wet-vent-large');
  const relief = family.size('relief-least');
  const noCloset = family.size('small-drain-without-closet');
  const steps = family.number('combination-steps', 'count');
  const sizeFor = drainSize(tools);
  const assumedSlope = typeof settings.assumedSlope === 'number' ? settings.assumedSlope : null;

  const above = (size: NominalSize): NominalSize => nextAbove(table.sizes, size, series, omit) ?? size;
  const circuitOf = (pipe: PipeUse): BatteryFacts['circuit'] | null =>
    pipe.role === 'circuit-vented-branch' ? (pipe.battery?.facts.circuit ?? null) : null;

  return [
    { id: 'UPC-R43', reads: 'use', ask: (pipe) => verticalWetVent(pipe) },
    {
      id: 'UPC-R47',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.role !== 'wet-vent' || pipe.battery === null || pipe.battery.facts.wet.level === 0) return undefined;
        const isSmall = pipe.load <= small.load.value;
        const limit = unitsOf(small.load.value as PipeUse['load']);
        return floorStep(rule('UPC-R47'), isSmall ? small.size : large, {
          loadUnits: unitsOf(pipe.load),
          ...(isSmall ? { limitUnits: limit } : { pastUnits: limit }),
        });
      },
    },
    {
      // One size over the whole vent section, for everything on the branch.
      id: 'UPC-R54',
      reads: 'use',
      ask: (pipe) => {
        const circuit = circuitOf(pipe);
        if (circuit === null) return undefined;
        const found = sizeFor(circuit.load, false, pipe.slope ?? assumedSlope);
        return tableStep(rule('UPC-R54'), found, { loadUnits: unitsOf(circuit.load), column: 'whole branch' });
      },
    },
    {
      id: 'UPC-R54-closet',
      reads: 'use',
      ask: (pipe) => {
        const circuit = circuitOf(pipe);
        const closets = circuit === null ? 0 : closetsOf(circuit);
        return closets > 0
          ? floorStep(rule('UPC-R54'), { ...noCloset, value: above(noCloset.value) }, { closets })
          : undefined;
      },
    },
    {
      id: 'UPC-R55',
      reads: 'use',
      ask: (pipe) =>
        pipe.standsIn?.as === 'relief-vent'
          ? floorStep(rule('UPC-R55'), relief, { loadUnits: unitsOf(pipe.standsIn.load) })
          : undefined,
    },
    {
      id: 'UPC-R72',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.role !== 'combination-waste-and-vent') return undefined;
        const found = sizeFor(pipe.load, pipe.vertical, pipe.slope ?? assumedSlope);
        const facts = { loadUnits: unitsOf(pipe.load), sizesUp: steps.value };
        if (found.size === null) return pastTableStep(rule('UPC-R72'), facts);
        const asks = Array.from({ length: steps.value }).reduce<NominalSize>((size) => above(size), found.size);
        return { ...followStep(rule('UPC-R72'), asks, { ...facts, drain: found.size }), trust: steps.trust };
      },
    },
  ];

  /** One size above the upper fixture's waste pipe, or above what the units need, whichever is larger (908.1.1). */
  function verticalWetVent(pipe: PipeUse): Step | undefined {
    if (pipe.role !== 'wet-vent' || pipe.battery === null || pipe.battery.facts.wet.level > 0) return undefined;
    const { line, traps } = pipe.battery.facts;
    const at = line.indexOf(pipe.pipe);
    const upper = traps.filter(({ place }) => place <= at).map(({ size }) => size);
    const byUnits = sizeFor(pipe.load, true, null).size;
    const facts = { loadUnits: unitsOf(pipe.load) };
    if (byUnits === null) return pastTableStep(rule('UPC-R43'), facts);
    const largest = upper.reduce((a, b) => series.larger(a, b), byUnits);
    const asks = series.larger(above(largest), verticalLeast.value);
    return {
      ...followStep(rule('UPC-R43'), asks, { ...facts, upperWaste: largest, least: verticalLeast.value }),
      trust: verticalLeast.trust,
    };
  }
}

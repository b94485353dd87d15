import { sizeForLength } from '../../tables/find-length.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import { unitsOf } from '../../units/quantity.ts';
import { coordinateMetres } from '../../units/uncertainty.ts';
import type { VentLengthTo } from '../plumbing-code.ts';
import type { Role } from '../role.ts';
import { floorStep, followStep, pastTableStep, tableStep } from '../rules/steps.ts';
import { byStackTable, leastTrust, nextAbove, noStepDown, shareOf } from '../rules/vent-sizes.ts';
import type { SizesSoFar, SizingRule, Step } from '../sizing-rule.ts';
import type { Tools } from '../tools.ts';
import type { PipeUse } from '../use.ts';
import { type RequiredDrain, requiredDrain } from './required-drain.ts';

const byStack: ReadonlySet<Role> = new Set(['stack-vent', 'vent-stack']);
/** Vents that 906.2 sizes by half the drain they serve. */
const byHalf: ReadonlySet<Role> = new Set([
  'individual-vent',
  'dual-vent',
  'continuous-vent',
  'branch-vent',
  'circuit-vent',
  'additional-circuit-vent',
  'relief-vent',
  'island-vent',
]);
const ofCircuit: ReadonlySet<Role> = new Set(['circuit-vent', 'additional-circuit-vent', 'relief-vent']);
const growsToSky: ReadonlySet<Role> = new Set([
  'branch-vent',
  'stack-vent',
  'vent-stack',
  'vent-header',
  'circuit-vent',
  'continuous-vent',
]);

/** Vents of a stack are measured to open air, the others to the next of those or to open air (906.1, 906.2, R71, R73). */
export const ventLength = (role: Role): VentLengthTo | null =>
  byStack.has(role) || role === 'vent-header' || role === 'tank-vent' ? 'sky' : byHalf.has(role) ? 'stack' : null;

const isSumpVent = ({ vent }: PipeUse): boolean => vent?.tank?.kind === 'sump';

/** What the pump of a sump puts out, l/s; null: nobody has said. */
const pumpFlow = ({ sumpPumpFlow }: Tools['settings']): number | null =>
  typeof sumpPumpFlow === 'number' ? sumpPumpFlow : null;

/** The vent of a sump whose pump is unknown has no size (906.5, R83). */
export const unsized =
  ({ settings }: Tools) =>
  (pipe: PipeUse): string | null =>
    pumpFlow(settings) === null && isSumpVent(pipe) ? 'the discharge of the sump’s pump is not stated' : null;

/** Sizes of dry vents: International Plumbing Code 904, 906 to 908, rules R57, R60, R70 to R83. */
export function ventRules(tools: Tools): SizingRule[] {
  const { family, omit, settings } = tools;
  const { rule, series } = family;
  const table = family.table('stack-vent');
  const share = family.number('vent-share', 'share');
  const stackShare = family.number('stack-vent-share', 'share');
  const least = family.size('vent-least');
  const step = family.number('vent-length-step', 'length');
  const closetDrain = family.size('closet-drain');
  const drainFor = requiredDrain(tools);
  const sumps = family.table('sump-vent');
  const pumped = pumpFlow(settings);
  const ladder = { series, sizes: table.sizes, omit };

  /** Half of a drain, not below the least vent, one size up over its whole length where it is long (906.2). */
  const halved = (id: string, pipe: PipeUse, drain: RequiredDrain, facts: Step['facts']): Step => {
    const half = series.larger(shareOf(share.value, drain.size, ladder), least.value);
    const length = pipe.vent?.length ?? null;
    const long = length !== null && length > step.value + coordinateMetres;
    const asks = long ? (nextAbove(table.sizes, half, series, omit) ?? half) : half;
    return {
      ...followStep(rule(id), asks, {
        ...facts,
        requiredDrain: drain.size,
        ...(length === null ? {} : { lengthM: length, ...(long ? { oneSizeUpPastM: step.value } : {}) }),
      }),
      trust: leastTrust(drain.trust, share.trust),
    };
  };

  return [
    {
      id: 'IPC-R72',
      reads: 'use',
      ask: (pipe) => {
        const { vent } = pipe;
        if (vent === null || !byHalf.has(pipe.role) || ofCircuit.has(pipe.role) || pipe.portion === 'wet')
          return undefined;
        const id = pipe.role === 'branch-vent' ? 'IPC-R74' : 'IPC-R72';
        const facts = { loadUnits: unitsOf(vent.load), ...(vent.closets > 0 ? { closets: vent.closets } : {}) };
        const drain = drainFor(vent.load, vent.closets, vent.largestTrap);
        return drain === null ? pastTableStep(rule(id), facts) : halved(id, pipe, drain, facts);
      },
    },
    {
      id: 'IPC-R70',
      reads: 'use',
      ask: (pipe) => {
        if (!ofCircuit.has(pipe.role) || pipe.battery === null || pipe.portion === 'wet') return undefined;
        const { load, closets } = pipe.battery.facts.circuit;
        const facts = { loadUnits: unitsOf(load), ...(closets > 0 ? { closets } : {}) };
        const drain = drainFor(load, closets, null);
        return drain === null ? pastTableStep(rule('IPC-R70'), facts) : halved('IPC-R70', pipe, drain, facts);
      },
    },
    {
      // The dry vent of a wet vent follows the largest pipe that the wet vent requires, the drains of its closets too.
      id: 'IPC-R57',
      reads: 'sizes',
      ask: (pipe, soFar) => {
        const battery = pipe.role === 'continuous-vent' ? pipe.battery : null;
        if (battery?.reading !== 'wet-vent') return undefined;
        const { line, traps } = battery.facts;
        const sizes = [
          ...line.flatMap((one) => soFar(one) ?? []),
          ...traps.map(({ size }) => size),
          ...(traps.some(({ closet }) => closet) ? [closetDrain.value] : []),
        ];
        const largest = sizes.reduce((a, b) => series.larger(a, b));
        return halved('IPC-R57', pipe, { size: largest, trust: rule('IPC-R57').trust }, { wetVent: largest });
      },
    },
    {
      id: 'IPC-R71',
      reads: 'sizes',
      ask: (pipe, soFar) => {
        const size = stackSize(pipe, soFar);
        return size === null ? undefined : byStackTable(rule('IPC-R71'), pipe, size, { table, series, omit });
      },
    },
    {
      id: 'IPC-R71-half',
      reads: 'sizes',
      ask: (pipe, soFar) => {
        const size = stackSize(pipe, soFar);
        if (size === null) return undefined;
        const half = series.larger(shareOf(stackShare.value, size, ladder), least.value);
        return {
          ...followStep(rule('IPC-R71'), half, { stackSize: size, demand: 'half the stack' }),
          trust: stackShare.trust,
        };
      },
    },
    {
      id: 'IPC-R77',
      reads: 'sizes',
      ask: (pipe, soFar) => {
        if (pipe.role !== 'vent-header') return undefined;
        const sizes = (pipe.vent?.stacks ?? []).flatMap(({ foot }) => soFar(foot) ?? []);
        const [first, ...rest] = sizes;
        if (first === undefined) return undefined;
        const largest = rest.reduce((a, b) => series.larger(a, b), first);
        return byStackTable(rule('IPC-R77'), pipe, largest, { table, series, omit });
      },
    },
    {
      // A stack that is its own vent keeps its size to open air.
      id: 'IPC-R60',
      reads: 'sizes',
      ask: (pipe, soFar) => {
        const reading = pipe.role === 'stack-vent' ? (pipe.vent?.stackReading ?? null) : null;
        const size = reading === null ? null : stackSize(pipe, soFar);
        if (size === null) return undefined;
        const id = reading === 'single-stack' ? 'IPC-R95' : 'IPC-R60';
        return followStep(rule(id), size, { stackSize: size, demand: 'as the stack' });
      },
    },
    noStepDown(rule('IPC-R74'), series, growsToSky),
    {
      id: 'IPC-R78',
      reads: 'sizes',
      ask: (pipe, soFar) => mainVent(pipe, soFar),
    },
    {
      id: 'IPC-R81',
      reads: 'sizes',
      ask: (pipe, soFar) => {
        const ventStack = pipe.role === 'yoke-vent' ? (pipe.vent?.between?.[1] ?? null) : null;
        const size = ventStack === null ? null : soFar(ventStack);
        return size === null ? undefined : followStep(rule('IPC-R81'), size, { ventStack: size });
      },
    },
    {
      id: 'IPC-R83',
      reads: 'use',
      ask: (pipe) => {
        const { vent } = pipe;
        if (pumped === null || vent?.length == null || !isSumpVent(pipe)) return undefined;
        const found = sizeForLength(sumps, 'flow', pumped, vent.length - coordinateMetres, { omit });
        const facts = { pumpLps: pumped, lengthM: vent.length };
        if (found === null) return pastTableStep(rule('IPC-R83'), facts);
        return tableStep(rule('IPC-R83'), found, { ...facts, row: found.row.name }, 'm');
      },
    },
    {
      id: 'IPC-R80',
      reads: 'sizes',
      ask: (pipe, soFar) => {
        const leader = pipe.role === 'offset-relief-vent' ? (pipe.vent?.follows ?? null) : null;
        const size = leader === null ? null : soFar(leader);
        return size === null ? undefined : followStep(rule('IPC-R80'), size, { stackVent: size });
      },
    },
  ];

  function stackSize(pipe: PipeUse, soFar: SizesSoFar): NominalSize | null {
    const foot = byStack.has(pipe.role) ? pipe.vent?.stack?.foot : undefined;
    return foot === undefined ? null : soFar(foot);
  }

  /** One vent to open air is half of the building drain: where none is, the vent of the heaviest stack becomes it. */
  function mainVent(pipe: PipeUse, soFar: SizesSoFar): Step | undefined {
    const main = pipe.mainVent;
    const drain = main === null || main.drain === null ? null : soFar(main.drain);
    if (main === null || drain === null || main.before.length > 0) return undefined;
    const asks = series.larger(shareOf(share.value, drain, ladder), least.value);
    const holds = (size: NominalSize | null): boolean => size !== null && series.rank(size) >= series.rank(asks);
    if (holds(main.drawn) || main.ways.some((way) => way !== main.own && way.every((one) => holds(soFar(one)))))
      return undefined;
    return floorStep(
      rule('IPC-R78'),
      { ...least, value: asks, trust: rule('IPC-R78').trust },
      { buildingDrain: drain },
    );
  }
}

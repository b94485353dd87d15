import { sizeForLength } from '../../tables/find-length.ts';
import { oneSizeBelow, rowAtSize } from '../../tables/find-row.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import { unitsOf } from '../../units/quantity.ts';
import { coordinateMetres } from '../../units/uncertainty.ts';
import type { VentLengthTo } from '../plumbing-code.ts';
import type { Role } from '../role.ts';
import { floorStep, followStep, pastTableStep, tableStep } from '../rules/steps.ts';
import { noStepDown, shareOf } from '../rules/vent-sizes.ts';
import type { SizesSoFar, SizingRule, Step } from '../sizing-rule.ts';
import type { Tools } from '../tools.ts';
import type { PipeUse } from '../use.ts';
import { macerators } from './fixtures.ts';

const byLength: ReadonlySet<Role> = new Set(['branch-vent', 'vent-header', 'circuit-vent', 'continuous-vent']);
const byStack: ReadonlySet<Role> = new Set(['stack-vent', 'vent-stack']);
/** Vents whose size follows another's; where traps breathe through one as well, its own load and length bind too. */
const followers: ReadonlySet<Role> = new Set([
  'relief-vent',
  'additional-circuit-vent',
  'yoke-vent',
  'offset-relief-vent',
]);
const growsToSky: ReadonlySet<Role> = new Set([
  'branch-vent',
  'stack-vent',
  'vent-stack',
  'vent-header',
  'circuit-vent',
  'continuous-vent',
]);

/** Individual and dual vents carry no length; the vents of a stack are measured to open air (R76, R77). */
export const ventLength = (role: Role, breathes: boolean): VentLengthTo | null =>
  byStack.has(role) || role === 'vent-header'
    ? 'sky'
    : byLength.has(role) || (followers.has(role) && breathes)
      ? 'stack'
      : null;

/** Sizes of dry vents: National Plumbing Code 2.5.7. and 2.5.8., rules R51, R65, R73 to R80. */
export function ventRules({ family, omit, settings }: Tools): SizingRule[] {
  const trapTable = family.table('vent-by-trap');
  const lengthTable = family.table('vent-length');
  const stackTable = family.table('stack-vent');
  const rule = family.rule;
  const { series } = family;
  const { rank } = series;
  const pumpedVent = family.size('macerator-vent');
  const reliefMost = family.size('relief-most');
  const mainVent = family.size('main-vent');
  const tank = {
    least: family.size('tank-vent-least'),
    most: family.size('tank-vent-most'),
    manhole: settings.manholeVent as NominalSize,
  };
  const stackSizes = (
    [...new Set(stackTable.rows.flatMap((row) => row.size('stack').value ?? []))] as NominalSize[]
  ).sort((a, b) => rank(a) - rank(b));
  const wetStackStoreys = family.number('wet-stack-storeys', 'count');

  const lengthRule = (pipe: PipeUse): string =>
    pipe.role === 'continuous-vent' ? 'NPC-R51' : pipe.role === 'circuit-vent' ? 'NPC-R65' : 'NPC-R76';

  return [
    {
      id: 'NPC-R75',
      reads: 'use',
      ask: (pipe) => {
        const trap = pipe.vent?.largestTrap ?? null;
        if (trap === null || pipe.role === 'idle' || pipe.portion === 'wet') return undefined;
        const cell = rowAtSize(trapTable, 'trap', trap, 'larger', series)?.size('vent');
        if (cell === undefined) return { ...followStep(rule('NPC-R75'), trap, { trap }), asks: null };
        return { ...followStep(rule('NPC-R75'), cell.value as NominalSize, { trap }), cell, trust: cell.trust };
      },
    },
    {
      id: 'NPC-R76',
      reads: 'use',
      ask: (pipe) => {
        const { vent } = pipe;
        if (vent === null || vent.length === null || pipe.portion === 'wet') return undefined;
        const asFollower = followers.has(pipe.role) && vent.load > 0;
        if (!byLength.has(pipe.role) && !asFollower) return undefined;
        const found = sizeForLength(lengthTable, 'load', vent.load, vent.length - coordinateMetres, { omit });
        const facts = { loadUnits: unitsOf(vent.load), lengthM: vent.length };
        if (found === null) return pastTableStep(rule(lengthRule(pipe)), facts);
        return tableStep(rule(lengthRule(pipe)), found, { ...facts, row: found.row.name }, 'm');
      },
    },
    {
      id: 'NPC-R77',
      reads: 'sizes',
      ask: (pipe, soFar) => {
        const { vent } = pipe;
        if (!byStack.has(pipe.role) || vent?.stack === null || vent === null || vent.length === null) return undefined;
        const size = soFar(vent.stack.foot);
        if (size === null) return undefined;
        const facts = { stackSize: size, loadUnits: unitsOf(vent.load), lengthM: vent.length };
        const found = inStackGroup(size, vent.load, vent.length - coordinateMetres);
        if (found === null) return pastTableStep(rule('NPC-R77'), facts);
        return tableStep(rule('NPC-R77'), found, { ...facts, row: found.row.name }, 'm');
      },
    },
    {
      id: 'NPC-R77-half',
      reads: 'sizes',
      ask: (pipe, soFar) => {
        if (!byStack.has(pipe.role) || pipe.vent?.stack === null || pipe.vent === null) return undefined;
        const size = soFar(pipe.vent.stack.foot);
        return size === null
          ? undefined
          : followStep(rule('NPC-R77'), shareOf(0.5, size, { series, sizes: stackTable.sizes, omit }), {
              stackSize: size,
              demand: 'half the stack',
            });
      },
    },
    {
      // The stack vent of a wet vent over many storeys keeps the wet vent's size to open air (2.5.8.4.(4)).
      id: 'NPC-R77-wet',
      reads: 'sizes',
      ask: (pipe, soFar) => {
        const wet = pipe.battery?.facts.line[0];
        if (pipe.role !== 'stack-vent' || wet === undefined) return undefined;
        const storeysServed = pipe.vent?.wetVentStoreys ?? 0;
        const size = storeysServed > wetStackStoreys.value ? soFar(wet) : null;
        return size === null
          ? undefined
          : followStep(rule('NPC-R77'), size, { wetVent: size, storeys: storeysServed, demand: 'the wet vent' });
      },
    },
    { id: 'NPC-R82', reads: 'sizes', ask: (pipe, soFar) => ofTank(pipe, soFar) },
    {
      // The sump of a macerating toilet is vented by 1½ in, however small its outlet.
      id: 'NPC-R82-pumped',
      reads: 'use',
      ask: ({ vent, role, portion }) =>
        vent === null || role === 'idle' || portion === 'wet' || (vent.counts[macerators] ?? 0) === 0
          ? undefined
          : floorStep(rule('NPC-R82'), pumpedVent, { tank: 'macerating toilet' }),
    },
    { id: 'NPC-R73', reads: 'sizes', ask: (pipe, soFar) => relief(pipe, soFar) },
    noStepDown(rule('NPC-R74'), series, growsToSky),
    {
      id: 'NPC-R78',
      reads: 'sizes',
      ask: (pipe, soFar) => {
        const main = pipe.mainVent;
        const foot = pipe.vent?.stack?.foot;
        if (main === null || foot === undefined) return undefined;
        const holds = (size: NominalSize | null): boolean => size !== null && rank(size) >= rank(mainVent.value);
        if (holds(main.drawn) || !holds(soFar(foot)) || main.before.some((one) => holds(soFar(one)))) return undefined;
        if (main.ways.some((way) => way !== main.own && way.every((one) => holds(soFar(one))))) return undefined;
        return { ...followStep(rule('NPC-R78'), mainVent.value, {}), cell: mainVent, trust: mainVent.trust };
      },
    },
    {
      id: 'NPC-R79',
      reads: 'sizes',
      ask: (pipe, soFar) => {
        const ends = pipe.role === 'yoke-vent' ? pipe.vent?.between : null;
        const sizes = (ends ?? []).flatMap((one) => soFar(one) ?? []);
        if (ends === null || ends === undefined || sizes.length < 2) return undefined;
        const smaller = sizes.reduce((a, b) => (rank(a) <= rank(b) ? a : b));
        return below('NPC-R79', smaller, { smallerOfBoth: smaller });
      },
    },
    {
      id: 'NPC-R80',
      reads: 'sizes',
      ask: (pipe, soFar) => {
        const leader = pipe.role === 'offset-relief-vent' ? pipe.vent?.follows : null;
        const size = leader === null || leader === undefined ? null : soFar(leader);
        return size === null ? undefined : below('NPC-R80', size, { stackVent: size });
      },
    },
  ];

  /** One size below the largest drain into a sump, within the printed bounds; a manhole has a size of its own (R82). */
  function ofTank(pipe: PipeUse, soFar: SizesSoFar): Step | undefined {
    const it = pipe.vent?.tank ?? null;
    if (it === null || it.kind === 'interceptor') return undefined;
    if (it.kind === 'manhole')
      return followStep(rule('NPC-R82'), tank.manhole, { tank: it.kind, setting: 'manholeVent' });
    const inlets = it.inlets.flatMap((inlet) => soFar(inlet) ?? []);
    const [first, ...rest] = inlets;
    if (first === undefined) return undefined;
    const inlet = rest.reduce((a, b) => series.larger(a, b), first);
    const below = oneSizeBelow(stackTable, inlet, series, omit) ?? inlet;
    const raised = series.larger(below, tank.least.value);
    const asks = rank(raised) > rank(tank.most.value) ? tank.most.value : raised;
    return followStep(rule('NPC-R82'), asks, { tank: it.kind, inlet, least: tank.least.value, most: tank.most.value });
  }

  /** One size below the circuit vent, never asked above the printed most (2.5.7.3.(1)); the trap's own floor is R75. */
  function relief(pipe: PipeUse, soFar: SizesSoFar): Step | undefined {
    if (pipe.role !== 'relief-vent' && pipe.role !== 'additional-circuit-vent') return undefined;
    const leader = pipe.vent?.follows ?? null;
    const circuit = leader === null ? null : soFar(leader);
    if (circuit === null) return undefined;
    const smaller = oneSizeBelow(lengthTable, circuit, series, omit) ?? circuit;
    const asks = rank(smaller) > rank(reliefMost.value) ? reliefMost.value : smaller;
    return followStep(rule('NPC-R73'), asks, { circuitVent: circuit, most: reliefMost.value });
  }

  function below(id: string, size: NominalSize, facts: Step['facts']): Step {
    return followStep(rule(id), oneSizeBelow(stackTable, size, series, omit) ?? size, facts);
  }

  /**
   * The rows of the stack's size; a stack between printed sizes takes the next larger rows, and so does one whose rows end
   * below the load: other vents that join may bring more than a stack of that size may carry.
   */
  function inStackGroup(size: NominalSize, load: number, length: number): ReturnType<typeof sizeForLength> {
    for (const stack of stackSizes.filter((one) => rank(one) >= rank(size))) {
      const found = sizeForLength(stackTable, 'load', load, length, { group: { column: 'stack', size: stack }, omit });
      if (found !== null) return found;
    }
    return null;
  }
}

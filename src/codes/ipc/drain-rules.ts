import { sizeForLoad } from '../../tables/find-size.ts';
import { type SizeAtSlope, sizeAtSlope } from '../../tables/find-slope.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import { unitsOf } from '../../units/quantity.ts';
import { branchIntervals, heaviestInterval } from '../rules/branch-intervals.ts';
import { closetFloor, noReduction, trapFloor } from '../rules/drain-floors.ts';
import { columnFacts, slopeReading } from '../rules/slopes-as-laid.ts';
import { floorStep, followStep, tableStep } from '../rules/steps.ts';
import { nextAbove, shareOf } from '../rules/vent-sizes.ts';
import type { SizingRule } from '../sizing-rule.ts';
import type { Tools } from '../tools.ts';
import type { PipeUse } from '../use.ts';

/** A vertical pipe is steeper than every column of the slope table, m/m. */
const steep = 1;

/** Clothes washers whose water passes. */
export const washers = 'washers';

/** Sizes of pipes that carry water: International Plumbing Code 704, 709, 710 and 711, rules R16 to R30 and R49. */
export function drainRules({ family, omit, settings }: Tools): SizingRule[] {
  const byLoad = family.table('branch-and-stack');
  const bySlope = family.table('drain');
  const { rule, series } = family;
  const interval = family.number('interval-least', 'length');
  const taper = family.number('stack-taper-share', 'share');
  const washer = { drain: family.size('washer-drain'), branch: family.size('washer-branch') };
  const assumedSlope = typeof settings.assumedSlope === 'number' ? settings.assumedSlope : null;
  const mostClosets = typeof settings.closetsOn3in === 'number' ? settings.closetsOn3in : null;
  const smallest = byLoad.sizes[0]!;

  /** The trap alone bounds a fixture drain that drops, and one below the smallest size of the branch table. */
  const isTrapBound = ({ drain, vertical, trap, endsAt }: PipeUse): boolean =>
    drain === 'fixture-drain' &&
    (vertical || (endsAt === 'stack' && trap !== null && series.rank(trap) < series.rank(smallest)));
  const isLine = (pipe: PipeUse): boolean =>
    (pipe.drain === 'branch' || pipe.drain === 'fixture-drain') && pipe.portion !== 'outlet' && !isTrapBound(pipe);
  const loadFacts = ({ load }: PipeUse) => ({ loadUnits: unitsOf(load) });
  const slopeFacts = ({ slope, vertical }: PipeUse) =>
    vertical ? {} : { slope: slope ?? assumedSlope, slopeAssumed: slope === null };
  const asLaid = slopeReading(family);
  const atSlope = (pipe: PipeUse): SizeAtSlope => {
    const slope = pipe.vertical ? steep : (pipe.slope ?? assumedSlope);
    // The drain of one fixture follows its trap: laid too flat, its slope is the fault.
    const own = pipe.drain === 'fixture-drain';
    return sizeAtSlope(bySlope, pipe.load, slope, omit, own ? { ...asLaid, asLaid: false } : asLaid);
  };
  const intervalsOf = (joins: NonNullable<PipeUse['stack']>['joins']) => branchIntervals(joins, interval.value);

  return [
    trapFloor('IPC-R49', rule('IPC-R49')),
    {
      id: 'IPC-R18',
      reads: 'use',
      ask: (pipe) =>
        isLine(pipe) && pipe.endsAt === 'stack'
          ? tableStep(rule('IPC-R18'), sizeForLoad(byLoad, 'branch', pipe.load, omit), loadFacts(pipe))
          : undefined,
    },
    {
      id: 'IPC-R19',
      reads: 'use',
      ask: (pipe) => {
        if (!isLine(pipe) || pipe.endsAt !== 'building-drain') return undefined;
        const found = atSlope(pipe);
        return tableStep(rule('IPC-R19'), found, { ...loadFacts(pipe), ...slopeFacts(pipe), ...columnFacts(found) });
      },
    },
    {
      id: 'IPC-R20',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.drain !== 'stack' || pipe.stack === null || pipe.offset !== null) return undefined;
        const intervals = intervalsOf(pipe.stack.allJoins).length;
        const column = intervals > 3 ? 'stackOver3' : 'stackUpTo3';
        const facts = { ...loadFacts(pipe), intervals, column: 'whole stack' };
        return tableStep(rule('IPC-R20'), sizeForLoad(byLoad, column, pipe.load, omit), facts);
      },
    },
    {
      id: 'IPC-R20-interval',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.drain !== 'stack' || pipe.stack === null || pipe.offset !== null) return undefined;
        const heaviest = heaviestInterval(pipe.stack.joins, interval.value);
        return tableStep(rule('IPC-R20'), sizeForLoad(byLoad, 'oneInterval', heaviest, omit), {
          loadUnits: unitsOf(heaviest),
          column: 'one interval',
        });
      },
    },
    {
      id: 'IPC-R21',
      reads: 'sizes',
      ask: (pipe, soFar) => {
        const size = pipe.stack !== null && pipe.stack.foot !== pipe.pipe ? soFar(pipe.stack.foot) : null;
        if (size === null || pipe.drain !== 'stack') return undefined;
        const half = shareOf(taper.value, size, { series, sizes: byLoad.sizes, omit });
        return followStep(rule('IPC-R21'), half, { stackSize: size, share: taper.value });
      },
    },
    {
      id: 'IPC-R24',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.drain !== 'stack' || pipe.offset === null || pipe.vertical) return undefined;
        const found = atSlope(pipe);
        const facts = { ...loadFacts(pipe), ...slopeFacts(pipe), ...columnFacts(found), offsetM: pipe.offset };
        return tableStep(rule('IPC-R24'), found, facts);
      },
    },
    {
      id: 'IPC-R22',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.drain !== 'building-drain' && pipe.drain !== 'building-sewer') return undefined;
        if (pipe.vertical) return undefined;
        const found = atSlope(pipe);
        return tableStep(rule('IPC-R22'), found, { ...loadFacts(pipe), ...slopeFacts(pipe), ...columnFacts(found) });
      },
    },
    noReduction(rule('IPC-R16'), series, 'drains'),
    closetFloor(rule('IPC-R23'), family.size('closet-drain')),
    {
      // Where a place counts closets on 3 in, the next size takes over.
      id: 'IPC-R23-count',
      reads: 'use',
      ask: (pipe) => {
        if (mostClosets === null || pipe.drain === null || pipe.closets <= mostClosets) return undefined;
        const larger = nextAbove(bySlope.sizes, '3 in' as NominalSize, series, omit);
        if (larger === null) return undefined;
        const facts = { closets: pipe.closets, closetsMost: mostClosets, setting: 'closetsOn3in' };
        return { ...followStep(rule('IPC-R23'), larger, facts), clause: 'local amendment' };
      },
    },
    {
      id: 'IPC-R30',
      reads: 'use',
      ask: (pipe) => {
        if (settings.washerBranch !== true || pipe.drain === null || (pipe.counts[washers] ?? 0) === 0)
          return undefined;
        if (pipe.portion === 'outlet') return undefined;
        const own = pipe.drain === 'fixture-drain';
        return floorStep(rule('IPC-R30'), own ? washer.drain : washer.branch, { washers: pipe.counts[washers]! });
      },
    },
  ];
}

import { firstThatHolds, type SizeFound, sizedRows, sizeForLoad } from '../../tables/find-size.ts';
import { reachesSlope, sizeAtSlope } from '../../tables/find-slope.ts';
import type { Amount, Cell } from '../../tables/table.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import { type Load, unitsOf } from '../../units/quantity.ts';
import { coordinateMetres } from '../../units/uncertainty.ts';
import { noReduction, trapFloor } from '../rules/drain-floors.ts';
import { columnFacts, slopeReading } from '../rules/slopes-as-laid.ts';
import { floorStep, followStep, tableStep } from '../rules/steps.ts';
import { leastTrust, nextAbove } from '../rules/vent-sizes.ts';
import type { SizingRule } from '../sizing-rule.ts';
import type { Tools } from '../tools.ts';
import type { PipeUse } from '../use.ts';
import { sixUnitTraps, wideAfterArm } from './fixtures.ts';

const threeInch = '3 in' as NominalSize;
/** Up to here Table 703.2 sizes building sewers, beyond it Table 717.1. */
const largestBySewerTable = '6 in' as NominalSize;

/** Closets, and traps that count as closets do. */
export const closetsOf = ({ closets, counts }: Pick<PipeUse, 'closets' | 'counts'>): number =>
  closets + (counts[sixUnitTraps] ?? 0);

/** Sizes a load by Table 703.2: by the pipe's own direction, and by its slope where it is level (R15, R16). */
export function drainSize(
  tools: Tools,
): (load: Load, vertical: boolean, slope: number | null, ofOneFixture?: boolean) => SizeFound {
  const { family, omit, settings } = tools;
  const table = family.table('drains-and-vents');
  const { rank } = family.series;
  const share = family.number('slope-factor', 'share');
  const full = family.number('slope-least', 'slope');
  const from = family.size('slope-approved-from');
  const approved = family.number('slope-least-approved', 'slope');
  const { share: percent } = slopeReading(family);
  return (load, vertical, slope, ofOneFixture = false) => {
    if (vertical) return sizeForLoad(table, 'vertical', load, omit);
    const flat = settings.slopeEighth === true && (slope === null || !reachesSlope(slope, full.value * percent));
    // Laid between the two slopes on approval, only the sizes stand for which it may be approved. The drain of one fixture
    // follows its trap: laid too flat, its slope is the fault.
    const asApproved = flat && !ofOneFixture && slope !== null && reachesSlope(slope, approved.value * percent);
    const candidates = sizedRows(table, omit).flatMap(({ size, row }) => {
      const cell = row.amount('horizontal');
      const large = rank(size) >= rank(from.value);
      if (asApproved && !large) return [];
      return [{ size, cell: flat && large ? scaled(cell, share) : cell, instead: null }];
    });
    return firstThatHolds(candidates, load);
  };
}

const scaled = (cell: Cell<Amount>, share: Cell<number>): Cell<Amount> =>
  typeof cell.value !== 'number'
    ? cell
    : { ...cell, value: cell.value * share.value, trust: leastTrust(cell.trust, share.trust) };

/** Sizes of pipes that carry water: Uniform Plumbing Code 702, 703, 708, 717, rules R15 to R27 and R40. */
export function drainRules(tools: Tools): SizingRule[] {
  const { family, omit, settings } = tools;
  const { rule, series } = family;
  const table = family.table('drains-and-vents');
  const sewer = family.table('sewer');
  const after = family.size('drain-after-arm');
  const noCloset = family.size('small-drain-without-closet');
  const most = family.number('closets-on-3in', 'count');
  const old = {
    vertical: family.number('closets-on-3in-vertical-old', 'count'),
    horizontal: family.number('closets-on-3in-horizontal-old', 'count'),
  };
  const assumedSlope = typeof settings.assumedSlope === 'number' ? settings.assumedSlope : null;
  const sizeFor = drainSize(tools);

  /** A drain past the trap arm, which the trap alone bounds. */
  const isDrain = ({ drain, portion, inArm }: PipeUse): boolean => drain !== null && portion !== 'outlet' && !inArm;
  const slopeOf = ({ slope }: PipeUse): number | null => slope ?? assumedSlope;
  const loadFacts = (pipe: PipeUse) => ({
    loadUnits: unitsOf(pipe.load),
    ...(pipe.vertical ? { column: 'vertical' } : { column: 'horizontal', slope: slopeOf(pipe) }),
  });
  /** The size that Table 703.2 gives a building sewer; null where that is Table 717.1's to say. */
  const bySmallTable = (pipe: PipeUse): SizeFound | null => {
    const found = sizeFor(pipe.load, pipe.vertical, slopeOf(pipe), pipe.drain === 'fixture-drain');
    const small = found.size !== null && series.rank(found.size) <= series.rank(largestBySewerTable);
    return pipe.drain !== 'building-sewer' || pipe.vertical || small ? found : null;
  };

  return [
    trapFloor('UPC-R40', rule('UPC-R40')),
    {
      id: 'UPC-R15',
      reads: 'use',
      ask: (pipe) => {
        const found = isDrain(pipe) ? bySmallTable(pipe) : null;
        return found === null ? undefined : tableStep(rule('UPC-R15'), found, loadFacts(pipe));
      },
    },
    {
      id: 'UPC-R27',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.drain !== 'building-sewer' || pipe.vertical || bySmallTable(pipe) !== null) return undefined;
        const found = sizeAtSlope(sewer, pipe.load, slopeOf(pipe), omit, slopeReading(family));
        return tableStep(rule('UPC-R27'), found, { ...loadFacts(pipe), ...columnFacts(found) });
      },
    },
    {
      id: 'UPC-R17',
      reads: 'use',
      ask: (pipe) => afterArm('UPC-R17', pipe, false),
    },
    {
      id: 'UPC-R18',
      reads: 'use',
      ask: (pipe) => afterArm('UPC-R18', pipe, true),
    },
    {
      id: 'UPC-R19',
      reads: 'use',
      ask: (pipe) => {
        const closets = isDrain(pipe) ? closetsOf(pipe) : 0;
        const least = nextAbove(table.sizes, noCloset.value, series, omit);
        return closets === 0 || least === null
          ? undefined
          : floorStep(rule('UPC-R19'), { ...noCloset, value: least }, { closets });
      },
    },
    {
      id: 'UPC-R20',
      reads: 'use',
      ask: (pipe) => {
        const closets = isDrain(pipe) ? closetsOf(pipe) : 0;
        const limit = settings.closetsOn3in === 'five' ? most : pipe.vertical ? old.vertical : old.horizontal;
        const larger = nextAbove(table.sizes, threeInch, series, omit);
        if (closets <= limit.value || larger === null) return undefined;
        return {
          ...followStep(rule('UPC-R20'), larger, { closets, closetsMost: limit.value }),
          trust: limit.trust,
        };
      },
    },
    {
      id: 'UPC-R21',
      reads: 'use',
      ask: (pipe) => {
        if (pipe.drain !== 'stack' || !pipe.vertical || pipe.stack === null) return undefined;
        const { rise } = pipe.stack;
        const candidates = sizedRows(table, omit).map(({ size, row }) => ({
          size,
          cell: row.amount('verticalLength'),
          instead: null,
        }));
        const found = firstThatHolds(candidates, rise - coordinateMetres);
        return tableStep(rule('UPC-R21'), found, { heightM: rise }, 'm');
      },
    },
    noReduction(rule('UPC-R25'), series, 'drains'),
  ];

  function afterArm(id: string, pipe: PipeUse, vertical: boolean) {
    const wide = isDrain(pipe) && pipe.vertical === vertical ? (pipe.counts[wideAfterArm] ?? 0) : 0;
    return wide > 0 ? floorStep(rule(id), after, { fixtures: wide, demand: 'after the trap arm' }) : undefined;
  }
}

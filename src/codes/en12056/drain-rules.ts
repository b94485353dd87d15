import { flowAtFill } from '../../hydraulics/drain-flow.ts';
import { colebrookWhite } from '../../hydraulics/friction.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import type { Friction } from '../plumbing-code.ts';
import type { SizingRule, Step } from '../sizing-rule.ts';
import type { Tools } from '../tools.ts';
import type { PipeUse } from '../use.ts';
import type { BeyondTables } from './branch-rules.ts';
import { flowOf } from './flow.ts';
import { cellStep } from './steps.ts';
import { isGerman } from './system.ts';

/** Sizes of level drains by Colebrook-White at their slope and filling: R30 to R32. */
export function drainRules(tools: Tools, beyond: BeyondTables): SizingRule[] {
  const { family, omit, settings } = tools;
  const { rule } = family;
  const flows = flowOf(tools);
  const { law } = friction(tools);
  const bores = boresOf(tools).filter(({ size }) => !omit.has(size));
  const assumedSlope = typeof settings.assumedSlope === 'number' ? settings.assumedSlope : null;
  const leastSlope = leastDrainSlope(tools);
  const filling = (pipe: PipeUse): number =>
    typeof settings.filling === 'number'
      ? settings.filling
      : family.number(pipe.drain === 'building-sewer' ? 'filling-outside' : 'filling-inside', 'share').value;
  const isDrain = (pipe: PipeUse): boolean =>
    pipe.drain === 'building-drain' || pipe.drain === 'building-sewer' || pipe.drain === 'stack' || beyond(pipe);
  const buried = family.size('din-buried-least');

  return [
    { id: 'EN-R30', reads: 'use', ask: (pipe) => (isDrain(pipe) && !pipe.vertical ? byFlow(pipe) : undefined) },
    {
      id: 'EN-R32',
      reads: 'use',
      ask: (pipe) =>
        isGerman(tools) && pipe.drain === 'building-sewer'
          ? cellStep(rule('EN-R32'), buried, buried.value, { national: 'din' })
          : undefined,
    },
  ];

  function byFlow(pipe: PipeUse): Step {
    const { flow, facts } = flows(pipe);
    const drawn = pipe.slope ?? assumedSlope;
    // A pipe laid too flat is a fault of its slope, not of its size.
    const slope = Math.max(drawn ?? leastSlope, leastSlope);
    const fill = filling(pipe);
    const carrying = bores.map(({ size, bore }) => ({ size, ...flowAtFill(bore, slope, fill, law) }));
    const at = carrying.findIndex((one) => one.flow >= flow);
    const found = at < 0 ? carrying.at(-1)! : carrying[at]!;
    const before = carrying[(at < 0 ? carrying.length : at) - 1];
    const { id, clause, trust } = rule('EN-R30');
    return {
      rule: id,
      clause,
      cell: null,
      trust,
      facts: {
        ...facts,
        slope,
        slopeAssumed: pipe.slope === null,
        fillingShare: fill,
        carriesLps: hundredths(found.flow),
        beyondTable: beyond(pipe),
      },
      asks: at < 0 ? null : found.size,
      provisional: false,
      smaller: before === undefined ? null : { size: before.size, limit: hundredths(before.flow) },
    };
  }
}

/** The formula of the annex with the least bores of Table 1. */
export function friction({ family }: Pick<Tools, 'family'>): Friction {
  const roughness = family.number('roughness', 'length').value;
  const bores = new Map(boresOf({ family }).map(({ size, bore }) => [size, bore]));
  return {
    law: colebrookWhite(roughness, family.number('viscosity', 'factor').value),
    name: `Colebrook-White, roughness ${roughness * 1000} mm`,
    bore: (size) => bores.get(size) ?? null,
  };
}

const hundredths = (flow: number): number => Math.round(flow * 100) / 100;

/** Nominal sizes with the least bore that may bear the name, metres, smallest first: Table 1. */
export const boresOf = ({ family }: Pick<Tools, 'family'>): readonly { size: NominalSize; bore: number }[] =>
  family.table('sizes').rows.map((row) => ({
    size: row.size('size').value as NominalSize,
    bore: row.amount('bore').value as number,
  }));

/** The annex has nothing flatter. */
export const leastDrainSlope = ({ family }: Pick<Tools, 'family'>): number =>
  family.table('drain-half-full').rows[0]!.amount('slope').value as number;

import { sizeForLoad } from '../../tables/find-size.ts';
import { followStep } from '../rules/steps.ts';
import type { SizesSoFar, SizingRule, Step } from '../sizing-rule.ts';
import type { StackUse } from '../stack-use.ts';
import type { Tools } from '../tools.ts';
import type { PipeUse } from '../use.ts';
import type { StackEntry } from '../way.ts';
import { flowOf } from './flow.ts';
import { cellStep, flowStep } from './steps.ts';
import { isGerman, systemOf } from './system.ts';

/** Sizes of stacks: one from foot to top, by the flow at the foot and how the branches come in (R20 to R24). */
export function stackRules(tools: Tools): SizingRule[] {
  const { family, omit } = tools;
  const { rule, series } = family;
  const flows = flowOf(tools);
  const primary = family.table('stack-primary');
  const secondary = family.table('stack-secondary');
  type Ask = (stack: StackUse, soFar: SizesSoFar, pipe: PipeUse) => Step | undefined;
  const ofStack = (ask: Ask) => (pipe: PipeUse, soFar: SizesSoFar) =>
    pipe.drain === 'stack' && pipe.stack !== null ? ask(pipe.stack, soFar, pipe) : undefined;

  return [
    {
      id: 'EN-R20',
      reads: 'sizes',
      ask: ofStack((stack, soFar) => (isSecondary(stack) ? undefined : byFlow(stack, soFar))),
    },
    {
      id: 'EN-R21',
      reads: 'sizes',
      ask: ofStack((stack, soFar) => (isSecondary(stack) ? byFlow(stack, soFar) : undefined)),
    },
    {
      id: 'EN-R22',
      reads: 'sizes',
      ask: ofStack((stack, soFar, { pipe }) => {
        const size = pipe === stack.foot ? null : soFar(stack.foot);
        return size === null ? undefined : followStep(rule('EN-R22'), size, { stackSize: size });
      }),
    },
    { id: 'EN-R23', reads: 'use', ask: ofStack((stack) => byClosets(stack)) },
    { id: 'EN-R20-sinks', reads: 'use', ask: ofStack((stack) => bySinks(stack)) },
  ];

  function byFlow(stack: StackUse, soFar: SizesSoFar): Step {
    const { flow, facts } = flows(stack.carries);
    const { shape, known, deciding } = entryOf(stack.entries ?? [], soFar);
    const table = isSecondary(stack) ? secondary : primary;
    return flowStep(rule(isSecondary(stack) ? 'EN-R21' : 'EN-R20'), sizeForLoad(table, shape, flow, omit), {
      ...facts,
      entries: shape,
      entriesKnown: known,
      entriesCounted: deciding,
    });
  }

  /** The least favourable of the largest branches rules: one square entry makes the stack square (R24). */
  function entryOf(entries: readonly StackEntry[], soFar: SizesSoFar): StackEntry & { deciding: number } {
    const sized = entries.map((entry) => ({ entry, rank: rankOf(soFar(entry.pipe)) }));
    const largest = Math.max(-1, ...sized.map(({ rank }) => rank));
    const full = sized.filter(({ rank }) => rank === largest).map(({ entry }) => entry);
    const square = full.filter(({ shape }) => shape === 'square');
    const ruling = square.find(({ known }) => known) ?? square[0] ?? full.find(({ known }) => !known) ?? full[0];
    // A stack that nothing enters from the side takes all its water at its top.
    return { pipe: -1 as StackEntry['pipe'], shape: 'swept', known: true, ...ruling, deciding: full.length };
  }

  function rankOf(size: ReturnType<SizesSoFar>): number {
    return size === null ? -1 : series.rank(size);
  }

  function byClosets({ carries }: StackUse): Step | undefined {
    if (carries.closets === 0) return undefined;
    if (isGerman(tools) && (carries.counts['large-flush'] ?? 0) === 0) {
      const least = family.size('din-closet-stack');
      return cellStep(rule('EN-R23'), least, least.value, { closets: carries.closets, national: 'din' });
    }
    const least = family.size(`closet-stack-${systemOf(tools)}`);
    return cellStep(rule('EN-R23'), least, least.value, { closets: carries.closets });
  }

  /** More kitchen sinks than a DN 70 stack takes in Germany want the next size. */
  function bySinks({ carries }: StackUse): Step | undefined {
    const sinks = carries.counts['kitchen-sink'] ?? 0;
    if (!isGerman(tools)) return undefined;
    const most = family.number('din-kitchen-sinks', 'count');
    if (sinks <= most.value) return undefined;
    const size = primary.sizes.find((one) => series.rank(one) > series.rank(family.size('din-kitchen-stack').value));
    return size === undefined
      ? undefined
      : cellStep(rule('EN-R20'), most, size, { kitchenSinks: sinks, kitchenSinksMost: most.value });
  }
}

/** A vent stack leaves at or below its lowest branch; one that starts higher up does not ventilate the stack's foot. */
export const isSecondary = ({ ventStack }: Pick<StackUse, 'ventStack'>): boolean =>
  ventStack === 'foot' || ventStack === 'drain';

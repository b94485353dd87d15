import { decimal, lengthText, sizeText, slopeText } from '../schedule/number-text.ts';
import type { LevelHydraulics, ResultPipe, StackHydraulics } from '../schedule/result.ts';
import { type Column, html, table } from './html-element.ts';
import type { Section } from './report-section.ts';
import type { ReportSource } from './report-source.ts';

type With<H> = Pick<ResultPipe, 'globalId' | 'required'> & { readonly hydraulics: H };

/** Physics beside the code's sizes: water in level drains, then in stacks; null where it says nothing. */
export function hydraulicsSection({ result, names }: ReportSource): Section | null {
  const level: With<LevelHydraulics>[] = [];
  const stacks: With<StackHydraulics>[] = [];
  for (const { globalId, required, hydraulics } of result.pipes) {
    if (hydraulics?.kind === 'level') level.push({ globalId, required, hydraulics });
    else if (hydraulics?.kind === 'stack') stacks.push({ globalId, required, hydraulics });
  }
  if (level.length + stacks.length === 0) return null;
  const pipe: Column<With<unknown>> = { head: 'Pipe', cell: ({ globalId }) => names.of(globalId) };
  const size: Column<With<unknown>> = { head: 'Size needed', cell: ({ required }) => sizeText(required), as: 'word' };
  return {
    id: 'water',
    title: 'Water in the drains, for information',
    parts: [
      html('p', {}, 'Physics beside the sizes that the code asks for; none of them follows from it.'),
      level.length === 0
        ? null
        : table(
            'Level drains at the size needed; a drain cleans itself at 0.6 m/s',
            [pipe, size, ...levelColumns],
            level,
          ),
      stacks.length === 0
        ? null
        : table(
            'Stacks 7/24 full, at the speed that falling water keeps (Wyly and Eaton)',
            [pipe, size, ...stackColumns],
            stacks,
          ),
    ],
  };
}

const inner = (bore: number): string => `${decimal(bore * 1000, 1)} mm`;
const litres = (flow: number): string => `${decimal(flow, 2)} l/s`;
const carries = ({ flow, speed }: { readonly flow: number; readonly speed: number }, law: string): string =>
  `${litres(flow)} at ${decimal(speed, 2)} m/s, ${law}`;
const filled = (fill: number, bore: number): string => `${decimal(fill * 100, 0)} % full, ${lengthText(fill * bore)}`;

const levelColumns: readonly Column<With<LevelHydraulics>>[] = [
  { head: 'Bore', cell: ({ hydraulics }) => inner(hydraulics.bore), as: 'number' },
  { head: 'Slope', cell: ({ hydraulics }) => slopeText(hydraulics.slope), as: 'word' },
  { head: 'Half full', cell: ({ hydraulics: { halfFull, law } }) => carries(halfFull, law) },
  { head: 'By the other law', cell: ({ hydraulics: { otherLaw } }) => carries(otherLaw, otherLaw.law) },
  {
    head: 'Cleans itself from',
    cell: ({ hydraulics: { cleansFrom, bore } }) => (cleansFrom === null ? 'at no depth' : filled(cleansFrom, bore)),
  },
  {
    head: 'At its own flow',
    cell: ({ hydraulics: { atFlow, bore } }) =>
      atFlow === undefined
        ? 'the code knows loads only'
        : atFlow === null
          ? 'it would run full'
          : `${litres(atFlow.flow)}: ${filled(atFlow.fill, bore)}, ${decimal(atFlow.speed, 2)} m/s`,
  },
];

const stackColumns: readonly Column<With<StackHydraulics>>[] = [
  { head: 'Bore', cell: ({ hydraulics }) => inner(hydraulics.bore), as: 'number' },
  { head: 'Carries', cell: ({ hydraulics }) => litres(hydraulics.flow), as: 'number' },
  { head: 'Falls at', cell: ({ hydraulics }) => `${decimal(hydraulics.speed, 2)} m/s`, as: 'number' },
  {
    head: 'Below the entry',
    cell: ({ hydraulics }) => `${decimal(hydraulics.terminalLength, 1)} m`,
    as: 'number',
  },
  {
    head: 'Its own flow fills',
    cell: ({ hydraulics: { share } }) =>
      share === undefined ? 'the code knows loads only' : `${decimal(share * 100, 0)} %`,
  },
];

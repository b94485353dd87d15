import { decimal, lengthText, sizeText, slopeText } from '../schedule/number-text.ts';
import type { LevelHydraulics, ResultHydraulics, StackHydraulics } from '../schedule/result.ts';
import { type Column, html, table } from './html-element.ts';
import type { Section } from './report-section.ts';
import type { ReportSource } from './report-source.ts';

/** Pipes of one size for which physics says the same. */
interface Alike<H> {
  readonly size: string;
  readonly hydraulics: H;
  readonly names: string[];
}

/** Physics beside the code's sizes: water in level drains, then in stacks; null where it says nothing. */
export function hydraulicsSection({ result, names }: ReportSource): Section | null {
  const level = new Map<string, Alike<LevelHydraulics>>();
  const stacks = new Map<string, Alike<StackHydraulics>>();
  for (const { globalId, required, hydraulics } of result.pipes) {
    if (hydraulics === undefined) continue;
    const size = sizeText(required);
    const name = names.short(globalId);
    if (hydraulics.kind === 'level') put(level, size, hydraulics, name);
    else put(stacks, size, hydraulics, name);
  }
  if (level.size + stacks.size === 0) return null;
  return {
    id: 'water',
    title: 'Water in the drains, for information',
    parts: [
      html('p', {}, 'Physics beside the sizes that the code asks for; none of them follows from it.'),
      level.size === 0
        ? null
        : table(
            'Level drains at the size needed; a drain cleans itself at 0.6 m/s',
            levelColumns([...level.values()]),
            [...level.values()],
          ),
      stacks.size === 0
        ? null
        : table(
            'Stacks 7/24 full, and the speed that their water reaches and keeps (Wyly and Eaton)',
            stackColumns([...stacks.values()]),
            [...stacks.values()],
          ),
    ],
  };
}

function put<H extends ResultHydraulics>(
  groups: Map<string, Alike<H>>,
  size: string,
  hydraulics: H,
  name: string,
): void {
  const key = JSON.stringify([size, hydraulics]);
  const known = groups.get(key);
  if (known === undefined) groups.set(key, { size, hydraulics, names: [name] });
  else known.names.push(name);
}

const inner = (bore: number): string => `${decimal(bore * 1000, 1)} mm`;
const litres = (flow: number): string => `${decimal(flow, 2)} l/s`;
const carries = ({ flow, speed }: { readonly flow: number; readonly speed: number }): string =>
  `${litres(flow)} at ${decimal(speed, 2)} m/s`;
const filled = (fill: number, bore: number): string =>
  `${decimal(fill * 100, 0)} % full, ${lengthText(fill * bore)} deep`;

const shared = <H extends ResultHydraulics>(): readonly Column<Alike<H>>[] => [
  { head: 'Size needed', cell: ({ size }) => size, as: 'word' },
  { head: 'Bore', cell: ({ hydraulics }) => inner(hydraulics.bore), as: 'number' },
];
const which = <H>(): Column<Alike<H>> => ({
  head: 'Pipes',
  cell: ({ names }) => `${names.length}: ${names.join(', ')}`,
});

/** The laws are the same for every pipe of a code; the last column stands where any pipe has a flow of its own. */
function levelColumns(rows: readonly Alike<LevelHydraulics>[]): readonly Column<Alike<LevelHydraulics>>[] {
  const { law, otherLaw } = rows[0]!.hydraulics;
  const own: Column<Alike<LevelHydraulics>> = {
    head: 'At its own flow',
    cell: ({ hydraulics: { atFlow, bore } }) =>
      atFlow === null
        ? 'it would run full'
        : atFlow === undefined
          ? ''
          : `${carries(atFlow)}, ${filled(atFlow.fill, bore)}`,
  };
  return [
    ...shared<LevelHydraulics>(),
    { head: 'Slope', cell: ({ hydraulics }) => slopeText(hydraulics.slope), as: 'word' },
    { head: `Half full by ${law}`, cell: ({ hydraulics }) => carries(hydraulics.halfFull) },
    { head: `by ${otherLaw.law}`, cell: ({ hydraulics }) => carries(hydraulics.otherLaw) },
    {
      head: 'Cleans itself from',
      cell: ({ hydraulics: { cleansFrom, bore } }) => (cleansFrom === null ? 'at no depth' : filled(cleansFrom, bore)),
    },
    ...(rows.some(({ hydraulics }) => hydraulics.atFlow !== undefined) ? [own] : []),
    which(),
  ];
}

function stackColumns(rows: readonly Alike<StackHydraulics>[]): readonly Column<Alike<StackHydraulics>>[] {
  const own: Column<Alike<StackHydraulics>> = {
    head: 'Its own flow fills',
    cell: ({ hydraulics: { share } }) => (share === undefined ? '' : `${decimal(share * 100, 0)} %`),
    as: 'number',
  };
  return [
    ...shared<StackHydraulics>(),
    { head: 'Carries', cell: ({ hydraulics }) => litres(hydraulics.flow), as: 'number' },
    { head: 'Falls at', cell: ({ hydraulics }) => `${decimal(hydraulics.speed, 2)} m/s`, as: 'number' },
    { head: 'Below the entry', cell: ({ hydraulics }) => `${decimal(hydraulics.terminalLength, 1)} m`, as: 'number' },
    ...(rows.some(({ hydraulics }) => hydraulics.share !== undefined) ? [own] : []),
    which(),
  ];
}

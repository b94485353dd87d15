import type { PageMargin } from '../deliver/page-data.ts';
import type { ResultPipe } from '../schedule/result.ts';

/** How much of what it could carry a pipe still takes, in steps: too much already, nothing, up to so many percent. */
export const marginSteps = ['over', '0', '10', '25', '50', 'more', 'none'] as const;
export type MarginStep = (typeof marginSteps)[number];

const limits: readonly (readonly [step: MarginStep, share: number])[] = [
  ['0', 0],
  ['10', 0.1],
  ['25', 0.25],
  ['50', 0.5],
];

/** `none`: neither load nor length decides its size, or nobody knows. */
export function marginStep(pipe: ResultPipe, margin: PageMargin | undefined): MarginStep {
  if (pipe.verdict === 'undersized') return 'over';
  const share = margin === undefined ? null : shareOf(pipe, margin);
  if (share === null) return 'none';
  return share < 0 ? 'over' : (limits.find(([, most]) => share <= most)?.[0] ?? 'more');
}

/** At the size that is drawn, else at the one that is needed; the smaller of load and length. null: neither decides. */
function shareOf({ load, ventLoad, developedLength, verdict }: ResultPipe, margin: PageMargin): number | null {
  const spare = margin.drawn ?? margin.load;
  const carried = Math.max(load.most, ventLoad?.most ?? 0);
  const shares = [
    ...(spare === null ? [] : [part(spare, carried)]),
    // How much longer a vent drawn larger than it needs may be is not known; its own size decides.
    ...(margin.length === null || developedLength === undefined || verdict === 'oversized'
      ? []
      : [part(margin.length, developedLength)]),
  ];
  return shares.length === 0 ? null : Math.min(...shares);
}

const part = (spare: number, used: number): number => (spare + used <= 0 ? spare : spare / (spare + used));

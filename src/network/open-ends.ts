import { type Finding, finding } from '../findings/finding.ts';
import { distance } from '../geometry/vector.ts';
import type { ElementId } from '../model/model.ts';
import { endPoint, type Piping } from './piping.ts';
import { fittingLength, type Proposal } from './propose-joins.ts';
import { lookAround } from './tolerance.ts';
import type { Welds } from './welds.ts';

/** Open ends that look at one gap, and what is nearest to them. */
interface Gap {
  readonly about: Set<ElementId>;
  widest: Proposal;
}

/**
 * Ends that stay open although something is near: one finding for a gap, though both its sides are open, and one for a
 * missing fitting, however many pipes it would have joined.
 */
export function openEnds(
  proposals: readonly Proposal[],
  piping: Piping,
  welds: Welds,
  stays: (node: number) => boolean,
): readonly Finding[] {
  const nearest = new Map<number, Proposal>();
  for (const proposal of proposals) {
    if (welds.isHeld(proposal.end) || !stays(proposal.end)) continue;
    const known = nearest.get(proposal.end);
    if (known === undefined || proposal.gap < known.gap) nearest.set(proposal.end, proposal);
  }
  const gaps = new Map<number, Gap>();
  for (const [end, proposal] of [...nearest].sort(([a], [b]) => a - b)) {
    const across = endAcross(end, proposal, piping);
    const open = across !== null && !welds.isHeld(across) ? across : null;
    const gap = gaps.get(end) ?? (open === null ? undefined : gaps.get(open)) ?? { about: new Set(), widest: proposal };
    if (proposal.gap > gap.widest.gap) gap.widest = proposal;
    gap.about.add(welds.elementOf(end)).add(targetOf(proposal, piping, welds));
    gaps.set(end, gap);
    if (open !== null && !gaps.has(open)) gaps.set(open, gap);
  }
  return [...new Set(gaps.values())].map(({ about, widest }) =>
    finding('open-end', [...about], { gapM: widest.gap, nearest: widest.to.is }),
  );
}

/** End of the nearest pipe at the other side of the gap; null where it is a body, or a wall far from any end. */
function endAcross(end: number, { to }: Proposal, { pipes }: Piping): number | null {
  if (to.is === 'body') return null;
  if (to.is === 'end') return to.end;
  const [own, other] = [pipes[end >> 1]!, pipes[to.pipe]!];
  if (own.axis === null || other.axis === null) return null;
  const at = endPoint(own.axis, (end & 1) as 0 | 1);
  const [first, last] = [distance(at, endPoint(other.axis, 0)), distance(at, endPoint(other.axis, 1))];
  const reach = Math.max(lookAround, fittingLength * Math.max(own.diameter, other.diameter));
  if (Math.min(first, last) > reach) return null;
  return 2 * to.pipe + (first <= last ? 0 : 1);
}

const targetOf = ({ to }: Proposal, { pipes, bodies }: Piping, welds: Welds): ElementId =>
  to.is === 'body' ? bodies[to.body]!.element : to.is === 'end' ? welds.elementOf(to.end) : pipes[to.pipe]!.element;

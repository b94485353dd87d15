import { type Finding, finding } from '../findings/finding.ts';
import { distanceToBox, grown } from '../geometry/box.ts';
import { boxGrid } from '../geometry/box-grid.ts';
import type { Identity } from '../model/identity.ts';
import type { ElementId } from '../model/model.ts';
import { bodyNode, endPoint, type Piping } from './piping.ts';
import type { Contradiction } from './port-joins.ts';
import type { Welds } from './welds.ts';

/** One note for the whole model: how many joints geometry inferred, by ground, and the widest gap it bridged. */
export function inferredJoints(welds: Welds, stays: (node: number) => boolean, habit: number): readonly Finding[] {
  const inferred = welds.all.filter(({ how, nodes }) => how !== 'ports' && stays(nodes[0]));
  if (inferred.length === 0) return [];
  const count = (ground: string): number => inferred.filter(({ how }) => how === ground).length;
  const widest = inferred.reduce((a, b) => (b.gap > a.gap ? b : a));
  return [
    finding('joint-inferred', [...widest.between], {
      joints: inferred.length,
      endToEnd: count('end-to-end'),
      endOnWall: count('end-on-wall'),
      endInFitting: count('end-in-fitting'),
      outlet: count('outlet'),
      boxContact: count('box-contact'),
      gapM: widest.gap,
      ...(habit > 0 ? { habitM: habit } : {}),
    }),
  ];
}

/**
 * What contradicts the ports, one finding for each group of elements that hang together by contradictions: a pipe drawn
 * with its ports the wrong way round is one fault, not two.
 */
export function contradictedJoints(contradictions: readonly Contradiction[]): readonly Finding[] {
  const findings: Finding[] = [];
  for (const what of ['distance', 'direction'] as const) {
    const of = contradictions.filter((it) => it.what === what);
    for (const group of grouped(of)) {
      const times = new Map<ElementId, number>();
      for (const id of group.flatMap(({ between }) => between)) times.set(id, (times.get(id) ?? 0) + 1);
      const about = [...times.keys()].sort((a, b) => times.get(b)! - times.get(a)! || a - b);
      const gap = Math.max(...group.map((it) => it.gap));
      findings.push(
        finding('joint-contradicted', about, {
          what,
          pairs: group.length,
          ...(what === 'distance' ? { gapM: gap } : {}),
        }),
      );
    }
  }
  return findings;
}

function grouped(contradictions: readonly Contradiction[]): readonly (readonly Contradiction[])[] {
  const groupOf = new Map<ElementId, Contradiction[]>();
  for (const it of contradictions) {
    const [a, b] = it.between.map((id) => groupOf.get(id));
    const merged = [...new Set([...(a ?? []), ...(b ?? []), it])];
    for (const id of merged.flatMap(({ between }) => between)) groupOf.set(id, merged);
  }
  return [...new Set(groupOf.values())];
}

/** An end farther from a fixture than this has nothing to do with it, metres. */
const nearby = 1;

/** Fixtures that nothing drains, each with the nearest free end, if one is near. */
export function unconnectedFixtures(
  identities: readonly Identity[],
  piping: Piping,
  welds: Welds,
  ends: readonly number[],
): readonly Finding[] {
  const points = ends.map((node) => endPoint(piping.pipes[node >> 1]!.axis!, (node & 1) as 0 | 1));
  const grid = boxGrid(points.map((at) => ({ min: at, max: at })));
  return piping.bodies.flatMap(({ element, box }, body) => {
    if (identities[element]!.part !== 'fixture' || welds.isHeld(bodyNode(piping, body))) return [];
    let best: { readonly end: number; readonly gap: number } | null = null;
    if (box !== null)
      grid.touching(grown(box, nearby), (i) => {
        const gap = distanceToBox(points[i]!, box);
        if (best === null || gap < best.gap) best = { end: ends[i]!, gap };
      });
    return [unconnected(element, best, welds)];
  });
}

function unconnected(element: ElementId, near: { end: number; gap: number } | null, welds: Welds): Finding {
  const about = near === null ? [element] : [element, welds.elementOf(near.end)];
  return finding('fixture-unconnected', about, { gapM: near?.gap ?? null });
}

import { type Finding, finding } from '../findings/finding.ts';
import { distanceToBox } from '../geometry/box.ts';
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

/** Fixtures that nothing drains, where the model has drains at all. */
export function unconnectedFixtures(
  identities: readonly Identity[],
  piping: Piping,
  welds: Welds,
  ends: readonly number[],
): readonly Finding[] {
  const free = ends.map((node) => ({ node, at: endPoint(piping.pipes[node >> 1]!.axis!, (node & 1) as 0 | 1) }));
  return piping.bodies.flatMap(({ element, box }, body) => {
    if (identities[element]!.part !== 'fixture' || welds.isHeld(bodyNode(piping, body))) return [];
    const near = box === null ? [] : free.map(({ node, at }) => ({ node, gap: distanceToBox(at, box) }));
    const best = near.reduce<{ node: number; gap: number } | null>(
      (a, b) => (a === null || b.gap < a.gap ? b : a),
      null,
    );
    const close = best !== null && best.gap <= 1;
    return [
      finding('fixture-unconnected', close ? [element, welds.elementOf(best.node)] : [element], {
        gapM: close ? best.gap : null,
      }),
    ];
  });
}

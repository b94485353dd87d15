import { type Finding, finding } from '../findings/finding.ts';
import { grown } from '../geometry/box.ts';
import { boxGrid } from '../geometry/box-grid.ts';
import { distance } from '../geometry/vector.ts';
import type { Identity, Part } from '../model/identity.ts';
import type { Element, ElementId, Model } from '../model/model.ts';
import type { LeftOutReason } from './left-out-reason.ts';
import { endPoint, type PipePart, type Piping } from './piping.ts';
import { freeEnds } from './settle-joins.ts';
import type { Reach } from './tolerance.ts';
import type { Welds } from './welds.ts';

/**
 * Piping that its system files elsewhere (rainwater, supply) although everything it connects to is sanitary: a run with
 * a piece of another system in its middle is a run with a wrong system, not two runs.
 */
export function misfiledByPorts(
  model: Model,
  identities: readonly Identity[],
  reasons: readonly (LeftOutReason | null)[],
): readonly ElementId[] {
  const isFiledElsewhere = (id: number): boolean => isPiping(identities[id]!.part) && bySystem(reasons[id] ?? null);
  const seen = new Set<number>();
  const found: ElementId[] = [];
  for (const { id } of model.elements) {
    if (seen.has(id) || !isFiledElsewhere(id)) continue;
    const group = [id];
    seen.add(id);
    const around = new Set<number>();
    let closed = true;
    for (let at = 0; at < group.length; at++) {
      const neighbours = neighboursOf(model.elements[group[at]!]!, model);
      if (neighbours === null) closed = false;
      for (const other of neighbours ?? []) {
        if (isFiledElsewhere(other)) {
          if (!seen.has(other)) group.push(other as ElementId);
          seen.add(other);
        } else if (reasons[other] === null) around.add(other);
        else closed = false;
      }
    }
    const drained = [...around].some((other) => {
      const { part, medium } = identities[other]!;
      return isPiping(part) && (medium === 'sanitary' || medium === 'vent');
    });
    if (closed && drained && around.size >= 2) found.push(...group);
  }
  return found.sort((a, b) => a - b);
}

const isPiping = (part: Part): boolean => part === 'pipe' || part === 'fitting' || part === 'valve';
const bySystem = (reason: LeftOutReason | null): boolean =>
  reason !== null &&
  reason !== 'answer' &&
  reason !== 'double' &&
  reason !== 'sleeve or insulation' &&
  reason !== 'file apart';

/** Elements at the other side of each port; null when a port leads nowhere or there are fewer than two. */
function neighboursOf({ ports }: Element, model: Model): readonly number[] | null {
  const found: number[] = [];
  for (const id of ports) {
    const owners = (model.ports[id]?.connected ?? []).map((other) => model.ports[other]?.owner ?? null);
    const owned = owners.filter((owner) => owner !== null);
    if (owned.length === 0) return null;
    found.push(...owned);
  }
  return ports.length < 2 ? null : found;
}

/** Two pipes of one run differ in diameter by less than this share. */
const alike = 0.35;

/**
 * The same without ports: a pipe filed elsewhere, both of whose ends meet ends of the network that are open, or fittings
 * that lack a connection.
 */
export function misfiledByPlace(
  suspects: readonly PipePart[],
  piping: Piping,
  welds: Welds,
  reach: Reach,
): readonly ElementId[] {
  const places = suspects.flatMap(({ axis }) =>
    axis === null ? [null, null] : [endPoint(axis, 0), endPoint(axis, 1)],
  );
  const grid = boxGrid(places.map((at) => at && { min: at, max: at }));
  const met = new Uint8Array(places.length);
  for (const node of freeEnds(piping, welds)) {
    const own = piping.pipes[node >> 1]!;
    const at = endPoint(own.axis!, (node & 1) as 0 | 1);
    const far = reach.ofEnd(own.diameter);
    grid.touching(grown({ min: at, max: at }, far), (i) => {
      if (distance(places[i]!, at) <= far && similar(suspects[i >> 1]!, own)) met[i] = 1;
    });
  }
  for (const [body, { part, box }] of piping.bodies.entries()) {
    if (part !== 'fitting' || box === null || welds.degree[body] !== 1) continue;
    grid.touching(grown(box, reach.ofEnd(0)), (i) => {
      met[i] = 1;
    });
  }
  const found = suspects.filter((_, i) => met[2 * i] === 1 && met[2 * i + 1] === 1);
  return found.map(({ element }) => element).sort((a, b) => a - b);
}

const similar = (a: PipePart, b: PipePart): boolean =>
  a.diameter === 0 || b.diameter === 0 || Math.abs(a.diameter - b.diameter) <= alike * Math.max(a.diameter, b.diameter);

export function misfiledFindings(
  misfiled: readonly ElementId[],
  identities: readonly Identity[],
  model: Model,
): readonly Finding[] {
  return misfiled.map((id) => {
    const system = model.elements[id]!.systems.map((at) => model.systems[at]?.name).find((name) => name);
    return finding('wrong-system', [id], {
      system: system ?? null,
      medium: identities[id]!.medium,
      expected: 'sanitary',
    });
  });
}

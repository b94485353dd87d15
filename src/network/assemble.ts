import { cutOut, polyline } from '../geometry/polyline.ts';
import { distance, type Vec3 } from '../geometry/vector.ts';
import type { ElementId, Model } from '../model/model.ts';
import { metres } from '../units/quantity.ts';
import { type Border, bordersOf } from './cut-sections.ts';
import { type Entry, jointCentre, reachTo } from './joint-centre.ts';
import type { Joint, JointGround, JointId, Pipe, PipeId } from './network.ts';
import { bodyNode, endNode, type Piping, placeOf } from './piping.ts';
import { outwardOf } from './propose-joins.ts';
import type { Weld, Welds } from './welds.ts';

export interface Assembly {
  readonly joints: readonly Joint[];
  readonly pipes: readonly Pipe[];
  readonly pipesOf: ReadonlyMap<ElementId, readonly PipeId[]>;
  readonly jointsOf: ReadonlyMap<ElementId, readonly JointId[]>;
}

/** A section before its joints have places. */
interface Section {
  readonly element: ElementId | null;
  readonly ends: readonly [number, number];
  readonly points: readonly Vec3[] | null;
  readonly length: number;
  readonly from: number;
  readonly to: number;
  readonly flow: Pipe['portFlow'];
}

/** Pipes and joints from what has been welded, for the pipes and bodies that stay. */
export function assemble(
  model: Model,
  piping: Piping,
  welds: Welds,
  flows: readonly Pipe['portFlow'][],
  stays: (node: number) => boolean,
): Assembly {
  const { bodies } = piping;
  const keys = new Map<number, number>();
  const turns: number[] = [];
  /** Joint of a node; null stands for a change of orientation, a joint of its own. */
  const jointAt = (node: number | null): number => {
    const key = node === null ? -1 - turns.push(0) : welds.root(node);
    const known = keys.get(key);
    if (known !== undefined) return known;
    keys.set(key, keys.size);
    return keys.size - 1;
  };

  const sections: Section[] = [];
  const pipesOf = new Map<ElementId, PipeId[]>();
  piping.pipes.forEach(({ element }, pipe) => {
    if (!stays(endNode(pipe, 0))) return;
    const own = sectionsOf(pipe, model, piping, welds, flows[pipe] ?? null, jointAt);
    pipesOf.set(
      element,
      own.map((section) => (sections.push(section) - 1) as PipeId),
    );
  });
  const jointsOf = new Map<ElementId, JointId[]>();
  const bodyOfJoint = new Map<number, number>();
  bodies.forEach(({ element }, body) => {
    const node = bodyNode(piping, body);
    if (!stays(node) || (welds.degree[body] === 0 && !welds.isHeld(node))) return;
    const joint = jointAt(node);
    bodyOfJoint.set(joint, body);
    jointsOf.set(element, [joint as JointId]);
  });

  const entries: Entry[][] = Array.from({ length: keys.size }, () => []);
  const pipesAt: PipeId[][] = Array.from({ length: keys.size }, () => []);
  const ends = sections.map(({ points, ends: [first, last] }) => {
    if (points === null) return null;
    const line = polyline(points);
    const pair = [0, 1].map((side) => ({
      point: points[side === 0 ? 0 : points.length - 1]!,
      outward: outwardOf(line, side as 0 | 1),
    }));
    entries[first]!.push(pair[0]!);
    entries[last]!.push(pair[1]!);
    return pair;
  });
  const centres = entries.map((at, joint) => {
    const body = bodies[bodyOfJoint.get(joint) ?? -1] ?? null;
    return jointCentre(at, body, body === null ? null : placeOf(body, model));
  });

  const pipes = sections.map((section, id): Pipe => {
    const pair = ends[id];
    const reach = section.ends.map((joint, side) => {
      const centre = centres[joint];
      return metres(pair && centre ? reachTo(centre, pair[side]!) : 0);
    });
    return {
      id: id as PipeId,
      element: section.element,
      ends: [section.ends[0] as JointId, section.ends[1] as JointId],
      length: metres(section.length),
      reach: [reach[0]!, reach[1]!],
      points: section.points,
      from: metres(section.from),
      to: metres(section.to),
      portFlow: section.flow,
    };
  });
  for (const { bodies: pair, flow } of welds.links) {
    if (!stays(bodyNode(piping, pair[0]))) continue;
    pipes.push(
      linkPipe(pipes.length, [jointAt(bodyNode(piping, pair[0])), jointAt(bodyNode(piping, pair[1]))], centres, flow),
    );
  }
  for (const {
    id,
    ends: [first, last],
  } of pipes) {
    pipesAt[first]!.push(id);
    if (last !== first) pipesAt[last]!.push(id);
  }
  const inferred = inferences(welds, jointAt, stays);
  const joints = centres.map((at, id): Joint => {
    const body = bodyOfJoint.get(id);
    return {
      id: id as JointId,
      at,
      elements: body === undefined ? [] : [bodies[body]!.element],
      pipes: pipesAt[id]!,
      inferred: inferred.get(id) ?? null,
    };
  });
  return { joints, pipes, pipesOf, jointsOf };
}

function sectionsOf(
  pipe: number,
  model: Model,
  { pipes }: Piping,
  welds: Welds,
  flow: Pipe['portFlow'],
  jointAt: (node: number | null) => number,
): Section[] {
  const { element, axis } = pipes[pipe]!;
  const ends: [number, number] = [endNode(pipe, 0), endNode(pipe, 1)];
  if (axis === null) {
    const length = model.elements[element]!.statedLength ?? 0;
    return [{ element, ends: [jointAt(ends[0]), jointAt(ends[1])], points: null, length, from: 0, to: length, flow }];
  }
  const walls = welds.wallsOn(pipe).map((node): Border => ({ at: welds.wallOf(node)!.at, node }));
  const borders = bordersOf(axis, ends, walls);
  const joints = borders.map(({ node }) => jointAt(node));
  return borders.slice(1).map((border, i) => {
    const from = borders[i]!.at;
    return {
      element,
      ends: [joints[i]!, joints[i + 1]!] as const,
      points: cutOut(axis, from, border.at),
      length: border.at - from,
      from,
      to: border.at,
      flow,
    };
  });
}

/** A stretch between two bodies that touch, from centre to centre. */
function linkPipe(
  id: number,
  ends: readonly [number, number],
  centres: readonly (Vec3 | null)[],
  flow: Pipe['portFlow'],
): Pipe {
  const [a, b] = [centres[ends[0]] ?? null, centres[ends[1]] ?? null];
  const span = a !== null && b !== null ? distance(a, b) : 0;
  return {
    id: id as PipeId,
    element: null,
    ends: [ends[0] as JointId, ends[1] as JointId],
    length: metres(span),
    reach: [metres(0), metres(0)],
    points: a !== null && b !== null && span > 0 ? [a, b] : null,
    from: metres(0),
    to: metres(span),
    portFlow: flow,
  };
}

/** What geometry inferred, by joint: the ground of the widest gap, and all that it joins. */
function inferences(
  welds: Welds,
  jointAt: (node: number) => number,
  stays: (node: number) => boolean,
): ReadonlyMap<number, NonNullable<Joint['inferred']>> {
  const at = new Map<number, Weld[]>();
  const note = (joint: number, weld: Weld): void => {
    const known = at.get(joint);
    if (known === undefined) at.set(joint, [weld]);
    else known.push(weld);
  };
  for (const weld of welds.all) {
    if (weld.how === 'ports' || !stays(weld.nodes[0])) continue;
    const [a, b] = [jointAt(weld.nodes[0]), jointAt(weld.nodes[1])];
    note(a, weld);
    if (b !== a) note(b, weld);
  }
  const found = new Map<number, NonNullable<Joint['inferred']>>();
  for (const [joint, inferred] of at) {
    const widest = inferred.reduce((a, b) => (b.gap > a.gap ? b : a));
    const between = [...new Set(inferred.flatMap((weld) => weld.between))].sort((a, b) => a - b);
    found.set(joint, { how: widest.how as JointGround, gap: metres(widest.gap), between });
  }
  return found;
}

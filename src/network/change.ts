import { polyline } from '../geometry/polyline.ts';
import type { Vec3 } from '../geometry/vector.ts';
import type { ElementId } from '../model/model.ts';
import { metres } from '../units/quantity.ts';
import { halves } from './halves.ts';
import type { Fate, Joint, JointId, Network, Pipe, PipeId } from './network.ts';

/** Where an added pipe ends: at a joint, on a pipe's wall so many metres from that pipe's end 0, or in the open. */
export type Place =
  | { readonly joint: JointId }
  | { readonly pipe: PipeId; readonly at: number }
  | { readonly open: Vec3 | null };

export interface NewPipe {
  /** An element of the (changed) model; the model must hold it. */
  readonly element: ElementId;
  readonly ends: readonly [Place, Place];
  /** From end to end; null where the model has no geometry: then `length` counts. */
  readonly points: readonly Vec3[] | null;
  /** Metres; of the points, where there are any. */
  readonly length: number;
}

/**
 * The network with one more pipe. Ids of what was there stay: a pipe that is cut keeps its id for the part at its end 0;
 * the other part, new joints and the new pipe follow at the end.
 */
export function addPipe(network: Network, added: NewPipe): { readonly network: Network; readonly pipe: PipeId } {
  const draft = draftOf(network);
  const [one, two] = added.ends;
  // Both on one pipe: the farther place is cut first, so that the nearer is still counted from end 0.
  const farther = 'pipe' in one && 'pipe' in two && one.pipe === two.pipe && two.at > one.at ? 1 : 0;
  const first = jointFor(draft, added.ends[farther]!);
  const second = jointFor(draft, added.ends[1 - farther]!);
  const ends: [JointId, JointId] = farther === 0 ? [first, second] : [second, first];
  const id = draft.pipes.length as PipeId;
  const length = added.points === null ? added.length : polyline(added.points).length;
  push(draft, {
    id,
    element: added.element,
    ends,
    length: metres(length),
    reach: [metres(0), metres(0)],
    points: added.points,
    from: metres(0),
    to: metres(length),
    portFlow: null,
  });
  draft.fates[added.element] = { use: 'pipe', reason: null };
  return { network: finished(network, draft), pipe: id };
}

/** The network with a joint at a place: one that was there, or one that cuts a pipe in two. */
export function jointAt(network: Network, place: Place): { readonly network: Network; readonly joint: JointId } {
  const draft = draftOf(network);
  const joint = jointFor(draft, place);
  return { network: finished(network, draft), joint };
}

/** The network with an element that made a joint moved to another: a trap set elsewhere. */
export function moveElement(network: Network, element: ElementId, to: JointId): Network {
  const joints = network.joints.map((joint) => {
    const others = joint.elements.filter((one) => one !== element);
    const elements = joint.id === to ? [...others, element].sort((a, b) => a - b) : others;
    return elements.length === joint.elements.length && joint.id !== to ? joint : { ...joint, elements };
  });
  return { ...network, joints, jointsOf: new Map([...network.jointsOf, [element, [to]]]) };
}

/**
 * The network without some pipes. Joints keep their ids, pipes are numbered anew in their old order; `numbers` holds the
 * new id of each old pipe, -1 for those removed. An element that lost all its pipes is left out as `removed`.
 */
export function removePipes(
  network: Network,
  removed: ReadonlySet<PipeId>,
): { readonly network: Network; readonly numbers: Int32Array } {
  const numbers = new Int32Array(network.pipes.length).fill(-1);
  const kept = network.pipes.filter(({ id }) => !removed.has(id));
  kept.forEach(({ id }, place) => {
    numbers[id] = place;
  });
  const renumbered = (ids: readonly PipeId[]): PipeId[] =>
    ids.filter((id) => numbers[id]! >= 0).map((id) => numbers[id]! as PipeId);
  const pipesOf = new Map([...network.pipesOf].map(([element, ids]) => [element, renumbered(ids)]));
  const fates = network.fates.map((fate, element) =>
    pipesOf.get(element as ElementId)?.length === 0 ? { use: 'left-out' as const, reason: 'removed' } : fate,
  );
  const changed: Network = {
    ...network,
    pipes: kept.map((pipe, place) => ({ ...pipe, id: place as PipeId })),
    joints: network.joints.map((joint) => ({ ...joint, pipes: renumbered(joint.pipes) })),
    pipesOf: new Map([...pipesOf].filter(([, ids]) => ids.length > 0)),
    fates,
  };
  return { network: changed, numbers };
}

interface Draft {
  readonly joints: Joint[];
  readonly pipes: Pipe[];
  readonly pipesOf: Map<ElementId, readonly PipeId[]>;
  readonly fates: Fate[];
}

const draftOf = ({ joints, pipes, pipesOf, fates }: Network): Draft => ({
  joints: [...joints],
  pipes: [...pipes],
  pipesOf: new Map(pipesOf),
  fates: [...fates],
});

const finished = (network: Network, draft: Draft): Network => ({ ...network, ...draft });

function jointFor(draft: Draft, place: Place): JointId {
  if ('joint' in place) return place.joint;
  if ('open' in place) return newJoint(draft, place.open);
  return cut(draft, draft.pipes[place.pipe]!, place.at);
}

function newJoint(draft: Draft, at: Vec3 | null): JointId {
  const id = draft.joints.length as JointId;
  draft.joints.push({ id, at, elements: [], pipes: [], inferred: null });
  return id;
}

/** Cuts a pipe in two; at one of its ends there is nothing to cut. */
function cut(draft: Draft, pipe: Pipe, at: number): JointId {
  if (at <= 0) return pipe.ends[0];
  if (at >= pipe.length) return pipe.ends[1];
  const joint = newJoint(draft, null);
  const { place, parts } = halves(pipe, at, joint);
  draft.pipes[pipe.id] = { ...parts[0], id: pipe.id };
  const far = draft.joints[pipe.ends[1]]!;
  // A pipe that leads back to its own joint still ends there with its other part.
  if (pipe.ends[0] !== pipe.ends[1])
    draft.joints[far.id] = { ...far, pipes: far.pipes.filter((other) => other !== pipe.id) };
  draft.joints[joint] = { ...draft.joints[joint]!, at: place, pipes: [pipe.id] };
  push(draft, { ...parts[1], id: draft.pipes.length as PipeId });
  return joint;
}

/** Adds a pipe and tells its joints and its element; an element's pipes stay in order along its axis. */
function push(draft: Draft, pipe: Pipe): void {
  draft.pipes.push(pipe);
  for (const end of new Set(pipe.ends)) {
    const joint = draft.joints[end]!;
    draft.joints[end] = { ...joint, pipes: [...joint.pipes, pipe.id] };
  }
  if (pipe.element === null) return;
  const own = [...(draft.pipesOf.get(pipe.element) ?? []), pipe.id];
  draft.pipesOf.set(
    pipe.element,
    own.sort((a, b) => draft.pipes[a]!.from - draft.pipes[b]!.from || a - b),
  );
}

import { halves } from './halves.ts';
import type { JointId, Network, Pipe, PipeId } from './network.ts';

/** Where a pipe is to be cut: metres along it from its end 0, strictly inside. */
export interface Cut {
  readonly pipe: PipeId;
  readonly at: number;
}

/** The network with pipes cut in two at given places: more sections of the same elements, joints without fittings. */
export function splitPipes(network: Network, cuts: readonly Cut[]): Network {
  if (cuts.length === 0) return network;
  const cutOf = new Map(cuts.map(({ pipe, at }) => [pipe, at]));
  const pipes: Pipe[] = [];
  const joints = network.joints.map((joint) => ({ ...joint, pipes: [] as PipeId[] }));
  const meet = (joint: JointId, pipe: PipeId): void => {
    joints[joint]!.pipes.push(pipe);
  };
  const add = (pipe: Omit<Pipe, 'id'>): PipeId => {
    const id = pipes.length as PipeId;
    pipes.push({ ...pipe, id });
    for (const end of pipe.ends) meet(end, id);
    return id;
  };
  const sections = new Map<NonNullable<Pipe['element']>, PipeId[]>();
  for (const pipe of network.pipes) {
    const at = cutOf.get(pipe.id);
    const parts = at === undefined || pipe.points === null ? [pipe] : cutAt(pipe, at);
    for (const part of parts) {
      const id = add(part);
      if (part.element !== null) sections.set(part.element, [...(sections.get(part.element) ?? []), id]);
    }
  }
  return { ...network, joints, pipes, pipesOf: sections };

  function cutAt(pipe: Pipe, at: number): readonly Omit<Pipe, 'id'>[] {
    const joint = joints.length as JointId;
    const { place, parts } = halves(pipe, at, joint);
    joints.push({ id: joint, at: place, elements: [], pipes: [], inferred: null });
    return parts;
  }
}

import { distance, type Vec3 } from '../geometry/vector.ts';
import { metres } from '../units/quantity.ts';
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
    const parts = at === undefined || pipe.points === null ? [pipe] : halves(pipe, pipe.points, at);
    for (const part of parts) {
      const id = add(part);
      if (part.element !== null) sections.set(part.element, [...(sections.get(part.element) ?? []), id]);
    }
  }
  return { ...network, joints, pipes, pipesOf: sections };

  function halves(pipe: Pipe, points: readonly Vec3[], at: number): Omit<Pipe, 'id'>[] {
    const { place, before, after } = cutLine(points, at);
    const joint = joints.length as JointId;
    joints.push({ id: joint, at: place, elements: [], pipes: [], inferred: null });
    const [a, b] = pipe.ends;
    const middle = metres(pipe.from + at * Math.sign(pipe.to - pipe.from || 1));
    const none = metres(0);
    return [
      { ...pipe, ends: [a, joint], points: before, length: metres(at), reach: [pipe.reach[0], none], to: middle },
      {
        ...pipe,
        ends: [joint, b],
        points: after,
        length: metres(pipe.length - at),
        reach: [none, pipe.reach[1]],
        from: middle,
      },
    ];
  }
}

function cutLine(points: readonly Vec3[], at: number): { place: Vec3; before: Vec3[]; after: Vec3[] } {
  let walked = 0;
  for (let index = 1; index < points.length; index++) {
    const [a, b] = [points[index - 1]!, points[index]!];
    const step = distance(a, b);
    if (walked + step >= at) {
      const share = step === 0 ? 0 : (at - walked) / step;
      const place: Vec3 = [a[0] + (b[0] - a[0]) * share, a[1] + (b[1] - a[1]) * share, a[2] + (b[2] - a[2]) * share];
      return { place, before: [...points.slice(0, index), place], after: [place, ...points.slice(index)] };
    }
    walked += step;
  }
  return { place: points.at(-1)!, before: [...points], after: [points.at(-1)!] };
}

import type { Vec3 } from '../geometry/vector.ts';
import type { JointId, PipeId } from '../network/network.ts';
import { otherEnd } from '../network/other-end.ts';
import type { RiserSource } from './riser-source.ts';

/**
 * Where each joint of these pipes stands on a drawing. As the model has it; a piece for which the model gives hardly
 * any place is laid out by its order instead: one step a pipe from the sewer end, branches side by side, vents upward.
 */
export function riserPlaces(source: RiserSource, pipes: readonly PipeId[]): (joint: JointId) => Vec3 | null {
  const { network } = source;
  const joints = new Set(pipes.flatMap((id) => network.pipes[id]!.ends));
  const known = [...joints].filter((joint) => network.joints[joint]!.at !== null);
  if (known.length * 2 > joints.size) return (joint) => network.joints[joint]!.at;
  const places = laidOut(source, pipes);
  return (joint) => places.get(joint) ?? null;
}

const step = 1;

function laidOut({ network, paths }: RiserSource, pipes: readonly PipeId[]): ReadonlyMap<JointId, Vec3> {
  const inside = new Set(pipes);
  const places = new Map<JointId, Vec3>();
  let leaf = 0;
  /** Places what lies beyond a joint, away from the sewer; the joint itself stands in the middle of its branches. */
  const place = (joint: JointId, depth: number, up: number, from: PipeId | null): number => {
    places.set(joint, [0, 0, 0]);
    const rows: number[] = [];
    for (const pipe of network.joints[joint]!.pipes) {
      if (pipe === from || !inside.has(pipe)) continue;
      const beyond = otherEnd(network, pipe, joint);
      if (places.has(beyond)) continue;
      const dry = paths.wet[pipe] !== true;
      rows.push(place(beyond, dry ? depth : depth + step, dry ? up + step : up, pipe));
    }
    const row = rows.length === 0 ? leaf++ : (rows[0]! + rows.at(-1)!) / 2;
    places.set(joint, [-depth, row * step, up]);
    return row;
  };
  const ends = paths.systems
    .map(({ sewerEnd }) => sewerEnd)
    .filter((joint) => network.joints[joint]!.pipes.some((id) => inside.has(id)));
  for (const joint of [...ends, ...pipes.flatMap((id) => network.pipes[id]!.ends)])
    if (!places.has(joint)) place(joint, 0, 0, null);
  return places;
}

import type { JointId, Network, PipeId } from './network.ts';

/** The joint at the end of a pipe that a walker comes to from the joint at its other end. */
export function otherEnd({ pipes }: Pick<Network, 'pipes'>, pipe: PipeId, joint: JointId): JointId {
  const [a, b] = pipes[pipe]!.ends;
  return a === joint ? b : a;
}

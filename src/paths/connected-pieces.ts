import type { JointId, Network, PipeId } from '../network/network.ts';

export interface Piece {
  readonly joints: readonly JointId[];
  readonly pipes: readonly PipeId[];
}

/** Joints and pipes that hang together, by lowest joint. */
export function connectedPieces(network: Network): Piece[] {
  const seen = new Uint8Array(network.joints.length);
  const pieces: Piece[] = [];
  for (const { id } of network.joints) {
    if (seen[id]) continue;
    const joints: JointId[] = [id];
    const pipes = new Set<PipeId>();
    seen[id] = 1;
    for (let at = 0; at < joints.length; at++) {
      for (const pipe of network.joints[joints[at]!]!.pipes) {
        pipes.add(pipe);
        for (const end of network.pipes[pipe]!.ends) {
          if (seen[end]) continue;
          seen[end] = 1;
          joints.push(end);
        }
      }
    }
    pieces.push({ joints: joints.sort((a, b) => a - b), pipes: [...pipes].sort((a, b) => a - b) });
  }
  return pieces;
}

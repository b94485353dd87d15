import type { JointId, Network, PipeId } from '../network/network.ts';
import { otherEnd } from '../network/other-end.ts';

/** Who flows in and out at each joint, and the ends of each pipe seen with the flow. */
export interface Stream {
  /** Wet pipes that flow into a joint, by pipe id. By joint id. */
  readonly inflows: readonly (readonly PipeId[])[];
  /** Wet pipe that leaves a joint; null at the sewer end and at dry joints. By joint id. */
  readonly outflow: readonly (PipeId | null)[];
  /** Dry pipes at a joint, by pipe id. By joint id. */
  readonly dry: readonly (readonly PipeId[])[];
  up(pipe: PipeId): JointId;
  down(pipe: PipeId): JointId;
  /** Developed length of a pipe with its halves of the fittings at both ends, metres. */
  span(pipe: PipeId): number;
}

/** By pipe id: which pipes carry water, and the joint downstream of a wet one, skyward of a dry one. */
interface Flow {
  readonly wet: readonly boolean[];
  readonly toward: readonly (JointId | null)[];
}

export function streamOf(network: Network, { wet, toward }: Flow): Stream {
  const inflows: PipeId[][] = network.joints.map(() => []);
  const outflow: (PipeId | null)[] = network.joints.map(() => null);
  const dry: PipeId[][] = network.joints.map(() => []);
  const down = (pipe: PipeId): JointId => toward[pipe] ?? network.pipes[pipe]!.ends[1];
  const up = (pipe: PipeId): JointId => otherEnd(network, pipe, down(pipe));
  for (const { id, ends } of network.pipes) {
    if (wet[id]) {
      inflows[down(id)]!.push(id);
      outflow[up(id)] = id;
    } else {
      for (const end of ends) dry[end]!.push(id);
    }
  }
  const span = (pipe: PipeId): number => {
    const { length, reach } = network.pipes[pipe]!;
    return length + reach[0] + reach[1];
  };
  return { inflows, outflow, dry, up, down, span };
}

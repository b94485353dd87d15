import { planDistance } from '../geometry/vector.ts';
import type { JointId, Network, PipeId } from '../network/network.ts';
import type { Paths, TrapAir } from '../paths/paths.ts';
import { spaceTurn } from '../paths/turns.ts';

/** From the trap weir to the joint where the vent meets. Metres, m/m, degrees; null where the model has no geometry. */
export interface TrapArm {
  readonly length: number;
  readonly rise: number | null;
  readonly fall: number | null;
  readonly plan: number | null;
  readonly slope: number | null;
  readonly turn: number | null;
}

export function trapArms(network: Network, paths: Paths, air: readonly TrapAir[]): (TrapArm | null)[] {
  return air.map((trap) => (trap.armEnd === null ? null : armOf(network, paths, trap)));
}

function armOf(network: Network, paths: Paths, { arm, at, armEnd }: TrapAir): TrapArm {
  const length = arm.reduce((sum, pipe) => sum + paths.stream.span(pipe), 0);
  const from = network.joints[at]!.at;
  const to = network.joints[armEnd!]!.at;
  if (from === null || to === null || arm.some((pipe) => network.pipes[pipe]!.points === null)) {
    const stated = arm.length === 1 ? paths.slopes[arm[0]!]!.slope : null;
    return {
      length,
      rise: null,
      fall: stated === null ? null : stated * length,
      plan: null,
      slope: stated,
      turn: null,
    };
  }
  const fall = fallAlong(network, arm, at, from[2] - to[2]);
  const plan = arm.reduce((sum, pipe) => sum + planSpan(network, pipe), 0);
  const slope = plan > 0 ? fall / plan : null;
  return { length, rise: Math.max(0, -fall), fall: Math.max(0, fall), plan, slope, turn: spaceTurn(network, arm, at) };
}

/** Metres down along pipes in order from a joint: as drawn between its ends, or as those laid anew have it. */
export function fallAlong(network: Network, pipes: readonly PipeId[], from: JointId, drawn: number): number {
  if (pipes.every((pipe) => network.pipes[pipe]!.laid === undefined)) return drawn;
  let fall = 0;
  let joint = from;
  for (const pipe of pipes) {
    const { ends, laid } = network.pipes[pipe]!;
    const far = ends[0] === joint ? ends[1] : ends[0];
    const [a, b] = [network.joints[joint]!.at, network.joints[far]!.at];
    if (laid !== undefined) fall += (ends[0] === joint ? laid : -laid) * planSpan(network, pipe);
    else if (a !== null && b !== null) fall += a[2] - b[2];
    joint = far;
  }
  return fall;
}

/** Length of a pipe in plan from joint to joint: a bend keeps its own way, the halves of the fittings follow its ends. */
function planSpan(network: Network, pipe: PipeId): number {
  const { points, ends, reach } = network.pipes[pipe]!;
  const [from, to] = ends.map((joint) => network.joints[joint]!.at);
  if (points === null) return 0;
  if (points.length === 2 && from != null && to != null) return planDistance(from, to);
  let sum = 0;
  for (let at = 1; at < points.length; at++) sum += planDistance(points[at - 1]!, points[at]!);
  return sum + reach[0] + reach[1];
}

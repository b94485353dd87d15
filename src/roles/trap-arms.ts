import type { Network } from '../network/network.ts';
import type { Paths, TrapAir } from '../paths/paths.ts';
import type { Stream } from '../paths/stream.ts';
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

export function trapArms(network: Network, paths: Paths, stream: Stream): (TrapArm | null)[] {
  return paths.traps.map((trap) => (trap.armEnd === null ? null : armOf(network, paths, stream, trap)));
}

function armOf(network: Network, paths: Paths, stream: Stream, { arm, at, armEnd }: TrapAir): TrapArm {
  const length = arm.reduce((sum, pipe) => sum + stream.span(pipe), 0);
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
  const fall = from[2] - to[2];
  const plan = arm.reduce((sum, pipe) => {
    const { points } = network.pipes[pipe]!;
    const [a, b] = [points![0]!, points!.at(-1)!];
    return sum + Math.hypot(b[0] - a[0], b[1] - a[1]);
  }, 0);
  const slope = plan > 0 ? fall / Math.max(plan, 1e-9) : null;
  return { length, rise: Math.max(0, -fall), fall: Math.max(0, fall), plan, slope, turn: spaceTurn(network, arm, at) };
}

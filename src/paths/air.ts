import type { JointId, Network, PipeId } from '../network/network.ts';
import { otherEnd } from '../network/other-end.ts';
import type { Dry } from './dry-pieces.ts';
import type { Paths, TrapAir } from './paths.ts';
import type { TrapSeat } from './traps.ts';
import type { Water } from './water.ts';

/**
 * The way of air to every trap: a dry vent on its own drain, else the nearest one upstream through other wet pipes.
 * Air never comes from downstream. Where a stack is met, the way goes up the stack.
 */
export function ventTraps(
  network: Network,
  water: Water,
  dry: Dry,
  vertical: readonly (boolean | null)[],
  seats: readonly TrapSeat[],
): TrapAir[] {
  const live = liveFeet(network, dry);
  const up = nearestFootUpstream(network, water, vertical, live);
  const inflows = inflowCounts(network, water);
  return seats.map((seat): TrapAir => {
    const { water: path } = water.fixtures[seat.fixture]!;
    const arm: PipeId[] = [];
    for (let index = seat.after; index < path.length; index++) {
      const pipe = path[index]!;
      arm.push(pipe);
      const joint = water.toward[pipe]!;
      const piece = live[joint];
      if (piece !== null && piece !== undefined)
        return { ...vented(seat, joint, arm, []), ...airFrom(network, dry, joint, piece) };
      if (inflows[joint]! < 2) continue;
      const through: PipeId[] = [];
      let at = joint;
      for (let way = up.via[at] ?? null; way !== null && live[at] === null; way = up.via[at] ?? null) {
        through.push(way);
        at = upstreamEnd(network, water, way);
      }
      const far = live[at];
      if (far === null || far === undefined) break;
      return { ...vented(seat, joint, arm, through), ...airFrom(network, dry, at, far) };
    }
    return { ...seatOf(seat), armEnd: null, arm: [], through: [], foot: null, piece: null, dry: [] };
  });
}

const seatOf = ({ fixture, after, at, how }: TrapSeat) => ({ fixture, after, at, how });

const vented = (seat: TrapSeat, armEnd: JointId, arm: readonly PipeId[], through: readonly PipeId[]) => ({
  ...seatOf(seat),
  armEnd,
  arm,
  through,
});

const airFrom = (network: Network, dry: Dry, foot: JointId, piece: number) => ({
  foot,
  piece,
  dry: wayToSky(network, dry, foot, piece),
});

/** Dry pipes from a foot of the piece to open air; empty where there is none. */
export function wayToSky(network: Network, { wayUp }: Pick<Paths, 'wayUp'>, foot: JointId, piece: number): PipeId[] {
  const pipes: PipeId[] = [];
  let joint = foot;
  for (let pipe = wayUp(joint, piece); pipe !== null; pipe = wayUp(joint, piece)) {
    pipes.push(pipe);
    joint = otherEnd(network, pipe, joint);
  }
  return pipes;
}

/** Piece with open air whose foot stands at a joint; null elsewhere. Several: the one with the lowest number. */
function liveFeet(network: Network, dry: Dry): (number | null)[] {
  const live: (number | null)[] = network.joints.map(() => null);
  for (const { id, feet, mouths } of dry.pieces) {
    if (mouths.length === 0) continue;
    for (const foot of feet) {
      if (live[foot] === null && dry.wayUp(foot, id) !== null) live[foot] = id;
    }
  }
  return live;
}

/** By joint: how many streams meet: wet pipes that flow in, and fixtures that stand at the joint itself. */
function inflowCounts(network: Network, water: Water): Int32Array {
  const counts = new Int32Array(network.joints.length);
  for (const { id } of network.pipes) {
    const joint = water.toward[id];
    if (water.wet[id] && joint !== null && joint !== undefined) counts[joint]!++;
  }
  for (const { outlet } of water.fixtures) counts[outlet]!++;
  return counts;
}

export const upstreamEnd = (network: Network, water: Pick<Water, 'toward'>, pipe: PipeId): JointId => {
  const [a, b] = network.pipes[pipe]!.ends;
  return water.toward[pipe] === a ? b : a;
};

/** For every joint the wet pipe that leads upstream to the nearest foot, in one pass with the flow. */
function nearestFootUpstream(
  network: Network,
  water: Water,
  vertical: readonly (boolean | null)[],
  live: readonly (number | null)[],
): { via: (PipeId | null)[]; cost: Float64Array } {
  const cost = new Float64Array(network.joints.length).fill(Number.POSITIVE_INFINITY);
  const via: (PipeId | null)[] = network.joints.map(() => null);
  const stackAbove: boolean[] = network.joints.map(() => false);
  for (const { id } of network.joints) if (live[id] !== null) cost[id] = 0;
  for (const pipe of water.inFlowOrder) {
    const joint = water.toward[pipe]!;
    if (live[joint] !== null) continue;
    const { length, reach } = network.pipes[pipe]!;
    const down = water.next[pipe];
    // A stack is met where water comes in and goes out vertically: the way of air is up, whatever else is nearer.
    const straightUp = vertical[pipe] === true && down !== null && down !== undefined && vertical[down] === true;
    const total = cost[upstreamEnd(network, water, pipe)]! + length + reach[0] + reach[1];
    if (straightUp && !stackAbove[joint]) {
      stackAbove[joint] = true;
      cost[joint] = total;
      via[joint] = total === Number.POSITIVE_INFINITY ? null : pipe;
    } else if (straightUp === stackAbove[joint] && total < cost[joint]!) {
      cost[joint] = total;
      via[joint] = pipe;
    }
  }
  return { via, cost };
}

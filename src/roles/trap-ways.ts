import type { DrainRole } from '../codes/role.ts';
import type { BranchReach, TrapWay, Way } from '../codes/way.ts';
import { dot, subtract, unit, type Vec3 } from '../geometry/vector.ts';
import type { JointId, PipeId } from '../network/network.ts';
import { pointsFrom } from '../paths/turns.ts';
import type { BatteryContext } from './battery-context.ts';

export interface TrapWays {
  /** By fixture; null where the trap's water reaches nothing. */
  readonly traps: readonly (TrapWay | null)[];
  /** Of branches and fixture drains. */
  readonly reach: ReadonlyMap<PipeId, BranchReach>;
}

/** From every trap to what gives its drain air, and what that makes of each pipe on the way. */
export function trapWays(context: BatteryContext, drains: readonly (DrainRole | null)[]): TrapWays {
  const { paths, loads } = context;
  const isLine = (pipe: PipeId): boolean => drains[pipe] === 'branch' || drains[pipe] === 'fixture-drain';
  const ventilated = ventilatedPipes(context, isLine);
  const reach = new Map<PipeId, BranchReach>();
  const traps = paths.traps.map(({ fixture, after, at }): TrapWay | null => {
    const water = paths.fixtures[fixture]!.water.slice(after);
    if (water.length === 0) return null;
    const leaves = water.findIndex((pipe) => !isLine(pipe));
    const line = leaves < 0 ? water : water.slice(0, leaves);
    const vented = line.findIndex((pipe) => ventilated[pipe]);
    const pipes = vented < 0 ? line : line.slice(0, vented);
    const own = wayAlong(context, pipes, at);
    const whole = vented < 0 ? own : wayAlong(context, line, at);
    const isCloset = loads.fixtures[fixture]!.row.closet;
    line.forEach((pipe, place) => {
      const inOwn = place < pipes.length;
      const closetTurn = isCloset ? (inOwn ? own : whole).bends * quarter : 0;
      reach.set(pipe, worse(reach.get(pipe), { ventilated: !inOwn, way: inOwn ? own : whole, closetTurn }));
    });
    const first = leaves < 0 ? undefined : water[leaves];
    const end =
      vented >= 0 ? 'ventilated' : first !== undefined && drains[first] === 'stack' ? 'stack' : 'building-drain';
    return { ...own, pipes, line, end, whole };
  });
  return { traps, reach };
}

/** A live dry vent stands at the pipe's upstream end, or on one of the drains of the branch that flow into it. */
function ventilatedPipes({ paths, stream, live }: BatteryContext, isLine: (pipe: PipeId) => boolean): boolean[] {
  const ventilated = paths.wet.map(() => false);
  for (const pipe of paths.inFlowOrder) {
    if (!isLine(pipe)) continue;
    const joint = stream.up(pipe);
    ventilated[pipe] = live(joint) !== null || stream.inflows[joint]!.some((one) => ventilated[one]);
  }
  return ventilated;
}

/** Pipes in flow order from a joint. */
function wayAlong({ network, paths, stream }: BatteryContext, pipes: readonly PipeId[], start: JointId): Way {
  let [length, drop, turned] = [0, 0, 0];
  let [flattest, steepest]: [number | null, number | null] = [null, null];
  let before: Vec3 | null = null;
  let seenBend = false;
  let joint = start;
  for (const pipe of pipes) {
    const joined = stream.inflows[joint]!.length > 1;
    pointsFrom(network, pipe, joint).forEach((point, at, points) => {
      const last = points[at - 1];
      if (last === undefined) return;
      const direction = unit(subtract(point, last));
      const turn = before === null ? 0 : angleBetween(before, direction);
      before = direction;
      if (turn < leastBend || (at === 1 && joined)) return;
      const connects = !seenBend && length <= besideAppliance;
      seenBend = true;
      if (!connects) turned += turn;
    });
    const span = stream.span(pipe);
    length += span;
    if (paths.vertical[pipe] === true) drop += span;
    else if (network.pipes[pipe]!.length >= shortest) {
      const { slope } = paths.slopes[pipe]!;
      if (slope !== null && (flattest === null || slope < flattest)) flattest = slope;
      if (slope !== null && (steepest === null || slope > steepest)) steepest = slope;
    }
    joint = stream.down(pipe);
  }
  return { length, bends: turned / quarter, drop, flattest, steepest };
}

const quarter = 90;
/** Smaller turns, degrees, come from slopes that differ. */
const leastBend = 10;
/** The bend that connects an appliance sits this near to its trap, metres: common practice, no source. */
const besideAppliance = 0.5;
/** A stub between two fittings says nothing of the slope a pipe is laid to, metres. */
const shortest = 0.15;

const angleBetween = (a: Vec3, b: Vec3): number => (Math.acos(Math.min(1, Math.max(-1, dot(a, b)))) * 180) / Math.PI;

function worse(known: BranchReach | undefined, one: BranchReach): BranchReach {
  if (known === undefined) return one;
  const [a, b] = [known.way, one.way];
  return {
    ventilated: known.ventilated || one.ventilated,
    closetTurn: Math.max(known.closetTurn, one.closetTurn),
    way: {
      length: Math.max(a.length, b.length),
      bends: Math.max(a.bends, b.bends),
      drop: Math.max(a.drop, b.drop),
      flattest: extreme(Math.min, a.flattest, b.flattest),
      steepest: extreme(Math.max, a.steepest, b.steepest),
    },
  };
}

const extreme = (pick: (a: number, b: number) => number, a: number | null, b: number | null): number | null =>
  a === null ? b : b === null ? a : pick(a, b);

import type { JointId } from '../network/network.ts';
import type { BatteryContext } from './battery-context.ts';
import type { Stack } from './find-stacks.ts';

export interface StackPlace {
  readonly stack: Stack;
  /**
   * What a dry vent that starts here would be: `foot` on a vertical part at or below the lowest branch and `drain` on
   * the level pipe at the stack's foot, a vent stack; `offset` beside an offset, its relief vent; `between` a yoke vent.
   */
  readonly at: 'foot' | 'drain' | 'offset' | 'between';
  /** Of `offset`: which one, from the top. */
  readonly offset?: number;
}

/** The drain just past a stack's foot still counts as its foot for a vent stack, metres. */
const besideFoot = 3;

/** Joints of stacks and the drain at their feet, by what a dry vent that starts there would be. */
export function stackJoints(context: BatteryContext): Map<JointId, StackPlace> {
  const { stacks, stream, paths } = context;
  const places = new Map<JointId, StackPlace>();
  for (const stack of stacks) {
    const joints = stack.pipes.map((pipe) => stream.down(pipe));
    const takes = (joint: JointId): boolean => stream.inflows[joint]!.length > 1;
    const lastInflow = joints.findLastIndex((joint, at) => takes(joint) && at < joints.length - 1);
    joints.forEach((joint, at) => {
      places.set(joint, { stack, at: at >= lastInflow ? 'foot' : 'between' });
    });
    for (const { joint, offset } of offsetJoints(context, stack)) places.set(joint, { stack, at: 'offset', offset });
    let walked = 0;
    for (let pipe = paths.next[stack.foot] ?? null; pipe !== null; pipe = paths.next[pipe] ?? null) {
      walked += stream.span(pipe);
      const joint = stream.down(pipe);
      if (walked > besideFoot || places.has(joint)) break;
      places.set(joint, { stack, at: 'drain' });
    }
  }
  return places;
}

/**
 * Where the relief vents of an offset stand: nearest above it, up to the branch above, and nearest below it, down to the
 * branch below. A lone vent that may as well be the stack's vent stack is that.
 */
function offsetJoints({ stream, code, live }: BatteryContext, stack: Stack): { joint: JointId; offset: number }[] {
  const takes = (joint: JointId): boolean => stream.inflows[joint]!.length > 1;
  const upTo = (joints: readonly JointId[], stop: number): JointId[] =>
    stop < 0 ? [...joints] : joints.slice(0, stop + 1);
  const tops = stack.pipes.map((pipe) => stream.up(pipe));
  const lowestBranch = tops.findLastIndex(takes);
  const feet = tops.filter((joint, at) => at >= lowestBranch && live(joint) !== null);
  return stack.offsets.flatMap(({ pipes, length }, offset) => {
    if (length < code.stackOffset) return [];
    const first = stack.pipes.indexOf(pipes[0]!);
    const after = stack.pipes.indexOf(pipes.at(-1)!) + 1;
    const above = tops.slice(1, first + 1).reverse();
    const below = tops.slice(after);
    return [above, below].flatMap((joints) => {
      const nearest = upTo(joints, joints.findIndex(takes)).find((joint) => live(joint) !== null);
      if (nearest === undefined) return [];
      return feet.length === 1 && feet[0] === nearest ? [] : [{ joint: nearest, offset }];
    });
  });
}

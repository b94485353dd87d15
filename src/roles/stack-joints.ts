import type { JointId } from '../network/network.ts';
import type { BatteryContext } from './battery-facts.ts';
import type { Stack } from './find-stacks.ts';

export interface StackPlace {
  readonly stack: Stack;
  readonly at: 'foot' | 'offset' | 'between';
}

/** The drain just past a stack's foot still counts as its foot for a vent stack, metres. */
const besideFoot = 3;

/** Joints of stacks and the drain at their feet, by what a dry vent that starts there would be. */
export function stackJoints({ stacks, stream, paths, code }: BatteryContext): Map<JointId, StackPlace> {
  const places = new Map<JointId, StackPlace>();
  for (const stack of stacks) {
    const joints = stack.pipes.map((pipe) => stream.down(pipe));
    const takes = (joint: JointId): boolean => stream.inflows[joint]!.length > 1;
    const lastInflow = joints.findLastIndex((joint, at) => takes(joint) && at < joints.length - 1);
    joints.forEach((joint, at) => {
      places.set(joint, { stack, at: at >= lastInflow ? 'foot' : 'between' });
    });
    for (const { pipes, length } of stack.offsets) {
      if (length < code.stackOffset) continue;
      places.set(stream.up(pipes[0]!), { stack, at: 'offset' });
      const below = stack.pipes.indexOf(pipes.at(-1)!) + 1;
      for (let index = below; index < stack.pipes.length; index++) {
        const joint = stream.up(stack.pipes[index]!);
        places.set(joint, { stack, at: 'offset' });
        if (takes(joint)) break;
      }
    }
    let walked = 0;
    for (let pipe = paths.next[stack.foot] ?? null; pipe !== null; pipe = paths.next[pipe] ?? null) {
      walked += stream.span(pipe);
      const joint = stream.down(pipe);
      if (walked > besideFoot || places.has(joint)) break;
      places.set(joint, { stack, at: 'foot' });
    }
  }
  return places;
}

import type { JointId, PipeId } from '../network/network.ts';
import type { BatteryContext } from './battery-context.ts';
import type { Stack } from './find-stacks.ts';
import type { VentFoot } from './roles.ts';
import type { StackPlace } from './stack-joints.ts';

/** The lower part of a vent stack into which fixtures of the lowest storey drain. */
export interface WetFoot {
  readonly stack: Stack;
  /** Wet pipes from the foot of the dry part to the stack, in flow order. */
  readonly pipes: readonly PipeId[];
}

/**
 * By foot of the dry part: vent stacks whose lower part takes fixtures. Only a stack that must have a vent stack and has
 * no other reads a vented drain so: for others it is a branch with its continuous vent.
 */
export function wetFeet(
  context: BatteryContext,
  feet: readonly VentFoot[],
  places: ReadonlyMap<JointId, StackPlace>,
): Map<JointId, WetFoot> {
  const found = new Map<JointId, WetFoot>();
  const { ventStack } = context.code;
  if (ventStack === null) return found;
  const served = new Set<Stack>();
  for (const { joint } of feet) {
    const place = places.get(joint);
    if (place?.at === 'foot' || place?.at === 'drain') served.add(place.stack);
  }
  for (const { joint, path } of feet) {
    if (places.has(joint) || !risesOverStorey(context, path)) continue;
    const wet = wetFootAt(context, joint, places);
    if (wet === null || served.has(wet.stack) || wet.stack.served.length <= ventStack.storeys) continue;
    found.set(joint, wet);
    served.add(wet.stack);
  }
  return found;
}

/** Down from the foot to a stack at or below its lowest branch: light, of the lowest storey, nothing below a closet. */
function wetFootAt(
  { stream, loads, paths, floors, code }: BatteryContext,
  foot: JointId,
  places: ReadonlyMap<JointId, StackPlace>,
): WetFoot | null {
  const pipes: PipeId[] = [];
  for (let pipe = stream.outflow[foot] ?? null; pipe !== null; pipe = paths.next[pipe] ?? null) {
    const { load, from, to } = loads.pipes[pipe]!;
    if (load > code.ventStack!.footLoad) return null;
    const above = pipes.at(-1);
    if (above === undefined && paths.vertical[pipe] !== true) return null;
    if (
      above !== undefined &&
      loads.pipes[above]!.closets > 0 &&
      to - from > loads.pipes[above]!.to - loads.pipes[above]!.from
    )
      return null;
    pipes.push(pipe);
    const place = places.get(stream.down(pipe));
    if (place === undefined) continue;
    if (place.at === 'between' || place.at === 'offset') return null;
    const lowest = place.stack.served[0];
    const apart = loads.order.slice(from, to).some((fixture) => floors.of(paths.fixtures[fixture]!) !== lowest);
    return apart ? null : { stack: place.stack, pipes };
  }
  return null;
}

/** The vent passes at least half of some storey. */
export function risesOverStorey({ network, floors }: BatteryContext, path: readonly PipeId[]): boolean {
  const heights = path.flatMap((pipe) =>
    network.pipes[pipe]!.ends.flatMap((joint) => network.joints[joint]!.at?.[2] ?? []),
  );
  return heights.length > 0 && floors.passes(Math.min(...heights), Math.max(...heights));
}

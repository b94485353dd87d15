import type { VentLengthTo } from '../codes/plumbing-code.ts';
import type { JointId, PipeId } from '../network/network.ts';
import type { BatteryContext } from './battery-context.ts';
import type { DryRole, VentTree } from './dry-roles.ts';
import type { Battery, VentFoot } from './roles.ts';
import type { WetFoot } from './wet-feet.ts';

/** Developed length in metres, and what of it is level. */
export interface VentLength {
  readonly total: number;
  readonly level: number;
}

/** By foot: from its drainage connection to each end that a code may measure to. */
export type FootLengths = ReadonlyMap<VentFoot, Readonly<Record<VentLengthTo, VentLength>>>;

const stackish: ReadonlySet<string> = new Set(['stack-vent', 'vent-stack', 'vent-header']);
const nothing: VentLength = { total: 0, level: 0 };

/** The way of every foot to the next vent that carries more, to the next stack vent, vent stack or header, and to open air. */
export function footLengths(
  context: BatteryContext,
  tree: VentTree,
  roles: ReadonlyMap<PipeId, DryRole>,
  batteries: readonly Battery[],
  feet: ReadonlyMap<JointId, WetFoot>,
): FootLengths {
  const lengths = new Map<VentFoot, Record<VentLengthTo, VentLength>>();
  for (const foot of tree.footOf.values()) {
    const start = roles.get(foot.path[0]!)!;
    // A circuit vent is measured from the branch, a vent stack from the stack: its wet portion counts.
    const row = start.role === 'circuit-vent' && start.battery !== null ? batteries[start.battery]! : null;
    const portion = row?.facts.circuit.wetPortion ?? feet.get(foot.joint)?.pipes ?? [];
    const wet = portion.reduce((sum, pipe) => plus(context, sum, pipe), nothing);
    const way = { join: wet, stack: wet, sky: wet };
    let alone = true;
    let arrived = false;
    for (const pipe of foot.path) {
      const { role, foot: own } = roles.get(pipe)!;
      alone &&= own === foot;
      arrived ||= stackish.has(role) && !stackish.has(start.role);
      way.sky = plus(context, way.sky, pipe);
      if (!arrived) way.stack = plus(context, way.stack, pipe);
      if (alone && !arrived) way.join = plus(context, way.join, pipe);
    }
    lengths.set(foot, way);
  }
  return lengths;
}

/**
 * Length that enters a table for every used dry pipe, null where the code measures none. A vent that several have met in
 * has that of its most distant drainage connection, the same for every part of it.
 */
export function ventLengths(
  { code }: BatteryContext,
  tree: VentTree,
  roles: ReadonlyMap<PipeId, DryRole>,
  feetOf: (pipe: PipeId) => readonly VentFoot[],
  breathes: (pipe: PipeId) => boolean,
  ends: FootLengths,
): ReadonlyMap<PipeId, VentLength | null> {
  const lengths = new Map<PipeId, VentLength | null>();
  for (const pipe of [...tree.order].reverse()) {
    const { role, foot } = roles.get(pipe)!;
    const to = code.ventLength(role, breathes(pipe));
    if (to === null) {
      lengths.set(pipe, null);
    } else if (role === 'branch-vent') {
      const above = tree.above.get(pipe) ?? null;
      const goesOn = above !== null && roles.get(above)!.role === 'branch-vent';
      // Branch vents end at the next larger vent whatever is asked of the others.
      const most = (): VentLength => longest(feetOf(pipe), ends, to === 'join' ? 'stack' : to);
      lengths.set(pipe, goesOn ? lengths.get(above)! : most());
    } else if (role === 'vent-header') {
      lengths.set(pipe, longest(feetOf(pipe), ends, to));
    } else {
      lengths.set(pipe, foot === null ? null : ends.get(foot)![to]);
    }
  }
  return lengths;
}

const longest = (feet: readonly VentFoot[], ends: FootLengths, to: VentLengthTo): VentLength => ({
  total: Math.max(...feet.map((foot) => ends.get(foot)![to].total)),
  level: Math.max(...feet.map((foot) => ends.get(foot)![to].level)),
});

const plus = ({ stream, paths }: BatteryContext, { total, level }: VentLength, pipe: PipeId): VentLength => ({
  total: total + stream.span(pipe),
  level: paths.vertical[pipe] === true ? level : level + stream.span(pipe),
});

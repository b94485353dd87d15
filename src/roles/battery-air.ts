import type { JointId, PipeId } from '../network/network.ts';
import type { TrapAir } from '../paths/paths.ts';
import type { BatteryContext } from './battery-context.ts';
import type { Battery, VentFoot } from './roles.ts';

/**
 * The way of air to every trap once its row is known: where a row reaches past the vent of a guest, its traps breathe
 * through the row's own vent, though the guest's stands nearer; those of an open row breathe from where it ends. All others
 * as the paths have them. By fixture id.
 */
export function airOfRows(
  context: BatteryContext,
  feet: readonly VentFoot[],
  batteries: readonly Battery[],
): TrapAir[] {
  const found = context.paths.traps;
  const air = [...found];
  for (const battery of batteries) {
    const { facts } = battery;
    if (facts.open !== null) {
      for (const { fixture } of facts.traps) air[fixture] = openAir(context, feet, battery, found[fixture]!);
      continue;
    }
    const main = facts.traps.map(({ fixture }) => found[fixture]!).find(({ foot }) => foot === facts.foot);
    if (main === undefined) continue;
    const onLine = new Set<JointId | null>([facts.foot, ...facts.feet]);
    for (const { fixture, place, ownVent } of facts.traps) {
      const trap = found[fixture]!;
      if (ownVent || onLine.has(trap.foot)) continue;
      const through: PipeId[] = facts.line.slice(0, place).reverse();
      air[fixture] = { ...trap, through, foot: main.foot, piece: main.piece, dry: main.dry };
    }
  }
  return air;
}

/** Down the row's drain to its vent, or to the stack and up that, or to the drain that has air. */
function openAir(
  { paths, stream, inStack }: BatteryContext,
  feet: readonly VentFoot[],
  { facts, reading }: Battery,
  trap: TrapAir,
): TrapAir {
  const { joint, end } = facts.open!;
  const way = paths.fixtures[trap.fixture]!.water.slice(trap.after);
  const toEnd = way.slice(0, way.findIndex((pipe) => stream.down(pipe) === joint) + 1);
  // A common vent past the joint of two drains is measured to: both arms reach it.
  const shared = reading === 'common-vent' ? -1 : toEnd.findIndex((pipe) => facts.line.includes(pipe));
  const arm = shared < 0 ? toEnd : toEnd.slice(0, shared);
  const through = shared < 0 ? [] : toEnd.slice(shared);
  const armEnd = arm.length === 0 ? trap.at : stream.down(arm.at(-1)!);
  const out = stream.outflow[joint] ?? null;
  const stack = out === null ? null : inStack[out]!;
  const up = stack === null || out === null ? [] : stack.pipes.slice(0, stack.pipes.indexOf(out)).reverse();
  const source = stack === null ? joint : stream.up(stack.top);
  const foot = end === 'vented-drain' ? undefined : feet.find((one) => one.joint === source);
  return {
    ...trap,
    armEnd,
    arm,
    through: [...through, ...up],
    foot: foot?.joint ?? null,
    piece: foot?.piece ?? null,
    dry: foot?.path ?? [],
  };
}

import { carriedBy } from '../loads/carried.ts';
import type { BatteryContext } from './battery-context.ts';
import type { Venting } from './roles.ts';
import type { TrapWays } from './trap-ways.ts';

/** Traps that no vent serves, but whose own branch is short enough for the code, need none. By fixture id. */
export function throughShortBranches(
  { code, loads, paths }: BatteryContext,
  venting: readonly Venting[],
  ways: TrapWays | null,
): readonly Venting[] {
  const { shortBranch } = code;
  if (shortBranch === undefined || ways === null) return venting;
  return venting.map((it, fixture): Venting => {
    const way = ways.traps[fixture] ?? null;
    const { after } = paths.traps[fixture]!;
    // A trap on the stack itself has no pipe of its own.
    const last = way?.pipes.at(-1) ?? paths.fixtures[fixture]!.water[after];
    // At the top of a stack its vent stands on the very joint; what counts is the way there, as on the storeys below.
    const isOnStack = it.how === 'unvented' || (way?.end === 'stack' && it.how === 'stack-vent');
    if (!isOnStack || way === null || last === undefined) return it;
    const closetTurn = ways.reach.get(last)?.closetTurn ?? 0;
    const free = shortBranch({ way, row: loads.fixtures[fixture]!.row, carried: carriedBy(loads, last), closetTurn });
    return { how: free === null ? 'unvented' : 'free', vents: [], free, battery: it.battery };
  });
}

import type { PlumbingCode } from '../codes/plumbing-code.ts';
import type { PipeUse } from '../codes/use.ts';
import type { Network, PipeId } from '../network/network.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Load, Range } from '../units/quantity.ts';
import type { PipeVerdict, Run } from './outcome.ts';

/** The size each pipe needs, over all runs, against the size the model gives it. By pipe id. */
export function comparePipes(
  network: Network,
  code: PlumbingCode,
  runs: readonly Run[],
  shown: Run,
  extensions: ReadonlySet<PipeId>,
): PipeVerdict[] {
  const entriesOpen = runs.some(({ roles }) => roles.uses.some(hasOpenEntry));
  return network.pipes.map(({ id }): PipeVerdict => {
    const load = extremes(runs.map(({ loads }) => loads.pipes[id]!.load));
    const vents = runs.map(({ roles }) => enteringLoad(roles.uses[id]!, code));
    const ventLoad = vents.some((one) => one === null) ? null : extremes(vents as Load[]);
    const sizes = runs.map((run) => run.sizes[id]!);
    const asked = sizes.some(({ trail }) => trail.length > 0);
    const required = asked
      ? sizeRange(
          sizes.map(({ size }) => size),
          code,
        )
      : null;
    const provisional = sizes.some((one) => one.provisional);
    const { size: modelled, reason } = shown.loads.modelled[id]!;
    // No fixture is open, or none of them drains here: what is left is the way drains enter a stack.
    const open = entriesOpen && load.least === load.most ? byEntries : byFixtures;
    const idle = extensions.has(id) ? toCleanout : unused;
    const verdict = verdictOf(modelled, reason, required, open, idle, shown, id, code);
    return { load, ventLoad, required, provisional, ...verdict };
  });
}

/** Why an idle pipe has no size. */
const unused = 'no water and no air of a trap passes';
export const toCleanout = 'it extends to a cleanout: nothing drains or vents through it';

/** Why a size is a range, and what settles it. */
const byFixtures = 'depends on a fixture that is not identified';
export const byEntries = 'depends on how the drains enter the stack, square or swept';

const hasOpenEntry = ({ stack }: Run['roles']['uses'][number]): boolean =>
  stack?.entries?.some(({ known }) => !known) === true;

function verdictOf(
  modelled: NominalSize | null,
  unread: string | null,
  required: Range<NominalSize | null> | null,
  open: string,
  idle: string,
  shown: Run,
  pipe: number,
  code: PlumbingCode,
): Pick<PipeVerdict, 'verdict' | 'reason'> {
  const { rank } = code.series;
  if (required === null) {
    const use = shown.roles.uses[pipe]!;
    const reason = use.role === 'idle' ? idle : (code.unsized?.(use) ?? 'no rule asks for a size');
    return { verdict: 'unknown', reason };
  }
  const { least, most } = required;
  if (least === null || most === null) {
    const unreadCells = shown.sizes[pipe]!.trail.some(({ asks, provisional }) => asks === null && provisional);
    return {
      verdict: 'unknown',
      reason: unreadCells
        ? 'the cells of the table that might hold it are not known'
        : 'no size of the table holds the load',
    };
  }
  if (modelled === null) return { verdict: 'unknown', reason: unread ?? 'no size in the model' };
  if (rank(modelled) < rank(least)) return { verdict: 'undersized', reason: null };
  if (rank(modelled) < rank(most)) return { verdict: 'unknown', reason: open };
  return { verdict: rank(modelled) === rank(most) ? 'agrees' : 'oversized', reason: null };
}

/**
 * What entered a vent table: for a wet vent the whole vent's load or what passes the section, as the code has it; for a
 * dry one its own; null where no vent table is read.
 */
function enteringLoad(use: PipeUse, { wetVentLoad }: PlumbingCode): Load | null {
  switch (use.role) {
    case 'wet-vent':
      return wetVentLoad === 'section' ? use.load : (use.battery?.facts.wet.load ?? null);
    case 'common-vent':
      return use.battery?.facts.traps[0]?.load ?? null;
    case 'combination-waste-and-vent':
      return use.load;
    case 'waste-stack-vent':
    case 'single-stack':
      return use.stack?.footLoad ?? null;
  }
  if (use.wetPortion !== null) return use.wetPortion.load;
  return use.vent === null || use.role === 'idle' ? null : use.vent.load;
}

function extremes(loads: readonly Load[]): Range<Load> {
  return { least: Math.min(...loads) as Load, most: Math.max(...loads) as Load };
}

function sizeRange(sizes: readonly (NominalSize | null)[], { series }: PlumbingCode): Range<NominalSize | null> {
  const found = sizes.flatMap((size) => size ?? []).sort((a, b) => series.rank(a) - series.rank(b));
  return { least: found[0] ?? null, most: sizes.includes(null) ? null : (found.at(-1) ?? null) };
}

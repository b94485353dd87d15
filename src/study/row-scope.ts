import type { PipeUse } from '../codes/use.ts';
import type { JointId, PipeId } from '../network/network.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Attempt } from './attempt.ts';
import type { Row } from './row.ts';

/**
 * Pipes of the modelled piping that the alternatives are compared over: the row's own, and whatever else needs another
 * size under one of them than under another.
 */
export function rowScope(row: Row, attempts: readonly Attempt[]): Set<PipeId> {
  const scope = ownPipes(row);
  const [first, ...others] = attempts.map((attempt) => sizesByOrigin(row, attempt));
  for (const { id } of row.outcome.network.pipes) {
    const size = first?.get(id);
    // A pipe that one alternative leaves out is a difference by itself.
    if (others.some((sizes) => sizes.get(id) !== size)) scope.add(id);
  }
  return scope;
}

/** The largest size that any part of a modelled pipe needs; pipes that are gone have none. */
function sizesByOrigin({ outcome: { code } }: Row, { piping, outcome }: Attempt): Map<PipeId, NominalSize | null> {
  const sizes = new Map<PipeId, NominalSize | null>();
  piping.origin.forEach((from, id) => {
    if (from === null) return;
    const size = outcome.pipes[id]!.required?.most ?? null;
    const known = sizes.get(from) ?? null;
    sizes.set(from, known === null || size === null ? (known ?? size) : code.series.larger(known, size));
  });
  return sizes;
}

/** A drop, a stack or the building drain is no part of a row's branch. */
const leavesBranch = ({ vertical, stack, drain }: PipeUse): boolean =>
  vertical || stack !== null || drain === 'building-drain' || drain === 'building-sewer';

/** Drains of its fixtures, its line and what follows until other water joins, and its vents until others' air joins. */
export function ownPipes(row: Row): Set<PipeId> {
  const { outcome, stream, battery } = row;
  const { paths, shown } = outcome;
  const { traps, line, circuit } = battery.facts;
  const own = new Set<PipeId>([...line, ...circuit.branch]);
  for (const { fixture, joins } of traps) {
    for (const pipe of paths.fixtures[fixture]!.water) {
      own.add(pipe);
      if (stream.down(pipe) === joins) break;
    }
  }
  let joint: JointId | null = line.length === 0 ? null : stream.down(line.at(-1)!);
  while (joint !== null) {
    const pipe: PipeId | null = stream.outflow[joint] ?? null;
    if (pipe === null || leavesBranch(shown.roles.uses[pipe]!)) break;
    own.add(pipe);
    joint = stream.down(pipe);
    if (stream.inflows[joint]!.length > 1) break;
  }
  const feet = new Set(row.vents.map(({ foot }) => foot));
  const strangers = new Set(shown.roles.feet.flatMap(({ joint: foot, path }) => (feet.has(foot) ? [] : path)));
  for (const { joint: foot, path } of shown.roles.feet) {
    if (feet.has(foot)) for (const pipe of path) if (!strangers.has(pipe)) own.add(pipe);
  }
  return own;
}

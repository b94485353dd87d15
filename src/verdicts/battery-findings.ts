import { type Finding, finding } from '../findings/finding.ts';
import type { Network } from '../network/network.ts';
import type { Paths } from '../paths/paths.ts';
import type { Battery } from '../roles/roles.ts';
import type { PipeVerdict, Run } from './outcome.ts';

/** Every condition that the chosen reading of a battery breaks is a finding, the piping at fault first. */
export function batteryFindings(network: Network, paths: Paths, batteries: readonly Battery[]): Finding[] {
  return batteries.flatMap(({ facts, reading, broken }) => {
    const line = reading === 'circuit-vent' && facts.circuit.branch.length > 0 ? facts.circuit.branch : facts.line;
    const pipes = [...new Set(line.flatMap((pipe) => network.pipes[pipe]!.element ?? []))];
    const fixtures = facts.traps.map(({ fixture }) => paths.fixtures[fixture]!.element);
    return broken.map((one) =>
      finding(
        one.finding,
        [...pipes, ...fixtures],
        { ...one.facts, rule: one.rule, reading, battery: facts.id, fixtures: fixtures.length },
        one.clause,
      ),
    );
  });
}

/** Conditions that one more vent satisfies. */
const oneVent: ReadonlySet<string> = new Set(['relief-vent-missing', 'additional-circuit-vent-missing']);

/**
 * A row whose pipes fall short as it is read, and which another reading would take but for one vent: the one cause of
 * them all, and no error of its own, since the larger sizes settle it too.
 */
export function oneVentShort(
  network: Network,
  paths: Paths,
  { roles, sizes }: Run,
  verdicts: readonly PipeVerdict[],
): Finding[] {
  const short = new Map<number, number>();
  for (const { pipe, battery } of roles.uses) {
    const rule = sizes[pipe]!.governing[0];
    if (battery === null || verdicts[pipe]!.verdict !== 'undersized' || rule?.facts.fromPipe !== undefined) continue;
    short.set(battery.facts.id, (short.get(battery.facts.id) ?? 0) + 1);
  }
  return roles.batteries.flatMap(({ facts, reading, others }): Finding[] => {
    const undersized = short.get(facts.id) ?? 0;
    if (undersized === 0) return [];
    return others.flatMap(({ reading: instead, broken }) => {
      const [only, ...more] = broken;
      if (only === undefined || more.length > 0 || !oneVent.has(only.finding)) return [];
      const about = facts.traps.map(({ fixture }) => paths.fixtures[fixture]!.element);
      const line = [...new Set(facts.line.flatMap((pipe) => network.pipes[pipe]!.element ?? []))];
      const given = { reading, instead, lacks: only.finding, rule: only.rule, battery: facts.id };
      return [
        finding('one-vent-short', [...line, ...about], { ...given, fixtures: about.length, undersized }, only.clause),
      ];
    });
  });
}

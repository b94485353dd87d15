import { type Finding, finding } from '../findings/finding.ts';
import type { Network } from '../network/network.ts';
import type { Paths } from '../paths/paths.ts';
import type { Battery } from '../roles/roles.ts';

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

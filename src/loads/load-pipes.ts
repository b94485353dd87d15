import { type Finding, finding, type WithFindings } from '../findings/finding.ts';
import type { ElementId } from '../model/model.ts';
import type { FixtureId } from '../paths/paths.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import { type Load, noLoad, plusLoad } from '../units/quantity.ts';
import { bathroomGroups } from './bathroom-groups.ts';
import { countFixtures } from './count-fixtures.ts';
import type { FixtureFacts } from './fixture-facts.ts';
import { fixtureLoads } from './fixture-loads.ts';
import { fixturesInRows } from './fixtures-in-rows.ts';
import type { BathroomGroup, Bundle, Loads, PipeLoad, Scenario } from './loads.ts';
import { usesApart } from './uses-apart.ts';

/**
 * The load on every pipe in one scenario: what its fixtures put in, plus what the pipes upstream carry, in one pass
 * with the flow. A bathroom group counts its own figure on every pipe that carries all of it, and never more on a part;
 * fixtures in a row count more where they share a drain.
 */
export function loadPipes(facts: FixtureFacts, scenario: Scenario): WithFindings<Loads> {
  const { paths, network, modelled } = facts;
  const findings: Finding[] = [];
  const fixtures = fixtureLoads(facts, scenario);
  const { groups, findings: groupFindings } = bathroomGroups(facts, fixtures);
  findings.push(...groupFindings);
  const groupOf: (number | null)[] = fixtures.map(() => null);
  groups.forEach(({ members }, group) => {
    for (const member of members) groupOf[member] = group;
  });
  const bundles: Bundle[] = [...groups.map(asBundle), ...fixturesInRows(facts)];
  const bundleOf: (number | null)[] = [...groupOf];
  bundles.slice(groups.length).forEach(({ members }, at) => {
    for (const member of members) bundleOf[member] = groups.length + at;
  });

  const single: Load[] = network.pipes.map(() => noLoad);
  const closets = new Int32Array(network.pipes.length);
  const largest = new Int32Array(network.pipes.length);
  const steady = new Float64Array(network.pipes.length);
  const open: (Map<number, { sum: Load; members: number }> | null)[] = network.pipes.map(() => null);
  const loads: Load[] = network.pipes.map(() => noLoad);
  const settle = (pipe: number): void => {
    const parts = open[pipe];
    let load = single[pipe]!;
    for (const [group, { sum, members }] of parts ?? []) {
      const { together, members: all } = bundles[group]!;
      load = plusLoad(load, together(sum, members));
      if (members === all.length) {
        single[pipe] = plusLoad(single[pipe]!, together(sum, members));
        parts!.delete(group);
      }
    }
    loads[pipe] = load;
  };
  const put = (pipe: number, group: number, sum: Load, members: number): void => {
    const parts = open[pipe] ?? new Map<number, { sum: Load; members: number }>();
    const known = parts.get(group);
    parts.set(group, { sum: plusLoad(known?.sum ?? noLoad, sum), members: (known?.members ?? 0) + members });
    open[pipe] = parts;
  };
  for (const pipe of paths.inFlowOrder) {
    for (const fixture of paths.entering[pipe]!) {
      const { load, row, steady: own } = fixtures[fixture]!;
      if (row.closet) closets[pipe]!++;
      largest[pipe] = Math.max(largest[pipe]!, load);
      steady[pipe]! += own;
      const group = bundleOf[fixture] ?? null;
      if (group === null) single[pipe] = plusLoad(single[pipe]!, load);
      else put(pipe, group, load, 1);
    }
    settle(pipe);
    const next = paths.next[pipe];
    if (next === null || next === undefined) continue;
    single[next] = plusLoad(single[next]!, single[pipe]!);
    closets[next]! += closets[pipe]!;
    largest[next] = Math.max(largest[next]!, largest[pipe]!);
    steady[next]! += steady[pipe]!;
    for (const [group, { sum, members }] of open[pipe] ?? []) put(next, group, sum, members);
  }

  const { order, from, to } = fixtureOrder(facts);
  const counts = countFixtures(facts, fixtures);
  const uses = usesApart(facts, fixtures);
  const pipes: PipeLoad[] = network.pipes.map(({ id }) => ({
    load: loads[id]!,
    largest: largest[id]! as Load,
    steady: steady[id]!,
    statedUses: uses[id]!,
    closets: closets[id]!,
    counts: counts[id]!,
    from: from[id]!,
    to: to[id]!,
  }));
  findings.push(...sizeFindings(facts));
  return { value: { scenario, fixtures, pipes, modelled, order, groups, groupOf }, findings };
}

const asBundle = ({ members, figure }: BathroomGroup): Bundle => ({
  members,
  together: (sum) => Math.min(sum, figure) as Load,
});

/** Fixtures in a walk up every tree of water, so that those of one pipe stand side by side. */
function fixtureOrder({ paths, network }: FixtureFacts): { order: FixtureId[]; from: Int32Array; to: Int32Array } {
  const count = new Int32Array(network.pipes.length);
  for (const pipe of paths.inFlowOrder) {
    count[pipe]! += paths.entering[pipe]!.length;
    const next = paths.next[pipe];
    if (next !== null && next !== undefined) count[next]! += count[pipe]!;
  }
  const from = new Int32Array(network.pipes.length);
  const to = new Int32Array(network.pipes.length);
  const free = new Int32Array(network.pipes.length);
  const order: FixtureId[] = [];
  let start = 0;
  for (const pipe of [...paths.inFlowOrder].reverse()) {
    const next = paths.next[pipe];
    if (next === null || next === undefined) {
      from[pipe] = start;
      start += count[pipe]!;
    } else {
      from[pipe] = free[next]!;
      free[next]! += count[pipe]!;
    }
    to[pipe] = from[pipe]! + count[pipe]!;
    free[pipe] = from[pipe]!;
    for (const fixture of paths.entering[pipe]!) {
      order[free[pipe]!] = fixture;
      free[pipe]!++;
    }
  }
  return { order, from, to };
}

function sizeFindings({ network, modelled }: FixtureFacts): Finding[] {
  const findings: Finding[] = [];
  const told = new Set<ElementId>();
  const named: { readonly element: ElementId; readonly size: NominalSize | null }[] = [];
  const unread = new Map<string, ElementId[]>();
  for (const { id, element } of network.pipes) {
    if (element === null || told.has(element)) continue;
    told.add(element);
    const { reason, said, from, size, isOnlyNamed, contradictedBy } = modelled[id]!;
    if (isOnlyNamed) named.push({ element, size });
    if (reason !== null) {
      const key = JSON.stringify([said, from]);
      unread.set(key, [...(unread.get(key) ?? []), element]);
    }
    if (size !== null && contradictedBy !== null) {
      const { size: other, from: otherFrom } = contradictedBy;
      findings.push(finding('size-contradicted', [element], { size, from, other, otherFrom }));
    }
  }
  for (const [key, elements] of unread) {
    const [said, from] = JSON.parse(key) as [string | null, string | null];
    findings.push(finding('size-unknown', elements, { said, from, pipes: elements.length }));
  }
  if (named.length > 0) {
    const about = named.map(({ element }) => element);
    const sizes = new Set(named.map(({ size }) => size));
    findings.push(finding('size-from-name', about, sizes.size === 1 ? { size: [...sizes][0]! } : {}));
  }
  return findings;
}

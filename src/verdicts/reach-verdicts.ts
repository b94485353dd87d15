import type { PlumbingCode } from '../codes/plumbing-code.ts';
import { type Finding, finding } from '../findings/finding.ts';
import type { Building } from '../loads/building.ts';
import type { Identity } from '../model/identity.ts';
import type { ElementId } from '../model/model.ts';
import type { Paths } from '../paths/paths.ts';
import type { Load } from '../units/quantity.ts';
import { batteryFindings, oneVentShort } from './battery-findings.ts';
import { checkFacts } from './check-facts.ts';
import { cleanoutExtensions } from './cleanout-extensions.ts';
import { comparePipes } from './compare.ts';
import { findingsOfRuns } from './findings-of-runs.ts';
import type { Outcome, Run } from './outcome.ts';
import { sizeFindings } from './size-findings.ts';
import { wallFindings } from './wall-findings.ts';

export interface VerdictFacts extends Building {
  readonly paths: Paths;
  /** The heaviest reading last. */
  readonly runs: readonly Run[];
  readonly findings: readonly Finding[];
  /** Of these, what reading and joining had to say. */
  readonly read: readonly Finding[];
}

/** Sizes against the model, the code's checks, and all findings together: closes the outcome. */
export function reachVerdicts({ findings, runs, ...facts }: VerdictFacts): Outcome {
  const { network, paths, code, identities } = facts;
  const shown = runs.at(-1)!;
  const pipes = comparePipes(network, code, runs, shown, cleanoutExtensions(network, identities, paths));
  const brokenIn = (run: Run): readonly Finding[] => {
    const checked = checkFacts(facts, run);
    return [
      ...batteryFindings(network, paths, run.roles.batteries),
      ...code.checks.flatMap((check) => check.run(checked)),
    ];
  };
  return {
    ...facts,
    shown,
    runs,
    pipes,
    fixtureLoads: paths.fixtures.map(({ id }) => {
      const loads = runs.map((run) => run.loads.fixtures[id]!.load);
      return { least: Math.min(...loads) as Load, most: Math.max(...loads) as Load };
    }),
    findings: [
      ...findings,
      ...unidentified(identities, paths, code, shown),
      ...findingsOfRuns(runs, brokenIn),
      ...oneVentShort(network, paths, shown, pipes),
      ...sizeFindings(network, paths, code, shown, pipes),
      ...wallFindings(facts.model, network, code, pipes),
    ],
  };
}

/** Fixtures whose kind or row nobody can settle: they run as a range. */
function unidentified(
  identities: readonly Identity[],
  paths: Paths,
  { fixtures }: PlumbingCode,
  { loads }: Run,
): Finding[] {
  const byUse: ElementId[] = [];
  const uses = new Set<string>();
  const each = paths.fixtures.flatMap(({ id, element }) => {
    const { kind, detail, evidence } = identities[element]!;
    const { settled, row } = loads.fixtures[id]!;
    if (kind !== null && settled) return [];
    const open = kind === null ? null : (fixtures.openUses?.(kind, detail) ?? null);
    if (open === null) return [finding('fixture-unidentified', [element], { kind, evidence, readAs: row.title })];
    byUse.push(element);
    for (const use of open) uses.add(use);
    return [];
  });
  const facts = { fixtures: byUse.length, uses: [...uses].join(', ') };
  return byUse.length === 0 ? each : [finding('use-unknown', byUse, facts), ...each];
}

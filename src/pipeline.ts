import type { PlumbingCode } from './codes/plumbing-code.ts';
import type { Finding } from './findings/finding.ts';
import type { Building } from './loads/building.ts';
import type { FixtureFacts } from './loads/fixture-facts.ts';
import { fixtureLoads } from './loads/fixture-loads.ts';
import { loadPipes } from './loads/load-pipes.ts';
import type { Scenario } from './loads/loads.ts';
import { modelledSizes } from './loads/modelled-sizes.ts';
import type { Answers } from './model/answers.ts';
import { identify } from './model/identify.ts';
import type { FixtureKind, Identity } from './model/identity.ts';
import { fixtureKinds } from './model/identity-words.ts';
import type { Model } from './model/model.ts';
import type { NamesTable } from './model/names-table.ts';
import { usualDetail } from './model/usual-detail.ts';
import { buildNetwork } from './network/build-network.ts';
import { buildingOutline, cutAtOutline } from './network/building-outline.ts';
import { findPaths } from './paths/find-paths.ts';
import type { FixtureId, Paths } from './paths/paths.ts';
import { assignRoles } from './roles/assign-roles.ts';
import { sizePipes } from './sizes/size-pipes.ts';
import type { Outcome, Run } from './verdicts/outcome.ts';
import { reachVerdicts } from './verdicts/reach-verdicts.ts';

/** The stages in order, from a model to verdicts. Pure: the same input gives the same outcome, in Node and in the page. */
export function run(model: Model, code: PlumbingCode, answers: Answers, names: NamesTable): Outcome {
  const { value: identities, findings: identified } = identify(model, answers, names);
  const { maxGap } = answers.settings;
  const { leaveOut } = answers;
  const built = buildNetwork(model, identities, typeof maxGap === 'number' ? { maxGap, leaveOut } : { leaveOut });
  const outline = buildingOutline(model);
  const network = cutAtOutline(outline, identities, built.value, code.sewerBegins);
  const findings = [...model.findings, ...identified, ...built.findings];
  return runNetwork({ model, identities, network, outline, code, answers, findings });
}

/** A building whose network stands: as read from files, or changed by a study. */
export interface Piping extends Building {
  /** What reading and joining had to say. */
  readonly findings: readonly Finding[];
}

/** The stages from a network on. */
export function runNetwork({ findings, ...building }: Piping): Outcome {
  const { model, identities, network, code, answers } = building;
  const found = findPaths(model, identities, network, answers);
  const paths = found.value;
  const modelled = modelledSizes(model, network, code, answers);
  const facts: FixtureFacts = { ...building, paths, modelled };
  const shared: Finding[] = [...findings, ...found.findings.filter((one) => !isToldAsGap(one, findings))];
  const runs: Run[] = [];
  const scenarios = scenariosFor(facts);
  const runAs = (
    scenario: Scenario,
    kind: FixtureKind | null = null,
    known: readonly Identity[] = identities,
  ): { run: Run; findings: readonly Finding[] } => {
    const loads = loadPipes({ ...facts, identities: known }, scenario);
    const roles = assignRoles({ ...building, identities: known, paths, loads: loads.value });
    const sizes = sizePipes(roles.value.uses, code);
    return {
      run: { kind, loads: loads.value, roles: roles.value, sizes },
      findings: [...loads.findings, ...roles.findings],
    };
  };
  for (const scenario of scenarios) {
    const { run, findings: found } = runAs(scenario);
    runs.push(run);
    if (scenario === scenarios.at(-1)) shared.push(...found);
  }
  if (runs.some((run) => readingsHang(run, paths.fixtures, identities)))
    for (const kind of fixtureKinds) {
      const known = withKind(identities, kind);
      const isOpen = fixtureLoads({ ...facts, identities: known }, 'heaviest').some(({ settled }) => !settled);
      runs.unshift(
        ...(isOpen ? (['lightest', 'heaviest'] as const) : (['as-modelled'] as const)).map(
          (one) => runAs(one, kind, known).run,
        ),
      );
    }
  // Where the fixtures leave nothing open, the way drains enter a stack still may.
  if (scenarios.length === 1 && runs.some(leavesEntriesOpen)) runs.unshift(runAs('lightest').run);
  return reachVerdicts({ ...building, paths, runs, findings: shared, read: findings });
}

/** An end that stays open before a gap is told with the gap. */
const isToldAsGap = ({ code, about }: Finding, findings: readonly Finding[]): boolean =>
  code === 'open-end' && findings.some((known) => known.code === 'open-end' && known.about.includes(about[0]!));

const leavesEntriesOpen = ({ roles }: Run): boolean =>
  roles.uses.some(({ stack }) => stack?.entries?.some(({ known }) => !known) === true);

const isUnidentified = ({ part, kind }: Identity): boolean =>
  kind === null && (part === 'fixture' || part === 'unknown-terminal');

/** The identities with every unidentified fixture as one kind. */
const withKind = (identities: readonly Identity[], kind: FixtureKind): Identity[] =>
  identities.map((one) =>
    isUnidentified(one) ? { ...one, kind, detail: { ...usualDetail(kind), domestic: one.detail.domestic } } : one,
  );

/**
 * What a fixture is decides whether its row may share a vent: where one that nobody knows stands in a row, or goes without
 * a vent, its size alone does not tell the extremes, and every kind is tried.
 */
const readingsHang = ({ roles }: Run, fixtures: Paths['fixtures'], identities: readonly Identity[]): boolean => {
  const isOpen = (fixture: FixtureId): boolean => isUnidentified(identities[fixtures[fixture]!.element]!);
  return (
    roles.batteries.some(({ facts }) => [...facts.traps, ...facts.guests].some(({ fixture }) => isOpen(fixture))) ||
    fixtures.some(
      ({ id }) =>
        isOpen(id) && roles.venting[id]!.battery === null && ['free', 'unvented'].includes(roles.venting[id]!.how),
    )
  );
};

/** One run where nothing is open; the lightest and the heaviest where a detail is; a closet too where a kind is. */
function scenariosFor(facts: FixtureFacts): Scenario[] {
  const { paths, identities } = facts;
  if (paths.fixtures.some(({ element }) => identities[element]!.kind === null))
    return ['lightest', 'heaviest', 'closet'];
  return fixtureLoads(facts, 'heaviest').every(({ settled }) => settled) ? ['as-modelled'] : ['lightest', 'heaviest'];
}

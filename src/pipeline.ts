import type { PlumbingCode } from './codes/plumbing-code.ts';
import type { Finding } from './findings/finding.ts';
import type { PlanPoint } from './geometry/plan-outline.ts';
import type { FixtureFacts } from './loads/fixture-facts.ts';
import { fixtureLoads } from './loads/fixture-loads.ts';
import { loadPipes } from './loads/load-pipes.ts';
import type { Scenario } from './loads/loads.ts';
import { modelledSizes } from './loads/modelled-sizes.ts';
import type { Answers } from './model/answers.ts';
import { identify } from './model/identify.ts';
import type { Identity } from './model/identity.ts';
import type { Model } from './model/model.ts';
import type { NamesTable } from './model/names-table.ts';
import { buildNetwork } from './network/build-network.ts';
import { buildingOutline, cutAtOutline } from './network/building-outline.ts';
import type { Network } from './network/network.ts';
import { findPaths } from './paths/find-paths.ts';
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
export interface Piping {
  readonly model: Model;
  readonly identities: readonly Identity[];
  readonly network: Network;
  /** Of the building in plan; null where the model draws none. */
  readonly outline: readonly PlanPoint[] | null;
  readonly code: PlumbingCode;
  readonly answers: Answers;
  /** What reading and joining had to say. */
  readonly findings: readonly Finding[];
}

/** The stages from a network on. */
export function runNetwork({ findings, ...piping }: Piping): Outcome {
  const { model, identities, network, outline, code, answers } = piping;
  const found = findPaths(model, identities, network, answers);
  const paths = found.value;
  const modelled = modelledSizes(model, network, code, answers);
  const facts: FixtureFacts = { model, identities, network, paths, code, answers, modelled };
  const shared: Finding[] = [...findings, ...found.findings.filter((one) => !isToldAsGap(one, findings))];
  const runs: Run[] = [];
  const scenarios = scenariosFor(facts);
  const runAs = (scenario: Scenario): { run: Run; findings: readonly Finding[] } => {
    const loads = loadPipes(facts, scenario);
    const roles = assignRoles({ model, identities, network, paths, loads: loads.value, code, answers, outline });
    const sizes = sizePipes(roles.value.uses, code);
    return {
      run: { loads: loads.value, roles: roles.value, sizes },
      findings: [...loads.findings, ...roles.findings],
    };
  };
  for (const scenario of scenarios) {
    const { run, findings: found } = runAs(scenario);
    runs.push(run);
    if (scenario === scenarios.at(-1)) shared.push(...found);
  }
  // Where the fixtures leave nothing open, the way drains enter a stack still may.
  if (scenarios.length === 1 && runs.some(leavesEntriesOpen)) runs.unshift(runAs('lightest').run);
  return reachVerdicts({
    model,
    identities,
    network,
    outline,
    paths,
    code,
    answers,
    runs,
    findings: shared,
    read: findings,
  });
}

/** An end that stays open before a gap is told with the gap. */
const isToldAsGap = ({ code, about }: Finding, findings: readonly Finding[]): boolean =>
  code === 'open-end' && findings.some((known) => known.code === 'open-end' && known.about.includes(about[0]!));

const leavesEntriesOpen = ({ roles }: Run): boolean =>
  roles.uses.some(({ stack }) => stack?.entries?.some(({ known }) => !known) === true);

/** One run where nothing is open; the lightest and the heaviest where a detail is; a closet too where a kind is. */
function scenariosFor(facts: FixtureFacts): Scenario[] {
  const { paths, identities } = facts;
  if (paths.fixtures.some(({ element }) => identities[element]!.kind === null))
    return ['lightest', 'heaviest', 'closet'];
  return fixtureLoads(facts, 'heaviest').every(({ settled }) => settled) ? ['as-modelled'] : ['lightest', 'heaviest'];
}

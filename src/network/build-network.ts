import type { Finding, WithFindings } from '../findings/finding.ts';
import type { Identity } from '../model/identity.ts';
import type { ElementId, Model } from '../model/model.ts';
import { assemble } from './assemble.ts';
import { findDoubles } from './doubles.ts';
import { fatesOf } from './fates.ts';
import { gapHabit } from './gap-habit.ts';
import { joinFixtures } from './join-fixtures.ts';
import { joinRunsThrough } from './join-runs-through.ts';
import { joinTouching } from './join-touching.ts';
import { isAnsweredOut, type LeftOutReason, leftOutReason } from './left-out-reason.ts';
import { misfiledByPlace, misfiledByPorts, misfiledFindings } from './misfiled.ts';
import type { Network } from './network.ts';
import { contradictedJoints, inferredJoints, unconnectedFixtures } from './network-findings.ts';
import { openEnds } from './open-ends.ts';
import { findPieces } from './pieces.ts';
import { endNode, pipingOf } from './piping.ts';
import { joinPorts } from './port-joins.ts';
import { proposeJoins } from './propose-joins.ts';
import { freeEnds, settleJoins } from './settle-joins.ts';
import { reachOf } from './tolerance.ts';
import { Welds } from './welds.ts';

export interface NetworkOptions {
  /** Widest gap to bridge, metres; absent: by the pipe's diameter, 50 mm at most. */
  readonly maxGap?: number;
  /** Systems to leave out, by name or GlobalId. */
  readonly leaveOut?: readonly string[];
}

/**
 * Joints and pipes of the sanitary drainage. Connected ports decide; where they are missing, geometry proposes. Every
 * element of the model has a fate, with the reason where it is not in the network.
 */
export function buildNetwork(
  model: Model,
  identities: readonly Identity[],
  options: NetworkOptions = {},
): WithFindings<Network> {
  const maxGap = options.maxGap ?? null;
  const reasons = model.elements.map((element) =>
    model.files[element.file]?.isApart === true
      ? 'file apart'
      : isAnsweredOut(element, model, options.leaveOut ?? [])
        ? 'answer'
        : leftOutReason(element, identities[element.id]!, model),
  );
  const byPorts = misfiledByPorts(model, identities, reasons);
  let joining = joinAll(model, identities, without(reasons, byPorts), maxGap);
  const byPlace = misfiledPipes(model, identities, joining);
  if (byPlace.length > 0) joining = joinAll(model, identities, without(joining.reasons, byPlace), maxGap);

  const { piping, welds, flows, proposals } = joining;
  const pieces = findPieces(identities, piping, welds);
  const fates = fatesOf(model, identities, { ...joining, pieces });
  const stays = (node: number): boolean => {
    const { use } = fates[welds.elementOf(node)]!;
    return use !== 'left-out' && use !== 'unresolved';
  };
  const assembly = assemble(model, piping, welds, flows, stays);
  const kept = welds.all.filter(({ nodes }) => stays(nodes[0]));
  const ported = kept.filter(({ how }) => how === 'ports').length;

  const findings: Finding[] = [
    ...joining.doubles.filter(({ about }) => fates[about[1]!]!.use !== 'left-out'),
    ...misfiledFindings([...byPorts, ...byPlace], identities, model),
    ...contradictedJoints(joining.contradictions.filter(({ between }) => fates[between[0]]!.use !== 'left-out')),
    ...inferredJoints(welds, stays, joining.habit),
    ...openEnds(proposals, piping, welds, stays),
    ...(assembly.pipes.length > 0 ? unconnectedFixtures(identities, piping, welds, freeEnds(piping, welds)) : []),
  ];
  return { value: { ...assembly, fates, joined: { ports: ported, geometry: kept.length - ported } }, findings };
}

type Reasons = readonly (LeftOutReason | null)[];

const without = (reasons: Reasons, readmitted: readonly ElementId[]): Reasons => {
  const back = new Set<number>(readmitted);
  return reasons.map((reason, id) => (back.has(id) ? null : reason));
};

/** Ports first, then geometry, from what lies in a fitting to what lies under a fixture. */
function joinAll(model: Model, identities: readonly Identity[], given: Reasons, maxGap: number | null) {
  let reach = reachOf(maxGap);
  const taking = given.map((reason) => reason === null);
  const { keeper, findings: doubles, sleeves } = findDoubles(model, identities, taking);
  const isSleeve = new Set<number>(sleeves);
  const reasons = given.map((reason, id) => (isSleeve.has(id) ? ('sleeve or insulation' as const) : reason));
  const candidates = reasons.map((reason) => reason === null);
  const piping = pipingOf(
    model,
    identities,
    candidates.map((takesPart, id) => takesPart && keeper[id] === id),
  );
  const welds = new Welds(piping);
  const { contradictions, flows } = joinPorts(model, identities, piping, keeper, welds);
  const everyEnd = piping.pipes.flatMap((_, pipe) => [endNode(pipe, 0), endNode(pipe, 1)]);
  const free = freeEnds(piping, welds);
  let proposals = proposeJoins(piping, free, everyEnd, reach);
  const habit = gapHabit(proposals);
  if (habit > 0) {
    reach = reachOf(maxGap, habit);
    proposals = proposeJoins(piping, free, everyEnd, reach);
  }
  settleJoins(proposals, model, piping, welds, reach);
  joinRunsThrough(model, piping, welds);
  joinTouching(model, piping, welds, reach);
  joinFixtures(model, identities, piping, welds, reach);
  return { reasons, keeper, doubles, piping, welds, contradictions, flows, proposals, reach, habit };
}

function misfiledPipes(
  model: Model,
  identities: readonly Identity[],
  { reasons, piping, welds, reach }: ReturnType<typeof joinAll>,
): readonly ElementId[] {
  const suspects = reasons.map(
    (reason, id) =>
      reason !== null &&
      reason !== 'answer' &&
      reason !== 'sleeve or insulation' &&
      reason !== 'file apart' &&
      identities[id]!.part === 'pipe',
  );
  return misfiledByPlace(pipingOf(model, identities, suspects).pipes, piping, welds, reach);
}

import type { Finding, WithFindings } from '../findings/finding.ts';
import type { Identity } from '../model/identity.ts';
import type { Model } from '../model/model.ts';
import { assemble } from './assemble.ts';
import { findDoubles } from './doubles.ts';
import { fatesOf } from './fates.ts';
import { joinFixtures, joinRunsThrough, joinTouching } from './join-bodies.ts';
import { isAnsweredOut, leftOutReason } from './left-out-reason.ts';
import type { Network } from './network.ts';
import { contradictedJoints, inferredJoints, openEnds, unconnectedFixtures } from './network-findings.ts';
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
  const leaveOut = options.leaveOut ?? [];
  const reasons = model.elements.map((element) =>
    isAnsweredOut(element, model, leaveOut) ? 'answer' : leftOutReason(element, identities[element.id]!, model),
  );
  const candidates = reasons.map((reason) => reason === null);
  const { keeper, findings: doubles } = findDoubles(model, identities, candidates);
  const piping = pipingOf(
    model,
    identities,
    candidates.map((takesPart, id) => takesPart && keeper[id] === id),
  );
  const welds = new Welds(piping);
  const { contradictions, flows } = joinPorts(model, identities, piping, keeper, welds);

  const reach = reachOf(options.maxGap ?? null);
  const everyEnd = piping.pipes.flatMap((_, pipe) => [endNode(pipe, 0), endNode(pipe, 1)]);
  const proposals = proposeJoins(piping, freeEnds(piping, welds), everyEnd, reach);
  settleJoins(proposals, model, piping, welds, reach);
  joinTouching(model, piping, welds, reach);
  joinRunsThrough(model, piping, welds);
  joinFixtures(model, identities, piping, welds, reach);

  const pieces = findPieces(identities, piping, welds);
  const fates = fatesOf(model, identities, { reasons, keeper, piping, welds, pieces });
  const stays = (node: number): boolean => {
    const { use } = fates[welds.elementOf(node)]!;
    return use !== 'left-out' && use !== 'unresolved';
  };
  const assembly = assemble(model, piping, welds, flows, stays);
  const kept = welds.all.filter(({ nodes }) => stays(nodes[0]));
  const byPorts = kept.filter(({ how }) => how === 'ports').length;

  const findings: Finding[] = [
    ...doubles,
    ...contradictedJoints(contradictions.filter(({ between }) => fates[between[0]]!.use !== 'left-out')),
    ...inferredJoints(welds, stays),
    ...openEnds(proposals, piping, welds, stays),
    ...(assembly.pipes.length > 0 ? unconnectedFixtures(identities, piping, welds, freeEnds(piping, welds)) : []),
  ];
  const joined = { ports: byPorts, geometry: kept.length - byPorts };
  return { value: { ...assembly, fates, joined }, findings };
}

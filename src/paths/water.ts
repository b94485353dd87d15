import { type Finding, finding } from '../findings/finding.ts';
import { distanceFromHull } from '../geometry/plan-outline.ts';
import { planDistance } from '../geometry/vector.ts';
import type { Answers } from '../model/answers.ts';
import type { Identity } from '../model/identity.ts';
import type { ElementId, Model } from '../model/model.ts';
import { buildingOutline } from '../network/building-outline.ts';
import type { JointId, Network, Pipe, PipeId } from '../network/network.ts';
import { otherEnd } from '../network/other-end.ts';
import { coordinateMetres } from '../units/uncertainty.ts';
import { connectedPieces } from './connected-pieces.ts';
import type { DrainSystem, FixtureId, FixturePath, Paths } from './paths.ts';
import { waysOut } from './ways-out.ts';

/** What the water of the fixtures makes of the pipes; `toward` is null for dry ones. */
export type Water = Pick<Paths, 'systems' | 'fixtures' | 'next' | 'toward' | 'wet' | 'inFlowOrder' | 'entering'>;

/** Costs that order the ways of water: a metre of climb outweighs any length; ports and vent systems are dear. */
const climbPerMetre = 1000;
const lengthPerMetre = 0.001;
const againstPorts = 50;
const throughVent = 100;

/** Rise in metres along the way from `from`, over what coordinates can tell: a smaller climb is not one. */
export function climbOf(pipe: Pipe, from: JointId): number {
  if (pipe.points === null) return 0;
  const fall = drawnFall(pipe);
  return Math.max(0, (pipe.ends[0] === from ? -fall : fall) - coordinateMetres);
}

/** Metres from end 0 down to end 1, as drawn or as laid anew. */
function drawnFall({ points, laid }: Pipe): number {
  const first = points![0]!;
  const last = points![points!.length - 1]!;
  return laid === undefined ? first[2] - last[2] : laid * planDistance(first, last);
}

export function waterPaths(
  model: Model,
  identities: readonly Identity[],
  network: Network,
  answers: Answers,
  rank: Int32Array,
  findings: Finding[],
): Water {
  const { pipes, joints } = network;
  const drainers = drainFixtures(identities, network);
  const next: (PipeId | null)[] = pipes.map(() => null);
  const downJoint: (JointId | null)[] = pipes.map(() => null);
  const wet: boolean[] = pipes.map(() => false);
  const entering: FixtureId[][] = pipes.map(() => []);
  const ends: FoundEnd[] = [];
  const fixtures: FixturePath[] = [];
  const byJoint = new Map<JointId, { element: ElementId; id: FixtureId }[]>();
  drainers.forEach(({ element, outlet }, index) => {
    byJoint.set(outlet, [...(byJoint.get(outlet) ?? []), { element, id: index as FixtureId }]);
  });

  const isVent = pipes.map((pipe) => pipe.element !== null && identities[pipe.element]?.medium === 'vent');
  const cost = (pipe: PipeId, from: JointId): number => {
    const it = pipes[pipe]!;
    const against = it.portFlow === null ? false : (it.portFlow === 'forward') !== (it.ends[0] === from);
    return (
      climbOf(it, from) * climbPerMetre +
      (it.length + it.reach[0] + it.reach[1]) * lengthPerMetre +
      (against ? againstPorts : 0) +
      (isVent[pipe] ? throughVent : 0)
    );
  };

  /** First pipe of the way to the sewer, by joint. */
  const wayOut: (PipeId | null)[] = joints.map(() => null);
  for (const piece of connectedPieces(network)) {
    const outlets = piece.joints.filter((joint) => byJoint.has(joint));
    if (outlets.length === 0) continue;
    const out = waysOut(piece, outlets, { model, identities, network, answers, isVent, cost, rank });
    if (out === null) {
      const about = piece.joints.flatMap((joint) => (byJoint.get(joint) ?? []).map(({ element }) => element));
      findings.push(finding('no-sewer-end', about, { fixtures: about.length }));
      continue;
    }
    for (const joint of piece.joints) wayOut[joint] = out.via(joint);
    for (const { joint, how, candidates, pipes: own } of out.ends)
      ends.push({ sewerEnd: joint, how, pipes: own, candidates });
  }
  const systems = drainSystems(model, network, ends);

  drainers.forEach(({ element, outlet }, index) => {
    const path: PipeId[] = [];
    let joint = outlet;
    for (let pipe = wayOut[joint] ?? null; pipe !== null; pipe = wayOut[joint] ?? null) {
      path.push(pipe);
      wet[pipe] = true;
      joint = otherEnd(network, pipe, joint);
      downJoint[pipe] = joint;
      next[pipe] = wayOut[joint] ?? null;
    }
    if (path[0] !== undefined) entering[path[0]]!.push(index as FixtureId);
    fixtures.push({ id: index as FixtureId, element, outlet, water: path });
    const others = otherOutlets(network, outlet, wayOut, isVent);
    if (others.length > 0)
      findings.push(finding('double-water-path', [element, ...others], { ways: others.length + 1 }));
  });

  for (const [place, { sewerEnd, how, candidates }] of ends.entries()) {
    if (isSaid(how)) continue;
    const at = joints[sewerEnd]!;
    const pipe = at.pipes[0];
    const element = pipe === undefined ? at.elements[0] : (pipes[pipe]!.element ?? at.elements[0]);
    const about = element === undefined ? [] : [element];
    findings.push(finding('sewer-end-assumed', about, { how, z: at.at?.[2] ?? null, candidates }));
    if (!systems[place]!.isCutOff) continue;
    const own = new Set(systems[place]!.pipes);
    const lost = fixtures.filter(({ water }) => water[0] !== undefined && own.has(water[0])).length;
    findings.push(finding('open-end', about, { cutOff: true, fixtures: lost }));
  }
  return { systems, fixtures, next, toward: downJoint, wet, inFlowOrder: flowOrder(network, wet, next), entering };
}

type FoundEnd = Omit<DrainSystem, 'isCutOff'> & { readonly candidates: number };

/**
 * Piping that ends inside the building, where nobody said that it does though of other piping somebody did, is rather
 * broken off. Where no outline tells inside from outside it is taken for a way out, which asks for no less.
 */
function drainSystems(model: Model, { joints }: Network, ends: readonly FoundEnd[]): DrainSystem[] {
  const anySaid = ends.some(({ how }) => isSaid(how));
  const outline = anySaid && ends.some(({ how }) => !isSaid(how)) ? buildingOutline(model) : null;
  return ends.map(({ candidates: _, ...end }): DrainSystem => {
    const at = joints[end.sewerEnd]!.at;
    const isInside = outline !== null && at !== null && distanceFromHull(outline, at) === 0;
    return { ...end, isCutOff: isInside && !isSaid(end.how) };
  });
}

/** Pipes by which water of a fixture might leave as well: they lead away from it, and not upward as a vent does. */
function otherOutlets(
  network: Network,
  outlet: JointId,
  wayOut: readonly (PipeId | null)[],
  isVent: readonly boolean[],
): ElementId[] {
  return network.joints[outlet]!.pipes.flatMap((id) => {
    const pipe = network.pipes[id]!;
    const [a, b] = pipe.ends;
    const far = a === outlet ? b : a;
    const leaves = id !== wayOut[outlet] && far !== outlet && wayOut[far] !== id && wayOut[far] != null;
    return leaves && pipe.element !== null && !isVent[id] && climbOf(pipe, outlet) === 0 ? [pipe.element] : [];
  });
}

const isSaid = (how: DrainSystem['how']): boolean => how === 'answer' || how === 'named';

/** Every wet pipe after those that flow into it; ties by pipe id. */
function flowOrder(network: Network, wet: readonly boolean[], next: readonly (PipeId | null)[]): PipeId[] {
  const waiting = new Int32Array(network.pipes.length);
  for (const { id } of network.pipes) {
    const down = next[id];
    if (wet[id] && down !== null && down !== undefined) waiting[down]!++;
  }
  const order: PipeId[] = network.pipes.filter(({ id }) => wet[id] && waiting[id] === 0).map(({ id }) => id);
  for (let at = 0; at < order.length; at++) {
    const down = next[order[at]!];
    if (down !== null && down !== undefined && --waiting[down]! === 0) order.push(down);
  }
  return order;
}

function drainFixtures(identities: readonly Identity[], network: Network): { element: ElementId; outlet: JointId }[] {
  const found: { element: ElementId; outlet: JointId }[] = [];
  for (const [element, where] of [...network.jointsOf].sort(([a], [b]) => a - b)) {
    const part = identities[element]?.part;
    if (part !== 'fixture' && part !== 'unknown-terminal') continue;
    if (network.fates[element]?.use !== 'fixture') continue;
    const piped = where.filter((joint) => network.joints[joint]!.pipes.length > 0);
    const lowest = [...piped].sort((a, b) => heightOf(network, a) - heightOf(network, b) || a - b)[0];
    if (lowest !== undefined) found.push({ element, outlet: lowest });
  }
  return found;
}

const heightOf = (network: Network, joint: JointId): number => network.joints[joint]!.at?.[2] ?? 0;

/** Order of pipes that does not depend on lines or numbering: by GlobalId of the element, then place along it. */
export function pipeRanks(model: Model, network: Network): Int32Array {
  const key = (pipe: Pipe): string => (pipe.element === null ? '~' : (model.elements[pipe.element]?.globalId ?? '~'));
  const order = network.pipes
    .map((pipe) => ({ id: pipe.id, key: key(pipe), from: pipe.from, length: pipe.length }))
    .sort((a, b) => (a.key < b.key ? -1 : a.key > b.key ? 1 : a.from - b.from || a.length - b.length || a.id - b.id));
  const rank = new Int32Array(network.pipes.length);
  order.forEach(({ id }, place) => {
    rank[id] = place;
  });
  return rank;
}

import type { Finding } from '../findings/finding.ts';
import type { Identity } from '../model/identity.ts';
import type { Model } from '../model/model.ts';
import type { JointId, Network, PipeId } from '../network/network.ts';
import { otherEnd } from '../network/other-end.ts';
import { cheapestWays } from './cheapest-ways.ts';
import { reportClosedPieces } from './closed-pieces.ts';
import { openAirAt } from './open-air.ts';
import type { DryPiece, Paths } from './paths.ts';

export interface Dry extends Pick<Paths, 'pieces' | 'pieceOf' | 'wayUp'> {
  /** Joint of a dry pipe toward the sky; null where its piece has no mouth. By pipe id. */
  readonly skyward: readonly (JointId | null)[];
}

/** A metre down on the way to the sky costs as much as 100 m of pipe: air is led upward where there is a choice. */
const downPerMetre = 100;

/** Dry piping in pieces that meet wet pipes only at their feet, each with its ways to open air. */
export function dryPieces(
  model: Model,
  identities: readonly Identity[],
  network: Network,
  wet: readonly boolean[],
  rank: Int32Array,
  findings: Finding[],
): Dry {
  const { joints, pipes } = network;
  const isWetJoint = joints.map(({ pipes: meeting }) => meeting.some((pipe) => wet[pipe]));
  const sky = openAirAt(model, identities, network);
  const { pieces, pieceOf } = collectPieces(network, wet, isWetJoint, sky);
  findings.push(...reportClosedPieces(network, identities, pieces, sky.assumed()));

  // One search serves all pieces: their dry joints are apart, and wet joints close the way.
  const search = cheapestWays(
    network,
    pieces.flatMap(({ mouths }) => mouths.map(({ joint }) => joint)),
    (pipe, to, from) =>
      wet[pipe] || isWetJoint[to] || isWetJoint[from] ? Number.POSITIVE_INFINITY : moveCost(network, pipe, to, from),
    rank,
  );
  const costAt = (joint: JointId): number => (isWetJoint[joint] ? Number.POSITIVE_INFINITY : search.cost[joint]!);

  const footWays = new Map<JointId, Map<number, PipeId>>();
  for (const { id, feet, mouths } of pieces) {
    if (mouths.length === 0) continue;
    for (const foot of feet) {
      let best: { pipe: PipeId; cost: number } | null = null;
      for (const pipe of joints[foot]!.pipes) {
        if (pieceOf[pipe] !== id) continue;
        const far = otherEnd(network, pipe, foot);
        const cost = costAt(far) + moveCost(network, pipe, far, foot);
        if (cost === Number.POSITIVE_INFINITY) continue;
        if (best === null || cost < best.cost || (cost === best.cost && rank[pipe]! < rank[best.pipe]!))
          best = { pipe, cost };
      }
      if (best === null) continue;
      const ways = footWays.get(foot) ?? new Map<number, PipeId>();
      footWays.set(foot, ways.set(id, best.pipe));
    }
  }
  const skyward = pipes.map(({ id, ends: [a, b] }): JointId | null => {
    if (wet[id]) return null;
    const ca = costAt(a);
    const cb = costAt(b);
    if (ca === Number.POSITIVE_INFINITY && cb === Number.POSITIVE_INFINITY) return null;
    return ca < cb ? a : b;
  });
  return {
    pieces,
    pieceOf,
    skyward,
    wayUp: (joint, piece) =>
      isWetJoint[joint] ? (footWays.get(joint)?.get(piece) ?? null) : (search.via[joint] ?? null),
  };
}

function collectPieces(
  network: Network,
  wet: readonly boolean[],
  isWetJoint: readonly boolean[],
  sky: ReturnType<typeof openAirAt>,
): { pieces: DryPiece[]; pieceOf: (number | null)[] } {
  const { joints, pipes } = network;
  const pieceOf: (number | null)[] = pipes.map(() => null);
  const pieces: DryPiece[] = [];
  for (const { id } of pipes) {
    if (wet[id] || pieceOf[id] !== null) continue;
    const piece = pieces.length;
    const members: PipeId[] = [id];
    pieceOf[id] = piece;
    const dryJoints = new Set<JointId>();
    const feet = new Set<JointId>();
    for (let at = 0; at < members.length; at++) {
      for (const joint of pipes[members[at]!]!.ends) {
        if (isWetJoint[joint]) feet.add(joint);
        if (isWetJoint[joint] || dryJoints.has(joint)) continue;
        dryJoints.add(joint);
        for (const pipe of joints[joint]!.pipes) {
          if (pieceOf[pipe] !== null || wet[pipe]) continue;
          pieceOf[pipe] = piece;
          members.push(pipe);
        }
      }
    }
    const mouths = [...dryJoints]
      .sort((a, b) => a - b)
      .flatMap((joint) => {
        const how = sky(joint);
        return how === null ? [] : [{ joint, how }];
      });
    pieces.push({ id: piece, pipes: members.sort((a, b) => a - b), feet: [...feet].sort((a, b) => a - b), mouths });
  }
  return { pieces, pieceOf };
}

/** Length, and dear metres down. */
function moveCost(network: Network, pipe: PipeId, to: JointId, from: JointId): number {
  const { length, reach } = network.pipes[pipe]!;
  const a = network.joints[from]!.at;
  const b = network.joints[to]!.at;
  const down = a === null || b === null ? 0 : Math.max(0, a[2] - b[2]);
  return length + reach[0] + reach[1] + down * downPerMetre;
}

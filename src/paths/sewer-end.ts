import { keyMatches } from '../model/answer-keys.ts';
import type { Answers } from '../model/answers.ts';
import type { Identity } from '../model/identity.ts';
import type { Model } from '../model/model.ts';
import type { JointId, Network, PipeId } from '../network/network.ts';
import type { Piece } from './connected-pieces.ts';
import type { DrainSystem } from './paths.ts';

export interface SewerEndFacts {
  readonly model: Model;
  readonly identities: readonly Identity[];
  readonly network: Network;
  readonly answers: Answers;
  readonly isVent: readonly boolean[];
}

export interface SewerEnd extends Pick<DrainSystem, 'how'> {
  readonly joint: JointId;
  readonly candidates: number;
  /** What else is named or answered as an end, lowest first. */
  readonly others: readonly JointId[];
}

/** Ends whose heights differ by less count as equally low. */
const equalHeight = 0.01;

/**
 * Where one connected piece leaves: the user's answer, an element that says so, the end of the ports' directions, the
 * lowest open end outside vent systems, the largest, the lowest GlobalId. null: the piece has no end to leave by.
 */
export function sewerEndOf(piece: Piece, facts: SewerEndFacts): SewerEnd | null {
  const { network, identities } = facts;
  const answered = piece.joints.filter((joint) => isAnswered(joint, facts));
  if (answered.length > 0) return firstOf(openFirst(answered, network), 'answer');

  const named = piece.joints.filter(
    (joint) =>
      endsInNamedPipe(joint, facts) ||
      network.joints[joint]!.elements.some((element) => identities[element]?.part === 'sewer-connection'),
  );
  if (named.length > 0) return firstOf(lowestFirst(named, network), 'named');

  const open = piece.joints.filter((joint) => isOpenEnd(joint, facts) || hasFreeOutlet(joint, facts));
  if (open.length === 0) return null;
  const outward = open.filter((joint) => portsLeave(joint, network) || hasFreeOutlet(joint, facts));
  const assumed = (joint: JointId, how: DrainSystem['how']): SewerEnd => ({
    joint,
    how,
    candidates: open.length,
    others: [],
  });
  if (outward.length === 1) return assumed(outward[0]!, 'ports');
  const pool = outward.length > 1 ? outward : open;

  const lowest = lowestOf(pool, facts);
  if (lowest.length === 1) return assumed(lowest[0]!, pool === outward ? 'ports' : 'lowest');
  const widths = lowest.map((joint) => widthAt(joint, facts));
  const widest = Math.max(...widths);
  const largest = lowest.filter((_, at) => widths[at] === widest);
  if (largest.length === 1) return assumed(largest[0]!, 'largest');
  const first = [...largest].sort((a, b) => (globalIdAt(a, facts) < globalIdAt(b, facts) ? -1 : 1))[0]!;
  return assumed(first, 'first');
}

const firstOf = ([joint, ...others]: readonly JointId[], how: DrainSystem['how']): SewerEnd => ({
  joint: joint!,
  how,
  candidates: others.length + 1,
  others,
});

/** One pipe ends here, it is no vent, and nothing that drains, closes or vents stands at it. */
function isOpenEnd(joint: JointId, { network, identities, isVent }: SewerEndFacts): boolean {
  const { pipes, elements } = network.joints[joint]!;
  if (pipes.length !== 1 || isVent[pipes[0]!]) return false;
  return elements.every((element) => {
    const part = identities[element]?.part;
    return part === 'chamber' || part === 'fitting' || part === 'pipe';
  });
}

/** The open end of a pipe that the model calls building sewer. */
function endsInNamedPipe(joint: JointId, { network, identities }: SewerEndFacts): boolean {
  const { pipes } = network.joints[joint]!;
  const element = pipes.length === 1 ? network.pipes[pipes[0]!]!.element : null;
  return element !== null && identities[element]!.detail.style === 'building-sewer';
}

/** A fitting or chamber that is joined by ports lets water out through one that nothing is joined to. */
function hasFreeOutlet(joint: JointId, { network, identities, model }: SewerEndFacts): boolean {
  return network.joints[joint]!.elements.some((element) => {
    const { part, medium } = identities[element]!;
    if ((part !== 'fitting' && part !== 'chamber') || medium === 'vent') return false;
    const ports = model.elements[element]!.ports.map((port) => model.ports[port]!);
    return (
      ports.some(({ connected }) => connected.length > 0) &&
      ports.some(({ connected, direction }) => connected.length === 0 && direction === 'source')
    );
  });
}

function portsLeave(joint: JointId, network: Network): boolean {
  if (network.joints[joint]!.pipes.length !== 1) return false;
  const pipe = network.pipes[network.joints[joint]!.pipes[0]!]!;
  return pipe.portFlow !== null && (pipe.portFlow === 'forward' ? pipe.ends[1] : pipe.ends[0]) === joint;
}

function lowestOf(joints: readonly JointId[], { network }: SewerEndFacts): JointId[] {
  const heights = joints.map((joint) => endHeight(joint, network));
  const floor = Math.min(...heights);
  return joints.filter((_, at) => heights[at]! <= floor + equalHeight);
}

function endHeight(joint: JointId, network: Network): number {
  const at = network.joints[joint]!;
  return at.at?.[2] ?? 0;
}

function widthAt(joint: JointId, { network, model }: SewerEndFacts): number {
  const widths = network.joints[joint]!.pipes.map((pipe) => pipeWidth(network, model, pipe));
  return Math.max(0, ...widths);
}

/** A length in millimetres that stands for the pipe's size, good enough to compare two ends of one model. */
function pipeWidth(network: Network, model: Model, pipe: PipeId): number {
  const element = network.pipes[pipe]!.element;
  if (element === null) return 0;
  const { sizes, centreLine } = model.elements[element]!;
  const outer = centreLine?.outerDiameter;
  return outer !== null && outer !== undefined ? outer * 1000 : (sizes.find(({ mm }) => mm !== null)?.mm ?? 0);
}

function isAnswered(joint: JointId, { network, model, answers }: SewerEndFacts): boolean {
  if (answers.sewerEnds.length === 0) return false;
  const { elements, pipes } = network.joints[joint]!;
  const named = (element: number | null): boolean =>
    element !== null && answers.sewerEnds.some((key) => keyMatches(key, model.elements[element]!));
  return elements.some(named) || (pipes.length === 1 && named(network.pipes[pipes[0]!]!.element));
}

const openFirst = (joints: readonly JointId[], network: Network): JointId[] =>
  lowestFirst(joints, network).sort((a, b) => network.joints[a]!.pipes.length - network.joints[b]!.pipes.length);

/** Heights that differ by less than counts are equal: then the model's own order decides. */
function lowestFirst(joints: readonly JointId[], network: Network): JointId[] {
  const floor = Math.min(...joints.map((joint) => endHeight(joint, network)));
  const level = (joint: JointId): number => Math.floor((endHeight(joint, network) - floor) / equalHeight);
  return [...joints].sort((a, b) => level(a) - level(b) || a - b);
}

function globalIdAt(joint: JointId, { network, model }: SewerEndFacts): string {
  const { pipes, elements } = network.joints[joint]!;
  const element = pipes[0] === undefined ? elements[0] : network.pipes[pipes[0]]!.element;
  return element === null || element === undefined ? '~' : (model.elements[element]?.globalId ?? '~');
}

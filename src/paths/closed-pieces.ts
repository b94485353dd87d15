import { type Finding, finding } from '../findings/finding.ts';
import type { Identity } from '../model/identity.ts';
import type { ElementId } from '../model/model.ts';
import type { JointId, Network, PipeId } from '../network/network.ts';
import type { DryPiece } from './paths.ts';

/** A dry piece that rises this far above its foot was meant for air, metres. */
const risesLikeAVent = 0.3;

/**
 * What dry piping without open air is: a vent that never gets out, a loop between drains, an open end, a dead end.
 * A cleanout's extension is none of them.
 */
export function reportClosedPieces(
  network: Network,
  identities: readonly Identity[],
  pieces: readonly DryPiece[],
  assumed: boolean,
): Finding[] {
  const findings: Finding[] = [];
  const unused: ElementId[] = [];
  for (const { pipes, feet, mouths } of pieces) {
    if (feet.length === 0) unused.push(...elementsOf(network, pipes));
    if (mouths.length > 0 || feet.length === 0) continue;
    const elements = elementsOf(network, pipes);
    if (elements.length === 0) continue;
    const ends = looseEnds(network, pipes, feet);
    const open = ends.filter((joint) => network.joints[joint]!.elements.length === 0);
    const closedBy = ends.flatMap((joint) =>
      network.joints[joint]!.elements.map((element) => identities[element]?.part),
    );
    const isVent = elements.some((element) => identities[element]?.medium === 'vent');
    if (feet.length > 1 && ends.length === 0) {
      findings.push(finding('loop', elements, { feet: feet.length }));
    } else if (open.length > 0 && (isVent || riseOf(network, feet, open) > risesLikeAVent)) {
      findings.push(
        finding('no-open-air', lastFirst(network, open[0]!, elements), {
          topM: network.joints[open[0]!]!.at?.[2] ?? null,
        }),
      );
    } else if (isVent && !closedBy.includes('cleanout')) {
      findings.push(finding('no-open-air', elements, { topM: null }));
    } else if (open.length > 0) {
      findings.push(finding('open-end', lastFirst(network, open[0]!, elements), { dry: true }));
    } else if (!closedBy.includes('cleanout')) {
      findings.push(finding('dead-end', elements, { feet: feet.length }));
    }
  }
  if (unused.length > 0)
    findings.push(
      finding(
        'dead-end',
        [...new Set(unused)].sort((a, b) => a - b),
        { noFixtures: true },
      ),
    );
  if (assumed) findings.push(finding('open-air-assumed', [], {}));
  return findings;
}

const elementsOf = (network: Network, pipes: readonly PipeId[]): ElementId[] => [
  ...new Set(pipes.flatMap((pipe) => network.pipes[pipe]!.element ?? [])),
];

function looseEnds(network: Network, pipes: readonly PipeId[], feet: readonly JointId[]): JointId[] {
  const ends = new Set<JointId>();
  for (const pipe of pipes) {
    for (const joint of network.pipes[pipe]!.ends) {
      if (network.joints[joint]!.pipes.length === 1 && !feet.includes(joint)) ends.add(joint);
    }
  }
  return [...ends].sort((a, b) => a - b);
}

function riseOf(network: Network, feet: readonly JointId[], open: readonly JointId[]): number {
  const height = (joint: JointId): number | undefined => network.joints[joint]!.at?.[2];
  const low = Math.min(...feet.map((joint) => height(joint) ?? Number.POSITIVE_INFINITY));
  const top = Math.max(...open.map((joint) => height(joint) ?? Number.NEGATIVE_INFINITY));
  return Number.isFinite(low) ? top - low : 0;
}

/** The pipe at the open end stands first: it is the one to mend. */
function lastFirst(network: Network, end: JointId, elements: readonly ElementId[]): ElementId[] {
  const last = network.pipes[network.joints[end]!.pipes[0]!]!.element;
  return last === null ? [...elements] : [last, ...elements.filter((element) => element !== last)];
}

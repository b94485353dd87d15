import type { CheckedMouth, CheckedVent } from '../codes/check.ts';
import type { PlumbingCode } from '../codes/plumbing-code.ts';
import type { ElementId } from '../model/model.ts';
import type { JointId, Network, PipeId } from '../network/network.ts';
import type { Paths } from '../paths/paths.ts';
import { streamOf } from '../paths/stream.ts';
import { stackUseAt } from '../roles/find-stacks.ts';
import type { VentFoot } from '../roles/roles.ts';
import { descentOf } from '../roles/vent-dip.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Run } from './outcome.ts';

/** Dry vents as a code's checks look at them, one for each foot that serves a trap or a stack. */
export function checkedVents(network: Network, paths: Paths, run: Run): CheckedVent[] {
  const { roles, loads } = run;
  const stream = streamOf(network, paths);
  const heightOf = (joint: JointId): number | null => network.joints[joint]!.at?.[2] ?? null;
  return roles.feet.flatMap((foot): CheckedVent[] => {
    const first = roles.uses[foot.path[0]!]!;
    if (first.role === 'idle') return [];
    const end = mouthOf(network, paths, foot);
    const from = heightOf(foot.joint);
    const to = end === null ? null : heightOf(end.joint);
    return [
      {
        elements: elementsOf(network, foot.path),
        role: first.role,
        traps: foot.traps.map((fixture) => {
          const { row } = loads.fixtures[fixture]!;
          const path = paths.fixtures[fixture]!;
          return { element: path.element, closet: row.closet, row: row.id, storey: roles.floors.of(path) };
        }),
        mouth: end?.how ?? null,
        rise: from === null || to === null ? null : to - from,
        descent: descentOf(network, foot),
        stack: stackBelow(foot),
      },
    ];
  });

  /** The stack that the vent stands on, or that the drain it vents comes to, and where. */
  function stackBelow({ joint }: VentFoot): CheckedVent['stack'] {
    let below: PipeId | null = stream.outflow[joint] ?? null;
    while (below !== null && roles.uses[below]!.stack === null) below = paths.next[below] ?? null;
    const id = below === null ? null : (roles.uses[below]!.stack?.id ?? null);
    if (below === null || id === null) return null;
    const stack = roles.stacks[id]!;
    const context = { network, paths, stream, loads, floors: roles.floors };
    const { allJoins } = stackUseAt(context, stack, stack.foot);
    return {
      joins: allJoins,
      height: heightOf(stream.up(below)),
      isOwn: roles.uses[below]!.pipe === stream.outflow[joint],
    };
  }
}

/** Where the vents of one building drain reach the air: each mouth once, as wide as its last pipe. */
export function mouthsOf(
  network: Network,
  paths: Paths,
  { series }: PlumbingCode,
  run: Run,
  feet: readonly VentFoot[],
): CheckedMouth[] {
  const mouths = new Map<JointId, CheckedMouth>();
  for (const foot of feet) {
    if (run.roles.uses[foot.path[0]!]!.role === 'idle') continue;
    const end = mouthOf(network, paths, foot);
    if (end === null) continue;
    const last = foot.path.at(-1)!;
    const drawn = run.loads.modelled[last]!.size;
    const required = run.sizes[last]!.size;
    const size: NominalSize | null =
      drawn === null ? required : required === null ? drawn : series.larger(drawn, required);
    const known = mouths.get(end.joint);
    if (known === undefined)
      mouths.set(end.joint, { elements: elementsOf(network, [last]), how: end.how, drawn, size });
  }
  return [...mouths.values()];
}

const elementsOf = (network: Network, pipes: readonly PipeId[]): ElementId[] => [
  ...new Set(pipes.flatMap((pipe) => network.pipes[pipe]!.element ?? [])),
];

function mouthOf(
  network: Network,
  paths: Paths,
  { joint, piece, path }: VentFoot,
): { joint: JointId; how: CheckedMouth['how'] } | null {
  let at = joint;
  for (const pipe of path) {
    const [a, b] = network.pipes[pipe]!.ends;
    at = a === at ? b : a;
  }
  return paths.pieces[piece]!.mouths.find((mouth) => mouth.joint === at) ?? null;
}

import type { CheckedMouth, CheckedVent, FloodFacts } from '../codes/check.ts';
import type { PlumbingCode } from '../codes/plumbing-code.ts';
import type { ElementId, Model } from '../model/model.ts';
import type { JointId, Network, PipeId } from '../network/network.ts';
import { otherEnd } from '../network/other-end.ts';
import type { OpenSky } from '../paths/open-air.ts';
import type { FixtureId, Paths } from '../paths/paths.ts';
import { pointsFrom } from '../paths/turns.ts';
import type { VentFoot } from '../roles/roles.ts';
import { descentOf } from '../roles/vent-dip.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Run } from './outcome.ts';

/** Dry vents as a code's checks look at them, one for each foot that serves a trap or a stack. */
export function checkedVents(model: Model, network: Network, paths: Paths, run: Run): CheckedVent[] {
  const { roles, loads } = run;
  const { stream } = paths;
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
        serves: served(foot).map(floodFacts),
        meets: meets(foot),
        runsLevelAt: runsLevelAt(foot),
        leavesAt: leavesAt(foot),
        mouth: end?.how ?? null,
        rise: from === null || to === null ? null : to - from,
        descent: descentOf(network, foot),
        stack: stackBelow(foot),
      },
    ];
  });

  /** A relief or further circuit vent has no traps of its own: it serves the row beside which it stands. */
  function served({ traps, path }: VentFoot): readonly FixtureId[] {
    const row = roles.uses[path[0]!]!.battery?.facts.traps ?? [];
    return traps.length > 0 ? traps : row.map(({ fixture }) => fixture);
  }

  function floodFacts(fixture: FixtureId): FloodFacts {
    const path = paths.fixtures[fixture]!;
    return {
      element: path.element,
      closet: loads.fixtures[fixture]!.row.closet,
      outlet: heightOf(path.outlet),
      top: model.elements[path.element]!.box?.max[2] ?? null,
      floor: roles.floors.elevations[roles.floors.of(path)] ?? 0,
    };
  }

  /** Its name changes where other air joins; the vents of a stack are joined by others and join none themselves. */
  function meets({ joint, path }: VentFoot): number | null {
    const { role } = roles.uses[path[0]!]!;
    if (role === 'stack-vent' || role === 'vent-stack' || role === 'yoke-vent') return null;
    let at = joint;
    for (const pipe of path) {
      if (roles.uses[pipe]!.role !== role) return heightOf(at);
      at = otherEnd(network, pipe, at);
    }
    return null;
  }

  function runsLevelAt({ joint, path }: VentFoot): number | null {
    const { role } = roles.uses[path[0]!]!;
    let at = joint;
    for (const pipe of path) {
      if (roles.uses[pipe]!.role !== role) return null;
      const from = pointsFrom(network, pipe, at)[0];
      if (from !== undefined && paths.vertical[pipe] === false && network.pipes[pipe]!.length > shortestLevel)
        return from[2];
      at = otherEnd(network, pipe, at);
    }
    return null;
  }

  function leavesAt({ joint, path }: VentFoot): number | null {
    const drains = [...stream.inflows[joint]!, stream.outflow[joint] ?? []].flat();
    if (drains.length === 0 || drains.some((pipe) => paths.vertical[pipe] !== false)) return null;
    let at = joint;
    for (const pipe of path) {
      const [from, to] = pointsFrom(network, pipe, at);
      if (from !== undefined && to !== undefined) {
        const plan = Math.hypot(to[0] - from[0], to[1] - from[1]);
        return (Math.atan2(to[2] - from[2], plan) * 180) / Math.PI;
      }
      at = otherEnd(network, pipe, at);
    }
    return null;
  }

  /** The stack that the vent stands on, or that the drain it vents comes to, and where. */
  function stackBelow({ joint }: VentFoot): CheckedVent['stack'] {
    let below: PipeId | null = stream.outflow[joint] ?? null;
    while (below !== null && roles.uses[below]!.stack === null) below = paths.next[below] ?? null;
    const stack = below === null ? null : roles.uses[below]!.stack;
    if (below === null || stack === null) return null;
    return {
      joins: stack.allJoins,
      height: heightOf(stream.up(below)),
      isOwn: roles.uses[below]!.pipe === stream.outflow[joint],
    };
  }
}

/** A shorter level piece is a fitting that brings the vent into its wall, metres. Common practice, no source. */
const shortestLevel = 0.3;

/** Where the vents of one building drain reach the air: each mouth once, as wide as its last pipe. */
export function mouthsOf(
  network: Network,
  paths: Paths,
  { series }: PlumbingCode,
  run: Run,
  feet: readonly VentFoot[],
  { model, sky }: { readonly model: Model; readonly sky: OpenSky },
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
      mouths.set(end.joint, {
        elements: elementsOf(network, [last]),
        how: end.how,
        drawn,
        size,
        overRoof: overRoof(end.joint),
      });
  }
  return [...mouths.values()];

  function overRoof(joint: JointId): number | null {
    const { at, elements } = network.joints[joint]!;
    if (at === null || !sky.roofed) return null;
    const tops = elements.flatMap((element) => model.elements[element]!.box?.max[2] ?? []);
    return Math.max(at[2], ...tops) - sky.above(at);
  }
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
    at = otherEnd(network, pipe, at);
  }
  return paths.pieces[piece]!.mouths.find((mouth) => mouth.joint === at) ?? null;
}

import type { CheckedAccess } from '../codes/check.ts';
import type { PlumbingCode } from '../codes/plumbing-code.ts';
import { readSize } from '../loads/read-size.ts';
import type { Identity } from '../model/identity.ts';
import type { Model } from '../model/model.ts';
import type { JointId, Network, PipeId } from '../network/network.ts';
import type { Paths } from '../paths/paths.ts';
import type { Stream } from '../paths/stream.ts';
import { spaceTurn } from '../paths/turns.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Run } from './outcome.ts';

export interface AccessFacts {
  readonly model: Model;
  readonly identities: readonly Identity[];
  readonly network: Network;
  readonly paths: Paths;
  readonly code: PlumbingCode;
  readonly run: Run;
}

/** Where cleanouts open the drains. */
export interface DrainAccess {
  readonly checked: CheckedAccess;
  /** A cleanout stands at the joint, or at the end of an extension that comes down to it. */
  readonly opens: (joint: JointId) => boolean;
}

/** Cleanouts on wet joints and at the ends of dry extensions, and how far each drain lies from the nearest. */
export function drainAccess(facts: AccessFacts): DrainAccess {
  const { network, paths, run } = facts;
  const { stream } = paths;
  const { cleanouts, joints } = openings(facts, stream);
  const opens = (joint: JointId): boolean => joints.has(joint);
  const distance = distances(facts, stream, joints);
  const sizeOf = (pipe: PipeId): NominalSize | null => run.loads.modelled[pipe]!.size ?? run.sizes[pipe]!.size;
  const drains = network.pipes.flatMap(({ id, element }): CheckedAccess['drains'][number][] => {
    const { drain, vertical } = run.roles.uses[id]!;
    const size = sizeOf(id);
    if (element === null || size === null || vertical) return [];
    if (drain !== 'branch' && drain !== 'building-drain') return [];
    const up = distance.get(stream.up(id));
    const down = distance.get(stream.down(id));
    // Where both ends are reached, the farthest place lies between them.
    const far = up === undefined || down === undefined ? null : (up + down + stream.span(id)) / 2;
    return [{ element, size, distance: far }];
  });
  return { checked: { cleanouts, drains, ...ofParts(facts, stream, opens) }, opens };
}

/** Sinks whose drains may need a cleanout, interceptors, and traps of the building drain. */
function ofParts(
  { identities, network, paths, run }: AccessFacts,
  stream: Stream,
  opens: (joint: JointId) => boolean,
): Pick<CheckedAccess, 'sinks' | 'interceptors' | 'buildingTraps'> {
  /** The pipes down to where other water joins, from the first on. */
  const alone = (start: PipeId | null): PipeId[] => {
    const list: PipeId[] = [];
    for (let pipe = start; pipe !== null; pipe = paths.next[pipe] ?? null) {
      list.push(pipe);
      if (stream.inflows[stream.down(pipe)]!.length > 1) break;
    }
    return list;
  };
  const opened = (pipes: readonly PipeId[]): boolean =>
    pipes.some((pipe) => opens(stream.up(pipe)) || opens(stream.down(pipe)));
  const sinks = paths.traps.flatMap(({ fixture, after }) => {
    const { element, water } = paths.fixtures[fixture]!;
    const drain = alone(water[after] ?? null);
    const first = drain[0];
    if (identities[element]!.kind !== 'kitchen-sink' || first === undefined) return [];
    return [{ element, turn: spaceTurn(network, drain, stream.up(first)), hasCleanout: opened(drain) }];
  });
  const interceptors = network.joints.flatMap(({ id, elements }) => {
    const element = elements.find((one) => identities[one]?.detail.style === 'interceptor');
    const drain = alone(stream.outflow[id] ?? null);
    return element === undefined || drain.length === 0 ? [] : [{ element, hasCleanout: opened(drain) }];
  });
  const seats = new Set(paths.traps.flatMap(({ how, at }) => (how === 'drawn' ? [at] : [])));
  const buildingTraps = network.joints.flatMap(({ id, elements }) => {
    const element = elements.find((one) => identities[one]?.part === 'trap');
    const after = stream.outflow[id] ?? null;
    const role = after === null ? null : run.roles.uses[after]!.drain;
    if (element === undefined || seats.has(id) || (role !== 'building-drain' && role !== 'building-sewer')) return [];
    const before = stream.inflows[id]!;
    const hasCleanout = opens(id) || before.some((pipe) => opens(stream.up(pipe)));
    return [{ element, hasCleanout, freshAir: ventUpstream(id) }];
  });
  return { sinks, interceptors, buildingTraps };

  /** The first dry vent against the water along the heaviest drain. */
  function ventUpstream(trap: JointId): CheckedAccess['buildingTraps'][number]['freshAir'] {
    let distance = 0;
    let joint = trap;
    for (;;) {
      const foot = run.roles.feet.find((one) => one.joint === joint);
      if (foot !== undefined) {
        const first = foot.path[0]!;
        return { distance, size: run.loads.modelled[first]!.size ?? run.sizes[first]!.size };
      }
      const [next] = [...stream.inflows[joint]!].sort((a, b) => run.loads.pipes[b]!.load - run.loads.pipes[a]!.load);
      if (next === undefined) return null;
      distance += stream.span(next);
      joint = stream.up(next);
    }
  }
}

/** Every cleanout of the drainage with the wet joints that it opens. */
function openings(
  { model, identities, network, paths, code, run }: AccessFacts,
  stream: Stream,
): { cleanouts: CheckedAccess['cleanouts']; joints: ReadonlySet<JointId> } {
  const joints = new Set<JointId>();
  const isWet = (joint: JointId): boolean => stream.outflow[joint] !== null || stream.inflows[joint]!.length > 0;
  const drawn = (pipe: PipeId): NominalSize | null => run.loads.modelled[pipe]!.size;
  const cleanouts = model.elements.flatMap(({ id }): CheckedAccess['cleanouts'][number][] => {
    if (identities[id]!.part !== 'cleanout') return [];
    const at = network.jointsOf.get(id) ?? [];
    const extensions = at.flatMap((joint) => (isWet(joint) ? [] : stream.dry[joint]!));
    const reached = [
      ...at.filter(isWet),
      ...extensions.flatMap((pipe) => paths.pieces[paths.pieceOf[pipe] ?? -1]?.feet ?? []),
    ];
    if (reached.length === 0) return [];
    for (const joint of reached) joints.add(joint);
    const served = reached.flatMap((joint) => [stream.outflow[joint] ?? [], stream.inflows[joint]!].flat());
    return [
      {
        element: id,
        size: readSize(model.elements[id]!, code.series, code.dimensions).size ?? largest(extensions, drawn, code),
        opens: largest(served.slice(0, 1), (pipe) => drawn(pipe) ?? run.sizes[pipe]!.size, code),
      },
    ];
  });
  return { cleanouts, joints };
}

function largest(
  pipes: readonly PipeId[],
  sizeOf: (pipe: PipeId) => NominalSize | null,
  { series }: PlumbingCode,
): NominalSize | null {
  const sizes = pipes.flatMap((pipe) => sizeOf(pipe) ?? []);
  return sizes.length === 0 ? null : sizes.reduce((a, b) => series.larger(a, b));
}

/** Metres of level drain, with the water or against it, from the nearest opened joint; a cable falls through upright pipe. */
function distances(
  { network, paths }: AccessFacts,
  stream: Stream,
  opened: ReadonlySet<JointId>,
): ReadonlyMap<JointId, number> {
  const found = new Map<JointId, number>([...opened].map((joint) => [joint, 0]));
  const waiting = [...found.keys()].sort((a, b) => a - b);
  // Drains form trees: a joint is settled again only where a nearer cleanout is met later.
  for (let at = 0; at < waiting.length; at++) {
    const joint = waiting[at]!;
    for (const pipe of network.joints[joint]!.pipes) {
      if (!paths.wet[pipe]) continue;
      const [a, b] = network.pipes[pipe]!.ends;
      const next = a === joint ? b : a;
      const far = found.get(joint)! + (paths.vertical[pipe] === true ? 0 : stream.span(pipe));
      if (far >= (found.get(next) ?? Number.POSITIVE_INFINITY) - 1e-9) continue;
      found.set(next, far);
      waiting.push(next);
    }
  }
  return found;
}

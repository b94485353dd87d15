import type { CheckedAccess } from '../codes/check.ts';
import type { PlumbingCode } from '../codes/plumbing-code.ts';
import { readSize } from '../loads/read-size.ts';
import type { Identity } from '../model/identity.ts';
import type { ElementId, Model } from '../model/model.ts';
import type { JointId, Network, PipeId } from '../network/network.ts';
import { otherEnd } from '../network/other-end.ts';
import type { Paths } from '../paths/paths.ts';
import type { Stream } from '../paths/stream.ts';
import { planTurn, spaceTurn } from '../paths/turns.ts';
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
    const isBetween = up !== undefined && down !== undefined && Math.abs(up - down) < stream.span(id) - nearly;
    return [{ element, size, distance: far, isBetween }];
  });
  return {
    checked: {
      cleanouts,
      drains,
      ...levelRuns(facts, stream, opens, (joint) => distance.get(joint) ?? null),
      ...ofParts(facts, stream, opens),
      sewers: sewerRuns(facts, stream, sizeOf),
    },
    opens,
  };
}

/** Rounding of sums of lengths, metres. */
const nearly = 1e-6;

/** What a level drain does from a pipe on, to where it drops or leaves. */
interface Ahead {
  readonly element: ElementId | null;
  readonly length: number;
  /** To the next cleanout, and the most between two, degrees. */
  readonly turn: number;
  readonly most: number;
}

/** Level drains of several fixtures: where they turn, and each from its upper end on. */
function levelRuns(
  { network, paths, run }: AccessFacts,
  stream: Stream,
  opens: (joint: JointId) => boolean,
  distance: (joint: JointId) => number | null,
): Pick<CheckedAccess, 'bends' | 'runs'> {
  const isLevel = (pipe: PipeId): boolean => {
    const { drain, vertical } = run.roles.uses[pipe]!;
    return !vertical && (drain === 'branch' || drain === 'building-drain');
  };
  const turnAfter = (pipe: PipeId, next: PipeId): number => planTurn(network, [pipe, next], stream.up(pipe));
  const level = network.pipes.flatMap(({ id }) => (paths.wet[id] && isLevel(id) ? [id] : []));
  const bends = level.flatMap((pipe): CheckedAccess['bends'][number][] => {
    const { element } = network.pipes[pipe]!;
    const next = paths.next[pipe] ?? null;
    const joint = stream.down(pipe);
    if (element === null || next === null || !isLevel(next) || stream.inflows[joint]!.length > 1) return [];
    return [{ element, turn: turnAfter(pipe, next), distance: distance(joint) }];
  });
  // Against the flow: what lies ahead of a pipe is known before the pipe itself.
  const ahead = new Map<PipeId, Ahead>();
  for (const pipe of [...paths.inFlowOrder].reverse()) {
    if (!isLevel(pipe)) continue;
    const next = paths.next[pipe] ?? null;
    const after = next === null ? undefined : ahead.get(next);
    const opened = after === undefined || next === null || opens(stream.down(pipe));
    const turn = opened ? 0 : turnAfter(pipe, next) + after.turn;
    ahead.set(pipe, {
      element: network.pipes[pipe]!.element ?? after?.element ?? null,
      length: stream.span(pipe) + (after?.length ?? 0),
      turn,
      most: Math.max(turn, after?.most ?? 0),
    });
  }
  const runs = level.flatMap((head): CheckedAccess['runs'][number][] => {
    if (stream.inflows[stream.up(head)]!.some(isLevel)) return [];
    const { element, length, most } = ahead.get(head)!;
    const { endsAt, drain } = run.roles.uses[head]!;
    const end = drain === 'building-drain' ? 'building-drain' : endsAt;
    return element === null ? [] : [{ element, endsAt: end, length, head: distance(stream.up(head)), turn: most }];
  });
  return { bends, runs };
}

/** Building sewers with the water: how far each has run since the building, or since the manhole last passed. */
function sewerRuns(
  { identities, network, paths, run }: AccessFacts,
  stream: Stream,
  sizeOf: (pipe: PipeId) => NominalSize | null,
): CheckedAccess['sewers'] {
  const reached = new Map<JointId, { since: number; pastManhole: boolean }>();
  return paths.inFlowOrder.flatMap((pipe) => {
    if (run.roles.uses[pipe]!.drain !== 'building-sewer') return [];
    const start = reached.get(stream.up(pipe)) ?? { since: 0, pastManhole: false };
    const since = start.since + stream.span(pipe);
    const end = stream.down(pipe);
    const isManhole = network.joints[end]!.elements.some((element) => identities[element]?.part === 'chamber');
    reached.set(end, isManhole ? { since: 0, pastManhole: true } : { since, pastManhole: start.pastManhole });
    const { element } = network.pipes[pipe]!;
    const size = sizeOf(pipe);
    return element === null || size === null ? [] : [{ element, size, since, pastManhole: start.pastManhole }];
  });
}

/** Sinks and urinals whose drains may need a cleanout, interceptors, and traps of the building drain. */
function ofParts(
  { identities, network, paths, run }: AccessFacts,
  stream: Stream,
  opens: (joint: JointId) => boolean,
): Pick<CheckedAccess, 'sinks' | 'urinals' | 'interceptors' | 'buildingTraps'> {
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
  const urinals = paths.traps.flatMap(({ fixture, after }) => {
    const { element, water } = paths.fixtures[fixture]!;
    const drain = alone(water[after] ?? null);
    return identities[element]!.kind === 'urinal' && drain.length > 0 ? [{ element, hasCleanout: opened(drain) }] : [];
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
  return { sinks, urinals, interceptors, buildingTraps };

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
      const next = otherEnd(network, pipe, joint);
      const far = found.get(joint)! + (paths.vertical[pipe] === true ? 0 : stream.span(pipe));
      if (far >= (found.get(next) ?? Number.POSITIVE_INFINITY) - 1e-9) continue;
      found.set(next, far);
      waiting.push(next);
    }
  }
  return found;
}

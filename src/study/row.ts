import type { PlanPoint } from '../geometry/plan-outline.ts';
import type { StoreyId } from '../model/model.ts';
import type { JointId, PipeId } from '../network/network.ts';
import { otherEnd } from '../network/other-end.ts';
import type { FixtureId } from '../paths/paths.ts';
import type { Stream } from '../paths/stream.ts';
import type { Battery } from '../roles/roles.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import { floodLevel } from './flood-level.ts';

/** A battery and its place in the building: what building its alternatives needs to know. Heights and lengths in metres. */
export interface Row {
  readonly outcome: Outcome;
  readonly stream: Stream;
  readonly battery: Battery;
  /** Of its traps, from upstream to downstream. */
  readonly fixtures: readonly FixtureId[];
  /** Unit direction of its line in plan. */
  readonly along: PlanPoint;
  /** Floor it stands on; the lowest where it spans storeys. */
  readonly floor: number;
  readonly storey: StoreyId | null;
  /** No fixture of the row, nor one that drains into it, floods above this. */
  readonly flood: number;
  /** Where its vents, as modelled, meet others on this storey; null where they do not. */
  readonly meet: number | null;
  /** Its own vents, each from its foot to where other fixtures' vents join. */
  readonly vents: readonly OwnVent[];
  /** Of its vents, else of its line. */
  readonly material: string | null;
  /** Dry pipes of the whole building through which air reaches the sky: what another vent may join. */
  readonly live: ReadonlySet<PipeId>;
}

export interface OwnVent {
  readonly foot: JointId;
  readonly as: 'main' | 'relief' | 'additional' | 'individual';
  readonly pipes: readonly PipeId[];
}

/** A storey without another above it is taken to be this high. */
const topStorey = 4;

export function rowOf(outcome: Outcome, battery: Battery): Row {
  const { network, paths, shown, model } = outcome;
  const { facts } = battery;
  const { floors } = shown.roles;
  const storeys = facts.traps.map(({ storey }) => storey);
  const lowest = Math.min(...storeys);
  const highest = Math.max(...storeys);
  const floor = floors.elevations[lowest] ?? 0;
  const ceiling = floors.elevations[highest + 1] ?? (floors.elevations[highest] ?? floor) + topStorey;
  const fixtures = facts.traps.map(({ fixture }) => fixture);
  const drained = [...facts.traps, ...facts.guests];
  const flood = Math.max(...drained.map(({ fixture }) => floodLevel(outcome, fixture)));
  const vents = ownVents(outcome, battery);
  const meets = vents.flatMap(({ pipes, foot }) => {
    const top = endOf(outcome, pipes, foot);
    const z = network.joints[top]!.at?.[2];
    return z !== undefined && network.joints[top]!.pipes.length > 2 && z < ceiling ? [z] : [];
  });
  const first = paths.fixtures[fixtures[0]!]!.element;
  return {
    outcome,
    stream: paths.stream,
    battery,
    fixtures,
    along: directionOf(outcome, facts.line),
    floor,
    storey: model.elements[first]!.storey,
    flood,
    meet: meets.length === 0 ? null : Math.max(...meets),
    vents,
    material: materialOf(outcome, [...vents.flatMap(({ pipes }) => pipes), ...facts.line]),
    live: new Set(shown.roles.feet.flatMap(({ path }) => path)),
  };
}

/** Vents whose feet stand on the row: its main one, relief, additional ones, and those of single traps at its joints. */
function ownVents({ shown }: Outcome, { facts }: Battery): OwnVent[] {
  const { feet } = shown.roles;
  const { relief, additional } = facts.circuit;
  const kindOf = (joint: JointId): OwnVent['as'] | null => {
    if (joint === facts.foot) return 'main';
    if (relief !== null && relief.kind !== 'drain' && relief.joint === joint) return 'relief';
    if (additional.some((one) => one.dry && one.joint === joint)) return 'additional';
    return facts.traps.some(({ joins, ownVent }) => ownVent && joins === joint) ? 'individual' : null;
  };
  return feet.flatMap(({ joint, path }, index) => {
    const as = kindOf(joint);
    if (as === null) return [];
    const others = new Set(feet.flatMap((foot, at) => (at === index ? [] : foot.path)));
    const shared = path.findIndex((pipe) => others.has(pipe));
    return [{ foot: joint, as, pipes: shared < 0 ? path : path.slice(0, shared) }];
  });
}

/** The joint at the far end of pipes that follow one another from `start`. */
export function endOf({ network }: Pick<Outcome, 'network'>, pipes: readonly PipeId[], start: JointId): JointId {
  return pipes.reduce((joint, pipe) => otherEnd(network, pipe, joint), start);
}

/** Of the longest level piece; to the east where there is none. */
function directionOf({ network }: Outcome, line: readonly PipeId[]): PlanPoint {
  let best: PlanPoint = [1, 0];
  let longest = 0.001;
  for (const pipe of line) {
    const { points } = network.pipes[pipe]!;
    if (points === null) continue;
    const [first, last] = [points[0]!, points[points.length - 1]!];
    const [x, y] = [last[0] - first[0], last[1] - first[1]];
    const length = Math.hypot(x, y);
    if (length <= longest + 1e-9) continue;
    longest = length;
    best = [x / length, y / length];
  }
  return best;
}

/** The first that is stated. */
function materialOf({ network, model }: Outcome, pipes: readonly PipeId[]): string | null {
  for (const pipe of pipes) {
    const { element } = network.pipes[pipe]!;
    const material = element === null ? null : model.elements[element]!.material;
    if (material !== null) return material;
  }
  return null;
}

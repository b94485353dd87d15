import type { Vec3 } from '../geometry/vector.ts';
import type { PipeId } from '../network/network.ts';
import type { FixtureId } from '../paths/paths.ts';
import type { Outcome } from '../verdicts/outcome.ts';

/** A part of the building that may have twins. */
export interface Unit {
  readonly what: 'storey' | 'room' | 'battery';
  /** Of its storey or room; `battery-3`. */
  readonly name: string;
  readonly fixtures: readonly FixtureId[];
  /** Drains that carry water of its fixtures alone, and vents that stand on them alone. */
  readonly pipes: readonly PipeId[];
  /** Its places are counted from here. */
  readonly origin: Vec3;
}

/** Storeys by height, rooms and batteries in the order of the model. */
export function unitsOf(outcome: Outcome, what: Unit['what']): Unit[] {
  const groups = what === 'storey' ? storeyGroups(outcome) : what === 'room' ? roomGroups(outcome) : rowGroups(outcome);
  return groups
    .filter(({ fixtures }) => fixtures.length > 0)
    .map(({ name, fixtures, origin }) => ({
      what,
      name,
      fixtures,
      origin: origin ?? centreOf(outcome, fixtures),
      pipes: pipesOf(outcome, fixtures),
    }));
}

interface Group {
  readonly name: string;
  readonly fixtures: readonly FixtureId[];
  /** Storeys lie one over the other; other parts are counted from their middle. */
  readonly origin: Vec3 | null;
}

function storeyGroups({ paths, shown, model }: Outcome): Group[] {
  const { floors } = shown.roles;
  return floors.elevations.map((elevation, storey) => {
    const named = model.storeys.find((one) => Math.abs(one.elevation - elevation) < 0.01);
    return {
      name: named?.name ?? `storey ${storey + 1}`,
      fixtures: paths.fixtures.filter((fixture) => floors.of(fixture) === storey).map(({ id }) => id),
      origin: [0, 0, elevation],
    };
  });
}

function roomGroups({ paths, model, network }: Outcome): Group[] {
  return model.spaces.map(({ id, name, longName, box }) => ({
    name: longName ?? name ?? `room ${id + 1}`,
    fixtures: paths.fixtures
      .filter(({ element, outlet }) => {
        const { space } = model.elements[element]!;
        const at = network.joints[outlet]!.at;
        if (space !== null) return space === id;
        return (
          box !== null && at?.every((metres, axis) => metres >= box.min[axis]! && metres <= box.max[axis]!) === true
        );
      })
      .map(({ id: fixture }) => fixture),
    origin: null,
  }));
}

const rowGroups = ({ shown }: Outcome): Group[] =>
  shown.roles.batteries.map(({ facts }) => ({
    name: `battery-${facts.id + 1}`,
    fixtures: facts.traps.map(({ fixture }) => fixture),
    origin: null,
  }));

function centreOf({ network, paths }: Outcome, fixtures: readonly FixtureId[]): Vec3 {
  const points = fixtures.flatMap((fixture) => {
    const { at } = network.joints[paths.fixtures[fixture]!.outlet]!;
    return at === null ? [] : [at];
  });
  const mean = (axis: 0 | 1 | 2): number =>
    points.length === 0 ? 0 : points.reduce((sum, point) => sum + point[axis], 0) / points.length;
  return [mean(0), mean(1), mean(2)];
}

const ofStacks: ReadonlySet<string> = new Set(['stack-vent', 'vent-stack', 'vent-header', 'yoke-vent']);

/** Stacks and building drains belong to no part, nor do vents that other fixtures breathe through. */
function pipesOf({ network, paths, shown }: Outcome, fixtures: readonly FixtureId[]): PipeId[] {
  const own = new Set(fixtures);
  const { loads, roles } = shown;
  const isOwn = (pipe: PipeId): boolean => {
    const { from, to } = loads.pipes[pipe]!;
    if (to === from) return false;
    for (let at = from; at < to; at++) if (!own.has(loads.order[at]!)) return false;
    return true;
  };
  const isTrunk = (pipe: PipeId): boolean => {
    const { drain } = roles.uses[pipe]!;
    return drain === 'stack' || drain === 'building-drain' || drain === 'building-sewer';
  };
  const drains = new Set(
    network.pipes
      .filter(({ id, element }) => element !== null && paths.wet[id] && isOwn(id) && !isTrunk(id))
      .map(({ id }) => id),
  );
  const ends = new Set([...drains].flatMap((pipe) => network.pipes[pipe]!.ends));
  // What takes a stack to the sky stands where the stack ends, not in every part alike.
  const mine = new Map<PipeId, boolean>();
  for (const { joint, path } of roles.feet)
    for (const pipe of path) mine.set(pipe, (mine.get(pipe) ?? true) && ends.has(joint));
  const vents = [...mine]
    .filter(([pipe, only]) => only && network.pipes[pipe]!.element !== null && !ofStacks.has(roles.uses[pipe]!.role))
    .map(([pipe]) => pipe);
  return [...drains, ...vents].sort((a, b) => a - b);
}

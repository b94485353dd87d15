import { boxGrid } from '../geometry/box-grid.ts';
import type { Vec3 } from '../geometry/vector.ts';
import type { JointId, PipeId } from '../network/network.ts';
import type { FixtureId } from '../paths/paths.ts';
import type { VentFoot } from '../roles/roles.ts';
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
  const vents = footedVents(outcome);
  return groups
    .filter(({ fixtures }) => fixtures.length > 0)
    .map(({ name, fixtures, origin }) => ({
      what,
      name,
      fixtures,
      origin: origin ?? centreOf(outcome, fixtures),
      pipes: pipesOf(outcome, vents, fixtures),
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
  const standing: FixtureId[][] = floors.elevations.map(() => []);
  for (const fixture of paths.fixtures) standing[floors.of(fixture)]!.push(fixture.id);
  return floors.elevations.map((elevation, storey) => {
    const named = model.storeys.find((one) => Math.abs(one.elevation - elevation) < 0.01);
    return { name: named?.name ?? `storey ${storey + 1}`, fixtures: standing[storey]!, origin: [0, 0, elevation] };
  });
}

/** A fixture is in the room that the model puts it into, else in each whose box holds its outlet. */
function roomGroups({ paths, model, network }: Outcome): Group[] {
  const inside: FixtureId[][] = model.spaces.map(() => []);
  const grid = boxGrid(model.spaces.map(({ box }) => box));
  for (const { id, element, outlet } of paths.fixtures) {
    const { space } = model.elements[element]!;
    const { at } = network.joints[outlet]!;
    if (space !== null) inside[space]!.push(id);
    else if (at !== null) grid.touching({ min: at, max: at }, (room) => inside[room]!.push(id));
  }
  return model.spaces.map(({ id, name, longName }) => ({
    name: longName ?? name ?? `room ${id + 1}`,
    fixtures: inside[id]!,
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

interface FootedVents {
  readonly feetAt: ReadonlyMap<JointId, readonly VentFoot[]>;
  /** How many feet lead through a pipe. By pipe id. */
  readonly feetThrough: Int32Array;
}

function footedVents({ network, shown }: Outcome): FootedVents {
  const feetAt = new Map<JointId, VentFoot[]>();
  const feetThrough = new Int32Array(network.pipes.length);
  for (const foot of shown.roles.feet) {
    const known = feetAt.get(foot.joint);
    if (known === undefined) feetAt.set(foot.joint, [foot]);
    else known.push(foot);
    for (const pipe of foot.path) feetThrough[pipe]!++;
  }
  return { feetAt, feetThrough };
}

/** Stacks and building drains belong to no part, nor do vents that other fixtures breathe through. */
function pipesOf(
  { network, paths, shown }: Outcome,
  { feetAt, feetThrough }: FootedVents,
  fixtures: readonly FixtureId[],
): PipeId[] {
  const own = new Set(fixtures);
  const { loads, roles } = shown;
  const isOwn = (pipe: PipeId): boolean => {
    const { from, to } = loads.pipes[pipe]!;
    for (let at = from; at < to; at++) if (!own.has(loads.order[at]!)) return false;
    return true;
  };
  const isTrunk = (pipe: PipeId): boolean => {
    const { drain } = roles.uses[pipe]!;
    return drain === 'stack' || drain === 'building-drain' || drain === 'building-sewer';
  };
  // Down from each fixture: the pipes are its part's own up to the first that takes water from elsewhere.
  const passed = new Set<PipeId>();
  for (const fixture of fixtures)
    for (const pipe of paths.fixtures[fixture]!.water) {
      if (passed.has(pipe) || !isOwn(pipe)) break;
      passed.add(pipe);
    }
  const drains = [...passed].filter((pipe) => network.pipes[pipe]!.element !== null && !isTrunk(pipe));
  const ends = new Set(drains.flatMap((pipe) => network.pipes[pipe]!.ends));
  // What takes a stack to the sky stands where the stack ends, not in every part alike.
  const ownFeet = new Map<PipeId, number>();
  for (const joint of ends)
    for (const { path } of feetAt.get(joint) ?? [])
      for (const pipe of path) ownFeet.set(pipe, (ownFeet.get(pipe) ?? 0) + 1);
  const vents = [...ownFeet]
    .filter(
      ([pipe, feet]) =>
        feet === feetThrough[pipe] && network.pipes[pipe]!.element !== null && !ofStacks.has(roles.uses[pipe]!.role),
    )
    .map(([pipe]) => pipe);
  return [...drains, ...vents].sort((a, b) => a - b);
}

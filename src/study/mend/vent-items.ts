import type { Finding } from '../../findings/finding.ts';
import type { ElementId } from '../../model/model.ts';
import type { JointId, PipeId } from '../../network/network.ts';
import type { Stack } from '../../roles/find-stacks.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import type { PlaceAt } from '../vent-feet.ts';
import type { Option } from './change.ts';
import type { Scene } from './scene.ts';
import { alongPipe, distinct } from './trap-items.ts';
import { elementsAt, jointPlace, ventOptions } from './vent-changes.ts';

/** Vents that a new one may join: so many of the nearest are tried. */
const nearest = 4;

/** A vent that ends inside goes on, from each of its loose ends, to open air or to a live vent. */
export function extensionOptions(scene: Scene, why: Finding): Option[] {
  const { outcome } = scene;
  const pipes = new Set(why.about.flatMap((element) => outcome.network.pipesOf.get(element as ElementId) ?? []));
  const piece = outcome.paths.pieces.find(({ pipes: own }) => own.some((pipe) => pipes.has(pipe)));
  if (piece === undefined) return [];
  const flood = scene.flood(piece.feet.flatMap((foot) => scene.through(foot)));
  return distinct(
    looseEnds(scene, piece.pipes, piece.feet).flatMap((joint) => {
      const foot = jointPlace(scene, joint);
      if (foot === null) return [];
      const about = elementsAt(scene, foot.place);
      return ventOptions(scene, { foot, why, about, flood, kind: 'extended-vent' }, nearest);
    }),
  );
}

function looseEnds({ outcome: { network } }: Scene, pipes: readonly PipeId[], feet: readonly JointId[]): JointId[] {
  const ends = pipes.flatMap((pipe) => network.pipes[pipe]!.ends);
  return [...new Set(ends)]
    .filter((joint) => network.joints[joint]!.pipes.length === 1 && !feet.includes(joint))
    .sort((a, b) => a - b);
}

/** The stack goes on upward from its top. */
export function stackVentOptions(scene: Scene, stack: Stack, why: Finding): Option[] {
  const joint = scene.stream.up(stack.top);
  const foot = jointPlace(scene, joint);
  if (foot === null) return [];
  const flood = scene.flood(scene.through(joint));
  return ventOptions(scene, { foot, why, about: elementsAt(scene, foot.place), flood }, nearest);
}

const stackVents: ReadonlySet<string> = new Set(['stack-vent', 'vent-header', 'vent-stack']);

/**
 * A vent stack beside the stack, from below its lowest connection: up to a stack vent or header, into the foot of a vent
 * that rises from there, or through the roof.
 */
export function ventStackOptions(scene: Scene, stack: Stack, why: Finding): Option[] {
  const { stream, outcome } = scene;
  const { uses } = outcome.shown.roles;
  const joints = stack.pipes.map((pipe) => stream.down(pipe));
  const lowest = joints.findLastIndex((joint, at) => at < joints.length - 1 && stream.inflows[joint]!.length > 1);
  const below = stack.pipes[lowest + 1] ?? stack.foot;
  const flood = scene.flood(scene.through(stream.down(stack.foot)));
  const feet = [alongPipe(scene, below, belowBranch), jointPlace(scene, stream.down(stack.foot))];
  return distinct(
    feet.flatMap((foot) => {
      if (foot === null) return [];
      const wish = { foot, why, about: elementsAt(scene, foot.place), sideways: true };
      return [
        ...ventOptions(scene, { ...wish, flood, onto: (pipe) => stackVents.has(uses[pipe]!.role) }, nearest),
        ...ventOptions(scene, { ...wish, flood: Number.NEGATIVE_INFINITY, sky: false }, nearest),
      ];
    }),
  );
}
const belowBranch = 0.3;

/** From the stack at a storey up to the vent stack, a metre over the floor. */
export function yokeOptions(scene: Scene, stack: Stack, storey: number, why: Finding): Option[] {
  const { outcome, stream } = scene;
  const floor = outcome.shown.roles.floors.elevations[storey];
  if (floor === undefined) return [];
  const pipe = stack.pipes.find((one) => {
    const [top, bottom] = [scene.at(stream.up(one)), scene.at(stream.down(one))];
    return top !== null && bottom !== null && top[2] > floor && bottom[2] <= floor;
  });
  const top = pipe === undefined ? null : scene.at(stream.up(pipe));
  const foot = pipe === undefined || top === null ? null : alongPipe(scene, pipe, top[2] - floor);
  if (foot === null) return [];
  return ventOptions(scene, {
    foot,
    why,
    about: elementsAt(scene, foot.place),
    flood: floor + overFloor,
    sideways: true,
    sky: false,
    onto: (one) => outcome.shown.roles.uses[one]!.role === 'vent-stack',
  });
}
/** A yoke vent joins the vent stack at least this far over the floor, metres, with what every vent is over a rim. */
const overFloor = 0.85;

/** Beside an offset: from the foot of the part above it, and from the top of the part below it. */
export function offsetReliefOptions(scene: Scene, stack: Stack, why: Finding): Option[] {
  const { stream, outcome } = scene;
  const offset = stack.offsets.find(({ pipes }) =>
    pipes.some((pipe) => why.about.includes(outcome.network.pipes[pipe]!.element ?? -1)),
  );
  if (offset === undefined) return [];
  const above = stack.pipes[stack.pipes.indexOf(offset.pipes[0]!) - 1];
  const below = stack.pipes[stack.pipes.indexOf(offset.pipes.at(-1)!) + 1];
  const places: (PlaceAt | null)[] = [
    above === undefined ? null : alongPipe(scene, above, Math.max(0, stream.span(above) - belowBranch)),
    jointPlace(scene, stream.up(offset.pipes[0]!)),
    below === undefined ? null : alongPipe(scene, below, belowBranch),
  ];
  return places.flatMap((foot) => {
    if (foot === null) return [];
    const served = above === undefined ? [] : scene.through(stream.down(above));
    const about = elementsAt(scene, foot.place);
    return ventOptions(scene, { foot, why, about, flood: scene.flood(served), sideways: true }, nearest);
  });
}

/** The ways to the sky of a building drain's vents, each made as large as one of them must be; cheapest first. */
export function mainVentOptions(scene: Scene, least: NominalSize, why: Finding): Option[] {
  const { outcome, costs } = scene;
  const { network, shown, code, paths } = outcome;
  const { rank } = code.series;
  const own = new Set(why.about.flatMap((element) => network.pipesOf.get(element as ElementId) ?? []));
  const system = paths.systems.find(({ pipes }) => pipes.some((pipe) => own.has(pipe)));
  const inside = new Set(system?.pipes ?? []);
  const ways = shown.roles.feet.filter(({ path }) => inside.has(path[0]!));
  return distinct(
    ways
      .map(({ path }): Option => {
        const small = [...new Set(path.flatMap((pipe) => network.pipes[pipe]!.element ?? []))].filter((element) => {
          const size = shown.loads.modelled[network.pipesOf.get(element)![0]!]!.size;
          return size === null || rank(size) < rank(least);
        });
        const cost = small.reduce((sum, element) => {
          const size = shown.loads.modelled[network.pipesOf.get(element)![0]!]!.size;
          return sum + (size === null ? 0 : costs.resize(element, size, least));
        }, 0);
        return {
          key: `main-vent ${small.map((element) => outcome.model.elements[element]!.globalId).join(' ')}`,
          cost,
          change: null,
          pins: small.map((element) => [element, least] as const),
          why,
        };
      })
      .sort((a, b) => a.cost - b.cost || (a.key < b.key ? -1 : 1))
      .slice(0, mostWays),
  );
}
const mostWays = 3;

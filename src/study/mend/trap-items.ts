import type { Finding } from '../../findings/finding.ts';
import type { JointId, PipeId } from '../../network/network.ts';
import type { FixtureId } from '../../paths/paths.ts';
import { isFreeAbove, onWall, type PlaceAt } from '../vent-feet.ts';
import type { Option } from './change.ts';
import type { Scene } from './scene.ts';
import { elementsAt, jointPlace, ventOptions } from './vent-changes.ts';

/** A vent stands this far from the fitting at a joint, metres. */
const besideJoint = 0.1;
/** Places on one drain that are tried. */
const mostPlaces = 3;
/** Fixtures upstream whose vents are tried for a trap: the nearest ones, and the farthest. */
const nearHeads = 4;

/**
 * Ways to vent a trap: a vent on its own drain; one on the drain of a fixture upstream, from which its air comes through
 * the line; each to the nearest vents or, from the first place, through the roof.
 */
export function trapOptions(scene: Scene, fixture: FixtureId, why: Finding): Option[] {
  const heads = headsOf(scene, fixture);
  const some = heads.length <= nearHeads + 1 ? heads : [...heads.slice(0, nearHeads), heads[heads.length - 1]!];
  return distinct([
    ...ownVentOptions(scene, fixture, why),
    ...some.flatMap((head) => ownVentOptions(scene, head, why)),
  ]);
}

/** Vents on a fixture's own drain. `most` places, those nearest to where it joins the line first. */
export function ownVentOptions(scene: Scene, fixture: FixtureId, why: Finding, most = mostPlaces): Option[] {
  const { element } = scene.outcome.paths.fixtures[fixture]!;
  const last = ownDrain(scene, fixture).at(-1);
  // What joins where the drain meets the line may come to breathe through the vent as well.
  const served = last === undefined ? [] : scene.through(scene.stream.down(last));
  const flood = scene.flood([fixture, ...served]);
  return distinct(
    ownPlaces(scene, fixture)
      .slice(0, most)
      .flatMap((foot, at) => {
        const about = [...elementsAt(scene, foot.place), element];
        return ventOptions(scene, { foot, why, about, flood, sky: at === 0 }, at === 0 ? 4 : 2);
      }),
  );
}

export const distinct = (options: readonly Option[]): Option[] => [
  ...new Map(options.map((option) => [option.key, option])).values(),
];

/** From the trap to the joint where the drain meets other water, by pipe. */
export function ownDrain({ outcome, stream }: Scene, fixture: FixtureId): PipeId[] {
  const { paths, shown } = outcome;
  const drain: PipeId[] = [];
  for (const pipe of paths.fixtures[fixture]!.water.slice(paths.traps[fixture]!.after)) {
    if (shown.roles.uses[pipe]!.stack !== null) break;
    drain.push(pipe);
    if (stream.inflows[stream.down(pipe)]!.length > 1) break;
  }
  return drain;
}

/**
 * Places for a vent on a fixture's own drain, from the line back to the trap: joints from which nothing rises, then
 * places on level pipe just before a joint, and just behind the trap. Beyond the longest arm there are none.
 */
export function ownPlaces(scene: Scene, fixture: FixtureId): PlaceAt[] {
  const { outcome, stream } = scene;
  const { code, shown, network, paths } = outcome;
  const { row, trap } = shown.loads.fixtures[fixture]!;
  const limit = code.armLimit(trap, row) ?? Number.POSITIVE_INFINITY;
  const joints: PlaceAt[] = [];
  const walls: PlaceAt[] = [];
  const put = (list: PlaceAt[], place: PlaceAt | null): void => {
    if (place !== null) list.unshift(place);
  };
  let walked = 0;
  for (const pipe of ownDrain(scene, fixture)) {
    const joint = stream.down(pipe);
    const span = stream.span(pipe);
    if (paths.vertical[pipe] !== true && span > 3 * besideJoint) {
      const room = limit - walked;
      if (walked === 0) put(walls, alongPipe(scene, pipe, Math.min(2 * besideJoint, span / 2)));
      if (room > span - besideJoint) put(walls, alongPipe(scene, pipe, span - besideJoint));
      else if (room > besideJoint) put(walls, alongPipe(scene, pipe, room - besideJoint / 2));
    }
    walked += span;
    if (walked > limit) break;
    const out = stream.outflow[joint] ?? null;
    const onStack = out !== null && shown.roles.uses[out]!.stack !== null;
    if (!onStack && isFreeAbove(scene, joint) && network.joints[joint]!.pipes.length > 1)
      put(joints, jointPlace(scene, joint));
  }
  return [...joints, ...walls];
}

/** On a pipe, so many metres from the centre of its upstream joint. */
export function alongPipe({ outcome, stream }: Scene, pipe: PipeId, away: number): PlaceAt | null {
  const section = outcome.network.pipes[pipe]!;
  const atZero = section.ends[0] === stream.up(pipe);
  const own = Math.min(Math.max(away - section.reach[atZero ? 0 : 1], 0), section.length);
  return onWall(outcome.network, section, atZero ? own : section.length - own);
}

/** Fixtures that drain into the line above the joint where a fixture's drain meets it, the nearest first. */
function headsOf(scene: Scene, fixture: FixtureId): FixtureId[] {
  const { outcome, stream } = scene;
  const last = ownDrain(scene, fixture).at(-1);
  if (last === undefined) return [];
  const joint: JointId = stream.down(last);
  if (stream.inflows[joint]!.length < 2) return [];
  const own = new Set(scene.through(stream.up(last)));
  const steps = (one: FixtureId): number => {
    const { water } = outcome.paths.fixtures[one]!;
    return water.findIndex((pipe) => stream.down(pipe) === joint);
  };
  return scene
    .through(joint)
    .filter((one) => one !== fixture && !own.has(one) && steps(one) >= 0)
    .sort((a, b) => steps(a) - steps(b) || a - b);
}

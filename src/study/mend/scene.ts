import type { Vec3 } from '../../geometry/vector.ts';
import type { JointId, PipeId } from '../../network/network.ts';
import { type OpenSky, openSky } from '../../paths/open-air.ts';
import type { FixtureId } from '../../paths/paths.ts';
import type { Stream } from '../../paths/stream.ts';
import type { Outcome } from '../../verdicts/outcome.ts';
import { floodLevel } from '../flood-level.ts';
import type { Costs } from './costs.ts';

/** One state of the building, with what the makers of changes look up again and again. */
export interface Scene {
  readonly outcome: Outcome;
  readonly costs: Costs;
  readonly stream: Stream;
  readonly sky: OpenSky;
  /** Dry pipes through which air reaches the sky, with the height over which a vent may join: no fixture below floods it. */
  readonly live: ReadonlyMap<PipeId, number>;
  /** Of some fixtures: the highest level at which one of them floods. */
  readonly flood: (fixtures: readonly FixtureId[]) => number;
  /** Fixtures whose water passes a joint. */
  readonly through: (joint: JointId) => readonly FixtureId[];
  readonly at: (joint: JointId) => Vec3 | null;
}

export function sceneOf(outcome: Outcome, costs: Costs): Scene {
  const { network, paths, shown, model, identities } = outcome;
  const { stream } = paths;
  const levels = paths.fixtures.map(({ id }) => floodLevel(outcome, id));
  const flood = (fixtures: readonly FixtureId[]): number =>
    fixtures.reduce((most, fixture) => Math.max(most, levels[fixture]!), Number.NEGATIVE_INFINITY);
  const live = new Map<PipeId, number>();
  for (const { path } of shown.roles.feet)
    for (const pipe of path) if (!live.has(pipe)) live.set(pipe, Number.NEGATIVE_INFINITY);
  shown.roles.venting.forEach(({ vents }, fixture) => {
    for (const pipe of vents) live.set(pipe, Math.max(live.get(pipe) ?? Number.NEGATIVE_INFINITY, levels[fixture]!));
  });
  return {
    outcome,
    costs,
    stream,
    sky: openSky(model, identities, network),
    live,
    flood,
    through: (joint) => {
      const out = stream.outflow[joint] ?? null;
      if (out === null) return [];
      const { from, to } = shown.loads.pipes[out]!;
      return shown.loads.order.slice(from, to);
    },
    at: (joint) => network.joints[joint]!.at,
  };
}

import { distance } from '../geometry/vector.ts';
import type { PipeId } from '../network/network.ts';
import type { FixtureId } from '../paths/paths.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import { alongX, same, type TwinPlaces } from './twin-places.ts';
import type { Unit } from './twin-units.ts';

/** Fixtures of the first with those of the second at the same place and of the same row of the code; null: none. */
export function pairedFixtures(places: TwinPlaces, a: Unit, b: Unit): [FixtureId, FixtureId | null][] {
  const free = new Set(b.fixtures);
  const near = alongX(b.fixtures, (fixture) => places.fixtureAt(b, fixture));
  return a.fixtures.map((fixture): [FixtureId, FixtureId | null] => {
    const at = places.fixtureAt(a, fixture);
    for (const other of at === null ? free : near(at)) {
      if (!free.has(other) || !alikeFixtures(places.outcome, fixture, other)) continue;
      if (at !== null && distance(at, places.fixtureAt(b, other)!) > same) continue;
      free.delete(other);
      return [fixture, other];
    }
    return [fixture, null];
  });
}

function alikeFixtures({ shown }: Outcome, a: FixtureId, b: FixtureId): boolean {
  const [one, two] = [shown.loads.fixtures[a]!, shown.loads.fixtures[b]!];
  return one.row.id === two.row.id && one.trap === two.trap;
}

export interface PipePair {
  readonly here: PipeId | null;
  readonly there: PipeId | null;
}

/** Pipes of both at the same place, by their middles and lengths; those of one alone with null beside them. */
export function pairedPipes(places: TwinPlaces, model: Unit, unit: Unit): PipePair[] {
  const { paths, network } = places.outcome;
  const free = new Set(unit.pipes);
  const near = alongX(unit.pipes, (pipe) => places.pipeAt(unit, pipe));
  const pairs = model.pipes.map((there): PipePair => {
    const at = places.pipeAt(model, there);
    let best: { pipe: PipeId; away: number } | null = null;
    for (const pipe of at === null ? [] : near(at)) {
      if (!free.has(pipe) || paths.wet[pipe] !== paths.wet[there]) continue;
      const away = distance(at!, places.pipeAt(unit, pipe)!);
      const longer = Math.abs(network.pipes[pipe]!.length - network.pipes[there]!.length);
      if (away <= same && longer <= 2 * same && (best === null || away < best.away)) best = { pipe, away };
    }
    if (best !== null) free.delete(best.pipe);
    return { here: best?.pipe ?? null, there };
  });
  return [...pairs, ...[...free].map((here) => ({ here, there: null }))];
}

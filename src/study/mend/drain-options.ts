import type { Finding } from '../../findings/finding.ts';
import type { ElementId } from '../../model/model.ts';
import type { JointId, PipeId } from '../../network/network.ts';
import type { FixtureId } from '../../paths/paths.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import { lowering, withSlope, withTrapAt } from '../edits.ts';
import { pipingOf } from '../piping-of.ts';
import type { Option } from './change.ts';
import type { Scene } from './scene.ts';
import { alongPipe } from './trap-items.ts';

/** Falls that drains are laid to, flattest first: common practice, no source. */
const usualFalls: readonly number[] = [1 / 100, 1 / 50, 1 / 25];
/** Larger pipe may lie flatter: so many sizes are tried. */
const sizesUp = 2;

/** A drain too flat for its size: laid to the least fall, or made so large that its fall is enough. */
export function slopeOptions(scene: Scene, why: Finding): Option[] {
  const { outcome, costs } = scene;
  const element = why.about[0] as ElementId | undefined;
  const least = why.facts.least;
  if (element === undefined || typeof least !== 'number') return [];
  const sections = outcome.network.pipesOf.get(element);
  if (sections === undefined) {
    const fixture = outcome.paths.fixtures.find((one) => one.element === element);
    return fixture === undefined ? [] : relayOptions(scene, levelOf(scene, armOf(scene, fixture.id)), [least], why);
  }
  const larger = largerSizes(scene, element).slice(0, sizesUp);
  const size = outcome.shown.loads.modelled[sections[0]!]!.size;
  return [
    ...relayOptions(scene, levelOf(scene, sections), [least], why),
    ...larger.map(
      (to): Option => ({
        key: `size ${to} ${outcome.model.elements[element]!.globalId}`,
        cost: size === null ? 0 : costs.resize(element, size, to),
        change: null,
        pins: [[element, to]],
        why,
      }),
    ),
  ];
}

/** A pipe that climbs, or an arm that falls too far: laid to a usual fall. */
export function relayPipeOptions(scene: Scene, why: Finding): Option[] {
  const sections = scene.outcome.network.pipesOf.get(why.about[0] as ElementId);
  return sections === undefined ? [] : relayOptions(scene, levelOf(scene, sections), usualFalls.slice(0, 2), why);
}

/** A trap arm laid to another fall. */
export const relayArmOptions = (scene: Scene, fixture: FixtureId, why: Finding): Option[] =>
  relayOptions(scene, levelOf(scene, armOf(scene, fixture)), usualFalls.slice(0, 2), why);

/** Undersized pipes of one cause whose size a fall decides: laid steeper, all of them. */
export function steeperOptions(scene: Scene, elements: readonly ElementId[], why: Finding): Option[] {
  const { outcome } = scene;
  const sloped = elements
    .flatMap((element) => outcome.network.pipesOf.get(element) ?? [])
    .filter((pipe) => outcome.shown.sizes[pipe]!.governing.some(({ facts }) => facts.columnSlope !== undefined));
  const slopes = sloped.map((pipe) => outcome.paths.slopes[pipe]!.slope ?? 0);
  const flattest = Math.min(...slopes);
  return sloped.length === 0
    ? []
    : relayOptions(
        scene,
        levelOf(scene, sloped),
        usualFalls.filter((fall) => fall > flattest + 1e-6),
        why,
      );
}

function relayOptions(scene: Scene, pipes: readonly PipeId[], falls: readonly number[], why: Finding): Option[] {
  const { outcome, costs, stream } = scene;
  const first = pipes[0];
  if (first === undefined) return [];
  const piping = pipingOf(outcome);
  const up = (pipe: PipeId): JointId => stream.up(pipe);
  const about = [...new Set(pipes.flatMap((pipe) => outcome.network.pipes[pipe]!.element ?? []))];
  return falls.map(
    (to): Option => ({
      key: `slope ${to.toFixed(5)} ${about.map((element) => outcome.model.elements[element]!.globalId).join(' ')}`,
      cost: costs.relay(outcome, pipes),
      change: {
        kind: 'slope',
        about,
        from: outcome.paths.slopes[first]!.slope,
        to,
        lowered: pipes.reduce<number | null>((sum, pipe) => {
          const own = lowering(piping, pipe, to, up(pipe));
          return sum === null || own === null ? null : sum + own;
        }, 0),
        apply: (given) => withSlope(given, pipes, to, up),
      },
      pins: [],
      why,
    }),
  );
}

const levelOf = ({ outcome }: Scene, pipes: readonly PipeId[]): PipeId[] =>
  pipes.filter((pipe) => outcome.paths.vertical[pipe] !== true && outcome.paths.wet[pipe]);

const armOf = ({ outcome }: Scene, fixture: FixtureId): readonly PipeId[] => outcome.paths.traps[fixture]!.arm;

function largerSizes({ outcome }: Scene, element: ElementId): NominalSize[] {
  const { series, omitSizes } = outcome.code;
  const size = outcome.shown.loads.modelled[outcome.network.pipesOf.get(element)![0]!]!.size;
  if (size === null) return [];
  return series.sizes
    .slice(series.rank(size) + 1)
    .map(({ label }) => label)
    .filter((label) => !omitSizes.has(label));
}

/** A trap too far from its fixture, set as near as the code asks. */
export function trapMoveOptions(scene: Scene, why: Finding): Option[] {
  const { outcome, stream, costs } = scene;
  const { paths } = outcome;
  const { lengthM, limitM } = why.facts;
  const fixture = paths.fixtures.find(({ element }) => element === why.about[0]);
  if (fixture === undefined || typeof lengthM !== 'number' || typeof limitM !== 'number') return [];
  const { at, after, how } = paths.traps[fixture.id]!;
  const trap = outcome.network.joints[at]!.elements.find((one) => outcome.identities[one]?.part === 'trap');
  if (how !== 'drawn' || trap === undefined) return [];
  let walked = 0;
  for (const pipe of fixture.water.slice(0, after)) {
    const span = stream.span(pipe);
    if (walked + span < limitM) {
      walked += span;
      continue;
    }
    const place = alongPipe(scene, pipe, limitM - walked);
    if (place === null) return [];
    const { element } = outcome.network.pipes[pipe]!;
    return [
      {
        key: `trap ${outcome.model.elements[fixture.element]!.globalId}`,
        cost: costs.weights.trap,
        change: {
          kind: 'trap',
          about: [trap, fixture.element, ...(element === null ? [] : [element])],
          from: lengthM,
          to: limitM,
          apply: (piping) => withTrapAt(piping, trap, place.place),
        },
        pins: [],
        why,
      },
    ];
  }
  return [];
}

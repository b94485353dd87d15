import type { PlumbingCode } from '../codes/plumbing-code.ts';
import type { Reading } from '../codes/reading.ts';
import { planDistance } from '../geometry/vector.ts';
import { fullId } from '../model/answer-keys.ts';
import type { FixtureAnswer, PipeAnswer } from '../model/answers.ts';
import type { FixtureDetail, FixtureKind } from '../model/identity.ts';
import type { ElementId } from '../model/model.ts';
import { usualDetail } from '../model/usual-detail.ts';
import { buildNetwork } from '../network/build-network.ts';
import { cutAtOutline } from '../network/building-outline.ts';
import { jointAt, moveElement, type Place } from '../network/change.ts';
import type { JointId, PipeId } from '../network/network.ts';
import type { Piping } from '../pipeline.ts';
import type { NominalSize } from '../units/nominal-size.ts';

/** Edits of a piping: each gives the piping as it would be, and leaves the one it was given alone. */

/** A pipe of another size, whatever the model and the user say. */
export const withSize = (piping: Piping, pipe: ElementId, size: NominalSize): Piping =>
  answeredPipe(piping, pipe, { size });

/** The trap of a fixture, said. */
export const withTrap = (piping: Piping, fixture: ElementId, trapSize: NominalSize): Piping =>
  answeredFixture(piping, fixture, { trapSize });

/** A battery read another way, said for each of its fixtures. */
export function withReading(piping: Piping, fixtures: readonly ElementId[], reading: Reading): Piping {
  const { answers, model } = piping;
  const said = fixtures.map((fixture): [string, { reading: Reading }] => [
    fullId(model.elements[fixture]!),
    { reading },
  ]);
  return { ...piping, answers: { ...answers, batteries: new Map([...said, ...answers.batteries]) } };
}

/** A fixture of another kind. What the model said of the old kind's details counts no longer. */
export function withKind(
  piping: Piping,
  fixture: ElementId,
  kind: FixtureKind,
  detail: Partial<FixtureDetail> = {},
): Piping {
  const identities = piping.identities.map((identity, element) =>
    element === fixture
      ? {
          ...identity,
          part: 'fixture' as const,
          kind,
          detail: { ...usualDetail(kind), ...detail },
          evidence: 'what if',
          weak: false,
        }
      : identity,
  );
  return { ...piping, identities };
}

/** Level pipes laid anew to a fall in the direction of their water, m/m; `up` is the upstream joint of a pipe. */
export function withSlope(
  piping: Piping,
  pipes: readonly PipeId[],
  slope: number,
  up: (pipe: PipeId) => JointId,
): Piping {
  const relaid = new Set(pipes);
  const { network } = piping;
  return {
    ...piping,
    network: {
      ...network,
      pipes: network.pipes.map((pipe) =>
        relaid.has(pipe.id) ? { ...pipe, laid: pipe.ends[0] === up(pipe.id) ? slope : -slope } : pipe,
      ),
    },
  };
}

/** A drawn trap set on another place of the piping. */
export function withTrapAt(piping: Piping, trap: ElementId, place: Place): Piping {
  const { network, joint } = jointAt(piping.network, place);
  return { ...piping, network: moveElement(network, trap, joint) };
}

/** By another code. Where its building sewer begins elsewhere, the network is joined and cut anew. */
export function withCode(piping: Piping, code: PlumbingCode): Piping {
  if (code.sewerBegins === piping.code.sewerBegins) return { ...piping, code };
  const { model, identities, outline, answers } = piping;
  const { maxGap } = answers.settings;
  const { leaveOut } = answers;
  const built = buildNetwork(model, identities, typeof maxGap === 'number' ? { maxGap, leaveOut } : { leaveOut });
  return { ...piping, code, network: cutAtOutline(outline, identities, built.value, code.sewerBegins) };
}

/** Metres that the lower end of a pipe comes down, its upper end kept, when it is laid to a fall; null without geometry. */
export function lowering(piping: Piping, pipe: PipeId, slope: number, up: JointId): number | null {
  const { points, ends } = piping.network.pipes[pipe]!;
  if (points === null) return null;
  const [first, last] = [points[0]!, points[points.length - 1]!];
  const drawn = ends[0] === up ? first[2] - last[2] : last[2] - first[2];
  return slope * planDistance(first, last) - drawn;
}

/** The first answer that meets an element counts: what is said here stands before what the user said. */
function answeredPipe(piping: Piping, pipe: ElementId, answer: PipeAnswer): Piping {
  const { answers, model } = piping;
  const key = fullId(model.elements[pipe]!);
  const pipes = new Map([[key, { ...answers.pipes.get(key), ...answer }], ...without(answers.pipes, key)]);
  return { ...piping, answers: { ...answers, pipes } };
}

function answeredFixture(piping: Piping, fixture: ElementId, answer: FixtureAnswer): Piping {
  const { answers, model } = piping;
  const key = fullId(model.elements[fixture]!);
  const fixtures = new Map([[key, { ...answers.fixtures.get(key), ...answer }], ...without(answers.fixtures, key)]);
  return { ...piping, answers: { ...answers, fixtures } };
}

const without = <T>(map: ReadonlyMap<string, T>, key: string): [string, T][] =>
  [...map].filter(([other]) => other !== key);

import type { Vec3 } from '../geometry/vector.ts';
import type { Identity } from '../model/identity.ts';
import { type ElementId, elementId, type Model, type StoreyId } from '../model/model.ts';
import { addPipe, type Place, removePipes } from '../network/change.ts';
import type { JointId, Network, PipeId } from '../network/network.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import { type Added, addedElement, addedIdentity } from './added-element.ts';

/** The piping of a building with pipes taken away and pipes added, and where each of its pipes comes from. */
export interface ChangedPiping {
  readonly model: Model;
  readonly identities: readonly Identity[];
  readonly network: Network;
  /** By pipe id: the pipe of the first network that it is, or is a part of; null for an added one. */
  readonly origin: readonly (PipeId | null)[];
  /** Elements added, in order. */
  readonly added: readonly ElementId[];
  /** Pipes of the first network that are gone, by id. */
  readonly removed: ReadonlySet<PipeId>;
}

export const unchanged = ({
  model,
  identities,
  network,
}: Pick<Outcome, 'model' | 'identities' | 'network'>): ChangedPiping => ({
  model,
  identities,
  network,
  origin: network.pipes.map(({ id }) => id),
  added: [],
  removed: new Set(),
});

/** Without pipes of the first network. To be called before anything is added. */
export function without(piping: ChangedPiping, pipes: ReadonlySet<PipeId>): ChangedPiping {
  if (pipes.size === 0) return piping;
  const { network, numbers } = removePipes(piping.network, pipes);
  const origin: (PipeId | null)[] = network.pipes.map(() => null);
  piping.origin.forEach((from, id) => {
    if (numbers[id]! >= 0) origin[numbers[id]!] = from;
  });
  return { ...piping, network, origin, removed: new Set([...piping.removed, ...pipes]) };
}

export interface NewVent {
  readonly name: string;
  readonly material: string | null;
  readonly storey: StoreyId | null;
  readonly from: Place;
  readonly to: Place;
  /** From end to end; every leg becomes a pipe of its own. */
  readonly points: readonly Vec3[];
}

/** With one more vent: a pipe for each straight leg, named `name`, or `name.1`, `name.2` where there are several. */
export function withVent(piping: ChangedPiping, vent: NewVent): ChangedPiping {
  const legs = vent.points.length - 1;
  let changed = piping;
  let start = vent.from;
  for (let leg = 0; leg < legs; leg++) {
    const points = [vent.points[leg]!, vent.points[leg + 1]!];
    const end: Place = leg === legs - 1 ? vent.to : { open: points[1]! };
    const name = legs === 1 ? vent.name : `${vent.name}.${leg + 1}`;
    const { piping: next, joint } = withPipe(changed, { ...vent, name, points, from: start, to: end });
    changed = next;
    start = { joint };
  }
  return changed;
}

function withPipe(piping: ChangedPiping, vent: NewVent): { piping: ChangedPiping; joint: JointId } {
  const element = elementId(piping.model.elements.length);
  const model: Model = { ...piping.model, elements: [...piping.model.elements, addedElement(element, pipeOf(vent))] };
  const { network, pipe } = addPipe(piping.network, {
    element,
    ends: [vent.from, vent.to],
    points: vent.points,
    length: 0,
  });
  const origin = [...piping.origin];
  for (let id = piping.network.pipes.length; id < network.pipes.length; id++)
    origin[id] = id === pipe ? null : (origin[cutFrom(piping.network, network, id as PipeId, vent)] ?? null);
  return {
    piping: {
      ...piping,
      model,
      identities: [...piping.identities, addedIdentity('pipe', 'vent', 'added')],
      network,
      origin,
      added: [...piping.added, element],
    },
    joint: network.pipes[pipe]!.ends[1],
  };
}

/** The pipe that a new part was cut from: one of the two on whose walls the vent ends. */
function cutFrom(before: Network, after: Network, part: PipeId, { from, to }: NewVent): PipeId {
  const cut = [from, to].flatMap((place) => ('pipe' in place ? [place.pipe] : []));
  const far = after.pipes[part]!.ends[1];
  return cut.find((pipe) => before.pipes[pipe]!.ends[1] === far) ?? cut[0]!;
}

const pipeOf = ({ name, material, storey, points }: NewVent): Added => ({
  kind: 'pipe',
  name,
  storey,
  material,
  origin: points[0]!,
  axis: points,
});

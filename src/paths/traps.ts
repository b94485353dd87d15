import type { Identity } from '../model/identity.ts';
import type { ElementId, Model } from '../model/model.ts';
import type { JointId, Network, PipeId } from '../network/network.ts';
import type { FixtureId, TrapAir } from './paths.ts';
import type { Water } from './water.ts';

export interface TrapSeat {
  readonly fixture: FixtureId;
  /** Index into the water path of the first pipe after the trap. */
  readonly after: number;
  readonly at: JointId;
  readonly how: TrapAir['how'];
  /** Element of a drawn trap. */
  readonly element: ElementId | null;
}

/** A drawn trap is looked for this far along the drain, in metres: the longest fixture outlet pipe with room to spare. */
const searchLength = 3;
const trapInside = new Set(['FLOORTRAP', 'GULLYTRAP', 'WASTETRAP']);

/** Where each fixture's trap sits: drawn, built in, at the outlet, or at the foot of the first drop. */
export function seatTraps(
  model: Model,
  identities: readonly Identity[],
  network: Network,
  water: Water,
  vertical: readonly (boolean | null)[],
): TrapSeat[] {
  return water.fixtures.map(({ id, element, outlet, water: path }) => {
    const drawn = drawnTrap(identities, network, water, path, outlet, element);
    if (drawn !== null) return { fixture: id, ...drawn, how: 'drawn' };
    if (isBuiltIn(model, identities, element))
      return { fixture: id, after: 0, at: outlet, how: 'built-in', element: null };
    const first = path[0];
    if (first !== undefined && vertical[first] === true && path.length > 1) {
      return { fixture: id, after: 1, at: water.toward[first]!, how: 'foot-of-drop', element: null };
    }
    return { fixture: id, after: 0, at: outlet, how: 'outlet', element: null };
  });
}

function drawnTrap(
  identities: readonly Identity[],
  network: Network,
  water: Water,
  path: readonly PipeId[],
  outlet: JointId,
  fixture: ElementId,
): { after: number; at: JointId; element: ElementId } | null {
  let joint = outlet;
  let walked = 0;
  for (let index = 0; index <= path.length; index++) {
    const trap = network.joints[joint]!.elements.find(
      (element) => element !== fixture && identities[element]?.part === 'trap',
    );
    if (trap !== undefined) return { after: index, at: joint, element: trap };
    const pipe = path[index];
    if (pipe === undefined) return null;
    walked += network.pipes[pipe]!.length;
    if (walked > searchLength) return null;
    joint = water.toward[pipe]!;
  }
  return null;
}

/** Closets, pedestal urinals and whatever the model types as a trap carry it inside. */
function isBuiltIn(model: Model, identities: readonly Identity[], element: ElementId): boolean {
  const { kind, detail } = identities[element]!;
  if (kind === 'water-closet' || kind === 'macerating-toilet') return true;
  if (kind === 'urinal' && detail.style === 'pedestal') return true;
  return trapInside.has(model.elements[element]!.predefinedType ?? '');
}

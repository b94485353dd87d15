import type { Box, Vec3 } from '../geometry/vector.ts';
import type { Identity } from '../model/identity.ts';
import type { Fabric, Model } from '../model/model.ts';
import type { JointId, Network } from '../network/network.ts';
import type { DryPiece } from './paths.ts';

/** Where no roof is modelled, this far above the highest floor with fixtures counts as open air (DESIGN, paths). */
const aboveHighestFloor = 2;
/** A roof covers what lies this near to it in plan. */
const besideRoof = 0.5;

export type Mouth = DryPiece['mouths'][number]['how'];

/**
 * Whether a dry joint is in the open: a roof terminal, an air admittance valve, or an open end that points upward
 * above every floor and roof over it. `assumed` tells whether any end was judged without a roof in the model.
 */
export function openAirAt(
  model: Model,
  identities: readonly Identity[],
  network: Network,
): ((joint: JointId) => Mouth | null) & { readonly assumed: () => boolean } {
  const sky = openSky(model, identities, network);
  let assumed = false;

  const inTheOpen = (at: Vec3): boolean => {
    const open = sky.isOpen(at);
    if (open && !sky.roofed) assumed = true;
    return open;
  };
  const judge = (joint: JointId): Mouth | null => {
    const { elements, pipes, at } = network.joints[joint]!;
    const parts = elements.map((element) => identities[element]?.part);
    if (parts.includes('vent-terminal')) return 'terminal';
    if (parts.includes('air-admittance-valve')) return 'valve';
    if (pipes.length !== 1 || at === null) return null;
    if (parts.some((part) => part !== 'pipe' && part !== 'fitting')) return null;
    return pointsUp(network, joint) && inTheOpen(at) ? 'highest' : null;
  };
  return Object.assign(judge, { assumed: () => assumed });
}

export interface OpenSky {
  /** The model draws a roof. */
  readonly roofed: boolean;
  readonly isOpen: (at: Vec3) => boolean;
  /** Height in metres over which a vent at this place in plan is in open air. */
  readonly above: (at: Vec3) => number;
}

/** From which height on a place is in the open: over every floor and roof that covers it, else over the highest floor. */
export function openSky(model: Model, identities: readonly Identity[], network: Network): OpenSky {
  const roofed = model.roofs.length > 0 || model.slabs.some(({ predefinedType }) => predefinedType === 'ROOF');
  if (!roofed) {
    const level = highestFloorWithFixtures(model, identities, network) + aboveHighestFloor;
    return { roofed, isOpen: (at) => at[2] >= level, above: () => level };
  }
  const covers: readonly Fabric[] = [...model.roofs, ...model.slabs];
  const above = (at: Vec3): number => {
    const over = covers.filter(({ box }) => box !== null && coversInPlan(box, at));
    return Math.max(...(over.length > 0 ? over : covers).map(({ box }) => box?.max[2] ?? Number.NEGATIVE_INFINITY));
  };
  return { roofed, isOpen: (at) => at[2] > above(at), above };
}

const coversInPlan = (box: Box, at: Vec3): boolean =>
  at[0] >= box.min[0] - besideRoof &&
  at[0] <= box.max[0] + besideRoof &&
  at[1] >= box.min[1] - besideRoof &&
  at[1] <= box.max[1] + besideRoof;

/** The pipe that ends here rises toward its end. */
function pointsUp(network: Network, joint: JointId): boolean {
  const pipe = network.pipes[network.joints[joint]!.pipes[0]!]!;
  if (pipe.points === null) return false;
  const points = pipe.ends[1] === joint ? pipe.points : [...pipe.points].reverse();
  const last = points[points.length - 1]!;
  const before = points[points.length - 2]!;
  return last[2] > before[2];
}

function highestFloorWithFixtures(model: Model, identities: readonly Identity[], network: Network): number {
  let highest = Number.NEGATIVE_INFINITY;
  for (const [element, joints] of network.jointsOf) {
    if (identities[element]?.part !== 'fixture') continue;
    for (const joint of joints) {
      const z = network.joints[joint]!.at?.[2];
      if (z === undefined) continue;
      const floors = model.storeys.map(({ elevation }) => elevation).filter((elevation) => elevation <= z + 0.05);
      highest = Math.max(highest, floors.length > 0 ? Math.max(...floors) : z);
    }
  }
  return highest === Number.NEGATIVE_INFINITY ? 0 : highest;
}

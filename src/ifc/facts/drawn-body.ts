import type { Box, Vec3 } from '../../geometry/vector.ts';
import type { CentreLine, ElementClass, SizeWitness } from '../../model/model.ts';
import type { Reader } from '../reader.ts';
import { boundsOf, inWorld } from '../solids/bounds.ts';
import { centreLineOf } from '../solids/centre-line.ts';
import { identity, originOf } from '../solids/frame.ts';
import type { Placements } from '../solids/placements.ts';
import { type ProductShape, readShape } from '../solids/product-shape.ts';
import type { Solids } from '../solids/solids.ts';
import type { ElementRecord } from './elements.ts';
import { roundedMm } from './judge.ts';

/** What is drawn of an element. */
export interface Drawn {
  readonly kind: ElementClass;
  readonly origin: Vec3 | null;
  readonly centreLine: CentreLine | null;
  readonly box: Box | null;
}

/** Shapes are read of what carries water only; of the rest, where it stands. */
export function drawnBody(reader: Reader, placements: Placements, solids: Solids, element: ElementRecord): Drawn {
  const { kind, placement, shape: definition, isDoubtful } = element;
  if (kind === 'other') return { kind, origin: placements.worldOrigin(placement), centreLine: null, box: null };
  // Without a placement a product stands in the world's own coordinates; with one that cannot be followed, nowhere.
  const world = placement < 0 ? identity : placements.world(placement);
  const origin = world === null || placement < 0 ? null : originOf(world);
  if (world === null || definition < 0) return { kind, origin, centreLine: null, box: null };
  const shape = readShape(reader, solids, definition);
  // A flow segment that no type calls a pipe and that is no round thing is a duct or a cable tray.
  if (isDoubtful && shape.body.length > 0 && shape.body.every((piece) => piece.shape.kind === 'prism')) {
    return { kind: 'other', origin, centreLine: null, box: null };
  }
  const body = inWorld(shape.body, world);
  const box = boundsOf(body.length > 0 ? body : inWorld(shape.box, world));
  const hasLine = kind === 'segment' || (kind === 'fitting' && isOneSweep(shape));
  return { kind, origin, centreLine: hasLine ? centreLineOf(body, shape.axis, world) : null, box };
}

const isOneSweep = ({ body }: ProductShape): boolean => body.length === 1 && body[0]!.shape.kind === 'tube';

const mostRemembered = 20_000;

/** The drawn diameters as witnesses: exact where the file states a profile, measured where a mesh was fitted. */
export class DrawnSizes {
  /** By millimetres, for each means and ground. */
  private readonly outer = new Map<number, SizeWitness>();
  private readonly inner = new Map<number, SizeWitness>();
  private readonly measuredOuter = new Map<number, SizeWitness>();
  private readonly measuredInner = new Map<number, SizeWitness>();

  addTo(into: SizeWitness[], { centreLine }: Drawn): void {
    if (centreLine === null) return;
    const { outerDiameter, innerDiameter, ground } = centreLine;
    const isProfile = ground === 'extrusion' || ground === 'swept-disk';
    const { outer, inner, measuredOuter, measuredInner } = this;
    if (outerDiameter !== null) into.push(shared(isProfile ? outer : measuredOuter, outerDiameter, 'outer', isProfile));
    if (innerDiameter !== null) into.push(shared(isProfile ? inner : measuredInner, innerDiameter, 'inner', isProfile));
  }
}

/** Pipes of one size share their witness: it is made once and never changed. */
function shared(
  known: Map<number, SizeWitness>,
  diameter: number,
  means: 'outer' | 'inner',
  isProfile: boolean,
): SizeWitness {
  const mm = roundedMm(diameter * 1000);
  const before = known.get(mm);
  if (before !== undefined) return before;
  const from = isProfile ? 'profile' : 'measured on the body';
  const witness: SizeWitness = { means, mm, text: null, ground: isProfile ? 'profile' : 'measured', from };
  if (known.size < mostRemembered) known.set(mm, witness);
  return witness;
}

import type { Vec3 } from '../../geometry/vector.ts';
import type { Fabric, StoreyId, Wall } from '../../model/model.ts';
import { metres } from '../../units/quantity.ts';
import type { Reader } from '../reader.ts';
import { boundsOf, inWorld } from '../solids/bounds.ts';
import { compose, type Frame, identity, moved, turned } from '../solids/frame.ts';
import type { Piece } from '../solids/piece.ts';
import type { Placements } from '../solids/placements.ts';
import { readShape } from '../solids/product-shape.ts';
import type { Solids } from '../solids/solids.ts';
import type { Associations } from './associations.ts';
import type { PropertyReadings } from './property-readings.ts';
import type { Types } from './type-objects.ts';

const wallClasses = ['IFCWALL', 'IFCWALLSTANDARDCASE', 'IFCWALLELEMENTEDCASE'];
const slabClasses = ['IFCSLAB', 'IFCSLABSTANDARDCASE', 'IFCSLABELEMENTEDCASE'];
const roofClasses = ['IFCROOF'];

export interface FabricSources {
  readonly file: number;
  readonly reader: Reader;
  readonly placements: Placements;
  readonly solids: Solids;
  readonly associations: Associations;
  readonly storeyOf: (record: number) => StoreyId | null;
  readonly types: Types;
  readonly readings: PropertyReadings;
}

export interface BuildingFabric {
  readonly walls: readonly Wall[];
  readonly slabs: readonly Fabric[];
  readonly roofs: readonly Fabric[];
}

/** Records whose common sets `fabricOf` will ask for. */
export function wallRecords(reader: Reader): readonly number[] {
  return reader.allOf(wallClasses);
}

/** Walls, slabs and roofs, each list in order of STEP ids. A slab that is said to be a roof stands among the roofs. */
export function fabricOf(sources: FabricSources): BuildingFabric {
  const { reader } = sources;
  const slabs = reader.allOf(slabClasses).map((record) => fabric(sources, record));
  const roofs = reader.allOf(roofClasses).map((record) => fabric(sources, record));
  const roofSlabs = slabs.filter(({ predefinedType }) => predefinedType === 'ROOF');
  return {
    walls: wallRecords(reader).map((record) => wall(sources, record)),
    slabs: slabs.filter(({ predefinedType }) => predefinedType !== 'ROOF'),
    roofs: [...roofs, ...roofSlabs].sort((a, b) => a.stepId - b.stepId),
  };
}

function fabric({ file, reader, placements, solids, storeyOf }: FabricSources, record: number): Fabric {
  const cursor = reader.open(record);
  const globalId = cursor.unique() ?? '';
  const name = cursor.skip(1).text();
  const placement = reader.follow(cursor.skip(2).id(), record);
  const shape = reader.follow(cursor.id(), record);
  const word = cursor.skip(1).more ? cursor.enumeration() : null;
  const world = placement < 0 ? identity : placements.world(placement);
  const body = world === null ? [] : readShape(reader, solids, shape).body;
  return {
    file,
    stepId: reader.index.ids[record]!,
    globalId,
    name,
    predefinedType: word === 'NOTDEFINED' ? null : word,
    storey: storeyOf(record),
    box: world === null ? null : boundsOf(inWorld(body, world)),
    outline: world === null ? null : planOutline(body, world),
  };
}

function wall(sources: FabricSources, record: number): Wall {
  const { associations, types, readings } = sources;
  const typeRecord = types.recordOf(record);
  const own = associations.layers(record);
  const layers = own.length > 0 || typeRecord < 0 ? own : associations.layers(typeRecord);
  const common = readings.wallCommon(record);
  const ofType = typeRecord < 0 ? null : readings.wallCommon(typeRecord);
  const flag = (name: string): boolean | null => {
    const value = common?.get(name) ?? ofType?.get(name);
    return typeof value === 'boolean' ? value : null;
  };
  return {
    ...fabric(sources, record),
    layers: layers.map(({ name, thickness }) => ({ name, thickness: metres(thickness) })),
    loadBearing: flag('LoadBearing'),
    external: flag('IsExternal'),
  };
}

/** How far from the vertical an extrusion may lean and still have its outline as its plan. */
const upright = 0.999;

function planOutline(body: readonly Piece[], world: Frame): readonly Vec3[] | null {
  const [only] = body;
  if (only === undefined || body.length > 1 || only.shape.kind !== 'prism') return null;
  const { base, shift } = only.shape;
  const frame = compose(world, only.frame);
  const [x, y, z] = turned(frame, shift);
  const height = Math.hypot(x, y, z);
  if (height === 0 || Math.abs(z) < upright * height) return null;
  const outline: Vec3[] = [];
  for (let k = 0; k + 2 < base.length; k += 3) outline.push(moved(frame, [base[k]!, base[k + 1]!, base[k + 2]!]));
  return outline;
}

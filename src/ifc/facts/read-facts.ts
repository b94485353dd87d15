import type { Element, ElementId, Fabric, Port, Space, StoreyId, System, Wall } from '../../model/model.ts';
import { solidsOf } from '../solids/solids.ts';
import { associationsOf } from './associations.ts';
import { drawnBody, drawnSizes } from './drawn-body.ts';
import { type ElementRecord, elementRecords, readElement, type Ties } from './elements.ts';
import { fabricOf, wallRecords } from './fabric.ts';
import type { JoinedStoreys } from './join-storeys.ts';
import { judged, sizesInNames } from './judge.ts';
import { portLinks, readPorts } from './ports.ts';
import { propertyReadings } from './property-readings.ts';
import { propertySetsOf } from './property-sets.ts';
import type { Source } from './source.ts';
import { spacesOf } from './spaces.ts';
import { systemsOf } from './systems.ts';
import { typesOf } from './type-objects.ts';

/** All that one file says, its ids counted on from those of the files before it. */
export interface Facts {
  readonly elements: readonly Element[];
  readonly ports: readonly Port[];
  readonly systems: readonly System[];
  readonly spaces: readonly Space[];
  readonly walls: readonly Wall[];
  readonly slabs: readonly Fabric[];
  readonly roofs: readonly Fabric[];
}

export interface FirstIds {
  readonly elements: number;
  readonly ports: number;
  readonly systems: number;
  readonly spaces: number;
}

export function readFacts(source: Source, storeys: JoinedStoreys, first: FirstIds): Facts {
  const { file, index, reader, units, placements, spatial } = source;
  const solids = solidsOf(reader, placements, units.radians);
  const sets = propertySetsOf(reader, units);
  const types = typesOf(reader, sets);
  const links = portLinks(reader);
  const { systems, membersOf } = systemsOf(reader, file, first.systems);
  const associations = associationsOf(reader, units.length.metres);
  const storeyOf = (record: number): StoreyId | null => {
    const storey = spatial.storeyOf(record);
    return storey < 0 ? null : storeys.idOf(file, storey);
  };
  const systemsAt = (record: number): Element['systems'] => {
    for (let at = record, depth = 0; at >= 0 && depth < deepestAssembly; at = spatial.wholeOf(at), depth++) {
      const own = membersOf.get(at);
      if (own !== undefined) return own;
    }
    return [];
  };
  const tiesOf = (record: number): Ties => ({
    ports: links.countOf(record),
    isInSystem: membersOf.has(record),
  });

  const records = elementRecords(reader, tiesOf, types);
  const read = Array.from(records, (record) => readElement(reader, record, tiesOf(record), types));
  const places = new Map(read.map(({ record }, k) => [record, k]));
  const elementOf = (record: number): ElementId | null => {
    const place = places.get(record);
    return place === undefined ? null : ((first.elements + place) as ElementId);
  };
  const isPiping = (record: number): boolean => carriesSize.has(read[places.get(record) ?? -1]?.kind ?? 'other');
  const { ports, portsOf } = readPorts(reader, placements, links, first.ports, elementOf, isPiping);
  const walls = wallRecords(reader);
  const readings = propertyReadings(reader, sets, types, records, links, walls);
  const { spaces, idOf: spaceIdOf } = spacesOf(source, solids, storeyOf, first.spaces);

  const elements = read.map((one, k): Element => {
    const { record, type } = one;
    const drawn = drawnBody(reader, placements, solids, one);
    const own = readings.ofElement(k);
    const witnessed = judged({ own, ofType: type?.readings ?? [], ofPorts: readings.ofPorts(record) }, drawn.kind);
    const named = carriesSize.has(drawn.kind) ? namedSizes(one) : [];
    const typeRecord = type?.record ?? -1;
    return {
      id: (first.elements + k) as ElementId,
      file,
      stepId: index.ids[record]!,
      globalId: one.globalId,
      ifcClass: one.ifcClass,
      typeClass: type?.className ?? null,
      predefinedType: one.predefinedType,
      kind: drawn.kind,
      name: one.name,
      objectType: one.objectType,
      description: one.description,
      tag: one.tag,
      typeName: type?.name ?? null,
      typeDescription: type?.description ?? null,
      classifications: [...associations.classifications(record), ...associations.classifications(typeRecord)],
      systems: systemsAt(record),
      storey: storeyOf(record),
      space: spaceIdOf(spatial.spaceOf(record)),
      ports: portsOf((first.elements + k) as ElementId),
      material: associations.material(record) ?? associations.material(typeRecord),
      origin: drawn.origin,
      centreLine: drawn.centreLine,
      box: drawn.box,
      sizes: [...witnessed.sizes, ...drawnSizes(drawn), ...named],
      slopes: witnessed.slopes,
      statedLength: witnessed.statedLength,
      properties: drawn.kind === 'other' ? [] : witnessed.properties,
    };
  });
  const fabric = fabricOf({
    file,
    reader,
    placements,
    solids,
    associations,
    storeyOf,
    typeRecordOf: (record) => types.of(record)?.record ?? -1,
    wallCommon: readings.wallCommon,
  });
  return { elements, ports, systems, spaces, ...fabric };
}

const deepestAssembly = 20;
const carriesSize = new Set<Element['kind']>(['segment', 'fitting', 'valve']);

const namedSizes = ({ type, objectType, name }: ElementRecord): Element['sizes'] =>
  sizesInNames([
    ['type name', type?.name ?? null, true],
    ['ObjectType', objectType, true],
    ['Name', name, false],
  ]);

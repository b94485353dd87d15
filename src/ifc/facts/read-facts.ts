import type { Element, ElementId, Fabric, Port, PortId, Space, StoreyId, System, Wall } from '../../model/model.ts';
import { Solids } from '../solids/solids.ts';
import { Associations } from './associations.ts';
import { DrawnSizes, drawnBody } from './drawn-body.ts';
import { type ElementRecord, elementRecords, readElement } from './elements.ts';
import { fabricOf, wallRecords } from './fabric.ts';
import type { JoinedStoreys } from './join-storeys.ts';
import { addNamedSize, judged, NamedSizes } from './judge.ts';
import { PortLinks, readPorts } from './ports.ts';
import { aWall, PropertyReadings } from './property-readings.ts';
import { PropertySets, type Reading } from './property-sets.ts';
import type { Source } from './source.ts';
import { Spaces } from './spaces.ts';
import { Systems } from './systems.ts';
import { Types } from './type-objects.ts';

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
  return new FactsReader(source, storeys, first).read();
}

const deepestAssembly = 20;
const carriesSize = new Set<Element['kind']>(['segment', 'fitting', 'valve']);
const noPorts: readonly PortId[] = [];
const noSystems: Element['systems'] = [];

class FactsReader {
  private readonly source: Source;
  private readonly storeys: JoinedStoreys;
  private readonly first: FirstIds;
  private readonly solids: Solids;
  private readonly types: Types;
  private readonly links: PortLinks;
  private readonly systems: Systems;
  private readonly associations: Associations;
  private readonly spaces: Spaces;
  private readonly claims = new NamedSizes();
  private readonly drawnSizes = new DrawnSizes();
  private readonly records: readonly ElementRecord[];
  private readonly readings: PropertyReadings;
  /** By record. 0: nobody of ours; k + 1: element at place k; `aWall`: a wall. */
  private readonly places: Uint32Array;
  /** Ports by the place of their element. */
  private readonly portsOf: (readonly PortId[])[] = [];

  constructor(source: Source, storeys: JoinedStoreys, first: FirstIds) {
    this.source = source;
    this.storeys = storeys;
    this.first = first;
    const { file, reader, units, placements } = source;
    this.solids = new Solids(reader, placements, units.radians);
    const sets = new PropertySets(reader, units);
    this.types = new Types(reader, sets);
    this.links = new PortLinks(reader);
    this.systems = new Systems(reader, file, first.systems);
    this.associations = new Associations(reader, units.length.metres);
    this.spaces = new Spaces(source, this.solids, storeys, first.spaces);
    const records = elementRecords(reader, this.links, this.systems, this.types);
    this.places = new Uint32Array(reader.index.count);
    for (const record of wallRecords(reader)) this.places[record] = aWall;
    for (let k = 0; k < records.length; k++) this.places[records[k]!] = k + 1;
    // Sets reach their types before the first type is read.
    this.readings = new PropertyReadings(reader, sets, this.types, records.length, this.places, this.links);
    this.records = records.map((record) => readElement(reader, record, this.links.countOf(record), this.types));
  }

  read(): Facts {
    const { source, links, first, systems, spaces, solids, types, associations, readings } = this;
    const { file, reader, placements } = source;
    const ports = readPorts(reader, placements, links, first.ports, this);
    for (let k = 0; k < ports.length; k++) this.keepPort(ports[k]!);
    const elements = this.records.map((record, k) => this.element(record, k));
    const storeyOf = (record: number): StoreyId | null => this.storeyOf(record);
    const fabric = fabricOf({ file, reader, placements, solids, associations, storeyOf, types, readings });
    return { elements, ports, systems: systems.systems, spaces: spaces.spaces, ...fabric };
  }

  elementAt(record: number): ElementId | null {
    const place = this.placeOf(record);
    return place < 0 ? null : ((this.first.elements + place) as ElementId);
  }

  isPiping(record: number): boolean {
    const place = this.placeOf(record);
    return place >= 0 && carriesSize.has(this.records[place]!.kind);
  }

  private placeOf(record: number): number {
    const place = this.places[record]!;
    return place === aWall ? -1 : place - 1;
  }

  private keepPort({ id, owner }: Port): void {
    if (owner === null) return;
    const place = owner - this.first.elements;
    const list = this.portsOf[place];
    // Elements have a few ports; one with very many is a fault, and must not be copied each time.
    if (list === undefined) this.portsOf[place] = [id];
    else if (list.length < 8) this.portsOf[place] = list.concat(id);
    else (list as PortId[]).push(id);
  }

  private storeyOf(record: number): StoreyId | null {
    const storey = this.source.spatial.storeyOf(record);
    return storey < 0 ? null : this.storeys.idOf(this.source.file, storey);
  }

  /** Systems of a product; of the assembly that it is a part of, where it is in none itself. */
  private systemsOf(record: number): Element['systems'] {
    let at = record;
    for (let depth = 0; at >= 0 && depth < deepestAssembly; depth++) {
      if (this.systems.has(at)) return this.systems.of(at);
      at = this.source.spatial.wholeOf(at);
    }
    return noSystems;
  }

  private element(one: ElementRecord, place: number): Element {
    const { source, associations, readings, claims } = this;
    const { file, reader, placements, spatial } = source;
    const { record, type, name, objectType } = one;
    const drawn = drawnBody(reader, placements, this.solids, one);
    const { kind } = drawn;
    const ofType = type === null ? noReadings : type.readings;
    const witnessed = judged(readings.ofElement(place), ofType, readings.ofPorts(record), kind);
    const { sizes } = witnessed;
    const { drawnSizes } = this;
    drawnSizes.addTo(sizes, drawn);
    if (carriesSize.has(kind)) {
      if (type !== null && type.name !== null) addNamedSize(sizes, claims.of(type.name, true, 'type name'));
      if (objectType !== null) addNamedSize(sizes, claims.of(objectType, true, 'ObjectType'));
      if (name !== null) addNamedSize(sizes, claims.of(name, false, 'Name'));
    }
    const typeRecord = type === null ? -1 : type.record;
    return {
      id: (this.first.elements + place) as ElementId,
      file,
      stepId: reader.index.ids[record]!,
      globalId: one.globalId,
      ifcClass: one.ifcClass,
      typeClass: type === null ? null : type.className,
      predefinedType: one.predefinedType,
      kind,
      name,
      objectType,
      description: one.description,
      tag: one.tag,
      typeName: type === null ? null : type.name,
      typeDescription: type === null ? null : type.description,
      classifications: joined(associations.classifications(record), associations.classifications(typeRecord)),
      systems: this.systemsOf(record),
      storey: this.storeyOf(record),
      space: this.spaces.idOf(spatial.spaceOf(record)),
      ports: this.portsOf[place] ?? noPorts,
      material: associations.material(record) ?? associations.material(typeRecord),
      origin: drawn.origin,
      centreLine: drawn.centreLine,
      box: drawn.box,
      // As long as it must be: there are many of these, and all are kept.
      sizes: sizes.slice(),
      slopes: witnessed.slopes,
      statedLength: witnessed.statedLength,
      properties: witnessed.properties,
    };
  }
}

const noReadings: readonly Reading[] = [];

const joined = (own: readonly string[], ofType: readonly string[]): readonly string[] =>
  ofType.length === 0 ? own : own.length === 0 ? ofType : [...own, ...ofType];

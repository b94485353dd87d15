import {
  type Element,
  elementId,
  type Model,
  type Port,
  type PortId,
  type System,
  type SystemId,
} from '../../src/model/model.ts';

/** An element with nothing said of it but its class and what the case says. */
export interface PlainElement extends Partial<Omit<Element, 'id' | 'systems' | 'ports'>> {
  readonly ifcClass: string;
  readonly kind: Element['kind'];
  /** Names of systems of the same model. */
  readonly in?: readonly string[];
  /** How many ports it has; each is connected to nothing. */
  readonly portCount?: number;
}

export interface PlainSystem {
  readonly name: string;
  readonly predefinedType?: string;
}

/** A model of bare facts, where neither geometry nor relations matter. GlobalIds are `e0`, `e1` and so on unless given. */
export function plainModel(elements: readonly PlainElement[], systems: readonly PlainSystem[] = []): Model {
  const ports: Port[] = [];
  const portsOf = (owner: number, count: number): PortId[] =>
    Array.from({ length: count }, () => {
      const id = ports.length as PortId;
      const stepId = 1000 + id;
      ports.push({
        id,
        stepId,
        globalId: `p${id}`,
        owner: elementId(owner),
        at: null,
        direction: 'unknown',
        connected: [],
        name: null,
      });
      return id;
    });
  return {
    files: [{ name: 'plain.ifc', sha256: '0', schema: 'IFC4', lengthUnit: { name: 'METRE', metres: 1 }, remarks: [] }],
    elements: elements.map(({ in: inSystems = [], portCount = 0, ...said }, index) => ({
      ...nothingSaid,
      stepId: 100 + index,
      globalId: `e${index}`,
      ...said,
      id: elementId(index),
      systems: inSystems.map((name) => systems.findIndex((one) => one.name === name) as SystemId),
      ports: portsOf(index, portCount),
    })),
    ports,
    systems: systems.map(
      ({ name, predefinedType = null }, id): System => ({
        id: id as SystemId,
        file: 0,
        stepId: 10 + id,
        globalId: `s${id}`,
        name,
        longName: null,
        objectType: null,
        predefinedType,
      }),
    ),
    storeys: [],
    spaces: [],
    walls: [],
    slabs: [],
    roofs: [],
    findings: [],
  };
}

const nothingSaid = {
  file: 0,
  typeClass: null,
  predefinedType: null,
  name: null,
  objectType: null,
  description: null,
  tag: null,
  typeName: null,
  typeDescription: null,
  classifications: [],
  storey: null,
  space: null,
  material: null,
  origin: null,
  centreLine: null,
  box: null,
  sizes: [],
  slopes: [],
  statedLength: null,
  properties: [],
} as const;

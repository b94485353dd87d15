import {
  type Element,
  elementId,
  type Model,
  type PortId,
  type SizeWitness,
  type SpaceId,
  type StoreyId,
  type SystemId,
} from '../../src/model/model.ts';
import { sizeInName } from '../../src/model/size-in-name.ts';
import { metres } from '../../src/units/quantity.ts';
import { type DraftElement, draftOf } from './draft.ts';
import type { Sketch, SketchFabric } from './sketch.ts';
import { globalIdOf } from './sketch-ids.ts';

export interface ModelOptions {
  /** False: elements have no ports, and geometry must join them. */
  readonly ports: boolean;
  /** False: no nominal diameter stands in a property; the outside diameter is still drawn. */
  readonly sizes: boolean;
}

/** The model that a reader would make of the sketch's IFC file, without the file. */
export function modelOf(sketch: Sketch, options: ModelOptions = { ports: true, sizes: true }): Model {
  const draft = draftOf(sketch);
  const firstPort = 1000 + draft.elements.length;
  const joined = draft.ports.map((): PortId[] => []);
  for (const [a, b] of draft.connections) {
    joined[a]!.push(b as PortId);
    joined[b]!.push(a as PortId);
  }
  const storeys = storeyOrder(sketch);
  const fabric = (kind: keyof typeof fabricTypes, { name, storey, min, max }: SketchFabric, index: number) => ({
    file: 0,
    stepId: fabricSteps[kind] + index,
    globalId: globalIdOf(sketch.title, kind, String(index), name),
    name,
    predefinedType: fabricTypes[kind],
    storey: storeys.idOf(storey),
    box: { min, max },
    outline: rectangle(min, max),
  });
  return {
    files: [
      {
        name: 'sketch.ifc',
        sha256: '0'.repeat(64),
        schema: 'IFC4',
        lengthUnit: { name: 'METRE', metres: 1 },
        remarks: [],
      },
    ],
    elements: draft.elements.map((element, index) => told(sketch, element, index, options, storeys.idOf)),
    ports: options.ports
      ? draft.ports.map(({ owner, at, direction }, index) => ({
          id: index as PortId,
          stepId: firstPort + index,
          globalId: globalIdOf(sketch.title, 'port', String(index)),
          owner: elementId(owner),
          at,
          direction,
          connected: joined[index]!,
          name: null,
        }))
      : [],
    systems: sketch.systems.map(({ name, predefined }, index) => ({
      id: index as SystemId,
      file: 0,
      stepId: 900 + index,
      globalId: globalIdOf(sketch.title, 'system', name),
      name,
      longName: null,
      objectType: null,
      predefinedType: predefined,
    })),
    storeys: storeys.sorted.map((index, id) => ({
      id: id as StoreyId,
      file: 0,
      globalId: globalIdOf(sketch.title, 'storey', sketch.storeys[index]!.name),
      name: sketch.storeys[index]!.name,
      elevation: sketch.storeys[index]!.elevation,
    })),
    spaces: sketch.spaces.map(({ name, storey, min, max }, index) => ({
      id: index as SpaceId,
      file: 0,
      globalId: globalIdOf(sketch.title, 'space', String(index), name),
      name,
      longName: name,
      storey: storeys.idOf(storey),
      box: { min, max },
    })),
    walls: sketch.walls.map((wall, index) => {
      const half = wall.layers.reduce((sum, { thickness }) => sum + thickness, 0) / 2;
      const outline = wallOutline(wall.from, wall.to, half);
      const min = lowest(outline);
      const max = highest(outline);
      return {
        ...fabric(
          'wall',
          { name: wall.name, storey: wall.storey, min, max: [max[0], max[1], min[2] + wall.height] },
          index,
        ),
        outline,
        layers: wall.layers.map(({ name, thickness }) => ({ name, thickness: metres(thickness) })),
        loadBearing: wall.loadBearing,
        external: wall.external,
      };
    }),
    slabs: sketch.slabs.map((slab, index) => fabric('slab', slab, index)),
    roofs: sketch.roofs.map((roof, index) => fabric('roof', roof, index)),
    findings: [],
  };
}

const fabricTypes = { wall: 'SOLIDWALL', slab: 'FLOOR', roof: 'FLAT_ROOF' } as const;
const fabricSteps = { wall: 500, slab: 700, roof: 800 } as const;

function told(
  sketch: Sketch,
  element: DraftElement,
  index: number,
  { ports, sizes }: ModelOptions,
  storeyOf: (index: number | null) => StoreyId | null,
): Element {
  const system = sketch.systems.findIndex(({ medium }) => medium === element.medium);
  const pipe = element.line !== null ? element.size : null;
  return {
    id: elementId(index),
    file: 0,
    stepId: 1000 + index,
    globalId: element.globalId,
    ifcClass: element.ifcClass,
    typeClass: `${element.ifcClass}Type`,
    predefinedType: element.predefined,
    kind: element.kind,
    name: element.name,
    objectType: element.predefined === 'USERDEFINED' ? element.typeName : null,
    description: null,
    tag: null,
    typeName: element.typeName,
    typeDescription: null,
    classifications: [],
    systems: system < 0 ? [] : [system as SystemId],
    storey: storeyOf(element.storey),
    space: element.space as SpaceId | null,
    ports: ports ? element.ports.map((port) => port as PortId) : [],
    material: element.material,
    origin: element.origin,
    centreLine:
      element.line === null
        ? null
        : {
            points: element.line,
            outerDiameter: pipe && metres(pipe.outer),
            innerDiameter: pipe && metres(pipe.inner),
            ground: pipe === null ? 'axis' : element.line.length > 2 ? 'swept-disk' : 'extrusion',
            residual: 0,
          },
    box: element.line !== null && pipe === null ? null : element.box,
    sizes:
      pipe === null
        ? nameWitness(element)
        : [
            ...(sizes
              ? [
                  {
                    means: 'nominal' as const,
                    mm: pipe.nominal * 1000,
                    text: null,
                    ground: 'property' as const,
                    from: 'Pset_PipeSegmentTypeCommon.NominalDiameter',
                  },
                ]
              : []),
            { means: 'outer', mm: pipe.outer * 1000, text: null, ground: 'profile', from: 'profile' },
            { means: 'inner', mm: pipe.inner * 1000, text: null, ground: 'profile', from: 'profile' },
          ],
    slopes: element.slope === null ? [] : [{ slope: element.slope, from: 'Pset_PipeSegmentOccurrence.Gradient' }],
    statedLength: null,
    properties: element.properties,
  };
}

function nameWitness({ line, typeName }: DraftElement): readonly SizeWitness[] {
  const text = line === null ? null : sizeInName(typeName, true);
  return text === null ? [] : [{ means: 'unknown', mm: null, text, ground: 'name', from: 'type name' }];
}

type Point = readonly [number, number, number];

/** Storeys of a model stand lowest first, whatever the order of the lines. */
function storeyOrder(sketch: Sketch) {
  const key = (index: number): string => globalIdOf(sketch.title, 'storey', sketch.storeys[index]!.name);
  const sorted = sketch.storeys
    .map((_, index) => index)
    .sort((a, b) => sketch.storeys[a]!.elevation - sketch.storeys[b]!.elevation || (key(a) < key(b) ? -1 : 1));
  const idOf = (index: number | null): StoreyId | null => (index === null ? null : (sorted.indexOf(index) as StoreyId));
  return { sorted, idOf };
}

const rectangle = (min: Point, max: Point): readonly Point[] => [
  min,
  [max[0], min[1], min[2]],
  [max[0], max[1], min[2]],
  [min[0], max[1], min[2]],
];

export function wallOutline(from: Point, to: Point, half: number): readonly Point[] {
  const long = Math.hypot(to[0] - from[0], to[1] - from[1]);
  const across: Point = [(-(to[1] - from[1]) / long) * half, ((to[0] - from[0]) / long) * half, 0];
  const put = (point: Point, side: number): Point => [
    point[0] + across[0] * side,
    point[1] + across[1] * side,
    point[2],
  ];
  return [put(from, 1), put(from, -1), put(to, -1), put(to, 1)];
}

const lowest = (points: readonly Point[]): Point => [
  Math.min(...points.map(([x]) => x)),
  Math.min(...points.map(([, y]) => y)),
  Math.min(...points.map(([, , z]) => z)),
];
const highest = (points: readonly Point[]): Point => [
  Math.max(...points.map(([x]) => x)),
  Math.max(...points.map(([, y]) => y)),
  Math.max(...points.map(([, , z]) => z)),
];

/** GlobalId of the element that the sketch calls `name`: a pipe (`A-B` or its own name), a part, or a joint's fitting. */
export function idOf(sketch: Sketch, name: string): string {
  return draftOf(sketch).elements[indexOf(sketch, name)]!.globalId;
}

/** Dense id of the same element in `modelOf(sketch)`. */
export const elementIdOf = (sketch: Sketch, name: string) => elementId(indexOf(sketch, name));

function indexOf(sketch: Sketch, name: string): number {
  const found = draftOf(sketch).elements.findIndex((element) => element.name === name);
  if (found < 0) throw new Error(`the sketch has no element "${name}"`);
  return found;
}

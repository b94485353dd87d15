import { boxAround, grown } from '../../src/geometry/box.ts';
import type { Box, Vec3 } from '../../src/geometry/vector.ts';
import { type FixtureKind, type Identity, noDetail, type Part } from '../../src/model/identity.ts';
import { type Element, elementId, type Model, type Port, type PortId } from '../../src/model/model.ts';
import type { Network } from '../../src/network/network.ts';
import { metres } from '../../src/units/quantity.ts';

/** Piping drawn element by element, for cases in which every millimetre counts. */
export interface Drawn {
  readonly model: Model;
  readonly identities: readonly Identity[];
}

export interface DrawnPart {
  readonly name: string;
  readonly part: Part;
  readonly line?: readonly Vec3[];
  readonly diameter?: number;
  readonly box?: Box;
  readonly ports?: readonly DrawnPort[];
  readonly medium?: Identity['medium'];
  readonly kind?: FixtureKind;
  readonly predefinedType?: string;
  readonly origin?: Vec3 | null;
  readonly statedLength?: number;
}

export interface DrawnPort {
  /** Name by which `connect` calls it: `A.0`. */
  readonly at: Vec3 | null;
  readonly direction?: Port['direction'];
}

type More = Omit<Partial<DrawnPart>, 'name' | 'part' | 'line'>;

/** A pipe of 110 mm outside diameter unless said otherwise, along points in metres: `0 0 0 > 2 0 0`. */
export const pipe = (name: string, line: string, more: More = {}): DrawnPart => ({
  name,
  part: 'pipe',
  line: line.split('>').map(point),
  diameter: 0.11,
  medium: 'sanitary',
  ...more,
});

function point(text: string): Vec3 {
  const [x, y, z, more] = text.trim().split(/\s+/).map(Number);
  if (x === undefined || y === undefined || z === undefined || more !== undefined || Number.isNaN(x + y + z))
    throw new Error(`no point: ${text}`);
  return [x, y, z];
}

/** A body of `size` metres a side round its middle. */
export const body = (name: string, part: Part, middle: Vec3, size: number, more: More = {}): DrawnPart => ({
  name,
  part,
  box: grown({ min: middle, max: middle }, size / 2),
  medium: 'sanitary',
  ...more,
});

/** Pairs of ports by owner and number: `['A.1', 'B.0']`. */
export function drawn(parts: readonly DrawnPart[], connected: readonly (readonly [string, string])[] = []): Drawn {
  const ports: Port[] = [];
  const numbers = new Map<string, PortId>();
  const owned = parts.map(({ name, ports: own = [] }, owner) =>
    own.map(({ at, direction = 'unknown' }, i) => {
      const id = ports.length as PortId;
      numbers.set(`${name}.${i}`, id);
      ports.push({
        id,
        stepId: 1000 + id,
        globalId: `port${id}`,
        owner: elementId(owner),
        at,
        direction,
        connected: [],
        name: null,
      });
      return id;
    }),
  );
  const links = new Map<PortId, PortId[]>();
  for (const [a, b] of connected) {
    const [x, y] = [numbers.get(a), numbers.get(b)];
    if (x === undefined || y === undefined) throw new Error(`no port ${a} or ${b}`);
    links.set(x, [...(links.get(x) ?? []), y]);
    links.set(y, [...(links.get(y) ?? []), x]);
  }
  return {
    model: {
      files: [],
      elements: parts.map((part, id) => elementOf(part, id, owned[id]!)),
      ports: ports.map((port) => ({ ...port, connected: links.get(port.id) ?? [] })),
      systems: [],
      storeys: [],
      spaces: [],
      walls: [],
      slabs: [],
      roofs: [],
      findings: [],
    },
    identities: parts.map(({ part, medium = null, kind }) => ({
      part,
      kind: kind ?? null,
      detail: noDetail,
      medium,
      evidence: 'drawn',
      weak: false,
      outletMm: null,
      reading: null,
    })),
  };
}

const kinds: Partial<Record<Part, Element['kind']>> = {
  pipe: 'segment',
  fitting: 'fitting',
  chamber: 'chamber',
  valve: 'valve',
  'air-admittance-valve': 'valve',
  tank: 'treatment',
  'not-drainage': 'other',
};

function elementOf(part: DrawnPart, id: number, ports: readonly PortId[]): Element {
  const { line, diameter } = part;
  const box = part.box ?? (line ? boxAround(line) : null);
  return {
    id: elementId(id),
    file: 0,
    stepId: 100 + id,
    globalId: `id-${part.name}`,
    ifcClass: part.part === 'pipe' ? 'IfcPipeSegment' : 'IfcPipeFitting',
    typeClass: null,
    predefinedType: part.predefinedType ?? null,
    kind: kinds[part.part] ?? 'terminal',
    name: part.name,
    objectType: null,
    description: null,
    tag: null,
    typeName: null,
    typeDescription: null,
    classifications: [],
    systems: [],
    storey: null,
    space: null,
    ports,
    material: null,
    origin: part.origin === undefined ? (box?.min ?? null) : part.origin,
    centreLine: line
      ? {
          points: line,
          outerDiameter: diameter ? metres(diameter) : null,
          innerDiameter: null,
          ground: 'extrusion',
          residual: 0,
        }
      : null,
    box,
    sizes: [],
    slopes: [],
    statedLength: part.statedLength === undefined ? null : metres(part.statedLength),
    properties: [],
  };
}

/**
 * Who is joined to whom, in names that survive turning and renumbering. A pipe's section is `A`, or `A1`, `A2` from the
 * end whose name comes first; a joint lists what meets at it: `A+B@tee`. Sorted; dead ends included.
 */
export function joinsOf({ model }: Drawn, network: Network): string[] {
  const nameOf = (element: number): string => model.elements[element]!.name ?? '?';
  const pipeName = (id: number): string => {
    const { element } = network.pipes[id]!;
    if (element === null) return 'link';
    const own = network.pipesOf.get(element)!;
    return own.length === 1 ? nameOf(element) : `${nameOf(element)}${own.indexOf(id as (typeof own)[number]) + 1}`;
  };
  return network.joints
    .map(({ pipes, elements }) => {
      const met = pipes.map(pipeName).sort().join('+');
      return elements.length === 0 ? met : `${met}@${elements.map(nameOf).join(',')}`;
    })
    .sort();
}

import { describe, expect, test } from 'vitest';
import type { Element, ElementClass, Model } from '../../src/model/model.ts';
import { hasOpenModels, openModel } from './models.ts';
import { modelOf } from './read-one.ts';

// Expected numbers: the models' index, made by a plain text scan and placement arithmetic independent of this reader.

interface Expected {
  readonly schema: string;
  /** Metres in a length unit. */
  readonly unit: number;
  readonly kinds: Partial<Record<ElementClass, number>>;
  readonly ports?: number;
  readonly pairs?: number;
  readonly systems?: number;
  readonly storeys?: readonly number[];
  readonly spaces?: number;
  /** Outside diameters in millimetres of segments with a centre line, and how many have each. */
  readonly outside?: Readonly<Record<string, number>>;
  /** Metres of all segments together. */
  readonly length?: number;
  readonly shortestMm?: number;
}

const roadKinds = { chamber: 7, segment: 6 } as const;
const road: Expected = {
  schema: 'IFC4X3_RC3',
  unit: 1,
  kinds: roadKinds,
  ports: 24,
  pairs: 12,
  systems: 1,
  storeys: [],
  outside: { 400: 4, 239: 2 },
  length: 71.34,
  shortestMm: 3086.14,
};

const expected: Readonly<Record<string, Expected>> = {
  'riolering-topology/RioleringTest.ifc': {
    schema: 'IFC2X3',
    unit: 1,
    kinds: { terminal: 3, segment: 5, fitting: 2 },
    ports: 19,
    pairs: 9,
    systems: 0,
    storeys: [],
  },
  'road-drainage-1/DrainageSystem-1-1.ifc': road,
  'road-drainage-1/DrainageSystem-1-2.ifc': road,
  'road-drainage-2/DrainageSystem-2.ifc': {
    schema: 'IFC4X3_RC3',
    unit: 1,
    kinds: { chamber: 1, segment: 3 },
    ports: 9,
    pairs: 3,
    systems: 1,
    outside: {},
  },
  'sewer-no-ports/Infra-Plumbing-ifc4x3.ifc': {
    schema: 'IFC4X3_ADD2',
    unit: 0.001,
    // The two manholes are assemblies in the sewer's system.
    kinds: { segment: 24, chamber: 2 },
    ports: 0,
    systems: 1,
    storeys: [],
    outside: { 600: 24 },
    length: 24 * 2.575,
    shortestMm: 2575,
  },
  'heating-full-ports/hvac_heating.ifc.gz': {
    schema: 'IFC4',
    unit: 0.001,
    kinds: { segment: 100, fitting: 97, valve: 11, treatment: 4, other: 8 },
    ports: 464,
    pairs: 228,
    systems: 9,
    storeys: [0],
    outside: { 33.7: 22, 88.9: 22, 26.9: 28, 165.1: 15, 60.3: 12, 168.3: 1 },
    length: 76.89,
    shortestMm: 21.51,
  },
  'revit-ports-cyrillic/HVAC-Mech.ifc': {
    schema: 'IFC2X3',
    unit: 0.001,
    kinds: { other: 9 },
    ports: 16,
    pairs: 8,
    systems: 1,
    storeys: [0],
  },
  'ducts-open-ends/MEP.ifc': {
    schema: 'IFC2X3',
    unit: 1,
    kinds: { other: 8 },
    ports: 16,
    pairs: 6,
    systems: 0,
    storeys: [5.75],
  },
  'vent-pipe-dwv/SingleBackslash.ifc': {
    schema: 'IFC2X3',
    unit: 0.001,
    kinds: { segment: 1 },
    ports: 0,
    outside: { 60.325: 1 },
    length: 3.63055,
  },
  // The file says millimetres where its numbers are metres: read as it says, and the remark says so.
  'sewer-polyline-sweep/MultiSegmentPipe.ifc': {
    schema: 'IFC4',
    unit: 0.001,
    kinds: { segment: 1 },
    ports: 0,
    outside: { 1.8: 1 },
  },
  'revit-pipe-fittings/elbow-ports-by-relation.ifc': {
    schema: 'IFC4',
    unit: 0.001,
    kinds: { fitting: 1 },
    ports: 2,
    pairs: 0,
    storeys: [4],
  },
  'revit-pipe-fittings/elbow-ports-nested.ifc': {
    schema: 'IFC4',
    unit: 0.001,
    kinds: { fitting: 1 },
    ports: 2,
    pairs: 0,
    storeys: [4],
  },
  'revit-pipe-fittings/tee-advanced-brep.ifc': { schema: 'IFC4', unit: 0.001, kinds: { fitting: 1 }, ports: 0 },
  'fixtures-office/Office_A_20110811.ifc.gz': {
    schema: 'IFC2X3',
    unit: 1,
    kinds: { terminal: 28, other: 3 },
    ports: 0,
    storeys: [0, 4.267, 7.925],
    spaces: 99,
  },
  'fixtures-fzk-haus/AC11-FZK-Haus.ifc.gz': {
    schema: 'IFC2X3',
    unit: 1,
    kinds: { terminal: 6, other: 1 },
    ports: 0,
    storeys: [0, 2.7],
    spaces: 7,
  },
  'fixtures-duplex-cobie/Duplex-Handover.ifc': {
    schema: 'IFC2X3',
    unit: 0.001,
    // 16 fixtures, 89 other terminals, 28 of equipment (two pumps among them).
    kinds: { terminal: 16, treatment: 2, other: 89 + 26 },
    ports: 0,
    systems: 10,
    spaces: 22,
  },
  'duplex-architecture/Duplex_A_20110907.ifc.gz': {
    schema: 'IFC2X3',
    unit: 1,
    kinds: {},
    ports: 0,
    storeys: [-1.25, 0, 3.1, 6],
  },
  'duplex-electrical-imperial/Duplex_Electrical_20121207.ifc': {
    schema: 'IFC2X3',
    unit: 0.3048,
    kinds: { other: 97, treatment: 2 },
    ports: 0,
  },
  'fixture-geometry/basin-advanced-brep.ifc': { schema: 'IFC4', unit: 0.001, kinds: { terminal: 1 }, ports: 0 },
  'fixture-geometry/basin-faceted-brep.ifc': { schema: 'IFC4', unit: 0.001, kinds: { terminal: 1 }, ports: 0 },
  'fixture-geometry/basin-tessellation.ifc': { schema: 'IFC4', unit: 0.001, kinds: { terminal: 1 }, ports: 0 },
  'fixture-geometry/bath-csg-solid.ifc': { schema: 'IFC4', unit: 0.001, kinds: { terminal: 1 }, ports: 0 },
  // Four ports, one of them of the terminal's type.
  'imperial-ports/air-terminal-element.ifc': { schema: 'IFC4', unit: 0.0254, kinds: { other: 2 }, ports: 3, pairs: 1 },
  'imperial-ports/air-terminal-library-object.ifc': { schema: 'IFC4', unit: 0.0254, kinds: {}, ports: 0 },
  'utility-pipe-and-chamber/test_pipe_and_duct_bsp.ifc': {
    schema: 'IFC4',
    unit: 1,
    kinds: { chamber: 1, segment: 1 },
    ports: 0,
    length: 36,
  },
  'port-edge-cases/ports-without-owner.ifc': { schema: 'IFC4X3_ADD2', unit: 1, kinds: {}, ports: 2, pairs: 1 },
  'port-edge-cases/cable-three-ports.ifc': { schema: 'IFC4X3_ADD2', unit: 1, kinds: { other: 1 }, ports: 3, pairs: 0 },
};

const lengthOf = ({ centreLine }: Element): number =>
  centreLine === null
    ? 0
    : centreLine.points
        .slice(1)
        .reduce((sum, p, k) => sum + Math.hypot(...p.map((one, i) => one - centreLine.points[k]![i]!)), 0);

const counts = (all: readonly (string | number)[]): Record<string, number> => {
  const found: Record<string, number> = {};
  for (const one of all) found[one] = (found[one] ?? 0) + 1;
  return found;
};
const pipesOf = ({ elements }: Model): Element[] =>
  elements.filter(({ kind, centreLine }) => kind === 'segment' && centreLine !== null);

describe.skipIf(!hasOpenModels)(
  `the open models say what their index says (${Object.keys(expected).length} models)`,
  () => {
    for (const [name, want] of Object.entries(expected)) {
      test(name, () => {
        const model = modelOf(openModel(name));
        const [file] = model.files;
        expect(file!.schema).toBe(want.schema);
        expect(file!.lengthUnit.metres).toBeCloseTo(want.unit, 12);
        expect(model.findings).toEqual([]);
        expect(counts(model.elements.map(({ kind }) => kind))).toEqual(want.kinds);
        if (want.ports !== undefined) expect(model.ports.length).toBe(want.ports);
        if (want.pairs !== undefined)
          expect(model.ports.reduce((sum, { connected }) => sum + connected.length, 0) / 2).toBe(want.pairs);
        if (want.systems !== undefined) expect(model.systems.length).toBe(want.systems);
        if (want.spaces !== undefined) expect(model.spaces.length).toBe(want.spaces);
        if (want.storeys !== undefined) {
          expect(model.storeys.map(({ elevation }) => Math.round(elevation * 1000) / 1000)).toEqual(want.storeys);
        }
        const pipes = pipesOf(model);
        if (want.outside !== undefined) {
          const outside = pipes.flatMap(({ centreLine }) => centreLine!.outerDiameter ?? []);
          expect(counts(outside.map((one) => Number((one * 1000).toFixed(3))))).toEqual(want.outside);
        }
        if (want.length !== undefined)
          expect(pipes.reduce((sum, pipe) => sum + lengthOf(pipe), 0)).toBeCloseTo(want.length, 2);
        if (want.shortestMm !== undefined)
          expect(Math.min(...pipes.map(lengthOf)) * 1000).toBeCloseTo(want.shortestMm, 1);
      });
    }
  },
);

describe.skipIf(!hasOpenModels)('what the models are known to hold', () => {
  const named = (model: Model, name: string): Element => model.elements.find((element) => element.name === name)!;

  test('road drainage: slopes in per cent by geometry, inverts and rims as facts', () => {
    const model = modelOf(openModel('road-drainage-1/DrainageSystem-1-2.ifc'));
    const slope = (name: string): number => {
      const [a, b] = named(model, name).centreLine!.points;
      return (100 * Math.abs(a![2] - b![2])) / Math.hypot(a![0] - b![0], a![1] - b![1]);
    };
    const slopes = { 8: 0.342, 54: 0.451, 60: 0.242, 109: 5.211, 191: 48.9, 210: 13.14 };
    for (const [name, percent] of Object.entries(slopes))
      expect(slope(name)).toBeCloseTo(percent, percent < 10 ? 2 : 1);
    const values = (name: string, property: string) =>
      named(model, name).properties.find((one) => one.name === property)?.value;
    expect(values('56', 'InvertElevation')).toBeCloseTo(124.876, 3);
    expect(values('56', 'RimElevation')).toBeCloseTo(126.835, 3);
    expect(named(model, '8').sizes.map(({ means, mm, text }) => [means, mm ?? text])).toEqual([
      ['inner', 400],
      ['outer', 400],
      ['inner', 280],
      ['unknown', 'Ø400'],
    ]);
  });

  test("road drainage: ports stand at their pipes' ends, pairs at one place", () => {
    const { ports, elements } = modelOf(openModel('road-drainage-1/DrainageSystem-1-1.ifc'));
    for (const { at, connected, owner } of ports) {
      for (const other of connected)
        expect(Math.hypot(...at!.map((one, k) => one - ports[other]!.at![k]!))).toBeLessThan(1e-4);
      const line = elements[owner!]!.centreLine;
      if (line === null) continue;
      const off = Math.min(
        ...[line.points[0]!, line.points.at(-1)!].map((end) => Math.hypot(...at!.map((one, k) => one - end[k]!))),
      );
      expect(off).toBeLessThan(1e-4);
    }
  });

  test('heating: connected ports are at most 2 mm apart', () => {
    const { ports } = modelOf(openModel('heating-full-ports/hvac_heating.ifc.gz'));
    const gaps = ports.flatMap(({ at, connected }) =>
      connected.map((other) => Math.hypot(...at!.map((one, k) => one - ports[other]!.at![k]!))),
    );
    expect(gaps.length).toBe(456);
    expect(Math.max(...gaps)).toBeLessThan(0.0021);
    expect(gaps.filter((gap) => gap > 0.001).length).toBe(2 * 29);
  });

  test('imperial ports: 24 inches apart and joined all the same', () => {
    const { ports } = modelOf(openModel('imperial-ports/air-terminal-element.ifc'));
    const joined = ports.filter(({ connected }) => connected.length > 0);
    expect(joined.length).toBe(2);
    expect(Math.hypot(...joined[0]!.at!.map((one, k) => one - joined[1]!.at![k]!))).toBeCloseTo(0.6096, 6);
  });

  test('Dutch drainage: lengths in millimetres by their names, 1:200, outlets in the facts', () => {
    const model = modelOf(openModel('riolering-topology/RioleringTest.ifc'));
    expect(['A', 'B', 'C', 'D', 'E'].map((name) => named(model, name).statedLength)).toEqual([6, 5, 4, 3, 2]);
    expect(named(model, 'A').slopes).toEqual([{ slope: 0.005, from: 'Bas_Sectie_Eig.Afschot 1:?' }]);
    const outlet = (name: string) =>
      named(model, name).properties.find((one) => one.name === 'Basis_ontw_diam (mm)')?.value;
    expect(['X', 'Y', 'Z'].map(outlet)).toEqual([0.057, 0.044, 0.1]);
    expect(['X', 'Y', 'Z'].map((name) => named(model, name).typeDescription)).toEqual([
      'Wasautomaat',
      'Wastafel',
      'Watercloset',
    ]);
    const open = model.ports.filter(({ connected }) => connected.length === 0);
    expect(open.map(({ owner }) => model.elements[owner!]!.name)).toEqual(['A']);
  });

  test('vent pipe: 2 in by its side, 60.325 mm by its mesh, upright where it stands', () => {
    const [pipe] = modelOf(openModel('vent-pipe-dwv/SingleBackslash.ifc')).elements;
    expect(pipe!.sizes.map(({ mm, ground }) => [Number(mm!.toFixed(3)), ground])).toEqual([
      [50.8, 'property'],
      [60.325, 'measured'],
    ]);
    const ends = pipe!.centreLine!.points.map((point) => point.map((one) => Number((one * 1000).toFixed(2))));
    expect(ends).toEqual([
      [-1149.35, -6683.88, 3616.05],
      [-1149.35, -6683.88, 7246.6],
    ]);
    expect(pipe!.properties.map(({ name, value }) => [name, value])).toEqual([
      ['Service', 'Vent'],
      ['Source', 'Schedule 40 PVC DWV'],
    ]);
  });

  test('sewer of meshes: 600 outside, 500 inside, level at -1.75 m', () => {
    for (const pipe of pipesOf(modelOf(openModel('sewer-no-ports/Infra-Plumbing-ifc4x3.ifc')))) {
      expect(pipe.centreLine!.innerDiameter).toBeCloseTo(0.5, 4);
      for (const point of pipe.centreLine!.points) expect(point[2]).toBeCloseTo(-1.75, 5);
    }
  });

  test('polyline sewer: twelve legs, and the unit looks wrong', () => {
    const model = modelOf(openModel('sewer-polyline-sweep/MultiSegmentPipe.ifc'));
    expect(model.elements[0]!.centreLine!.points.length).toBe(13);
    expect(model.files[0]!.remarks.join()).toMatch(/the unit looks wrong/);
  });

  test('elbows: the bend ends where its ports are', () => {
    for (const name of ['elbow-ports-by-relation', 'elbow-ports-nested']) {
      const { elements, ports } = modelOf(openModel(`revit-pipe-fittings/${name}.ifc`));
      const { points } = elements[0]!.centreLine!;
      for (const { at } of ports) {
        const off = Math.min(
          ...[points[0]!, points.at(-1)!].map((end) => Math.hypot(...at!.map((one, k) => one - end[k]!))),
        );
        expect(off).toBeLessThan(1e-3);
      }
    }
  });

  test('ditches: an axis, no diameter', () => {
    for (const pipe of pipesOf(modelOf(openModel('road-drainage-2/DrainageSystem-2.ifc')))) {
      expect([pipe.centreLine!.ground, pipe.centreLine!.outerDiameter]).toEqual(['axis', null]);
    }
  });

  test('the utility pipe fits loosely, and says so', () => {
    const [, pipe] = modelOf(openModel('utility-pipe-and-chamber/test_pipe_and_duct_bsp.ifc')).elements;
    expect(pipe!.centreLine!.residual).toBeGreaterThan(0.01);
  });
});

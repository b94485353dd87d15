import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { expect, test } from 'vitest';
import { InputError } from '../../src/findings/input-error.ts';
import { distance, length } from '../../src/geometry/vector.ts';
import { elementIdOf, idOf, modelOf } from './model-of.ts';
import { sketch } from './sketch.ts';

const two = sketch(`
  model "Two lavatories"
  storey "Ground floor" at 0
  lavatory L1 at 0 0 0.5, trap 1 1/4 in
  lavatory L2 at 1 0 0.5, trap 1¼ in
  drain 1¼ in: L1 > T1 (north 0.3) > J1 (to -0.3)       # an arm, then a drop
  drain 1¼ in: L2 > T2 (north 0.3) > J2 (from J1 over T2 fall 1:50)
  drain Branch 2 in: J1 > J2 > OUT (east 2 fall 1:50)
  vent DN 40: T1 > (up 1) > VT (at 0 0.3 4)
  terminal VT
  sewer OUT
`);

test('moves, falls and places', () => {
  const at = (name: string) => two.nodes.get(name)?.at;
  expect(at('T1')).toEqual([0, 0.3, 0.5]);
  expect(at('J2')?.map((value) => Math.round(value * 1e6) / 1e6)).toEqual([1, 0.3, -0.32]);
  expect(at('OUT')?.[2]).toBeCloseTo(-0.36, 9);
  expect(at('T1+1')).toEqual([0, 0.3, 1.5]);
});

test('pipes are named by their nodes or numbered by their own name', () => {
  expect(two.pipes.map(({ name, size }) => `${name} ${size.label}`)).toEqual([
    'L1-T1 1¼ in',
    'T1-J1 1¼ in',
    'L2-T2 1¼ in',
    'T2-J2 1¼ in',
    'Branch.1 2 in',
    'Branch.2 2 in',
    'T1-T1+1 DN 40',
    'T1+1-VT DN 40',
  ]);
});

test('a model has the pipes, one fitting where pipes meet, and the parts', () => {
  const model = modelOf(two);
  expect(model.elements.map(({ name, typeName }) => `${name} ${typeName}`).slice(8)).toEqual([
    'T1 Junction',
    'J1 Bend',
    'T2 Bend',
    'J2 Junction',
    'T1+1 Coupling',
    'L1 Lavatory',
    'L2 Lavatory',
    'VT Vent terminal',
    'OUT Sewer connection',
  ]);
  const joint = model.elements[elementIdOf(two, 'J2')]!;
  expect(joint.globalId).toBe(idOf(two, 'J2'));
  expect(joint.globalId).toMatch(/^[0-3][0-9A-Za-z_$]{21}$/);
  expect(joint.ports).toHaveLength(3);
  for (const id of joint.ports) {
    const port = model.ports[id]!;
    expect(port.connected).toHaveLength(1);
    const other = model.ports[port.connected[0]!]!;
    expect(other.connected).toEqual([id]);
    expect(distance(port.at!, other.at!)).toBe(0);
    expect(model.elements[other.owner!]!.kind).toBe('segment');
  }
});

test('without ports and sizes the outside diameter is left, from ASTM D2665: 2 in is 60.3 mm', () => {
  const model = modelOf(two, { ports: false, sizes: false });
  expect(model.ports).toEqual([]);
  const branch = model.elements[elementIdOf(two, 'Branch.2')]!;
  expect(branch.ports).toEqual([]);
  expect(branch.sizes.map(({ means, mm }) => [means, mm?.toFixed(1)])).toEqual([
    ['outer', '60.3'],
    ['inner', '52.5'],
  ]);
  expect(branch.slopes[0]?.slope).toBeCloseTo(1 / 50, 9);
});

test('a solid that runs past a node takes the branch on its wall', () => {
  const stack = sketch(`
    drain Stack 4 in whole: TOP (at 0 0 6) > A (down 3) > FOOT (down 3)
    drain Side 2 in: S (at 2 0 3.04) > A
  `);
  const model = modelOf(stack);
  expect(model.elements.map(({ name }) => name)).toEqual(['Stack', 'Side']);
  expect(model.elements[0]?.centreLine?.points).toEqual([
    [0, 0, 6],
    [0, 0, 0],
  ]);
  const end = model.elements[1]!.centreLine!.points.at(-1)!;
  expect(length([end[0], end[1], end[2] - 3])).toBeCloseTo(0.1143 / 2, 6);
  expect(model.ports.filter(({ connected }) => connected.length > 0)).toHaveLength(2);
});

test('a block is placed as often as it is needed', () => {
  const block = sketch(`
    storey "1" at 0
    typical room
      space "Washroom" from -1 -1 to 3 3 height 2.5
      lavatory L at 0 0 0.5
      drain 1¼ in: L > J (north 0.3)
      drain 2 in: J > STACK
    end
    node STACK at 5 0.3 0.4
    place room as A at 0 0 0
    place room as B at 1 0 0
  `);
  expect(block.pipes.map(({ name }) => name)).toEqual(['A.L-A.J', 'A.J-STACK', 'B.L-B.J', 'B.J-STACK']);
  expect(block.nodes.get('B.J')?.at).toEqual([1, 0.3, 0.5]);
  expect(modelOf(block).elements.find(({ name }) => name === 'B.L')?.space).toBe(0);
});

test('the notation page shows a drawing that can be read', () => {
  const page = readFileSync(resolve(import.meta.dirname, '../../sample-models/NOTATION.md'), 'utf8');
  const blocks = [...page.matchAll(/```text\n([\s\S]*?)```/g)].map((match) => match[1]!);
  expect(blocks).toHaveLength(1);
  const drawn = sketch(blocks[0]!);
  expect(drawn.pipes.map(({ name }) => name)).toEqual(['L1-T1', 'T1-J1', 'J1-F1', 'F1-OUT', 'J1-TOP']);
  expect(
    modelOf(drawn)
      .elements.filter(({ kind }) => kind === 'fitting')
      .map(({ name }) => name),
  ).toEqual(['J1', 'F1', 'OUT']);
});

test('systems, materials, stated slopes and bare joints', () => {
  const drawn = sketch(`
    system drain "Soil and waste" wastewater
    material "cast iron"
    node A at 0 0 0 bare
    drain 3 in states 1:100: B (at 2 0 0.04) > A
    drain 3 in material "copper": A > C (from A west 2 fall 1:50)
    rain 4 in: R (at 0 5 3) > S (down 3)
  `);
  const model = modelOf(drawn);
  expect(model.systems.map(({ name, predefinedType }) => `${name} ${predefinedType}`)).toEqual([
    'Soil and waste WASTEWATER',
    'Rainwater RAINWATER',
  ]);
  const told = model.elements.map(
    ({ name, material, slopes }) => `${name} ${material} ${slopes.map(({ slope }) => slope.toFixed(3))}`,
  );
  expect(told).toEqual(['B-A cast iron 0.010', 'A-C copper 0.020', 'R-S cast iron ']);
  const [first, second] = model.elements;
  const partners = first!.ports.flatMap((port) =>
    model.ports[port]!.connected.map((other) => model.ports[other]!.owner),
  );
  expect(partners).toEqual([second!.id]);
});

test('what a fixture says of itself, as a reader would find it', () => {
  const drawn = sketch(`
    urinal U1 at 0 0 0.5, stall, trap 2 in, reading circuit-vent
    urinal U2 at 1 0 0.5, siphon
    closet W1 at 2 0 0, tank
    closet W2 at 3 0 0, valve
    shower S at 4 0 0, heads 3, trap DN 80
    floor-drain F1 at 5 0 0, emergency, trap 3 in
    floor-drain F2 at 6 0 0, untrapped
    lavatory L at 7 0 0.6, style "dental", named "Basin 12"
    thing X at 8 0 0.4, named "object-03"
    trap T at 9 0 0, 1 1/2 in
    admittance-valve V at 9 0 1
  `);
  const told = modelOf(drawn).elements.map(({ name, ifcClass, predefinedType, typeName, properties }) =>
    [name, ifcClass, predefinedType, typeName, ...properties.map((fact) => `${fact.name} ${fact.value}`)].join(' | '),
  );
  expect(told).toEqual([
    'U1 | IfcSanitaryTerminal | URINAL | Stall urinal | UrinalType STALL | TrapSize 0.0508 | Venting circuit-vent',
    'U2 | IfcSanitaryTerminal | URINAL | Wall urinal, siphon jet | UrinalType WALLHUNG',
    'W1 | IfcSanitaryTerminal | TOILETPAN | Water closet, flush tank | ToiletPanType WASHDOWN | ToiletType CLOSECOUPLED | FlushType Flush tank',
    'W2 | IfcSanitaryTerminal | TOILETPAN | Water closet, flush valve | ToiletPanType WASHDOWN | FlushType Flush valve',
    'S | IfcSanitaryTerminal | SHOWER | Shower, 3 heads | NumberOfHeads 3 | DrainSize 0.08',
    'F1 | IfcWasteTerminal | FLOORTRAP | Emergency floor drain | Emergency true | OutletConnectionSize 0.0762',
    'F2 | IfcWasteTerminal | FLOORWASTE | Floor drain',
    'L | IfcSanitaryTerminal | WASHHANDBASIN | Basin 12',
    'X | IfcSanitaryTerminal |  | object-03',
    'T | IfcWasteTerminal | WASTETRAP | P-trap | OutletConnectionSize 0.0381',
    'V | IfcValve | ANTIVACUUM | Air admittance valve',
  ]);
});

const faults: readonly (readonly [text: string, where: string, problem: RegExp])[] = [
  ['\ndrain 3 in: A > B', 'line 2', /where A lies/],
  ['drain 7 in: A (at 0 0 0) > B (east 1)', 'line 1', /7 in is not in the table/],
  ['node A at 0 0', 'line 1', /z is missing/],
  ['node A from B east 1\nnode B from A east 1', 'line 1', /placed from itself|placed from/],
  ['node A at 0 0 0\nnode A at 1 0 0', 'line 2', /placed before, on line 1/],
  ['urinal U at 0 0 0, purple', 'line 1', /"purple" is no detail/],
  ['gurgle X', 'line 1', /begins no line/],
  ['space "A" from 0 0 to 1 1 height 3', 'line 1', /storey line/],
  ['typical x\nnode A at 0 0 0', 'line 1', /without "end"/],
  ['place x as A at 0 0 0', 'line 1', /no block "x"/],
  ['model "open', 'line 1', /quote/],
  ['drain 3 in A > B', 'line 1', /":" expected/],
  ['drain 3 in: A (at 0 0 0)', 'line 1', /two nodes/],
  ['drain P 3 in: A (at 0 0 0) > B (east 1)\ndrain P 3 in: B > C (east 1)', 'line 2', /name P is taken/],
];

for (const [text, where, problem] of faults)
  test(`refused: ${text.replace(/\n/g, ' / ')}`, () => {
    let caught: unknown;
    try {
      sketch(text);
    } catch (error) {
      caught = error;
    }
    expect(caught).toBeInstanceOf(InputError);
    expect((caught as InputError).where).toBe(where);
    expect((caught as InputError).message).toMatch(problem);
  });

test('planted faults: what is missing, turned, doubled or without a size', () => {
  const model = modelOf(
    sketch(`
  node B at 2 0 0 missing
  drain 2 in: A (at 0 0 0) > B
  drain 2 in turned: B > C (east 2 fall 1:50)
  drain 2 in twice: C > D (east 2 fall 1:50)
  drain 2 in unsized: D > E (east 2 fall 1:50)
  drain 2 in name-sized: E > F (east 2 fall 1:50)
`),
  );
  const called = (name: string) => model.elements.find((element) => element.name === name);
  expect(called('B')).toBeUndefined();
  expect(called('A-B')!.centreLine!.points[1]![0]).toBeLessThan(2);
  expect(called('A-B')!.ports.flatMap((port) => model.ports[port]!.connected)).toEqual([]);
  expect(called('B-C')!.ports.map((port) => model.ports[port]!.direction)).toEqual(['source', 'sink']);
  expect(called('C-D double')).toMatchObject({ ports: [], centreLine: called('C-D')!.centreLine });
  expect(called('D-E')).toMatchObject({ sizes: [], centreLine: { outerDiameter: null }, box: null });
  expect(called('E-F')!.sizes.map(({ text, ground }) => `${text} ${ground}`)).toEqual(['2 in name']);
});

import { expect, test } from 'vitest';
import { propertySets } from '../../src/deliver/property-sets.ts';
import type { PropertySetToWrite } from '../../src/model/property-set.ts';
import type { Result, ResultPipe } from '../../src/schedule/result.ts';
import { exampleResult, size } from '../support/example-result.ts';

const millimetres = { file: 'community-hall.ifc', metresPerUnit: 0.001 };
const on = (sets: readonly PropertySetToWrite[], stepId: number | 'building'): Record<string, string | number> =>
  Object.fromEntries(
    (sets.find((set) => set.on === stepId)?.properties ?? []).map(({ name, value }) => [name, value.value]),
  );
const withPipe = (over: Partial<ResultPipe>): Result => ({
  ...exampleResult,
  pipes: exampleResult.pipes.map((pipe) => (pipe.stepId === 2101 ? { ...pipe, ...over } : pipe)),
});

test('a wet vent that is too small: names and values as the contract lists them', () => {
  const sets = propertySets(exampleResult, millimetres);
  expect(on(sets, 2101)).toEqual({
    Role: 'wet-vent',
    AlsoRole: 'branch',
    Portion: 'wet',
    Load: 2,
    LoadUnit: 'fixture units',
    VentLoad: 14,
    ModelledSize: '3 in',
    RequiredSize: '4 in',
    RequiredNominalDiameter: 100,
    Verdict: 'undersized',
    GoverningClause: 'Table 2.5.8.1.',
    Because: expect.stringContaining(
      '4 in, which holds 36, for 14 fixture units and 1 fixture left out (Table 2.5.8.1., row 4 in',
    ),
    Code: 'npc-2020',
    Edition: '2020',
  });
});

test('the dry vent has its developed length in the unit of the file', () => {
  expect(on(propertySets(exampleResult, millimetres), 2301).DevelopedLength).toBe(6400);
  expect(on(propertySets(exampleResult, { ...millimetres, metresPerUnit: 1 }), 2301).DevelopedLength).toBe(6.4);
  // 6.4 m / 0.3048 m = 20.99738 ft (definition of the international foot).
  const feet = on(propertySets(exampleResult, { ...millimetres, metresPerUnit: 0.3048 }), 2301).DevelopedLength;
  expect(feet).toBeCloseTo(20.99738, 5);
});

test('a fixture, with its trap and its arm', () => {
  expect(on(propertySets(exampleResult, millimetres), 3001)).toEqual({
    Kind: 'lavatory',
    Load: 1,
    LoadUnit: 'fixture units',
    TrapSize: '1 1/2 in',
    VentedBy: 'wet-vent',
    TrapArmLength: 900,
    TrapArmLimit: 1800,
  });
});

test('the building: what the sizes were made with, and the caution', () => {
  expect(on(propertySets(exampleResult, millimetres), 'building')).toEqual({
    Program: 'drainwright',
    Version: '0.1.0',
    Code: 'npc-2020',
    Edition: '2020',
    InputSha256: 'ab'.repeat(32),
    Errors: 8,
    Warnings: 1,
    Undersized: 8,
    Caution: exampleResult.caution,
  });
});

// Nominal diameters: a file in inches or feet gets the nominal inches, another the DN (Contract, "DN ... for ¾ to 15 in").
const diameters = [
  { label: '4 in', dn: 100, unit: 0.001, diameter: 100 },
  { label: '4 in', dn: 100, unit: 1, diameter: 0.1 },
  { label: '4 in', dn: 100, unit: 0.0254, diameter: 4 },
  { label: '1½ in', dn: 40, unit: 0.0254, diameter: 1.5 },
  { label: '¾ in', dn: 20, unit: 0.0254, diameter: 0.75 },
  { label: '3 in', dn: 80, unit: 0.3048, diameter: 0.25 },
  { label: '12 in', dn: 300, unit: 1200 / 3937, diameter: 0.999998 },
  { label: 'DN 100', dn: 100, unit: 0.0254, diameter: 3.93700787402 },
];
for (const { label, dn, unit, diameter } of diameters) {
  test(`${label} in a file whose unit is ${unit} m: ${diameter}`, () => {
    const result = withPipe({ required: { least: size(label, dn), most: size(label, dn) } });
    const sets = propertySets(result, { ...millimetres, metresPerUnit: unit });
    expect(on(sets, 2101).RequiredNominalDiameter).toBe(diameter);
  });
}

test('a range: the heaviest reading stands, the lightest beside it', () => {
  const result = withPipe({
    required: { least: size('2½ in', 65), most: size('3 in', 80) },
    load: { least: 4, most: 9 },
  });
  expect(on(propertySets(result, millimetres), 2101)).toMatchObject({
    Load: 9,
    RequiredSize: '3 in',
    RequiredSizeLeast: '2 1/2 in',
  });
});

test('nothing is written where nothing is known', () => {
  const result = withPipe({
    required: null,
    modelled: null,
    verdict: 'unknown',
    reason: 'no size is drawn',
    trail: [],
  });
  const written = on(propertySets(result, millimetres), 2101);
  expect(written).toMatchObject({ Verdict: 'unknown', Because: 'no size is drawn' });
  for (const name of ['ModelledSize', 'RequiredSize', 'RequiredNominalDiameter', 'GoverningClause'])
    expect(written).not.toHaveProperty(name);
});

test('of several files, one gets the sets of its own elements', () => {
  const elements = exampleResult.elements.map((element) =>
    element.use === 'fixture' ? { ...element, file: 'fixtures.ifc' } : element,
  );
  const two = { ...exampleResult.model, file: 'fixtures.ifc', sha256: 'cd'.repeat(32) };
  const result: Result = { ...exampleResult, elements, models: [exampleResult.model, two] };
  const names = (file: string): string[] => [
    ...new Set(propertySets(result, { file, metresPerUnit: 1 }).map(({ name }) => name)),
  ];
  expect(names('community-hall.ifc')).toEqual(['Drainwright_Pipe', 'Drainwright_Model']);
  expect(names('fixtures.ifc')).toEqual(['Drainwright_Fixture', 'Drainwright_Model']);
  expect(on(propertySets(result, { file: 'fixtures.ifc', metresPerUnit: 1 }), 'building').InputSha256).toBe(
    'cd'.repeat(32),
  );
});

test('every pipe and fixture of the file gets one set, none begins with Pset_', () => {
  const sets = propertySets(exampleResult, millimetres);
  const inFile = new Set(exampleResult.elements.map(({ globalId }) => globalId));
  const pipes = exampleResult.pipes.filter(({ globalId }) => inFile.has(globalId)).length;
  expect(sets.filter(({ name }) => name === 'Drainwright_Pipe')).toHaveLength(pipes);
  expect(sets.filter(({ name }) => name === 'Drainwright_Fixture')).toHaveLength(9);
  expect(sets.every(({ name }) => /^Drainwright_/.test(name))).toBe(true);
});

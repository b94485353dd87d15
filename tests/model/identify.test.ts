import { describe, expect, test } from 'vitest';
import { type Answers, noAnswers } from '../../src/model/answers.ts';
import { identify } from '../../src/model/identify.ts';
import type { Identity } from '../../src/model/identity.ts';
import type { PropertyFact } from '../../src/model/model.ts';
import { readNamesTable } from '../../src/model/read-names-table.ts';
import { type PlainElement, type PlainSystem, plainModel } from '../support/plain-model.ts';
import { ownTables } from '../support/table-files.ts';

const names = readNamesTable(ownTables);

function identified(element: PlainElement, systems: readonly PlainSystem[] = [], answers: Answers = noAnswers) {
  const model = plainModel([{ ...element, in: element.in ?? systems.map(({ name }) => name) }], systems);
  const { value, findings } = identify(model, answers, names);
  return { identity: value[0] as Identity, findings };
}

const sanitary = { ifcClass: 'IfcSanitaryTerminal', kind: 'terminal' } as const;
const waste = { ifcClass: 'IfcWasteTerminal', kind: 'terminal' } as const;
const flow = { ifcClass: 'IfcFlowTerminal', kind: 'terminal' } as const;
const pipe = { ifcClass: 'IfcPipeSegment', kind: 'segment' } as const;
const fitting = { ifcClass: 'IfcPipeFitting', kind: 'fitting' } as const;
const valve = { ifcClass: 'IfcValve', kind: 'valve' } as const;

const fact = (
  name: string,
  value: string | number | boolean,
  measure: PropertyFact['measure'] = 'text',
): PropertyFact => ({
  set: 'Pset',
  name,
  value,
  measure,
  from: 'own',
});

// The order of evidence is that of the reading rules of the names list: class, then names; the more exact kind wins.
const terminals: readonly {
  says: string;
  element: PlainElement;
  part: string;
  kind?: string | null;
  weak?: boolean;
}[] = [
  {
    says: 'a predefined type alone',
    element: { ...sanitary, predefinedType: 'WASHHANDBASIN' },
    part: 'fixture',
    kind: 'lavatory',
  },
  {
    says: 'a sink that its name makes a mop sink',
    element: { ...sanitary, predefinedType: 'SINK', name: 'Mop sink 3' },
    part: 'fixture',
    kind: 'mop-sink',
  },
  {
    says: 'a basin that is only called sink',
    element: { ...sanitary, predefinedType: 'WASHHANDBASIN', typeName: 'Sink Type C' },
    part: 'fixture',
    kind: 'lavatory',
  },
  {
    says: 'no predefined type, the type name decides',
    element: { ...sanitary, typeName: 'Urinal - Wall Hung' },
    part: 'fixture',
    kind: 'urinal',
  },
  {
    says: 'USERDEFINED, the object type decides',
    element: { ...sanitary, predefinedType: 'USERDEFINED', objectType: 'Laundry tub' },
    part: 'fixture',
    kind: 'laundry-tray',
  },
  {
    says: 'type description before occurrence name',
    element: {
      ...flow,
      typeClass: 'IfcSanitaryTerminalType',
      typeName: 'IFCLOZ01',
      typeDescription: 'Wasautomaat',
      name: 'X',
      predefinedType: 'USERDEFINED',
    },
    part: 'fixture',
    kind: 'clothes-washer',
  },
  {
    says: 'Dutch basin',
    element: {
      ...flow,
      typeClass: 'IfcSanitaryTerminalType',
      typeName: 'IFCLOZ02',
      typeDescription: 'Wastafel',
      name: 'Y',
      predefinedType: 'USERDEFINED',
    },
    part: 'fixture',
    kind: 'lavatory',
  },
  {
    says: 'Dutch closet',
    element: {
      ...flow,
      typeClass: 'IfcSanitaryTerminalType',
      typeName: 'IFCLOZ03',
      typeDescription: 'Watercloset',
      name: 'Z',
      predefinedType: 'USERDEFINED',
    },
    part: 'fixture',
    kind: 'water-closet',
  },
  {
    says: 'generic type name, exact description',
    element: { ...sanitary, typeName: 'Sink Type C', typeDescription: 'Lavatory - Oval:650 mmx485 mm' },
    part: 'fixture',
    kind: 'lavatory',
  },
  {
    says: 'a value the schema does not know is read as a word',
    element: { ...sanitary, predefinedType: 'WATERCLOSET' },
    part: 'fixture',
    kind: 'water-closet',
  },
  {
    says: 'WCSEAT on a whole closet',
    element: { ...sanitary, predefinedType: 'WCSEAT', name: 'M_Water Closet - Flush Valve' },
    part: 'fixture',
    kind: 'water-closet',
  },
  {
    says: 'WCSEAT on a seat',
    element: { ...sanitary, predefinedType: 'WCSEAT', name: 'WC seat, open front' },
    part: 'not-drainage',
  },
  {
    says: 'WCSEAT of which nothing more is said',
    element: { ...sanitary, predefinedType: 'WCSEAT' },
    part: 'not-drainage',
    weak: true,
  },
  { says: 'CISTERN', element: { ...sanitary, predefinedType: 'CISTERN' }, part: 'not-drainage' },
  {
    says: 'fountain that is an eyewash',
    element: { ...sanitary, predefinedType: 'SANITARYFOUNTAIN', name: 'Eyewash station' },
    part: 'fixture',
    kind: 'other-fixture',
  },
  {
    says: 'shower head typed as a shower',
    element: { ...sanitary, predefinedType: 'SHOWER', name: 'Shower head, rain' },
    part: 'not-drainage',
  },
  {
    says: 'grab bar on a sanitary class',
    element: { ...sanitary, name: 'M_Grab Bars:8370-001300' },
    part: 'not-drainage',
  },
  { says: 'mirror', element: { ...sanitary, name: 'M_Mirror:18288 x 12192' }, part: 'not-drainage' },
  { says: 'floor drain', element: { ...waste, predefinedType: 'FLOORWASTE' }, part: 'fixture', kind: 'floor-drain' },
  { says: 'waste trap', element: { ...waste, predefinedType: 'WASTETRAP' }, part: 'trap' },
  { says: 'roof drain', element: { ...waste, predefinedType: 'ROOFDRAIN' }, part: 'not-drainage' },
  { says: 'gully outside any system', element: { ...waste, predefinedType: 'GULLYTRAP' }, part: 'not-drainage' },
  {
    says: 'gully that is named a floor drain',
    element: { ...waste, predefinedType: 'GULLYTRAP', name: 'Floor gully 110' },
    part: 'fixture',
    kind: 'floor-drain',
  },
  { says: 'disposer under a sink', element: { ...waste, predefinedType: 'WASTEDISPOSALUNIT' }, part: 'fitting' },
  {
    says: 'commercial disposer',
    element: { ...waste, predefinedType: 'WASTEDISPOSALUNIT', name: 'Commercial food waste grinder' },
    part: 'fixture',
    kind: 'garbage-grinder',
  },
  {
    says: 'vent cowl',
    element: { ifcClass: 'IfcStackTerminal', kind: 'terminal', predefinedType: 'COWL' },
    part: 'vent-terminal',
    weak: true,
  },
  {
    says: 'stack terminal of which nothing is said',
    element: { ifcClass: 'IfcStackTerminal', kind: 'terminal' },
    part: 'vent-terminal',
    weak: true,
  },
  {
    says: 'rainwater hopper',
    element: { ifcClass: 'IfcStackTerminal', kind: 'terminal', predefinedType: 'RAINWATERHOPPER' },
    part: 'not-drainage',
  },
  {
    says: 'dishwasher among appliances',
    element: { ifcClass: 'IfcElectricAppliance', kind: 'terminal', predefinedType: 'DISHWASHER' },
    part: 'fixture',
    kind: 'dishwasher',
  },
  { says: 'cleanout', element: { ...flow, name: 'FCO-4"' }, part: 'cleanout' },
  { says: 'tag alone', element: { ...sanitary, tag: 'WHB-2' }, part: 'fixture', kind: 'lavatory', weak: true },
  {
    says: 'bare noun on a class that holds anything',
    element: { ...flow, name: 'Basin 4 north wing level two' },
    part: 'fixture',
    kind: 'lavatory',
  },
  {
    says: 'classification alone',
    element: { ...flow, name: 'F-12', classifications: ['OmniClass:23-45 05 21 11 11 Water Operated Water Closets'] },
    part: 'fixture',
    kind: 'water-closet',
  },
  {
    says: 'classification number of closets by MasterFormat',
    element: { ...flow, name: 'F-12', classifications: ['MasterFormat:22 43 13 Healthcare fixtures'] },
    part: 'fixture',
    kind: 'water-closet',
    weak: true,
  },
  { says: 'nothing', element: { ...flow, name: 'Family1' }, part: 'unknown-terminal', weak: true },
  {
    says: 'light fixture',
    element: { ifcClass: 'IfcFlowTerminal', typeClass: 'IfcLightFixtureType', kind: 'other', name: 'Wash light' },
    part: 'not-drainage',
  },
  {
    says: 'proxy with a clear name',
    element: { ifcClass: 'IfcBuildingElementProxy', kind: 'other', name: 'Toilet-Commercial-Wall-3D water closet' },
    part: 'fixture',
    kind: 'water-closet',
    weak: true,
  },
  {
    says: 'vanity in furniture',
    element: { ifcClass: 'IfcFurniture', kind: 'other', name: 'Lavatory vanity' },
    part: 'not-drainage',
  },
];

describe('what a terminal is', () => {
  test.each(terminals)('$says: $part $kind', ({ element, part, kind, weak }) => {
    const { identity } = identified(element);
    expect(identity.part).toBe(part);
    expect(identity.kind).toBe(kind ?? null);
    if (weak !== undefined) expect(identity.weak).toBe(weak);
    expect(identity.evidence).not.toBe('');
  });

  test('a sanitary terminal in a sanitary system of which nothing more is known is a fixture of unknown kind', () => {
    const { identity } = identified({ ...sanitary, name: 'Type A' }, [
      { name: 'Sanitary 1', predefinedType: 'SEWAGE' },
    ]);
    expect(identity).toMatchObject({ part: 'fixture', kind: null, medium: 'sanitary', weak: true });
  });

  test('the same with a port and no system', () => {
    expect(identified({ ...sanitary, name: 'Type A', portCount: 2 }).identity).toMatchObject({
      part: 'fixture',
      kind: null,
    });
  });

  test('without port and system it is only a terminal', () => {
    expect(identified({ ...sanitary, name: 'Type A' }).identity).toMatchObject({
      part: 'unknown-terminal',
      kind: null,
    });
  });

  test('a terminal of a heating system is left out', () => {
    const { identity } = identified({ ...flow, name: 'Type A' }, [{ name: 'VL', predefinedType: 'HEATING' }]);
    expect(identity).toMatchObject({ part: 'not-drainage', medium: 'other' });
  });

  test('a gully in a sanitary system is a floor drain, to be looked at', () => {
    const { identity } = identified({ ...waste, predefinedType: 'GULLYTRAP' }, [
      { name: 'Foul', predefinedType: 'SEWAGE' },
    ]);
    expect(identity).toMatchObject({ part: 'fixture', kind: 'floor-drain', weak: true });
  });
});

describe('contradictions', () => {
  test('class against name: the class holds, and the user hears of it', () => {
    const { identity, findings } = identified({
      ...sanitary,
      predefinedType: 'TOILETPAN',
      typeName: 'Urinal - Wall Hung',
    });
    expect(identity).toMatchObject({ kind: 'water-closet', weak: true });
    expect(findings).toEqual([
      {
        code: 'kind-contradicted',
        severity: 'warning',
        about: [0],
        facts: {
          taken: 'water-closet',
          takenFrom: 'PredefinedType TOILETPAN',
          other: 'urinal',
          otherFrom: 'type name "Urinal - Wall Hung"',
        },
      },
    ]);
  });

  test('a mirror typed as a basin has no port and is a mirror', () => {
    const { identity, findings } = identified({ ...sanitary, predefinedType: 'WASHHANDBASIN', name: 'Mirror 600' });
    expect(identity.part).toBe('not-drainage');
    expect(findings.map(({ code }) => code)).toEqual(['kind-contradicted']);
  });

  test('with a port it stays what its class says', () => {
    const { identity, findings } = identified({
      ...sanitary,
      predefinedType: 'WASHHANDBASIN',
      name: 'Mirror 600',
      portCount: 1,
    });
    expect(identity.kind).toBe('lavatory');
    expect(findings).toHaveLength(1);
  });

  test('two names that differ', () => {
    const { identity, findings } = identified({ ...sanitary, typeName: 'Bidet', name: 'Shower 4' });
    expect(identity.kind).toBe('bidet');
    expect(findings.map(({ facts }) => facts.other)).toEqual(['shower']);
  });

  test.each([
    ['a more exact name', { ...sanitary, predefinedType: 'SINK', name: 'Kitchen sink' }],
    ['a more general name', { ...sanitary, predefinedType: 'WASHHANDBASIN', name: 'Sink' }],
    [
      'the category of an accessory',
      { ...sanitary, name: 'Grab bar', properties: [fact('Assembly Description', 'Bath fixtures')] },
    ],
    [
      'a long description',
      {
        ...sanitary,
        name: 'Lavatory',
        description:
          'Stands beside the shower and drains with it to the stack, see the drawing of the whole washroom and its notes',
      },
    ],
  ])('%s is none', (_, element) => {
    expect(identified(element).findings).toEqual([]);
  });
});

describe('details of fixtures', () => {
  test('flush, litres and use from the type', () => {
    const element = {
      ...flow,
      typeClass: 'IfcSanitaryTerminalType',
      typeDescription: 'Water Closet - Flush Tank:Private - 6.1 Lpf',
    };
    expect(identified(element).identity.detail).toMatchObject({ flush: 'tank', flushLitres: 6.1, domestic: true });
  });

  test('flush unknown stays unknown', () => {
    expect(identified({ ...sanitary, predefinedType: 'TOILETPAN' }).identity.detail.flush).toBeNull();
  });

  test('a cistern within 0.8 m tells that the closet has a tank; farther away it tells nothing', () => {
    const closet = { ...sanitary, predefinedType: 'TOILETPAN', origin: [0, 0, 0] as const };
    const near = plainModel([closet, { ...sanitary, predefinedType: 'CISTERN', origin: [0, 0.3, 0.7] }]);
    const far = plainModel([closet, { ...sanitary, predefinedType: 'CISTERN', origin: [0, 0.8, 0.1] }]);
    const valved = plainModel([closet, { ...valve, predefinedType: 'FLUSHING', origin: [0, 0.1, 0.6] }]);
    const flushes = [near, far, valved].map((model) => identify(model, noAnswers, names).value[0]?.detail.flush);
    expect(flushes).toEqual(['tank', null, 'valve']);
  });

  // IFC property sets for sanitary terminals: enumerated values.
  test.each([
    ['UrinalType', 'STALL', 'urinal', 'stall'],
    ['UrinalType', 'TROUGH', 'urinal', 'trough'],
    ['Mounting', 'WALLHUNG', 'urinal', 'wall'],
    ['BathType', 'FOOT', 'bathtub', 'foot'],
  ])('%s %s gives a %s the style %s', (name, value, kind, style) => {
    const typed = { urinal: 'URINAL', bathtub: 'BATH' }[kind] ?? null;
    const { identity } = identified({ ...sanitary, predefinedType: typed, properties: [fact(name, value)] });
    expect(identity.detail.style).toBe(style);
  });

  test.each([
    ['SinkType', 'CLEANERS', 'SINK', 'mop-sink'],
    ['ToiletType', 'SLOPHOPPER', 'TOILETPAN', 'clinical-sink'],
    ['WashHandBasinType', 'WASHFOUNTAIN', 'WASHHANDBASIN', 'wash-fountain'],
    ['WashHandBasinType', 'VANITY', 'WASHHANDBASIN', 'lavatory'],
  ])('%s %s on %s makes it a %s', (name, value, predefinedType, kind) => {
    const { identity, findings } = identified({ ...sanitary, predefinedType, properties: [fact(name, value)] });
    expect(identity.kind).toBe(kind);
    expect(findings).toEqual([]);
  });

  test('one shower has one head, a gang shower of unknown number none that is known', () => {
    expect(identified({ ...sanitary, predefinedType: 'SHOWER' }).identity.detail.heads).toBe(1);
    expect(identified({ ...sanitary, typeName: 'Column shower, 5 heads' }).identity.detail.heads).toBe(5);
    expect(identified({ ...sanitary, typeName: 'Gang shower' }).identity.detail.heads).toBeNull();
  });

  test('a floor drain is an emergency drain only where something says so', () => {
    expect(identified({ ...waste, predefinedType: 'FLOORWASTE' }).identity.detail.emergency).toBe(false);
    expect(identified({ ...waste, typeName: 'Emergency floor drain' }).identity.detail.emergency).toBe(true);
  });

  test('a wash trough is a lavatory for several', () => {
    expect(identified({ ...sanitary, name: 'Wash trough' }).identity).toMatchObject({
      kind: 'lavatory',
      detail: { style: 'multiple' },
    });
  });
});

describe('outlet sizes', () => {
  test.each([
    ['DrainSize in metres', fact('DrainSize', 0.04, 'length'), 40],
    ['Drain Size, number in millimetres', fact('Drain Size', 50, 'number'), 50],
    ['Drain Size, number in inches', fact('Drain Size', 1.5, 'number'), 38.1],
    ['Trap Size as the trade writes it', fact('Trap Size', '1 1/2"'), 38.1],
    ['a half sign', fact('Waste Diameter', '1½ in'), 38.1],
    ['DN', fact('Ablauf DN', 'DN 70'), 70],
    ['unit in the name', fact('Basis_ontw_diam (mm)', 57, 'number'), 57],
    ['the same as a length', fact('Basis_ontw_diam (mm)', 0.057, 'length'), 57],
    ['zero stands for unknown', fact('DrainSize', 0, 'length'), null],
    ['three metres is no outlet', fact('DrainSize', 3, 'length'), null],
    ['prose', fact('Trap Size', 'see schedule'), null],
    ['another diameter', fact('Vent Diameter', 40, 'number'), null],
  ])('%s', (_, property, mm) => {
    expect(identified({ ...sanitary, predefinedType: 'SINK', properties: [property] }).identity.outletMm).toBe(mm);
  });

  test('the trap comes before the outlet', () => {
    const properties = [fact('Outlet Diameter', 50, 'number'), fact('Trap Size', 40, 'number')];
    expect(identified({ ...sanitary, predefinedType: 'SINK', properties }).identity.outletMm).toBe(40);
  });
});

describe('medium', () => {
  const systems: readonly {
    says: string;
    systems: readonly PlainSystem[];
    element?: Partial<PlainElement>;
    medium: string | null;
  }[] = [
    { says: 'SEWAGE', systems: [{ name: 'A', predefinedType: 'SEWAGE' }], medium: 'sanitary' },
    { says: 'VENT', systems: [{ name: 'A', predefinedType: 'VENT' }], medium: 'vent' },
    { says: 'STORMWATER', systems: [{ name: 'A', predefinedType: 'STORMWATER' }], medium: 'storm' },
    { says: 'DOMESTICHOTWATER', systems: [{ name: 'A', predefinedType: 'DOMESTICHOTWATER' }], medium: 'supply' },
    { says: 'HEATING', systems: [{ name: 'A', predefinedType: 'HEATING' }], medium: 'other' },
    {
      says: 'DRAINAGE alone is sanitary, weakly',
      systems: [{ name: 'A', predefinedType: 'DRAINAGE' }],
      medium: 'sanitary',
    },
    {
      says: 'DRAINAGE of rain by its name',
      systems: [{ name: 'Storm drain 2', predefinedType: 'DRAINAGE' }],
      medium: 'storm',
    },
    {
      says: 'one system type for drains and vents, told apart by name',
      systems: [{ name: 'Sanitary vent', predefinedType: 'SEWAGE' }],
      medium: 'vent',
    },
    {
      says: 'a drain vent filed under VENTILATION',
      systems: [{ name: 'Soil vent', predefinedType: 'VENTILATION' }],
      medium: 'vent',
    },
    { says: 'an air system', systems: [{ name: 'Kitchen exhaust', predefinedType: 'VENTILATION' }], medium: 'other' },
    { says: 'IFC2X3: name only', systems: [{ name: 'Eaux vannes' }], medium: 'sanitary' },
    { says: 'false friend: sanitaria of water supply', systems: [{ name: 'Acqua calda sanitaria' }], medium: 'supply' },
    {
      says: 'a drain that is also filed as vent carries water',
      systems: [
        { name: 'V', predefinedType: 'VENT' },
        { name: 'S', predefinedType: 'WASTEWATER' },
      ],
      medium: 'sanitary',
    },
    { says: 'no system, own name', systems: [], element: { name: 'Fallleitung DN 100' }, medium: 'sanitary' },
    {
      says: 'no system, Service property',
      systems: [],
      element: { typeName: 'Schedule 40 PVC DWV', properties: [fact('Service', 'Vent')] },
      medium: 'vent',
    },
    {
      says: 'system before own name',
      systems: [{ name: 'A', predefinedType: 'WASTEWATER' }],
      element: { name: 'Vent pipe' },
      medium: 'sanitary',
    },
    {
      says: 'ditch in a drainage system',
      systems: [{ name: 'Drainage-2', predefinedType: 'DRAINAGE' }],
      element: { objectType: 'DITCH' },
      medium: 'storm',
    },
    {
      says: 'culvert type in a sewage system',
      systems: [{ name: 'road wastewater system', predefinedType: 'SEWAGE' }],
      element: { predefinedType: 'CULVERT' },
      medium: 'sanitary',
    },
    {
      says: 'culvert type in a drainage system',
      systems: [{ name: 'A', predefinedType: 'DRAINAGE' }],
      element: { predefinedType: 'CULVERT' },
      medium: 'storm',
    },
    { says: 'culvert type alone', systems: [], element: { predefinedType: 'CULVERT' }, medium: null },
    { says: 'gutter', systems: [], element: { predefinedType: 'GUTTER' }, medium: 'storm' },
    { says: 'nothing', systems: [{ name: '?' }], element: { typeName: 'Rohr DN80' }, medium: null },
  ];
  test.each(systems)('$says: $medium', ({ systems: all, element, medium }) => {
    expect(identified({ ...pipe, ...element }, all).identity.medium).toBe(medium);
  });

  test('a lavatory in a cold water system still drains', () => {
    const cold = [{ name: 'DCW', predefinedType: 'DOMESTICCOLDWATER' }];
    expect(identified({ ...sanitary, predefinedType: 'WASHHANDBASIN' }, cold).identity.medium).toBe('sanitary');
  });

  test('a floor drain of a rainwater system is rain', () => {
    const rain = [{ name: 'RW', predefinedType: 'RAINWATER' }];
    expect(identified({ ...waste, predefinedType: 'FLOORWASTE' }, rain).identity.medium).toBe('storm');
  });
});

describe('piping', () => {
  const sewage = [{ name: 'Sanitary', predefinedType: 'SEWAGE' }];
  const heating = [{ name: 'VL', predefinedType: 'HEATING' }];
  const cases: readonly { says: string; element: PlainElement; systems?: readonly PlainSystem[]; part: string }[] = [
    { says: 'a pipe to a closet is a pipe', element: { ...pipe, name: 'WC connection' }, part: 'pipe' },
    {
      says: 'a closet bend is a fitting',
      element: { ...fitting, name: 'Closet bend', predefinedType: 'BEND' },
      part: 'fitting',
    },
    {
      says: 'a cap is no cleanout',
      element: { ...fitting, name: 'Cap DN100', predefinedType: 'OBSTRUCTION' },
      part: 'fitting',
    },
    {
      says: 'a cap called cleanout is one',
      element: { ...fitting, name: 'Cleanout 4"', predefinedType: 'OBSTRUCTION' },
      part: 'cleanout',
    },
    {
      says: 'a P-trap drawn as a fitting',
      element: { ...fitting, typeName: 'M_Trap - P - PVC - Sch 40 - DWV' },
      part: 'trap',
    },
    {
      says: 'the way to the sewer',
      element: { ...fitting, typeName: 'Sewer connection', predefinedType: 'EXIT' },
      part: 'sewer-connection',
    },
    { says: 'a floor drain filed as a fitting', element: { ...fitting, typeName: 'Floor drain 3"' }, part: 'fixture' },
    {
      says: 'an air admittance valve',
      element: { ...valve, typeName: 'Air admittance valve' },
      part: 'air-admittance-valve',
    },
    { says: 'AAV on a vent', element: { ...valve, name: 'AAV-1' }, systems: sewage, part: 'air-admittance-valve' },
    {
      says: 'AAV on heating is an automatic air vent',
      element: { ...valve, name: 'AAV-1' },
      systems: heating,
      part: 'valve',
    },
    {
      says: 'ANTIVACUUM in a drain',
      element: { ...valve, predefinedType: 'ANTIVACUUM' },
      systems: sewage,
      part: 'air-admittance-valve',
    },
    {
      says: 'ANTIVACUUM of which nothing is known',
      element: { ...valve, predefinedType: 'ANTIVACUUM' },
      part: 'valve',
    },
    { says: 'backwater valve', element: { ...valve, name: 'Backwater valve' }, systems: sewage, part: 'valve' },
    { says: 'a tap', element: { ...valve, predefinedType: 'FAUCET' }, part: 'not-drainage' },
    { says: 'Absperrventil', element: { ...valve, typeName: 'Absperrventil' }, part: 'not-drainage' },
    {
      says: 'manhole',
      element: { ifcClass: 'IfcDistributionChamberElement', kind: 'chamber', predefinedType: 'MANHOLE' },
      part: 'chamber',
    },
    {
      says: 'trench',
      element: { ifcClass: 'IfcDistributionChamberElement', kind: 'chamber', predefinedType: 'TRENCH' },
      part: 'not-drainage',
    },
    {
      says: 'meter chamber',
      element: { ifcClass: 'IfcDistributionChamberElement', kind: 'chamber', predefinedType: 'METERCHAMBER' },
      part: 'not-drainage',
    },
    {
      says: 'sump',
      element: { ifcClass: 'IfcDistributionChamberElement', kind: 'chamber', predefinedType: 'SUMP' },
      systems: sewage,
      part: 'tank',
    },
    {
      says: 'grease interceptor',
      element: { ifcClass: 'IfcInterceptor', kind: 'treatment', predefinedType: 'GREASE' },
      part: 'tank',
    },
    {
      says: 'pump of a sewage system',
      element: { ifcClass: 'IfcPump', kind: 'treatment', name: 'Pump P-1' },
      systems: sewage,
      part: 'tank',
    },
    {
      says: 'heating pump',
      element: { ifcClass: 'IfcPump', kind: 'treatment', name: 'Pump P-1' },
      systems: heating,
      part: 'not-drainage',
    },
    { says: 'duct', element: { ifcClass: 'IfcDuctSegment', kind: 'other' }, part: 'not-drainage' },
  ];
  test.each(cases)('$says: $part', ({ element, systems, part }) => {
    expect(identified(element, systems ?? []).identity.part).toBe(part);
  });

  test('a pipe that is named the building sewer says so', () => {
    expect(identified({ ...pipe, name: 'Sewer lateral 6"' }).identity.detail.style).toBe('building-sewer');
  });

  test.each([
    ['its name', { ...pipe, name: 'Wet vent 2' }, [], 'wet-vent'],
    ['its system', pipe, [{ name: 'Circuit vent CV-1', predefinedType: 'VENT' }], 'circuit-vent'],
    ['a property', { ...pipe, properties: [fact('Venting', 'individual vent')] }, [], 'individual-vent'],
    ['a flag', { ...pipe, properties: [fact('Wet Vent', true, 'flag')] }, [], 'wet-vent'],
    ['nothing', { ...pipe, name: 'Vent 4' }, [], null],
  ])('the venting by %s', (_, element, systems, reading) => {
    expect(identified(element, systems).identity.reading).toBe(reading);
  });
});

describe('answers', () => {
  const answered = (element: PlainElement, answers: Partial<Answers>) =>
    identified(element, [], { ...noAnswers, ...answers });

  test('a kind by GlobalId, with its detail', () => {
    const fixtures = new Map([['e0', { kind: 'water-closet', detail: { flush: 'valve' } }]]);
    expect(answered({ ...flow, name: 'Thing' }, { fixtures }).identity).toMatchObject({
      part: 'fixture',
      kind: 'water-closet',
      detail: { flush: 'valve' },
      evidence: 'answers file',
      weak: false,
    });
  });

  test('one of two elements that share a GlobalId', () => {
    const fixtures = new Map([['twice#0.101', { kind: 'bidet' }]]);
    const model = plainModel([1, 2].map(() => ({ ...sanitary, predefinedType: 'SINK', globalId: 'twice' })));
    const kinds = identify(model, { ...noAnswers, fixtures }, names).value.map(({ kind }) => kind);
    expect(kinds).toEqual(['sink', 'bidet']);
  });

  test('an answer silences the contradiction it settles', () => {
    const element = { ...sanitary, predefinedType: 'TOILETPAN', name: 'Urinal' };
    const fixtures = new Map([['e0', { kind: 'urinal' }]]);
    expect(answered(element, { fixtures })).toMatchObject({ identity: { kind: 'urinal' }, findings: [] });
  });

  test('GlobalId before name, the longer pattern before the shorter', () => {
    const element = { ...flow, name: 'Basin 12' };
    const patterns = new Map([
      ['name:*', { kind: 'sink' }],
      ['name:Basin*', { kind: 'mop-sink' }],
    ]);
    expect(answered(element, { fixtures: patterns }).identity.kind).toBe('mop-sink');
    const exact = new Map([...patterns, ['e0', { kind: 'lavatory' }]]);
    expect(answered(element, { fixtures: exact }).identity.kind).toBe('lavatory');
  });

  test('a detail alone keeps the kind that was read', () => {
    const fixtures = new Map([['name:WC*', { detail: { flush: 'tank', flushLitres: 4.8 } }]]);
    expect(answered({ ...sanitary, predefinedType: 'TOILETPAN', name: 'WC 3' }, { fixtures }).identity).toMatchObject({
      kind: 'water-closet',
      detail: { flush: 'tank', flushLitres: 4.8 },
      evidence: 'PredefinedType TOILETPAN, name "WC 3", answers file',
    });
  });

  test('a pattern for everything makes no fixtures of pipes and fittings', () => {
    const fixtures = new Map([['name:*', { detail: { domestic: true } }]]);
    expect(answered({ ...pipe, name: 'P1' }, { fixtures }).identity.part).toBe('pipe');
    expect(answered({ ...fitting, name: 'F1' }, { fixtures }).identity.part).toBe('fitting');
  });

  test('cleanouts', () => {
    expect(answered({ ...fitting, name: 'Cap 7' }, { cleanouts: ['name:Cap*'] }).identity.part).toBe('cleanout');
  });
});

test('one identity an element, in their order', () => {
  const model = plainModel([{ ...sanitary, predefinedType: 'BATH' }, pipe, { ...waste, predefinedType: 'FLOORTRAP' }]);
  expect(identify(model, noAnswers, names).value.map(({ part }) => part)).toEqual(['fixture', 'pipe', 'fixture']);
});

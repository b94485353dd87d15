import type {
  Result,
  ResultElement,
  ResultFinding,
  ResultFixture,
  ResultPipe,
  SizeLabel,
  TrailStep,
} from '../../src/schedule/result.ts';

/**
 * The washroom of a community hall, drawn wet vented with 3 in pipe: seven stall urinals (2 fixture units each) and two
 * lavatories (1 each) on one line. The most downstream urinal does not count, 14 remain, 3 in holds 12 and 4 in holds 36.
 * Source of the figures: NPC 2020, Table 2.5.8.1. and Sentence 2.5.8.1.(1), as codes/npc/RULES.md section 2 gives them.
 * Written by hand, not by a run: a Result to try the texts, the schema and the property sets on.
 */
export const size = (label: string, dn: number): SizeLabel => ({ label, dn });
const in112 = size('1½ in', 40);
const in2 = size('2 in', 50);
const in3 = size('3 in', 80);
const in4 = size('4 in', 100);

const id = (number: number): string => `1Dr4inExample00000${String(number).padStart(4, '0')}`;
const line = [2101, 2102, 2103, 2104, 2105, 2106, 2107, 2108];
const armOf = (place: number): number => 2001 + place;
const fixtureIds = Array.from({ length: 9 }, (_, place) => 3001 + place);

const step = (over: Partial<TrailStep>): TrailStep => ({
  rule: 'NPC-R50',
  title: 'Wet vent size',
  clause: 'Table 2.5.8.1.',
  table: 'wet-vent',
  row: '4 in',
  facts: { loadUnits: 14, limitUnits: 36, leftOut: 1 },
  asks: in4,
  governs: true,
  trust: 'memory',
  ...(over.rule === undefined ? { smaller: { size: in3, limit: 12 } } : {}),
  ...over,
});

const fixture = (place: number): ResultFixture => {
  const urinal = place >= 2;
  return {
    globalId: id(3001 + place),
    stepId: 3001 + place,
    name: urinal ? `Urinal ${place - 1}` : `Lavatory ${place + 1}`,
    kind: urinal ? 'urinal' : 'lavatory',
    detail: { flush: null, style: urinal ? 'stall' : null, heads: null, emergency: null, domestic: null },
    row: urinal ? 'Urinal, stall' : 'Lavatory',
    evidence: urinal ? 'PredefinedType URINAL' : 'PredefinedType WASHHANDBASIN',
    load: urinal ? { least: 2, most: 2 } : { least: 1, most: 1 },
    trapSize: urinal ? in2 : in112,
    storey: 'Ground floor',
    waterPath: [id(armOf(place)), ...line.slice(Math.max(0, place - 1)).map(id), id(2201)],
    airPath: [
      ...line
        .slice(0, Math.max(0, place - 1))
        .toReversed()
        .map(id),
      id(2301),
    ],
    ventedBy: { how: 'wet-vent', vents: [id(2301)] },
    trap: { at: [place * 0.8, 0.4, 0.3], how: 'at the foot of the drop' },
    trapArm: { length: 0.9, fall: 0.018, slope: 0.02, turn: 90, limit: urinal ? 2.4 : 1.8 },
  };
};

const pipe = (stepId: number, over: Partial<ResultPipe>): ResultPipe => ({
  globalId: id(stepId),
  stepId,
  name: `Pipe ${stepId}`,
  role: 'branch',
  also: [],
  storey: 'Ground floor',
  orientation: 'horizontal',
  slope: { value: 0.02, ground: 'geometry' },
  length: 0.8,
  next: null,
  load: { least: 16, most: 16 },
  servesWater: fixtureIds.map(id),
  servesAir: [],
  system: 'Sanitary 1',
  modelled: { ...in3, from: 'Pset_PipeSegmentTypeCommon.NominalDiameter (type)' },
  required: { least: in4, most: in4 },
  provisional: false,
  verdict: 'undersized',
  trail: [step({})],
  ...over,
});

const drain = (place: number): ResultPipe => {
  const { globalId, load, trapSize } = fixture(place);
  return pipe(armOf(place), {
    role: 'fixture-drain',
    length: 0.9,
    next: id(line[Math.max(0, place - 1)] ?? 2201),
    load,
    servesWater: [globalId],
    modelled: { ...(trapSize ?? in2), from: 'Pset_PipeSegmentTypeCommon.NominalDiameter (type)' },
    required: { least: trapSize, most: trapSize },
    verdict: 'agrees',
    trail: [
      step({
        rule: 'NPC-R14',
        title: 'Fixture outlet pipe size',
        clause: 'Table 2.4.9.3.',
        table: 'fixtures',
        row: null,
        facts: {},
        asks: trapSize,
      }),
    ],
  });
};

const wet = (place: number): ResultPipe =>
  pipe(line[place] ?? 0, {
    role: 'wet-vent',
    also: ['branch'],
    portion: 'wet',
    next: id(line[place + 1] ?? 2201),
    load: { least: 2 + 2 * place, most: 2 + 2 * place },
    ventLoad: { least: 14, most: 14 },
    servesWater: fixtureIds.slice(0, place + 2).map(id),
    servesAir: fixtureIds.slice(place + 2).map(id),
    battery: 'battery-1',
    trail: [
      step({
        rule: 'NPC-R16',
        title: 'Branch size',
        clause: 'Table 2.4.10.6.-B',
        table: 'branch',
        row: '2 in',
        asks: in2,
        governs: false,
        facts: { loadUnits: 2 + 2 * place, limitUnits: 6 },
      }),
      step({}),
    ],
  });

const undersized = (about: number, cause: string, facts: ResultFinding['facts']): ResultFinding => ({
  code: 'undersized',
  severity: 'error',
  about: [id(about)],
  facts: { cause, modelled: '3 in', required: '4 in', ...facts },
  clause: 'Table 2.5.8.1.',
  sentence: `Pipe ${about} is 3 in; the code asks for 4 in.`,
});

const element = (stepId: number, ifcClass: string, use: ResultElement['use'], reason?: string): ResultElement => ({
  globalId: id(stepId),
  stepId,
  file: 'community-hall.ifc',
  class: ifcClass,
  use,
  ...(reason === undefined ? {} : { reason }),
});

export const exampleResult: Result = {
  format: 'drainwright-result',
  version: 1,
  program: { name: 'drainwright', version: '0.1.0' },
  model: { file: 'community-hall.ifc', sha256: 'ab'.repeat(32), schema: 'IFC4', lengthUnit: 'millimetre' },
  code: { id: 'npc-2020', title: 'National Plumbing Code of Canada', edition: '2020', unit: 'fixture units' },
  settings: {},
  counts: {
    elements: 42,
    pipes: 19,
    fittings: 8,
    fixtures: 9,
    terminals: 1,
    leftOut: { rainwater: 4, supply: 1 },
    unresolved: 0,
  },
  elements: [
    ...[...fixtureIds.map((_, place) => armOf(place)), ...line, 2201, 2301].map((stepId) =>
      element(stepId, 'IfcPipeSegment', 'pipe'),
    ),
    ...fixtureIds.map((stepId) => element(stepId, 'IfcSanitaryTerminal', 'fixture')),
    ...Array.from({ length: 8 }, (_, place) => element(4001 + place, 'IfcPipeFitting', 'fitting')),
    element(4101, 'IfcStackTerminal', 'terminal'),
    ...[5001, 5002, 5003, 5004].map((stepId) => element(stepId, 'IfcPipeSegment', 'left-out', 'rainwater')),
    element(5005, 'IfcPipeSegment', 'left-out', 'supply'),
  ],
  fixtures: fixtureIds.map((_, place) => fixture(place)),
  pipes: [
    ...fixtureIds.map((_, place) => drain(place)),
    ...line.slice(0, 7).map((_, place) => wet(place)),
    pipe(2108, {
      next: id(2201),
      trail: [
        step({
          rule: 'NPC-R20',
          title: 'No reduction downstream',
          clause: '2.4.9.1.',
          table: null,
          row: null,
          facts: { upstream: id(2107) },
        }),
      ],
    }),
    pipe(2201, {
      role: 'building-drain',
      modelled: { ...in4, from: 'Pset_PipeSegmentTypeCommon.NominalDiameter (type)' },
      verdict: 'agrees',
    }),
    pipe(2301, {
      role: 'continuous-vent',
      orientation: 'vertical',
      slope: null,
      load: { least: 0, most: 0 },
      ventLoad: { least: 16, most: 16 },
      developedLength: 6.4,
      servesWater: [],
      servesAir: fixtureIds.map(id),
      modelled: { ...in2, from: 'Pset_PipeSegmentTypeCommon.NominalDiameter (type)' },
      required: { least: in2, most: in2 },
      verdict: 'agrees',
      trail: [
        step({
          rule: 'NPC-R75',
          title: 'Vent by length',
          clause: 'Table 2.5.8.3.',
          table: 'vent-length',
          row: '2 in',
          asks: in2,
          facts: { loadUnits: 16, limitUnits: 20, lengthM: 6.4, limitM: 36 },
        }),
      ],
    }),
  ],
  batteries: [
    {
      id: 'battery-1',
      fixtures: fixtureIds.map(id),
      pipes: line.slice(0, 7).map(id),
      reading: 'wet-vent',
      why: 'no dry relief vent is drawn, and every condition of a wet vent holds',
      broken: [],
      others: [
        {
          reading: 'circuit-vent',
          holds: false,
          broken: [
            { rule: 'NPC-R55', title: 'Relief vent of a circuit vent', clause: '2.5.3.1.', facts: { fixtures: 9 } },
          ],
        },
        {
          reading: 'individual-vent',
          holds: false,
          broken: [{ rule: 'NPC-R36', title: 'A vent for each trap', clause: '2.5.1.1.', facts: { vents: 1 } }],
        },
      ],
    },
  ],
  joints: { ports: 24, geometry: 2, inferred: [{ about: [id(2107), id(4001)], how: 'end-in-fitting', gap: 0.003 }] },
  systems: [
    {
      sewerEnd: { at: [12, 0.4, -0.6], pipe: id(2201), how: 'lowest' },
      pipes: 19,
      fixtures: 9,
      load: { least: 16, most: 16 },
    },
  ],
  findings: [
    ...line.slice(0, 7).map((stepId) => undersized(stepId, 'NPC-R50 battery 1', { loadUnits: 14, limitUnits: 12 })),
    undersized(2108, 'NPC-R50 battery 1', {}),
    {
      code: 'cleanout-missing',
      severity: 'warning',
      about: [id(2201)],
      facts: {},
      clause: '2.4.7.1.',
      sentence: 'Building drain Pipe 2201 shows no cleanout.',
    },
    {
      code: 'sewer-end-assumed',
      severity: 'note',
      about: [id(2201)],
      facts: {},
      clause: null,
      sentence: 'The way to the sewer was taken to be the lowest open end, at Pipe 2201.',
    },
  ],
  unresolved: [],
  caution:
    'An undersized drain or vent lets sewer gas into the building. Sizes here are a calculation aid: local code, the authority having jurisdiction and a licensed person decide.',
};

import type { Box, Vec3 } from '../../src/geometry/vector.ts';
import type { ResultFinding, TrailStep } from '../../src/schedule/result.ts';
import { type BuildingSpec, type FixtureSpec, type RunSpec, sized } from './example-page.ts';

/**
 * The washroom of a community hall for the page's own tests: a wet vented row of two lavatories and seven stall urinals
 * in 3 in pipe, a bathroom above, one stack, a floor drain nobody vented. Figures as in example-result.ts.
 */
const box = (min: Vec3, max: Vec3): Box => ({ min, max });
const places = Array.from({ length: 9 }, (_, place) => place);
const x = (place: number): number => 1.2 + 0.8 * place;
const lineZ = (place: number): number => 0.45 - 0.016 * place;
const lineName = (place: number): string => `Line ${place + 1}`;

const wetTrail = (load: number): readonly TrailStep[] => [
  {
    rule: 'wet-vent-load',
    title: 'wet vent load',
    clause: '2.5.8.1.',
    table: '2.5.8.1.',
    row: '4 in',
    facts: { loadUnits: 14, limitUnits: 36, leftOut: 1 },
    asks: sized('4 in'),
    governs: true,
    trust: 'memory',
  },
  {
    rule: 'branch-load',
    title: 'branch load',
    clause: '2.4.10.6.',
    table: '2.4.10.6.-B',
    row: load > 12 ? '3 in' : load > 6 ? '2½ in' : '2 in',
    facts: { loadUnits: load, limitUnits: load > 12 ? 27 : load > 6 ? 12 : 6 },
    asks: load > 12 ? sized('3 in') : load > 6 ? { label: '2½ in', dn: 65 } : sized('2 in'),
    governs: false,
    trust: 'memory',
  },
];

const loadTo = (place: number): number => Math.min(place + 1, 2) + 2 * Math.max(0, place - 1);

const nodes: Record<string, Vec3> = {
  ...Object.fromEntries(places.map((place) => [`line${place}`, [x(place), 0.4, lineZ(place)] as Vec3])),
  ...Object.fromEntries(places.map((place) => [`outlet${place}`, [x(place), 0.95, lineZ(place) + 0.011] as Vec3])),
  foot: [8.6, 0.4, -0.6],
  stackLow: [8.6, 0.4, 0.3],
  stackUp: [8.6, 0.4, 3.15],
  ventJoin: [8.6, 0.4, 6.1],
  sky: [8.6, 0.4, 7.4],
  riseTop: [1.2, 0.4, 5.95],
  drainOut: [8.6, 9, -0.78],
  sewer: [8.6, 12, -0.84],
  basin: [10.8, 0.9, 3.9],
  basinFoot: [10.8, 0.4, 3.22],
  basinSky: [10.8, 0.4, 6.15],
  closet: [9.6, 0.9, 3.2],
  closetJoin: [9.6, 0.4, 3.18],
  shower: [10.2, 1.8, 3.21],
  showerJoin: [10.2, 0.4, 3.2],
  gully: [5.2, 3.6, 3.3],
  gullyTurn: [8.6, 3.6, 3.23],
};

/** 4 in of 102.3 mm at 1:50: Manning and Colebrook-White by hand, half full. */
const waterIn4in: RunSpec['hydraulics'] = {
  kind: 'level',
  bore: 0.1023,
  law: 'Manning, n 0.012',
  slope: 0.02,
  halfFull: { flow: 4.2, speed: 1.02, cleansItself: true },
  otherLaw: { law: 'Colebrook-White, roughness 1 mm', flow: 4.2, speed: 1.02 },
  cleansFrom: 0.18,
};

const runs: Record<string, RunSpec> = {
  ...Object.fromEntries(
    places.map((place) => [
      `Arm ${place + 1}`,
      {
        from: `outlet${place}`,
        to: `line${place}`,
        role: 'fixture-drain',
        size: place < 2 ? '1½ in' : '2 in',
      },
    ]),
  ),
  ...Object.fromEntries(
    places.slice(0, 8).map((place): [string, RunSpec] => [
      lineName(place),
      {
        from: `line${place}`,
        to: `line${place + 1}`,
        role: 'wet-vent',
        also: ['branch'],
        size: '3 in',
        required: '4 in',
        battery: 'B1',
        trail: wetTrail(loadTo(place)),
        hydraulics: waterIn4in,
      },
    ]),
  ),
  'Branch end': { from: 'line8', to: 'stackLow', role: 'branch', size: '3 in', required: '4 in' },
  'Stack low': { from: 'stackLow', to: 'foot', role: 'stack', size: '4 in' },
  'Stack up': { from: 'stackUp', to: 'stackLow', role: 'stack', size: '4 in' },
  'Building drain': { from: 'foot', to: 'drainOut', role: 'building-drain', size: '4 in' },
  'Building sewer': { from: 'drainOut', to: 'sewer', role: 'building-sewer', size: '4 in' },
  'Riser vent': { from: 'line0', to: 'riseTop', role: 'continuous-vent', size: '2 in', system: 'Vent' },
  'Vent branch': {
    from: 'riseTop',
    to: 'ventJoin',
    role: 'branch-vent',
    size: '3 in',
    required: '2 in',
    system: 'Vent',
  },
  'Stack vent low': { from: 'stackUp', to: 'ventJoin', role: 'stack-vent', size: '3 in', system: 'Vent' },
  'Stack vent': { from: 'ventJoin', to: 'sky', role: 'stack-vent', size: '3 in', system: 'Vent' },
  'Basin drop': { from: 'basin', to: 'basinFoot', role: 'fixture-drain', size: '1½ in' },
  'Basin line': { from: 'basinFoot', to: 'showerJoin', role: 'wet-vent', also: ['branch'], size: '2 in' },
  'Shower arm': { from: 'shower', to: 'showerJoin', role: 'fixture-drain', size: '2 in' },
  'Shower line': { from: 'showerJoin', to: 'closetJoin', role: 'wet-vent', also: ['branch'], size: '2 in' },
  'Closet arm': { from: 'closet', to: 'closetJoin', role: 'fixture-drain', size: '3 in' },
  'Closet line': { from: 'closetJoin', to: 'stackUp', role: 'branch', size: '3 in' },
  'Basin vent': { from: 'basinFoot', to: 'basinSky', role: 'continuous-vent', size: '1½ in', system: 'Vent' },
  'Basin vent branch': { from: 'basinSky', to: 'ventJoin', role: 'branch-vent', size: '1½ in', system: 'Vent' },
  'Gully drain': { from: 'gully', to: 'gullyTurn', role: 'fixture-drain', size: null, required: '2 in' },
  'Gully branch': { from: 'gullyTurn', to: 'stackUp', role: 'branch', size: '2 in' },
};

const skyward = ['Riser vent', 'Vent branch', 'Stack vent'];

const fixtures: FixtureSpec[] = [
  ...places.map((place): FixtureSpec => {
    const basin = place < 2;
    const width = basin ? 0.28 : 0.19;
    return {
      at: `outlet${place}`,
      kind: basin ? 'lavatory' : 'urinal',
      name: basin ? `Lavatory ${place + 1}` : `Urinal ${place - 1}`,
      load: basin ? 1 : 2,
      trap: basin ? '1½ in' : '2 in',
      box: basin
        ? box([x(place) - width, 0.66, 0.68], [x(place) + width, 1.12, 0.9])
        : box([x(place) - width, 0.66, 0.5], [x(place) + width, 1.0, 1.25]),
      vented: 'wet-vent',
      arm: [`Arm ${place + 1}`],
      through: places.slice(0, place).map(lineName).toReversed(),
      dry: skyward,
    };
  }),
  {
    at: 'basin',
    kind: 'lavatory',
    name: 'Basin',
    load: 1,
    trap: '1½ in',
    box: box([10.5, 0.66, 4.05], [11.1, 1.12, 4.28]),
    vented: 'continuous-vent',
    arm: ['Basin drop'],
    through: [],
    dry: ['Basin vent', 'Basin vent branch', 'Stack vent'],
  },
  {
    at: 'shower',
    kind: 'shower',
    name: 'Shower',
    load: 1.5,
    trap: '2 in',
    box: box([9.75, 1.35, 3.4], [10.65, 2.25, 3.5]),
    vented: 'wet-vent',
    arm: ['Shower arm'],
    through: ['Basin line'],
    dry: ['Basin vent', 'Basin vent branch', 'Stack vent'],
  },
  {
    at: 'closet',
    kind: 'water-closet',
    name: 'Closet',
    load: 4,
    trap: '3 in',
    box: box([9.42, 0.66, 3.4], [9.78, 1.36, 4.2]),
    vented: 'wet-vent',
    arm: ['Closet arm'],
    through: ['Shower line', 'Basin line'],
    dry: ['Basin vent', 'Basin vent branch', 'Stack vent'],
  },
  {
    at: 'gully',
    kind: 'floor-drain',
    name: 'Floor drain',
    load: 2,
    trap: '2 in',
    box: box([5.1, 3.5, 3.36], [5.3, 3.7, 3.42]),
    vented: 'unvented',
    arm: ['Gully drain'],
  },
];

const walls = [0, 3.4].flatMap((floor) => {
  const wall = (x0: number, y0: number, x1: number, y1: number): Box => box([x0, y0, floor], [x1, y1, floor + 3.1]);
  return [
    wall(0, 0, 12, 0.2),
    wall(0, 7.8, 12, 8),
    wall(0, 0.2, 0.2, 7.8),
    wall(11.8, 0.2, 12, 7.8),
    wall(0.2, 0.56, 11.8, 0.66),
    wall(9.1, 0.66, 9.2, 7.8),
    ...(floor === 0 ? [wall(0.2, 3.6, 9.1, 3.7)] : [wall(9.2, 3, 11.8, 3.1)]),
  ];
});

export const communityHall: BuildingSpec = {
  nodes,
  runs,
  fixtures,
  storeys: [
    { name: 'Ground floor', elevation: 0 },
    { name: 'Upper floor', elevation: 3.4 },
  ],
  walls,
  slabs: [box([0, 0, -0.2], [12, 8, 0]), box([0, 0, 3.1], [12, 8, 3.4]), box([-0.3, -0.3, 6.5], [12.3, 8.3, 6.8])],
  spaces: [
    { name: 'Washroom', box: box([0.2, 0.66, 0], [9.1, 3.6, 3.1]) },
    { name: 'Bathroom', box: box([9.2, 0.66, 3.4], [11.8, 3, 6.5]) },
  ],
  findings: (ids) => [
    ...places.slice(0, 8).map(
      (place): ResultFinding => ({
        code: 'undersized',
        severity: 'error',
        about: [ids.get(lineName(place))!],
        facts: {
          cause: 'wet-vent-load',
          battery: 'B1',
          modelled: '3 in',
          required: '4 in',
          loadUnits: 14,
          limitUnits: 12,
        },
        clause: '2.5.8.1.',
        sentence: `${lineName(place)} is 3 in; the wet vent carries 14 fixture units and 3 in takes 12, so the code asks for 4 in (npc-2020, 2.5.8.1.).`,
      }),
    ),
    {
      code: 'undersized',
      severity: 'error',
      about: [ids.get('Branch end')!, ids.get(lineName(7))!],
      facts: { cause: 'not-smaller-downstream', modelled: '3 in', required: '4 in' },
      clause: '2.4.9.1.',
      sentence:
        'Branch end is 3 in and takes a 4 in pipe from upstream; no drain may grow smaller downstream (npc-2020, 2.4.9.1.).',
    },
    {
      code: 'unvented-trap',
      severity: 'error',
      about: [ids.get('Floor drain')!],
      facts: {},
      clause: '2.5.1.1.',
      sentence: 'The trap of Floor drain finds no way to the open air (npc-2020, 2.5.1.1.).',
    },
    {
      code: 'size-unknown',
      severity: 'warning',
      about: [ids.get('Gully drain')!],
      facts: {},
      clause: null,
      sentence: 'Gully drain carries no size that the program can read.',
    },
    {
      code: 'oversized',
      severity: 'note',
      about: [ids.get('Vent branch')!],
      facts: { modelled: '3 in', required: '2 in' },
      clause: null,
      sentence: 'Vent branch is 3 in; 2 in would do.',
    },
    {
      code: 'sewer-end-assumed',
      severity: 'note',
      about: [ids.get('Building sewer')!],
      facts: { how: 'lowest' },
      clause: null,
      sentence: 'The way to the sewer was taken to be the lowest open end, at Building sewer.',
    },
  ],
  batteries: (ids) => [
    {
      id: 'B1',
      fixtures: fixtures.slice(0, 9).map(({ name }) => ids.get(name)!),
      pipes: places.slice(0, 8).map((place) => ids.get(lineName(place))!),
      reading: 'wet-vent',
      why: 'no dry relief vent is drawn, and every condition of a wet vent holds',
      broken: [],
      others: [
        {
          reading: 'circuit-vent',
          holds: false,
          broken: [
            { rule: 'relief-vent', title: 'relief vent', clause: '2.5.3.1.', facts: { fixtures: 9, reliefVents: 0 } },
          ],
        },
        {
          reading: 'individual-vent',
          holds: false,
          broken: [
            { rule: 'vent-per-trap', title: 'a vent for each trap', clause: '2.5.1.1.', facts: { vents: 1, traps: 9 } },
          ],
        },
      ],
    },
  ],
};

import { describe, expect, test } from 'vitest';
import { sizeInName } from '../../src/model/size-in-name.ts';
import { slopeOfAngle, slopeOfNumber, slopeOfText } from '../../src/model/slope-value.ts';
import { metresInName, propertyMeaning } from '../../src/model/witness.ts';

const saysOf = (name: string): string => {
  const meaning = propertyMeaning(name);
  if (meaning === null) return 'nothing';
  if (meaning.bears === 'size') return meaning.means;
  if (meaning.bears === 'slope') return `slope ${meaning.form}`;
  return meaning.bears === 'side' ? meaning.side : meaning.bears;
};

describe('what a property says, by its name', () => {
  const says: Record<string, readonly string[]> = {
    nominal: [
      'NominalDiameter',
      'Nominal Diameter',
      'nominal_size',
      'DN',
      'Nennweite',
      'NW',
      'Diamètre nominal',
      'Diametro nominale',
      'Nominale diameter',
      'NPS',
      'Pipe Size Nominal'.replace('Pipe Size Nominal', 'Nominal Pipe Size'),
    ],
    outer: [
      'OuterDiameter',
      'Outside Diameter',
      'Aussendurchmesser',
      'Außen-Durchmesser',
      'Aussen-Durchmesser',
      'Diamètre extérieur',
      'Buitendiameter',
      'Diametro esterno',
      'Ytterdiameter',
      'OD',
    ],
    inner: [
      'InnerDiameter',
      'Inside Diameter',
      'Innendurchmesser',
      'Diamètre intérieur',
      'Binnendiameter',
      'lichte Weite',
    ],
    unknown: [
      'Diameter',
      'Durchmesser',
      'Size',
      'Pipe Diameter',
      'Rohrdurchmesser',
      'Diamètre',
      'Diámetro',
      'Diameter (mm)',
    ],
    'slope ratio': [
      'Slope',
      'Gradient',
      'Fall',
      'Gefälle',
      'Pente',
      'Pendenza',
      'Pendiente',
      'Neigung',
      'Lutning',
      'Spadek',
    ],
    'slope one-in': ['Afschot 1:?', 'Slope 1:n'],
    'slope percent': ['Gefälle (%)', 'Slope [%]', 'Slope Percent'],
    'slope per-mille': ['Gefälle [‰]'],
    length: ['Length', 'Lengte (mm)', 'Länge', 'Longueur', 'Lunghezza', 'Cut Length', 'Pipe Length'],
    width: ['Width', 'Breite'],
    depth: ['Depth', 'Height'],
    fact: [
      'Service',
      'System Classification',
      'DrainSize',
      'OutletConnectionSize',
      'TrapType',
      'Flush Type',
      'UrinalType',
      'Basis_ontw_diam (mm)',
      'Vent Type',
      'Status',
      'Vertikaal ?',
      'Bas_Lozings_Eig Fixture Units',
      'InvertElevation',
    ],
    nothing: [
      'Manufacturer',
      'Insulation Thickness',
      'BendRadius',
      'Maximum Diameter',
      'WallThickness',
      'Hydraulic Diameter',
      'Roof slope area',
      'Comfort',
      'Cost',
      'Parameter 3',
      'Id',
      'Length of warranty',
      '',
    ],
  };
  for (const [meaning, names] of Object.entries(says)) {
    for (const name of names) test(`${name || '(empty)'} says ${meaning}`, () => expect(saysOf(name)).toBe(meaning));
  }

  test('very long names say nothing', () => {
    for (const one of ['a', ' ', '1/', '-', '(', 'diameter ']) expect(propertyMeaning(one.repeat(50_000))).toBeNull();
  });
});

describe('a unit in a name', () => {
  for (const [name, metres] of [
    ['Lengte (mm)', 0.001],
    ['Size [in]', 0.0254],
    ['Diam_mm', 0.001],
    ['Length (m)', 1],
    ['Weight (kg)', null],
    ['Diameter', null],
  ] as const) {
    test(name, () => expect(metresInName(name)).toBe(metres));
  }
});

describe('a size in a name', () => {
  const cases: readonly (readonly [string, boolean, string | null])[] = [
    ['DN100', false, 'DN100'],
    ['Rohr DN 80', true, 'DN 80'],
    ['T-Stück DN20/20/25', true, 'DN20'],
    ['3" DWV pipe', false, '3"'],
    ['1 1/2 in trap', false, '1 1/2 in'],
    ['1½" elbow', false, '1½"'],
    ['Ø80', false, 'Ø80'],
    ['HT-Rohr 110 mm', false, '110 mm'],
    ['Circ_0.4x0.06 betoni', true, 'Ø400'],
    ['Circ_0.239x0.0055 PVC', true, 'Ø239'],
    ['82.5', true, '82.5'],
    ['110', true, '110'],
    // Occurrences are often numbered, fixtures measured, ids long.
    ['110', false, null],
    ['8', true, null],
    ['Pipe Types:Standard:316135', false, null],
    ['600 x 400 mm', false, null],
    ['Sink 24" x 18"', false, '24"'],
    ['Pipe', true, null],
  ];
  for (const [text, isType, claim] of cases) {
    test(`${text}${isType ? ' (type)' : ''}: ${claim ?? 'none'}`, () => expect(sizeInName(text, isType)).toBe(claim));
  }
});

describe('a stated slope, in metres a metre', () => {
  const texts: readonly (readonly [string, number | null])[] = [
    ['1:50', 0.02],
    ['1 in 50', 0.02],
    ['2 %', 0.02],
    ['2,5%', 0.025],
    ['20 ‰', 0.02],
    ['1/4" / 12"', 0.25 / 12],
    ['1/4"/ft', 0.25 / 12],
    ['1/8 in per foot', 0.125 / 12],
    ['0.02', 0.02],
    ['-0.02', 0.02],
    ['steep', null],
    ['', null],
  ];
  for (const [text, slope] of texts) {
    test(`"${text}" is ${slope}`, () => {
      const read = slopeOfText(text, 'ratio');
      if (slope === null) expect(read).toBeNull();
      else expect(read).toBeCloseTo(slope, 12);
    });
  }
  const numbers: readonly (readonly [number, 'ratio' | 'one-in' | 'percent' | 'per-mille', number | null])[] = [
    [0.02, 'ratio', 0.02],
    [-0.02, 'ratio', 0.02],
    [2, 'ratio', 0.02],
    [50, 'ratio', 0.02],
    [200, 'one-in', 0.005],
    [0, 'one-in', null],
    [0, 'ratio', 0],
    [2, 'percent', 0.02],
    [20, 'per-mille', 0.02],
    [200, 'percent', null],
    [Number.NaN, 'ratio', null],
  ];
  for (const [value, form, slope] of numbers) {
    test(`${value} as ${form} is ${slope}`, () => {
      const read = slopeOfNumber(value, form);
      if (slope === null) expect(read).toBeNull();
      else expect(read).toBeCloseTo(slope, 12);
    });
  }
  test('an angle of one degree', () => expect(slopeOfAngle(Math.PI / 180)).toBeCloseTo(0.017455, 6));
});

import { describe, expect, test } from 'vitest';
import { modelOf } from '../read-one.ts';
import { stepFile } from '../step-file.ts';

/** A pipe whose property `NominalDiameter` has this value, in a file with these units (#2 is the length unit). */
const sizeOf = (units: string, value: string, name = 'NominalDiameter'): number | string | null => {
  const model = modelOf(
    stepFile(`#1=IFCUNITASSIGNMENT((#2));\n${units}\n#7=IFCPROJECT('p',$,'Case',$,$,$,$,$,#1);
#50=IFCPIPESEGMENT('a',$,'P',$,$,$,$,$,$);
#51=IFCPROPERTYSET('s',$,'Pset_PipeSegmentTypeCommon',$,(#52));
#52=IFCPROPERTYSINGLEVALUE('${name}',$,${value});
#53=IFCRELDEFINESBYPROPERTIES('r',$,$,$,(#50),#51);`),
  );
  const [size] = model.elements[0]!.sizes;
  return size === undefined ? null : (size.mm ?? size.text);
};

const metre = '#2=IFCSIUNIT(*,.LENGTHUNIT.,$,.METRE.);';
const millimetre = '#2=IFCSIUNIT(*,.LENGTHUNIT.,.MILLI.,.METRE.);\n#8=IFCSIUNIT(*,.LENGTHUNIT.,$,.METRE.);';
const inches = `#2=IFCCONVERSIONBASEDUNIT(#3,.LENGTHUNIT.,'INCH',#4);\n#3=IFCDIMENSIONALEXPONENTS(1,0,0,0,0,0,0);
#4=IFCMEASUREWITHUNIT(IFCRATIOMEASURE(25.4),#5);\n#5=IFCSIUNIT(*,.LENGTHUNIT.,.MILLI.,.METRE.);`;
const feet = inches.replace("'INCH'", "'FOOT'").replace('25.4', '304.8');

describe('a size of 4 inches, 101.6 mm, however the file measures', () => {
  const cases = [
    ['metres', metre, 'IFCPOSITIVELENGTHMEASURE(0.1016),$'],
    ['millimetres', millimetre, 'IFCPOSITIVELENGTHMEASURE(101.6),$'],
    ['inches, defined by millimetres', inches, 'IFCLENGTHMEASURE(4.),$'],
    ['feet', feet, 'IFCPOSITIVELENGTHMEASURE(0.33333333333333),$'],
    ['a property with a unit of its own', millimetre, 'IFCPOSITIVELENGTHMEASURE(0.1016),#8'],
    ['a real with a unit of its own', millimetre, 'IFCREAL(0.1016),#8'],
    ['an inch without a definition', "#2=IFCCONTEXTDEPENDENTUNIT(#3,.LENGTHUNIT.,'inch');", 'IFCLENGTHMEASURE(4.),$'],
    ['no length unit at all: metres', '', 'IFCPOSITIVELENGTHMEASURE(0.1016),$'],
  ] as const;
  for (const [what, units, value] of cases) test(what, () => expect(sizeOf(units, value)).toBeCloseTo(101.6, 6));
});

describe('a name that says its unit means it', () => {
  test('a length measure of 57 in a file in metres', () => {
    expect(sizeOf(metre, 'IFCLENGTHMEASURE(57.),$', 'Diameter (mm)')).toBe(57);
  });
  test('a plain real', () => expect(sizeOf(metre, 'IFCREAL(3.),$', 'Diameter [in]')).toBeCloseTo(76.2, 9));
});

describe('numbers without a unit', () => {
  test('DN is millimetres by its meaning', () => expect(sizeOf(metre, 'IFCINTEGER(80),$', 'DN')).toBe(80));
  test('a bare diameter is left to whoever knows the sizes', () =>
    expect(sizeOf(metre, 'IFCREAL(4.),$', 'Diameter')).toBe('4'));
  test('0 and 0.000001 mean that nobody knows', () => {
    expect(sizeOf(millimetre, 'IFCPOSITIVELENGTHMEASURE(0.000001),$')).toBeNull();
    expect(sizeOf(millimetre, 'IFCPOSITIVELENGTHMEASURE(0.),$')).toBeNull();
  });
});

test('the file says which unit it has, and when it states none', () => {
  const read = (units: string) =>
    modelOf(stepFile(`#1=IFCUNITASSIGNMENT((#2));\n${units}\n#7=IFCPROJECT('p',$,$,$,$,$,$,$,#1);`)).files[0]!;
  expect(read(millimetre).lengthUnit).toEqual({ name: 'MILLIMETRE', metres: 0.001 });
  expect(read(inches).lengthUnit.name).toBe('INCH');
  expect(read(inches).lengthUnit.metres).toBeCloseTo(0.0254, 12);
  expect(read('').remarks).toContain('The file states no length unit: its lengths are taken as metres.');
});

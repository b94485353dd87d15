import { describe, expect, test } from 'vitest';
import type { Element } from '../../../src/model/model.ts';
import { modelOfLines } from '../read-one.ts';

const segment = "#20=IFCPIPESEGMENT('a',$,'P',$,$,$,$,$,$);";
const single = (id: number, name: string, value: string, unit = '$'): string =>
  `#${id}=IFCPROPERTYSINGLEVALUE('${name}',$,${value},${unit});`;
const set = (id: number, name: string, ids: string): string =>
  `#${id}=IFCPROPERTYSET('s${id}',$,'${name}',$,(${ids}));`;
const defines = (id: number, things: string, of: string): string =>
  `#${id}=IFCRELDEFINESBYPROPERTIES('r${id}',$,$,$,(${things}),${of});`;

const elementOf = (lines: string, schema = 'IFC4'): Element => modelOfLines(lines, { schema }).elements[0]!;
const sizesOf = (element: Element): unknown[] =>
  element.sizes.map(({ means, mm, text, ground, from }) => [means, mm ?? text, ground, from]);

describe('occurrence and type, merged property by property', () => {
  const type = `#60=IFCPIPESEGMENTTYPE('t',$,'T',$,$,(#61),$,$,$,.RIGIDSEGMENT.);\n#65=IFCRELDEFINESBYTYPE('r',$,$,$,(#20),#60);
${set(61, 'Pset_PipeSegmentTypeCommon', '#62,#63')}\n${single(62, 'NominalDiameter', 'IFCPOSITIVELENGTHMEASURE(0.08)')}
${single(63, 'OuterDiameter', 'IFCPOSITIVELENGTHMEASURE(0.0889)')}`;

  test('what only the type says holds', () => {
    expect(sizesOf(elementOf(`${segment}\n${type}`))).toEqual([
      ['nominal', 80, 'property', 'Pset_PipeSegmentTypeCommon.NominalDiameter (type)'],
      ['outer', 88.9, 'property', 'Pset_PipeSegmentTypeCommon.OuterDiameter (type)'],
    ]);
  });

  test("what the occurrence says too, the occurrence says; the rest of the set is still the type's", () => {
    const own = `${set(30, 'Pset_PipeSegmentTypeCommon', '#31')}\n${single(31, 'NominalDiameter', 'IFCPOSITIVELENGTHMEASURE(0.1)')}\n${defines(32, '#20', '#30')}`;
    expect(sizesOf(elementOf(`${segment}\n${type}\n${own}`))).toEqual([
      ['nominal', 100, 'property', 'Pset_PipeSegmentTypeCommon.NominalDiameter'],
      ['outer', 88.9, 'property', 'Pset_PipeSegmentTypeCommon.OuterDiameter (type)'],
    ]);
  });

  test('a set that a relation gives to the type', () => {
    const byRelation = `#60=IFCPIPESEGMENTTYPE('t',$,'T',$,$,$,$,$,$,.RIGIDSEGMENT.);\n#65=IFCRELDEFINESBYTYPE('r',$,$,$,(#20),#60);
${set(61, 'X', '#62')}\n${single(62, 'DN', 'IFCREAL(80.)')}\n${defines(66, '#60', '#61')}`;
    expect(sizesOf(elementOf(`${segment}\n${byRelation}`))).toEqual([['nominal', 80, 'property', 'X.DN (type)']]);
  });
});

describe('every kind of property', () => {
  const one = (property: string): Element =>
    elementOf(`${segment}\n${set(30, 'X', '#31')}\n${property}\n${defines(32, '#20', '#30')}`);
  const dn80 = [['nominal', 80, 'property', 'X.DN']];

  test('enumerated: the first value', () => {
    const { properties } = one("#31=IFCPROPERTYENUMERATEDVALUE('Status',$,(IFCLABEL('EXISTING'),IFCLABEL('NEW')),$);");
    expect(properties).toEqual([{ set: 'X', name: 'Status', value: 'EXISTING', measure: 'text', from: 'own' }]);
  });
  test("list: the first value, in the list's unit", () => {
    expect(
      sizesOf(
        one(
          "#31=IFCPROPERTYLISTVALUE('DN',$,(IFCPOSITIVELENGTHMEASURE(80.)),#33);\n#33=IFCSIUNIT(*,.LENGTHUNIT.,.MILLI.,.METRE.);",
        ),
      ),
    ).toEqual(dn80);
  });
  test('bounded: a set point, or bounds that are alike; two bounds that differ are no value', () => {
    expect(
      sizesOf(
        one(
          "#31=IFCPROPERTYBOUNDEDVALUE('DN',$,IFCPOSITIVELENGTHMEASURE(0.1),IFCPOSITIVELENGTHMEASURE(0.05),$,IFCPOSITIVELENGTHMEASURE(0.08));",
        ),
      ),
    ).toEqual(dn80);
    expect(
      sizesOf(
        one("#31=IFCPROPERTYBOUNDEDVALUE('DN',$,IFCPOSITIVELENGTHMEASURE(0.08),IFCPOSITIVELENGTHMEASURE(0.08),$,$);"),
      ),
    ).toEqual(dn80);
    expect(
      sizesOf(
        one("#31=IFCPROPERTYBOUNDEDVALUE('DN',$,IFCPOSITIVELENGTHMEASURE(0.1),IFCPOSITIVELENGTHMEASURE(0.05),$,$);"),
      ),
    ).toEqual([]);
  });
  test('complex: what is within', () => {
    expect(
      sizesOf(
        one(
          "#31=IFCCOMPLEXPROPERTY('Pipe',$,'use',(#33));\n#33=IFCCOMPLEXPROPERTY('Inner',$,'use',(#34));\n#34=IFCPROPERTYSINGLEVALUE('DN',$,IFCREAL(80.),$);",
        ),
      ),
    ).toEqual(dn80);
  });
  test('complex within itself ends', () => {
    expect(
      sizesOf(
        one(
          "#31=IFCCOMPLEXPROPERTY('Pipe',$,'use',(#31,#31,#34));\n#34=IFCPROPERTYSINGLEVALUE('DN',$,IFCREAL(80.),$);",
        ),
      ).length,
    ).toBeGreaterThan(0);
  });
  test('texts that only a size series can read', () => {
    expect(sizesOf(one(single(31, 'Size', 'IFCLABEL(\'3"ø-3"ø\')')))).toEqual([
      ['unknown', '3"ø-3"ø', 'property', 'X.Size'],
    ]);
  });
  test('a text that repeats its name, an empty one and `$` say nothing', () => {
    for (const value of ["IFCLABEL('Size')", "IFCLABEL('  ')", '$'])
      expect(sizesOf(one(single(31, 'Size', value)))).toEqual([]);
  });
  test('angles, ratios and texts of slope', () => {
    expect(one(single(31, 'Slope', 'IFCPLANEANGLEMEASURE(0.02)')).slopes[0]!.slope).toBeCloseTo(Math.tan(0.02), 9);
    expect(one(single(31, 'Gradient', 'IFCPOSITIVERATIOMEASURE(0.0208)')).slopes).toEqual([
      { slope: 0.0208, from: 'X.Gradient' },
    ]);
    expect(one(single(31, 'Gefälle', "IFCLABEL('1:50')")).slopes).toEqual([{ slope: 0.02, from: 'X.Gefälle' }]);
  });
  test('two sides alike are a round section, two that differ are not', () => {
    const sides = (depth: string) =>
      elementOf(
        `${segment}\n${set(30, 'X', '#31,#33')}\n${single(31, 'Width', 'IFCPOSITIVELENGTHMEASURE(0.0508)')}\n${single(33, 'Depth', `IFCPOSITIVELENGTHMEASURE(${depth})`)}\n${defines(32, '#20', '#30')}`,
      );
    expect(sizesOf(sides('0.0508'))).toEqual([['unknown', 50.8, 'property', 'X.Width']]);
    expect(sizesOf(sides('0.1'))).toEqual([]);
  });
  test('lengths of a quantity set', () => {
    const { statedLength, sizes } =
      elementOf(`${segment}\n#30=IFCELEMENTQUANTITY('q',$,'Qto_PipeSegmentBaseQuantities',$,$,(#31,#33));
#31=IFCQUANTITYLENGTH('Length',$,$,2.5,$);\n#33=IFCQUANTITYLENGTH('OuterDiameter',$,$,0.11,$);\n${defines(32, '#20', '#30')}`);
    expect(statedLength).toBe(2.5);
    expect(sizes[0]).toMatchObject({ means: 'outer', mm: 110, ground: 'quantity' });
  });
});

test('our own sets never witness anything', () => {
  const element =
    elementOf(`${segment}\n${set(30, 'Drainwright_Pipe', '#31')}\n${single(31, 'RequiredNominalDiameter', 'IFCPOSITIVELENGTHMEASURE(0.1)')}
${set(40, 'Drainwright_Pipe', '#41')}\n${single(41, 'NominalDiameter', 'IFCPOSITIVELENGTHMEASURE(0.1)')}\n${defines(32, '#20', '#30')}\n${defines(42, '#20', '#40')}`);
  expect([element.sizes, element.properties]).toEqual([[], []]);
});

test("sizes of ports come after the element's own, with the port's name", () => {
  const element =
    elementOf(`${segment}\n#21=IFCDISTRIBUTIONPORT('p',$,'In',$,$,$,$,.SINK.,$,$);\n#22=IFCRELNESTS('n',$,$,$,#20,(#21));
${set(30, 'Pset_DistributionPortTypePipe', '#31')}\n${single(31, 'NominalDiameter', 'IFCPOSITIVELENGTHMEASURE(0.08)')}\n${defines(32, '#21', '#30')}
${set(40, 'X', '#41')}\n${single(41, 'DN', 'IFCREAL(100.)')}\n${defines(42, '#20', '#40')}`);
  expect(sizesOf(element)).toEqual([
    ['nominal', 100, 'property', 'X.DN'],
    ['nominal', 80, 'port', 'Pset_DistributionPortTypePipe.NominalDiameter (port In)'],
  ]);
});

test('witnesses stand in the order they were found: property, profile, name', () => {
  const element =
    elementOf(`#20=IFCPIPESEGMENT('a',$,'Pipe DN 75',$,'82.5',$,#70,$,$);\n${set(30, 'X', '#31')}\n${single(31, 'DN', 'IFCREAL(80.)')}\n${defines(32, '#20', '#30')}
#70=IFCPRODUCTDEFINITIONSHAPE($,$,(#71));\n#71=IFCSHAPEREPRESENTATION($,'Body','SweptSolid',(#100));
#100=IFCEXTRUDEDAREASOLID(#101,$,#112,2.);\n#101=IFCCIRCLEHOLLOWPROFILEDEF(.AREA.,$,$,0.045,0.003);\n#112=IFCDIRECTION((0.,0.,1.));`);
  expect(sizesOf(element)).toEqual([
    ['nominal', 80, 'property', 'X.DN'],
    ['outer', 90, 'profile', 'profile'],
    ['inner', 84, 'profile', 'profile'],
    ['unknown', '82.5', 'name', 'ObjectType'],
    ['unknown', 'DN 75', 'name', 'Name'],
  ]);
});

test('IFC4: a definition that is a set of sets', () => {
  const element = elementOf(
    `${segment}\n${set(30, 'X', '#31')}\n${single(31, 'DN', 'IFCREAL(80.)')}\n${defines(32, '#20', 'IFCPROPERTYSETDEFINITIONSET((#30))')}`,
  );
  expect(sizesOf(element)).toEqual([['nominal', 80, 'property', 'X.DN']]);
});

test('IFC2X3: overridden properties', () => {
  const element = elementOf(
    `#20=IFCFLOWSEGMENT('a',$,'P',$,$,$,$,$);\n${set(30, 'X', '#31')}\n${single(31, 'DN', 'IFCREAL(80.)')}\n#32=IFCRELOVERRIDESPROPERTIES('r',$,$,$,(#20),#30,(#31));`,
    'IFC2X3',
  );
  expect(sizesOf(element)).toEqual([['nominal', 80, 'property', 'X.DN']]);
});

import { describe, expect, test } from 'vitest';
import type { Element } from '../../../src/model/model.ts';
import { modelOfLines } from '../read-one.ts';

/** The one element of lines; `schema` as FILE_SCHEMA names it. */
const elementOf = (lines: string, schema = 'IFC4'): Element => modelOfLines(lines, { schema }).elements[0]!;
/** An occurrence #50 of IFC2X3's general class with a type #60. */
const typed = (general: string, type: string, predefined: string): string =>
  `#50=${general}('e',$,'Name',$,'Object type',$,$,'Tag');
#60=${type}('t',$,'Type name','Type description',$,$,$,$,$,${predefined});
#61=IFCRELDEFINESBYTYPE('r',$,$,$,(#50),#60);`;

describe('IFC2X3: the type says what a general occurrence is', () => {
  const cases: readonly (readonly [string, string, string, Element['kind'], string | null])[] = [
    ['IFCFLOWSEGMENT', 'IFCPIPESEGMENTTYPE', '.RIGIDSEGMENT.', 'segment', 'RIGIDSEGMENT'],
    ['IFCFLOWSEGMENT', 'IFCDUCTSEGMENTTYPE', '.NOTDEFINED.', 'other', null],
    ['IFCFLOWSEGMENT', 'IFCCABLESEGMENTTYPE', '.CABLESEGMENT.', 'other', 'CABLESEGMENT'],
    ['IFCFLOWFITTING', 'IFCPIPEFITTINGTYPE', '.BEND.', 'fitting', 'BEND'],
    ['IFCFLOWFITTING', 'IFCJUNCTIONBOXTYPE', '.NOTDEFINED.', 'other', null],
    ['IFCFLOWTERMINAL', 'IFCSANITARYTERMINALTYPE', '.WASHHANDBASIN.', 'terminal', 'WASHHANDBASIN'],
    ['IFCFLOWTERMINAL', 'IFCWASTETERMINALTYPE', '.FLOORTRAP.', 'terminal', 'FLOORTRAP'],
    ['IFCFLOWTERMINAL', 'IFCSTACKTERMINALTYPE', '.COWL.', 'terminal', 'COWL'],
    ['IFCFLOWTERMINAL', 'IFCAIRTERMINALTYPE', '.GRILLE.', 'other', 'GRILLE'],
    ['IFCFLOWTERMINAL', 'IFCLIGHTFIXTURETYPE', '.NOTDEFINED.', 'other', null],
    ['IFCFLOWTERMINAL', 'IFCELECTRICAPPLIANCETYPE', '.WASHINGMACHINE.', 'terminal', 'WASHINGMACHINE'],
    ['IFCFLOWTERMINAL', 'IFCELECTRICAPPLIANCETYPE', '.FREEZER.', 'other', 'FREEZER'],
    ['IFCFLOWCONTROLLER', 'IFCVALVETYPE', '.ANTIVACUUM.', 'valve', 'ANTIVACUUM'],
    ['IFCFLOWCONTROLLER', 'IFCDAMPERTYPE', '.NOTDEFINED.', 'other', null],
    ['IFCFLOWMOVINGDEVICE', 'IFCPUMPTYPE', '.SUMPPUMP.', 'treatment', 'SUMPPUMP'],
    ['IFCFLOWMOVINGDEVICE', 'IFCFANTYPE', '.NOTDEFINED.', 'other', null],
    ['IFCFLOWSTORAGEDEVICE', 'IFCTANKTYPE', '.PREFORMED.', 'treatment', 'PREFORMED'],
    ['IFCFLOWTREATMENTDEVICE', 'IFCFILTERTYPE', '.STRAINER.', 'treatment', 'STRAINER'],
    ['IFCDISTRIBUTIONCHAMBERELEMENT', 'IFCDISTRIBUTIONCHAMBERELEMENTTYPE', '.MANHOLE.', 'chamber', 'MANHOLE'],
    ['IFCENERGYCONVERSIONDEVICE', 'IFCBOILERTYPE', '.WATER.', 'other', 'WATER'],
  ];
  for (const [general, type, predefined, kind, said] of cases) {
    test(`${general} of ${type} ${predefined} is ${kind}`, () => {
      const element = elementOf(typed(general, type, predefined), 'IFC2X3');
      expect([element.kind, element.predefinedType]).toEqual([kind, said]);
      expect(element.ifcClass.toUpperCase()).toBe(general);
      expect(element.typeClass?.toUpperCase()).toBe(type);
    });
  }

  test("names in the schema's spelling, texts from their places", () => {
    const element = elementOf(typed('IFCFLOWTERMINAL', 'IFCSANITARYTERMINALTYPE', '.TOILETPAN.'), 'IFC2X3');
    expect(element).toMatchObject({
      ifcClass: 'IfcFlowTerminal',
      typeClass: 'IfcSanitaryTerminalType',
      name: 'Name',
      objectType: 'Object type',
      description: null,
      tag: 'Tag',
      typeName: 'Type name',
      typeDescription: 'Type description',
      globalId: 'e',
      stepId: 50,
    });
  });

  test('a flow segment without a type is a pipe unless its section is not round', () => {
    const body = (profile: string): string => `#50=IFCFLOWSEGMENT('e',$,'N',$,$,$,#70,$);
#70=IFCPRODUCTDEFINITIONSHAPE($,$,(#71));\n#71=IFCSHAPEREPRESENTATION($,'Body','SweptSolid',(#100));
#100=IFCEXTRUDEDAREASOLID(#101,$,#112,2.);\n#101=${profile};\n#112=IFCDIRECTION((0.,0.,1.));`;
    expect(elementOf(body('IFCCIRCLEPROFILEDEF(.AREA.,$,$,0.05)'), 'IFC2X3').kind).toBe('segment');
    expect(elementOf(body('IFCRECTANGLEPROFILEDEF(.AREA.,$,$,0.4,0.2)'), 'IFC2X3').kind).toBe('other');
    expect(elementOf("#50=IFCFLOWSEGMENT('e',$,'N',$,$,$,$,$);", 'IFC2X3').kind).toBe('segment');
  });
});

describe("IFC4 and IFC4X3: the class says it; the predefined type is the occurrence's, else its type's", () => {
  const cases: readonly (readonly [string, Element['kind']])[] = [
    ['IFCPIPESEGMENT', 'segment'],
    ['IFCDUCTSEGMENT', 'other'],
    ['IFCPIPEFITTING', 'fitting'],
    ['IFCSANITARYTERMINAL', 'terminal'],
    ['IFCWASTETERMINAL', 'terminal'],
    ['IFCSTACKTERMINAL', 'terminal'],
    ['IFCLIQUIDTERMINAL', 'other'],
    ['IFCVALVE', 'valve'],
    ['IFCINTERCEPTOR', 'treatment'],
    ['IFCPUMP', 'treatment'],
    ['IFCTANK', 'treatment'],
    ['IFCSPACEHEATER', 'other'],
    ['IFCDISTRIBUTIONELEMENT', 'other'],
  ];
  for (const schema of ['IFC4', 'IFC4X3_ADD2']) {
    for (const [name, kind] of cases) {
      test(`${schema} ${name} is ${kind}`, () => {
        expect(elementOf(`#50=${name}('e',$,'N',$,$,$,$,$,$);`, schema).kind).toBe(kind);
      });
    }
  }

  const said = (own: string, type: string): string | null =>
    elementOf(`#50=IFCSANITARYTERMINAL('e',$,'N',$,$,$,$,$,${own});
#60=IFCSANITARYTERMINALTYPE('t',$,'T',$,$,$,$,$,$,${type});\n#61=IFCRELDEFINESBYTYPE('r',$,$,$,(#50),#60);`)
      .predefinedType;
  test('own before type', () => expect(said('.URINAL.', '.SINK.')).toBe('URINAL'));
  test('NOTDEFINED says nothing', () => expect(said('.NOTDEFINED.', '.SINK.')).toBe('SINK'));
  test('USERDEFINED says less than the type', () => expect(said('.USERDEFINED.', '.SINK.')).toBe('SINK'));
  test('USERDEFINED is kept where nobody says more', () =>
    expect(said('.USERDEFINED.', '.NOTDEFINED.')).toBe('USERDEFINED'));
  test('nothing at all', () => expect(said('$', '.NOTDEFINED.')).toBeNull());
});

describe('things that are no distribution elements count where they are tied to piping', () => {
  const proxy = "#50=IFCBUILDINGELEMENTPROXY('e',$,'Thing',$,$,$,$,$,$);";
  const port = (id: number): string => `#${id}=IFCDISTRIBUTIONPORT('p${id}',$,$,$,$,$,$,.SOURCE.,$,$);`;
  const kinds = (lines: string): string[] => modelOfLines(lines).elements.map(({ kind }) => kind);

  test('alone they are none', () => expect(kinds(proxy)).toEqual([]));
  test('with one port a terminal', () => {
    expect(kinds(`${proxy}\n${port(60)}\n#61=IFCRELNESTS('n',$,$,$,#50,(#60));`)).toEqual(['terminal']);
  });
  test('with two ports a fitting', () => {
    expect(kinds(`${proxy}\n${port(60)}\n${port(62)}\n#61=IFCRELNESTS('n',$,$,$,#50,(#60,#62));`)).toEqual(['fitting']);
  });
  test('in a system a terminal', () => {
    const system =
      "#60=IFCDISTRIBUTIONSYSTEM('s',$,'S',$,$,$,.SEWAGE.);\n#61=IFCRELASSIGNSTOGROUP('g',$,$,$,(#50),$,#60);";
    expect(kinds(`${proxy}\n${system}`)).toEqual(['terminal']);
    expect(kinds(`${proxy.replace('Thing', 'Manhole 3')}\n${system}`)).toEqual(['chamber']);
  });
  test('with a distribution type what the type is', () => {
    const type =
      "#60=IFCSANITARYTERMINALTYPE('t',$,'T',$,$,$,$,$,$,.SINK.);\n#61=IFCRELDEFINESBYTYPE('r',$,$,$,(#50),#60);";
    expect(kinds(`${proxy}\n${type}`)).toEqual(['terminal']);
  });
});

test('elements come in order of their STEP ids, however the lines stand', () => {
  const { elements } = modelOfLines(
    "#70=IFCVALVE('a',$,$,$,$,$,$,$,$);\n#20=IFCPIPESEGMENT('b',$,$,$,$,$,$,$,$);\n#50=IFCPIPEFITTING('c',$,$,$,$,$,$,$,$);",
  );
  expect(elements.map(({ id, stepId }) => [id, stepId])).toEqual([
    [0, 20],
    [1, 50],
    [2, 70],
  ]);
});

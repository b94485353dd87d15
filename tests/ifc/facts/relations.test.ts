import { describe, expect, test } from 'vitest';
import { modelOfLines } from '../read-one.ts';

const segment = (id: number, name: string): string => `#${id}=IFCPIPESEGMENT('${name}',$,'${name}',$,$,$,$,$,$);`;
const port = (id: number, direction = '$'): string =>
  `#${id}=IFCDISTRIBUTIONPORT('p${id}',$,'P${id}',$,$,$,$,${direction},$,$);`;
const two = [segment(20, 'A'), segment(30, 'B'), port(21), port(22), port(31), port(32)].join('\n');

describe('ports by either relation', () => {
  test('IfcRelNests, IfcRelConnectsPortToElement, IfcRelAggregates', () => {
    const { ports, elements } = modelOfLines(`${two}
#40=IFCRELNESTS('n',$,$,$,#20,(#21,#22));
#41=IFCRELCONNECTSPORTTOELEMENT('c',$,$,$,#31,#30);
#42=IFCRELAGGREGATES('a',$,$,$,#30,(#32));`);
    expect(ports.map(({ stepId, owner }) => [stepId, owner])).toEqual([
      [21, 0],
      [22, 0],
      [31, 1],
      [32, 1],
    ]);
    expect(elements.map((element) => element.ports)).toEqual([
      [0, 1],
      [2, 3],
    ]);
  });

  test('directions', () => {
    const lines = ['.SOURCE.', '.SINK.', '.SOURCEANDSINK.', '.NOTDEFINED.', '$']
      .map((one, k) => port(20 + k, one))
      .join('\n');
    expect(modelOfLines(lines).ports.map(({ direction }) => direction)).toEqual([
      'source',
      'sink',
      'both',
      'unknown',
      'unknown',
    ]);
  });

  test('a port of a type object is no port of the model; a port of nobody is', () => {
    const { ports } = modelOfLines(`${port(21)}\n${port(22)}
#60=IFCSANITARYTERMINALTYPE('t',$,'T',$,$,$,$,$,$,.SINK.);\n#61=IFCRELNESTS('n',$,$,$,#60,(#21));`);
    expect(ports.map(({ stepId, owner }) => [stepId, owner])).toEqual([[22, null]]);
  });

  test("a port stands where its own placement within its element's puts it", () => {
    const { ports } = modelOfLines(`#20=IFCPIPESEGMENT('a',$,$,$,$,#60,$,$,$);
#21=IFCDISTRIBUTIONPORT('p',$,$,$,$,#61,$,.SINK.,$,$);\n#22=IFCRELNESTS('n',$,$,$,#20,(#21));
#60=IFCLOCALPLACEMENT($,#62);\n#61=IFCLOCALPLACEMENT(#60,#63);\n#62=IFCAXIS2PLACEMENT3D(#64,#67,#68);\n#63=IFCAXIS2PLACEMENT3D(#65,$,$);
#64=IFCCARTESIANPOINT((10.,0.,0.));\n#65=IFCCARTESIANPOINT((0.,0.,2.));\n#67=IFCDIRECTION((1.,0.,0.));\n#68=IFCDIRECTION((0.,1.,0.));`);
    expect(ports[0]!.at).toEqual([12, 0, 0]);
  });
});

describe('joints', () => {
  const owned = `${two}\n#40=IFCRELNESTS('n',$,$,$,#20,(#21,#22));\n#41=IFCRELNESTS('m',$,$,$,#30,(#31,#32));`;

  test('each port knows the other; a joint said twice is one joint; a port is not joined to itself', () => {
    const { ports } = modelOfLines(`${owned}
#50=IFCRELCONNECTSPORTS('j',$,$,$,#22,#31,$);\n#51=IFCRELCONNECTSPORTS('k',$,$,$,#31,#22,$);\n#52=IFCRELCONNECTSPORTS('l',$,$,$,#21,#21,$);`);
    expect(ports.map(({ connected }) => connected)).toEqual([[], [2], [1], []]);
  });

  test('a realizing element with ports of its own is a third party', () => {
    const { ports } = modelOfLines(`${owned}\n${segment(70, 'C')}\n${port(71)}\n#72=IFCRELNESTS('o',$,$,$,#70,(#71));
#50=IFCRELCONNECTSPORTS('j',$,$,$,#22,#31,#70);`);
    expect(ports.map(({ connected }) => connected)).toEqual([[], [2], [1], [], []]);
  });

  test('a realizing element that is no piping is a third party', () => {
    const { ports } = modelOfLines(
      `${owned}\n#70=IFCDISCRETEACCESSORY('g',$,'Gasket',$,$,$,$,$,$);\n#50=IFCRELCONNECTSPORTS('j',$,$,$,#22,#31,#70);`,
    );
    expect(ports.map(({ connected }) => connected)).toEqual([[], [2], [1], []]);
  });

  test('a pipe without ports that realizes a joint lies between the two', () => {
    const { ports, elements } = modelOfLines(`${two.replaceAll(/#2[12].*\n/g, '')}
#24=IFCDISTRIBUTIONPORT('s',$,$,$,$,$,$,.SOURCE.,$,$);\n#41=IFCRELNESTS('m',$,$,$,#30,(#31,#32));\n${segment(70, 'C')}\n#25=IFCRELNESTS('q',$,$,$,#20,(#24));
#50=IFCRELCONNECTSPORTS('j',$,$,$,#24,#31,#70);`);
    const between = elements.find(({ name }) => name === 'C')!;
    expect(between.ports.length).toBe(2);
    const [first, second] = between.ports.map((id) => ports[id]!);
    expect(first!.direction).toBe('sink');
    expect(ports[first!.connected[0]!]!.stepId).toBe(24);
    expect(ports[second!.connected[0]!]!.stepId).toBe(31);
    expect(ports.find(({ stepId }) => stepId === 24)!.connected).toEqual([first!.id]);
    expect(ports.map(({ id }, k) => id === k)).not.toContain(false);
  });
});

describe('systems', () => {
  const system = (id: number, name: string): string =>
    `#${id}=IFCDISTRIBUTIONSYSTEM('${name}',$,'${name}',$,'kind','long',.SEWAGE.);`;

  test('an element is in its systems and in those that they are part of', () => {
    const { elements, systems } =
      modelOfLines(`${segment(20, 'A')}\n${system(60, 'whole')}\n${system(61, 'part')}\n${system(62, 'else')}
#63=IFCRELASSIGNSTOGROUP('a',$,$,$,(#20),$,#61);\n#64=IFCRELASSIGNSTOGROUP('b',$,$,$,(#61),$,#60);`);
    expect(
      systems.map(({ name, longName, objectType, predefinedType }) => [name, longName, objectType, predefinedType]),
    ).toEqual(['whole', 'part', 'else'].map((name) => [name, 'long', 'kind', 'SEWAGE']));
    expect(elements[0]!.systems).toEqual([0, 1]);
  });

  test('IFC2X3 has names only', () => {
    const { systems } = modelOfLines("#60=IFCSYSTEM('s',$,'Waste',$,'Drainage');", { schema: 'IFC2X3' });
    expect(systems[0]).toMatchObject({ name: 'Waste', objectType: 'Drainage', longName: null, predefinedType: null });
  });

  test('parts of an assembly are in its system and on its storey', () => {
    const { elements, storeys } = modelOfLines(`${segment(20, 'A')}\n#30=IFCELEMENTASSEMBLY('x',$,'Pod',$,$,$,$,$,$,$);
#31=IFCRELAGGREGATES('r',$,$,$,#30,(#20));\n${system(60, 'S')}\n#63=IFCRELASSIGNSTOGROUP('a',$,$,$,(#30),$,#60);
#70=IFCBUILDINGSTOREY('l',$,'Level 1',$,$,$,$,$,.ELEMENT.,3.);\n#71=IFCRELCONTAINEDINSPATIALSTRUCTURE('c',$,$,$,(#30),#70);`);
    const pipe = elements.find(({ name }) => name === 'A')!;
    expect(pipe.systems).toEqual([0]);
    expect(storeys[pipe.storey!]!.name).toBe('Level 1');
  });
});

describe('storeys and spaces', () => {
  const storey = (id: number, name: string, placement: string, elevation: string): string =>
    `#${id}=IFCBUILDINGSTOREY('${name}',$,'${name}',$,$,${placement},$,$,.ELEMENT.,${elevation});`;
  const placed = (id: number, z: string): string =>
    `#${id}=IFCLOCALPLACEMENT($,#${id + 1});\n#${id + 1}=IFCAXIS2PLACEMENT3D(#${id + 2},$,$);\n#${id + 2}=IFCCARTESIANPOINT((0.,0.,${z}));`;

  test('elevation by the placement, else as stated; lowest first', () => {
    const { storeys } = modelOfLines(
      `${storey(20, 'top', '#30', '0.')}\n${placed(30, '6.')}\n${storey(21, 'cellar', '$', '-3.')}`,
    );
    expect(storeys.map(({ name, elevation }) => [name, elevation])).toEqual([
      ['cellar', -3],
      ['top', 6],
    ]);
  });

  test('all placements at one height: the stated elevations hold', () => {
    const { storeys } = modelOfLines(
      `${storey(20, 'two', '#30', '3.')}\n${placed(30, '0.')}\n${storey(21, 'one', '#40', '0.')}\n${placed(40, '0.')}`,
    );
    expect(storeys.map(({ name, elevation }) => [name, elevation])).toEqual([
      ['one', 0],
      ['two', 3],
    ]);
  });

  test('a thing in a space is on the storey of the space', () => {
    const { elements, spaces } = modelOfLines(`${segment(20, 'A')}\n${storey(60, 'one', '$', '0.')}
#61=IFCSPACE('s',$,'101',$,$,$,$,'Bathroom',.ELEMENT.,.INTERNAL.,$);\n#62=IFCRELAGGREGATES('a',$,$,$,#60,(#61));
#63=IFCRELCONTAINEDINSPATIALSTRUCTURE('c',$,$,$,(#20),#61);`);
    expect(elements[0]).toMatchObject({ storey: 0, space: 0 });
    expect(spaces[0]).toMatchObject({ name: '101', longName: 'Bathroom', storey: 0, box: null });
  });
});

describe('materials and classifications', () => {
  test('a name out of every kind of material', () => {
    for (const [kind, lines] of [
      ['material', "#60=IFCMATERIAL('PVC',$,$);"],
      ['list', "#60=IFCMATERIALLIST((#61));\n#61=IFCMATERIAL('PVC',$,$);"],
      [
        'profile set usage',
        "#60=IFCMATERIALPROFILESETUSAGE(#61,$,$);\n#61=IFCMATERIALPROFILESET('x',$,(#62),$);\n#62=IFCMATERIALPROFILE('y',$,#63,$,$,$);\n#63=IFCMATERIAL('PVC',$,$);",
      ],
      [
        'constituents',
        "#60=IFCMATERIALCONSTITUENTSET('x',$,(#62));\n#62=IFCMATERIALCONSTITUENT('y',$,#63,$,$);\n#63=IFCMATERIAL('PVC',$,$);",
      ],
    ] as const) {
      const { elements } = modelOfLines(
        `${segment(20, 'A')}\n#50=IFCRELASSOCIATESMATERIAL('m',$,$,$,(#20),#60);\n${lines}`,
      );
      expect([kind, elements[0]!.material]).toEqual([kind, 'PVC']);
    }
  });

  test('the reference, climbed to its system', () => {
    const { elements } = modelOfLines(`${segment(20, 'A')}\n#50=IFCRELASSOCIATESCLASSIFICATION('m',$,$,$,(#20),#60);
#60=IFCCLASSIFICATIONREFERENCE($,'Pr_40','Urinals',#61,$,$);\n#61=IFCCLASSIFICATIONREFERENCE($,'Pr',$,#62,$,$);\n#62=IFCCLASSIFICATION($,$,$,'Uniclass',$,$,$);`);
    expect(elements[0]!.classifications).toEqual(['Uniclass:Pr_40 Urinals']);
  });
});

describe('walls, slabs, roofs', () => {
  const body = `#70=IFCPRODUCTDEFINITIONSHAPE($,$,(#71));\n#71=IFCSHAPEREPRESENTATION($,'Body','SweptSolid',(#100));
#100=IFCEXTRUDEDAREASOLID(#101,$,#112,3.);\n#101=IFCRECTANGLEPROFILEDEF(.AREA.,$,$,4.,0.2);\n#112=IFCDIRECTION((0.,0.,1.));`;

  for (const [schema, wall] of [
    ['IFC2X3', "#20=IFCWALLSTANDARDCASE('w',$,'W',$,$,$,#70,$);"],
    ['IFC4', "#20=IFCWALL('w',$,'W',$,$,$,#70,$,.STANDARD.);"],
  ] as const) {
    test(`${schema}: layers, box, outline, what the common set says`, () => {
      const { walls } = modelOfLines(
        `${wall}\n${body}\n#50=IFCRELASSOCIATESMATERIAL('m',$,$,$,(#20),#51);\n#51=IFCMATERIALLAYERSETUSAGE(#52,.AXIS2.,.POSITIVE.,0.);
#52=IFCMATERIALLAYERSET((#53,#54),'x');\n#53=IFCMATERIALLAYER(#55,0.15,$);\n#54=IFCMATERIALLAYER($,0.05,.T.);\n#55=IFCMATERIAL('Brick');
#60=IFCPROPERTYSET('s',$,'Pset_WallCommon',$,(#61,#62));\n#61=IFCPROPERTYSINGLEVALUE('LoadBearing',$,IFCBOOLEAN(.T.),$);
#62=IFCPROPERTYSINGLEVALUE('IsExternal',$,IFCBOOLEAN(.F.),$);\n#63=IFCRELDEFINESBYPROPERTIES('r',$,$,$,(#20),#60);`,
        { schema },
      );
      expect(walls[0]).toMatchObject({
        stepId: 20,
        layers: [
          { name: 'Brick', thickness: 0.15 },
          { name: null, thickness: 0.05 },
        ],
        loadBearing: true,
        external: false,
        box: { min: [-2, -0.1, 0], max: [2, 0.1, 3] },
        outline: [
          [-2, -0.1, 0],
          [2, -0.1, 0],
          [2, 0.1, 0],
          [-2, 0.1, 0],
        ],
      });
    });
  }

  test('a slab that is a roof stands among the roofs', () => {
    const { slabs, roofs } = modelOfLines(
      "#20=IFCSLAB('a',$,$,$,$,$,$,$,.FLOOR.);\n#21=IFCSLAB('b',$,$,$,$,$,$,$,.ROOF.);\n#19=IFCROOF('c',$,$,$,$,$,$,$,.FLAT_ROOF.);",
    );
    expect(slabs.map(({ globalId }) => globalId)).toEqual(['a']);
    expect(roofs.map(({ globalId, predefinedType }) => [globalId, predefinedType])).toEqual([
      ['c', 'FLAT_ROOF'],
      ['b', 'ROOF'],
    ]);
  });
});

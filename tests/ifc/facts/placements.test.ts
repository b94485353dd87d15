import { describe, expect, test } from 'vitest';
import { modelOfLines, pipeOf, rounded } from '../read-one.ts';

const pipe = `#100=IFCEXTRUDEDAREASOLID(#101,$,#112,2.);
#101=IFCCIRCLEPROFILEDEF(.AREA.,$,$,0.05);
#112=IFCDIRECTION((0.,0.,1.));`;

describe('a placement within a placement', () => {
  test('the pipe stands where the chain puts it: z of the second along x of the first', () => {
    const { centreLine, origin } = pipeOf(pipe, {
      placement: `#60=IFCLOCALPLACEMENT(#61,#62);
#61=IFCLOCALPLACEMENT($,#63);
#62=IFCAXIS2PLACEMENT3D(#64,#65,#66);
#63=IFCAXIS2PLACEMENT3D(#67,$,#68);
#64=IFCCARTESIANPOINT((1.,0.,0.));
#65=IFCDIRECTION((5.,0.,0.));
#66=IFCDIRECTION((0.,1.,0.));
#67=IFCCARTESIANPOINT((100.,200.,3.));
#68=IFCDIRECTION((0.,1.,0.));`,
    });
    expect(rounded([origin!])).toEqual([[100, 201, 3]]);
    expect(rounded(centreLine!.points)).toEqual([
      [100, 201, 3],
      [100, 203, 3],
    ]);
  });

  test('x is made to stand at right angles to z', () => {
    const { centreLine } = pipeOf(pipe.replace('IFCDIRECTION((0.,0.,1.))', 'IFCDIRECTION((1.,0.,0.))'), {
      placement: `#60=IFCLOCALPLACEMENT($,#62);\n#62=IFCAXIS2PLACEMENT3D(#64,#65,#66);
#64=IFCCARTESIANPOINT((0.,0.,0.));\n#65=IFCDIRECTION((0.,0.,1.));\n#66=IFCDIRECTION((1.,0.,7.));`,
    });
    expect(rounded(centreLine!.points)).toEqual([
      [0, 0, 0],
      [2, 0, 0],
    ]);
  });

  test('without a placement a product stands in the coordinates of the world, without an origin', () => {
    const { centreLine, origin } = pipeOf(pipe, {
      placement: "#60=IFCPERSON($,$,$,$,$,$,$,$);\n#50=IFCPIPESEGMENT('pipe',$,'P',$,$,$,#70,$,$);",
    });
    expect(origin).toBeNull();
    expect(rounded(centreLine!.points)).toEqual([
      [0, 0, 0],
      [0, 0, 2],
    ]);
  });

  test('a product placed on an axis placement directly', () => {
    const { origin } = pipeOf(pipe, {
      placement: '#60=IFCAXIS2PLACEMENT3D(#61,$,$);\n#61=IFCCARTESIANPOINT((4.,5.,6.));',
    });
    expect(origin).toEqual([4, 5, 6]);
  });

  test('a linear placement by the coordinates that it states', () => {
    const { origin } = pipeOf(pipe, {
      placement:
        '#60=IFCLINEARPLACEMENT($,#64,#61);\n#61=IFCAXIS2PLACEMENT3D(#62,$,$);\n#62=IFCCARTESIANPOINT((4.,5.,6.));\n#64=IFCAXIS2PLACEMENTLINEAR($,$,$);',
    });
    expect(origin).toEqual([4, 5, 6]);
  });

  test('150 placements deep is followed, 250 deep is said to be endless', () => {
    const chain = (depth: number): string =>
      Array.from(
        { length: depth },
        (_, k) => `#${1000 + k}=IFCLOCALPLACEMENT(${k + 1 < depth ? `#${1001 + k}` : '$'},#62);`,
      ).join('\n');
    const step =
      '#60=IFCLOCALPLACEMENT(#1000,#62);\n#62=IFCAXIS2PLACEMENT3D(#64,$,$);\n#64=IFCCARTESIANPOINT((0.,0.,1.));';
    expect(pipeOf(pipe, { placement: `${step}\n${chain(150)}` }).origin).toEqual([0, 0, 151]);
    expect(pipeOf(pipe, { placement: `${step}\n${chain(250)}` }).origin).toBeNull();
  });

  test('a placement that comes back to itself: no place, one finding, and the element is still there', () => {
    const { elements, findings } = modelOfLines(`#50=IFCPIPESEGMENT('a',$,'P',$,$,#60,$,$,$);
#60=IFCLOCALPLACEMENT(#61,#62);\n#61=IFCLOCALPLACEMENT(#60,#62);\n#62=IFCAXIS2PLACEMENT3D(#64,$,$);\n#64=IFCCARTESIANPOINT((0.,0.,1.));`);
    expect(elements[0]!.origin).toBeNull();
    expect(findings.map(({ code, facts }) => [code, facts.problem, facts.ids])).toEqual([
      ['file-damaged', 'endless-placement', ['#60']],
    ]);
  });
});

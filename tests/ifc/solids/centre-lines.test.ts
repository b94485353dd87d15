import { describe, expect, test } from 'vitest';
import type { CentreLine } from '../../../src/model/model.ts';
import { pipeOf, rounded } from '../read-one.ts';

// Truth by hand: each shape is written so that its axis and radii can be read off the lines.

const point = (id: number, ...at: number[]): string => `#${id}=IFCCARTESIANPOINT((${at.map(real).join(',')}));`;
const direction = (id: number, ...way: number[]): string => `#${id}=IFCDIRECTION((${way.map(real).join(',')}));`;
const real = (value: number): string => (Number.isInteger(value) ? `${value}.` : String(value));
const atOrigin = `#110=IFCAXIS2PLACEMENT3D(#111,$,$);\n${point(111, 0, 0, 0)}\n${direction(112, 0, 0, 1)}`;

interface Case {
  readonly what: string;
  readonly lines: string;
  readonly points: number[][];
  readonly outer: number | null;
  readonly inner?: number | null;
  readonly ground: CentreLine['ground'];
  readonly axis?: string;
}

const cases: readonly Case[] = [
  {
    what: 'an extruded circle',
    lines: `#100=IFCEXTRUDEDAREASOLID(#101,#110,#112,2.);\n#101=IFCCIRCLEPROFILEDEF(.AREA.,$,$,0.05);\n${atOrigin}`,
    points: [
      [0, 0, 0],
      [0, 0, 2],
    ],
    outer: 0.1,
    ground: 'extrusion',
  },
  {
    what: 'a hollow circle: its radius is the outer one; the profile stands off its centre',
    lines: `#100=IFCEXTRUDEDAREASOLID(#101,#110,#112,2.);\n#101=IFCCIRCLEHOLLOWPROFILEDEF(.AREA.,$,#102,0.05,0.005);
#102=IFCAXIS2PLACEMENT2D(#103,$);\n${point(103, 0.3, 0.4)}\n${atOrigin}`,
    points: [
      [0.3, 0.4, 0],
      [0.3, 0.4, 2],
    ],
    outer: 0.1,
    inner: 0.09,
    ground: 'extrusion',
  },
  {
    what: 'an extrusion in a turned placement: local z along world x',
    lines: `#100=IFCEXTRUDEDAREASOLID(#101,#110,#112,2.);\n#101=IFCCIRCLEPROFILEDEF(.AREA.,$,$,0.05);
#110=IFCAXIS2PLACEMENT3D(#111,#113,#114);\n${point(111, 1, 2, 3)}\n${direction(112, 0, 0, 1)}\n${direction(113, 1, 0, 0)}\n${direction(114, 0, 1, 0)}`,
    points: [
      [1, 2, 3],
      [3, 2, 3],
    ],
    outer: 0.1,
    ground: 'extrusion',
  },
  {
    what: 'a profile of arcs that is round: four quarter circles',
    lines: `#100=IFCEXTRUDEDAREASOLID(#101,#110,#112,1.);\n#101=IFCARBITRARYCLOSEDPROFILEDEF(.AREA.,$,#102);
#102=IFCINDEXEDPOLYCURVE(#103,(IFCARCINDEX((1,2,3)),IFCARCINDEX((3,4,1))),.F.);
#103=IFCCARTESIANPOINTLIST2D(((0.05,0.),(0.,0.05),(-0.05,0.),(0.,-0.05)));\n${atOrigin}`,
    points: [
      [0, 0, 0],
      [0, 0, 1],
    ],
    outer: 0.1,
    ground: 'extrusion',
  },
  {
    what: 'a ring of two trimmed circles as a profile with a void',
    lines: `#100=IFCEXTRUDEDAREASOLID(#101,#110,#112,1.);\n#101=IFCARBITRARYPROFILEDEFWITHVOIDS(.AREA.,$,#102,(#103));
#102=IFCCIRCLE(#104,0.05);\n#103=IFCCIRCLE(#104,0.04);\n#104=IFCAXIS2PLACEMENT2D(#105,$);\n${point(105, 0, 0)}\n${atOrigin}`,
    points: [
      [0, 0, 0],
      [0, 0, 1],
    ],
    outer: 0.1,
    inner: 0.08,
    ground: 'extrusion',
  },
  {
    what: 'a disk swept along a polyline',
    lines: `#100=IFCSWEPTDISKSOLID(#101,0.05,0.045,$,$);\n#101=IFCPOLYLINE((#102,#103,#104));
${point(102, 0, 0, 0)}\n${point(103, 1, 0, 0)}\n${point(104, 1, 2, 0)}`,
    points: [
      [0, 0, 0],
      [1, 0, 0],
      [1, 2, 0],
    ],
    outer: 0.1,
    inner: 0.09,
    ground: 'swept-disk',
  },
  {
    what: 'the parameters 0 and 1 that many programs write mean all of a polyline',
    lines: `#100=IFCSWEPTDISKSOLID(#101,0.05,$,0.,1.);\n#101=IFCPOLYLINE((#102,#103,#104));
${point(102, 0, 0, 0)}\n${point(103, 1, 0, 0)}\n${point(104, 1, 2, 0)}`,
    points: [
      [0, 0, 0],
      [1, 0, 0],
      [1, 2, 0],
    ],
    outer: 0.1,
    ground: 'swept-disk',
  },
  {
    what: 'other parameters of a polyline count its legs: from the middle of the first to the end of the second',
    lines: `#100=IFCSWEPTDISKSOLID(#101,0.05,$,0.5,2.);\n#101=IFCPOLYLINE((#102,#103,#104,#105));
${point(102, 0, 0, 0)}\n${point(103, 1, 0, 0)}\n${point(104, 1, 2, 0)}\n${point(105, 5, 2, 0)}`,
    points: [
      [0.5, 0, 0],
      [1, 0, 0],
      [1, 2, 0],
    ],
    outer: 0.1,
    ground: 'swept-disk',
  },
  {
    what: 'a line between two parameters, its vector two metres long',
    lines: `#100=IFCSWEPTDISKSOLID(#101,0.05,$,0.5,2.);\n#101=IFCLINE(#102,#103);\n${point(102, 1, 0, 0)}
#103=IFCVECTOR(#104,2.);\n${direction(104, 0, 1, 0)}`,
    points: [
      [1, 1, 0],
      [1, 4, 0],
    ],
    outer: 0.1,
    ground: 'swept-disk',
  },
  {
    what: 'a trimmed line',
    lines: `#100=IFCSWEPTDISKSOLID(#101,0.05,$,$,$);
#101=IFCTRIMMEDCURVE(#102,(IFCPARAMETERVALUE(0.)),(#105,IFCPARAMETERVALUE(9.)),.T.,.CARTESIAN.);
#102=IFCLINE(#103,#106);\n#106=IFCVECTOR(#104,1.);\n${point(103, 0, 0, 1)}\n${direction(104, 0, 0, 1)}\n${point(105, 0, 0, 3)}`,
    points: [
      [0, 0, 1],
      [0, 0, 3],
    ],
    outer: 0.1,
    ground: 'swept-disk',
  },
  {
    what: 'a composite curve whose second part runs backwards',
    lines: `#100=IFCSWEPTDISKSOLID(#101,0.05,$,$,$);\n#101=IFCCOMPOSITECURVE((#102,#103),.F.);
#102=IFCCOMPOSITECURVESEGMENT(.CONTINUOUS.,.T.,#104);\n#103=IFCCOMPOSITECURVESEGMENT(.CONTINUOUS.,.F.,#105);
#104=IFCPOLYLINE((#106,#107));\n#105=IFCPOLYLINE((#108,#107));\n${point(106, 0, 0, 0)}\n${point(107, 1, 0, 0)}\n${point(108, 1, 1, 0)}`,
    points: [
      [0, 0, 0],
      [1, 0, 0],
      [1, 1, 0],
    ],
    outer: 0.1,
    ground: 'swept-disk',
  },
  {
    what: 'a mapped item that doubles its shape',
    lines: `#100=IFCMAPPEDITEM(#101,#102);\n#101=IFCREPRESENTATIONMAP(#110,#103);
#102=IFCCARTESIANTRANSFORMATIONOPERATOR3D($,$,#104,2.,$);\n${point(104, 5, 0, 0)}
#103=IFCSHAPEREPRESENTATION($,'Body','SweptSolid',(#105));\n#105=IFCEXTRUDEDAREASOLID(#106,#110,#112,1.);
#106=IFCCIRCLEHOLLOWPROFILEDEF(.AREA.,$,$,0.05,0.01);\n${atOrigin}`,
    points: [
      [5, 0, 0],
      [5, 0, 2],
    ],
    outer: 0.2,
    inner: 0.16,
    ground: 'extrusion',
  },
  {
    what: 'a boolean result: the first operand is the pipe',
    lines: `#100=IFCBOOLEANCLIPPINGRESULT(.DIFFERENCE.,#101,#102);\n#101=IFCBOOLEANRESULT(.DIFFERENCE.,#103,#102);
#102=IFCHALFSPACESOLID(#104,.F.);\n#104=IFCPLANE(#110);\n#103=IFCEXTRUDEDAREASOLID(#105,#110,#112,2.);
#105=IFCCIRCLEPROFILEDEF(.AREA.,$,$,0.05);\n${atOrigin}`,
    points: [
      [0, 0, 0],
      [0, 0, 2],
    ],
    outer: 0.1,
    ground: 'extrusion',
  },
  {
    what: 'a CSG cylinder',
    lines: `#100=IFCCSGSOLID(#101);\n#101=IFCRIGHTCIRCULARCYLINDER(#110,3.,0.05);\n${atOrigin}`,
    points: [
      [0, 0, 0],
      [0, 0, 3],
    ],
    outer: 0.1,
    ground: 'extrusion',
  },
  {
    what: 'an Axis where the body is a duct: the line is there, the diameter is not',
    lines: `#100=IFCEXTRUDEDAREASOLID(#101,#110,#112,2.);\n#101=IFCRECTANGLEPROFILEDEF(.AREA.,$,$,0.2,0.1);\n${atOrigin}
#120=IFCPOLYLINE((#121,#122));\n${point(121, 0, 0, 0)}\n${point(122, 0, 0, 2)}`,
    points: [
      [0, 0, 0],
      [0, 0, 2],
    ],
    outer: null,
    ground: 'axis',
    axis: '#120',
  },
  {
    what: 'a flat Axis curve has z = 0',
    lines: `#100=IFCEXTRUDEDAREASOLID(#101,#110,#112,2.);\n#101=IFCRECTANGLEPROFILEDEF(.AREA.,$,$,0.2,0.1);\n${atOrigin}
#120=IFCPOLYLINE((#121,#122));\n${point(121, 1, 0)}\n${point(122, 4, 4)}`,
    points: [
      [1, 0, 0],
      [4, 4, 0],
    ],
    outer: null,
    ground: 'axis',
    axis: '#120',
  },
];

describe('the centre line of a pipe', () => {
  for (const { what, lines, points, outer, inner = null, ground, axis = '' } of cases) {
    test(what, () => {
      const { centreLine } = pipeOf(lines, { axis });
      expect(centreLine).not.toBeNull();
      expect(rounded(centreLine!.points)).toEqual(points);
      expect(centreLine!.ground).toBe(ground);
      if (outer === null) expect(centreLine!.outerDiameter).toBeNull();
      else expect(centreLine!.outerDiameter).toBeCloseTo(outer, 9);
      if (inner === null) expect(centreLine!.innerDiameter).toBeNull();
      else expect(centreLine!.innerDiameter).toBeCloseTo(inner, 9);
    });
  }

  test('an extruded rectangle is a duct: no centre line', () => {
    const lines = `#100=IFCEXTRUDEDAREASOLID(#101,#110,#112,2.);\n#101=IFCRECTANGLEPROFILEDEF(.AREA.,$,$,0.2,0.1);\n${atOrigin}`;
    expect(pipeOf(lines).centreLine).toBeNull();
  });

  test('a square with rounded corners is no circle, nor is a flat arc', () => {
    const square = `#100=IFCEXTRUDEDAREASOLID(#101,#110,#112,2.);\n#101=IFCARBITRARYCLOSEDPROFILEDEF(.AREA.,$,#102);
#102=IFCPOLYLINE((#120,#121,#122,#123,#124,#125,#126,#127,#120));
${[
  [0.1, 0.09],
  [0.09, 0.1],
  [-0.09, 0.1],
  [-0.1, 0.09],
  [-0.1, -0.09],
  [-0.09, -0.1],
  [0.09, -0.1],
  [0.1, -0.09],
]
  .map(([x, y], k) => point(120 + k, x!, y!))
  .join('\n')}\n${atOrigin}`;
    expect(pipeOf(square).centreLine).toBeNull();
  });

  test('an arc in a polycurve: a quarter of a metre is 1.5708 m long, to a thousandth', () => {
    const lines = `#100=IFCSWEPTDISKSOLID(#101,0.05,$,$,$);\n#101=IFCINDEXEDPOLYCURVE(#102,(IFCARCINDEX((1,2,3))),.F.);
#102=IFCCARTESIANPOINTLIST3D(((1.,0.,0.),(0.70710678118,0.70710678118,0.),(0.,1.,0.)));`;
    const { points } = pipeOf(lines).centreLine!;
    const length = points
      .slice(1)
      .reduce((sum, p, k) => sum + Math.hypot(...p.map((one, i) => one - points[k]![i]!)), 0);
    expect(Math.abs(length - Math.PI / 2)).toBeLessThan(0.0016);
    for (const [x, y] of points) expect(Math.hypot(x, y)).toBeCloseTo(1, 9);
  });

  test('a trimmed circle by its angles, in degrees where the file says so', () => {
    const lines = `#100=IFCSWEPTDISKSOLID(#101,0.05,$,$,$);
#101=IFCTRIMMEDCURVE(#102,(IFCPARAMETERVALUE(0.)),(IFCPARAMETERVALUE(1.5707963267948966)),.T.,.PARAMETER.);
#102=IFCCIRCLE(#110,1.);\n${atOrigin}`;
    const { points } = pipeOf(lines).centreLine!;
    expect(rounded([points[0]!, points.at(-1)!])).toEqual([
      [1, 0, 0],
      [0, 1, 0],
    ]);
  });

  test('the same pipe in millimetres, feet and inches', () => {
    for (const [unit, metres] of [
      ['MILLIMETRE', 0.001],
      ['FOOT', 0.3048],
      ['INCH', 0.0254],
    ] as const) {
      const lines = `#100=IFCEXTRUDEDAREASOLID(#101,#110,#112,1000.);\n#101=IFCCIRCLEPROFILEDEF(.AREA.,$,$,50.);\n${atOrigin}`;
      const { centreLine } = pipeOf(lines, { unit });
      expect(centreLine!.points[1]![2]).toBeCloseTo(1000 * metres, 9);
      expect(centreLine!.outerDiameter).toBeCloseTo(100 * metres, 9);
    }
  });

  test('parts end to end make one pipe; a socket makes it longer, not wider', () => {
    const lines = `#100=IFCMAPPEDITEM(#101,$);\n#101=IFCREPRESENTATIONMAP(#110,#102);
#102=IFCSHAPEREPRESENTATION($,'Body','SweptSolid',(#103,#104));
#103=IFCEXTRUDEDAREASOLID(#105,#110,#112,2.);\n#105=IFCCIRCLEPROFILEDEF(.AREA.,$,$,0.05);
#104=IFCEXTRUDEDAREASOLID(#106,#113,#112,0.1);\n#106=IFCCIRCLEPROFILEDEF(.AREA.,$,$,0.06);
#113=IFCAXIS2PLACEMENT3D(#114,$,$);\n${point(114, 0, 0, 1.95)}\n${atOrigin}`;
    const { centreLine } = pipeOf(lines);
    expect(rounded(centreLine!.points)).toEqual([
      [0, 0, 0],
      [0, 0, 2.05],
    ]);
    expect(centreLine!.outerDiameter).toBeCloseTo(0.1, 9);
  });

  test('a mapped item that contains itself gives no shape, and says so', () => {
    const lines = `#100=IFCMAPPEDITEM(#101,$);\n#101=IFCREPRESENTATIONMAP(#110,#102);
#102=IFCSHAPEREPRESENTATION($,'Body','MappedRepresentation',(#100,#100));\n${atOrigin}`;
    expect(pipeOf(lines).centreLine).toBeNull();
  });

  test('coordinates that are no numbers give no centre line', () => {
    const lines = `#100=IFCEXTRUDEDAREASOLID(#101,#110,#112,1.E999);\n#101=IFCCIRCLEPROFILEDEF(.AREA.,$,$,0.05);\n${atOrigin}`;
    expect(pipeOf(lines).centreLine).toBeNull();
  });
});

import { describe, expect, test } from 'vitest';
import { InputError } from '../../../src/findings/input-error.ts';
import { meshesOf } from '../../../src/ifc/shapes/meshes-of.ts';
import { projectLines, stepFile, utf8 } from '../step-file.ts';

const far = 24_525_600;
/** A pipe of 2 m upright at a far place, and one whose shape contains itself. */
const file = stepFile(`${projectLines('MILLIMETRE')}
#50=IFCPIPESEGMENT('a',$,'P',$,$,#60,#70,$,$);
#60=IFCLOCALPLACEMENT($,#61);
#61=IFCAXIS2PLACEMENT3D(#62,$,$);
#62=IFCCARTESIANPOINT((${far}000.,2000.,3000.));
#70=IFCPRODUCTDEFINITIONSHAPE($,$,(#71));
#71=IFCSHAPEREPRESENTATION($,'Body','SweptSolid',(#100));
#100=IFCEXTRUDEDAREASOLID(#101,#110,#112,2000.);
#101=IFCCIRCLEPROFILEDEF(.AREA.,$,$,50.);
#110=IFCAXIS2PLACEMENT3D(#111,$,$);
#111=IFCCARTESIANPOINT((0.,0.,0.));
#112=IFCDIRECTION((0.,0.,1.));
#150=IFCPIPESEGMENT('b',$,'Q',$,$,#60,#170,$,$);
#170=IFCPRODUCTDEFINITIONSHAPE($,$,(#171));
#171=IFCSHAPEREPRESENTATION($,'Body','MappedRepresentation',(#172));
#172=IFCMAPPEDITEM(#173,#175);
#173=IFCREPRESENTATIONMAP(#110,#171);
#175=IFCCARTESIANTRANSFORMATIONOPERATOR3D($,$,#111,1.,$);
#250=IFCPIPESEGMENT('c',$,'R',$,$,#60,#70,$,$);`);

describe('triangles of elements', () => {
  test('z up, in metres from the origin asked for, millimetres kept far from zero', async () => {
    const { value, findings } = await meshesOf('case.ifc', file, [50], { origin: [far, 2, 3] });
    expect(findings).toEqual([]);
    const [{ stepId, positions, indices }] = value as [(typeof value)[number]];
    expect(stepId).toBe(50);
    expect(indices.length % 3).toBe(0);
    expect(Math.max(...indices)).toBeLessThan(positions.length / 3);
    const along = (axis: number): number[] => Array.from(positions).filter((_, k) => k % 3 === axis);
    expect(Math.min(...along(2))).toBeCloseTo(0, 5);
    expect(Math.max(...along(2))).toBeCloseTo(2, 5);
    expect(Math.max(...along(0))).toBeCloseTo(0.05, 3);
    expect(Math.max(...along(1))).toBeLessThan(0.0501);
  });

  test('elements without a shape and ids of nothing are left out', async () => {
    const { value } = await meshesOf('case.ifc', file, [7, 999, 50], { origin: [0, 0, 0] });
    expect(value.map(({ stepId }) => stepId)).toEqual([50]);
  });

  test('a shape that breaks the engine gives a finding, and the others are drawn', async () => {
    const { value, findings } = await meshesOf('case.ifc', file, [150, 50, 250], { origin: [far, 0, 0] });
    expect(value.map(({ stepId }) => stepId)).toEqual([50, 250]);
    expect(findings.map(({ code, facts }) => [code, facts.problem, facts.ids])).toEqual([
      ['file-damaged', 'shape-unreadable', ['#150']],
    ]);
  });

  for (const [what, bytes] of [
    ['an empty file', new Uint8Array(0)],
    ['a text', utf8('hello')],
    ['a cut string', stepFile("#1=IFCWALL('a", { end: '' })],
  ] as const) {
    test(`${what} is refused`, async () => {
      await expect(meshesOf('case.ifc', bytes, [1], { origin: [0, 0, 0] })).rejects.toThrow(InputError);
      const { value } = await meshesOf('case.ifc', file, [50], { origin: [0, 0, 0] });
      expect(value.length).toBe(1);
    });
  }
});

import { readModel } from '../../src/ifc/open.ts';
import type { Element, Model } from '../../src/model/model.ts';
import { projectLines, stepFile } from './step-file.ts';

export const noDigest = (): string => '';

export const modelOf = (bytes: Uint8Array): Model => readModel([{ name: 'case.ifc', bytes }], noDigest);

/** The model of data lines after a project in metres; ids from #10 on are free. */
export const modelOfLines = (
  data: string,
  { schema = 'IFC4', unit = 'METRE' as Parameters<typeof projectLines>[0] } = {},
): Model => modelOf(stepFile(`${projectLines(unit)}\n${data}`, { schema }));

/**
 * One pipe segment whose body is the item #100 that the lines define; ids from #100 on are free. It stands at the
 * world's origin, or where `placement` (lines that define #60) puts it.
 */
export function pipeOf(
  lines: string,
  { placement = '#60=IFCLOCALPLACEMENT($,$);', unit = 'METRE' as Parameters<typeof projectLines>[0], axis = '' } = {},
): Element {
  const axisRep = axis === '' ? '' : `#73=IFCSHAPEREPRESENTATION($,'Axis','Curve3D',(${axis}));`;
  const model = modelOfLines(
    `#50=IFCPIPESEGMENT('pipe',$,'P',$,$,#60,#70,$,$);
${placement}
#70=IFCPRODUCTDEFINITIONSHAPE($,$,(#71${axis === '' ? '' : ',#73'}));
#71=IFCSHAPEREPRESENTATION($,'Body','SweptSolid',(#100));
${axisRep}
${lines}`,
    { unit },
  );
  return model.elements[0]!;
}

/** Coordinates to a hundredth of a millimetre, without minus zeros. */
export const rounded = (points: readonly (readonly number[])[]): number[][] =>
  points.map((point) => point.map((one) => Math.round(one * 1e5) / 1e5 + 0));

import { sketch } from './sketch.ts';
import { workedCase, workedText } from './worked-case.ts';
import { type IfcOptions, ifcOf } from './write-ifc.ts';

/** The models of sample-models/: each is a `.piping` text and the `.ifc` file that the writer makes of it. */
export const samples: readonly { readonly name: string; readonly options: Partial<IfcOptions> }[] = [
  { name: 'bathroom-group', options: { schema: 'IFC4', unit: 'm' } },
  { name: 'dwelling', options: { schema: 'IFC2X3', unit: 'ft' } },
  { name: 'five-storey-core', options: { schema: 'IFC4', unit: 'mm' } },
  { name: 'hall-circuit-vented', options: { schema: 'IFC4X3_ADD2', unit: 'm' } },
  { name: 'hall-wet-vented', options: { schema: 'IFC4', unit: 'mm' } },
  { name: 'school', options: { schema: 'IFC4', unit: 'mm' } },
  { name: 'sports-hall', options: { schema: 'IFC4', unit: 'm' } },
  { name: 'twelve-faults', options: { schema: 'IFC4X3_ADD2', unit: 'mm' } },
];

export const ifcOfSample = (piping: string, options: Partial<IfcOptions>): string => ifcOf(sketch(piping), options);

/** The file of a case of the open set, written as the case says. */
export function ifcOfWorked(name: string): string {
  const { schema, lengthUnit } = workedCase(name).drawn;
  return ifcOfSample(workedText(name, 'piping'), { schema, unit: lengthUnit });
}

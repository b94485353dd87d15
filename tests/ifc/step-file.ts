/** STEP text around data lines, as bytes (UTF-8). `unit`: the length unit's lines, metres where nothing is said. */
export function stepFile(data: string, { schema = 'IFC4', end = 'ENDSEC;\nEND-ISO-10303-21;\n' } = {}): Uint8Array {
  return utf8(`ISO-10303-21;
HEADER;
FILE_DESCRIPTION(('ViewDefinition [ReferenceView]'),'2;1');
FILE_NAME('case.ifc','2024-01-01T00:00:00',(''),(''),'','','');
FILE_SCHEMA(('${schema}'));
ENDSEC;
DATA;
${data}
${end}`);
}

export const utf8 = (text: string): Uint8Array => new TextEncoder().encode(text);
export const latin1 = (text: string): Uint8Array => Uint8Array.from(text, (one) => one.charCodeAt(0));

/** The project with one length unit: `METRE`, `MILLI METRE`, `FOOT` or `INCH`. Takes #1 to #9. */
export function projectLines(unit: 'METRE' | 'MILLIMETRE' | 'FOOT' | 'INCH' = 'METRE'): string {
  const si = (prefix: string): string => `#2=IFCSIUNIT(*,.LENGTHUNIT.,${prefix},.METRE.);`;
  const conversion = (factor: string): string =>
    `#2=IFCCONVERSIONBASEDUNIT(#3,.LENGTHUNIT.,'${unit}',#4);
#3=IFCDIMENSIONALEXPONENTS(1,0,0,0,0,0,0);
#4=IFCMEASUREWITHUNIT(IFCLENGTHMEASURE(${factor}),#5);
#5=IFCSIUNIT(*,.LENGTHUNIT.,$,.METRE.);`;
  const units = { METRE: si('$'), MILLIMETRE: si('.MILLI.'), FOOT: conversion('0.3048'), INCH: conversion('0.0254') };
  return `#1=IFCUNITASSIGNMENT((#2,#6));
${units[unit]}
#6=IFCSIUNIT(*,.PLANEANGLEUNIT.,$,.RADIAN.);
#7=IFCPROJECT('0000000000000000000001',$,'Case',$,$,$,$,$,#1);`;
}

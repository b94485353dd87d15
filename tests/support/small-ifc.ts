import { createHash } from 'node:crypto';

export const sha256 = (bytes: Uint8Array): Uint8Array => createHash('sha256').update(bytes).digest();
export const bytesOf = (text: string): Uint8Array => new Uint8Array(Buffer.from(text, 'latin1'));
export const textOf = (pieces: readonly Uint8Array[]): string => Buffer.concat(pieces).toString('latin1');

/** GlobalIds of the two pipes and the basin in `smallIfc`. */
export const pipeOne = '1Dr4inSmallModel0pipe1';
export const pipeTwo = '1Dr4inSmallModel0pipe2';
export const basin = '1Dr4inSmallModel0basin';

interface SmallIfc {
  readonly schema?: 'IFC2X3' | 'IFC4' | 'IFC4X3_ADD2';
  readonly eol?: string;
  /** Whether the file has an owner history; IFC2X3 files ought to, and some have none. */
  readonly owner?: boolean;
  /** Written in place of the GlobalId of the second pipe: `$`, or the first pipe's in quotes to double it. */
  readonly secondGlobalId?: string;
  readonly timeStamp?: string;
}

/** Two pipes and a basin in a building: pipes are #21 and #22, the basin is #31, the building #12, the largest id #40. */
export function smallIfc({
  schema = 'IFC4',
  eol = '\n',
  owner = schema === 'IFC2X3',
  secondGlobalId = `'${pipeTwo}'`,
  timeStamp = '2021-03-04T05:06:07',
}: SmallIfc = {}): string {
  const old = schema === 'IFC2X3';
  const by = owner ? '#5' : '$';
  const last = old ? '' : ',.RIGIDSEGMENT.';
  const pipe = old ? 'IFCFLOWSEGMENT' : 'IFCPIPESEGMENT';
  const fixture = old ? 'IFCFLOWTERMINAL' : 'IFCSANITARYTERMINAL';
  const history = old ? '#3,#4,$,.ADDED.,$,$,$,1600000000' : '#3,#4,$,.ADDED.,$,$,$,1600000000';
  return [
    'ISO-10303-21;',
    'HEADER;',
    "FILE_DESCRIPTION(('ViewDefinition [CoordinationView]'),'2;1');",
    `FILE_NAME('hall.ifc','${timeStamp}',(''),(''),'','','');`,
    `FILE_SCHEMA(('${schema}'));`,
    'ENDSEC;',
    'DATA;',
    ...(owner
      ? [
          "#1=IFCPERSON($,'Fitter',$,$,$,$,$,$);",
          "#2=IFCORGANIZATION($,'Office',$,$,$);",
          '#3=IFCPERSONANDORGANIZATION(#1,#2,$);',
          "#4=IFCAPPLICATION(#2,'1','Drawing program','DP');",
          `#5=IFCOWNERHISTORY(${history});`,
        ]
      : []),
    '#6=IFCSIUNIT(*,.LENGTHUNIT.,.MILLI.,.METRE.);',
    '#7=IFCUNITASSIGNMENT((#6));',
    `#11=IFCPROJECT('1Dr4inSmallModelProject',${by},'Hall',$,$,$,$,$,#7);`,
    `#12=IFCBUILDING('1Dr4inSmallModelBuildin',${by},'A text with ENDSEC; and #40= in it',$,$,$,$,$,.ELEMENT.,$,$,$);`,
    '/* a comment with ENDSEC; in it */',
    `#21=${pipe}('${pipeOne}',${by},'Pipe \\X2\\00BD\\X0\\',$,$,$,$,$${last});`,
    `#22= ${pipe} (${secondGlobalId},${by},'Pipe 2',$,$,$,$,$${last}) ;`,
    `#31=${fixture}('${basin}',${by},'Basin',$,$,$,$,$${old ? '' : ',.WASHHANDBASIN.'});`,
    `#40=IFCRELCONTAINEDINSPATIALSTRUCTURE('1Dr4inSmallModelContain',${by},$,$,(#21,#22,#31),#12);`,
    'ENDSEC;',
    'END-ISO-10303-21;',
    '',
  ].join(eol);
}

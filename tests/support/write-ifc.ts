import type { Vec3 } from '../../src/geometry/vector.ts';
import { draftOf } from './draft.ts';
import { draftPart } from './draft-part.ts';
import { writeBuilding, writeFabric } from './ifc-building.ts';
import { writePiping } from './ifc-piping.ts';
import { openSheet } from './ifc-sheet.ts';
import type { Sketch } from './sketch.ts';
import { type Ref, stepText } from './step-file.ts';

export type IfcSchema = 'IFC2X3' | 'IFC4' | 'IFC4X3_ADD2';
export type IfcUnit = 'm' | 'mm' | 'ft' | 'in';

export interface IfcOptions {
  readonly schema: IfcSchema;
  readonly unit: IfcUnit;
  readonly ports: boolean;
  readonly sizes: boolean;
  /** Degrees, seen from above, against the clock. */
  readonly turn: number;
  /** Metres. */
  readonly shift: Vec3;
  /** Metres of the site's own origin: the building stands back by as much, so that its place in the world is the same. */
  readonly site?: Vec3;
  /** A seed that shuffles and renumbers the lines; null: in the order written. */
  readonly shuffle: number | null;
  /** What the file holds, where a building comes in several; absent: all. Each has project, site, building, storeys. */
  readonly holds?: readonly IfcPart[];
}

export type IfcPart = 'architecture' | 'fixtures' | 'piping';

export const plainIfc: IfcOptions = {
  schema: 'IFC4',
  unit: 'm',
  ports: true,
  sizes: true,
  turn: 0,
  shift: [0, 0, 0],
  shuffle: null,
};

const everything: readonly IfcPart[] = ['architecture', 'fixtures', 'piping'];

/** The sketch as the text of an IFC file, ASCII only; the same for the same sketch and options. */
export function ifcOf(sketch: Sketch, options: Partial<IfcOptions> = {}): string {
  const settled = { ...plainIfc, ...options };
  const sheet = openSheet(sketch, settled);
  const { holds = everything } = settled;
  const hasArchitecture = holds.includes('architecture');
  const building = writeBuilding(sheet, settled, hasArchitecture);
  const fabric = hasArchitecture
    ? writeFabric(sheet, building).map(({ level, ref }) => ({ level: level.ref, ref }))
    : [];
  const piping = writePiping(sheet, draftPart(sketch, draftOf(sketch), holds), building);
  const contained = new Map<number, { readonly level: Ref; readonly refs: Ref[] }>();
  for (const { level, ref } of [...fabric, ...piping]) {
    const known = contained.get(level.ref);
    if (known === undefined) contained.set(level.ref, { level, refs: [ref] });
    else known.refs.push(ref);
  }
  for (const [index, { level, refs }] of [...contained.values()].entries())
    sheet.file.add(
      'IFCRELCONTAINEDINSPATIALSTRUCTURE',
      sheet.id('contains', String(index)),
      sheet.owner,
      null,
      null,
      refs,
      level,
    );
  const view = settled.schema === 'IFC2X3' ? 'CoordinationView' : 'ReferenceView_V1.2';
  const header = [
    `FILE_DESCRIPTION(('ViewDefinition [${view}]'),'2;1');`,
    `FILE_NAME(${stepText(sketch.title)},'2024-01-01T00:00:00',(''),('Drainwright sample'),'','Drainwright sample writer','');`,
    `FILE_SCHEMA(('${settled.schema}'));`,
  ];
  return sheet.file.render(header, settled.shuffle);
}

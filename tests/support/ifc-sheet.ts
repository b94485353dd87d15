import { cross, unit, type Vec3 } from '../../src/geometry/vector.ts';
import type { Sketch } from './sketch.ts';
import { globalIdOf } from './sketch-ids.ts';
import { type Ref, raw, StepFile, typed, word } from './step-file.ts';
import type { IfcOptions, IfcSchema, IfcUnit } from './write-ifc.ts';

/** The file while it is written: lines, units, contexts, and what differs between schemas. */
export interface IfcSheet {
  readonly file: StepFile;
  readonly sketch: Sketch;
  readonly schema: IfcSchema;
  readonly old: boolean;
  readonly ports: boolean;
  readonly sizes: boolean;
  /** Metres to the file's unit. */
  readonly long: (metres: number) => number;
  readonly owner: Ref | null;
  readonly units: Ref;
  readonly body: Ref;
  readonly axis: Ref;
  readonly context: Ref;
  id(...words: readonly string[]): string;
}

const metresOf: Readonly<Record<IfcUnit, number>> = { m: 1, mm: 0.001, ft: 0.3048, in: 0.0254 };

export function openSheet(sketch: Sketch, options: IfcOptions): IfcSheet {
  const file = new StepFile();
  const old = options.schema === 'IFC2X3';
  const metres = metresOf[options.unit];
  const long = (value: number) => value / metres;
  const owner = old ? ownerHistory(file) : null;
  const units = unitsOf(file, options.unit);
  const world = file.add('IFCAXIS2PLACEMENT3D', file.share('IFCCARTESIANPOINT', [0, 0, 0]), null, null);
  const context = file.add('IFCGEOMETRICREPRESENTATIONCONTEXT', null, 'Model', raw('3'), raw('1.E-06'), world, null);
  const sub = (name: string) =>
    file.add(
      'IFCGEOMETRICREPRESENTATIONSUBCONTEXT',
      name,
      'Model',
      raw('*'),
      raw('*'),
      raw('*'),
      raw('*'),
      context,
      null,
      word(name === 'Body' ? 'MODEL_VIEW' : 'GRAPH_VIEW'),
      null,
    );
  return {
    file,
    sketch,
    schema: options.schema,
    old,
    ports: options.ports,
    sizes: options.sizes,
    long,
    owner,
    units,
    body: sub('Body'),
    axis: sub('Axis'),
    context,
    id: (...words) => globalIdOf(sketch.title, ...words),
  };
}

/** IFC2X3 asks for an owner history on every rooted record; the date is fixed so that the bytes are. */
function ownerHistory(file: StepFile): Ref {
  const person = file.add('IFCPERSON', null, 'Drainwright sample', null, null, null, null, null, null);
  const firm = file.add('IFCORGANIZATION', null, 'Drainwright sample', null, null, null);
  const user = file.add('IFCPERSONANDORGANIZATION', person, firm, null);
  const program = file.add('IFCAPPLICATION', firm, '1', 'Drainwright sample writer', 'drainwright-sample');
  return file.add('IFCOWNERHISTORY', user, program, null, word('ADDED'), null, null, null, raw('1704067200'));
}

function unitsOf(file: StepFile, unitName: IfcUnit): Ref {
  const si = (type: string, prefix: string | null, name: string) =>
    file.add('IFCSIUNIT', raw('*'), word(type), prefix === null ? null : word(prefix), word(name));
  const metre = si('LENGTHUNIT', unitName === 'mm' ? 'MILLI' : null, 'METRE');
  const lengthUnit = ((): Ref => {
    if (unitName === 'm' || unitName === 'mm') return metre;
    const factor = file.add('IFCMEASUREWITHUNIT', typed('IFCLENGTHMEASURE', metresOf[unitName]), metre);
    const dimensions = file.add(
      'IFCDIMENSIONALEXPONENTS',
      raw('1'),
      raw('0'),
      raw('0'),
      raw('0'),
      raw('0'),
      raw('0'),
      raw('0'),
    );
    return file.add(
      'IFCCONVERSIONBASEDUNIT',
      dimensions,
      word('LENGTHUNIT'),
      unitName === 'ft' ? 'FOOT' : 'INCH',
      factor,
    );
  })();
  return file.add('IFCUNITASSIGNMENT', [
    lengthUnit,
    si('AREAUNIT', null, 'SQUARE_METRE'),
    si('VOLUMEUNIT', null, 'CUBIC_METRE'),
    si('PLANEANGLEUNIT', null, 'RADIAN'),
  ]);
}

export const point = ({ file, long }: IfcSheet, at: readonly number[]): Ref =>
  file.share('IFCCARTESIANPOINT', at.map(long));

export const direction = ({ file }: IfcSheet, way: Vec3): Ref => file.share('IFCDIRECTION', [...way]);

/** Local axes of something that runs along `z`: x level where that can be. */
export function axesAlong(z: Vec3): { readonly x: Vec3; readonly y: Vec3; readonly z: Vec3 } {
  const x: Vec3 = Math.abs(z[2]) > 0.99 ? unit(cross([0, 1, 0], z)) : unit(cross([0, 0, 1], z));
  return { x, y: cross(z, x), z };
}

export interface Axes {
  readonly z: Vec3;
  readonly x: Vec3;
}

/** Placement at a point of its parent's frame, unturned unless axes are given. */
export function placed(sheet: IfcSheet, parent: Ref | null, at: Vec3, axes?: Axes): Ref {
  const frame = sheet.file.add(
    'IFCAXIS2PLACEMENT3D',
    point(sheet, at),
    axes ? direction(sheet, axes.z) : null,
    axes ? direction(sheet, axes.x) : null,
  );
  return sheet.file.add('IFCLOCALPLACEMENT', parent, frame);
}

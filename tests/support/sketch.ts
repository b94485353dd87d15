import type { Vec3 } from '../../src/geometry/vector.ts';
import type { PipeSize } from './pipe-sizes.ts';
import type { FixtureDetails, FixtureWord } from './sketch-fixtures.ts';
import { readSketch } from './sketch-reader.ts';

/**
 * A piping and the building round it, as `sketch` reads it from the notation (sample-models/NOTATION.md). All in metres,
 * z up; lists stand in the order of their lines. Names are unique over nodes and pipes.
 */
export interface Sketch {
  readonly title: string;
  readonly storeys: readonly { readonly name: string; readonly elevation: number }[];
  readonly spaces: readonly SketchSpace[];
  readonly walls: readonly SketchWall[];
  readonly slabs: readonly SketchFabric[];
  readonly roofs: readonly SketchFabric[];
  readonly systems: readonly SketchSystem[];
  readonly nodes: ReadonlyMap<string, SketchNode>;
  readonly pipes: readonly SketchPipe[];
  readonly parts: readonly SketchPart[];
}

export interface SketchNode {
  readonly name: string;
  readonly at: Vec3;
  /** Index into `storeys`; null before the first. */
  readonly storey: number | null;
  /** Pipe ends meet here without a fitting. */
  readonly bare: boolean;
  /** The fitting is left out: pipes end where it would begin, and nothing joins them. */
  readonly missing: boolean;
}

export type SketchMedium = 'drain' | 'vent' | 'rain' | 'supply' | 'pipe';

export interface SketchPipe {
  readonly name: string;
  readonly medium: SketchMedium;
  readonly size: PipeSize;
  readonly material: string;
  /** Nodes in the order typed: drains downstream, vents toward the sky. Two, or more for one solid that runs past nodes. */
  readonly nodes: readonly string[];
  readonly storey: number | null;
  /** A slope that the designer states against or instead of the drawn one, m/m; null: the drawn one is stated. */
  readonly states: number | null;
  /** What tells the size: its properties and shape; its type name alone; nothing. Without a shape only the axis is drawn. */
  readonly sized: 'plainly' | 'by name' | 'nowhere';
  /** Drawn a second time at the same place, joined to nothing. */
  readonly twice: boolean;
  /** Its own ports tell the flow the wrong way round. */
  readonly turned: boolean;
}

export type SketchPart = SketchFixture | SketchFitting;

export interface SketchFixture {
  readonly is: 'fixture';
  /** Also the name of the node at its outlet. */
  readonly name: string;
  readonly word: FixtureWord;
  readonly details: FixtureDetails;
  readonly trap: PipeSize | null;
  /** Flood level rim over the storey's floor, metres. */
  readonly rim: number;
  /** Where the back of the body turns: the side of its wall. */
  readonly back: 'north' | 'south' | 'east' | 'west';
  /** Type name, where the designer's own shall stand. */
  readonly titled: string | null;
  readonly reading: string | null;
  readonly line: number;
}

export interface SketchFitting {
  readonly is: PartWord;
  readonly name: string;
  readonly size: PipeSize | null;
  readonly titled: string | null;
  readonly line: number;
}

export type PartWord =
  | 'trap'
  | 'cleanout'
  | 'terminal'
  | 'admittance-valve'
  | 'sewer'
  | 'manhole'
  | 'sump'
  | 'interceptor'
  | 'cap'
  | 'backwater-valve'
  | 'roof-drain';

export interface SketchSystem {
  readonly medium: SketchMedium;
  readonly name: string;
  /** IFC4 predefined type: SEWAGE, VENT, RAINWATER … */
  readonly predefined: string;
}

export interface SketchSpace {
  readonly name: string;
  readonly storey: number | null;
  readonly min: Vec3;
  readonly max: Vec3;
}

export interface SketchFabric {
  readonly name: string;
  readonly storey: number | null;
  readonly min: Vec3;
  readonly max: Vec3;
}

export interface SketchWall {
  readonly name: string;
  readonly storey: number | null;
  /** Axis at the wall's foot, in the middle of its thickness. */
  readonly from: Vec3;
  readonly to: Vec3;
  readonly height: number;
  /** From the left of the axis to its right, seen along it. */
  readonly layers: readonly { readonly name: string; readonly thickness: number }[];
  readonly loadBearing: boolean | null;
  readonly external: boolean | null;
}

/** Reads the notation. A line that cannot be read is an InputError that names it. */
export function sketch(text: string): Sketch {
  return readSketch(text);
}

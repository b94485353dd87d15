import type { Finding } from '../findings/finding.ts';
import type { Box, Vec3 } from '../geometry/vector.ts';
import type { Metres } from '../units/quantity.ts';

/** Dense index into `Model.elements`, and so on for the others. Branded so that no two kinds of id mix. */
export type ElementId = number & { readonly __element: true };
export type PortId = number & { readonly __port: true };
export type SystemId = number & { readonly __system: true };
export type StoreyId = number & { readonly __storey: true };
export type SpaceId = number & { readonly __space: true };

/**
 * The building as plain facts: what the files say, in the trade's words and SI units, unjudged.
 * Elements stand in file order, then by STEP id; every list keeps that order.
 */
export interface Model {
  readonly files: readonly SourceFile[];
  readonly elements: readonly Element[];
  readonly ports: readonly Port[];
  readonly systems: readonly System[];
  /** Lowest first; equal elevations by GlobalId. */
  readonly storeys: readonly Storey[];
  readonly spaces: readonly Space[];
  readonly walls: readonly Wall[];
  readonly slabs: readonly Fabric[];
  readonly roofs: readonly Fabric[];
  /** What the reader had to say: damaged records, texts, units. */
  readonly findings: readonly Finding[];
}

export interface SourceFile {
  /** Base name, never a path. */
  readonly name: string;
  /** Over the bytes without our own block. */
  readonly sha256: string;
  /** As written in the file: `IFC4X3_ADD2`. */
  readonly schema: string;
  readonly lengthUnit: { readonly name: string; readonly metres: number };
  /** Plain sentences on damage and oddities that concern the whole file (cut off, pre-release schema, bad bytes). */
  readonly remarks: readonly string[];
  /** Of several files: its coordinates lie elsewhere than the building, so that nothing of it takes part. */
  readonly isApart?: boolean;
}

/**
 * What an element is by its IFC class: `segment` pipe segment, `fitting` pipe fitting, `terminal` sanitary, waste,
 * stack or plain flow terminal (and appliances that may drain), `valve` valves and flow controllers, `chamber`
 * distribution chambers, `treatment` interceptors, tanks and pumps, `other` every distribution element that carries
 * no water by gravity (ducts, cables, heaters, electrical): counted, never joined.
 */
export type ElementClass = 'segment' | 'fitting' | 'terminal' | 'valve' | 'chamber' | 'treatment' | 'other';

export interface Element {
  readonly id: ElementId;
  readonly file: number;
  readonly stepId: number;
  readonly globalId: string;
  /** In the schema's spelling: `IfcPipeSegment`, `IfcFlowTerminal`. */
  readonly ifcClass: string;
  /** Class of the type object, `IfcSanitaryTerminalType`, or null. */
  readonly typeClass: string | null;
  /** The element's own predefined type if it says anything, else its type's; upper case; null for NOTDEFINED and $. */
  readonly predefinedType: string | null;
  readonly kind: ElementClass;
  readonly name: string | null;
  readonly objectType: string | null;
  readonly description: string | null;
  readonly tag: string | null;
  readonly typeName: string | null;
  readonly typeDescription: string | null;
  /** `system:code title` texts of associated classification references. */
  readonly classifications: readonly string[];
  readonly systems: readonly SystemId[];
  readonly storey: StoreyId | null;
  readonly space: SpaceId | null;
  readonly ports: readonly PortId[];
  readonly material: string | null;
  /** Origin of the placement in world metres; null where the element has none. */
  readonly origin: Vec3 | null;
  /** Of segments (and swept fittings); null where the file gives no swept shape, axis or usable mesh. */
  readonly centreLine: CentreLine | null;
  /** World box of the body, where it can be had from the element's own points. */
  readonly box: Box | null;
  /** Everything that witnesses a size, in the order it was found: occurrence, type, quantity, port, profile, name. */
  readonly sizes: readonly SizeWitness[];
  /** Falls stated by a property, m/m, never negative, occurrence first. */
  readonly slopes: readonly { readonly slope: number; readonly from: string }[];
  /** Length stated by a property or quantity, where there is no geometry to measure. */
  readonly statedLength: Metres | null;
  /** Properties that bear on kind, trap, flush, reading or status; occurrence before type, one entry a property. */
  readonly properties: readonly PropertyFact[];
}

export interface PropertyFact {
  readonly set: string;
  readonly name: string;
  /** Lengths in metres; texts decoded; enumerations as their first value. */
  readonly value: string | number | boolean;
  readonly measure: 'length' | 'number' | 'text' | 'flag';
  readonly from: 'own' | 'type';
}

export interface SizeWitness {
  /** What the length or text claims to be. */
  readonly means: 'nominal' | 'outer' | 'inner' | 'unknown';
  /** A length in millimetres, or a text such as `3"` that only a size series can read. */
  readonly mm: number | null;
  readonly text: string | null;
  readonly ground: 'property' | 'quantity' | 'name' | 'port' | 'profile' | 'measured';
  /** Where it stands: `Pset_PipeSegmentTypeCommon.NominalDiameter (type)`, `ObjectType`. */
  readonly from: string;
}

export interface CentreLine {
  /** In world metres, at least two, no two neighbours alike. */
  readonly points: readonly Vec3[];
  readonly outerDiameter: Metres | null;
  readonly innerDiameter: Metres | null;
  readonly ground: 'extrusion' | 'swept-disk' | 'axis' | 'mesh';
  /** Root mean square distance of the shape from the fitted tube, metres; 0 where the shape is exact. */
  readonly residual: number;
}

export interface Port {
  readonly id: PortId;
  readonly stepId: number;
  readonly globalId: string;
  readonly owner: ElementId | null;
  readonly at: Vec3 | null;
  /** `source`: water leaves its element here. */
  readonly direction: 'source' | 'sink' | 'both' | 'unknown';
  /** Ports joined to this one, by the order of their relations. */
  readonly connected: readonly PortId[];
  readonly name: string | null;
}

export interface System {
  readonly id: SystemId;
  readonly file: number;
  readonly stepId: number;
  readonly globalId: string;
  readonly name: string | null;
  readonly longName: string | null;
  readonly objectType: string | null;
  readonly predefinedType: string | null;
}

export interface Storey {
  readonly id: StoreyId;
  readonly file: number;
  readonly globalId: string;
  readonly name: string | null;
  /** World metres, from the placement where there is one, else the stated elevation. */
  readonly elevation: number;
}

export interface Space {
  readonly id: SpaceId;
  readonly file: number;
  readonly globalId: string;
  readonly name: string | null;
  readonly longName: string | null;
  readonly storey: StoreyId | null;
  readonly box: Box | null;
}

/** Slabs and roofs. */
export interface Fabric {
  readonly file: number;
  readonly stepId: number;
  readonly globalId: string;
  readonly name: string | null;
  readonly predefinedType: string | null;
  readonly storey: StoreyId | null;
  readonly box: Box | null;
  /** Plan outline in world metres where the body is one extrusion; else null. */
  readonly outline: readonly Vec3[] | null;
}

export interface Wall extends Fabric {
  readonly layers: readonly { readonly name: string | null; readonly thickness: Metres }[];
  readonly loadBearing: boolean | null;
  readonly external: boolean | null;
}

export const elementId = (index: number): ElementId => index as ElementId;

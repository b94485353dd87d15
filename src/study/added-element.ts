import type { Vec3 } from '../geometry/vector.ts';
import type { FixtureDetail, FixtureKind, Identity, Medium, Part } from '../model/identity.ts';
import type { Element, ElementId, StoreyId } from '../model/model.ts';
import { usualDetail } from '../model/usual-detail.ts';

/** What a study says of a pipe or a fixture that it adds. */
export interface Added {
  readonly kind: 'pipe' | 'fixture';
  readonly name: string;
  readonly storey: StoreyId | null;
  readonly material: string | null;
  readonly origin: Vec3 | null;
  /** Axis of a pipe; null for a fixture, and where the model has no geometry. */
  readonly axis: readonly Vec3[] | null;
}

/** An element of no file: its GlobalId says so, and stands once in the model. */
export function addedElement(id: ElementId, { kind, name, storey, material, origin, axis }: Added): Element {
  return {
    id,
    file: 0,
    stepId: 0,
    globalId: `added-${id}`,
    ifcClass: kind === 'pipe' ? 'IfcPipeSegment' : 'IfcSanitaryTerminal',
    typeClass: null,
    predefinedType: null,
    kind: kind === 'pipe' ? 'segment' : 'terminal',
    name,
    objectType: null,
    description: null,
    tag: null,
    typeName: null,
    typeDescription: null,
    classifications: [],
    systems: [],
    storey,
    space: null,
    ports: [],
    material,
    origin,
    centreLine:
      axis === null ? null : { points: axis, outerDiameter: null, innerDiameter: null, ground: 'axis', residual: 0 },
    box: null,
    sizes: [],
    slopes: [],
    statedLength: null,
    properties: [],
  };
}

export const addedIdentity = (
  part: Part,
  medium: Medium,
  evidence: string,
  kind: FixtureKind | null = null,
  detail: Partial<FixtureDetail> = {},
): Identity => ({
  part,
  kind,
  detail: { ...usualDetail(kind), ...detail },
  medium,
  evidence,
  weak: false,
  outletMm: null,
  reading: null,
});

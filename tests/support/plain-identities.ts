import { type FixtureKind, type Identity, type Medium, noDetail, type Part } from '../../src/model/identity.ts';
import type { Element, Model } from '../../src/model/model.ts';

/**
 * Identities by IFC class and predefined type alone, for models that say both in the standard's own words. `medium`: what
 * every element belongs to, whatever its system says; absent: by the system's predefined type.
 */
export const plainIdentities = (model: Model, medium?: Medium): readonly Identity[] =>
  model.elements.map((element) => {
    const part = partOf(element);
    return {
      part,
      kind: part === 'fixture' ? kindOf(element) : null,
      detail: noDetail,
      medium: medium === undefined ? mediumOf(element, model) : medium,
      evidence: 'class and predefined type',
      weak: false,
      outletMm: null,
      reading: null,
    };
  });

function partOf({ kind, predefinedType, typeName, ifcClass }: Element): Part {
  if (kind === 'segment') return 'pipe';
  if (kind === 'chamber') return 'chamber';
  if (kind === 'treatment') return 'tank';
  if (predefinedType === 'OBSTRUCTION' && typeName === 'Cleanout') return 'cleanout';
  if (predefinedType === 'EXIT') return 'sewer-connection';
  if (predefinedType === 'ANTIVACUUM') return 'air-admittance-valve';
  if (predefinedType === 'WASTETRAP') return 'trap';
  if (predefinedType === 'ROOFDRAIN') return 'not-drainage';
  if (kind === 'fitting' || kind === 'valve') return kind;
  if (ifcClass === 'IfcStackTerminal') return 'vent-terminal';
  return kind === 'terminal' ? 'fixture' : 'not-drainage';
}

const kinds: Readonly<Record<string, FixtureKind>> = {
  TOILETPAN: 'water-closet',
  URINAL: 'urinal',
  WASHHANDBASIN: 'lavatory',
  SINK: 'sink',
  SHOWER: 'shower',
  BATH: 'bathtub',
  FLOORTRAP: 'floor-drain',
  FLOORWASTE: 'floor-drain',
};

const kindOf = ({ predefinedType }: Element): FixtureKind => kinds[predefinedType ?? ''] ?? 'other-fixture';

function mediumOf({ systems }: Element, model: Model): Medium {
  const type = model.systems[systems[0] ?? -1]?.predefinedType ?? '';
  if (/RAIN|STORM/.test(type)) return 'storm';
  if (type === 'VENT') return 'vent';
  if (/SEWAGE|WASTE|DRAINAGE/.test(type)) return 'sanitary';
  return /WATER/.test(type) ? 'supply' : type === '' ? null : 'other';
}

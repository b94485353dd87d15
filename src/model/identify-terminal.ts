import { type MediumSaid, mediumBySystems, mediumOfPiping } from './element-medium.ts';
import { fixtureDetail } from './fixture-detail.ts';
import type { IdentifyFacts } from './identify-facts.ts';
import { type Identity, noDetail } from './identity.ts';
import { enumerationOf, type Judgement, judgeKind } from './judge-kind.ts';
import { fixtureIdentity, type Identified, leftOut, turned } from './made-identity.ts';
import type { Element } from './model.ts';
import type { NamesTable } from './names-table.ts';
import { outletSize } from './outlet-size.ts';

/** Terminals of every kind, and whatever else may stand for one. */
export function identifyTerminal(element: Element, { names, media }: IdentifyFacts): Identified {
  const judged = judgeKind(element, names);
  const bySystems = mediumBySystems(element, media);
  if (element.kind === 'other') return identifyOther(element, judged, bySystems, names);
  if (judged === null)
    return {
      identity: unknownTerminal(element, bySystems ?? mediumOfPiping(element, media, names), names),
      contradiction: null,
    };
  const { part } = names.meaning(judged.kind);
  if (part === 'fixture') return fixtureIdentity(element, judged, bySystems, names);
  if (part === 'fitting') return grinder(element, judged, bySystems, names);
  if (judged.kind === 'area-drain') return areaDrain(element, judged, bySystems, names);
  return turned(element, judged, bySystems, names);
}

/** Under a sink it is a piece of the way; a commercial one drains by itself. */
function grinder(element: Element, judged: Judgement, medium: MediumSaid | null, names: NamesTable): Identified {
  const detail = fixtureDetail(element, 'garbage-grinder', null, names);
  if (detail.domestic !== false) return turned(element, judged, medium, names);
  const made = turned(element, judged, medium, names);
  const identity: Identity = { ...made.identity, part: 'fixture', kind: 'garbage-grinder', detail, medium: 'sanitary' };
  return { ...made, identity };
}

/** A gully by its type alone, in a sanitary system, is a floor drain. */
function areaDrain(element: Element, judged: Judgement, medium: MediumSaid | null, names: NamesTable): Identified {
  const isIndoors = medium?.medium === 'sanitary' && judged.evidence.startsWith('PredefinedType GULLY');
  if (!isIndoors) return turned(element, judged, medium, names);
  return fixtureIdentity(element, { ...judged, kind: names.kind('floor-drain'), weak: true }, medium, names);
}

const notPlumbing =
  /^Ifc(?:Outlet|Lamp|Light|AirTerminal|Electric|Audio|Communication|FireSuppression|SpaceHeater|Medical|Fan|Damper|Sensor|Alarm)/;

/**
 * A terminal of which nothing says what it is. On a class made for sanitary fixtures, with a connection or a system that
 * drains, it is a fixture of unknown kind; elsewhere it is only a terminal, which the network judges by what joins it.
 */
function unknownTerminal(element: Element, medium: MediumSaid | null, names: NamesTable): Identity {
  const enumeration = enumerationOf(element, names);
  const drains = medium?.medium === 'sanitary' || medium?.medium === 'vent';
  const isElsewhere = medium !== null && !drains;
  if (enumeration === 'IfcStackTerminal') {
    if (isElsewhere) return leftOut(medium, medium.evidence);
    return { ...unknown(element, 'vent', enumeration, names), part: 'vent-terminal' };
  }
  if (element.predefinedType === 'WCSEAT') {
    const isWhole = element.ports.length > 0 || drains;
    const detail = isWhole ? fixtureDetail(element, 'water-closet', null, names) : noDetail;
    const evidence = 'PredefinedType WCSEAT';
    return isWhole
      ? { ...unknown(element, 'sanitary', evidence, names), part: 'fixture', kind: 'water-closet', detail }
      : { ...leftOut(null, evidence), weak: true };
  }
  if (enumeration === 'IfcSanitaryTerminal' && (drains || (element.ports.length > 0 && medium?.medium !== 'storm')))
    return { ...unknown(element, 'sanitary', enumeration, names), part: 'fixture' };
  if (isElsewhere || notPlumbing.test(enumeration)) return leftOut(medium, medium?.evidence ?? enumeration);
  return unknown(element, medium?.medium ?? null, enumeration, names);
}

const unknown = (element: Element, medium: Identity['medium'], evidence: string, names: NamesTable): Identity => ({
  part: 'unknown-terminal',
  kind: null,
  detail: noDetail,
  medium,
  evidence,
  weak: true,
  outletMm: outletSize(element, names),
  reading: null,
});

/** Classes that carry no water by gravity: only a proxy, or a class that holds anything, is believed a clear name. */
function identifyOther(
  element: Element,
  judged: Judgement | null,
  medium: MediumSaid | null,
  names: NamesTable,
): Identified {
  const isNamed =
    judged !== null && !judged.weak && names.holdsAnything(element.ifcClass) && element.typeClass === null;
  if (isNamed && names.meaning(judged.kind).part === 'fixture') {
    const made = fixtureIdentity(element, judged, medium, names);
    return { ...made, identity: { ...made.identity, weak: true } };
  }
  return { identity: leftOut(medium, judged?.evidence ?? medium?.evidence ?? element.ifcClass), contradiction: null };
}

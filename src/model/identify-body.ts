import { type MediumSaid, mediumOfPiping } from './element-medium.ts';
import type { IdentifyFacts } from './identify-facts.ts';
import { type Identity, noDetail } from './identity.ts';
import { judgeKind } from './judge-kind.ts';
import { fixtureIdentity, type Identified, leftOut, turned } from './made-identity.ts';
import type { Element } from './model.ts';

/** Chambers, interceptors, tanks and pumps. */
export function identifyBody(element: Element, facts: IdentifyFacts): Identified {
  const { names } = facts;
  const medium = mediumOfPiping(element, facts.media, names);
  const judged = judgeKind(element, names);
  const drains = medium?.medium === 'sanitary' || medium?.medium === 'vent';
  if (judged !== null) {
    const { part } = names.meaning(judged.kind);
    if (part === 'not-drainage') {
      // A pump or tank in a sewage system belongs to it, whatever its general name.
      if (!(drains && judged.kind === 'not-plumbing')) return turned(element, judged, medium, names);
    } else if (part === 'fixture') {
      if (element.kind === 'treatment' && !judged.weak) return fixtureIdentity(element, judged, medium, names);
    } else if (part !== 'pipe' && part !== 'valve') return turned(element, judged, medium, names);
  }
  return { identity: unnamedBody(element, medium, drains), contradiction: null };
}

function unnamedBody(element: Element, medium: MediumSaid | null, drains: boolean): Identity {
  const base: Identity = {
    part: 'chamber',
    kind: null,
    detail: noDetail,
    medium: medium?.medium ?? null,
    evidence: medium?.evidence ?? element.ifcClass,
    weak: medium?.weak ?? true,
    outletMm: null,
    reading: null,
  };
  if (element.kind === 'chamber') return base;
  const type = `${element.ifcClass} ${element.typeClass ?? ''}`;
  if (/Interceptor/.test(type)) return { ...base, part: 'tank', detail: { ...noDetail, style: 'interceptor' } };
  if (!drains) return leftOut(medium, medium?.evidence ?? element.ifcClass);
  return { ...base, part: 'tank', detail: { ...noDetail, style: /Pump|MovingDevice/.test(type) ? 'pump' : null } };
}

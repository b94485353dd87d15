import { distance } from '../geometry/vector.ts';
import type { Identity } from './identity.ts';
import type { Element, Model } from './model.ts';

/** A tank or flush valve drawn as an element of its own stands this near to the fixture that it flushes, in metres. */
const reach = 0.8;

/**
 * Closets and urinals of unknown flush take it from a cistern or flushing valve that the model draws beside them: the
 * nearest within 0.8 m. Everything else is returned as it was.
 */
export function flushFromBeside(model: Model, identities: readonly Identity[]): readonly Identity[] {
  const sources = model.elements.filter((element) => flushOf(element) !== null && element.origin !== null);
  if (sources.length === 0) return identities;
  return identities.map((identity, id) => {
    const { part, kind, detail } = identity;
    if (part !== 'fixture' || detail.flush !== null || (kind !== 'water-closet' && kind !== 'urinal')) return identity;
    const element = model.elements[id];
    const found = element === undefined ? null : nearest(element, sources);
    return found === null ? identity : { ...identity, detail: { ...detail, flush: flushOf(found) } };
  });
}

function flushOf({ predefinedType, ifcClass, typeClass }: Element): 'tank' | 'valve' | null {
  if (predefinedType === 'CISTERN') return 'tank';
  if (predefinedType === 'FLUSHING' && /Valve|FlowController/.test(`${ifcClass} ${typeClass ?? ''}`)) return 'valve';
  return null;
}

function nearest({ origin, file }: Element, sources: readonly Element[]): Element | null {
  if (origin === null) return null;
  let best: Element | null = null;
  let least = reach;
  for (const source of sources) {
    if (source.origin === null || source.file !== file) continue;
    const away = distance(origin, source.origin);
    if (away < least) {
      least = away;
      best = source;
    }
  }
  return best;
}

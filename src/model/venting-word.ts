import type { Element, Model } from './model.ts';
import type { NamesTable } from './names-table.ts';

/** What the words of each system promise, by system id: `wet-vent`, `circuit-vent`, `individual-vent`, or null. */
export const ventingOfSystems = (model: Model, names: NamesTable): readonly (string | null)[] =>
  model.systems.map(({ name, longName, objectType }) => firstSaid([name, longName, objectType], names));

/** The designer's word on how a pipe vents: its own names, then its properties, then its systems. null: none. */
export function ventingWord(element: Element, ofSystems: readonly (string | null)[], names: NamesTable): string | null {
  const { name, objectType, description, tag, typeName, typeDescription } = element;
  const own = firstSaid([name, objectType, description, tag, typeName, typeDescription], names);
  if (own !== null) return own;
  for (const fact of element.properties) {
    // `Venting = wet vent`, or a flag called `Wet vent`.
    const said = typeof fact.value === 'string' ? names.readVenting(fact.value) : null;
    const flagged = fact.value === true || fact.value === 'Yes' ? names.readVenting(fact.name) : null;
    if (said !== null || flagged !== null) return said ?? flagged;
  }
  for (const system of element.systems) if (ofSystems[system] != null) return ofSystems[system];
  return null;
}

function firstSaid(texts: readonly (string | null)[], names: NamesTable): string | null {
  for (const text of texts) {
    const said = text === null ? null : names.readVenting(text);
    if (said !== null) return said;
  }
  return null;
}

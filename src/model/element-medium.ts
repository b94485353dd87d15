import { quoted } from './element-texts.ts';
import type { Medium } from './identity.ts';
import { enumerationOf } from './judge-kind.ts';
import type { Element, Model, System } from './model.ts';
import type { NamesTable } from './names-table.ts';

export interface MediumSaid {
  readonly medium: Exclude<Medium, null>;
  readonly evidence: string;
  /** A hint that a clearer word overrules. */
  readonly weak: boolean;
}

/** What each system carries, by system id; null where neither type nor name says. */
export const mediaOfSystems = (model: Model, names: NamesTable): readonly (MediumSaid | null)[] =>
  model.systems.map((system) => mediumOfSystem(system, names));

function mediumOfSystem(system: System, names: NamesTable): MediumSaid | null {
  const type =
    system.predefinedType === null ? null : names.typeMeaning('IfcDistributionSystem', system.predefinedType);
  const named = namedMedium([system.name, system.longName, system.objectType], names);
  const label = system.name ?? system.longName ?? system.objectType ?? system.globalId;
  const byType = type === null || type === 'unknown' ? null : names.meaning(type.kind).medium;
  if (byType === null || type === null || type === 'unknown')
    return named === null ? null : { medium: named.medium, evidence: quoted('system', label), weak: named.weak };
  const evidence = `${quoted('system', label)} (${system.predefinedType})`;
  const nameWins =
    named !== null &&
    !named.weak &&
    (type.trust === 'open' ||
      // Drains and their vents are told apart by name where a program has one system type for both.
      (named.medium === 'vent' && (byType === 'sanitary' || type.trust === 'likely')) ||
      (type.trust === 'likely' && named.medium === 'sanitary'));
  return { medium: nameWins ? named.medium : byType, evidence, weak: type.trust === 'open' && !nameWins };
}

/**
 * What flows in an element by its systems. Drainage comes before what else it is connected to; one that stands in drain
 * and vent systems carries water. null where no system says.
 */
export function mediumBySystems({ systems }: Element, media: readonly (MediumSaid | null)[]): MediumSaid | null {
  let chosen: MediumSaid | null = null;
  for (const id of systems) {
    const said = media[id];
    if (said != null && (chosen === null || precedes(said, chosen))) chosen = said;
  }
  return chosen;
}

const order: readonly MediumSaid['medium'][] = ['sanitary', 'vent', 'storm', 'supply', 'other'];
const precedes = (a: MediumSaid, b: MediumSaid): boolean =>
  a.weak === b.weak ? order.indexOf(a.medium) < order.indexOf(b.medium) : b.weak;

/** What flows in a pipe, fitting, valve or chamber: by its systems, else by its own words, type and material. */
export function mediumOfPiping(
  element: Element,
  media: readonly (MediumSaid | null)[],
  names: NamesTable,
): MediumSaid | null {
  const bySystems = mediumBySystems(element, media);
  if (bySystems !== null && !bySystems.weak) return bySystems;
  const own = ownMedium(element, names);
  if (own !== null && !own.weak) return own;
  // A culvert is a rain pipe only where its system is of drainage at large; alone it may be a plain sewer pipe.
  const byType = mediumOfType(element, names);
  if (byType !== null && !(byType.weak && bySystems === null)) return byType;
  return bySystems ?? own;
}

function ownMedium(element: Element, names: NamesTable): MediumSaid | null {
  let hint: MediumSaid | null = null;
  for (const { name, value } of element.properties) {
    if (typeof value !== 'string' || names.propertyUse(name) !== 'medium') continue;
    const read = namedMedium([value], names);
    if (read !== null) return { medium: read.medium, evidence: quoted(`property ${name}`, value), weak: false };
  }
  const texts: readonly (readonly [string, string | null])[] = [
    ['type name', element.typeName],
    ['object type', element.objectType],
    ['name', element.name],
    ['type description', element.typeDescription],
    ['description', element.description],
    ['material', element.material],
  ];
  for (const [from, text] of texts) {
    const read = text === null ? null : namedMedium([text], names);
    if (text === null || read === null) continue;
    const said = { medium: read.medium, evidence: quoted(from, text), weak: read.weak };
    if (!said.weak) return said;
    hint ??= said;
  }
  return hint;
}

function mediumOfType(element: Element, names: NamesTable): MediumSaid | null {
  if (element.predefinedType === null) return null;
  const type = names.typeMeaning(enumerationOf(element, names), element.predefinedType);
  const medium = type === null || type === 'unknown' ? null : names.meaning(type.kind).medium;
  if (medium === null || type === null || type === 'unknown') return null;
  return { medium, evidence: `PredefinedType ${element.predefinedType}`, weak: type.trust === 'open' };
}

function namedMedium(
  texts: readonly (string | null)[],
  names: NamesTable,
): { readonly medium: MediumSaid['medium']; readonly weak: boolean } | null {
  for (const text of texts) {
    const read = text === null ? null : names.readMedium(text);
    if (read !== null && read.meaning.medium !== null)
      return { medium: read.meaning.medium, weak: read.strength === 0 || read.rank < leastSureRank };
  }
  return null;
}

/** Bare words such as `drain` only hint; `Sanitary 12` is enough. */
const leastSureRank = 25;

import type { ElementClass } from '../../model/model.ts';
import type { Reader } from '../reader.ts';
import { borrowedClasses, drains, elementClasses, typeClasses } from './class-table.ts';
import type { PortLinks } from './ports.ts';
import type { Systems } from './systems.ts';
import type { TypeFacts, Types } from './type-objects.ts';

/** What an element's own record says. */
export interface ElementRecord {
  readonly record: number;
  readonly globalId: string;
  readonly ifcClass: string;
  readonly name: string | null;
  readonly description: string | null;
  readonly objectType: string | null;
  readonly tag: string | null;
  /** Records; -1 for none. */
  readonly placement: number;
  readonly shape: number;
  readonly type: TypeFacts | null;
  readonly predefinedType: string | null;
  readonly kind: ElementClass;
  /** True for a flow segment without a type: whether it is a pipe, its cross-section must say. */
  readonly isDoubtful: boolean;
}

/** Records of all distribution elements and of the borrowed ones that are tied to piping, in order of STEP ids. */
export function elementRecords(reader: Reader, links: PortLinks, systems: Systems, types: Types): number[] {
  const found = reader.allOf(elementClasses.keys());
  const borrowed = reader.allOf(borrowedClasses.keys());
  if (borrowed.length === 0) return found;
  const typed = new Set(types.distributionOccurrences);
  const isTied = (record: number): boolean => links.countOf(record) > 0 || systems.has(record) || typed.has(record);
  const { ids } = reader.index;
  return [...found, ...borrowed.filter(isTied)].sort((a, b) => ids[a]! - ids[b]!);
}

export function readElement(reader: Reader, record: number, ports: number, types: Types): ElementRecord {
  const cursor = reader.open(record);
  const globalId = cursor.unique() ?? '';
  const name = cursor.skip(1).text();
  const description = cursor.text();
  const objectType = cursor.text();
  const placement = cursor.id();
  const shape = cursor.id();
  const tag = cursor.text();
  const word = cursor.more ? cursor.enumeration() : null;
  const type = types.of(record);
  const className = reader.type(record);
  const own = word === 'NOTDEFINED' ? null : word;
  const ofType = type?.predefinedType ?? null;
  const predefinedType = own !== null && own !== 'USERDEFINED' ? own : (ofType ?? own);
  return {
    record,
    globalId,
    ifcClass: elementClasses.get(className)?.name ?? borrowedClasses.get(className) ?? className,
    name,
    description,
    objectType,
    tag,
    placement: reader.follow(placement, record),
    shape: reader.follow(shape, record),
    type,
    predefinedType,
    kind: kindOf(className, type, predefinedType, ports, () => [
      name,
      objectType,
      type?.name,
      description,
      type?.description,
    ]),
    isDoubtful: className === 'IFCFLOWSEGMENT' && (type === null || !typeClasses.has(type.className.toUpperCase())),
  };
}

const chamberWords =
  /manhole|inspection chamber|chamber|schacht|regard|\bput\b|pozzett|arqueta|\bbrunn|\bkum\b|studzienk|caixa de inspe/i;

/** `ports`: how many ports the product has. */
function kindOf(
  className: string,
  type: TypeFacts | null,
  predefinedType: string | null,
  ports: number,
  texts: () => readonly (string | null | undefined)[],
): ElementClass {
  const typeName = type?.className.toUpperCase() ?? '';
  if (className === 'IFCELECTRICAPPLIANCE' || typeName === 'IFCELECTRICAPPLIANCETYPE') {
    return drains(predefinedType, texts()) ? 'terminal' : 'other';
  }
  const byClass = elementClasses.get(className);
  if (byClass !== undefined && byClass.kind !== 'typed') return byClass.kind;
  const byType = typeClasses.get(typeName);
  if (byType !== undefined && byType.kind !== 'typed') return byType.kind;
  if (byClass !== undefined && byClass.untyped !== 'other') return byClass.untyped;
  if (byType !== undefined && byType.untyped !== 'other') return byType.untyped;
  // A distribution element without a class of its own, or a thing of the building that carries plumbing.
  if (texts().some((text) => text != null && chamberWords.test(text))) return 'chamber';
  if (ports > 1) return 'fitting';
  return ports === 1 || byClass === undefined ? 'terminal' : 'other';
}

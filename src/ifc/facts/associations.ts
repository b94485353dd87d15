import type { Reader } from '../reader.ts';
import { eachRelation } from './relations.ts';

/** Materials and classifications, by the records of the things that have them. */
export interface Associations {
  /** Name of the material, of the first where there are several; null for none. */
  readonly material: (record: number) => string | null;
  /** `system:code title`, in order of the relations. */
  readonly classifications: (record: number) => readonly string[];
  /** Layers from the first to the last, thickness in metres; none where the material is no layer set. */
  readonly layers: (record: number) => readonly { readonly name: string | null; readonly thickness: number }[];
}

const deepest = 10;

export function associationsOf(reader: Reader, metres: number): Associations {
  const { index, follow, type } = reader;
  const { args } = index;
  const materialOf = new Map<number, number>();
  const classOf = new Map<number, number[]>();
  eachRelation(reader, 'IFCRELASSOCIATESMATERIAL', (cursor, record) => {
    const things = cursor.ids();
    const material = follow(cursor.id(), record);
    if (material < 0) return;
    for (const id of things) {
      const thing = follow(id, record);
      if (thing >= 0 && !materialOf.has(thing)) materialOf.set(thing, material);
    }
  });
  eachRelation(reader, 'IFCRELASSOCIATESCLASSIFICATION', (cursor, record) => {
    const things = cursor.ids();
    const reference = follow(cursor.id(), record);
    if (reference < 0) return;
    for (const id of things) {
      const thing = follow(id, record);
      if (thing < 0) continue;
      const list = classOf.get(thing);
      if (list === undefined) classOf.set(thing, [reference]);
      else list.push(reference);
    }
  });

  const names = new Map<number, string | null>();
  const materialName = (record: number, depth: number): string | null => {
    if (record < 0 || depth > deepest) return null;
    const known = names.get(record);
    if (known !== undefined) return known;
    const name = nameOfMaterial(record, depth);
    names.set(record, name);
    return name;
  };
  const nameOfMaterial = (record: number, depth: number): string | null => {
    const cursor = reader.cursor().at(args[record]!);
    const within = (id: number | undefined): string | null =>
      materialName(id === undefined ? -1 : follow(id, record), depth + 1);
    switch (type(record)) {
      case 'IFCMATERIAL':
        return cursor.text();
      case 'IFCMATERIALLIST':
      case 'IFCMATERIALLAYERSET':
      case 'IFCMATERIALLAYERSETUSAGE':
      case 'IFCMATERIALPROFILESETUSAGE':
      case 'IFCMATERIALPROFILESETUSAGETAPERING':
      case 'IFCMATERIALLAYER':
        return within(cursor.ids()[0]);
      case 'IFCMATERIALPROFILESET':
      case 'IFCMATERIALCONSTITUENTSET':
        return within(cursor.skip(2).ids()[0]);
      case 'IFCMATERIALPROFILE':
      case 'IFCMATERIALCONSTITUENT':
        return within(cursor.skip(2).id());
      default:
        return null;
    }
  };
  const referenceText = (record: number, depth: number): { readonly system: string | null; readonly said: string } => {
    if (record < 0 || depth > deepest) return { system: null, said: '' };
    const cursor = reader.cursor().at(args[record]!);
    if (type(record) === 'IFCCLASSIFICATION') return { system: cursor.skip(3).text(), said: '' };
    cursor.skip(1);
    const code = cursor.text();
    const title = cursor.text();
    const { system } = referenceText(follow(cursor.id(), record), depth + 1);
    return { system, said: [code, title].filter((one) => one !== null && one !== '').join(' ') };
  };
  const texts = new Map<number, string>();
  const classificationText = (record: number): string => {
    const known = texts.get(record);
    if (known !== undefined) return known;
    const { system, said } = referenceText(record, 0);
    const text = `${system ?? ''}:${said}`;
    texts.set(record, text);
    return text;
  };
  const layers = (record: number): { readonly name: string | null; readonly thickness: number }[] => {
    let set = materialOf.get(record) ?? -1;
    if (type(set) === 'IFCMATERIALLAYERSETUSAGE') set = follow(reader.cursor().at(args[set]!).id(), set);
    if (type(set) !== 'IFCMATERIALLAYERSET') return [];
    return reader
      .cursor()
      .at(args[set]!)
      .ids()
      .flatMap((id) => {
        const layer = follow(id, set);
        if (layer < 0) return [];
        const cursor = reader.cursor().at(args[layer]!);
        const material = follow(cursor.id(), layer);
        const thickness = cursor.number() ?? 0;
        return [{ name: materialName(material, 0), thickness: thickness * metres }];
      });
  };
  return {
    material: (record) => materialName(materialOf.get(record) ?? -1, 0),
    classifications: (record) => (classOf.get(record) ?? []).map(classificationText).filter((text) => text !== ':'),
    layers,
  };
}

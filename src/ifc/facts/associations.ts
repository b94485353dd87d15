import type { Reader } from '../reader.ts';

const deepest = 10;
const noTexts: readonly string[] = [];

export interface Layer {
  readonly name: string | null;
  /** Metres. */
  readonly thickness: number;
}

/** Materials and classifications of one file, by the records of the things that have them. */
export class Associations {
  private readonly reader: Reader;
  private readonly metres: number;
  private readonly materialOf = new Map<number, number>();
  private readonly classesOf = new Map<number, number[]>();
  private readonly names = new Map<number, string | null>();
  private readonly texts = new Map<number, string>();

  constructor(reader: Reader, metres: number) {
    this.reader = reader;
    this.metres = metres;
    const cursor = reader.cursor();
    for (const record of reader.all('IFCRELASSOCIATESMATERIAL')) {
      const things = cursor.at(reader.args[record]!).skip(4).ids();
      const material = reader.follow(cursor.id(), record);
      if (material < 0) continue;
      for (const id of things) {
        const thing = reader.follow(id, record);
        if (thing >= 0 && !this.materialOf.has(thing)) this.materialOf.set(thing, material);
      }
    }
    for (const record of reader.all('IFCRELASSOCIATESCLASSIFICATION')) {
      const things = cursor.at(reader.args[record]!).skip(4).ids();
      const reference = reader.follow(cursor.id(), record);
      if (reference < 0) continue;
      for (const id of things) {
        const thing = reader.follow(id, record);
        const list = this.classesOf.get(thing);
        if (list !== undefined) list.push(reference);
        else if (thing >= 0) this.classesOf.set(thing, [reference]);
      }
    }
  }

  /** Name of the material, of the first where there are several; null for none. */
  material(record: number): string | null {
    const material = this.materialOf.get(record);
    return material === undefined ? null : this.materialName(material, 0);
  }

  /** `system:code title`, in order of the relations. */
  classifications(record: number): readonly string[] {
    const references = this.classesOf.get(record);
    if (references === undefined) return noTexts;
    return references.map((reference) => this.classificationText(reference)).filter((text) => text !== ':');
  }

  /** Layers from the first to the last; none where the material is no layer set. */
  layers(record: number): Layer[] {
    const { reader } = this;
    let set = this.materialOf.get(record) ?? -1;
    if (reader.type(set) === 'IFCMATERIALLAYERSETUSAGE') set = reader.follow(reader.open(set).id(), set);
    if (reader.type(set) !== 'IFCMATERIALLAYERSET') return [];
    return reader
      .open(set)
      .ids()
      .flatMap((id) => {
        const layer = reader.follow(id, set);
        if (layer < 0) return [];
        const cursor = reader.open(layer);
        const material = reader.follow(cursor.id(), layer);
        const thickness = cursor.number() ?? 0;
        return [{ name: this.materialName(material, 0), thickness: thickness * this.metres }];
      });
  }

  private materialName(record: number, depth: number): string | null {
    if (record < 0 || depth > deepest) return null;
    const known = this.names.get(record);
    if (known !== undefined) return known;
    const name = this.readName(record, depth);
    this.names.set(record, name);
    return name;
  }

  private readName(record: number, depth: number): string | null {
    const { reader } = this;
    const cursor = reader.open(record);
    const within = (id: number): string | null => this.materialName(reader.follow(id, record), depth + 1);
    switch (reader.type(record)) {
      case 'IFCMATERIAL':
        return cursor.text();
      case 'IFCMATERIALLIST':
      case 'IFCMATERIALLAYERSET':
      case 'IFCMATERIALLAYERSETUSAGE':
      case 'IFCMATERIALPROFILESETUSAGE':
      case 'IFCMATERIALPROFILESETUSAGETAPERING':
      case 'IFCMATERIALLAYER':
        return within(cursor.ids()[0] ?? 0);
      case 'IFCMATERIALPROFILESET':
      case 'IFCMATERIALCONSTITUENTSET':
        return within(cursor.skip(2).ids()[0] ?? 0);
      case 'IFCMATERIALPROFILE':
      case 'IFCMATERIALCONSTITUENT':
        return within(cursor.skip(2).id());
      default:
        return null;
    }
  }

  private classificationText(reference: number): string {
    const known = this.texts.get(reference);
    if (known !== undefined) return known;
    const { system, said } = this.referenceText(reference, 0);
    const text = `${system ?? ''}:${said}`;
    this.texts.set(reference, text);
    return text;
  }

  private referenceText(record: number, depth: number): { readonly system: string | null; readonly said: string } {
    const { reader } = this;
    if (record < 0 || depth > deepest) return { system: null, said: '' };
    const cursor = reader.open(record);
    if (reader.type(record) === 'IFCCLASSIFICATION') return { system: cursor.skip(3).text(), said: '' };
    const code = cursor.skip(1).text();
    const title = cursor.text();
    const { system } = this.referenceText(reader.follow(cursor.id(), record), depth + 1);
    return { system, said: [code, title].filter((one) => one !== null && one !== '').join(' ') };
  }
}

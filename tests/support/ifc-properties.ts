import type { PropertyFact } from '../../src/model/model.ts';
import type { DraftElement } from './draft.ts';
import type { IfcSheet } from './ifc-sheet.ts';
import { type Ref, raw, typed, word } from './step-file.ts';

/** The sets of one element. In IFC2X3 those named after types stand on the type, in later schemas on the occurrence. */
export function setsOf(
  sheet: IfcSheet,
  element: DraftElement,
): readonly { readonly name: string; readonly facts: readonly PropertyFact[] }[] {
  const facts: PropertyFact[] = [...element.properties];
  const say = (set: string, name: string, value: number, measure: PropertyFact['measure']) =>
    facts.push({ set, name, value, measure, from: 'own' });
  if (element.line !== null) {
    if (sheet.sizes && element.size !== null)
      say('Pset_PipeSegmentTypeCommon', 'NominalDiameter', element.size.nominal, 'length');
    const occurrence = sheet.old ? 'Pset_FlowSegmentPipeSegment' : 'Pset_PipeSegmentOccurrence';
    if (element.slope !== null) say(occurrence, 'Gradient', element.slope, 'number');
  }
  return [...new Set(facts.map(({ set }) => set))].map((name) => ({
    name,
    facts: facts.filter(({ set }) => set === name),
  }));
}

const onType = (sheet: IfcSheet, set: string): boolean => sheet.old && /^Pset_\w+Type[A-Z]/.test(set);

/** One type object for all elements alike in class, kind, type name and the sets that their type carries. */
export function writeType(sheet: IfcSheet, elements: readonly DraftElement[], refs: readonly Ref[]): void {
  const { file, owner, id } = sheet;
  const alike = new Map<string, number[]>();
  for (const [index, element] of elements.entries()) {
    const carried = setsOf(sheet, element).filter(({ name }) => onType(sheet, name));
    const key = JSON.stringify([element.ifcClass, element.predefined, element.typeName, carried]);
    const members = alike.get(key) ?? [];
    members.push(index);
    alike.set(key, members);
  }
  for (const [key, members] of alike) {
    const element = elements[members[0]!]!;
    const sets = setsOf(sheet, element)
      .filter(({ name }) => onType(sheet, name))
      .map(({ name, facts }) => writeSet(sheet, id('type set', key, name), name, facts));
    const grease = sheet.old && element.ifcClass === 'IfcInterceptor';
    const keyword = grease ? 'IFCWASTETERMINALTYPE' : `${element.ifcClass.toUpperCase()}TYPE`;
    const predefined = grease ? 'GREASEINTERCEPTOR' : (element.predefined ?? 'NOTDEFINED');
    const elementType = predefined === 'USERDEFINED' ? element.typeName : null;
    const type = file.add(
      keyword,
      id('type', key),
      owner,
      element.typeName,
      null,
      null,
      sets.length > 0 ? sets : null,
      null,
      null,
      elementType,
      word(predefined),
    );
    const occurrences = members.map((index) => refs[index]!);
    file.add('IFCRELDEFINESBYTYPE', id('typed', key), owner, null, null, occurrences, type);
  }
}

/** Sets of occurrences; elements that say the same share one set. */
export function writeSets(sheet: IfcSheet, elements: readonly DraftElement[], refs: readonly Ref[]): void {
  const { file, owner, id } = sheet;
  const alike = new Map<
    string,
    { readonly name: string; readonly facts: readonly PropertyFact[]; readonly of: Ref[] }
  >();
  for (const [index, element] of elements.entries())
    for (const { name, facts } of setsOf(sheet, element)) {
      if (onType(sheet, name)) continue;
      const key = JSON.stringify([name, facts]);
      const known = alike.get(key);
      if (known === undefined) alike.set(key, { name, facts, of: [refs[index]!] });
      else known.of.push(refs[index]!);
    }
  for (const [key, { name, facts, of }] of alike) {
    const set = writeSet(sheet, id('set', key), name, facts);
    file.add('IFCRELDEFINESBYPROPERTIES', id('has', key), owner, null, null, of, set);
  }
}

function writeSet(sheet: IfcSheet, globalId: string, name: string, facts: readonly PropertyFact[]): Ref {
  const values = facts.map((fact) => writeFact(sheet, fact));
  return sheet.file.add('IFCPROPERTYSET', globalId, sheet.owner, name, null, values);
}

const enumerated = ['UrinalType', 'ToiletPanType', 'ToiletType'];
/** IFC2X3 writes its enumerated values in mixed case. */
const oldWords: Readonly<Record<string, string>> = {
  STALL: 'Stall',
  WALLHUNG: 'WallHung',
  WASHDOWN: 'WashDown',
  CLOSECOUPLED: 'CloseCoupled',
};

function writeFact({ file, old, long }: IfcSheet, { name, value, measure }: PropertyFact): Ref {
  if (typeof value === 'string' && enumerated.includes(name)) {
    const label = typed('IFCLABEL', old ? (oldWords[value] ?? value) : value);
    return file.share('IFCPROPERTYENUMERATEDVALUE', name, null, [label], null);
  }
  const nominal =
    typeof value === 'boolean'
      ? raw(`IFCBOOLEAN(${value ? '.T.' : '.F.'})`)
      : typeof value === 'string'
        ? typed('IFCLABEL', value)
        : measure === 'length'
          ? typed('IFCPOSITIVELENGTHMEASURE', long(value))
          : name === 'Gradient'
            ? typed('IFCPOSITIVERATIOMEASURE', value)
            : raw(`IFCINTEGER(${value})`);
  return file.share('IFCPROPERTYSINGLEVALUE', name, null, nominal, null);
}

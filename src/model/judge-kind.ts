import { quoted, textsOf } from './element-texts.ts';
import type { Element } from './model.ts';
import type { NamesTable, TextReading, TypeMeaning, WordKind } from './names-table.ts';

/** What an element is by class, predefined type, properties and names together. */
export interface Judgement {
  readonly kind: WordKind;
  readonly evidence: string;
  readonly weak: boolean;
  /** Set where class and names, or two names, disagree. */
  readonly contradiction: Contradiction | null;
}

export interface Contradiction {
  readonly taken: WordKind;
  readonly takenFrom: string;
  readonly other: WordKind;
  readonly otherFrom: string;
}

interface Said {
  readonly kind: WordKind;
  readonly from: string;
  readonly strength: 0 | 1 | 2;
}

/** null where nothing decides. The order of the evidence is that of the names table's reading rules. */
export function judgeKind(element: Element, names: NamesTable): Judgement | null {
  const type = typeOf(element, names);
  const said = saidKinds(element, names);
  const named = consensus(said, names);
  const byProperty = propertyKind(element, names);
  const refined = named !== null && byProperty !== null && related(byProperty.kind, named.kind, names);
  const judged = combine(element, type, refined || named === null ? (byProperty ?? named) : named, names);
  if (judged === null || judged.contradiction !== null) return judged;
  return { ...judged, contradiction: disagreement(judged, said, names) };
}

interface TypeSaid extends TypeMeaning {
  readonly from: string;
}

/** The enumeration is that of the element's own class; where that holds anything, of its type's class. */
export function enumerationOf({ ifcClass, typeClass }: Element, names: NamesTable): string {
  const ofType = typeClass?.replace(/(?:Type|Style)$/, '') ?? null;
  return ofType !== null && names.holdsAnything(ifcClass) ? ofType : ifcClass;
}

function typeOf(element: Element, names: NamesTable): TypeSaid | null {
  const { predefinedType } = element;
  if (predefinedType === null || predefinedType === 'USERDEFINED') return null;
  const meaning = names.typeMeaning(enumerationOf(element, names), predefinedType);
  if (meaning === null) return null;
  const from = `PredefinedType ${predefinedType}`;
  if (meaning !== 'unknown') return { ...meaning, from };
  // A value that the schema does not know, such as WATER_CLOSET, still is a word.
  const read = names.readThing(predefinedType.toLowerCase());
  return read === null || tellsNothing(read) ? null : { kind: read.kind, trust: 'likely', from };
}

const tellsNothing = ({ meaning }: TextReading): boolean =>
  meaning.part === 'unknown-terminal' || (meaning.part === 'pipe' && meaning.medium !== 'supply');

function saidKinds(element: Element, names: NamesTable): readonly Said[] {
  const said: Said[] = [];
  for (const { from, text, isProse } of textsOf(element, names)) {
    const read = names.readThing(text);
    if (read === null || tellsNothing(read) || (from === 'tag' && read.strength > 0 && read.rank < 50)) continue;
    const isCategory = from.startsWith('property');
    const strength = isProse || isCategory ? 0 : read.strength;
    said.push({ kind: read.kind, from: quoted(from, text), strength });
  }
  for (const text of element.classifications) {
    const read = names.readClassification(text);
    if (read === null || tellsNothing(read)) continue;
    said.push({ kind: read.kind, from: quoted('classification', text), strength: read.strength === 2 ? 1 : 0 });
  }
  return said;
}

/** The strongest, then the first; one of the same sort that says it more exactly takes its place. */
function consensus(said: readonly Said[], names: NamesTable): Said | null {
  let lead: Said | null = null;
  for (const one of said) {
    if (lead === null || one.strength > lead.strength) lead = one;
    else if (isKindOf(one.kind, lead.kind, names) && one.strength > 0) lead = one;
  }
  if (lead === null || lead.strength > 0) return lead;
  // Two weak witnesses that agree are one fair one.
  const { kind, from } = lead;
  return said.some((one) => one.from !== from && one.kind === kind) ? { ...lead, strength: 1 } : lead;
}

function propertyKind(element: Element, names: NamesTable): Said | null {
  for (const { name, value } of element.properties) {
    if (typeof value !== 'string') continue;
    const meaning = names.propertyMeaning(name, value);
    if (meaning !== null && meaning.kind !== null)
      return { kind: meaning.kind, from: `property ${name} ${value}`, strength: 2 };
  }
  return null;
}

function combine(element: Element, type: TypeSaid | null, said: Said | null, names: NamesTable): Judgement | null {
  if (said === null) {
    if (type === null) return null;
    return { kind: type.kind, evidence: type.from, weak: type.trust === 'open', contradiction: null };
  }
  if (type === null)
    return { kind: said.kind, evidence: said.from, weak: isWeak(element, said, names), contradiction: null };
  if (said.kind === type.kind || isKindOf(type.kind, said.kind, names))
    return { kind: type.kind, evidence: `${type.from}, ${said.from}`, weak: false, contradiction: null };
  if (isKindOf(said.kind, type.kind, names) && said.strength > 0)
    return { kind: said.kind, evidence: `${type.from}, ${said.from}`, weak: false, contradiction: null };
  const nameWins =
    type.trust === 'open' || (said.strength === 2 && (type.trust === 'likely' || isAccessory(element, said, names)));
  const [taken, other] = nameWins ? [said, type] : [type, said];
  const concernsFixtures = [said.kind, type.kind].some((kind) => names.meaning(kind).part === 'fixture');
  const isSilent = type.trust === 'open' || said.strength === 0 || !concernsFixtures;
  return {
    kind: taken.kind,
    evidence: taken.from,
    weak: !isSilent || said.strength === 0,
    contradiction: isSilent
      ? null
      : { taken: taken.kind, takenFrom: taken.from, other: other.kind, otherFrom: other.from },
  };
}

/** A thing without a port that is called a mirror or a tap is one, whatever fixture its exporter made of it. */
function isAccessory(element: Element, { kind }: Said, names: NamesTable): boolean {
  return element.ports.length === 0 && names.meaning(kind).part === 'not-drainage';
}

/** Bare nouns are good enough on a class that is made for sanitary things. */
function isWeak(element: Element, { strength }: Said, names: NamesTable): boolean {
  if (strength === 2) return false;
  return strength === 0 || enumerationOf(element, names) !== 'IfcSanitaryTerminal';
}

/** The first clear name that says another thing than what was taken. */
function disagreement(judged: Judgement, said: readonly Said[], names: NamesTable): Contradiction | null {
  if (names.meaning(judged.kind).part !== 'fixture' && names.meaning(judged.kind).part !== 'not-drainage') return null;
  const other = said.find(
    (one) => one.strength > 0 && !related(one.kind, judged.kind, names) && names.meaning(one.kind).part !== 'pipe',
  );
  if (other === undefined) return null;
  const bothLeftOut = [other.kind, judged.kind].every((kind) => names.meaning(kind).part === 'not-drainage');
  return bothLeftOut
    ? null
    : { taken: judged.kind, takenFrom: judged.evidence, other: other.kind, otherFrom: other.from };
}

const isKindOf = (inner: WordKind, outer: WordKind, names: NamesTable): boolean =>
  names.refines(inner, outer) || (outer === 'sink' && inner === 'lavatory');

const related = (a: WordKind, b: WordKind, names: NamesTable): boolean =>
  a === b || isKindOf(a, b, names) || isKindOf(b, a, names);

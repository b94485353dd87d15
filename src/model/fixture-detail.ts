import { textsOf } from './element-texts.ts';
import { type FixtureDetail, type FixtureKind, noDetail } from './identity.ts';
import type { Element } from './model.ts';
import type { NamesTable, PropertyMeaning } from './names-table.ts';
import type { TextMarks } from './text-marks.ts';

/**
 * Flush, style, heads and use of a fixture, from its names and enumerated properties. A shower has one head unless
 * something says several; a floor drain is no emergency drain unless something says so.
 */
export function fixtureDetail(
  element: Element,
  kind: FixtureKind,
  style: string | null,
  names: NamesTable,
): FixtureDetail {
  const marks = textsOf(element, names).map(({ text }) => names.readMarks(text));
  for (const { name, value } of element.properties)
    if (typeof value === 'string' && names.propertyUse(name) === 'flush')
      marks.push(names.readMarks(`${name} ${value}`));
  const stated = element.properties.flatMap(({ name, value }) =>
    typeof value === 'string' ? (names.propertyMeaning(propertyName(name, kind), value) ?? []) : [],
  );
  const flushes = kind === 'water-closet' || kind === 'urinal' || kind === 'clinical-sink';
  const litres = flushes ? first(marks, ({ flushLitres }) => flushLitres) : null;
  return {
    ...noDetail,
    flush: flushes ? (first(stated, ({ flush }) => flush) ?? first(marks, ({ flush }) => flush)) : null,
    style: style ?? styleOf(kind, stated, marks),
    heads: headsOf(kind, marks),
    emergency: kind === 'floor-drain' ? marks.some(({ emergency }) => emergency) : null,
    domestic: first(marks, ({ domestic }) => domestic),
    ...(litres === null ? {} : { flushLitres: litres }),
  };
}

/** Several property sets have a `Mounting`; which one it is follows from the fixture. */
const propertyName = (name: string, kind: FixtureKind): string =>
  kind === 'urinal' && /^(?:urinal)?mounting$/i.test(name) ? 'UrinalMounting' : name;

function styleOf(kind: FixtureKind, stated: readonly PropertyMeaning[], marks: readonly TextMarks[]): string | null {
  const said = first(stated, ({ style }) => style);
  if (kind === 'urinal') {
    const named = first(marks, ({ urinal }) => urinal);
    return said === 'wall' && named === 'washout' ? 'wall-washout' : (said ?? named);
  }
  const styled = said ?? first(marks, ({ styles }) => styles.get(kind) ?? null);
  if (styled !== null) return styled;
  const bowls = first(marks, ({ bowls: found }) => found);
  if (kind === 'laundry-tray') return bowls === 'triple' ? 'three-compartment' : bowls;
  if (kind === 'lavatory' && marks.some(({ heads }) => heads !== null && heads > 2)) return 'multiple';
  return kind === 'sink' || kind === 'kitchen-sink' ? bowls : null;
}

function headsOf(kind: FixtureKind, marks: readonly TextMarks[]): number | null {
  const counted = first(marks, ({ heads }) => heads);
  if (kind === 'shower') return counted ?? (marks.some(({ several }) => several) ? null : 1);
  return kind === 'lavatory' || kind === 'sink' || kind === 'urinal' || kind === 'wash-fountain' ? counted : null;
}

function first<T, V>(list: readonly T[], pick: (item: T) => V | null): V | null {
  for (const item of list) {
    const value = pick(item);
    if (value !== null) return value;
  }
  return null;
}

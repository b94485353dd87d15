import { existsSync, readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { describe, expect, test } from 'vitest';
import type { TextReading } from '../../src/model/names-table.ts';
import { readNamesTable } from '../../src/model/read-names-table.ts';
import { ownTables } from '../support/table-files.ts';

const names = readNamesTable(ownTables);
const kindOf = (reading: TextReading | null): string | null =>
  reading === null || reading.meaning.part === 'unknown-terminal' ? null : reading.kind;

interface Labelled {
  readonly things: readonly { readonly kind: string | null; readonly names: readonly string[] }[];
  readonly systems: readonly { readonly medium: string | null; readonly names: readonly string[] }[];
}
const own: Labelled = JSON.parse(readFileSync(resolve(import.meta.dirname, 'labelled-names.json'), 'utf8'));

describe('our own labelled names (their source stands in the list)', () => {
  const cases = own.things.flatMap(({ kind, names: texts }) => texts.map((text) => ({ kind, text })));
  test(`${cases.length} names: every one is read as labelled`, () => {
    expect(cases.length).toBeGreaterThan(550);
    const wrong = cases.filter(({ kind, text }) => {
      const reading = names.readThing(text);
      return kind === 'not-a-fixture' ? reading?.meaning.part === 'fixture' : kindOf(reading) !== kind;
    });
    expect(wrong.map(({ kind, text }) => `${text}: ${kindOf(names.readThing(text))}, not ${kind}`)).toEqual([]);
  });
  const systems = own.systems.flatMap(({ medium, names: texts }) => texts.map((text) => ({ medium, text })));
  test(`${systems.length} system names: every one is read as labelled`, () => {
    expect(systems.length).toBeGreaterThan(120);
    const wrong = systems.filter(({ medium, text }) => (names.readMedium(text)?.meaning.medium ?? null) !== medium);
    expect(wrong.map(({ medium, text }) => `${text}: not ${medium}`)).toEqual([]);
  });
});

interface SharedName {
  readonly text: string;
  readonly kind: string | null;
  readonly detail?: string;
  readonly where: string;
  readonly attrs?: { readonly flush?: string; readonly style?: string; readonly emergency?: boolean };
}
const sharedFile = resolve(import.meta.dirname, '../../../shared/checks/fixture-names.json');
const isThere = existsSync(sharedFile);

describe(`names met in models and public lists${isThere ? '' : ' (reference list not there: nothing compared)'}`, () => {
  const shared = isThere ? JSON.parse(readFileSync(sharedFile, 'utf8')) : { tests: [], systems: [], entries: [] };

  test.runIf(isThere)('at least 97 % right, and no thing that is no fixture taken for one', () => {
    const all: readonly SharedName[] = shared.tests;
    expect(all.length).toBe(305);
    const read = (one: SharedName): TextReading | null => {
      if (one.where === 'classification') return names.readClassification(one.text);
      const isType = one.where.endsWith('PredefinedType');
      return names.readThing(isType ? (one.text.split('.').at(-1) ?? '').toLowerCase() : one.text);
    };
    const wrong = all.filter((one) => {
      const found = kindOf(read(one));
      const wanted = one.kind === 'not-a-fixture' ? one.detail : one.kind;
      // A wash fountain is a lavatory for several in that list.
      return found !== wanted && !(found === 'wash-fountain' && wanted === 'lavatory-multiple');
    });
    const taken = all.filter((one) => one.kind === 'not-a-fixture' && read(one)?.meaning.part === 'fixture');
    console.log(
      `fixture names: ${all.length - wrong.length} of ${all.length} right, ${taken.length} taken for a fixture`,
    );
    expect(taken.map(({ text }) => text)).toEqual([]);
    expect(wrong.length, wrong.map(({ text }) => text).join('\n')).toBeLessThanOrEqual(all.length * 0.03);
  });

  test.runIf(isThere)('flush, style and emergency of those that carry a mark', () => {
    const marked: readonly SharedName[] = shared.tests.filter(({ attrs }: SharedName) => attrs !== undefined);
    expect(marked.length).toBeGreaterThan(10);
    for (const { text, attrs } of marked) {
      const marks = names.readMarks(text);
      if (attrs?.flush !== undefined) expect(marks.flush, text).toBe(attrs.flush);
      if (attrs?.style !== undefined) expect(marks.urinal, text).toBe(attrs.style);
      if (attrs?.emergency !== undefined) expect(marks.emergency, text).toBe(attrs.emergency);
    }
  });

  test.runIf(isThere)('the medium of every system name', () => {
    const all: readonly { text: string; medium: string | null }[] = shared.systems;
    expect(all.length).toBe(56);
    const wrong = all.filter(({ text, medium }) => (names.readMedium(text)?.meaning.medium ?? null) !== medium);
    expect(wrong.map(({ text }) => text)).toEqual([]);
  });

  // What no text can settle: remarks in place of names, and words that only a class or a company field decides.
  const undecidable = new Set([
    'AAV on a heating riser',
    'Robinet de chasse',
    'Birdcage, cowl',
    'Sump pump',
    'TOILET as the name of a space',
  ]);
  test.runIf(isThere)('counter-examples: what only sounds like something else', () => {
    const all: readonly { text: string; kind: string }[] = shared.entries.flatMap(
      ({ counterExamples = [] }: { counterExamples?: readonly { text: string; kind: string }[] }) => counterExamples,
    );
    expect(all.length).toBe(184);
    const isFixture = (kind: string): boolean =>
      kind !== 'unknown' && names.meaning(names.kind(kind)).part === 'fixture';
    const wrong = all.filter(({ text, kind }) => {
      if (undecidable.has(text)) return false;
      const medium = kind.startsWith('pipe-') ? names.readMedium(text)?.kind : undefined;
      const found = medium ?? kindOf(names.readThing(text)) ?? 'unknown';
      return isFixture(kind) ? found !== kind : found !== 'unknown' && isFixture(found);
    });
    expect(wrong.map(({ text, kind }) => `${text}: ${names.readThing(text)?.kind}, not ${kind}`)).toEqual([]);
  });
});

// Common practice, no source: words of the trade for how a fixture is flushed, made and used.
const markCases = [
  { text: 'Water Closet - Flush Tank:Private - 6.1 Lpf', flush: 'tank', litres: 6.1, domestic: true },
  { text: 'WC-1 Wall Hung, Sensor Flush Valve, 1.28 GPF, Public', flush: 'valve', litres: 4.8, domestic: false },
  { text: 'WC à poser avec réservoir attenant', flush: 'tank', litres: null, domestic: null },
  { text: 'Cuvette WC + robinet de chasse', flush: 'valve', litres: null, domestic: null },
  { text: 'Wand-WC mit Spülkasten', flush: 'tank', litres: null, domestic: null },
  { text: 'Wand-WC mit Druckspueler', flush: 'valve', litres: null, domestic: null },
  { text: 'Hangtoilet met inbouwreservoir', flush: 'tank', litres: null, domestic: null },
  { text: 'Inodoro con fluxómetro', flush: 'valve', litres: null, domestic: null },
  { text: 'Vaso con cassetta', flush: 'tank', litres: null, domestic: null },
  { text: 'Bacia sanitária com caixa acoplada', flush: 'tank', litres: null, domestic: null },
  { text: 'Toilet tank type or flush valve', flush: null, litres: null, domestic: null },
  { text: 'Water closet', flush: null, litres: null, domestic: null },
] as const;

test.each(markCases)('$text: flush $flush, $litres l, domestic $domestic', ({ text, flush, litres, domestic }) => {
  const marks = names.readMarks(text);
  expect(marks.flush).toBe(flush);
  expect(marks.flushLitres).toBe(litres);
  expect(marks.domestic).toBe(domestic);
});

test.each([
  ['Urinal stall type, floor standing', 'stall'],
  ['Standurinal', 'stall'],
  ['Wall hung urinal', 'wall'],
  ['Wall urinal, washout', 'wall-washout'],
  ['Wall urinal siphon jet pedestal', 'wall-other'],
  ['Pedestal urinal', 'pedestal'],
  ['Washout urinal', 'washout'],
  ['Trough urinal 1800', 'trough'],
  ['Urinal, waterless, wall hung', 'waterless'],
  ['Urinoir mural', 'wall'],
  ['Pisuar ścienny', 'wall'],
  ['Urinal', null],
])('%s has the style %s', (text, style) => {
  expect(names.readMarks(text).urinal).toBe(style);
});

test.each([
  ['Emergency floor drain', true],
  ['Drain de plancher, urgence', true],
  ['Floor drain 3"', false],
])('%s is an emergency drain: %s', (text, emergency) => {
  expect(names.readMarks(text).emergency).toBe(emergency);
});

test.each([
  ['Shower column, 5 heads', 5],
  ['Wash Fountain 5-Station', 5],
  ['Shower 900', null],
])('%s counts %s heads', (text, heads) => {
  expect(names.readMarks(text).heads).toBe(heads);
});

test.each([
  ['Wet vent WV-1', 'wet-vent'],
  ['wetvented branch', 'wet-vent'],
  ['Circuit Vent 2', 'circuit-vent'],
  ['loop vent', 'circuit-vent'],
  ['individually vented lavatory', 'individual-vent'],
  ['ループ通気', 'circuit-vent'],
  ['Vent stack', null],
])('%s says %s', (text, reading) => {
  expect(names.readVenting(text)).toBe(reading);
});

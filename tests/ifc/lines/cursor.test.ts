import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { Cursor } from '../../../src/ifc/lines/cursor.ts';
import { readNumber } from '../../../src/ifc/lines/number.ts';
import { utf8 } from '../step-file.ts';

/** A cursor in front of the first of these arguments. */
const over = (args: string): Cursor => new Cursor(utf8(`(${args});`)).at(0);

describe('a cursor takes arguments one after the other, whatever they are', () => {
  test('references, lists of them, and `$`', () => {
    const cursor = over("#12, ( #3 , #4,#5 ),$,#0,(),'x'");
    expect([cursor.id(), cursor.ids(), cursor.id(), cursor.id(), cursor.ids(), cursor.text()]).toEqual([
      12,
      [3, 4, 5],
      0,
      0,
      [],
      'x',
    ]);
    expect(cursor.more).toBe(false);
  });

  test('a typed value reads as what it holds', () => {
    const cursor = over("IFCLABEL('it''s'),IFCREAL(-1.5E-3),IFCBOOLEAN(.T.),IFCLOGICAL(.U.)");
    expect(cursor.typeName()).toBe('IFCLABEL');
    expect([cursor.text(), cursor.number(), cursor.flag(), cursor.flag()]).toEqual(["it's", -0.0015, true, null]);
  });

  test('an argument of another kind reads as absent and is passed over', () => {
    const cursor = over("'text',#7,.E.,5");
    expect([cursor.number(), cursor.text(), cursor.id(), cursor.enumeration()]).toEqual([null, null, 0, null]);
  });

  test('commas, brackets and comments in texts and between arguments mislead nobody', () => {
    const cursor = over("'a,(b);#9=',/* ,('x') */#8,(('c)',#1),#2)");
    expect(cursor.text()).toBe('a,(b);#9=');
    expect(cursor.id()).toBe(8);
    expect(cursor.ids()).toEqual([1, 2]);
  });

  test('skip counts arguments, not commas within them', () => {
    expect(over("(1,(2,3)),'a,b',IFCX('c,d'),#4").skip(3).id()).toBe(4);
    expect(over('#1').skip(5).more).toBe(false);
  });

  test('numbers of nested lists come in order; digits of references and class names are no numbers', () => {
    expect(over('((0.,1.5),(-2.E1,+3))').numbers([])).toEqual([0, 1.5, -20, 3]);
    expect(over('(#12,IFCPARAMETERVALUE(0.25))').mixed()).toEqual({ ids: [12], numbers: [0.25] });
    expect(over('(IFCLINEINDEX((1,2)),IFCARCINDEX((2,3,4)))').typedLists()).toEqual([
      { type: 'IFCLINEINDEX', numbers: [1, 2] },
      { type: 'IFCARCINDEX', numbers: [2, 3, 4] },
    ]);
  });

  test('enumerations and classes are upper case, however they are written', () => {
    expect(over('.vent.').enumeration()).toBe('VENT');
    expect(over("ifclabel('x')").typeName()).toBe('IFCLABEL');
  });

  test('brackets deeper than 100 are passed over and counted', () => {
    const cursor = over(`${'('.repeat(50_000)}1${')'.repeat(50_000)},#3`);
    expect(cursor.number()).toBeNull();
    expect(cursor.id()).toBe(3);
    expect(cursor.watch.tooDeep).toBeGreaterThan(0);
  });

  test('bytes that end early end the reading', () => {
    for (const cut of ["(#12,'ab", '(#12,(1,2', '(#12,IFCLABEL(', '(#12']) {
      const cursor = new Cursor(utf8(cut)).at(0);
      expect(cursor.id()).toBe(12);
      expect([cursor.text(), cursor.number(), cursor.ids(), cursor.more].length).toBe(4);
    }
  });
});

describe('numbers are the ones that JavaScript reads from the same text', () => {
  for (const text of [
    '0.',
    '-0.',
    '1.E-005',
    '123456789012345678',
    '0.1',
    '5e-324',
    '1.7976931348623157E308',
    '4.35',
  ]) {
    test(text, () => expect(readNumber(utf8(text), 0)).toBe(Number(text)));
  }

  test('any double, written in any of the usual ways', () => {
    const any = fc.double({ noNaN: true, noDefaultInfinity: true });
    fc.assert(
      fc.property(any, fc.integer({ min: 1, max: 17 }), (value, digits) => {
        for (const text of [String(value), value.toExponential(), value.toPrecision(digits).toUpperCase()]) {
          expect(readNumber(utf8(`${text},`), 0)).toBe(Number(text));
        }
      }),
      { numRuns: 500 },
    );
  });
});

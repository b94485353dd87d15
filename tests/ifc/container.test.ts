import { gzipSync, zipSync } from 'fflate';
import { describe, expect, test } from 'vitest';
import { InputError } from '../../src/findings/input-error.ts';
import { unpack } from '../../src/ifc/container.ts';
import { openFiles } from '../../src/ifc/open.ts';
import { latin1, stepFile, utf8 } from './step-file.ts';

const model = stepFile("#1=IFCWALL('a',$);");
const text = (bytes: Uint8Array): string => new TextDecoder().decode(bytes);

describe('a model comes plain, gzipped or in a zip', () => {
  test('plain', () => expect(unpack('hall.ifc', model)).toEqual({ name: 'hall.ifc', bytes: model }));

  test('gzipped: the name loses its .gz', () => {
    const { name, bytes } = unpack('hall.ifc.gz', gzipSync(model));
    expect(name).toBe('hall.ifc');
    expect(text(bytes)).toBe(text(model));
  });

  test('ifcZIP: the entry has the name, folders off', () => {
    const { name, bytes } = unpack('hall.ifczip', zipSync({ 'out/hall.ifc': model, 'out/readme.txt': utf8('x') }));
    expect(name).toBe('hall.ifc');
    expect(text(bytes)).toBe(text(model));
  });

  test('a comment, blanks or a byte order mark may stand first', () => {
    for (const first of ['\ufeff', '\n\n  ', '/* made by hand */\n']) {
      expect(unpack('a.ifc', utf8(first + text(model))).bytes.length).toBeGreaterThan(model.length);
    }
  });
});

describe('anything else is refused with what it is and what to do', () => {
  const zeros = new Uint8Array(30_000_000);
  const lying = (() => {
    const bytes = zipSync({ 'a.ifc': zeros });
    // The central directory's size field claims 10 bytes.
    new DataView(bytes.buffer, bytes.byteOffset).setUint32(findCentral(bytes) + 24, 10, true);
    return bytes;
  })();
  const cases: readonly (readonly [string, Uint8Array, RegExp])[] = [
    ['an empty file', new Uint8Array(0), /a\.ifc: the file is empty/],
    ['blanks only', utf8('  \n\n'), /nothing but blanks/],
    ['a text', utf8('Dear all,\nplease find attached'), /no IFC file: it does not begin with ISO-10303-21/],
    ['XML', utf8('<?xml version="1.0"?><ifcXML/>'), /XML.*IFC-SPF/],
    ['a web page', utf8('<!DOCTYPE html><html><body>Sign in</body></html>'), /web page/],
    ['JSON', utf8('{"type":"ifcJSON"}'), /JSON/],
    ['UTF-16', latin1('\xff\xfeI\0S\0O\0'), /UTF-16/],
    ['UTF-16 without a mark', latin1('I\0S\0O\0'), /UTF-16/],
    ['a first line missing', utf8("HEADER;\nFILE_SCHEMA(('IFC4'));"), /first line is missing/],
    ['binary', Uint8Array.from({ length: 100 }, (_, k) => (k * 37) & 255), /no IFC file/],
    ['a gzip file cut in half', gzipSync(model).slice(0, 60), /gzip file is damaged/],
    ['a zip file cut in half', zipSync({ 'a.ifc': model }).slice(0, 80), /zip file is damaged/],
    ['a zip without a model', zipSync({ 'a.txt': model }), /no \.ifc file/],
    ['two models in a zip', zipSync({ 'a.ifc': model, 'b/c.ifc': model }), /2 models \(a\.ifc, c\.ifc\)/],
    ['a zip in a zip', zipSync({ 'a.ifc': zipSync({ 'b.ifc': model }) }), /another zip file/],
    ['a gzip bomb', gzipSync(zeros), /more than 200 times its size/],
    ['a zip bomb', zipSync({ 'a.ifc': zeros }), /more than 200 times its size/],
    ['a zip whose directory lies about the size', lying, /a\.ifc/],
  ];
  for (const [what, bytes, message] of cases) {
    test(what, () => {
      let caught: unknown;
      try {
        unpack('a.ifc', bytes);
      } catch (error) {
        caught = error;
      }
      expect(caught).toBeInstanceOf(InputError);
      expect((caught as InputError).exit).toBe(3);
      expect((caught as InputError).message).toMatch(message);
    });
  }
});

describe('a STEP file that is no IFC', () => {
  const open = (bytes: Uint8Array) => openFiles([{ name: 'a.ifc', bytes }], () => '');

  test('without a schema', () => {
    const bytes = utf8(text(model).replace(/FILE_SCHEMA.*\n/, ''));
    expect(() => open(bytes)).toThrow(/names no schema/);
  });

  test('with another schema', () => {
    expect(() => open(stepFile('#1=PRODUCT($);', { schema: 'AUTOMOTIVE_DESIGN' }))).toThrow(
      /AUTOMOTIVE_DESIGN, not IFC/,
    );
  });
});

function findCentral(bytes: Uint8Array): number {
  for (let i = bytes.length - 4; i >= 0; i--)
    if (bytes[i] === 0x50 && bytes[i + 1] === 0x4b && bytes[i + 2] === 1) return i;
  return -1;
}

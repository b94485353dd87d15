import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { indexLines } from '../../../src/ifc/lines/index-lines.ts';
import { type LineIndex, lineNumber, startOf, withoutOwnBlock } from '../../../src/ifc/lines/line-index.ts';
import { stepFile, utf8 } from '../step-file.ts';

const records = (index: LineIndex): string[] =>
  Array.from(index.ids, (id, record) => `#${id} ${index.types[index.typeOf[record]!]}`);
const noDamage = {
  cutOff: null,
  merged: [],
  openStrings: [],
  oddStrings: [],
  unreadable: [],
  idsTooLarge: [],
  doubledIds: [],
  outsideData: 0,
};

describe('however a file is written, its instances are the same', () => {
  const lines =
    "#1=IFCWALL('a',$);\n#20=IFCPIPESEGMENT('it''s; #3=X',(#1,#1));\n#3= IFCSIUNIT(*,.LENGTHUNIT.,$,.METRE.);";
  const plain = new TextDecoder().decode(stepFile(lines));
  const forms: Record<string, string> = {
    'line feeds': plain,
    'carriage return and line feed': plain.replaceAll('\n', '\r\n'),
    'carriage returns alone': plain.replaceAll('\n', '\r'),
    'all on one line': plain.replaceAll('\n', ''),
    'a byte order mark': `\ufeff${plain}`,
    'small letters': plain.replace('IFCPIPESEGMENT', 'IfcPipeSegment').replace('IFCWALL', 'ifcwall'),
    'blanks everywhere': plain.replaceAll('=', ' = ').replaceAll("('a'", " ( 'a'"),
    'comments everywhere': plain
      .replace('#1=', "/* #9=IFCX('; */ #1/* a */=/* ' */")
      .replace("('a',", "/* ( */('a'/* ) */,"),
    'bytes after the end': `${plain}\n#99=IFCWALL('b',$);`,
  };
  for (const [form, text] of Object.entries(forms)) {
    test(form, () => {
      const index = indexLines(utf8(text));
      expect(records(index)).toEqual(['#1 IFCWALL', '#20 IFCPIPESEGMENT', '#3 IFCSIUNIT']);
      expect(index.damage).toEqual(noDamage);
      expect(index.schemas).toEqual(['IFC4']);
      expect(index.maxId).toBe(20);
      expect([...index.recordsOf('IFCPIPESEGMENT')]).toEqual([1]);
      expect([index.find(3), index.find(20), index.find(4)]).toEqual([2, 1, -1]);
    });
  }

  test('line ends, the place to write, line numbers', () => {
    const index = indexLines(utf8(plain.replaceAll('\n', '\r\n')));
    expect(index.eol).toBe('\r\n');
    const text = new TextDecoder().decode(index.bytes);
    expect(index.dataEnd).toBe(text.lastIndexOf('ENDSEC'));
    expect(lineNumber(index.bytes, startOf(index, 1))).toBe(9);
    expect(text.slice(startOf(index, 1), startOf(index, 1) + 4)).toBe('#20=');
  });

  test('two DATA sections: the last ENDSEC that closes one is the place to write', () => {
    const text = new TextDecoder().decode(stepFile("#1=IFCWALL('ENDSEC;',$);\nENDSEC;\nDATA;\n#2=IFCSLAB('b',$);"));
    const index = indexLines(utf8(text));
    expect(records(index)).toEqual(['#1 IFCWALL', '#2 IFCSLAB']);
    expect(index.dataEnd).toBe(text.lastIndexOf('ENDSEC'));
  });

  test('anchors and a signature are no instances', () => {
    const text = plain
      .replace('DATA;', 'ANCHOR;\n<a>=#1;\nENDSEC;\nDATA;')
      .replace('END-ISO', 'SIGNATURE;\nabc=\nENDSEC;\nEND-ISO');
    expect(records(indexLines(utf8(text))).length).toBe(3);
  });

  test('a complex instance is an instance of no class', () => {
    const index = indexLines(stepFile('#1=(IFCA(1)IFCB($));\n#2=IFCWALL($);'));
    expect(records(index)).toEqual(['#1 (', '#2 IFCWALL']);
  });

  test('scattered ids are found like dense ones', () => {
    const index = indexLines(stepFile('#4294967295=IFCWALL($);\n#7=IFCSLAB($);\n#2000000000=IFCROOF($);'));
    expect([index.find(4294967295), index.find(7), index.find(2000000000), index.find(8)]).toEqual([0, 1, 2, -1]);
    expect(index.damage).toEqual(noDamage);
  });
});

describe('damage is found and said', () => {
  const damageOf = (bytes: Uint8Array) => indexLines(bytes).damage;

  test('a doubled id: the last one counts, the first is nobody', () => {
    const index = indexLines(stepFile("#1=IFCWALL('a',$);\n#1=IFCSLAB('b',$);"));
    expect(index.damage.doubledIds).toEqual([1]);
    expect(index.types[index.typeOf[index.find(1)]!]).toBe('IFCSLAB');
    expect(index.recordsOf('IFCWALL').length).toBe(0);
  });

  test('a missing semicolon: both instances are read', () => {
    const index = indexLines(stepFile("#1=IFCWALL('a',$)\n#2=IFCSLAB('b',$);\n#3=IFCROOF($);"));
    expect(records(index)).toEqual(['#1 IFCWALL', '#2 IFCSLAB', '#3 IFCROOF']);
    expect(index.damage.merged.length).toBe(1);
    expect(lineNumber(index.bytes, index.damage.merged[0]!)).toBe(9);
  });

  test('a missing quote: the lines behind it are read', () => {
    const index = indexLines(stepFile("#1=IFCWALL('a,$);\n#2=IFCSLAB('b',$);\n#3=IFCROOF($);"));
    expect(records(index)).toEqual(['#1 IFCWALL', '#2 IFCSLAB', '#3 IFCROOF']);
    expect(index.damage.openStrings.length).toBe(1);
    expect(index.damage.cutOff).toBeNull();
  });

  test('a text that looks like an instance is a text', () => {
    const index = indexLines(stepFile("#1=IFCWALL('a\n#2=IFCSLAB(''b'',$);\n',$);"));
    expect(records(index)).toEqual(['#1 IFCWALL']);
    expect(index.damage.oddStrings.length).toBe(1);
  });

  test('ids past 4 294 967 295 are left out', () => {
    const index = indexLines(stepFile('#4294967296=IFCWALL($);\n#99999999999999=IFCSLAB($);\n#5=IFCROOF($);'));
    expect(records(index)).toEqual(['#5 IFCROOF']);
    expect(index.damage.idsTooLarge.length).toBe(2);
    expect(index.maxId).toBe(5);
  });

  test('lines that are no instances', () => {
    const index = indexLines(
      stepFile('#1=IFCWALL($);\n#=IFCX($);\n#2 IFCX($);\n#3=;\n!!;\n#4=IFC X($);\n#5=IFCSLAB($);'),
    );
    expect(records(index)).toEqual(['#1 IFCWALL', '#5 IFCSLAB']);
    expect(index.damage.unreadable.length).toBe(5);
  });

  for (const [where, tail] of [
    ['in a string', "#1=IFCWALL('a"],
    ['in an instance', '#1=IFCWALL($,'],
    ['in an instance', '#1=IFCW'],
    ['in a comment', '#1=IFCWALL($); /* a'],
    ['before ENDSEC', '#1=IFCWALL($);'],
  ] as const) {
    test(`cut off ${where}: …${tail}`, () => {
      const index = indexLines(stepFile(tail, { end: '' }));
      expect(index.damage.cutOff?.where).toBe(where);
      expect(index.dataEnd).toBeNull();
    });
  }

  test('cut off before END-ISO-10303-21', () => {
    expect(damageOf(stepFile('#1=IFCWALL($);', { end: 'ENDSEC;\n' })).cutOff?.where).toBe('before END-ISO-10303-21');
  });

  test('whatever bytes come, the index ends and never throws', () => {
    const text = new TextDecoder().decode(
      stepFile("#1=IFCWALL('a',$);\n#2=IFCSLAB((1.,2.),#1);/* c */\n#3=IFCX(.E.,*);"),
    );
    const flips = fc.array(fc.tuple(fc.nat(text.length - 1), fc.integer({ min: 0, max: 255 })), { maxLength: 8 });
    fc.assert(
      fc.property(flips, fc.nat(text.length), (changes, cut) => {
        const bytes = utf8(text);
        for (const [at, byte] of changes) bytes[at] = byte;
        const index = indexLines(bytes.slice(0, cut));
        expect(index.count).toBeLessThanOrEqual(8);
        for (let record = 0; record < index.count; record++) expect(index.bytes[index.args[record]!]).toBe(40);
      }),
      { numRuns: 3000 },
    );
  });
});

describe('our own block', () => {
  const ours =
    "/* Drainwright 1 begin */\n#3=IFCPROPERTYSET('x',$,'Drainwright_Pipe',$,());\n/* Drainwright 1 end */\n";
  const before = new TextDecoder().decode(stepFile("#1=IFCWALL('a',$);\n#2=IFCSLAB('b',$);"));
  const after = before.replace('ENDSEC;\nEND-ISO', `${ours}ENDSEC;\nEND-ISO`);

  test('is passed over, and the file without it is the file before', () => {
    const index = indexLines(utf8(after));
    expect(records(index)).toEqual(['#1 IFCWALL', '#2 IFCSLAB']);
    expect(index.maxId).toBe(2);
    expect(index.damage).toEqual(noDamage);
    expect(new TextDecoder().decode(withoutOwnBlock(index))).toBe(before);
    expect(withoutOwnBlock(indexLines(utf8(before)))).toEqual(utf8(before));
  });

  test('without its closing mark its lines are read like any others', () => {
    const index = indexLines(utf8(after.replace('/* Drainwright 1 end */\n', '')));
    expect(records(index)).toEqual(['#1 IFCWALL', '#2 IFCSLAB', '#3 IFCPROPERTYSET']);
    expect(index.ownBlock).toBeNull();
  });

  test('marks within a text are text', () => {
    const index = indexLines(stepFile("#1=IFCWALL('/* Drainwright 1 begin */',$);\n#2=IFCSLAB('b',$);"));
    expect(records(index).length).toBe(2);
    expect(index.ownBlock).toBeNull();
  });
});

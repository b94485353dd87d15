import fc from 'fast-check';
import { expect, test } from 'vitest';
import { indexLines } from '../../../src/ifc/lines/index-lines.ts';
import { appendSets, withoutOurLines } from '../../../src/ifc/write/append-sets.ts';
import type { PropertySetToWrite, PropertyToWrite } from '../../../src/model/property-set.ts';
import { bytesOf, pipeOne, sha256, smallIfc, textOf } from '../../support/small-ifc.ts';

const role = (value: string): PropertyToWrite => ({ name: 'Role', value: { as: 'label', value } });
const load = (value: number): PropertyToWrite => ({ name: 'Load', value: { as: 'real', value } });
const sets: readonly PropertySetToWrite[] = [
  { name: 'Drainwright_Pipe', on: 21, properties: [role('branch'), load(14)] },
  { name: 'Drainwright_Pipe', on: 22, properties: [role('branch'), load(2.5)] },
  { name: 'Drainwright_Model', on: 'building', properties: [role('é½')] },
];
const append = (text: string, some = sets): string =>
  textOf(appendSets(indexLines(bytesOf(text)), some, { name: 'hall.ifc', digest: sha256, version: '1.2.3' }));
const begin = '/* Drainwright 1 begin */';
const end = '/* Drainwright 1 end */';
const blockOf = (text: string, eol = '\n'): string[] => {
  const block = text.slice(text.indexOf(begin), text.indexOf(end) + end.length);
  return block.split(eol);
};
const idsIn = (line: string): string => line.replaceAll(/'[0-9A-Za-z_$]{22}'/g, "'id'");

test('the lines that are added to an IFC4 file, one by one', () => {
  const lines = blockOf(append(smallIfc())).map(idsIn);
  expect(lines).toEqual([
    begin,
    "#41=IFCPROPERTYSINGLEVALUE('Role',$,IFCLABEL('branch'),$);",
    "#42=IFCPROPERTYSINGLEVALUE('Load',$,IFCREAL(14.),$);",
    "#43=IFCPROPERTYSET('id',$,'Drainwright_Pipe',$,(#41,#42));",
    "#44=IFCRELDEFINESBYPROPERTIES('id',$,$,$,(#21),#43);",
    "#45=IFCPROPERTYSINGLEVALUE('Load',$,IFCREAL(2.5),$);",
    "#46=IFCPROPERTYSET('id',$,'Drainwright_Pipe',$,(#41,#45));",
    "#47=IFCRELDEFINESBYPROPERTIES('id',$,$,$,(#22),#46);",
    "#48=IFCPROPERTYSINGLEVALUE('Role',$,IFCLABEL('\\X2\\00E900BD\\X0\\'),$);",
    "#49=IFCPROPERTYSET('id',$,'Drainwright_Model',$,(#48));",
    "#50=IFCRELDEFINESBYPROPERTIES('id',$,$,$,(#12),#49);",
    end,
  ]);
});

test('IFC2X3: the owner history of the file is used', () => {
  const lines = blockOf(append(smallIfc({ schema: 'IFC2X3' }))).map(idsIn);
  expect(lines).toContain("#43=IFCPROPERTYSET('id',#5,'Drainwright_Pipe',$,(#41,#42));");
  expect(lines).toContain("#44=IFCRELDEFINESBYPROPERTIES('id',#5,$,$,(#21),#43);");
});

// Seconds since 1970 by `date -u -d <stamp> +%s`.
const stamps = [
  { stamp: '2021-03-04T05:06:07', seconds: 1614834367 },
  { stamp: '2000-02-29T23:59:59', seconds: 951868799 },
  { stamp: '2024-12-31T00:00:00+02:00', seconds: 1735596000 },
  { stamp: '1970-01-01T00:00:00Z', seconds: 0 },
  { stamp: 'yesterday', seconds: 0 },
];
for (const { stamp, seconds } of stamps) {
  test(`IFC2X3 without an owner history: ours is dated by the header, ${stamp}`, () => {
    const lines = blockOf(append(smallIfc({ schema: 'IFC2X3', owner: false, timeStamp: stamp })));
    expect(lines.slice(1, 6)).toEqual([
      "#41=IFCPERSON($,'Drainwright',$,$,$,$,$,$);",
      "#42=IFCORGANIZATION($,'Drainwright contributors',$,$,$);",
      '#43=IFCPERSONANDORGANIZATION(#41,#42,$);',
      "#44=IFCAPPLICATION(#42,'1.2.3','Drainwright','Drainwright');",
      `#45=IFCOWNERHISTORY(#43,#44,$,.ADDED.,$,$,$,${seconds});`,
    ]);
    expect(lines.filter((line) => line.includes('IFCPROPERTYSET(')).every((line) => line.includes("',#45,'"))).toBe(
      true,
    );
  });
}

const shapes = [
  { what: 'line feeds', text: smallIfc() },
  { what: 'carriage returns and line feeds', text: smallIfc({ eol: '\r\n' }), eol: '\r\n' },
  { what: 'lone carriage returns', text: smallIfc({ eol: '\r' }), eol: '\r' },
  { what: 'everything on one line', text: smallIfc({ eol: '' }) },
  { what: 'a byte order mark', text: `\u00EF\u00BB\u00BF${smallIfc()}` },
  { what: 'bytes behind the end', text: `${smallIfc()}\n\n  trailing ENDSEC; text` },
  { what: 'IFC2X3', text: smallIfc({ schema: 'IFC2X3' }) },
  { what: 'IFC2X3 without an owner', text: smallIfc({ schema: 'IFC2X3', owner: false }) },
  { what: 'IFC4X3', text: smallIfc({ schema: 'IFC4X3_ADD2' }) },
];
for (const { what, text, eol = '\n' } of shapes) {
  test(`${what}: every byte stays, one piece is added, a second run gives the same bytes`, () => {
    const once = append(text);
    const from = once.indexOf(begin);
    const to = once.indexOf(end) + end.length + eol.length;
    expect(once.slice(0, from) + once.slice(to)).toBe(text);
    expect(once.slice(to).startsWith('ENDSEC;')).toBe(true);
    expect(once.slice(from, to)).toMatch(/^[\r\n -~]*$/);
    expect(append(once)).toBe(once);
    expect(textOf(withoutOurLines(indexLines(bytesOf(once)), sha256))).toBe(text);
    expect(append(append(text, sets.slice(1)))).toBe(once);
  });
}

test('nothing to say about a model: nothing is added, and what an earlier run added goes', () => {
  expect(append(smallIfc(), [])).toBe(smallIfc());
  expect(append(append(smallIfc()), [])).toBe(smallIfc());
});

/** As another program would save it: the marks gone, lines renumbered and in another order. */
const savedElsewhere = (text: string): string => {
  const plain = text.replaceAll(/\/\* Drainwright 1 (?:begin|end) \*\/\n/g, '');
  const renumbered = plain.replaceAll(/#(\d+)(?=[=,)])(?![^']*'[^']*$)/gm, (_, id: string) => `#${Number(id) + 100}`);
  const lines = renumbered.split('\n');
  const from = lines.indexOf('DATA;') + 1;
  const to = lines.lastIndexOf('ENDSEC;');
  return [...lines.slice(0, from), ...lines.slice(from, to).toReversed(), ...lines.slice(to)].join('\n');
};

test('marks gone: our lines are known by their GlobalIds and replaced, no other line is touched', () => {
  const clean = savedElsewhere(smallIfc().replace(' with ENDSEC; and #40= in it', ''));
  const saved = savedElsewhere(append(smallIfc().replace(' with ENDSEC; and #40= in it', '')));
  expect(saved).not.toContain('Drainwright 1');
  const moved = sets.map((set) => (set.on === 'building' ? set : { ...set, on: set.on + 100 }));
  const again = append(saved, moved);
  expect(again).toBe(append(clean, moved));
  expect(append(again, moved)).toBe(again);
  expect(textOf(withoutOurLines(indexLines(bytesOf(saved)), sha256))).toBe(clean);
});

test('marks gone: a set that only bears our name, and a value that another set uses, stay', () => {
  const foreign = [
    "#50=IFCPROPERTYSINGLEVALUE('Role',$,IFCLABEL('mine'),$);",
    "#51=IFCPROPERTYSET('2Dr4inSmallModel0other',$,'Drainwright_Pipe',$,(#50));",
    "#52=IFCRELDEFINESBYPROPERTIES('2Dr4inSmallModel0relat',$,$,$,(#31),#51);",
  ];
  const lines = append(smallIfc(), sets.slice(0, 1))
    .split('\n')
    .filter((line) => !line.startsWith('/* Drainwright'));
  const at = lines.lastIndexOf('ENDSEC;');
  const borrowing = "#53=IFCPROPERTYSET('2Dr4inSmallModel0borro',$,'Schedule',$,(#42));";
  const saved = [...lines.slice(0, at), ...foreign, borrowing, ...lines.slice(at)].join('\n');
  const rest = textOf(withoutOurLines(indexLines(bytesOf(saved)), sha256)).split('\n');
  expect(rest).toEqual(expect.arrayContaining([...foreign, borrowing]));
  expect(rest.some((line) => line.startsWith('#42='))).toBe(true);
  expect(rest.some((line) => /^#4[134]=/.test(line))).toBe(false);
});

test('a GlobalId that two pipes share, or none: both still get sets of their own', () => {
  for (const secondGlobalId of ['$', `'${pipeOne}'`]) {
    const written = append(smallIfc({ secondGlobalId }));
    const globalIds = [...written.matchAll(/IFC(?:PROPERTYSET|RELDEFINESBYPROPERTIES)\('([^']{22})'/g)].map(
      ([, id]) => id,
    );
    expect(globalIds).toHaveLength(6);
    expect(new Set(globalIds).size).toBe(6);
    expect(append(written)).toBe(written);
  }
});

test('cut off anywhere, a file is refused and nothing is handed out', () => {
  const whole = smallIfc();
  const last = whole.lastIndexOf('END-ISO-10303-21') + 'END-ISO-10303-21'.length;
  fc.assert(
    fc.property(fc.integer({ min: whole.indexOf('DATA;'), max: last - 1 }), (cut) => {
      expect(() => append(whole.slice(0, cut))).toThrow(/hall\.ifc: .*(cut off|never closed)/);
    }),
  );
});

test('ids at the end of their range are refused, one place before they are not', () => {
  const one = sets.slice(0, 1);
  const at = (id: number): string => smallIfc().replace('#40=IFCREL', `#${id}=IFCREL`);
  expect(append(at(4_294_967_291), one)).toContain('#4294967295=IFCRELDEFINESBYPROPERTIES');
  expect(() => append(at(4_294_967_292), one)).toThrow('leaves no room');
});

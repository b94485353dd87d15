import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { InputError } from '../../src/findings/input-error.ts';
import type { Model } from '../../src/model/model.ts';
import { hasOpenModels, openModel } from './models.ts';
import { modelOf } from './read-one.ts';
import { latin1, projectLines, stepFile, utf8 } from './step-file.ts';

const said = (model: Model): unknown[] => model.findings.map(({ code, facts }) => [code, facts.problem, facts.count]);
const pipes = (count: number): string =>
  Array.from({ length: count }, (_, k) => `#${20 + k}=IFCPIPESEGMENT('g${k}',$,'Pipe ${k}',$,$,$,$,$,$);`).join('\n');
const whole = stepFile(`${projectLines()}\n${pipes(40)}`);

describe('a file that is cut off reads as far as it goes, and says so', () => {
  for (const part of [0.25, 0.5, 0.99]) {
    test(`at ${part * 100} %`, () => {
      const cut = whole.slice(0, Math.floor(whole.length * part));
      const model = modelOf(cut);
      expect(model.elements.length).toBeLessThanOrEqual(40);
      expect(said(model)).toEqual([['file-damaged', 'cut-off', 1]]);
      expect(model.files[0]!.remarks.join()).toMatch(/cut off/);
    });
  }

  test('whatever is cut off the end, it reads or is refused, and elements only grow fewer', () => {
    let before = 0;
    for (let size = 0; size <= whole.length; size += 7) {
      try {
        const { elements } = modelOf(whole.slice(0, size));
        expect(elements.length).toBeGreaterThanOrEqual(before);
        before = elements.length;
      } catch (error) {
        expect(error).toBeInstanceOf(InputError);
      }
    }
    expect(before).toBeGreaterThan(38);
  });
});

describe('damage in records is found and said', () => {
  const lines = (data: string): Model => modelOf(stepFile(`${projectLines()}\n${data}`));

  test('a doubled id', () => {
    const model = lines(
      "#20=IFCPIPESEGMENT('a',$,'first',$,$,$,$,$,$);\n#20=IFCPIPESEGMENT('b',$,'second',$,$,$,$,$,$);",
    );
    expect(model.elements.map(({ name }) => name)).toEqual(['second']);
    expect(said(model)).toEqual([['file-damaged', 'doubled-id', 1]]);
    expect(model.findings[0]!.facts).toMatchObject({ file: 'case.ifc', ids: ['#20'] });
  });

  test('two lines made one: both are read', () => {
    const model = lines("#20=IFCPIPESEGMENT('a',$,'one',$,$,$,$,$,$)\n#21=IFCPIPESEGMENT('b',$,'two',$,$,$,$,$,$);");
    expect(model.elements.map(({ name }) => name)).toEqual(['one', 'two']);
    expect(said(model)).toEqual([['file-damaged', 'merged-lines', 1]]);
  });

  test('a reference into nothing, in a record that is read', () => {
    const model = lines(
      "#20=IFCPIPESEGMENT('a',$,'one',$,$,#77,#78,$,$);\n#21=IFCRELDEFINESBYTYPE('r',$,$,$,(#20),#79);",
    );
    expect(model.elements[0]!.origin).toBeNull();
    expect(said(model)).toEqual([['file-damaged', 'dangling-reference', 3]]);
    expect(model.findings[0]!.facts.ids).toEqual(expect.arrayContaining(['#77', '#78', '#79']));
  });

  test('an id too large', () => {
    expect(said(lines("#99999999999=IFCPIPESEGMENT('a',$,$,$,$,$,$,$,$);"))).toEqual([
      ['file-damaged', 'id-too-large', 1],
    ]);
  });

  test('a line that is none', () => {
    expect(said(lines("hello;\n#20=IFCPIPESEGMENT('a',$,$,$,$,$,$,$,$);"))).toEqual([
      ['file-damaged', 'unreadable', 1],
    ]);
  });

  test('brackets 50 000 deep', () => {
    const model = lines(`#20=IFCPIPESEGMENT(${'('.repeat(50_000)}${')'.repeat(50_000)},$,'one',$,$,$,$,$,$);`);
    expect(model.elements[0]!.name).toBe('one');
  });

  test('a shape that contains itself', () => {
    const model = lines(`#20=IFCPIPESEGMENT('a',$,'one',$,$,$,#30,$,$);\n#30=IFCPRODUCTDEFINITIONSHAPE($,$,(#31));
#31=IFCSHAPEREPRESENTATION($,'Body','MappedRepresentation',(#32,#32));\n#32=IFCMAPPEDITEM(#33,$);\n#33=IFCREPRESENTATIONMAP($,#31);`);
    expect(model.elements[0]!.centreLine).toBeNull();
    expect(said(model)).toEqual([['file-damaged', 'endless-shape', 1]]);
  });

  test('shapes that use shapes, twice each, forty deep', () => {
    const nest = Array.from({ length: 40 }, (_, k) => {
      const id = 100 + 4 * k;
      const next = k === 39 ? '' : `#${id + 4},#${id + 4}`;
      return `#${id}=IFCMAPPEDITEM(#${id + 1},$);\n#${id + 1}=IFCREPRESENTATIONMAP($,#${id + 2});\n#${id + 2}=IFCSHAPEREPRESENTATION($,'Body','x',(${next}));`;
    }).join('\n');
    const model = lines(`#20=IFCPIPESEGMENT('a',$,'one',$,$,$,#30,$,$);\n#30=IFCPRODUCTDEFINITIONSHAPE($,$,(#31));
#31=IFCSHAPEREPRESENTATION($,'Body','MappedRepresentation',(#100));\n${nest}`);
    expect(model.elements.length).toBe(1);
  });

  test('broken escapes and bytes of another code', () => {
    const model = modelOf(
      latin1(
        new TextDecoder()
          .decode(stepFile(`${projectLines()}\n#20=IFCPIPESEGMENT('a',$,'C:\\x \\X2\\00',$,'Gef\xe4lle',$,$,$,$);`))
          .replace('\ufffd', '\xe4'),
      ),
    );
    expect(model.elements[0]!.name).toBe('C:\\x \\X2\\00');
    expect(said(model).map((one) => (one as unknown[])[1])).toContain('broken-escape');
  });

  test('Windows-1252', () => {
    const text = new TextDecoder().decode(
      stepFile(`${projectLines()}\n#20=IFCPIPESEGMENT('a',$,'Gef@lle',$,$,$,$,$,$);`),
    );
    const model = modelOf(latin1(text.replace('@', '\xe4')));
    expect(model.elements[0]!.name).toBe('Gefälle');
    expect(said(model)).toEqual([['text-damaged', 'not-utf8', 1]]);
    expect(model.files[0]!.remarks.join()).toMatch(/Windows-1252/);
  });
});

describe('schemas', () => {
  const remarks = (schema: string): string => modelOf(stepFile(projectLines(), { schema })).files[0]!.remarks.join();
  for (const schema of ['IFC2X3', 'IFC4', 'IFC4X3_ADD2', 'ifc2x3'])
    test(`${schema} is known`, () => expect(remarks(schema)).toBe(''));
  test('a pre-release schema', () => expect(remarks('IFC4X3_RC3')).toMatch(/pre-release schema: it is read as IFC4X3/));
  test('a variant', () => expect(remarks('IFC2X3_TC1')).toMatch(/read as IFC2X3/));
  test('an unknown one', () => expect(remarks('IFC9')).toMatch(/read as IFC4/));
});

test('several files are one building: placements each in its own unit, storeys at one height joined', async () => {
  const { readModel } = await import('../../src/ifc/open.ts');
  const file = (unit: 'METRE' | 'MILLIMETRE', name: string, z: string): Uint8Array =>
    stepFile(`${projectLines(unit)}\n#20=IFCPIPESEGMENT('a',$,'${name}',$,$,#30,$,$,$);
#30=IFCLOCALPLACEMENT($,#31);\n#31=IFCAXIS2PLACEMENT3D(#32,$,$);\n#32=IFCCARTESIANPOINT((0.,0.,${z}));
#40=IFCBUILDINGSTOREY('${name}',$,'${name} level',$,$,#30,$,$,.ELEMENT.,$);\n#41=IFCRELCONTAINEDINSPATIALSTRUCTURE('c',$,$,$,(#20),#40);
#50=IFCDISTRIBUTIONSYSTEM('s',$,'S',$,$,$,$);\n#51=IFCRELASSIGNSTOGROUP('g',$,$,$,(#20),$,#50);
#60=IFCDISTRIBUTIONPORT('p',$,$,$,$,$,$,$,$,$);\n#61=IFCRELNESTS('n',$,$,$,#20,(#60));`);
  const model = readModel(
    [
      { name: 'a.ifc', bytes: file('METRE', 'A', '3.') },
      { name: 'b.ifc', bytes: file('MILLIMETRE', 'B', '3010.') },
    ],
    (bytes) => `digest of ${bytes.length}`,
  );
  expect(model.files.map(({ name, lengthUnit }) => [name, lengthUnit.name])).toEqual([
    ['a.ifc', 'METRE'],
    ['b.ifc', 'MILLIMETRE'],
  ]);
  expect(model.files[0]!.sha256).toMatch(/^digest of \d+$/);
  expect(
    model.elements.map(({ id, file: from, origin, storey, systems, ports }) => [
      id,
      from,
      origin![2],
      storey,
      systems,
      ports,
    ]),
  ).toEqual([
    [0, 0, 3, 0, [0], [0]],
    [1, 1, 3.0100000000000002, 0, [1], [1]],
  ]);
  expect(model.storeys.length).toBe(1);
  expect(model.ports.map(({ owner }) => owner)).toEqual([0, 1]);
});

describe('bytes changed at random', () => {
  const seeds = hasOpenModels
    ? [
        'riolering-topology/RioleringTest.ifc',
        'vent-pipe-dwv/SingleBackslash.ifc',
        'port-edge-cases/cable-three-ports.ifc',
        'revit-pipe-fittings/elbow-ports-nested.ifc',
      ].map(openModel)
    : [whole];
  test(`${seeds.length} models read or are refused, and never throw anything else`, () => {
    const change = fc.record({
      seed: fc.nat(seeds.length - 1),
      at: fc.double({ min: 0, max: 0.999, noNaN: true }),
      byte: fc.constantFrom(...utf8("#;,()'$*.=0129A/\\ \n")),
    });
    fc.assert(
      fc.property(fc.array(change, { minLength: 1, maxLength: 6 }), (changes) => {
        const bytes = seeds[changes[0]!.seed]!.slice();
        for (const { at, byte } of changes) bytes[Math.floor(at * bytes.length)] = byte;
        try {
          const model = modelOf(bytes);
          for (const { centreLine, box } of model.elements) {
            for (const one of [...(centreLine?.points.flat() ?? []), ...(box?.min ?? []), ...(box?.max ?? [])]) {
              expect(Number.isFinite(one)).toBe(true);
            }
          }
        } catch (error) {
          expect(error).toBeInstanceOf(InputError);
        }
      }),
      { numRuns: 1500 },
    );
  });
});

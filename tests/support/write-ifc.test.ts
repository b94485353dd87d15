import { IfcParser, SCHEMA_REGISTRY } from '@ifc-lite/parser';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import * as W from 'web-ifc';
import { draftOf } from './draft.ts';
import { sketch } from './sketch.ts';
import { type IfcOptions, ifcOf } from './write-ifc.ts';

const everything = sketch(`
  model "One of each: ½ 'quoted' \\ slash"
  storey "Ground floor" at 0
  space "Washroom" from -1 -1 to 5 3 height 2.6
  wall "North wall" from -1 0.4 to 5 0.4 height 2.8 layers "gypsum board" 13 "stud" 140 "gypsum board" 13 loadbearing internal
  slab "Floor" from -2 -2 to 6 4 top 0 thick 0.2
  urinal U1 at 0 0.2 0.5, stall, trap 2 in
  closet WC at 1 0 0, tank
  lavatory L at 2 0.2 0.5, trap 1¼ in
  bathtub B at 3 1 -0.05, trap 1½ in
  shower SH at 3 2 -0.05, heads 3
  floor-drain FD at 2 1 0, trap 3 in
  clothes-washer CW at 4 0.2 1
  dishwasher DW at 4 1 0.1
  thing X at 4.5 1 0.5, named "object-03"
  interceptor GI at 1 -3 -1
  manhole MH at 0 -5 -1
  backwater-valve BV at 1 -4 -1
  roof-drain RD at -1 -1 3
  trap T from L down 0.2, 1¼ in
  drain 2 in: U1 > J1 (north 0.25) > J2 (to -0.4) > J3 (at 4 0.45 -0.5)
  drain 3 in: WC > J4 (down 0.6) > J3
  drain 1¼ in: L > T > J1
  drain Bent 4 in whole: J3 > (down 0.5) > (south 2) > S (west 3)
  vent 1½ in: J1 > VT (up 4)
  vent 1½ in: J3 > AAV (up 1)
  rain 4 in: RD > R1 (down 4)
  cleanout CO from J4 east 0.3, 3 in
  drain 3 in: CO > J4
  terminal VT
  admittance-valve AAV
  sewer S
  on "Ground floor"
  roof "Roof" from -2 -2 to 6 4 top 3.4 thick 0.3
`);
const draft = draftOf(everything);

const variants: readonly Partial<IfcOptions>[] = [
  { schema: 'IFC2X3' },
  { schema: 'IFC4' },
  { schema: 'IFC4X3_ADD2' },
  { schema: 'IFC2X3', unit: 'in', ports: false, shuffle: 3 },
  { schema: 'IFC4', unit: 'mm', sizes: false, turn: 30, shift: [1000, -2000, 50] },
  { schema: 'IFC4X3_ADD2', unit: 'ft', shuffle: 7 },
];
const metresOf = { m: 1, mm: 0.001, ft: 0.3048, in: 0.0254 };

describe.each(variants)('%o', (options) => {
  const text = ifcOf(everything, options);
  const api = new W.IfcAPI();
  let model = -1;
  beforeAll(async () => {
    await api.Init(undefined, true);
    api.SetLogLevel(W.LogLevel.LOG_LEVEL_OFF);
    model = api.OpenModel(new TextEncoder().encode(text));
  });
  afterAll(() => {
    if (model >= 0) api.CloseModel(model);
  });

  test('the same sketch and options give the same bytes, in ASCII', () => {
    expect(ifcOf(everything, options)).toBe(text);
    expect(text).toMatch(/^[ -~\n]*$/);
  });

  test('no GlobalId twice, none malformed', () => {
    const ids = [...text.matchAll(/^#\d+=IFC\w+\('([0-9A-Za-z_$]{22})',/gm)].map((match) => match[1]!);
    expect(ids.length).toBeGreaterThan(100);
    expect(new Set(ids).size).toBe(ids.length);
    expect(ids.filter((id) => !/^[0-3]/.test(id))).toEqual([]);
  });

  test('web-ifc opens it: every element once, each with a shape at its place', () => {
    expect(model).toBeGreaterThanOrEqual(0);
    expect(api.GetModelSchema(model)).toBe(options.schema);
    const found = new Map<string, number>();
    const ids = api.GetLineIDsWithType(model, W.IFCELEMENT, true);
    for (let at = 0; at < ids.size(); at += 1) {
      const line = api.GetLine(model, ids.get(at));
      found.set(line.GlobalId.value, ids.get(at));
    }
    const angle = ((options.turn ?? 0) * Math.PI) / 180;
    const shift = options.shift ?? [0, 0, 0];
    for (const { globalId, box, name } of draft.elements) {
      const id = found.get(globalId);
      expect(id, name).toBeDefined();
      const points = meshPoints(api, model, id!);
      expect(points.length, name).toBeGreaterThan(0);
      const back = points.map(([x, y, z]) => {
        const [east, north] = [x - shift[0], y - shift[1]];
        const [cos, sin] = [Math.cos(angle), Math.sin(angle)];
        return [east * cos + north * sin, north * cos - east * sin, z - shift[2]] as const;
      });
      for (const axis of [0, 1, 2] as const) {
        const along = back.map((point) => point[axis]);
        // Circles are polygons in the mesh: a little inside the true box.
        const slack = 0.01;
        expect(Math.min(...along), name).toBeGreaterThan(box.min[axis] - 0.01);
        expect(Math.max(...along), name).toBeLessThan(box.max[axis] + 0.01);
        expect(Math.min(...along), name).toBeLessThan(box.min[axis] + slack);
        expect(Math.max(...along), name).toBeGreaterThan(box.max[axis] - slack);
      }
    }
    const fabric = everything.walls.length + everything.slabs.length + everything.roofs.length;
    expect(found.size).toBe(draft.elements.length + fabric);
  });

  test('an independent parser sees the same elements, ports and relations', async () => {
    const bytes = new TextEncoder().encode(text);
    const store = await new IfcParser().parseColumnar(bytes.buffer as ArrayBuffer);
    const count = (type: string) => store.entityIndex.byType.get(type)?.length ?? 0;
    const pipes = options.schema === 'IFC2X3' ? 'IFCFLOWSEGMENT' : 'IFCPIPESEGMENT';
    expect(count(pipes)).toBe(everything.pipes.length);
    expect(count('IFCDISTRIBUTIONPORT')).toBe(options.ports === false ? 0 : draft.ports.length);
    expect(count('IFCRELCONNECTSPORTS')).toBe(options.ports === false ? 0 : draft.connections.length);
    expect(count('IFCSPACE')).toBe(1);
    expect(store.entityCount).toBe([...text.matchAll(/^#\d+=/gm)].length);
  });
});

/** Top-level arguments of each line, split at commas outside strings and brackets. */
function linesOf(text: string): readonly { readonly keyword: string; readonly args: readonly string[] }[] {
  return [...text.matchAll(/^#\d+=(\w+)\((.*)\);$/gm)].map(([, keyword, inside]) => {
    const args = [''];
    let depth = 0;
    for (const [piece] of inside!.matchAll(/'(?:[^']|'')*'|[(),]|[^'(),]+/g)) {
      if (piece === ',' && depth === 0) args.push('');
      else args[args.length - 1] += piece;
      if (piece === '(') depth += 1;
      if (piece === ')') depth -= 1;
    }
    return { keyword: keyword!, args };
  });
}

const schemaClasses: Readonly<Record<string, Record<string, { readonly length: number }>>> = {
  IFC2X3: { ...W.IFC2X3 },
  IFC4: { ...W.IFC4 },
  IFC4X3_ADD2: { ...W.IFC4X3 },
};

test.each(['IFC2X3', 'IFC4', 'IFC4X3_ADD2'] as const)('%s: every line has the attributes of its class', (schema) => {
  const classes = new Map(
    Object.entries(schemaClasses[schema]!).map(([name, made]) => [name.toUpperCase(), made.length]),
  );
  const lines = linesOf(ifcOf(everything, { schema }));
  expect(lines.length).toBeGreaterThan(500);
  // The library's constructors leave derived attributes (`*`) out.
  const given = (args: readonly string[]): number => args.filter((arg) => arg !== '*').length;
  const wrong = lines.filter(({ keyword, args }) => classes.get(keyword) !== given(args));
  expect(wrong.map(({ keyword, args }) => `${keyword} ${args.length}, schema ${classes.get(keyword)}`)).toEqual([]);
});

test('IFC4: no attribute that must be given is empty, and enumerations hold known words', () => {
  const known = new Map(Object.values(SCHEMA_REGISTRY.entities).map((entity) => [entity.name.toUpperCase(), entity]));
  const lines = linesOf(ifcOf(everything, { schema: 'IFC4' }));
  const wrong: string[] = [];
  let seen = 0;
  for (const { keyword, args } of lines)
    for (const [index, attribute] of (known.get(keyword)?.allAttributes ?? []).entries()) {
      seen += 1;
      const value = args[index]!;
      if (!attribute.optional && value === '$') wrong.push(`${keyword}.${attribute.name} is empty`);
      const words = SCHEMA_REGISTRY.enums[attribute.type];
      if (words && value !== '$' && !words.includes(value.slice(1, -1)))
        wrong.push(`${keyword}.${attribute.name} ${value}`);
    }
  expect(seen).toBeGreaterThan(2000);
  expect(wrong).toEqual([]);
});

function meshPoints(api: W.IfcAPI, model: number, id: number): (readonly [number, number, number])[] {
  const found: (readonly [number, number, number])[] = [];
  const mesh = api.GetFlatMesh(model, id);
  for (let at = 0; at < mesh.geometries.size(); at += 1) {
    const { geometryExpressID, flatTransformation: m } = mesh.geometries.get(at);
    const geometry = api.GetGeometry(model, geometryExpressID);
    const vertices = api.GetVertexArray(geometry.GetVertexData(), geometry.GetVertexDataSize());
    for (let v = 0; v < vertices.length; v += 6) {
      const [x, y, z] = [vertices[v]!, vertices[v + 1]!, vertices[v + 2]!];
      const row = (r: number) => m[r]! * x + m[r + 4]! * y + m[r + 8]! * z + m[r + 12]!;
      found.push([row(0), -row(2), row(1)]);
    }
    geometry.delete();
  }
  return found;
}

test('lengths stand in the unit of the file', () => {
  const counted = Object.entries(metresOf).map(([unit, metres]) => {
    const text = ifcOf(everything, { unit: unit as IfcOptions['unit'] });
    const stated = /'NominalDiameter',\$,IFCPOSITIVELENGTHMEASURE\(([\d.]+)\)/.exec(text)?.[1];
    expect(Number(stated) * metres, unit).toBeCloseTo(2 * 0.0254, 9);
    return unit;
  });
  expect(counted).toHaveLength(4);
});

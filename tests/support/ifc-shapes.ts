import type { Box, Vec3 } from '../../src/geometry/vector.ts';
import { distance, scale, subtract } from '../../src/geometry/vector.ts';
import type { Solid } from './draft.ts';
import { type Axes, axesAlong, direction, type IfcSheet, point } from './ifc-sheet.ts';
import type { PipeSize } from './pipe-sizes.ts';
import { type Ref, word } from './step-file.ts';

/** A straight pipe in its own frame: from the origin along local z. */
export function straightPipe(sheet: IfcSheet, size: PipeSize, length: number): Ref {
  const { file, long } = sheet;
  const wall = long((size.outer - size.inner) / 2);
  const profile = file.share(
    'IFCCIRCLEHOLLOWPROFILEDEF',
    word('AREA'),
    size.label,
    flat(sheet),
    long(size.outer / 2),
    wall,
  );
  return extrusion(sheet, profile, frame(sheet, [0, 0, 0]), length);
}

/** A bent pipe through points of its own frame. The parameter range is written where the schema asks for it. */
export function bentPipe(sheet: IfcSheet, size: PipeSize, line: readonly Vec3[]): Ref {
  const { file, long } = sheet;
  const path = file.add(
    'IFCPOLYLINE',
    line.map((at) => point(sheet, at)),
  );
  const range = sheet.old ? [0, line.length - 1] : [null, null];
  return file.add('IFCSWEPTDISKSOLID', path, long(size.outer / 2), long(size.inner / 2), ...range);
}

/** Bodies of everything that is no pipe, in a frame at `origin` with the building's axes. */
export function solidItems(sheet: IfcSheet, solids: readonly Solid[], origin: Vec3): readonly Ref[] {
  return solids.flatMap((solid) => {
    if ('bar' in solid) return bar(sheet, solid.bar, solid.radius, origin);
    if ('box' in solid) return prism(sheet, rectangle(solid.box), null, solid.box, origin);
    return bowl(sheet, solid.bowl, origin);
  });
}

function bar(sheet: IfcSheet, [from, to]: readonly [Vec3, Vec3], radius: number, origin: Vec3): readonly Ref[] {
  const long = distance(from, to);
  if (long === 0) return [];
  const axes = axesAlong(scale(subtract(to, from), 1 / long));
  const profile = sheet.file.share('IFCCIRCLEPROFILEDEF', word('AREA'), null, flat(sheet), sheet.long(radius));
  return [extrusion(sheet, profile, frame(sheet, subtract(from, origin), axes), long)];
}

/** A solid foot and a hollow rim: what a basin, tub or pan looks like from above. */
function bowl(sheet: IfcSheet, box: Box, origin: Vec3): readonly Ref[] {
  const depth = box.max[2] - box.min[2];
  const split = box.min[2] + depth * 0.4;
  const outline = rounded(box, 0);
  const inner = rounded(box, Math.min(box.max[0] - box.min[0], box.max[1] - box.min[1]) * 0.12);
  return [
    ...prism(sheet, outline, null, { min: box.min, max: [box.max[0], box.max[1], split] }, origin),
    ...prism(sheet, outline, inner, { min: [box.min[0], box.min[1], split], max: box.max }, origin),
  ];
}

type Plan = readonly [number, number];

/** An upright extrusion of an outline in plan, from the box's bottom to its top. */
export function prism(
  sheet: IfcSheet,
  outline: readonly Plan[],
  hole: readonly Plan[] | null,
  { min, max }: Box,
  origin: Vec3,
): readonly Ref[] {
  const { file } = sheet;
  const curve = (points: readonly Plan[]): Ref => {
    const corners = points.map(([x, y]) => point(sheet, [x - origin[0], y - origin[1]]));
    return file.add('IFCPOLYLINE', [...corners, corners[0]!]);
  };
  const profile =
    hole === null
      ? file.add('IFCARBITRARYCLOSEDPROFILEDEF', word('AREA'), null, curve(outline))
      : file.add('IFCARBITRARYPROFILEDEFWITHVOIDS', word('AREA'), null, curve(outline), [curve(hole)]);
  return [extrusion(sheet, profile, frame(sheet, [0, 0, min[2] - origin[2]]), max[2] - min[2])];
}

export const rectangle = ({ min, max }: Box): readonly Plan[] => [
  [min[0], min[1]],
  [max[0], min[1]],
  [max[0], max[1]],
  [min[0], max[1]],
];

/** A rounded outline inside the box, `inset` from it: 24 points of a superellipse that touches all four sides. */
function rounded({ min, max }: Box, inset: number): readonly Plan[] {
  const half = [(max[0] - min[0]) / 2 - inset, (max[1] - min[1]) / 2 - inset] as const;
  const middle = [(max[0] + min[0]) / 2, (max[1] + min[1]) / 2] as const;
  const bulge = (value: number): number => Math.sign(value) * Math.abs(value) ** 0.55;
  return Array.from({ length: 24 }, (_, step): Plan => {
    const turn = (step * Math.PI) / 12;
    const [x, y] = [Math.cos(turn), Math.sin(turn)].map((value) => (Math.abs(value) < 1e-9 ? 0 : value));
    return [middle[0] + half[0] * bulge(x!), middle[1] + half[1] * bulge(y!)];
  });
}

function extrusion(sheet: IfcSheet, profile: Ref, position: Ref, length: number): Ref {
  return sheet.file.add('IFCEXTRUDEDAREASOLID', profile, position, direction(sheet, [0, 0, 1]), sheet.long(length));
}

function frame(sheet: IfcSheet, at: Vec3, axes?: Axes): Ref {
  return sheet.file.share(
    'IFCAXIS2PLACEMENT3D',
    point(sheet, at),
    axes ? direction(sheet, axes.z) : null,
    axes ? direction(sheet, axes.x) : null,
  );
}

const flat = (sheet: IfcSheet): Ref =>
  sheet.file.share('IFCAXIS2PLACEMENT2D', sheet.file.share('IFCCARTESIANPOINT', [0, 0]), null);

/** A pipe without a body: its axis alone, through points of its own frame. */
export function axisShape(sheet: IfcSheet, line: readonly Vec3[]): Ref {
  const points = line.map((at) => point(sheet, at));
  const curve = sheet.file.add('IFCPOLYLINE', points);
  const axis = sheet.file.add('IFCSHAPEREPRESENTATION', sheet.axis, 'Axis', 'Curve3D', [curve]);
  return sheet.file.add('IFCPRODUCTDEFINITIONSHAPE', null, null, [axis]);
}

/** One product shape of one representation. */
export function shapeOf(sheet: IfcSheet, items: readonly Ref[], type: string): Ref {
  const body = sheet.file.add('IFCSHAPEREPRESENTATION', sheet.body, 'Body', type, items);
  return sheet.file.add('IFCPRODUCTDEFINITIONSHAPE', null, null, [body]);
}

import type { Vec3 } from '../../src/geometry/vector.ts';
import { prism, rectangle, shapeOf } from './ifc-shapes.ts';
import { type Axes, type IfcSheet, placed, point } from './ifc-sheet.ts';
import { wallOutline } from './model-of.ts';
import type { SketchFabric, SketchWall } from './sketch.ts';
import { type Arg, type Ref, raw, word } from './step-file.ts';
import type { IfcOptions } from './write-ifc.ts';

/** Where elements hang: their spatial record, its placement, and the placement's origin in the building's frame. */
export interface Level {
  readonly ref: Ref;
  readonly placement: Ref;
  readonly origin: Vec3;
}

export interface Building {
  readonly building: Level;
  /** By index of the sketch's storeys. */
  readonly storeys: readonly Level[];
  readonly spaces: readonly Ref[];
}

/** Project, site, building, storeys, and spaces if wanted. The site is where the model is turned and shifted. */
export function writeBuilding(
  sheet: IfcSheet,
  { turn, shift, site = [0, 0, 0] }: Pick<IfcOptions, 'turn' | 'shift' | 'site'>,
  withSpaces: boolean,
): Building {
  const { file, sketch, owner, id } = sheet;
  const project = file.add(
    'IFCPROJECT',
    id('project'),
    owner,
    sketch.title,
    null,
    null,
    null,
    null,
    [sheet.context],
    sheet.units,
  );
  const element = word('ELEMENT');
  const root = (keyword: string, key: readonly string[], name: string, placement: Ref, ...rest: readonly Arg[]) =>
    file.add(keyword, id(...key), owner, name, null, null, placement, ...rest);
  const angle = (turn * Math.PI) / 180;
  const turned: Axes | undefined = turn === 0 ? undefined : { z: [0, 0, 1], x: [Math.cos(angle), Math.sin(angle), 0] };
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  const origin: Vec3 = [shift[0] + c * site[0] - s * site[1], shift[1] + s * site[0] + c * site[1], shift[2] + site[2]];
  const sitePlacement = placed(sheet, null, origin, turned);
  const siteRef = root('IFCSITE', ['site'], 'Site', sitePlacement, null, null, element, null, null, null, null, null);
  const buildingPlacement = placed(sheet, sitePlacement, [0 - site[0], 0 - site[1], 0 - site[2]]);
  const building: Level = {
    ref: root('IFCBUILDING', ['building'], sketch.title, buildingPlacement, null, null, element, null, null, null),
    placement: buildingPlacement,
    origin: [0, 0, 0],
  };
  const storeys = sketch.storeys.map(({ name, elevation }): Level => {
    const placement = placed(sheet, building.placement, [0, 0, elevation]);
    const ref = root(
      'IFCBUILDINGSTOREY',
      ['storey', name],
      name,
      placement,
      null,
      null,
      element,
      sheet.long(elevation),
    );
    return { ref, placement, origin: [0, 0, elevation] };
  });
  aggregate(sheet, 'site', project, [siteRef]);
  aggregate(sheet, 'building', siteRef, [building.ref]);
  aggregate(
    sheet,
    'storeys',
    building.ref,
    storeys.map(({ ref }) => ref),
  );
  const spaces = (withSpaces ? sketch.spaces : []).map(({ name, storey, min, max }, index) => {
    const level = storey === null ? building : storeys[storey]!;
    const placement = placed(sheet, level.placement, [0, 0, 0]);
    const shape = shapeOf(sheet, prism(sheet, rectangle({ min, max }), null, { min, max }, level.origin), 'SweptSolid');
    return root(
      'IFCSPACE',
      ['space', String(index), name],
      name,
      placement,
      shape,
      name,
      element,
      word('INTERNAL'),
      null,
    );
  });
  for (const [index, level] of storeys.entries())
    aggregate(
      sheet,
      `spaces ${index}`,
      level.ref,
      spaces.filter((_, space) => sketch.spaces[space]!.storey === index),
    );
  return { building, storeys, spaces };
}

function aggregate({ file, owner, id }: IfcSheet, name: string, whole: Ref, parts: readonly Ref[]): void {
  if (parts.length > 0) file.add('IFCRELAGGREGATES', id('aggregate', name), owner, null, null, whole, parts);
}

/** Walls with their layers, slabs and roofs; what stands on which level is returned for containment. */
export function writeFabric(sheet: IfcSheet, { building, storeys }: Building): readonly { level: Level; ref: Ref }[] {
  const level = (storey: number | null): Level => (storey === null ? building : storeys[storey]!);
  const { sketch } = sheet;
  return [
    ...sketch.walls.map((wall, index) => ({
      level: level(wall.storey),
      ref: writeWall(sheet, wall, level(wall.storey), String(index)),
    })),
    ...sketch.slabs.map((slab, index) => ({
      level: level(slab.storey),
      ref: writeSlab(sheet, 'IFCSLAB', slab, level(slab.storey), String(index)),
    })),
    ...sketch.roofs.map((roof, index) => ({
      level: level(roof.storey),
      ref: writeSlab(sheet, 'IFCROOF', roof, level(roof.storey), String(index)),
    })),
  ];
}

function writeSlab(
  sheet: IfcSheet,
  keyword: 'IFCSLAB' | 'IFCROOF',
  { name, min, max }: SketchFabric,
  level: Level,
  key: string,
): Ref {
  const { file, owner, id } = sheet;
  const shape = shapeOf(sheet, prism(sheet, rectangle({ min, max }), null, { min, max }, level.origin), 'SweptSolid');
  const kind = keyword === 'IFCSLAB' ? 'slab' : 'roof';
  const placement = placed(sheet, level.placement, [0, 0, 0]);
  return file.add(
    keyword,
    id(kind, key, name),
    owner,
    name,
    null,
    null,
    placement,
    shape,
    null,
    word(kind === 'slab' ? 'FLOOR' : 'FLAT_ROOF'),
  );
}

/** A wall has its axis as a curve, its body as an extrusion, and its layers by a usage across the axis. */
function writeWall(sheet: IfcSheet, wall: SketchWall, level: Level, key: string): Ref {
  const { file, owner, id, old, long } = sheet;
  const thick = wall.layers.reduce((sum, { thickness }) => sum + thickness, 0);
  const far = Math.hypot(wall.to[0] - wall.from[0], wall.to[1] - wall.from[1]);
  const along: Vec3 = [(wall.to[0] - wall.from[0]) / far, (wall.to[1] - wall.from[1]) / far, 0];
  const at: Vec3 = [wall.from[0], wall.from[1], wall.from[2] - level.origin[2]];
  const placement = placed(sheet, level.placement, at, { z: [0, 0, 1], x: along });
  const outline = wallOutline([0, 0, 0], [far, 0, 0], thick / 2).map(([x, y]) => [x, y] as const);
  const body = prism(sheet, outline, null, { min: [0, 0, 0], max: [far, 0, wall.height] }, [0, 0, 0]);
  const line = file.add('IFCPOLYLINE', [point(sheet, [0, 0]), point(sheet, [far, 0])]);
  const shape = file.add('IFCPRODUCTDEFINITIONSHAPE', null, null, [
    file.add('IFCSHAPEREPRESENTATION', sheet.axis, 'Axis', 'Curve2D', [line]),
    file.add('IFCSHAPEREPRESENTATION', sheet.body, 'Body', 'SweptSolid', body),
  ]);
  const root = [id('wall', key, wall.name), owner, wall.name, null, null, placement, shape, null];
  const ref = old ? file.add('IFCWALLSTANDARDCASE', ...root) : file.add('IFCWALL', ...root, word('SOLIDWALL'));
  const layers = wall.layers.map(({ name, thickness }) => {
    const material = materialOf(sheet, name);
    return old
      ? file.add('IFCMATERIALLAYER', material, long(thickness), null)
      : file.add('IFCMATERIALLAYER', material, long(thickness), null, name, null, null, null);
  });
  const set = file.add('IFCMATERIALLAYERSET', layers, wall.name, ...(old ? [] : [null]));
  const usage = file.add(
    'IFCMATERIALLAYERSETUSAGE',
    set,
    word('AXIS2'),
    word('NEGATIVE'),
    long(thick / 2),
    ...(old ? [] : [null]),
  );
  file.add('IFCRELASSOCIATESMATERIAL', id('wall layers', key, wall.name), owner, null, null, [ref], usage);
  const said = [
    ['LoadBearing', wall.loadBearing],
    ['IsExternal', wall.external],
  ] as const;
  const facts = said
    .filter(([, value]) => value !== null)
    .map(([name, value]) =>
      file.share('IFCPROPERTYSINGLEVALUE', name, null, raw(`IFCBOOLEAN(${value ? '.T.' : '.F.'})`), null),
    );
  if (facts.length > 0) {
    const common = file.add('IFCPROPERTYSET', id('wall set', key, wall.name), owner, 'Pset_WallCommon', null, facts);
    file.add('IFCRELDEFINESBYPROPERTIES', id('wall has', key, wall.name), owner, null, null, [ref], common);
  }
  return ref;
}

export const materialOf = ({ file, old }: IfcSheet, name: string): Ref =>
  old ? file.share('IFCMATERIAL', name) : file.share('IFCMATERIAL', name, null, null);

import { distance, dot, scale, subtract, type Vec3 } from '../../src/geometry/vector.ts';
import type { Draft, DraftElement } from './draft.ts';
import { type Building, type Level, materialOf } from './ifc-building.ts';
import { writeSets, writeType } from './ifc-properties.ts';
import { axisShape, bentPipe, shapeOf, solidItems, straightPipe } from './ifc-shapes.ts';
import { axesAlong, type IfcSheet, placed } from './ifc-sheet.ts';
import type { SketchMedium } from './sketch.ts';
import { type Ref, word } from './step-file.ts';

/** An element as written: its record, and the frame that its ports are placed in. */
interface Written {
  readonly ref: Ref;
  readonly placement: Ref;
  readonly local: (at: Vec3) => Vec3;
}

/** IFC2X3 knows occurrences by their role in a distribution system only; the type says what they are. */
const oldClasses: Readonly<Record<string, string>> = {
  IfcPipeSegment: 'IFCFLOWSEGMENT',
  IfcPipeFitting: 'IFCFLOWFITTING',
  IfcValve: 'IFCFLOWCONTROLLER',
  IfcDistributionChamberElement: 'IFCDISTRIBUTIONCHAMBERELEMENT',
};

/** Pipes, fittings and parts, with types, sets, materials, systems and ports. */
export function writePiping(sheet: IfcSheet, draft: Draft, building: Building): readonly { level: Ref; ref: Ref }[] {
  const levelOf = ({ storey }: DraftElement): Level =>
    storey === null ? building.building : building.storeys[storey]!;
  const written = draft.elements.map((element) => writeElement(sheet, element, levelOf(element)));
  const refs = written.map(({ ref }) => ref);
  writeType(sheet, draft.elements, refs);
  writeSets(sheet, draft.elements, refs);
  writeMaterials(sheet, draft, refs);
  writeSystems(sheet, draft, refs, building.building.ref);
  if (sheet.ports) writePorts(sheet, draft, written);
  return draft.elements.map((element, index) => ({
    level: (element.space === null ? undefined : building.spaces[element.space]) ?? levelOf(element).ref,
    ref: refs[index]!,
  }));
}

function writeElement(sheet: IfcSheet, element: DraftElement, level: Level): Written {
  const { line, size } = element;
  const origin = subtract(element.origin, level.origin);
  const straight = line !== null && line.length === 2;
  const axes = straight ? axesAlong(scale(subtract(line[1]!, line[0]!), 1 / distance(line[0]!, line[1]!))) : undefined;
  const placement = placed(sheet, level.placement, origin, axes);
  const local = (at: Vec3): Vec3 => {
    const from = subtract(at, element.origin);
    return axes === undefined ? from : [dot(from, axes.x), dot(from, axes.y), dot(from, axes.z)];
  };
  const items =
    line === null || size === null
      ? solidItems(sheet, element.solids, element.origin)
      : straight
        ? [straightPipe(sheet, size, distance(line[0]!, line[1]!))]
        : [bentPipe(sheet, size, line.map(local))];
  for (const item of items) colour(sheet, item, element);
  const shape =
    line !== null && size === null
      ? axisShape(sheet, line.map(local))
      : shapeOf(sheet, items, line !== null && !straight ? 'AdvancedSweptSolid' : 'SweptSolid');
  const keyword = sheet.old ? (oldClasses[element.ifcClass] ?? 'IFCFLOWTERMINAL') : element.ifcClass.toUpperCase();
  const objectType = element.predefined === 'USERDEFINED' ? element.typeName : null;
  const root = [element.globalId, sheet.owner, element.name, null, objectType, placement, shape, null];
  const rest = sheet.old ? [] : [word(element.predefined ?? 'NOTDEFINED')];
  return { ref: sheet.file.add(keyword, ...root, ...rest), placement, local };
}

const colours: Readonly<Record<SketchMedium | 'fixture', readonly [number, number, number]>> = {
  drain: [0.55, 0.42, 0.3],
  vent: [0.45, 0.6, 0.75],
  rain: [0.35, 0.55, 0.45],
  supply: [0.3, 0.45, 0.8],
  pipe: [0.6, 0.6, 0.6],
  fixture: [0.92, 0.92, 0.9],
};

function colour({ file, old }: IfcSheet, item: Ref, { kind, medium }: DraftElement): void {
  const [red, green, blue] = colours[kind === 'terminal' ? 'fixture' : medium];
  const rgb = file.share('IFCCOLOURRGB', null, red, green, blue);
  const render = file.share('IFCSURFACESTYLERENDERING', rgb, 0, null, null, null, null, null, null, word('FLAT'));
  const style = file.share('IFCSURFACESTYLE', null, word('BOTH'), [render]);
  file.add('IFCSTYLEDITEM', item, [old ? file.share('IFCPRESENTATIONSTYLEASSIGNMENT', [style]) : style], null);
}

function writeMaterials(sheet: IfcSheet, draft: Draft, refs: readonly Ref[]): void {
  const made = new Map<string, Ref[]>();
  for (const [index, { material }] of draft.elements.entries()) {
    if (material === null) continue;
    const of = made.get(material) ?? [];
    of.push(refs[index]!);
    made.set(material, of);
  }
  for (const [material, of] of made)
    sheet.file.add(
      'IFCRELASSOCIATESMATERIAL',
      sheet.id('material', material),
      sheet.owner,
      null,
      null,
      of,
      materialOf(sheet, material),
    );
}

function writeSystems(sheet: IfcSheet, draft: Draft, refs: readonly Ref[], building: Ref): void {
  const { file, owner, id, old } = sheet;
  for (const { medium, name, predefined } of sheet.sketch.systems) {
    const members = refs.filter((_, index) => draft.elements[index]!.medium === medium);
    if (members.length === 0) continue;
    const system = old
      ? file.add('IFCSYSTEM', id('system', name), owner, name, null, null)
      : file.add('IFCDISTRIBUTIONSYSTEM', id('system', name), owner, name, null, null, null, word(predefined));
    file.add('IFCRELASSIGNSTOGROUP', id('in system', name), owner, null, null, members, null, system);
    file.add('IFCRELSERVICESBUILDINGS', id('serves', name), owner, null, null, system, [building]);
  }
}

const portWords = { source: 'SOURCE', sink: 'SINK', unknown: 'NOTDEFINED' } as const;

function writePorts(sheet: IfcSheet, draft: Draft, written: readonly Written[]): void {
  const { file, owner, id, old } = sheet;
  const refs = draft.ports.map(({ owner: element, at, direction }, index) => {
    const { placement, local } = written[element]!;
    const root = [id('port', String(index)), owner, null, null, null, placed(sheet, placement, local(at)), null];
    const flow = word(portWords[direction]);
    return old
      ? file.add('IFCDISTRIBUTIONPORT', ...root, flow)
      : file.add('IFCDISTRIBUTIONPORT', ...root, flow, word('PIPE'), word(systemWord(draft.elements[element]!.medium)));
  });
  for (const [index, { ports }] of draft.elements.entries()) {
    const whole = written[index]!.ref;
    if (old)
      for (const port of ports)
        file.add('IFCRELCONNECTSPORTTOELEMENT', id('port of', String(port)), owner, null, null, refs[port]!, whole);
    else if (ports.length > 0)
      file.add(
        'IFCRELNESTS',
        id('ports of', String(index)),
        owner,
        null,
        null,
        whole,
        ports.map((port) => refs[port]!),
      );
  }
  for (const [a, b] of draft.connections)
    file.add('IFCRELCONNECTSPORTS', id('joined', `${a} ${b}`), owner, null, null, refs[a]!, refs[b]!, null);
}

const systemWord = (medium: SketchMedium): string =>
  ({ drain: 'SEWAGE', vent: 'VENT', rain: 'RAINWATER', supply: 'DOMESTICCOLDWATER', pipe: 'NOTDEFINED' })[medium];

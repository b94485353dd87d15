import { add, type Box, dot, scale, type Vec3 } from '../../src/geometry/vector.ts';
import type { ElementClass, PropertyFact } from '../../src/model/model.ts';
import { barBox, type DraftElement, joined, type Solid } from './draft.ts';
import type { DraftJoint } from './draft-joints.ts';
import { fixtureBody } from './fixture-body.ts';
import type { PipeSize } from './pipe-sizes.ts';
import type { PartWord, Sketch, SketchFitting, SketchFixture, SketchMedium } from './sketch.ts';
import { typeNameOf } from './sketch-fixtures.ts';
import { globalIdOf } from './sketch-ids.ts';

type Drafted = Omit<DraftElement, 'ports'>;

/** The fitting that pipes make where they meet: bend, coupling, reducer or junction. */
export function draftJointFitting(sketch: Sketch, joint: DraftJoint): Drafted {
  const [one, two] = joint.ends;
  const straight = joint.ends.length === 2 && dot(one!.into, two!.into) < -Math.cos(Math.PI / 36);
  const alike = one!.drawn.size.label === two!.drawn.size.label;
  const [predefined, typeName] =
    joint.ends.length > 2
      ? ['JUNCTION', 'Junction']
      : straight
        ? alike
          ? ['CONNECTOR', 'Coupling']
          : ['TRANSITION', 'Reducer']
        : ['BEND', 'Bend'];
  return atNode(sketch, joint, {
    name: joint.node.name,
    word: 'fitting',
    ifcClass: 'IfcPipeFitting',
    kind: 'fitting',
    predefined,
    typeName,
    size: largest(joint),
    solids: arms(joint),
    properties: [],
  });
}

export function draftFixture(sketch: Sketch, fixture: SketchFixture, joint: DraftJoint): Drafted {
  const { word, details, trap } = fixture;
  const facts: PropertyFact[] = [];
  const say = (set: string | null, name: string, value: PropertyFact['value'], measure: PropertyFact['measure']) =>
    facts.push({ set: set ?? 'Plumbing', name, value, measure, from: 'own' });
  const styles: Record<string, string> = { stall: 'STALL', washout: 'WALLHUNG', wall: 'WALLHUNG', siphon: 'WALLHUNG' };
  const style = word.kind === 'urinal' && details.style !== null ? styles[details.style] : undefined;
  if (style !== undefined) say(word.set, 'UrinalType', style, 'text');
  if (word.kind === 'water-closet') say(word.set, 'ToiletPanType', 'WASHDOWN', 'text');
  if (details.flush === 'tank' && word.kind === 'water-closet') say(word.set, 'ToiletType', 'CLOSECOUPLED', 'text');
  if (details.flush !== null) say(null, 'FlushType', details.flush === 'tank' ? 'Flush tank' : 'Flush valve', 'text');
  if (details.heads !== null) say(null, 'NumberOfHeads', details.heads, 'number');
  if (details.emergency) say(null, 'Emergency', true, 'flag');
  if (trap !== null) say(word.outlet === null ? null : word.set, word.outlet ?? 'TrapSize', trap.nominal, 'length');
  if (fixture.reading !== null) say(null, 'Venting', fixture.reading, 'text');
  const floor = joint.node.storey === null ? 0 : sketch.storeys[joint.node.storey]!.elevation;
  const solids = fixtureBody(fixture, joint.node.at, floor, trap ?? largest(joint));
  const open = details.untrapped && word.predefined === 'FLOORTRAP';
  return {
    ...atNode(sketch, joint, {
      name: fixture.name,
      word: 'fixture',
      ifcClass: word.ifcClass,
      kind: 'terminal',
      predefined: open ? 'FLOORWASTE' : word.predefined,
      typeName: fixture.titled ?? typeNameOf(word, details),
      size: trap,
      solids,
      properties: facts,
    }),
    space: spaceOf(sketch, joint),
  };
}

const partClasses: Readonly<Record<PartWord, readonly [string, ElementClass, string, string]>> = {
  trap: ['IfcWasteTerminal', 'terminal', 'WASTETRAP', 'P-trap'],
  cleanout: ['IfcPipeFitting', 'fitting', 'OBSTRUCTION', 'Cleanout'],
  terminal: ['IfcStackTerminal', 'terminal', 'COWL', 'Vent terminal'],
  'admittance-valve': ['IfcValve', 'valve', 'ANTIVACUUM', 'Air admittance valve'],
  sewer: ['IfcPipeFitting', 'fitting', 'EXIT', 'Sewer connection'],
  manhole: ['IfcDistributionChamberElement', 'chamber', 'MANHOLE', 'Manhole'],
  sump: ['IfcDistributionChamberElement', 'chamber', 'SUMP', 'Sewage sump'],
  interceptor: ['IfcInterceptor', 'treatment', 'GREASE', 'Grease interceptor'],
  cap: ['IfcPipeFitting', 'fitting', 'OBSTRUCTION', 'Pipe cap'],
  'backwater-valve': ['IfcValve', 'valve', 'CHECK', 'Backwater valve'],
  'roof-drain': ['IfcWasteTerminal', 'terminal', 'ROOFDRAIN', 'Roof drain'],
};

export function draftFitting(sketch: Sketch, part: SketchFitting, joint: DraftJoint): Drafted {
  const [ifcClass, kind, predefined, typeName] = partClasses[part.is];
  const size = part.size ?? largest(joint);
  const properties: PropertyFact[] =
    part.is === 'trap' && size !== null
      ? [
          {
            set: 'Pset_WasteTerminalTypeWasteTrap',
            name: 'OutletConnectionSize',
            value: size.nominal,
            measure: 'length',
            from: 'own',
          },
        ]
      : [];
  const inline = part.is === 'cleanout' && joint.ends.length > 1;
  return atNode(sketch, joint, {
    name: part.name,
    word: part.is,
    ifcClass,
    kind,
    predefined: inline ? 'JUNCTION' : predefined,
    typeName: part.titled ?? typeName,
    size,
    solids: partBody(part.is, joint, size),
    properties,
  });
}

interface Told
  extends Pick<Drafted, 'name' | 'ifcClass' | 'kind' | 'predefined' | 'typeName' | 'size' | 'solids' | 'properties'> {
  readonly word: string;
}

function atNode(sketch: Sketch, { node, ends }: DraftJoint, { word, ...told }: Told): Drafted {
  const media = ends.map(({ medium }) => medium);
  const medium: SketchMedium = media.includes('drain') || media.length === 0 ? 'drain' : media[0]!;
  return {
    ...told,
    globalId: globalIdOf(sketch.title, word, node.name),
    medium,
    storey: node.storey,
    space: null,
    material: word === 'fitting' ? ends[0]!.drawn.material : null,
    origin: node.at,
    line: null,
    box: boxOf(told.solids),
    slope: null,
  };
}

const largest = ({ ends }: DraftJoint): PipeSize | null =>
  ends.reduce<PipeSize | null>(
    (most, { drawn }) => (most === null || drawn.size.outer > most.outer ? drawn.size : most),
    null,
  );

/** Sockets are this much wider than their pipe (ASTM D2665: 3.96 in over 3.5 in pipe). */
const socket = 1.13;

const arms = (joint: DraftJoint): Solid[] =>
  joint.ends.map(({ at, drawn }) => ({ bar: [joint.node.at, at], radius: (drawn.size.outer / 2) * socket }));

function partBody(is: PartWord, joint: DraftJoint, size: PipeSize | null): Solid[] {
  const wide = (size?.outer ?? 0.11) * socket;
  const at = joint.node.at;
  const box = (x: number, y: number, low: number, high: number): Box => ({
    min: add(at, [-x / 2, -y / 2, low]),
    max: add(at, [x / 2, y / 2, high]),
  });
  switch (is) {
    case 'trap':
      return [{ bar: [add(at, [0, 0, -0.1]), add(at, [0, 0, 0.05])], radius: wide / 2 }, ...arms(joint)];
    case 'terminal':
      return [{ bar: [at, add(at, [0, 0, 0.08])], radius: wide * 0.8 }];
    case 'admittance-valve':
      return [{ bar: [at, add(at, [0, 0, 0.12])], radius: wide * 0.6 }];
    case 'manhole':
      return [{ box: box(1, 1, -0.2, 0.8) }];
    case 'sump':
      return [{ box: box(1.2, 1.2, -1.2, 0.3) }];
    case 'interceptor':
      return [{ box: box(0.6, 0.4, -0.3, 0.2) }];
    case 'sewer':
      return [{ box: box(wide * 1.5, wide * 1.5, -wide * 0.75, wide * 0.75) }];
    case 'roof-drain':
      return [{ box: box(0.3, 0.3, 0, 0.1) }];
    default:
      return joint.ends.length > 1
        ? arms(joint)
        : [
            { bar: capped(joint, 0.03), radius: wide / 2 },
            { bar: capped(joint, 0.05), radius: wide / 4 },
          ];
  }
}

/** A plug or cap looks away from its pipe. */
function capped({ node, ends: [end] }: DraftJoint, high: number): readonly [Vec3, Vec3] {
  return [node.at, add(node.at, scale(end?.into ?? [0, 0, -1], -high))];
}

const boxOf = (solids: readonly Solid[]): Box =>
  joined(
    solids.map((solid) =>
      'bar' in solid ? barBox(...solid.bar, solid.radius) : 'box' in solid ? solid.box : solid.bowl,
    ),
  );

function spaceOf(sketch: Sketch, { node }: DraftJoint): number | null {
  /** Outlets of closets, tubs and floor drains lie in or under the floor. */
  const below = 0.6;
  const found = sketch.spaces.findIndex(
    ({ min, max, storey }) =>
      storey === node.storey &&
      [0, 1].every((axis) => node.at[axis]! >= min[axis]! && node.at[axis]! <= max[axis]!) &&
      node.at[2] >= min[2] - below &&
      node.at[2] <= max[2],
  );
  return found < 0 ? null : found;
}

import { type PageData, pageData } from '../../src/deliver/page-data.ts';
import { type Box, distance, type Vec3 } from '../../src/geometry/vector.ts';
import { type Identity, noDetail } from '../../src/model/identity.ts';
import type { Element, ElementId, Fabric, Model, Space, Storey, Wall } from '../../src/model/model.ts';
import type { Joint, JointId, Network, Pipe, PipeId } from '../../src/network/network.ts';
import type { DryPiece, FixtureId, Paths, TrapAir } from '../../src/paths/paths.ts';
import { streamOf } from '../../src/paths/stream.ts';
import type {
  Result,
  ResultFinding,
  ResultFixture,
  ResultHydraulics,
  ResultPipe,
  SizeLabel,
  TrailStep,
} from '../../src/schedule/result.ts';
import { metres } from '../../src/units/quantity.ts';

/** Model, network, paths and result of one small building that agree with each other, for trying the page on. */
export interface ExamplePage {
  readonly result: Result;
  readonly model: Model;
  readonly network: Network;
  readonly paths: Paths;
  readonly identities: readonly Identity[];
}

export interface RunSpec {
  readonly from: string;
  readonly to: string;
  readonly role: string;
  readonly size: string | null;
  readonly required?: string;
  readonly also?: readonly string[];
  readonly system?: string;
  readonly name?: string;
  readonly battery?: string;
  readonly trail?: readonly TrailStep[];
  readonly hydraulics?: ResultHydraulics;
}

export interface FixtureSpec {
  readonly at: string;
  readonly kind: string;
  readonly name: string;
  readonly load: number;
  readonly trap: string;
  readonly box: Box;
  readonly vented: string;
  /** Runs of the trap arm, of the wet pipes its air takes, of the dry ones. */
  readonly arm?: readonly string[];
  readonly through?: readonly string[];
  readonly dry?: readonly string[];
}

export interface BuildingSpec {
  readonly file?: string;
  readonly nodes: Readonly<Record<string, Vec3>>;
  readonly runs: Readonly<Record<string, RunSpec>>;
  readonly fixtures: readonly FixtureSpec[];
  readonly storeys: readonly { readonly name: string; readonly elevation: number }[];
  readonly walls: readonly Box[];
  readonly slabs: readonly Box[];
  readonly spaces?: readonly { readonly name: string; readonly box: Box }[];
  readonly findings: (ids: ReadonlyMap<string, string>) => readonly ResultFinding[];
  readonly batteries?: (ids: ReadonlyMap<string, string>) => Result['batteries'];
}

const dns: Readonly<Record<string, number>> = {
  '1¼ in': 32,
  '1½ in': 40,
  '2 in': 50,
  '2½ in': 65,
  '3 in': 80,
  '4 in': 100,
  '5 in': 125,
};
const outers: Readonly<Record<string, number>> = {
  '1¼ in': 0.042,
  '1½ in': 0.048,
  '2 in': 0.06,
  '3 in': 0.089,
  '4 in': 0.114,
};
export const sized = (label: string): SizeLabel => ({ label, dn: dns[label] ?? 0 });

const globalId = (number: number): string => `2Dr0inPage000000000${String(number).padStart(4, '0')}`.slice(0, 23);

/** Builds the four from nodes, runs (drains toward the sewer, vents toward the sky) and fixtures. */
export function examplePage(spec: BuildingSpec): ExamplePage {
  const runNames = Object.keys(spec.runs);
  const nodeNames = Object.keys(spec.nodes);
  const joint = new Map(nodeNames.map((name, index) => [name, index as JointId]));
  const pipe = new Map(runNames.map((name, index) => [name, index as PipeId]));
  const at = (node: string): Vec3 => spec.nodes[node] ?? [0, 0, 0];
  const run = (name: string): RunSpec => spec.runs[name] as RunSpec;
  const storeyOf = (z: number): number => spec.storeys.findLastIndex(({ elevation }) => z >= elevation - 0.35);
  const storeyName = (z: number): string | null => spec.storeys[storeyOf(z)]?.name ?? null;

  const elements: Element[] = [];
  const addElement = (over: Partial<Element>): Element => {
    const id = elements.length as ElementId;
    const element: Element = {
      id,
      file: 0,
      stepId: 1000 + id,
      globalId: globalId(1000 + id),
      ifcClass: 'IfcPipeSegment',
      typeClass: null,
      predefinedType: null,
      kind: 'segment',
      name: null,
      objectType: null,
      description: null,
      tag: null,
      typeName: null,
      typeDescription: null,
      classifications: [],
      systems: [],
      storey: null,
      space: null,
      ports: [],
      material: null,
      origin: null,
      centreLine: null,
      box: null,
      sizes: [],
      slopes: [],
      statedLength: null,
      properties: [],
      ...over,
    };
    elements.push(element);
    return element;
  };
  const idOf = new Map<string, string>();
  const runElement = new Map<string, Element>();
  for (const name of runNames) {
    const { from, to, size } = run(name);
    const outer = size === null ? 0.06 : (outers[size] ?? 0.06);
    const element = addElement({
      name: run(name).name ?? name,
      centreLine: {
        points: [at(from), at(to)],
        outerDiameter: metres(outer),
        innerDiameter: null,
        ground: 'extrusion',
        residual: 0,
      },
    });
    runElement.set(name, element);
    idOf.set(name, element.globalId);
  }
  const fixtureElements = spec.fixtures.map((fixture) => {
    const element = addElement({
      name: fixture.name,
      kind: 'terminal',
      ifcClass: 'IfcSanitaryTerminal',
      box: fixture.box,
    });
    idOf.set(fixture.name, element.globalId);
    return element;
  });
  const pipesAt = (node: string): PipeId[] =>
    runNames.filter((name) => run(name).from === node || run(name).to === node).map((name) => pipe.get(name)!);
  const jointElements = new Map<string, ElementId[]>();
  for (const node of nodeNames) {
    const fixture = spec.fixtures.findIndex((candidate) => candidate.at === node);
    if (fixture >= 0) jointElements.set(node, [fixtureElements[fixture]!.id]);
    else if (pipesAt(node).length > 1)
      jointElements.set(node, [
        addElement({ name: `Fitting ${node}`, kind: 'fitting', ifcClass: 'IfcPipeFitting', origin: at(node) }).id,
      ]);
    else jointElements.set(node, []);
  }
  const fittingReach = 0.06;
  const pipes: Pipe[] = runNames.map((name) => {
    const { from, to } = run(name);
    const [a, b] = [at(from), at(to)];
    const whole = distance(a, b);
    const cut = Math.min(fittingReach, whole / 4) / whole;
    const between = (t: number): Vec3 => [a[0] + (b[0] - a[0]) * t, a[1] + (b[1] - a[1]) * t, a[2] + (b[2] - a[2]) * t];
    return {
      id: pipe.get(name)!,
      element: runElement.get(name)!.id,
      ends: [joint.get(from)!, joint.get(to)!],
      length: metres(whole * (1 - 2 * cut)),
      reach: [metres(whole * cut), metres(whole * cut)],
      points: [between(cut), between(1 - cut)],
      from: metres(0),
      to: metres(whole),
      portFlow: null,
    };
  });
  const joints: Joint[] = nodeNames.map((node) => ({
    id: joint.get(node)!,
    at: at(node),
    elements: jointElements.get(node) ?? [],
    pipes: pipesAt(node),
    inferred: null,
  }));
  const wet = (name: string): boolean => !/vent|header/.test(run(name).role) || run(name).role === 'wet-vent';
  const nextOf = (name: string): string | null =>
    runNames.find((other) => run(other).from === run(name).to && (wet(other) || !wet(name))) ?? null;
  const waterOf = (fixture: FixtureSpec): string[] => {
    const path: string[] = [];
    let here = runNames.find((name) => run(name).from === fixture.at && wet(name)) ?? null;
    for (; here !== null; here = nextOf(here)) path.push(here);
    return path;
  };
  const waters = spec.fixtures.map(waterOf);
  const airOf = ({ arm = [], through = [], dry = [] }: FixtureSpec): string[] => [...arm, ...through, ...dry];
  const ids = (names: readonly string[]): string[] => names.map((name) => idOf.get(name) ?? name);

  const traps: TrapAir[] = spec.fixtures.map((fixture, index) => ({
    fixture: index as FixtureId,
    after: 0,
    at: joint.get(fixture.at)!,
    how: 'outlet',
    armEnd: null,
    arm: (fixture.arm ?? []).map((name) => pipe.get(name)!),
    through: (fixture.through ?? []).map((name) => pipe.get(name)!),
    foot: null,
    piece: fixture.dry === undefined ? null : 0,
    dry: (fixture.dry ?? []).map((name) => pipe.get(name)!),
  }));
  const last = runNames.findLast((name) => wet(name) && nextOf(name) === null)!;
  const pieces: DryPiece[] = [{ id: 0, pipes: [], feet: [], mouths: [] }];
  const network: Network = {
    joints,
    pipes,
    pipesOf: new Map(runNames.map((name) => [runElement.get(name)!.id, [pipe.get(name)!]])),
    jointsOf: new Map(
      nodeNames.flatMap((node) => (jointElements.get(node) ?? []).map((id) => [id, [joint.get(node)!]] as const)),
    ),
    fates: elements.map(({ kind }) => ({
      use: kind === 'segment' ? 'pipe' : kind === 'terminal' ? 'fixture' : 'fitting',
      reason: null,
    })),
    joined: { ports: 2 * pipes.length, geometry: 0 },
  };
  const ways = {
    toward: runNames.map((name) => joint.get(run(name).to)!),
    wet: runNames.map(wet),
  };
  const paths: Paths = {
    systems: [{ sewerEnd: joint.get(run(last).to)!, how: 'lowest', isCutOff: false, pipes: pipes.map(({ id }) => id) }],
    fixtures: spec.fixtures.map((fixture, index) => ({
      id: index as FixtureId,
      element: fixtureElements[index]!.id,
      outlet: joint.get(fixture.at)!,
      water: waters[index]!.map((name) => pipe.get(name)!),
    })),
    next: runNames.map((name) => (nextOf(name) === null ? null : pipe.get(nextOf(name)!)!)),
    ...ways,
    stream: streamOf(network, ways),
    inFlowOrder: [],
    entering: [],
    traps,
    pieces,
    wayUp: () => null,
    pieceOf: runNames.map((name) => (wet(name) ? null : 0)),
    vertical: runNames.map((name) => isVertical(at(run(name).from), at(run(name).to))),
    slopes: [],
  };

  const rows: ResultPipe[] = runNames.map((name) => {
    const { from, to, role, size, required, also = [], system, battery, trail, hydraulics } = run(name);
    const [a, b] = [at(from), at(to)];
    const vertical = isVertical(a, b);
    const drains = spec.fixtures.filter((_, index) => waters[index]!.includes(name));
    const breathes = spec.fixtures.filter((fixture) => airOf(fixture).includes(name));
    const load = drains.reduce((sum, fixture) => sum + fixture.load, 0);
    const air = breathes.reduce((sum, fixture) => sum + fixture.load, 0);
    const need = required ?? size;
    const plan = Math.hypot(a[0] - b[0], a[1] - b[1]);
    return {
      globalId: idOf.get(name)!,
      stepId: runElement.get(name)!.stepId,
      name: run(name).name ?? name,
      role,
      also,
      ...(role === 'wet-vent' ? { portion: 'wet' as const } : {}),
      storey: storeyName((a[2] + b[2]) / 2),
      orientation: vertical ? 'vertical' : 'horizontal',
      slope: vertical ? null : { value: Math.abs(a[2] - b[2]) / plan, ground: 'geometry' },
      length: distance(a, b),
      next: nextOf(name) === null ? null : idOf.get(nextOf(name)!)!,
      load: { least: load, most: load },
      ...(role === 'wet-vent' && trail !== undefined
        ? { ventLoad: { least: 14, most: 14 } }
        : air > 0
          ? { ventLoad: { least: air, most: air } }
          : {}),
      servesWater: ids(drains.map((fixture) => fixture.name)),
      servesAir: ids(breathes.map((fixture) => fixture.name)),
      system: system ?? 'Sanitary',
      modelled: size === null ? null : { ...sized(size), from: 'Pset_PipeSegmentTypeCommon.NominalDiameter (type)' },
      required: need === null ? null : { least: sized(need), most: sized(need) },
      provisional: false,
      verdict: verdictOf(size, required),
      ...(size === null ? { reason: 'the model gives no size' } : {}),
      ...(battery === undefined ? {} : { battery }),
      ...(hydraulics === undefined ? {} : { hydraulics }),
      trail: trail ?? [
        {
          rule: wet(name) ? 'branch-load' : 'vent-load',
          title: wet(name) ? 'branch load' : 'vent load',
          clause: wet(name) ? '2.4.10.6.' : '2.5.8.3.',
          table: wet(name) ? '2.4.10.6.-B' : '2.5.8.3.',
          row: need,
          facts: { loadUnits: wet(name) ? load : air, limitUnits: 27 },
          asks: need === null ? null : sized(need),
          governs: true,
          trust: 'memory',
        },
      ],
    };
  });
  const fixtureRows: ResultFixture[] = spec.fixtures.map((fixture, index) => ({
    globalId: fixtureElements[index]!.globalId,
    stepId: fixtureElements[index]!.stepId,
    name: fixture.name,
    kind: fixture.kind,
    detail: { flush: null, style: null, heads: null, emergency: null, domestic: null },
    row: fixture.kind,
    evidence: `PredefinedType ${fixture.kind.toUpperCase()}`,
    load: { least: fixture.load, most: fixture.load },
    trapSize: sized(fixture.trap),
    storey: storeyName(fixture.box.min[2] + 0.2),
    waterPath: ids(waters[index]!),
    airPath: ids(airOf(fixture)),
    ventedBy: { how: fixture.vented, vents: ids(fixture.dry ?? []) },
    trap: { at: at(fixture.at), how: 'outlet' },
    trapArm: {
      length: (fixture.arm ?? []).reduce((sum, name) => sum + distance(at(run(name).from), at(run(name).to)), 0),
      fall: 0.011,
      slope: 0.02,
      turn: 0,
      limit: 2.4,
    },
  }));

  const fabric = (box: Box, index: number, kind: string): Fabric => ({
    file: 0,
    stepId: 5000 + index,
    globalId: `${kind}${index}`,
    name: `${kind} ${index + 1}`,
    predefinedType: null,
    storey: Math.max(0, storeyOf((box.min[2] + box.max[2]) / 2)) as Storey['id'],
    box,
    outline: null,
  });
  const model: Model = {
    files: [],
    elements,
    ports: [],
    systems: [],
    storeys: spec.storeys.map(({ name, elevation }, index) => ({
      id: index as Storey['id'],
      file: 0,
      globalId: `storey${index}`,
      name,
      elevation,
    })),
    spaces: (spec.spaces ?? []).map(
      ({ name, box }, index): Space => ({
        id: index as Space['id'],
        file: 0,
        globalId: `space${index}`,
        name,
        longName: null,
        storey: Math.max(0, storeyOf(box.min[2] + 0.1)) as Storey['id'],
        box,
      }),
    ),
    walls: spec.walls.map(
      (box, index): Wall => ({ ...fabric(box, index, 'Wall'), layers: [], loadBearing: null, external: null }),
    ),
    slabs: spec.slabs.map((box, index) => fabric(box, index, 'Slab')),
    roofs: [],
    findings: [],
  };
  const result: Result = {
    format: 'drainwright-result',
    version: 1,
    program: { name: 'drainwright', version: '0.1.0' },
    model: {
      file: spec.file ?? 'community-hall.ifc',
      sha256: 'ab'.repeat(32),
      schema: 'IFC4',
      lengthUnit: 'millimetre',
    },
    code: { id: 'npc-2020', title: 'National Plumbing Code of Canada', edition: '2020', unit: 'fixture units' },
    settings: { use: 'public' },
    counts: {
      elements: elements.length + 5,
      pipes: pipes.length,
      fittings: elements.length - pipes.length - spec.fixtures.length,
      fixtures: spec.fixtures.length,
      terminals: 0,
      leftOut: { rainwater: 4, supply: 1 },
      unresolved: 0,
    },
    elements: [],
    fixtures: fixtureRows,
    pipes: rows,
    batteries: spec.batteries?.(idOf) ?? [],
    joints: { ports: 2 * pipes.length, geometry: 0, inferred: [] },
    systems: [
      {
        sewerEnd: { at: at(run(last).to), pipe: idOf.get(last)!, how: 'lowest' },
        pipes: pipes.length,
        fixtures: spec.fixtures.length,
        load: rows[pipe.get(last)!]!.load,
      },
    ],
    findings: spec.findings(idOf),
    unresolved: [],
    caution:
      'An undersized drain or vent lets sewer gas into the building. Sizes here are a calculation aid: local code, the authority having jurisdiction and a licensed person decide.',
  };
  const identities = elements.map(
    ({ kind }): Identity => ({ ...plainIdentity, part: parts[kind] ?? 'unknown-terminal' }),
  );
  return { result, model, network, paths, identities };
}

export const exampleData = (example: ExamplePage): PageData => {
  return pageData(example.result, example, {
    sizes: ['1¼ in', '1½ in', '2 in', '2½ in', '3 in', '4 in', '5 in'].map(sized),
  });
};

const parts: Readonly<Record<string, Identity['part']>> = { segment: 'pipe', fitting: 'fitting', terminal: 'fixture' };
const plainIdentity: Identity = {
  part: 'pipe',
  kind: null,
  detail: noDetail,
  medium: 'sanitary',
  evidence: '',
  weak: false,
  outletMm: null,
  reading: null,
};

/** Vertical: at 45 degrees or less to the plumb line. */
const isVertical = (a: Vec3, b: Vec3): boolean => Math.abs(a[2] - b[2]) >= Math.hypot(a[0] - b[0], a[1] - b[1]);

function verdictOf(size: string | null, required: string | undefined): ResultPipe['verdict'] {
  if (size === null) return 'unknown';
  const difference = (dns[size] ?? 0) - (dns[required ?? size] ?? 0);
  return difference < 0 ? 'undersized' : difference > 0 ? 'oversized' : 'agrees';
}

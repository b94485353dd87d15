import { pointAlong, polyline } from '../geometry/polyline.ts';
import { add, type Vec3 } from '../geometry/vector.ts';
import type { FixtureDetail, FixtureKind } from '../model/identity.ts';
import type { ElementId } from '../model/model.ts';
import { addPipe } from '../network/change.ts';
import type { JointId, PipeId } from '../network/network.ts';
import type { Piping } from '../pipeline.ts';
import { addedElement, addedIdentity } from './added-element.ts';

export interface AddedFixture {
  readonly kind: FixtureKind;
  readonly detail: Partial<FixtureDetail>;
}

/** Its arm to the pipe, metres: short enough for every trap, long enough for none to be too near its vent. */
const arm = 0.45;
const fall = 0.02;
const evidence = 'what if';

/** The piping with one more fixture, by a short arm to the middle of a pipe. It brings no vent with it. */
export function withFixture(piping: Piping, pipe: PipeId, { kind, detail }: AddedFixture): Piping {
  const { model, network } = piping;
  const { points, length, element: host } = network.pipes[pipe]!;
  const fixture = model.elements.length as ElementId;
  const branch = (fixture + 1) as ElementId;
  const middle = points === null ? null : pointAlong(polyline(points), length / 2);
  const outlet: Vec3 | null = middle === null ? null : add(middle, [...beside(points!, arm), arm * fall] as const);
  const storey = host === null ? null : model.elements[host]!.storey;
  const line: readonly Vec3[] | null = middle === null || outlet === null ? null : [outlet, middle];
  const of = { storey, material: null, origin: outlet };
  const elements = [
    addedElement(fixture, { ...of, kind: 'fixture', name: `Added ${kind}`, axis: null }),
    addedElement(branch, { ...of, kind: 'pipe', name: `Drain of the added ${kind}`, axis: line }),
  ];
  const identities = [
    addedIdentity('fixture', 'sanitary', evidence, kind, detail),
    addedIdentity('pipe', 'sanitary', evidence),
  ];
  const joined = addPipe(network, {
    element: branch,
    ends: [{ open: outlet }, { pipe, at: length / 2 }],
    points: line,
    length: arm,
  });
  const start: JointId = joined.network.pipes[joined.pipe]!.ends[0];
  return {
    ...piping,
    model: { ...model, elements: [...model.elements, ...elements] },
    identities: [...piping.identities, ...identities],
    network: {
      ...joined.network,
      joints: joined.network.joints.map((joint) => (joint.id === start ? { ...joint, elements: [fixture] } : joint)),
      jointsOf: new Map([...joined.network.jointsOf, [fixture, [start]]]),
      fates: withFate(joined.network.fates, fixture),
    },
  };
}

function withFate(fates: Piping['network']['fates'], fixture: ElementId): Piping['network']['fates'] {
  const all = [...fates];
  all[fixture] = { use: 'fixture', reason: null };
  return all;
}

/** Level, square to a pipe's own direction in plan; to the east of an upright one. */
function beside(points: readonly Vec3[], far: number): readonly [number, number] {
  const [a, b] = [points[0]!, points[points.length - 1]!];
  const plan = Math.hypot(b[0] - a[0], b[1] - a[1]);
  return plan < 1e-6 ? [far, 0] : [(-(b[1] - a[1]) / plan) * far, ((b[0] - a[0]) / plan) * far];
}

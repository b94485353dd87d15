import { type Finding, finding } from '../findings/finding.ts';
import { boxAround, boxCentre, grown } from '../geometry/box.ts';
import { boxGrid } from '../geometry/box-grid.ts';
import { footOn, polyline } from '../geometry/polyline.ts';
import { type Box, distance } from '../geometry/vector.ts';
import type { Identity } from '../model/identity.ts';
import type { Element, ElementId, Model } from '../model/model.ts';
import { doubled } from './tolerance.ts';

/**
 * Elements drawn twice at one place. Returns by element id the one that stands for it: itself, or the one it doubles.
 * Kept is the one with more connected ports, then the one whose system says drainage, then the lowest GlobalId. Sleeves and
 * insulation, drawn as pipes round a pipe, are told apart: they stand for nothing.
 */
export function findDoubles(
  model: Model,
  identities: readonly Identity[],
  takesPart: readonly boolean[],
): { keeper: Int32Array; findings: readonly Finding[]; sleeves: readonly ElementId[] } {
  const keeper = Int32Array.from(model.elements, (_, id) => id);
  const findings: Finding[] = [];
  const marks = model.elements.map((element) => (takesPart[element.id] ? markOf(element, identities) : null));
  const grid = boxGrid(model.elements.map((element) => (takesPart[element.id] ? wholeOf(element, identities) : null)));
  const pairs: [Element, Element][] = [];
  const parts: [Element, Element][] = [];
  const sleeves = new Set<ElementId>();
  for (const [id, mark] of marks.entries()) {
    if (mark === null) continue;
    const element = model.elements[id]!;
    grid.touching(grown(mark, doubled), (other) => {
      const it = model.elements[other]!;
      if (other > id && isDouble(element, it, identities, model)) pairs.push([element, it]);
      else if (other !== id && isPartOf(element, it, identities, model)) parts.push([it, element]);
      else if (other !== id && isSleeveOf(element, it, identities, model)) sleeves.add(element.id);
    });
  }
  const better = preference(model, identities);
  const inOrder = pairs
    .map(([a, b]) => (better(a, b) < 0 ? ([a, b] as const) : ([b, a] as const)))
    .sort(([a, x], [b, y]) => better(a, b) || better(x, y));
  for (const [kept, other] of [...inOrder, ...parts]) {
    if (keeper[kept.id] !== kept.id || keeper[other.id] !== other.id) continue;
    keeper[other.id] = kept.id;
    findings.push(finding('doubled-element', [other.id, kept.id], { part: identities[other.id]!.part }));
  }
  return {
    keeper,
    findings: findings.sort((a, b) => a.about[0]! - b.about[0]!),
    sleeves: [...sleeves].sort((a, b) => a - b),
  };
}

/** The small region in which a double's own must lie: the middle of a pipe or body; a fixture's whole box. */
function markOf(element: Element, identities: readonly Identity[]): Box | null {
  const { part } = identities[element.id]!;
  if (part === 'pipe') {
    const line = element.centreLine?.points;
    if (line === undefined || line.length < 2) return null;
    const [a, b] = [line[0]!, line[line.length - 1]!];
    const middle = boxCentre({ min: a, max: b });
    return { min: middle, max: middle };
  }
  if (element.box === null) return null;
  if (part === 'fixture') return element.box;
  const centre = boxCentre(element.box);
  return { min: centre, max: centre };
}

/** Where the middle of an element's double may lie: along a pipe, in the middle of a body. */
function wholeOf(element: Element, identities: readonly Identity[]): Box | null {
  const { part } = identities[element.id]!;
  return part === 'pipe' ? boxAround(element.centreLine?.points ?? []) : markOf(element, identities);
}

/** A pipe drawn once more over part of a longer one, of the same diameter, with no ports joined to it. */
function isPartOf(short: Element, long: Element, identities: readonly Identity[], model: Model): boolean {
  if (identities[short.id]!.part !== 'pipe' || identities[long.id]!.part !== 'pipe') return false;
  const [p, q] = [short.centreLine!, long.centreLine!];
  if (!alike(p.outerDiameter, q.outerDiameter) || connections(short, model) > 0) return false;
  const line = polyline(q.points);
  if (line.length === 0 || polyline(p.points).length >= line.length) return false;
  return (
    p.points.every((point) => {
      const foot = footOn(line, point);
      return foot.off <= doubled && foot.at > 0 && foot.at < line.length;
    }) &&
    p.points.length === 2 &&
    q.points.length === 2
  );
}

/** A wider pipe round another, no farther than that reaches, with no ports joined to it: a sleeve, or its insulation. */
function isSleeveOf(wide: Element, inner: Element, identities: readonly Identity[], model: Model): boolean {
  if (identities[wide.id]!.part !== 'pipe' || identities[inner.id]!.part !== 'pipe') return false;
  const [p, q] = [wide.centreLine!, inner.centreLine!];
  const [outer, own] = [p.outerDiameter, q.outerDiameter];
  if (outer === null || own === null || outer <= own || alike(outer, own) || connections(wide, model) > 0) return false;
  const line = polyline(q.points);
  if (line.length === 0 || polyline(p.points).length > line.length + doubled) return false;
  return p.points.every((point) => footOn(line, point).off <= doubled);
}

const alike = (a: number | null, b: number | null): boolean => {
  const [x, y] = [a ?? b ?? 0, b ?? a ?? 0];
  return Math.abs(x - y) <= 0.1 * Math.max(x, y);
};

function isDouble(a: Element, b: Element, identities: readonly Identity[], model: Model): boolean {
  const [x, y] = [identities[a.id]!, identities[b.id]!];
  if (x.part !== y.part || areConnected(a, b, model)) return false;
  if (x.part === 'pipe') return samePipe(a, b);
  if (a.box === null || b.box === null) return false;
  if (x.part === 'fixture') return x.kind !== null && x.kind === y.kind && onePlace(a.box, b.box);
  return sameBox(a.box, b.box);
}

function samePipe(a: Element, b: Element): boolean {
  const [p, q] = [a.centreLine!, b.centreLine!];
  if (!alike(p.outerDiameter, q.outerDiameter)) return false;
  const near = (i: number, j: number): boolean => distance(p.points.at(i)!, q.points.at(j)!) <= doubled;
  return (near(0, 0) && near(-1, -1)) || (near(0, -1) && near(-1, 0));
}

const sameBox = (a: Box, b: Box): boolean =>
  [0, 1, 2].every((i) => Math.abs(a.min[i]! - b.min[i]!) <= doubled && Math.abs(a.max[i]! - b.max[i]!) <= doubled);

/** Two fixtures of one kind stand at one place when the smaller plan lies nearly whole in the larger, heights touching. */
const sharedPlan = 0.8;
function onePlace(a: Box, b: Box): boolean {
  const shared = (i: number): number => Math.min(a.max[i]!, b.max[i]!) - Math.max(a.min[i]!, b.min[i]!);
  const plan = ({ min, max }: Box): number => (max[0] - min[0]) * (max[1] - min[1]);
  const [dx, dy, dz] = [shared(0), shared(1), shared(2)];
  return dx > 0 && dy > 0 && dz > -0.05 && dx * dy >= sharedPlan * Math.min(plan(a), plan(b));
}

function areConnected(a: Element, b: Element, model: Model): boolean {
  return a.ports.some((port) => model.ports[port]?.connected.some((other) => model.ports[other]?.owner === b.id));
}

const connections = ({ ports }: Element, model: Model): number =>
  ports.filter((port) => (model.ports[port]?.connected.length ?? 0) > 0).length;

function preference(model: Model, identities: readonly Identity[]): (a: Element, b: Element) => number {
  const said = (element: Element): number => (identities[element.id]!.medium === null ? 0 : 1);
  return (a, b) =>
    connections(b, model) - connections(a, model) ||
    said(b) - said(a) ||
    (a.globalId < b.globalId ? -1 : a.globalId > b.globalId ? 1 : a.id - b.id);
}

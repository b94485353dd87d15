import { boxAround } from '../geometry/box.ts';
import type { Box, Vec3 } from '../geometry/vector.ts';
import type { Element, Model } from '../model/model.ts';
import type { Building } from './building.ts';

/** What of a page's pipes and fixtures is otherwise in a model. Rows are rows of the result, in its order. */
export interface ModelDifference {
  /** Pipes and fixtures that the model does not hold; null where the page was made of several files. */
  readonly missing: readonly Row[] | null;
  readonly moved: readonly Row[];
  /** Pipes of another outside diameter. */
  readonly resized: readonly Row[];
  /** Distribution elements: those of the model, and those that the page's own model had; alike where the page had several files. */
  readonly elements: { readonly here: number; readonly page: number };
}

export interface Row {
  readonly is: 'pipe' | 'fixture';
  readonly row: number;
}

/** Metres: places are kept in whole millimetres, and a file that was only exported again may round. */
const samePlace = 0.003;
const sameDiameter = 0.0003;

export function modelDifference(building: Building, { elements }: Model): ModelDifference {
  const { result } = building;
  const byId = new Map<string, Element[]>();
  for (const element of elements) byId.set(element.globalId, [...(byId.get(element.globalId) ?? []), element]);
  // A doubled GlobalId says nothing of which element is meant.
  const elementOf = (id: string): Element | 'missing' | 'doubled' => {
    const found = byId.get(plain(id)) ?? [];
    return found.length > 1 ? 'doubled' : (found[0] ?? 'missing');
  };
  const several = result.models !== undefined && result.models.length > 1;
  const missing: Row[] = [];
  const moved: Row[] = [];
  const resized: Row[] = [];
  const compare = (at: Row, id: string, place: Box | null, outer: number): void => {
    const element = elementOf(id);
    if (element === 'doubled') return;
    if (element === 'missing') {
      missing.push(at);
      return;
    }
    const now = at.is === 'pipe' ? boxAround(element.centreLine?.points ?? []) : element.box;
    if (place !== null && now !== null && apart(place, now) > samePlace) moved.push(at);
    const diameter = element.centreLine?.outerDiameter ?? 0;
    if (outer > 0 && diameter > 0 && Math.abs(outer - diameter) > sameDiameter) resized.push(at);
  };
  for (const [row, { globalId }] of result.pipes.entries())
    compare({ is: 'pipe', row }, globalId, pipePlace(building, row), outerOf(building, row));
  for (const [row, { globalId }] of result.fixtures.entries())
    compare({ is: 'fixture', row }, globalId, fixturePlace(building, row), 0);
  return {
    missing: several ? null : missing,
    moved: moved,
    resized: resized,
    elements: { here: elements.length, page: several ? elements.length : result.counts.elements },
  };
}

/** A doubled element of the page bears its file and STEP id behind its GlobalId. */
const plain = (id: string): string => id.replace(/#\d+\.\d+$/, '');

/** World metres. */
function pipePlace(building: Building, row: number): Box | null {
  const { pipes, origin } = building.data.scene;
  const points: Vec3[] = [];
  for (const section of building.sectionsOf[row] ?? [])
    for (let at = building.pointStart[section]!; at < building.pointStart[section + 1]!; at++)
      points.push([origin[0] + pipes.x[at]! / 1000, origin[1] + pipes.y[at]! / 1000, origin[2] + pipes.z[at]! / 1000]);
  return boxAround(points);
}

function outerOf({ sectionsOf, data }: Building, row: number): number {
  const [section] = sectionsOf[row] ?? [];
  return section === undefined ? 0 : data.scene.pipes.outer[section]! / 10_000;
}

function fixturePlace({ data }: Building, row: number): Box | null {
  const { fixtures, origin } = data.scene;
  const at = (x: Int32Array, y: Int32Array, z: Int32Array): Vec3 => [
    origin[0] + x[row]! / 1000,
    origin[1] + y[row]! / 1000,
    origin[2] + z[row]! / 1000,
  ];
  const box = {
    min: at(fixtures.minX, fixtures.minY, fixtures.minZ),
    max: at(fixtures.maxX, fixtures.maxY, fixtures.maxZ),
  };
  return box.max[0] > box.min[0] ? box : null;
}

const apart = (a: Box, b: Box): number =>
  Math.max(
    ...([0, 1, 2] as const).flatMap((axis) => [
      Math.abs(a.min[axis] - b.min[axis]),
      Math.abs(a.max[axis] - b.max[axis]),
    ]),
  );

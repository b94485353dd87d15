import type { Vec3 } from '../geometry/vector.ts';
import type { ElementId } from '../model/model.ts';
import type { JointId } from '../network/network.ts';
import type { Result } from './result.ts';
import type { Flat, Isometry } from './riser-isometry.ts';
import type { RiserSource } from './riser-source.ts';

/** A mark on the drawing; a fixture's stands over its outlet, the others on their joint. */
export interface RiserSymbol {
  readonly is: 'fixture' | 'cleanout' | 'open-air' | 'admittance-valve' | 'sewer' | 'no-air';
  /** Kind of a fixture. */
  readonly kind: string | null;
  /** Row of the result's fixtures; -1 for the other marks. */
  readonly fixture: number;
  readonly at: Flat;
}

/** Side of the square that a fixture's symbol takes, its foot at the outlet. */
export const symbolSize = 22;

export function riserSymbols(
  result: Result,
  { model, network, paths, identities }: RiserSource,
  inside: ReadonlySet<JointId>,
  placeOf: (joint: JointId) => Vec3 | null,
  flat: Isometry,
): readonly RiserSymbol[] {
  const symbols: RiserSymbol[] = [];
  const rowOf = new Map(result.fixtures.map(({ globalId, stepId }, row) => [`${globalId} ${stepId}`, row]));
  const fixtureRow = (element: ElementId): number => {
    const found = model.elements[element];
    return found === undefined ? -1 : (rowOf.get(`${found.globalId} ${found.stepId}`) ?? -1);
  };
  const put = (joint: JointId, is: RiserSymbol['is'], fixture = -1): void => {
    if (!inside.has(joint)) return;
    const at = placeOf(joint);
    if (at === null) return;
    symbols.push({ is, kind: result.fixtures[fixture]?.kind ?? null, fixture, at: flat.at(at) });
  };
  for (const { element, outlet } of paths.fixtures) put(outlet, 'fixture', fixtureRow(element));
  for (const { fixture, piece, at } of paths.traps) {
    const row = fixtureRow(paths.fixtures.find(({ id }) => id === fixture)?.element ?? (-1 as ElementId));
    if (piece === null && result.fixtures[row]?.ventedBy.how === 'unvented') put(at, 'no-air', row);
  }
  for (const { mouths } of paths.pieces)
    for (const { joint, how } of mouths) put(joint, how === 'valve' ? 'admittance-valve' : 'open-air');
  for (const { sewerEnd } of paths.systems) put(sewerEnd, 'sewer');
  for (const { id, elements } of network.joints)
    if (elements.some((element) => identities[element]?.part === 'cleanout')) put(id, 'cleanout');
  return symbols;
}

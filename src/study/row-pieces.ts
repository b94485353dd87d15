import type { Role } from '../codes/role.ts';
import type { ElementId } from '../model/model.ts';
import type { PipeId } from '../network/network.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Load } from '../units/quantity.ts';
import { type InWall, inWallsOf } from '../verdicts/in-walls.ts';
import type { Attempt } from './attempt.ts';
import type { Row } from './row.ts';

/** One pipe of an alternative, where it lies and what size it needs. */
export interface RowPiece {
  readonly pipe: PipeId;
  /** null: a link between two fittings. */
  readonly element: ElementId | null;
  readonly added: boolean;
  readonly role: Role;
  /** null: no size of the tables holds it, or nothing asks for one. */
  readonly size: NominalSize | null;
  /** Developed length with its halves of the fittings at both ends, metres. */
  readonly length: number;
  readonly load: Load;
  readonly material: string | null;
  /** Where most of it lies. */
  readonly place: PiecePlace;
  readonly underFloor: boolean;
  /** Walls that it stands in or runs along; those it only crosses are not among them. */
  readonly walls: readonly InWall[];
}

export type PiecePlace = 'wall' | 'floor' | 'room';

/** What reaches less far below the floor, metres, does not lie there. */
const leastBelow = 0.05;

/** Pipes in the scope and those added: wet ones in the order of their water, then vents by id. */
export function rowPieces(row: Row, { piping, outcome }: Attempt, scope: ReadonlySet<PipeId>): RowPiece[] {
  const { network, paths, shown, pipes, model, code } = outcome;
  const { stream } = paths;
  const find = inWallsOf(model, code.walls);
  const chosen = network.pipes.filter(({ id, element }) => {
    const from = piping.origin[id] ?? null;
    return from === null ? element !== null : scope.has(from);
  });
  const flow = new Map(paths.inFlowOrder.map((pipe, at) => [pipe, at]));
  const order = (id: PipeId): number => flow.get(id) ?? paths.inFlowOrder.length + id;
  return chosen
    .map((pipe): RowPiece => {
      const { id, element, points } = pipe;
      const walls = find(pipe).filter(({ run }) => run !== 'across');
      const below = points === null ? 0 : lengthBelow(points, row.floor);
      const inWall = Math.max(0, ...walls.map(({ length }) => length));
      const above = Math.max(0, pipe.length - below - inWall);
      const place = inWall >= below && inWall >= above && inWall > 0 ? 'wall' : below >= above ? 'floor' : 'room';
      return {
        pipe: id,
        element,
        added: piping.origin[id] === null,
        role: shown.roles.uses[id]!.role,
        size: pipes[id]!.required?.most ?? null,
        length: stream.span(id),
        load: shown.loads.pipes[id]!.load,
        material: (element === null ? null : model.elements[element]!.material) ?? row.material,
        place: points === null ? 'room' : place,
        underFloor: below >= leastBelow,
        walls,
      };
    })
    .sort((a, b) => order(a.pipe) - order(b.pipe));
}

/** Metres of a polyline that lie below a level. */
function lengthBelow(
  points: NonNullable<Attempt['outcome']['network']['pipes'][number]['points']>,
  level: number,
): number {
  let below = 0;
  for (let at = 1; at < points.length; at++) {
    const [a, b] = [points[at - 1]!, points[at]!];
    const length = Math.hypot(b[0] - a[0], b[1] - a[1], b[2] - a[2]);
    const [low, high] = [Math.min(a[2], b[2]), Math.max(a[2], b[2])];
    below += length * (high <= level ? 1 : low >= level ? 0 : (level - low) / (high - low));
  }
  return below;
}

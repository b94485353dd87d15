import type { NominalSize } from '../units/nominal-size.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import type { WallBody } from '../verdicts/wall-body.ts';
import { type HoleFit, holesIn, passesStuds, pipeWidth, wallFit } from '../verdicts/wall-fit.ts';
import type { RowPiece } from './row-pieces.ts';

/** What an alternative asks of the wall. Millimetres. */
export interface WallNeed {
  /** The walls its pipes stand in or run along; none: the pipes above the floor are judged, wherever a wall will be. */
  readonly bodies: readonly WallBody[];
  /** Widest thing in the wall: a fitting, or a pipe whose fittings no source gives. */
  readonly depthMm: number;
  readonly by: 'fitting' | 'pipe';
  /** It stands between studs, or runs along the wall. */
  readonly lies: 'upright' | 'along';
  readonly size: NominalSize;
  /** Size that is laid, where its material is not made in the size that is asked. */
  readonly made: NominalSize;
  /** Pipe alone. */
  readonly outerMm: number;
  /** Shallowest stud between which it fits; null: none of the list. */
  readonly stud: string | null;
  /** All pipes fit every wall as modelled, holes included; null where no wall is modelled. */
  readonly fits: boolean | null;
  /** Of the largest level pipe that has to pass through studs; null where none does. */
  readonly bored: BoredNeed | null;
}

export interface BoredNeed {
  readonly size: NominalSize;
  readonly outerMm: number;
  readonly holeMm: number;
  /** By stud of the list. */
  readonly limits: readonly { readonly stud: string; readonly loadbearing: HoleFit; readonly other: HoleFit }[];
  /** Shallowest stud that may be bored so; null: none of the list. */
  readonly loadbearing: string | null;
  readonly other: string | null;
}

/** null where no pipe of known width stands in a wall. */
export function wallNeed({ code }: Outcome, pieces: readonly RowPiece[]): WallNeed | null {
  const walled = pieces.filter(({ walls }) => walls.length > 0);
  const judged = walled.length > 0 ? walled : pieces.filter(({ place }) => place === 'room');
  const sized = judged.flatMap((piece) => {
    if (piece.size === null) return [];
    const width = pipeWidth(code, piece.size, piece.material);
    const needs = width.fittingMm ?? width.outerMm;
    return needs === null || width.outerMm === null
      ? []
      : [{ ...piece, size: piece.size, width, needs, outer: width.outerMm }];
  });
  // Of pipes as wide as each other the larger is shown, then one that stands upright.
  const [widest] = [...sized].sort(
    (a, b) =>
      b.needs - a.needs ||
      code.series.rank(b.size) - code.series.rank(a.size) ||
      Number(liesUpright(b)) - Number(liesUpright(a)) ||
      a.pipe - b.pipe,
  );
  if (widest === undefined) return null;
  const bodies = [...new Set(walled.flatMap(({ walls }) => walls.map(({ body }) => body)))];
  const fits = sized.flatMap(({ walls, width }) =>
    walls.flatMap((inWall) => {
      const { cavity, wall } = inWall.body;
      const fit = cavity === null ? null : wallFit(code, width, cavity, passesStuds(code, inWall), wall.loadBearing);
      return fit === null ? [] : [fit.fits];
    }),
  );
  const bored = sized.filter(({ walls }) =>
    walls.some((inWall) => inWall.body.cavity?.framing === 'wood' && passesStuds(code, inWall)),
  );
  const { rank } = code.series;
  const [largest] = [...bored].sort((a, b) => b.outer - a.outer || rank(b.size) - rank(a.size) || a.pipe - b.pipe);
  return {
    bodies,
    depthMm: widest.needs,
    by: widest.width.fittingMm === null ? 'pipe' : 'fitting',
    lies: liesUpright(widest) ? 'upright' : 'along',
    size: widest.size,
    made: widest.width.made ?? widest.size,
    outerMm: widest.outer,
    stud: code.walls.studs.find(({ depthMm }) => widest.needs <= depthMm)?.name ?? null,
    fits: fits.length === 0 ? null : fits.every(Boolean),
    bored: largest === undefined ? null : boredNeed(code, largest.size, largest.outer, widest.needs),
  };
}

const liesUpright = ({ walls }: RowPiece): boolean => walls.length === 0 || walls.some(({ run }) => run === 'upright');

function boredNeed(code: Outcome['code'], size: NominalSize, outerMm: number, depth: number): BoredNeed | null {
  const limits = code.walls.studs.flatMap(({ name, depthMm }) => {
    const holes = holesIn(code, outerMm, depthMm);
    return holes === null ? [] : [{ stud: name, deep: depth <= depthMm, ...holes }];
  });
  const [first] = limits;
  if (first === undefined) return null;
  return {
    size,
    outerMm,
    holeMm: first.other.holeMm,
    limits: limits.map(({ stud, loadbearing, other }) => ({ stud, loadbearing, other })),
    loadbearing: limits.find(({ deep, loadbearing }) => deep && loadbearing.fits)?.stud ?? null,
    other: limits.find(({ deep, other }) => deep && other.fits)?.stud ?? null,
  };
}
